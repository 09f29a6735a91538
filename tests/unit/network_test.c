/* Pumps that run together, solved at once. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <string.h>

#include <cmocka.h>

#include "check.h"
#include "hydraulics/constants.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/network_parts.h"
#include "network_stations.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])
#define UNTOUCHED 0x5a

/* Alike within rounding: some 1e-14 m of head over the slope of the heads,
 * which may be as little as 1 m at 1 m³/s. */
#define ALIKE_SHARE 1e-12
#define ALIKE_FLOW 1e-14

static const double flows[] = {0.0, 0.013, 0.031, 0.044, 0.07};
static const double heads[] = {33.1, 32.4, 29.9, 26.2, 15.3};
static const double weak_heads[] = {21.3, 20.7, 18.4, 15.1, 8.2};
static const double droop_heads[] = {27.3, 30.2, 31.1, 27.6, 16.4};
static const double late_flows[] = {0.02, 0.031, 0.044, 0.07};
static const double late_heads[] = {31.7, 29.9, 26.2, 15.3};
static const double late_droop_heads[] = {26.1, 30.4, 27.2, 15.3};
static const double flat_heads[] = {33.1, 33.1, 33.1, 33.1, 33.1};

/* A shared pipe, one that draws from it, and an own one behind that. */
static const struct sl_network_pipe pipes[] = {
    {-1, false, 23.7, 0.41, 1.3e-4, NAN, 0.83},
    {0, false, 12.3, 0.31, 2.1e-4, NAN, 0.37},
    {1, true, 3.17, 0.207, 0.9e-4, NAN, 1.31}};

static struct sl_network_unit unit_of(const double *x, const double *y,
                                      size_t count)
{
    return (struct sl_network_unit){{x, y, count}, NAN, 1, 2, 0.0};
}

static struct sl_network network_of(const struct sl_network_unit *units,
                                    size_t count)
{
    return (struct sl_network){.pipes = pipes,
                               .pipe_count = COUNT(pipes),
                               .units = units,
                               .unit_count = count,
                               .static_head = 11.3,
                               .loss_flow = NAN,
                               .loss_head = NAN,
                               .length = 1234.0,
                               .bore = 0.303,
                               .roughness = 1.7e-4,
                               .minor_k = 3.29,
                               .viscosity = 1.13e-6};
}

static enum sl_network_end solve(const struct sl_network *network,
                                 struct sl_unit_flow *out)
{
    memset(out, UNTOUCHED, network->unit_count * sizeof *out);
    return sl_network_solve(network, NULL, out);
}

static void check_end(const char *sentence, enum sl_network_end got,
                      enum sl_network_end want)
{
    if (got != want)
        fail_msg("%s: ended as '%s', not '%s'", sentence,
                 sl_network_end_name(got), sl_network_end_name(want));
}

static void check_untouched(const struct sl_unit_flow *flow)
{
    struct sl_unit_flow before;

    memset(&before, UNTOUCHED, sizeof before);
    assert_memory_equal(flow, &before, sizeof before);
}

/* --- against closed forms --- */

/* H = a - b Q² by many points, one measured loss in the discharge and a
 * suction of fittings alone: every term is a square, and Q is a root. */
static void test_squares_by_hand(void **state)
{
    enum { POINTS = 4001 };
    static double x[POINTS], y[POINTS];
    const double a = 41.7, b = 3170.0, k = 2.385, bore = 0.213;
    const double loss_flow = 0.0613, loss_head = 4.19, lift = 9.31;
    const struct sl_network_pipe fittings = {-1, true, 0.0, bore, 0.0, NAN, k};
    const int counts[] = {1, 2, 3};

    (void)state;
    for (size_t i = 0; i < POINTS; i++) {
        x[i] = 0.09 * (double)i / (POINTS - 1);
        y[i] = a - b * x[i] * x[i];
    }
    for (size_t i = 0; i < COUNT(counts); i++)
        for (int gauge = 0; gauge <= 1; gauge++) {
            double n = counts[i], speed = sl_pipe_velocity(1.0, bore);
            double suction = (k - gauge) * speed * speed / (2 * SL_GRAVITY);
            double shared = loss_head / (loss_flow * loss_flow) * n * n;
            double want = sqrt((a - lift) / (b + suction + shared));
            struct sl_network_unit unit = {
                {x, y, POINTS}, NAN, counts[i], 0, 0.0};
            struct sl_network network = network_of(&unit, 1);
            struct sl_unit_flow out;

            network.pipes = &fittings;
            network.pipe_count = 1;
            network.static_head = lift;
            network.gauge_on_pipe = gauge;
            network.loss_flow = loss_flow;
            network.loss_head = loss_head;
            check_end("squares", solve(&network, &out), SL_NETWORK_SOLVED);
            check_close("flow of squares", out.flow, want, 3e-8, 0.0);
            check_close("suction loss", out.suction_loss,
                        sl_minor_head(k, sl_pipe_velocity(out.flow, bore)),
                        1e-15, 0.0);
            assert_int_equal(out.end, SL_UNIT_RUNS);
        }
}

