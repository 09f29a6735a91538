/* How far one thing may go until the rule is just met: the whole station is
 * solved anew at each step, all else at its typical value, in the sets of
 * least surplus. */
#include <math.h>

#include "evaluator/judge.h"

/* How far from where it is a level is looked for, m. */
#define LEVEL_REACH 20.0
/* Liquid water at ordinary pressures; seawater's formulas end sooner. */
#define COLDEST 273.15
#define WARMEST 333.15
#define WARMEST_SEAWATER 313.15
/* To this in level (m) and temperature (K), and of the range in flow. */
#define LIMIT_TOLERANCE 1e-7
#define STEPS_MOST 60
/* Steps in which the range of flows is looked at, from the largest. */
#define FLOW_STEPS 32

struct limit_search {
    const struct sl_judging *judging;
    enum sl_limit_id id;
};

/* The surplus in the governing set with this pump at an imposed flow. */
static double surplus_at_flow(const struct sl_judging *judging, double flow)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    struct sl_joint_case imposed = {
        .layout = judging->layout,
        .counts = judging->tally->typical.counts,
        .focus = judging->class,
        .ends = sl_ends_all(SL_TYPICAL),
        .liquid = sl_liquid_at(plan->salinity,
                               plan->inputs[SL_IN_TEMPERATURE].value.typical),
        .imposed = flow};
    struct sl_outcome outcome;
    struct sl_joint joint;

    sl_joint_solve(&joint, &imposed);
    sl_joint_outcome(&joint, judging->class, &outcome);
    return outcome.figures.surplus;
}

/* The surplus with the one thing at a value; below 0 where it has none. */
static double surplus_at(const struct limit_search *search, double value)
{
    struct sl_ends ends = sl_ends_all(SL_TYPICAL);
    const struct sl_judging *judging = search->judging;
    double surplus;

    if (search->id == SL_LIMIT_FLOW) {
        surplus = surplus_at_flow(judging, value);
    } else {
        if (search->id == SL_LIMIT_LEVEL)
            ends.level_shift = value;
        else
            ends.temperature = value;
        surplus = sl_least_surplus(judging->layout, judging->class,
                                   judging->tally, &ends);
    }
    return isnan(surplus) ? -INFINITY : surplus;
}

/* Between a value at which the rule is met and one at which it is not: by
 * secant where both have figures, in the Illinois manner, else by halves. */
static double boundary(const struct limit_search *search, double met,
                       double surplus_met, double missed, double surplus_missed,
                       double tolerance)
{
    int side = 0;

    for (int i = 0; i < STEPS_MOST && fabs(missed - met) > tolerance; i++) {
        double part = surplus_met / (surplus_met - surplus_missed);
        double next, surplus;

        if (!isfinite(surplus_missed) || i % 8 == 7)
            part = 0.5;
        next = met + part * (missed - met);
        surplus = surplus_at(search, next);
        if (surplus >= 0) {
            met = next;
            surplus_met = surplus;
            if (surplus < tolerance * 1e-3)
                break;
            surplus_missed = side == 1 ? surplus_missed / 2 : surplus_missed;
            side = 1;
        } else {
            missed = next;
            surplus_missed = surplus;
            surplus_met = side == -1 ? surplus_met / 2 : surplus_met;
            side = -1;
        }
    }
    return met;
}

/* From where it is, toward `worse` while the rule is met there, else toward
 * `better`. */
static struct sl_limit search_limit(const struct limit_search *search,
                                    double here, double worse, double better)
{
    double now = surplus_at(search, here);
    double there = surplus_at(search, now >= 0 ? worse : better);

    if (now >= 0 && there >= 0)
        return (struct sl_limit){SL_LIMIT_ALWAYS, NAN};
    if (now < 0 && there < 0)
        return (struct sl_limit){SL_LIMIT_NONE, NAN};
    return (struct sl_limit){
        SL_LIMIT_FOUND,
        now >= 0 ? boundary(search, here, now, worse, there, LIMIT_TOLERANCE)
                 : boundary(search, better, there, here, now, LIMIT_TOLERANCE)};
}

static struct sl_limit level_limit(const struct sl_judging *judging)
{
    struct limit_search search = {judging, SL_LIMIT_LEVEL};
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    const struct sl_input *surface =
        &plan->inputs[plan->source_kind == SL_MAIN
                          ? SL_IN_SOURCE_PRESSURE_ELEVATION
                          : SL_IN_SOURCE_LEVEL];
    struct sl_limit limit = search_limit(&search, 0, -LEVEL_REACH, LEVEL_REACH);

    limit.value += surface->value.typical;
    return limit;
}

static struct sl_limit temperature_limit(const struct sl_judging *judging)
{
    struct limit_search search = {judging, SL_LIMIT_TEMPERATURE};
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    double warmest = plan->salinity > 0 ? WARMEST_SEAWATER : WARMEST;
    double here = plan->inputs[SL_IN_TEMPERATURE].value.typical;

    return search_limit(&search, here, fmax(warmest, here), COLDEST);
}

/* The largest flow at which it is met, looked for from the end of the
 * published NPSHR down. */
static struct sl_limit flow_limit(const struct sl_judging *judging)
{
    struct limit_search search = {judging, SL_LIMIT_FLOW};
    const struct sl_curve_view *npshr =
        &judging->layout->plans[judging->pump].npshr;
    double first, last, missed, surplus_missed;

    if (!sl_curve_usable(npshr))
        return (struct sl_limit){SL_LIMIT_UNKNOWN, NAN};
    first = npshr->x[0];
    last = missed = npshr->x[npshr->count - 1];
    surplus_missed = surplus_at(&search, last);
    if (surplus_missed >= 0)
        return (struct sl_limit){SL_LIMIT_ALWAYS, NAN};
    for (int i = FLOW_STEPS - 1; i >= 0; i--) {
        double flow = first + (last - first) * i / FLOW_STEPS;
        double surplus = surplus_at(&search, flow);

        if (surplus >= 0)
            return (struct sl_limit){
                SL_LIMIT_FOUND,
                boundary(&search, flow, surplus, missed, surplus_missed,
                         LIMIT_TOLERANCE * (last - first))};
        missed = flow;
        surplus_missed = surplus;
    }
    return (struct sl_limit){SL_LIMIT_NONE, NAN};
}

void sl_find_limits(const struct sl_judging *judging,
                    struct sl_pump_result *result)
{
    for (int i = 0; i < SL_LIMIT_COUNT; i++)
        result->limits[i] = (struct sl_limit){SL_LIMIT_UNKNOWN, NAN};
    if (isnan(result->cases[SL_TYPICAL].surplus))
        return;
    result->limits[SL_LIMIT_LEVEL] = level_limit(judging);
    result->limits[SL_LIMIT_TEMPERATURE] = temperature_limit(judging);
    result->limits[SL_LIMIT_FLOW] = flow_limit(judging);
}
