#include "evaluator/govern.h"

#include <math.h>
#include <string.h>

/* Without an adverse end alone, it has none in any set. */
static bool no_adverse(const struct sl_tally *tally)
{
    return tally->adverse.counts && tally->adverse.running == 1 &&
           isnan(tally->adverse.outcome.figures.surplus);
}

/* A set in which what some other pump draws has no bound. */
static bool beside_unsure(const struct sl_governing *all, size_t class,
                          bool *sharing)
{
    const struct sl_layout *layout = all->layout;
    bool unsure = false;

    *sharing = false;
    for (size_t c = 0; c < layout->class_count; c++) {
        const struct sl_class *other = &layout->classes[c];

        if (all->sets->counts[c] <= (c == class) || !other->unsure)
            continue;
        unsure = true;
        *sharing = *sharing || sl_classes_share(other, &layout->classes[class]);
    }
    return unsure;
}

/* A case at the adverse end with a lone pump at a flow, NaN: solved. */
static void adverse_at(const struct sl_governing *all, size_t class,
                       double kelvin, double flow, struct sl_outcome *outcome)
{
    const struct sl_plan *plan = all->layout->classes[class].plan;
    struct sl_joint_case one = {.layout = all->layout,
                                .counts = all->sets->counts,
                                .focus = class,
                                .ends = sl_ends_all(SL_ADVERSE),
                                .liquid = sl_liquid_at(plan->salinity, kelvin),
                                .imposed = flow};
    struct sl_joint joint;

    sl_joint_solve(&joint, &one);
    sl_joint_outcome(&joint, class, outcome);
}

/* The largest flow on record is one it may run at again: where it would not
 * run out to it with most loss, it is judged at it. */
static void at_recorded_flow(const struct sl_governing *all, size_t class,
                             struct sl_outcome *worst)
{
    const struct sl_class *of = &all->layout->classes[class];
    const struct sl_number *largest =
        &of->plan->pump->record.largest_recorded_flow;
    const struct sl_interval *warmth =
        &of->plan->inputs[SL_IN_TEMPERATURE].value;

    if (all->sets->running > 1 || of->given || !largest->known)
        return;
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
        double kelvin = sl_interval_at(warmth, (enum sl_corner)corner);
        struct sl_outcome outcome;

        adverse_at(all, class, kelvin, NAN, &outcome);
        if (outcome.figures.flow >= largest->value)
            continue;
        adverse_at(all, class, kelvin, largest->value, &outcome);
        sl_tally_fold(all, worst, &outcome);
    }
}

/* No rule has an adverse end then, not the one ranked on alone. */
static void leave_unbounded(struct sl_outcome *outcome)
{
    outcome->figures.surplus = outcome->figures.margin = NAN;
    outcome->margin = NAN;
    for (size_t i = 0; i < SL_RULES_MOST; i++)
        outcome->surplus[i] = NAN;
}

static void note_adverse(const struct sl_governing *all, size_t class,
                         const struct sl_joint *typical, bool stands)
{
    struct sl_tally *tally = &all->tallies[class];
    struct sl_bound_case of = {.layout = all->layout,
                               .counts = all->sets->counts,
                               .class = class,
                               .ends = sl_ends_all(SL_ADVERSE),
                               .sense = SL_ADVERSE,
                               .typical = typical,
                               .start = all->flows};
    const struct sl_class *self = &all->layout->classes[class];
    struct sl_outcome outcome;
    bool sharing, unsure;

    if (no_adverse(tally))
        return;
    unsure = beside_unsure(all, class, &sharing);
    /* It only lessens the flow: the set without it is tried. */
    if (unsure && !sharing && self->plan->npshr_rises)
        return;
    if (tally->unsearched)
        sl_joint_outcome(typical, class, &outcome);
    else
        sl_bound(&of, &outcome);
    if (stands && outcome.stands)
        return;
    if (tally->unsearched || unsure ||
        (all->layout->neighbour_unknown && self->plan->path_count > 0))
        leave_unbounded(&outcome);
    at_recorded_flow(all, class, &outcome);
    sl_tally_worst(all, &tally->adverse, &outcome, true);
}