static void test_two_equal_pumps_are_one_unit_of_two(void **state)
{
    struct sl_network_pipe apart[] = {pipes[0], pipes[1], pipes[2], pipes[2]};
    struct sl_network_unit unit = unit_of(flows, heads, 5);
    struct sl_network_unit two[] = {unit, unit};
    struct sl_network together = network_of(&unit, 1);
    struct sl_network split = network_of(two, 2);
    struct sl_unit_flow one_out, two_out[2];

    (void)state;
    unit.count = 2;
    two[1].pipe = 3;
    split.pipes = apart;
    split.pipe_count = 4;
    check_end("one unit", solve(&together, &one_out), SL_NETWORK_SOLVED);
    check_end("two units", solve(&split, two_out), SL_NETWORK_SOLVED);
    for (int i = 0; i < 2; i++) {
        check_close("flow", two_out[i].flow, one_out.flow, 1e-12, 0.0);
        check_close("suction loss", two_out[i].suction_loss,
                    one_out.suction_loss, 1e-12, 0.0);
    }
    assert_true(one_out.flow > 0.03 && one_out.flow < 0.06);
}

/* --- against the solver of one pump --- */

static double darcy_head(double flow, double length, double bore,
                         double roughness, double viscosity)
{
    double velocity = sl_pipe_velocity(flow, bore);
    double factor = sl_friction_factor(sl_reynolds(velocity, bore, viscosity),
                                       roughness / bore);

    return sl_darcy_head(factor, length, bore, velocity);
}

/* F12 for a set of one, written out. */
static double one_pump_asked(void *context, double flow)
{
    const struct sl_network *n = context;
    double velocity = sl_pipe_velocity(flow, n->bore);
    double asked = n->static_head + n->units[0].fixed_loss;

    if (isnan(n->loss_flow))
        asked +=
            darcy_head(flow, n->length, n->bore, n->roughness, n->viscosity) +
            sl_minor_head(n->minor_k, velocity);
    else
        asked += n->loss_head * (flow / n->loss_flow) * (flow / n->loss_flow);
    for (int i = n->units[0].pipe; i >= 0; i = n->pipes[i].draws_from) {
        const struct sl_network_pipe *p = &n->pipes[i];

        velocity = sl_pipe_velocity(flow, p->bore);
        asked += sl_minor_head(p->minor_k, velocity);
        if (isnan(p->hazen_williams_c))
            asked += darcy_head(flow, p->length, p->bore, p->roughness,
                                n->viscosity);
        else
            asked += sl_hazen_williams_head(flow, p->hazen_williams_c,
                                            p->length, p->bore);
        if (p->draws_from < 0 && n->gauge_on_pipe)
            asked -= sl_velocity_head(velocity);
    }
    return asked;
}

static void test_a_set_of_one_is_the_operating_point(void **state)
{
    const struct sl_network_unit units[] = {
        unit_of(flows, heads, 5), unit_of(flows, weak_heads, 5),
        unit_of(flows, droop_heads, 5), unit_of(late_flows, late_heads, 4),
        unit_of(late_flows, late_droop_heads, 4)};
    int ends[SL_OPERATING_BAD_SYSTEM + 1] = {0};

    (void)state;
    for (size_t i = 0; i < COUNT(units); i++)
        for (double lift = -400.0; lift < 44.0; lift += lift < -20 ? 19 : .73) {
            struct sl_network network = network_of(&units[i], 1);
            struct sl_system system = {one_pump_asked, &network};
            struct sl_operating_point point = {0};
            struct sl_unit_flow out;
            enum sl_operating_end one;
            enum sl_network_end end;

            network.static_head = lift;
            network.gauge_on_pipe = i % 2 == 1;
            end = solve(&network, &out);
            one = sl_operating_point_find(&units[i].head, &system, 0.0, &point);
            ends[one]++;
            if (one == SL_OPERATING_NOT_FOUND) {
                check_end("far below", end, SL_NETWORK_BEYOND);
                check_untouched(&out);
                continue;
            }
            check_end("a set of one", end, SL_NETWORK_SOLVED);
            check_close("flow", out.flow,
                        one == SL_OPERATING_STANDS ? 0.0 : point.flow, 1e-13,
                        0.0);
            assert_int_equal(out.end == SL_UNIT_STANDS,
                             one == SL_OPERATING_STANDS);
            assert_int_equal(out.end == SL_UNIT_PAST_END,
                             one == SL_OPERATING_PAST_END);
            assert_int_equal(out.end == SL_UNIT_BEFORE_START,
                             one == SL_OPERATING_BEFORE_START);
        }
    assert_true(ends[SL_OPERATING_FOUND] > 10);
    assert_true(ends[SL_OPERATING_STANDS] > 10);
    assert_true(ends[SL_OPERATING_PAST_END] > 10);
    assert_true(ends[SL_OPERATING_BEFORE_START] > 1);
    assert_true(ends[SL_OPERATING_NOT_FOUND] > 1);
}

static void test_hazen_williams_and_a_measured_discharge(void **state)
{
    struct sl_network_pipe by_c[] = {pipes[0], pipes[1], pipes[2]};
    struct sl_network_unit unit = unit_of(flows, heads, 5);
    struct sl_network network = network_of(&unit, 1);
    struct sl_system system = {one_pump_asked, &network};
    struct sl_operating_point point;
    struct sl_unit_flow out;

    (void)state;
    by_c[0].hazen_williams_c = 113.0;
    by_c[2].hazen_williams_c = 97.3;
    by_c[0].roughness = by_c[2].roughness = NAN; /* not used with a C */
    network.pipes = by_c;
    network.loss_flow = 0.0437;
    network.loss_head = 6.13;
    network.gauge_on_pipe = true;
    unit.fixed_loss = 0.713;
    check_end("by C", solve(&network, &out), SL_NETWORK_SOLVED);
    assert_int_equal(sl_operating_point_find(&unit.head, &system, 0.0, &point),
                     SL_OPERATING_FOUND);
    check_close("flow", out.flow, point.flow, 1e-13, 0.0);
    check_close("suction loss", out.suction_loss,
                one_pump_asked(&network, out.flow) - network.static_head -
                    6.13 * (out.flow / 0.0437) * (out.flow / 0.0437) +
                    sl_velocity_head(sl_pipe_velocity(out.flow, by_c[0].bore)),
                0.0, 1e-13);
}

