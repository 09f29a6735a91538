/* The delivery side of a plan: the station's discharge, and how the flow is
 * found. */
#include <math.h>

#include "evaluator/plan.h"

/* The discharge head to lift to; a lower one means more flow. */
static void discharge_level(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;

    sl_plan_low_or_normal(plan, SL_IN_DISCHARGE_LEVEL, &station->discharge_low,
                          &station->discharge_normal,
                          plan->condition->discharge,
                          "no discharge level is recorded");
}

/* Smooth discharge pipe lets more flow through: its smooth end is adverse. */
static struct sl_interval discharge_roughness(const struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_default *row;
    struct sl_interval wall;
    bool assumed;

    if (station->discharge_material) {
        wall = sl_plan_roughness(plan, station->discharge_material, 0,
                                 &station->discharge_year,
                                 station->discharge_bore.value,
                                 plan->condition->discharge_friction, &assumed);
        return (struct sl_interval){wall.typical, wall.favourable,
                                    wall.adverse};
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
                    "solved: its curve on the station's system");
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

void sl_plan_delivery(struct sl_plan *plan)
{
    discharge_level(plan);
    discharge_loss(plan);
    flow(plan);
}