static void try_set(const struct sl_governing *all)
{
    const struct sl_layout *layout = all->layout;
    const struct sl_interval *warmth =
        &layout->plans[0].inputs[SL_IN_TEMPERATURE].value;
    struct sl_joint_case typical = {
        .layout = layout,
        .counts = all->sets->counts,
        .focus = SL_NO_FOCUS,
        .ends = sl_ends_all(SL_TYPICAL),
        .liquid = sl_liquid_at(layout->plans[0].salinity, warmth->typical),
        .imposed = NAN};
    struct sl_joint joint;

    sl_joint_solve(&joint, &typical);
    sl_joint_flows(&joint, all->flows);
    for (size_t c = 0; c < layout->class_count; c++) {
        struct sl_outcome outcome;

        /* Of many pumps each set is about one class alone. */
        if (!all->sets->counts[c] || (!all->sets->all && c != all->sets->about))
            continue;
        sl_joint_outcome(&joint, c, &outcome);
        sl_tally_typical(all, &all->tallies[c], &outcome);
        note_adverse(all, c, &joint, outcome.stands);
    }
}

static void alone(const struct sl_layout *layout, size_t class, int *counts)
{
    for (size_t c = 0; c < layout->class_count; c++)
        counts[c] = c == class;
}

/* The set whose best can prove a pump short: the one that governs, where it
 * is sure to occur and its flows are the station's own; else alone. */
static void favourable_set(const struct sl_governing *all, size_t class,
                           int *counts)
{
    const struct sl_tally *tally = &all->tallies[class];
    const struct sl_layout *layout = all->layout;
    bool known = layout->plans[0].dossier->record.pumps_running_max.known;
    bool sure = tally->runs && !layout->classes[class].given &&
                (known || tally->typical.running == 1);

    for (size_t c = 0; c < layout->class_count; c++) {
        counts[c] = tally->typical.counts[c];
        sure =
            sure && (counts[c] == (c == class) || !layout->classes[c].unsure);
    }
    if (!sure)
        alone(layout, class, counts);
}

/* Whether in some station of the records the pump stands in the set: with
 * the least head at its eye, the most asked and the others drawing most. */
static bool may_stand(const struct sl_governing *all, size_t class,
                      const int *counts)
{
    const struct sl_layout *layout = all->layout;
    const struct sl_plan *plan = layout->classes[class].plan;
    struct sl_joint_case hardest = {
        .layout = layout,
        .counts = counts,
        .focus = class,
        .ends = sl_ends_all(SL_ADVERSE),
        .liquid = sl_liquid_at(plan->salinity,
                               plan->inputs[SL_IN_TEMPERATURE].value.typical),
        .imposed = NAN};
    struct sl_outcome outcome;
    struct sl_joint joint;

    hardest.ends.of[SL_IN_DISCHARGE_LEVEL] = SL_FAVOURABLE;
    hardest.ends.of[SL_IN_DISCHARGE_LOSS] = SL_FAVOURABLE;
    hardest.ends.others = SL_FAVOURABLE;
    sl_joint_solve(&joint, &hardest);
    sl_joint_outcome(&joint, class, &outcome);
    return isnan(outcome.figures.flow);
}

/* The better of two; without a figure where one has none. */
static bool better(const struct sl_outcome *a, const struct sl_outcome *b)
{
    if (isnan(b->figures.surplus))
        return false;
    return !(a->figures.surplus <= b->figures.surplus);
}

static void take_best(const struct sl_governing *all, struct sl_tried *kept,
                      const struct sl_outcome *outcome)
{
    size_t rules = all->layout->plans[0].tables->rule_count;
    struct sl_outcome before = kept->outcome;
    bool replace = better(outcome, &before);

    if (replace)
        sl_tally_take(all, kept, outcome);
    else
        before = *outcome;
    kept->outcome.margin = fmax(kept->outcome.margin, before.margin);
    for (size_t i = 0; i < rules; i++)
        kept->outcome.surplus[i] =
            fmax(kept->outcome.surplus[i], before.surplus[i]);
}