/* --- how a unit ends --- */

static void test_a_weak_pump_stands_beside_a_strong_one(void **state)
{
    struct sl_network_unit units[] = {unit_of(flows, heads, 5),
                                      unit_of(flows, weak_heads, 5)};
    struct sl_network network = network_of(units, 2);
    struct sl_unit_flow out[2], alone;

    (void)state;
    units[0].pipe = 1;
    units[1].fixed_loss = 0.31;
    network.static_head = 19.9;
    check_end("beside", solve(&network, out), SL_NETWORK_SOLVED);
    assert_int_equal(out[1].end, SL_UNIT_STANDS);
    check_close("no flow", out[1].flow, 0.0, 0.0, 0.0);
    check_close("no residual", out[1].residual, 0.0, 0.0, 0.0);
    assert_false(out[1].two_crossings);
    assert_true(out[1].suction_loss > 0.0); /* that of the other's flow */
    network.unit_count = 1;
    check_end("the strong one", solve(&network, &alone), SL_NETWORK_SOLVED);
    check_close("as if alone", out[0].flow, alone.flow, 1e-13, 0.0);
    check_close("shared pipes", out[1].suction_loss, alone.suction_loss, 1e-12,
                0.0);
    network.units = &units[1];
    check_end("the weak one", solve(&network, &alone), SL_NETWORK_SOLVED);
    assert_int_equal(alone.end, SL_UNIT_RUNS);
}

/* What a pump must overcome at a trickle holds it back at nought. */
static void test_a_fixed_loss_holds_the_valve(void **state)
{
    struct sl_network_unit unit = unit_of(flows, heads, 5);
    struct sl_network network = network_of(&unit, 1);
    struct sl_unit_flow out;

    (void)state;
    network.static_head = 31.7;
    unit.fixed_loss = 1.39;
    check_end("just runs", solve(&network, &out), SL_NETWORK_SOLVED);
    assert_int_equal(out.end, SL_UNIT_RUNS);
    assert_true(out.flow > 0.0 && out.suction_loss >= 1.39);
    unit.fixed_loss = 1.41;
    check_end("held", solve(&network, &out), SL_NETWORK_SOLVED);
    assert_int_equal(out.end, SL_UNIT_STANDS);
    check_close("at rest nothing is lost", out.suction_loss, 0.0, 0.0, 0.0);
    unit.fixed_loss = 33.1 - 31.7; /* just met, which delivers nothing */
    check_end("met", solve(&network, &out), SL_NETWORK_SOLVED);
    assert_int_equal(out.end, SL_UNIT_STANDS);
}

static void test_a_point_met_exactly_is_on_the_curve(void **state)
{
    struct sl_network_unit unit = unit_of(flows, heads, 5);
    struct sl_network network = network_of(&unit, 1);
    struct sl_unit_flow out;

    (void)state;
    unit.pipe = -1;
    network.loss_flow = 0.07;
    network.loss_head = 4.0;
    network.static_head = 15.3 - 4.0;
    check_end("met", solve(&network, &out), SL_NETWORK_SOLVED);
    check_close("at the last point", out.flow, 0.07, 0.0, 0.0);
    assert_int_equal(out.end, SL_UNIT_RUNS);
    check_close("no suction", out.suction_loss, 0.0, 0.0, 0.0);
}

static void test_given_flows_load_the_pipes(void **state)
{
    struct sl_network_unit units[] = {unit_of(flows, heads, 5),
                                      {{NULL, NULL, 0}, 0.0371, 2, 1, 0.29},
                                      {{NULL, NULL, 0}, 0.0, 1, 1, 0.29}};
    struct sl_network network = network_of(units, 3);
    struct sl_unit_flow out[3], again[3], alone;

    (void)state;
    check_end("beside", solve(&network, out), SL_NETWORK_SOLVED);
    check_close("given", out[1].flow, 0.0371, 0.0, 0.0);
    assert_int_equal(out[1].end, SL_UNIT_RUNS);
    check_close("given none", out[2].flow, 0.0, 0.0, 0.0);
    check_close("a fixed loss only at a flow",
                out[1].suction_loss - out[2].suction_loss, 0.29, 0.0, 1e-14);
    network.unit_count = 1;
    check_end("alone", solve(&network, &alone), SL_NETWORK_SOLVED);
    assert_true(out[0].flow < alone.flow - 0.005);
    /* With its own flow given too, all is as before and the discharge,
     * which nobody then asks about, may be unknown. */
    network.unit_count = 3;
    units[0].given_flow = out[0].flow;
    network.static_head = network.bore = network.length = NAN;
    check_end("all given", solve(&network, again), SL_NETWORK_SOLVED);
    for (int i = 0; i < 3; i++)
        check_close("suction loss", again[i].suction_loss, out[i].suction_loss,
                    1e-15, 0.0);
    check_close("no residual", again[0].residual, 0.0, 0.0, 0.0);
    assert_false(again[0].two_crossings);
}

