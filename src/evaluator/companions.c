/* The companion checks: what the trade looks at beside the margin.  None of
 * them enters the margin or the state. */
#include <math.h>
#include <string.h>

#include "evaluator/judge.h"
#include "hydraulics/affinity.h"
#include "hydraulics/friction.h"
#include "hydraulics/specific_speed.h"
#include "hydraulics/submergence.h"

/* Where the limits of an operating region and of a bell change. */
#define HIGH_SPECIFIC_SPEED 4500.0 /* US customary */
#define BELL_MIDDLE 0.315          /* m³/s */
#define BELL_LARGE 1.260

struct looking {
    const struct sl_judging *judging;
    const struct sl_plan *plan;
    const struct sl_pump *pump;
    const struct sl_tally *tally;
    struct sl_pump_result *result;
};

/* Holds a value to its limits; a value without a figure is unknown. */
static void hold(const struct looking *at, enum sl_check_id id, double value,
                 struct sl_check check)
{
    check.value = value;
    check.end = isnan(value) ? SL_CHECK_UNKNOWN : SL_CHECK_WITHIN;
    if (value < check.lowest || value > check.highest)
        check.end = SL_CHECK_BEYOND;
    at->result->checks[id] = check;
}

static void hold_to_row(const struct looking *at, enum sl_check_id id,
                        double value, const char *circumstance)
{
    const struct sl_check_limit *row =
        sl_check_limit_find(at->plan->tables, sl_check_name(id), circumstance);

    if (!row)
        return;
    hold(at, id, value,
         (struct sl_check){.lowest = row->lowest,
                           .highest = row->highest,
                           .quantity = row->quantity,
                           .source = row->source,
                           .trust = row->trust});
}

static bool from_surface(const struct looking *at)
{
    return at->plan->source_kind != SL_MAIN;
}

static void submergence(const struct looking *at)
{
    const struct sl_pump *pump = at->pump;
    double depth;

    if (!from_surface(at) ||
        !(pump->inlet_elevation.known || pump->inlet_diameter.known))
        return;
    depth = at->plan->inputs[SL_IN_SOURCE_LEVEL].value.typical -
            sl_recorded(&pump->inlet_elevation);
    hold(at, SL_CHECK_SUBMERGENCE, depth,
         (struct sl_check){
             .lowest = sl_minimum_submergence(
                 sl_recorded(&pump->inlet_diameter), at->tally->most_flow),
             .highest = NAN,
             .quantity = SL_LENGTH,
             .source = "ANSI/HI 9.8, minimum submergence (F16)",
             .trust = 'S'});
    if (isnan(at->result->checks[SL_CHECK_SUBMERGENCE].lowest))
        at->result->checks[SL_CHECK_SUBMERGENCE].end = SL_CHECK_UNKNOWN;
}

/* By the head at best efficiency, of one stage; without one the limits of
 * ordinary specific speeds are taken. */
static const char *speed_class(const struct looking *at, double best)
{
    double stages = at->pump->stages.known ? at->pump->stages.value : 1;
    double head = sl_curve_at(&at->plan->head, best) / stages;
    double specific = sl_specific_speed(
        at->plan->inputs[SL_IN_SPEED].value.typical, best, head);

    return specific * sl_us_specific_speed_factor() > HIGH_SPECIFIC_SPEED
               ? "specific speed over 4500"
               : "";
}

/* The least and the most flow over all sets: the one further out is told. */
static void operating_region(const struct looking *at)
{
    double best =
        at->pump->bep_flow.known
            ? sl_affinity_flow(at->pump->bep_flow.value, at->plan->rated_ratio)
            : NAN;
    double least = at->tally->least_flow / best;
    double most = at->tally->most_flow / best;
    const struct sl_check_limit *row;

    hold_to_row(at, SL_CHECK_OPERATING_REGION, most, speed_class(at, best));
    row = sl_check_limit_find(at->plan->tables,
                              sl_check_name(SL_CHECK_OPERATING_REGION),
                              speed_class(at, best));
    if (row && least < row->lowest && !(most > row->highest))
        hold_to_row(at, SL_CHECK_OPERATING_REGION, least,
                    speed_class(at, best));
}

