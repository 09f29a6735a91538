/* The delivery side of a plan: the speed, the pump's curves at that speed,
 * the station's discharge, and from these how the flow is found. */
#include <math.h>

#include "evaluator/plan.h"
#include "hydraulics/affinity.h"

/* The speed of a curve's test: the first that is recorded. */
static double test_speed(const struct sl_curve *curve)
{
    for (size_t i = 0; curve && i < curve->point_count; i++)
        if (curve->points[i].speed.known)
            return curve->points[i].speed.value;
    return NAN;
}

/* The speeds of its curve's test, of its rated point and the highest it runs
 * at, rpm; each stands in for another that is not recorded. */
struct speeds {
    double test, rated, top;
};

static struct speeds speeds_of(const struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    double rated = sl_recorded(&pump->rated_speed);
    double test = test_speed(plan->pump->curve);
    double top = sl_recorded(&pump->max_speed);

    if (isnan(test))
        test = rated;
    if (isnan(rated))
        rated = test;
    if (isnan(top))
        top = rated;
    return (struct speeds){test, rated, top};
}

static void speed(struct sl_plan *plan, const struct speeds *speeds)
{
    const struct sl_pump *pump = &plan->pump->record;
    struct sl_input *input;

    if (isnan(speeds->top)) {
        plan->inputs[SL_IN_SPEED].rule =
            "no speed is recorded: that of its curve";
        plan->inputs[SL_IN_SPEED].value = sl_no_figure();
        return;
    }
    input = sl_plan_set(
        plan, SL_IN_SPEED, pump->max_speed.known ? SL_RECORDED : SL_DERIVED,
        sl_exactly(speeds->top),
        pump->max_speed.known ? ""
                              : "no higher speed is recorded: a fixed drive");
    input->kind = SL_KIND_PUMP;
    input->line = pump->line;
    if (isnan(speeds->test)) {
        input->provenance = SL_UNKNOWN;
        input->value = (struct sl_interval){speeds->top, NAN, NAN};
        input->rule = "the speed its figures were tested at is not recorded";
    }
}

/* 1 where nothing is known to scale by. */
static double ratio_of(double speed, double test)
{
    return isnan(speed / test) ? 1 : speed / test;
}

static const struct sl_default *npshr_exponent_row(const struct sl_plan *plan,
                                                   double ratio)
{
    return sl_default_find(plan->tables,
                           ratio > 1 ? "npshr_speed_exponent_up"
                                     : "npshr_speed_exponent_down",
                           "");
}

static double npshr_exponent(const struct sl_plan *plan, double ratio)
{
    const struct sl_default *row = npshr_exponent_row(plan, ratio);

    if (ratio == 1)
        return 1; /* any: nothing is scaled */
    return row ? row->value.typical : NAN;
}

enum curve_column { HEAD, NPSHR };

/* The points of a curve that have a head, or an NPSHR, at the speed the
 * pump runs at. */
static struct sl_curve_view view_of(struct sl_plan *plan,
                                    enum curve_column column)
{
    const struct sl_curve *curve = plan->pump->curve;
    double ratio = plan->speed_ratio;
    size_t room = curve ? curve->point_count : 0;
    double *flow = sl_arena_new(plan->arena, room, sizeof *flow);
    double *value = sl_arena_new(plan->arena, room, sizeof *value);
    double exponent = npshr_exponent(plan, ratio);
    size_t count = 0;

    for (size_t i = 0; i < room; i++) {
        const struct sl_curve_point *point = &curve->points[i];
        const struct sl_number *number =
            column == HEAD ? &point->head : &point->npshr;

        if (!number->known)
            continue;
        flow[count] = sl_affinity_flow(point->flow.value, ratio);
        value[count] = column == HEAD
                           ? sl_affinity_head(number->value, ratio)
                           : sl_affinity_npshr(number->value, ratio, exponent);
        count++;
    }
    return (struct sl_curve_view){flow, value, count};
}