/* --- curves that rise --- */

static void test_droop(void **state)
{
    static const struct {
        const char *sentence;
        double static_head;
        enum sl_unit_end end;
        bool two_crossings;
    } cases[] = {
        {"static head under the shut-off head: one crossing", 25.2,
         SL_UNIT_RUNS, false},
        {"static head between shut-off and summit: two", 27.9, SL_UNIT_RUNS,
         true},
        {"static head over the summit: none", 31.2, SL_UNIT_STANDS, false}};
    struct sl_network_unit units[] = {unit_of(flows, droop_heads, 5),
                                      unit_of(flows, heads, 5)};

    (void)state;
    for (size_t i = 0; i < COUNT(cases); i++)
        for (size_t beside = 1; beside <= 2; beside++) {
            struct sl_network network = network_of(units, beside);
            struct sl_unit_flow out[2];

            network.loss_flow = 0.1;
            network.loss_head = 1.31;
            units[0].pipe = units[1].pipe = 1;
            network.static_head = cases[i].static_head;
            check_end(cases[i].sentence, solve(&network, out),
                      SL_NETWORK_SOLVED);
            if (out[0].end != cases[i].end ||
                out[0].two_crossings != cases[i].two_crossings)
                fail_msg("%s: end %d, two crossings %d, flow %g",
                         cases[i].sentence, out[0].end, out[0].two_crossings,
                         out[0].flow);
            if (beside == 2)
                assert_false(out[1].two_crossings);
            if (out[0].end == SL_UNIT_RUNS) /* right of the summit */
                assert_true(out[0].flow > 0.02);
        }
}

/* Each can run only where the other does not: no balance leaves neither a
 * larger flow.  One is given all the same, and it is a balance. */
static void test_two_that_shut_each_other_out(void **state)
{
    static const double x[] = {0.0, 0.03, 0.05}, y[] = {20.0, 30.0, 28.0};
    struct sl_network_unit units[] = {unit_of(x, y, 3), unit_of(x, y, 3)};

    (void)state;
    units[0].pipe = units[1].pipe = -1;
    for (double lift = 18.1; lift < 31.0; lift += 0.37)
        for (double loss = 0.3; loss < 30.0; loss *= 1.7) {
            struct sl_network network = network_of(units, 2);
            struct sl_unit_flow out[2];

            network.static_head = lift;
            network.loss_flow = 0.06;
            network.loss_head = loss;
            check_end("two alike", solve(&network, out), SL_NETWORK_SOLVED);
            for (int i = 0; i < 2; i++) {
                double part = (out[0].flow + out[1].flow) / 0.06;

                if (out[i].flow > 0)
                    check_close(
                        "balance",
                        sl_curve_carried_on(&units[i].head, out[i].flow),
                        lift + loss * part * part, 0.0, 1e-9);
            }
        }
}

/* --- how the whole ends --- */

static void test_bad_input(void **state)
{
    static const double back[] = {-0.01, 0.02}, twice[] = {0.02, 0.02};
    struct sl_network_pipe broken[3];
    struct sl_network_pipe many_pipes[SL_NETWORK_PIPES + 1];
    struct sl_network_unit many[SL_NETWORK_UNITS + 1], units[2];
    struct sl_network network;
    struct sl_unit_flow out[SL_NETWORK_UNITS + 1];

    (void)state;
    for (int i = 0; i < 13; i++) {
        memcpy(broken, pipes, sizeof broken);
        units[0] = units[1] = unit_of(flows, heads, 5);
        units[1].pipe = 1;
        network = network_of(units, 2);
        network.pipes = broken;
        switch (i) {
        case 0:
            units[1].head = (struct sl_curve_view){twice, heads, 2};
            break;
        case 1:
            units[1].head = (struct sl_curve_view){back, heads, 2};
            break;
        case 2:
            units[1].head = (struct sl_curve_view){flows, heads, 1};
            break;
        case 3:
            units[1].head = (struct sl_curve_view){NULL, NULL, 0};
            break;
        case 4:
            units[1].pipe = 3;
            break;
        case 5:
            units[1].pipe = -2;
            break;
        case 6:
            units[1].count = 0;
            break;
        case 7:
            broken[1].draws_from = 1; /* itself */
            break;
        case 8:
            broken[1].draws_from = -2;
            break;
        case 9:
            units[1].pipe = 2; /* the other's own */
            break;
        case 10: /* several share a pipe behind one that each has */
            units[1].pipe = -1;
            broken[1].own = true;
            broken[2].own = false;
            units[0].count = 2;
            break;
        case 11:
            for (size_t k = 0; k < COUNT(many); k++)
                many[k] = units[1];
            network.units = many;
            network.unit_count = COUNT(many);
            break;
        case 12:
            for (size_t k = 0; k < COUNT(many_pipes); k++)
                many_pipes[k] = pipes[0];
            network.pipes = many_pipes;
            network.pipe_count = COUNT(many_pipes);
            units[0].pipe = units[1].pipe = -1;
            break;
        }
        if (solve(&network, out) != SL_NETWORK_BAD_INPUT)
            fail_msg("bad input %d was taken", i);
        check_untouched(&out[0]);
        check_untouched(&out[1]);
    }
}

