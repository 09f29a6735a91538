/* How far one thing may go until the rule is just met: the whole station is
 * solved anew at each step, all else at its typical value, in the sets of
 * least surplus. */
#include <math.h>

#include "evaluator/judge.h"

/* To this in level (m) and temperature (K), and of the range in flow. */
#define LIMIT_TOLERANCE 1e-7
#define STEPS_MOST 60
/* A surplus that is nought, m: what flows are solved to. */
#define JUST_MET 1e-9
/* Steps in which the range of flows is looked at, from the largest. */
#define FLOW_STEPS 32
/* The first of the steps in a level or temperature, of the range. */
#define FIRST_STEP (1.0 / 32)

struct limit_search {
    const struct sl_judging *judging;
    enum sl_limit_id id;
    size_t sets;      /* of the least surplus, that are solved */
    double here, now; /* its value, and the typical surplus there */
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

/* The surplus with the one thing at a value; minus infinity where it has none.
 */
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
                                   judging->tally, &ends, search->sets);
    }
    return isnan(surplus) ? -INFINITY : surplus;
}

/* A value of the one thing, and the surplus there. */
struct place {
    double value, surplus;
};

static struct place look(const struct limit_search *search, double value)
{
    return (struct place){value, surplus_at(search, value)};
}

/* Between a value at which the rule is met and one at which it is not: by
 * secant where both have figures, in the Illinois manner, else by halves. */
static struct sl_limit boundary(const struct limit_search *search,
                                struct place met, struct place missed,
                                double tolerance)
{
    int side = 0;

    for (int i = 0;
         i < STEPS_MOST && fabs(missed.value - met.value) > tolerance; i++) {
        double part = met.surplus / (met.surplus - missed.surplus);
        struct place next;

        if (!isfinite(missed.surplus) || i % 8 == 7)
            part = 0.5;
        next = look(search, met.value + part * (missed.value - met.value));
        if (fabs(next.surplus) < JUST_MET)
            return (struct sl_limit){SL_LIMIT_FOUND, next.value};
        if (next.surplus >= 0) {
            met = next;
            missed.surplus /= side == 1 ? 2 : 1;
            side = 1;
        } else {
            missed = next;
            met.surplus /= side == -1 ? 2 : 1;
            side = -1;
        }
    }
    return (struct sl_limit){isfinite(missed.surplus) ? SL_LIMIT_FOUND
                                                      : SL_LIMIT_FIGURES_END,
                             met.value};
}

/* Where the far end has no figure: in steps from where it is, each twice as
 * far as the one before. */
static struct sl_limit search_steps(const struct limit_search *search,
                                    struct place last, double end)
{
    double here = last.value;
    bool met = last.surplus >= 0;

    for (double part = FIRST_STEP; part <= 1; part *= 2) {
        struct place next = look(search, here + part * (end - here));

        if ((next.surplus >= 0) != met)
            return met ? boundary(search, last, next, LIMIT_TOLERANCE)
                       : boundary(search, next, last, LIMIT_TOLERANCE);
        last = next;
    }
    return (struct sl_limit){SL_LIMIT_UNKNOWN, NAN};
}

/* From where it is, toward `worse` where the rule is met, else toward
 * `better`. */
static struct sl_limit search_range(const struct limit_search *search,
                                    double worse, double better)
{
    struct place now = {search->here, search->now};
    bool met = now.surplus >= 0;
    struct place far = look(search, met ? worse : better);

    if (!isfinite(far.surplus))
        return search_steps(search, now, far.value);
    if (met)
        return far.surplus >= 0 ? (struct sl_limit){SL_LIMIT_ALWAYS, NAN}
                                : boundary(search, now, far, LIMIT_TOLERANCE);
    return far.surplus >= 0 ? boundary(search, far, now, LIMIT_TOLERANCE)
                            : (struct sl_limit){SL_LIMIT_NONE, NAN};
}

/* In the set of least surplus first; where another is worse at the limit
 * found, in all of them. */
static struct sl_limit search_limit(const struct sl_judging *judging,
                                    enum sl_limit_id id, double here,
                                    double worse, double better)
{
    struct limit_search search = {judging, id, 1, here,
                                  judging->tally->least[0].surplus};
    struct sl_limit limit = search_range(&search, worse, better);
    double at = limit.end == SL_LIMIT_ALWAYS ? worse : limit.value;

    if (isnan(at) || judging->tally->least_count == 1)
        return limit;
    search.sets = SL_LEAST_SETS;
    return surplus_at(&search, at) >= -10 * JUST_MET
               ? limit
               : search_range(&search, worse, better);
}

static struct sl_limit level_limit(const struct sl_judging *judging)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    const struct sl_input *surface =
        &plan->inputs[plan->source_kind == SL_MAIN
                          ? SL_IN_SOURCE_PRESSURE_ELEVATION
                          : SL_IN_SOURCE_LEVEL];
    struct sl_limit limit = search_limit(judging, SL_LIMIT_LEVEL, 0,
                                         -SL_LIMIT_REACH, SL_LIMIT_REACH);

    limit.value += surface->value.typical;
    return limit;
}

static struct sl_limit temperature_limit(const struct sl_judging *judging)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    double warmest =
        plan->salinity > 0 ? SL_LIMIT_WARMEST_SEAWATER : SL_LIMIT_WARMEST;
    double here = plan->inputs[SL_IN_TEMPERATURE].value.typical;

    return search_limit(judging, SL_LIMIT_TEMPERATURE, here,
                        fmax(warmest, here), SL_LIMIT_COLDEST);
}

/* The largest flow at which it is met, looked for from the end of the
 * published NPSHR down. */
static struct sl_limit flow_limit(const struct sl_judging *judging)
{
    struct limit_search search = {judging, SL_LIMIT_FLOW, 1, NAN, NAN};
    const struct sl_curve_view *npshr =
        &judging->layout->plans[judging->pump].npshr;
    struct place missed;
    double first, last;

    if (!sl_curve_usable(npshr))
        return (struct sl_limit){SL_LIMIT_UNKNOWN, NAN};
    first = npshr->x[0];
    last = npshr->x[npshr->count - 1];
    missed = look(&search, last);
    if (missed.surplus >= 0)
        return (struct sl_limit){SL_LIMIT_ALWAYS, NAN};
    for (int i = FLOW_STEPS - 1; i >= 0; i--) {
        struct place next =
            look(&search, first + (last - first) * i / FLOW_STEPS);

        if (next.surplus >= 0)
            return boundary(&search, next, missed,
                            LIMIT_TOLERANCE * (last - first));
        missed = next;
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