static const char *service_word(const struct looking *at)
{
    return sl_word(&at->plan->tables->vocabularies.of[SL_WORDS_SERVICE],
                   at->plan->dossier->record.service);
}

static void bell(const struct looking *at)
{
    double flow = at->tally->most_flow;

    if (at->plan->path_count || !at->pump->inlet_diameter.known)
        return;
    hold_to_row(at, SL_CHECK_BELL_VELOCITY,
                sl_pipe_velocity(flow, at->pump->inlet_diameter.value),
                flow > BELL_LARGE    ? "over 1260 L/s"
                : flow > BELL_MIDDLE ? "over 315 L/s"
                                     : "");
}

static void straight_run(const struct looking *at)
{
    const struct sl_plan *plan = at->plan;
    double bore = sl_recorded(&at->pump->suction_nozzle_bore);

    if (!at->pump->straight_run.known)
        return;
    if (plan->path_count && plan->pump->suction->record.bore.known)
        bore = plan->pump->suction->record.bore.value;
    hold_to_row(at, SL_CHECK_STRAIGHT_RUN, at->pump->straight_run.value / bore,
                "");
}

static void suction_energy(const struct looking *at)
{
    const struct sl_words *make_ups =
        &at->plan->tables->vocabularies.of[SL_WORDS_MAKE_UP];
    const struct sl_check_limit *start =
        sl_check_limit_find(at->plan->tables, "suction energy",
                            sl_word(make_ups, at->pump->make_up));

    if (start)
        hold(at, SL_CHECK_SUCTION_ENERGY, at->plan->suction_energy,
             (struct sl_check){.lowest = NAN,
                               .highest = 1,
                               .quantity = SL_PURE,
                               .source = start->source,
                               .trust = start->trust});
}

static void roughness(const struct looking *at)
{
    double most = 0;

    for (size_t i = 0; i < at->plan->path_count; i++) {
        const struct sl_path_pipe *place = &at->plan->path[i];
        double part = place->roughness.typical / place->pipe->record.bore.value;

        if (place->pipe->record.bore.known)
            most = fmax(most, part);
    }
    if (most > 0)
        hold(at, SL_CHECK_ROUGHNESS, most,
             (struct sl_check){.lowest = NAN,
                               .highest = SL_ROUGHEST_OF_BORE,
                               .quantity = SL_PURE,
                               .source = "Colebrook's data end there (F8)",
                               .trust = 'S'});
}

/* A plain yes or no, without a figure. */
static void say(const struct looking *at, enum sl_check_id id, bool beyond)
{
    at->result->checks[id] =
        (struct sl_check){.end = beyond ? SL_CHECK_BEYOND : SL_CHECK_WITHIN,
                          .value = NAN,
                          .lowest = NAN,
                          .highest = NAN,
                          .source = "",
                          .trust = 'C'};
}

static void from_flows(const struct looking *at)
{
    const struct sl_plan *plan = at->plan;

    operating_region(at);
    if (plan->path_count)
        hold_to_row(at, SL_CHECK_SUCTION_VELOCITY, at->tally->most_velocity,
                    service_word(at));
    bell(at);
    if (from_surface(at))
        hold_to_row(at, SL_CHECK_SUCTION_LIFT,
                    0 - at->result->cases[SL_TYPICAL].terms.elevation -
                        at->result->cases[SL_TYPICAL].terms.gauge,
                    "");
    else
        hold_to_row(at, SL_CHECK_BOOSTER_PRESSURE, at->tally->least_pressure,
                    "");
}

void sl_check_companions(const struct sl_judging *judging,
                         struct sl_pump_result *result)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    struct looking at = {judging, plan, &plan->pump->record, judging->tally,
                         result};

    for (int i = 0; i < SL_CHECK_COUNT; i++)
        result->checks[i] = (struct sl_check){.end = SL_CHECK_NOT_MADE,
                                              .value = NAN,
                                              .lowest = NAN,
                                              .highest = NAN,
                                              .source = ""};
    submergence(&at);
    from_flows(&at);
    straight_run(&at);
    suction_energy(&at);
    roughness(&at);
    if (result->flow_basis == SL_FLOW_SOLVED) {
        say(&at, SL_CHECK_OFF_CURVE, result->off_curve);
        say(&at, SL_CHECK_TWO_CROSSINGS, judging->tally->two_crossings);
    }
}