static void test_as_many_as_fit(void **state)
{
    static struct sl_network_unit many[SL_NETWORK_UNITS];
    static struct sl_network_pipe long_way[SL_NETWORK_PIPES];
    static struct sl_unit_flow out[SL_NETWORK_UNITS];
    struct sl_network network = network_of(many, SL_NETWORK_UNITS);

    (void)state;
    for (int i = 0; i < SL_NETWORK_PIPES; i++) {
        long_way[i] = pipes[0];
        long_way[i].draws_from = i - 1;
        long_way[i].bore = 2.13;
    }
    for (int i = 0; i < SL_NETWORK_UNITS; i++) {
        many[i] = unit_of(flows, heads, 5);
        many[i].pipe = SL_NETWORK_PIPES - 1 - i;
    }
    network.pipes = long_way;
    network.pipe_count = SL_NETWORK_PIPES;
    network.bore = 1.37;
    check_end("many", solve(&network, out), SL_NETWORK_SOLVED);
    for (int i = 1; i < SL_NETWORK_UNITS; i++) {
        check_close("residual", out[i].residual, 0.0, 0.0, 1e-9);
        assert_true(out[i].flow > out[i - 1].flow); /* a shorter way */
    }
}

static void test_no_figure(void **state)
{
    struct sl_network_unit unit;
    struct sl_network_pipe broken[3];

    (void)state;
    for (int i = 0; i < 16; i++) {
        struct sl_network network = network_of(&unit, 1);
        struct sl_unit_flow out;

        unit = unit_of(flows, heads, 5);
        memcpy(broken, pipes, sizeof broken);
        network.pipes = broken;
        network.loss_flow = i >= 11 && i <= 13 ? 0.05 : NAN;
        network.loss_head = 2.3;
        switch (i) {
        case 0:
            broken[0].length = NAN;
            break;
        case 1:
            broken[1].bore = NAN;
            break;
        case 2:
            broken[2].roughness = NAN;
            break;
        case 3:
            broken[2].minor_k = -0.3;
            break;
        case 4:
            broken[2].hazen_williams_c = 3.0;
            break;
        case 5:
            broken[2].roughness = 0.11 * broken[2].bore;
            break;
        case 6:
            unit.fixed_loss = NAN;
            break;
        case 7:
            unit.given_flow = -0.01;
            break;
        case 8:
            unit.given_flow = INFINITY;
            break;
        case 9:
            network.static_head = NAN;
            break;
        case 10:
            network.viscosity = NAN;
            break;
        case 11:
            network.loss_head = NAN;
            break;
        case 12:
            network.loss_flow = 0.0;
            break;
        case 13:
            network.static_head = INFINITY;
            break;
        case 14:
            network.minor_k = NAN;
            break;
        case 15: /* a flow given, and a way it cannot be weighed on */
            unit.given_flow = 0.0;
            broken[1].length = NAN;
            break;
        }
        if (solve(&network, &out) != SL_NETWORK_NO_FIGURE)
            fail_msg("no figure %d was solved", i);
        check_untouched(&out);
    }
}

static void test_beyond(void **state)
{
    struct sl_network_unit units[] = {unit_of(flows, flat_heads, 5),
                                      unit_of(flows, heads, 5)};
    struct sl_network network = network_of(units, 2);
    struct sl_unit_flow out[2];

    (void)state;
    units[0].pipe = units[1].pipe = -1;
    network.loss_flow = 0.07;
    network.loss_head = 0.1;
    check_end("flat", solve(&network, out), SL_NETWORK_BEYOND);
    check_untouched(&out[0]);
    check_untouched(&out[1]);
    network.loss_head = 7.9;
    check_end("flat, but braked", solve(&network, out), SL_NETWORK_SOLVED);
    assert_int_equal(out[0].end, SL_UNIT_PAST_END);
    assert_int_equal(out[1].end, SL_UNIT_STANDS);
}

/* The head a pipe's friction steps up by where laminar flow ends. */
static double jump_of(double length, double bore, double roughness,
                      double viscosity)
{
    double flow = 2300.0 * viscosity / (bore * sl_pipe_velocity(1.0, bore));

    return sl_darcy_loss(flow * (1 + 1e-9), length, bore, roughness, viscosity)
               .head -
           sl_darcy_loss(flow * (1 - 1e-9), length, bore, roughness, viscosity)
               .head;
}

/* All steps of friction there are on a unit's way. */
static double jumps_on_way(const struct sl_network *n, size_t unit)
{
    double sum = isnan(n->loss_flow)
                     ? jump_of(n->length, n->bore, n->roughness, n->viscosity)
                     : 0.0;

    for (int i = n->units[unit].pipe; i >= 0; i = n->pipes[i].draws_from)
        if (isnan(n->pipes[i].hazen_williams_c))
            sum += jump_of(n->pipes[i].length, n->pipes[i].bore,
                           n->pipes[i].roughness, n->viscosity);
    return sum;
}