static void machine(struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    struct speeds speeds = speeds_of(plan);

    speed(plan, &speeds);
    plan->speed_ratio = ratio_of(speeds.top, speeds.test);
    plan->rated_ratio = ratio_of(speeds.top, speeds.rated);
    plan->head = view_of(plan, HEAD);
    plan->npshr = view_of(plan, NPSHR);
    if (pump->rated_flow.known)
        plan->rated_flow =
            sl_affinity_flow(pump->rated_flow.value, plan->rated_ratio);
    if (pump->rated_npshr.known)
        plan->rated_npshr =
            sl_affinity_npshr(pump->rated_npshr.value, plan->rated_ratio,
                              npshr_exponent(plan, plan->rated_ratio));
}

/* The discharge head to lift to; a lower one means more flow. */
static void discharge_level(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;

    sl_plan_low_or_normal(plan, SL_IN_DISCHARGE_LEVEL, &station->discharge_low,
                          &station->discharge_normal,
                          plan->condition->discharge,
                          "no discharge level is recorded");
}

/* Smooth discharge pipe lets more flow through: its good end is adverse. */
static struct sl_interval discharge_roughness(const struct sl_plan *plan)
{
    int material = plan->dossier->record.discharge_material;
    const struct sl_default *row;

    if (material >= 1 && (size_t)material <= plan->tables->roughness_count) {
        const struct sl_roughness *kind =
            &plan->tables->roughness[material - 1];

        return (struct sl_interval){kind->fair, kind->good, kind->poor};
    }
    row = sl_default_find(plan->tables, "discharge_roughness", "");
    return row ? row->value : sl_no_figure();
}

static void discharge_pipe(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    struct sl_delivery *delivery = &plan->delivery;
    const struct sl_default *row =
        sl_default_find(plan->tables, "discharge_minor_k", "");
    struct sl_input *input;

    delivery->length = station->discharge_length.value;
    delivery->bore = station->discharge_bore.value;
    delivery->roughness = discharge_roughness(plan);
    delivery->minor_k = row ? row->value : sl_no_figure();
    input = sl_plan_set(plan, SL_IN_DISCHARGE_LOSS, SL_ASSUMED, sl_no_figure(),
                        "at this flow, by the main's length and bore; its "
                        "roughness, or its fittings' K, from a table");
    input->line = station->line;
    if (station->discharge_minor_k.known)
        delivery->minor_k = sl_exactly(station->discharge_minor_k.value);
    else
        input->row = row;
    if (!station->discharge_material)
        input->other = sl_default_find(plan->tables, "discharge_roughness", "");
    if (station->discharge_minor_k.known &&
        delivery->roughness.adverse == delivery->roughness.favourable)
        input->provenance = SL_DERIVED;
}

static void discharge_loss(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    struct sl_delivery *delivery = &plan->delivery;

    delivery->loss_flow = NAN;
    delivery->loss_head = NAN;
    delivery->known = true;
    if (station->discharge_loss_flow.known &&
        station->discharge_loss_head.known) {
        delivery->loss_flow = station->discharge_loss_flow.value;
        delivery->loss_head = station->discharge_loss_head.value;
        sl_plan_set(plan, SL_IN_DISCHARGE_LOSS, SL_RECORDED,
                    sl_exactly(delivery->loss_head),
                    "a measured loss, with the square of the flow")
            ->line = station->line;
    } else if (station->discharge_length.known &&
               station->discharge_bore.known) {
        discharge_pipe(plan);
    } else {
        delivery->known = false;
        sl_plan_set(plan, SL_IN_DISCHARGE_LOSS, SL_UNKNOWN, sl_no_figure(),
                    "neither a measured loss nor the main's length and bore "
                    "are recorded");
    }
}

/* A flow that is not solved is one the pump has run at, or was made for: it
 * bounds the worst from below. */