static void find_favourable(struct sl_governing *all, size_t class)
{
    struct sl_tally *tally = &all->tallies[class];
    struct sl_sets one = *all->sets;
    struct sl_bound_case of = {.layout = all->layout,
                               .class = class,
                               .ends = sl_ends_all(SL_FAVOURABLE),
                               .sense = SL_FAVOURABLE};
    struct sl_outcome outcome;

    favourable_set(all, class, one.counts);
    of.counts = one.counts;
    one.running = 0;
    for (size_t c = 0; c < all->layout->class_count; c++)
        one.running += one.counts[c];
    all->sets = &one;
    sl_bound(&of, &outcome);
    sl_tally_take(all, &tally->favourable, &outcome);
    if (one.running == 1 || !may_stand(all, class, one.counts))
        return;
    /* Where it stands in that set it is judged by the others: at best alone. */
    alone(all->layout, class, one.counts);
    one.running = 1;
    sl_bound(&of, &outcome);
    take_best(all, &tally->favourable, &outcome);
}

/* Flows of each class alone, to choose among the sets of many pumps. */
static const double *lone_flows(const struct sl_layout *layout,
                                struct sl_arena *arena)
{
    double *flows = sl_arena_new(arena, layout->class_count, sizeof *flows);
    int *counts = sl_arena_new(arena, layout->class_count, sizeof *counts);

    for (size_t c = 0; c < layout->class_count; c++) {
        struct sl_bound_case of = {.layout = layout,
                                   .counts = counts,
                                   .class = c,
                                   .ends = sl_ends_all(SL_TYPICAL),
                                   .sense = SL_TYPICAL};
        struct sl_outcome outcome;

        counts[c] = 1;
        sl_bound(&of, &outcome);
        flows[c] = outcome.figures.flow;
        counts[c] = 0;
    }
    return flows;
}

static void begin(struct sl_sets *sets, const struct sl_layout *layout,
                  struct sl_arena *arena)
{
    const double *flows = layout->pump_count > SL_EXHAUSTIVE_PUMPS
                              ? lone_flows(layout, arena)
                              : NULL;

    sl_sets_begin(sets, layout, flows, arena);
}

static bool searches(const struct sl_layout *layout, size_t class)
{
    struct sl_bound_case of = {.layout = layout, .class = class};

    return sl_bound_searches(&of);
}

void sl_govern(const struct sl_layout *layout, bool list_sets,
               struct sl_arena *arena, struct sl_tally *tallies)
{
    struct sl_sets sets;
    struct sl_governing all = {
        layout,    &sets,
        arena,     tallies,
        list_sets, sl_arena_new(arena, layout->class_count, sizeof(double))};

    for (size_t c = 0; c < layout->class_count; c++)
        tallies[c] =
            (struct sl_tally){.least_flow = NAN,
                              .most_flow = NAN,
                              .most_velocity = NAN,
                              .least_pressure = NAN,
                              .least = sl_arena_new(arena, SL_LEAST_SETS,
                                                    sizeof(struct sl_least))};
    begin(&sets, layout, arena);
    while (sl_sets_next(&sets))
        for (size_t c = 0; c < layout->class_count; c++)
            tallies[c].unsearched += sets.counts[c] > 0;
    for (size_t c = 0; c < layout->class_count; c++)
        if (!searches(layout, c) || tallies[c].unsearched <= SL_SEARCHED_SETS)
            tallies[c].unsearched = 0;
    begin(&sets, layout, arena);
    while (sl_sets_next(&sets))
        try_set(&all);
    for (size_t c = 0; c < layout->class_count; c++) {
        tallies[c].all = sets.all;
        find_favourable(&all, c);
        all.sets = &sets;
    }
}

/* NaN where it has no figure; plus infinity where it delivers nothing. */
static double surplus_in(const struct sl_layout *layout, size_t class,
                         const struct sl_least *set, const struct sl_ends *ends)
{
    struct sl_bound_case of = {.layout = layout,
                               .counts = set->counts,
                               .class = class,
                               .ends = *ends,
                               .sense = SL_TYPICAL,
                               .start = set->flows};
    struct sl_outcome outcome;

    sl_bound(&of, &outcome);
    return outcome.stands ? INFINITY : outcome.figures.surplus;
}

double sl_least_surplus(const struct sl_layout *layout, size_t class,
                        const struct sl_tally *tally,
                        const struct sl_ends *ends, size_t sets)
{
    double least = INFINITY;

    for (size_t i = 0; i < sets && i < tally->least_count; i++) {
        double surplus = surplus_in(layout, class, &tally->least[i], ends);

        if (isnan(surplus))
            return NAN;
        least = fmin(least, surplus);
    }
    return isinf(least) ? NAN : least;
}