/* An oil-like liquid brings Re 2300 into reach. */
static void test_jump(void **state)
{
    struct sl_network_unit units[] = {unit_of(flows, heads, 5),
                                      unit_of(flows, weak_heads, 5)};
    double jump_flow, low;

    (void)state;
    for (size_t count = 1; count <= 2; count++) {
        struct sl_network network = network_of(units, count);
        struct sl_unit_flow out[2], at[2];
        double total, lack;

        network.viscosity = 1e-4;
        jump_flow =
            2300.0 * 1e-4 / (0.303 * sl_pipe_velocity(1.0, network.bore));
        units[0].pipe = units[1].pipe = -1;
        /* At this static head the flow lies just under the step. */
        for (low = 32.9; low > 0.0; low -= 0.01) {
            network.static_head = low;
            check_end("on the way", solve(&network, out), SL_NETWORK_SOLVED);
            total = out[0].flow + (count == 2 ? out[1].flow : 0.0);
            if (total > 0.995 * jump_flow)
                break;
        }
        network.static_head =
            low - 0.4 * jump_of(network.length, network.bore, network.roughness,
                                network.viscosity);
        check_end("at the step", solve(&network, at), SL_NETWORK_AT_JUMP);
        total = at[0].flow + (count == 2 ? at[1].flow : 0.0);
        check_close("total flow", total, jump_flow, 2e-9, 0.0);
        if (count == 1) {
            struct sl_system system = {one_pump_asked, &network};
            struct sl_operating_point point;

            assert_int_equal(
                sl_operating_point_find(&units[0].head, &system, 0.0, &point),
                SL_OPERATING_FOUND);
            check_close("as for one pump", at[0].flow, point.flow, 1e-15, 0.0);
        }
        lack = fabs(at[0].residual);
        assert_true(lack > 0.01);
        assert_true(lack < jumps_on_way(&network, 0));
    }
}

static void test_every_end_has_a_name(void **state)
{
    (void)state;
    for (int end = 0; end <= SL_NETWORK_NO_FIGURE; end++) {
        const char *name = sl_network_end_name((enum sl_network_end)end);

        assert_string_not_equal(name, "unknown end");
        for (int other = 0; other < end; other++)
            assert_string_not_equal(
                name, sl_network_end_name((enum sl_network_end)other));
    }
}

/* --- on random stations --- */

static void check_alike(const char *label, const struct sl_unit_flow *got,
                        const struct sl_unit_flow *want)
{
    check_close(label, got->flow, want->flow, ALIKE_SHARE, ALIKE_FLOW);
    assert_int_equal(got->end, want->end);
    assert_int_equal(got->two_crossings, want->two_crossings);
}

/* F12 for each unit, written out once more. */
static double lack_of(const struct sl_network *n,
                      const struct sl_unit_flow *out, size_t unit)
{
    double total = 0.0, asked = n->static_head + n->units[unit].fixed_loss;

    for (size_t k = 0; k < n->unit_count; k++)
        total += n->units[k].count * out[k].flow;
    if (isnan(n->loss_flow))
        asked +=
            darcy_head(total, n->length, n->bore, n->roughness, n->viscosity) +
            sl_minor_head(n->minor_k, sl_pipe_velocity(total, n->bore));
    else
        asked += n->loss_head * (total / n->loss_flow) * (total / n->loss_flow);
    for (int i = n->units[unit].pipe; i >= 0; i = n->pipes[i].draws_from) {
        const struct sl_network_pipe *p = &n->pipes[i];
        double flow = 0.0, velocity;

        for (size_t k = 0; k < n->unit_count; k++)
            for (int j = n->units[k].pipe; j >= 0; j = n->pipes[j].draws_from)
                if (j == i)
                    flow += (p->own ? 1 : n->units[k].count) * out[k].flow;
        velocity = sl_pipe_velocity(flow, p->bore);
        asked += sl_minor_head(p->minor_k, velocity) +
                 (isnan(p->hazen_williams_c)
                      ? darcy_head(flow, p->length, p->bore, p->roughness,
                                   n->viscosity)
                      : sl_hazen_williams_head(flow, p->hazen_williams_c,
                                               p->length, p->bore));
        if (p->draws_from < 0 && n->gauge_on_pipe)
            asked -= sl_velocity_head(velocity);
    }
    return asked - sl_curve_carried_on(&n->units[unit].head, out[unit].flow);
}

static void check_balance(const struct station *s,
                          const struct sl_unit_flow *out,
                          enum sl_network_end end)
{
    for (size_t i = 0; i < s->network.unit_count; i++) {
        double lack, allowed = 1e-9;

        if (!isnan(s->units[i].given_flow))
            continue;
        lack = lack_of(&s->network, out, i);
        if (end == SL_NETWORK_AT_JUMP)
            allowed += jumps_on_way(&s->network, i);
        if (out[i].end == SL_UNIT_STANDS)
            assert_true(lack >= -allowed);
        else
            check_close("balance", lack, 0.0, 0.0, allowed);
        if (out[i].end != SL_UNIT_STANDS && end == SL_NETWORK_SOLVED)
            check_close("residual", out[i].residual, -lack, 0.0, 1e-12);
    }
}

/* One pump's flow varied, the others' as they are. */
struct varied {
    const struct sl_network *network;
    struct sl_unit_flow flows[STATION_UNITS];
    size_t unit;
};

static double varied_asked(void *context, double flow)
{
    struct varied *v = context;

    v->flows[v->unit].flow = flow;
    return lack_of(v->network, v->flows, v->unit) +
           sl_curve_carried_on(&v->network->units[v->unit].head, flow);
}