static void flow_as_recorded(struct sl_plan *plan, enum sl_flow_basis basis,
                             double flow, const char *rule)
{
    struct sl_input *input =
        sl_plan_set(plan, SL_IN_FLOW, SL_DERIVED,
                    (struct sl_interval){flow, NAN, flow}, rule);

    plan->flow_basis = basis;
    input->kind = SL_KIND_PUMP;
    input->line = plan->pump->record.line;
    plan->inputs[SL_IN_DISCHARGE_LEVEL].applies = false;
    plan->inputs[SL_IN_DISCHARGE_LOSS].applies = false;
}

static void flow(struct sl_plan *plan)
{
    const struct sl_number *largest = &plan->pump->record.largest_recorded_flow;

    if (sl_curve_usable(&plan->head) && plan->delivery.known &&
        !isnan(plan->inputs[SL_IN_DISCHARGE_LEVEL].value.typical)) {
        plan->flow_basis = SL_FLOW_SOLVED;
        sl_plan_set(plan, SL_IN_FLOW, SL_DERIVED, sl_no_figure(),
                    "solved: its curve on the station's system, running "
                    "alone");
        return;
    }
    if (largest->known)
        flow_as_recorded(plan, SL_FLOW_RECORDED, largest->value,
                         "the largest flow recorded; the flow it may run "
                         "out to is not known");
    else if (!isnan(plan->rated_flow))
        flow_as_recorded(plan, SL_FLOW_RATED, plan->rated_flow,
                         "the rated flow; the flow it may run out to is not "
                         "known");
    else {
        flow_as_recorded(plan, SL_FLOW_NONE, NAN, "no flow is recorded");
        plan->inputs[SL_IN_FLOW].provenance = SL_UNKNOWN;
    }
}

static long first_npshr_line(const struct sl_curve *curve)
{
    size_t i = 0;

    while (i + 1 < curve->point_count && !curve->points[i].npshr.known)
        i++;
    return curve->points[i].line;
}

static void npshr(struct sl_plan *plan)
{
    struct sl_input *input;

    if (sl_curve_usable(&plan->npshr)) {
        input = sl_plan_set(plan, SL_IN_NPSHR, SL_RECORDED, sl_no_figure(),
                            "the maker's curve, at this flow");
        if (plan->speed_ratio != 1) {
            input->rule = "the maker's curve at this flow, brought to its "
                          "highest speed";
            input->row = npshr_exponent_row(plan, plan->speed_ratio);
        }
        input->kind = SL_KIND_CURVE;
        input->line = first_npshr_line(plan->pump->curve);
    } else if (!isnan(plan->rated_npshr)) {
        input = sl_plan_set(
            plan, SL_IN_NPSHR, SL_DERIVED,
            (struct sl_interval){plan->rated_npshr, NAN, plan->rated_npshr},
            "known at the rated point alone; it rises with the flow");
        input->kind = SL_KIND_PUMP;
        input->line = plan->pump->record.line;
        if (plan->rated_ratio != 1)
            input->row = npshr_exponent_row(plan, plan->rated_ratio);
    } else {
        sl_plan_set(plan, SL_IN_NPSHR, SL_UNKNOWN, sl_no_figure(),
                    "not recorded, and nothing bounds it");
    }
}

static void miss_rejected_points(struct sl_plan *plan)
{
    struct sl_input *input = &plan->inputs[SL_IN_NPSHR];

    if (!plan->pump->curve || !plan->pump->curve->rejected_points)
        return;
    input->provenance = SL_UNKNOWN;
    input->value.adverse = input->value.favourable = NAN;
    input->rule = "a point of its curve was rejected (see findings.csv); the "
                  "curve without it bounds nothing";
}

void sl_plan_delivery(struct sl_plan *plan)
{
    machine(plan);
    discharge_level(plan);
    discharge_loss(plan);
    flow(plan);
    npshr(plan);
    miss_rejected_points(plan);
}
