#include "evaluator/tally.h"

#include <math.h>
#include <string.h>

static const int *copy_counts(const struct sl_governing *all)
{
    size_t bytes = all->layout->class_count;
    int *counts = sl_arena_new(all->arena, bytes, sizeof *counts);

    memcpy(counts, all->sets->counts, bytes * sizeof *counts);
    return counts;
}

static const double *copy_flows(const struct sl_governing *all)
{
    size_t classes = all->layout->class_count;
    double *flows = sl_arena_new(all->arena, classes, sizeof *flows);

    memcpy(flows, all->flows, classes * sizeof *flows);
    return flows;
}

void sl_tally_take(const struct sl_governing *all, struct sl_tried *into,
                   const struct sl_outcome *outcome)
{
    into->counts = copy_counts(all);
    into->running = all->sets->running;
    into->outcome = *outcome;
}

/* Sets this near to each other, m, are equal: a pump that stands in one and
 * is not in the other changes the last digits alone. */
#define TIE 1e-9

/* Of two figures the lesser; of equal ones that of the smaller set, then of
 * the lesser flow. */
static bool below(double a, double b, const struct sl_case *figures,
                  int running, const struct sl_tried *kept)
{
    if (isnan(a) != isnan(b))
        return isnan(b);
    if (fabs(a - b) > TIE)
        return a < b;
    if (running != kept->running)
        return running < kept->running;
    return figures->flow < kept->outcome.figures.flow - TIE;
}

/* Less surplus; without an NPSHR, less NPSHA.  A figure before none; strict:
 * none before a figure. */
static bool worse(const struct sl_case *a, int running,
                  const struct sl_tried *kept, bool strict)
{
    const struct sl_case *b = &kept->outcome.figures;

    if (isnan(a->surplus) != isnan(b->surplus))
        return isnan(b->surplus) != strict;
    if (isnan(a->surplus))
        return below(a->terms.npsha, b->terms.npsha, a, running, kept);
    return below(a->surplus, b->surplus, a, running, kept);
}

/* The lesser of two; strict: none where one has none. */
static bool is_least(double a, double b, bool strict)
{
    return strict ? isnan(a) || a <= b : isnan(b) || a <= b;
}

/* Margin and each rule's surplus: the least over the sets. */
static void fold_rules(const struct sl_governing *all,
                       const struct sl_outcome *other, struct sl_outcome *into,
                       bool strict)
{
    size_t rules = all->layout->plans[0].tables->rule_count;

    if (!is_least(into->margin, other->margin, strict))
        into->margin = other->margin;
    for (size_t i = 0; i < rules; i++) {
        if (is_least(into->surplus[i], other->surplus[i], strict))
            continue;
        into->surplus[i] = other->surplus[i];
        into->required[i] = other->required[i];
    }
}

void sl_tally_worst(const struct sl_governing *all, struct sl_tried *kept,
                    const struct sl_outcome *outcome, bool strict)
{
    struct sl_outcome former;

    if (!kept->counts) {
        sl_tally_take(all, kept, outcome);
        return;
    }
    if (!worse(&outcome->figures, all->sets->running, kept, strict)) {
        fold_rules(all, outcome, &kept->outcome, strict);
        return;
    }
    former = kept->outcome;
    sl_tally_take(all, kept, outcome);
    fold_rules(all, &former, &kept->outcome, strict);
}

static void list_set(const struct sl_governing *all, struct sl_tally *tally,
                     const struct sl_outcome *outcome)
{
    if (!all->list_sets)
        return;
    if (tally->list_count == tally->list_room) {
        size_t room = tally->list_room ? 2 * tally->list_room : 8;
        struct sl_tried *list = sl_arena_new(all->arena, room, sizeof *list);

        if (tally->list_count)
            memcpy(list, tally->list, tally->list_count * sizeof *list);
        tally->list = list;
        tally->list_room = room;
    }
    sl_tally_take(all, &tally->list[tally->list_count++], outcome);
}

/* None before a figure; of equal ones the smaller set first. */
static bool before(double surplus, int running, const struct sl_least *kept)
{
    if (isnan(surplus) || isnan(kept->surplus))
        return isnan(surplus) && !isnan(kept->surplus);
    if (fabs(surplus - kept->surplus) > TIE)
        return surplus < kept->surplus;
    return running < kept->running;
}

/* Keeps the sets of least surplus, in order. */
static void note_least(const struct sl_governing *all, struct sl_tally *tally,
                       double surplus)
{
    size_t place = tally->least_count;

    while (place > 0 &&
           before(surplus, all->sets->running, &tally->least[place - 1])) {
        if (place < SL_LEAST_SETS)
            tally->least[place] = tally->least[place - 1];
        place--;
    }
    if (place == SL_LEAST_SETS)
        return;
    tally->least[place] = (struct sl_least){
        copy_counts(all), all->sets->running, copy_flows(all), surplus};
    if (tally->least_count < SL_LEAST_SETS)
        tally->least_count++;
}

static void note_extremes(struct sl_tally *tally,
                          const struct sl_outcome *outcome)
{
    double flow = outcome->figures.flow;

    tally->least_flow = fmin(tally->least_flow, flow);
    tally->most_flow = fmax(tally->most_flow, flow);
    tally->most_velocity =
        fmax(tally->most_velocity, outcome->suction_velocity);
    tally->least_pressure =
        fmin(tally->least_pressure, outcome->flange_pressure);
    tally->two_crossings = tally->two_crossings || outcome->two_crossings;
}

void sl_tally_typical(const struct sl_governing *all, struct sl_tally *tally,
                      const struct sl_outcome *outcome)
{
    tally->sets++;
    list_set(all, tally, outcome);
    if (outcome->stands) {
        if (!tally->stands.counts)
            sl_tally_take(all, &tally->stands, outcome);
        if (!tally->typical.counts)
            sl_tally_take(all, &tally->typical, outcome);
        return;
    }
    if (!tally->runs)
        tally->typical.counts = NULL; /* what only stood does not count */
    tally->runs = true;
    note_extremes(tally, outcome);
    note_least(all, tally, outcome->figures.surplus);
    if (outcome->position != SL_ON_CURVE && !tally->off_curve.counts)
        sl_tally_take(all, &tally->off_curve, outcome);
    sl_tally_worst(all, &tally->typical, outcome, false);
    if (all->sets->running == all->layout->at_once - 1)
        sl_tally_worst(all, &tally->one_out, outcome, false);
}

void sl_tally_fold(const struct sl_governing *all, struct sl_outcome *worst,
                   const struct sl_outcome *other)
{
    struct sl_outcome gone = *worst;
    double a = other->figures.surplus, b = worst->figures.surplus;

    if (!isnan(b) && !(b <= a))
        *worst = *other;
    else
        gone = *other;
    fold_rules(all, &gone, worst, true);
}