/* Of each pump that is alone in its unit; how many were looked at. */
static int check_none_larger(const struct station *s,
                             const struct sl_unit_flow *out)
{
    int looked_at = 0;

    for (size_t i = 0; i < s->network.unit_count; i++) {
        struct varied varied = {.network = &s->network, .unit = i};
        struct sl_system system = {varied_asked, &varied};
        struct sl_operating_point point = {0};

        if (s->units[i].count > 1 || !isnan(s->units[i].given_flow))
            continue;
        memcpy(varied.flows, out, s->network.unit_count * sizeof *out);
        sl_operating_point_find(&s->units[i].head, &system, 0.0, &point);
        check_close("none larger", point.flow, out[i].flow, 1e-9, 1e-12);
        looked_at++;
    }
    return looked_at;
}

/* The same units in another order. */
static void check_permuted(const struct station *s,
                           const struct sl_unit_flow *want)
{
    static struct station other;
    struct sl_unit_flow out[STATION_UNITS];
    size_t count = s->network.unit_count, i;

    other = *s;
    other.network.pipes = other.pipes;
    other.network.units = other.units;
    for (i = 0; i < count; i++)
        other.units[i] = s->units[(count - 1 - i + count / 2) % count];
    check_end("permuted", solve(&other.network, out), SL_NETWORK_SOLVED);
    for (i = 0; i < count; i++)
        check_alike("permuted", &out[i],
                    &want[(count - 1 - i + count / 2) % count]);
}

/* Its own pipes once more for another pump of a unit. */
static int copy_way(struct station *s, int pipe)
{
    int from, at;

    if (pipe < 0 || !s->pipes[pipe].own)
        return pipe;
    from = copy_way(s, s->pipes[pipe].draws_from);
    at = (int)s->network.pipe_count++;
    s->pipes[at] = s->pipes[pipe];
    s->pipes[at].draws_from = from;
    return at;
}

/* Each pump a unit of its own. */
static void check_split(const struct station *s,
                        const struct sl_unit_flow *want)
{
    static struct station other;
    struct sl_unit_flow out[STATION_UNITS];
    size_t count = s->network.unit_count, of[STATION_UNITS], i;

    other = *s;
    other.network.pipes = other.pipes;
    other.network.units = other.units;
    for (i = 0; i < count; i++) {
        of[i] = i;
        for (int pump = 1; pump < s->units[i].count; pump++) {
            size_t at = other.network.unit_count++;

            of[at] = i;
            other.units[at] = s->units[i];
            other.units[at].count = 1;
            other.units[at].pipe = copy_way(&other, s->units[i].pipe);
        }
        other.units[i].count = 1;
    }
    check_end("split", solve(&other.network, out), SL_NETWORK_SOLVED);
    for (i = 0; i < other.network.unit_count; i++)
        check_alike("split", &out[i], &want[of[i]]);
}

static void check_from_elsewhere(uint64_t *seed, const struct station *s,
                                 const struct sl_unit_flow *want)
{
    struct sl_unit_flow out[STATION_UNITS];
    double start[STATION_UNITS];

    for (size_t i = 0; i < s->network.unit_count; i++)
        start[i] = draw(seed, -0.01, 0.2);
    start[0] = draw(seed, 0.0, 1.0) < 0.1 ? NAN : start[0];
    check_end("from elsewhere", sl_network_solve(&s->network, start, out),
              SL_NETWORK_SOLVED);
    for (size_t i = 0; i < s->network.unit_count; i++)
        check_alike("from elsewhere", &out[i], &want[i]);
}

/* Sweeps stop when they stand still, which is less near than Newton's. */
static void check_by_sweeps(const struct station *s,
                            const struct sl_unit_flow *want)
{
    struct sl_unit_flow out[STATION_UNITS];

    check_end("by sweeps", sl_network_solve_by_sweeps(&s->network, out),
              SL_NETWORK_SOLVED);
    for (size_t i = 0; i < s->network.unit_count; i++)
        check_close("by sweeps", out[i].flow, want[i].flow, 1e-8, 1e-11);
}

static void test_random_stations(void **state)
{
    uint64_t seed = 20385;
    static struct station s;
    struct sl_unit_flow out[STATION_UNITS];
    int ends[4] = {0}, solved = 0, swept = 0, rising = 0, twice = 0;
    int looked_at = 0;

    (void)state;
    for (int i = 0; i < 4000; i++) {
        draw_station(&seed, &s);
        if (solve(&s.network, out) == SL_NETWORK_AT_JUMP)
            continue; /* see below; very few */
        check_end("random", solve(&s.network, out), SL_NETWORK_SOLVED);
        solved++;
        check_balance(&s, out, SL_NETWORK_SOLVED);
        check_permuted(&s, out);
        if (s.rises)
            looked_at += check_none_larger(&s, out);
        check_from_elsewhere(&seed, &s, out);
        if (!s.rises) /* else equal pumps may balance unequally too */
            check_split(&s, out);
        if (i % 10 == 0 && !s.rises) {
            check_by_sweeps(&s, out);
            swept++;
        }
        rising += s.rises;
        for (size_t k = 0; k < s.network.unit_count; k++) {
            ends[out[k].end]++;
            twice += out[k].two_crossings;
        }
    }
    assert_true(solved > 3990 && swept > 300);
    assert_true(rising > 300 && twice > 10 && looked_at > 300);
    for (size_t end = 0; end < COUNT(ends); end++)
        assert_true(ends[end] > 300);
}

