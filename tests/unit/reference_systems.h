/* The reference rows' curves, speeds and systems. */
#ifndef SL_TESTS_REFERENCE_SYSTEMS_H
#define SL_TESTS_REFERENCE_SYSTEMS_H

#include "reference_functions.h"

/* --- curves --- */

struct points {
    double x[VALUES_MOST];
    double y[VALUES_MOST];
    struct sl_curve_view view;
};

static bool read_points(struct inputs *in, const char *x, const char *y,
                        struct points *points)
{
    points->view =
        (struct sl_curve_view){points->x, points->y, numbers(in, x, points->x)};
    if (numbers(in, y, points->y) == points->view.count)
        return true;
    inputs_complain(in, "points do not pair up:", y);
    return false;
}

static double curve_at(struct inputs *in)
{
    struct points points;

    if (!read_points(in, "x", "y", &points))
        return NAN;
    return sl_curve_at(&points.view, number(in, "at"));
}

static double curve_slope_at(struct inputs *in)
{
    struct points points;

    if (!read_points(in, "x", "y", &points))
        return NAN;
    return sl_curve_slope_at(&points.view, number(in, "at"));
}

/* --- speed --- */

static double speed_ratio(struct inputs *in)
{
    return number(in, "to_speed") / number(in, "from_speed");
}

static double affinity_flow(struct inputs *in)
{
    return sl_affinity_flow(number(in, "flow"), speed_ratio(in));
}

static double affinity_head(struct inputs *in)
{
    return sl_affinity_head(number(in, "head"), speed_ratio(in));
}

static double affinity_power_ratio(struct inputs *in)
{
    return sl_affinity_flow(1.0, speed_ratio(in)) *
           sl_affinity_head(1.0, speed_ratio(in));
}

/* In the unit it is given in. */
static double affinity_power(struct inputs *in)
{
    return number(in, "power") * affinity_power_ratio(in);
}

static double affinity_npshr(struct inputs *in)
{
    return sl_affinity_npshr(number(in, "npshr"), speed_ratio(in),
                             number(in, "exponent"));
}

/* --- systems --- */

/* Static head, a square-law coefficient, and pipes in series. */
struct square_law {
    double static_head;
    double coefficient;
    double bore[VALUES_MOST], length[VALUES_MOST], factor[VALUES_MOST];
    size_t pipes;
    double k; /* in the first pipe's bore */
    double to_source_gravity;
};

static double square_law_head(void *context, double flow)
{
    const struct square_law *law = context;
    double loss = 0.0;

    for (size_t i = 0; i < law->pipes; i++) {
        double speed = sl_pipe_velocity(flow, law->bore[i]);

        loss +=
            sl_darcy_head(law->factor[i], law->length[i], law->bore[i], speed);
        if (i == 0)
            loss += sl_minor_head(law->k, speed);
    }
    return law->static_head + law->coefficient * flow * flow +
           loss * law->to_source_gravity;
}

static void read_law(struct inputs *in, struct square_law *law)
{
    double fanning[VALUES_MOST];
    size_t i;

    memset(law, 0, sizeof *law);
    law->static_head = number(in, "static_head");
    law->coefficient = number_or(in, "coefficient", 0.0);
    law->k = number_or(in, "k", 0.0);
    law->to_source_gravity = SL_GRAVITY / gravity(in);
    law->pipes = find(in, "bore", law->bore);
    if (law->pipes == 0)
        return;
    if (numbers(in, "length", law->length) != law->pipes)
        inputs_complain(in, "not one for each pipe:", "length");
    if (find(in, "fanning", fanning) == law->pipes)
        for (i = 0; i < law->pipes; i++)
            law->factor[i] = 4 * fanning[i];
    else if (numbers(in, "factor", law->factor) != law->pipes)
        inputs_complain(in, "not one for each pipe:", "factor");
}

static bool duty(struct inputs *in, struct sl_operating_point *point)
{
    struct points pump;
    struct square_law law;
    struct sl_system system = {square_law_head, &law};

    if (!read_points(in, "pump_flow", "pump_head", &pump))
        return false;
    read_law(in, &law);
    return sl_operating_point_find(&pump.view, &system, 0.0, point) ==
           SL_OPERATING_FOUND;
}

static double duty_flow(struct inputs *in)
{
    struct sl_operating_point point;

    return duty(in, &point) ? point.flow : NAN;
}

static double duty_head(struct inputs *in)
{
    struct sl_operating_point point;

    return duty(in, &point) ? point.head : NAN;
}

/* Between two reservoirs: a curve that is the fall of level throughout. */
static double reservoir_flow(struct inputs *in)
{
    double fall = number(in, "fall");
    double flows[] = {0.0, 10.0}, heads[] = {fall, fall};
    struct sl_curve_view level = {flows, heads, 2};
    struct square_law law;
    struct sl_system system = {square_law_head, &law};
    struct sl_operating_point point;

    read_law(in, &law);
    return sl_operating_point_find(&level, &system, 0.0, &point) ==
                   SL_OPERATING_FOUND
               ? point.flow
               : NAN;
}

/* The flow at another speed, less the wanted one. */
static double flow_at(const struct points *pump, const struct square_law *law,
                      double ratio)
{
    struct points scaled = *pump;
    struct square_law copy = *law;
    struct sl_system system = {square_law_head, &copy};
    struct sl_operating_point point = {0};

    scaled.view.x = scaled.x;
    scaled.view.y = scaled.y;
    for (size_t i = 0; i < pump->view.count; i++) {
        scaled.x[i] = sl_affinity_flow(pump->x[i], ratio);
        scaled.y[i] = sl_affinity_head(pump->y[i], ratio);
    }
    sl_operating_point_find(&scaled.view, &system, 0.0, &point);
    return point.flow;
}

/* The speed at which the pump gives a share of its flow at `speed`. */
static double speed_for_share(struct inputs *in)
{
    double speed = number(in, "speed"), low = 0.1, high = 1.0, wanted;
    struct points pump;
    struct square_law law;

    if (!read_points(in, "pump_flow", "pump_head", &pump))
        return NAN;
    read_law(in, &law);
    wanted = number(in, "share") * flow_at(&pump, &law, 1.0);
    while (high - low > 1e-9) {
        double middle = (low + high) / 2;

        if (flow_at(&pump, &law, middle) < wanted)
            low = middle;
        else
            high = middle;
    }
    return speed * high;
}

/* A main, and the same with a twin along part of it, at one loss. */
struct looped {
    double single, twin, bore;
};

static double looped_head(void *context, double flow)
{
    const struct looped *main = context;
    const double c = 120; /* any: it cancels */

    return sl_hazen_williams_head(flow, c, main->single, main->bore) +
           sl_hazen_williams_head(flow / 2, c, main->twin, main->bore);
}

static double looped_gain(struct inputs *in)
{
    double length = number(in, "length"), twin = number(in, "twin_length");
    double flow = number(in, "flow");
    struct looped alone = {length, 0, 0.3}, with = {length - twin, twin, 0.3};
    double head = looped_head(&alone, flow);
    double flows[] = {0.0, 10 * flow}, heads[] = {head, head};
    struct sl_curve_view level = {flows, heads, 2};
    struct sl_system system = {looped_head, &with};
    struct sl_operating_point point;

    return sl_operating_point_find(&level, &system, 0.0, &point) ==
                   SL_OPERATING_FOUND
               ? point.flow - flow
               : NAN;
}

#endif