static void test_random_stations_near_the_jump(void **state)
{
    uint64_t seed = 71023;
    static struct station s;
    struct sl_unit_flow out[STATION_UNITS];
    int jumps = 0;

    (void)state;
    for (int i = 0; i < 2000; i++) {
        enum sl_network_end end;

        draw_station(&seed, &s);
        s.network.viscosity = draw(&seed, 5e-5, 4e-4);
        end = solve(&s.network, out);
        if (end != SL_NETWORK_AT_JUMP)
            check_end("near the jump", end, SL_NETWORK_SOLVED);
        check_balance(&s, out, end);
        jumps += end == SL_NETWORK_AT_JUMP;
    }
    assert_true(jumps > 50);
}

/* --- the slopes, by differences --- */

static void test_slopes_of_losses(void **state)
{
    (void)state;
    for (double flow = 1.3e-5; flow < 0.9; flow *= 1.37) {
        double step = flow * 1e-5;
        struct sl_loss at = sl_darcy_loss(flow, 31.7, 0.313, 2.1e-4, 1.1e-6);
        struct sl_loss c = sl_hazen_williams_loss(flow, 113.0, 31.7, 0.313);

        check_close("head", at.head,
                    darcy_head(flow, 31.7, 0.313, 2.1e-4, 1.1e-6), 0.0, 0.0);
        check_close("slope", at.slope,
                    (darcy_head(flow + step, 31.7, 0.313, 2.1e-4, 1.1e-6) -
                     darcy_head(flow - step, 31.7, 0.313, 2.1e-4, 1.1e-6)) /
                        (2 * step),
                    1e-8, 0.0);
        check_close("slope by C", c.slope,
                    (sl_hazen_williams_head(flow + step, 113.0, 31.7, 0.313) -
                     sl_hazen_williams_head(flow - step, 113.0, 31.7, 0.313)) /
                        (2 * step),
                    1e-8, 0.0);
    }
    check_close("at rest the slope of laminar flow",
                sl_darcy_loss(0.0, 31.7, 0.313, 2.1e-4, 1.1e-6).slope,
                sl_darcy_loss(1e-5, 31.7, 0.313, 2.1e-4, 1.1e-6).head / 1e-5,
                1e-14, 0.0);
    check_close("at rest no loss",
                sl_darcy_loss(0.0, 31.7, 0.313, 2.1e-4, 1.1e-6).head, 0.0, 0.0,
                0.0);
    check_nan("a wall too rough",
              sl_darcy_loss(0.01, 31.7, 0.313, 0.11 * 0.313, 1.1e-6).head);
    check_nan("no bore", sl_darcy_loss(0.01, 31.7, 0.0, 1e-4, 1.1e-6).head);
}

/* Colebrook by Newton's method from far below, until it stands still. */
static double colebrook_from_below(double reynolds, double relative)
{
    double x = 1.0, next = 1.0;

    do {
        double inside = relative / 3.7 + 2.51 * (x = next) / reynolds;

        next = x - (x + 2.0 * log10(inside)) /
                       (1.0 + 2.0 / log(10.0) * 2.51 / reynolds / inside);
    } while (next > x);
    return 1.0 / (x * x);
}

static void test_factor_to_the_last_digits(void **state)
{
    (void)state;
    for (double reynolds = 2300.0; reynolds <= 1e9; reynolds *= 1.083)
        for (int i = 0; i <= 40; i++) {
            double relative = i == 0 ? 0.0 : 0.1 * pow(0.63, i - 1);

            check_close("factor", sl_friction_factor(reynolds, relative),
                        colebrook_from_below(reynolds, relative), 1.6e-15, 0.0);
        }
}

static void test_curve_and_slope_at_once(void **state)
{
    const struct sl_curve_view curve = {late_flows, late_heads, 4};
    double slope;

    (void)state;
    for (double x = 0.0; x < 0.12; x += 0.0007) {
        double y = sl_curve_carried_on_and_slope(&curve, x, &slope);

        check_close("value", y, sl_curve_carried_on(&curve, x), 0.0, 0.0);
        check_close("slope", slope, sl_curve_slope_at(&curve, x), 0.0, 0.0);
    }
    check_nan("value", sl_curve_carried_on_and_slope(&curve, NAN, &slope));
    check_nan("slope", slope);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_squares_by_hand),
        cmocka_unit_test(test_two_equal_pumps_are_one_unit_of_two),
        cmocka_unit_test(test_a_set_of_one_is_the_operating_point),
        cmocka_unit_test(test_hazen_williams_and_a_measured_discharge),
        cmocka_unit_test(test_a_weak_pump_stands_beside_a_strong_one),
        cmocka_unit_test(test_a_fixed_loss_holds_the_valve),
        cmocka_unit_test(test_a_point_met_exactly_is_on_the_curve),
        cmocka_unit_test(test_given_flows_load_the_pipes),
        cmocka_unit_test(test_droop),
        cmocka_unit_test(test_two_that_shut_each_other_out),
        cmocka_unit_test(test_bad_input),
        cmocka_unit_test(test_as_many_as_fit),
        cmocka_unit_test(test_no_figure),
        cmocka_unit_test(test_beyond),
        cmocka_unit_test(test_jump),
        cmocka_unit_test(test_every_end_has_a_name),
        cmocka_unit_test(test_random_stations),
        cmocka_unit_test(test_random_stations_near_the_jump),
        cmocka_unit_test(test_slopes_of_losses),
        cmocka_unit_test(test_factor_to_the_last_digits),
        cmocka_unit_test(test_curve_and_slope_at_once),
    };

    return cmocka_run_group_tests_name("network", tests, NULL, NULL);
}
