/* What each unknown is worth: what finding it out would change. */
#include <math.h>

#include "evaluator/judge.h"

bool sl_input_is_open(const struct sl_input *input)
{
    const struct sl_interval *value = &input->value;

    if (!input->applies || input->provenance == SL_RECORDED)
        return false;
    if (input->provenance != SL_DERIVED)
        return true;
    if (isnan(value->typical) && isnan(value->adverse) &&
        isnan(value->favourable))
        return false;
    return !(value->adverse == value->favourable);
}

bool sl_input_lacks_bound(const struct sl_input *input)
{
    return isnan(input->value.adverse) && (input->id != SL_IN_DISCHARGE_LOSS ||
                                           input->provenance == SL_UNKNOWN);
}

/* The surplus with one input at an end of its own, all others at `rest`, in
 * the set that governs there. */
static double surplus_with(const struct sl_judging *judging,
                           enum sl_corner rest, enum sl_input_id id,
                           enum sl_corner end)
{
    const struct sl_tally *tally = judging->tally;
    const struct sl_tried *tried[] = {&tally->typical, &tally->adverse,
                                      &tally->favourable};
    struct sl_bound_case of = {.layout = judging->layout,
                               .counts = tried[rest]->counts,
                               .class = judging->class,
                               .ends = sl_ends_all(rest),
                               .sense = rest == SL_TYPICAL ? end : rest};
    struct sl_outcome outcome;

    if (!of.counts)
        of.counts = tally->typical.counts;
    of.ends.of[id] = end;
    sl_bound(&of, &outcome);
    return outcome.figures.surplus;
}

/* Whether some other open input lacks an honest figure at its adverse end:
 * then this one alone settles nothing. */
static bool another_is_unbounded(const struct sl_pump_result *result,
                                 enum sl_input_id id)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &result->inputs[i];

        if (i != (int)id && sl_input_is_open(input) &&
            sl_input_lacks_bound(input))
            return true;
    }
    return false;
}

/* The surplus with no other pump running. */
static double lone_surplus(const struct sl_judging *judging,
                           enum sl_corner corner)
{
    const struct sl_layout *layout = judging->layout;
    int *counts =
        sl_arena_new(judging->arena, layout->class_count, sizeof *counts);
    struct sl_bound_case of = {.layout = layout,
                               .counts = counts,
                               .class = judging->class,
                               .ends = sl_ends_all(corner),
                               .sense = corner};
    struct sl_outcome outcome;

    counts[judging->class] = 1;
    sl_bound(&of, &outcome);
    return outcome.figures.surplus;
}

/* How much one pump at a time would better it, and whether it would do. */
static void weigh_together(const struct sl_judging *judging,
                           const struct sl_pump_result *result,
                           struct sl_input *input)
{
    input->settles = !another_is_unbounded(result, input->id) &&
                     lone_surplus(judging, SL_ADVERSE) >= 0;
    input->swing = lone_surplus(judging, SL_TYPICAL) -
                   judging->tally->typical.outcome.figures.surplus;
}

static bool unbounded(const struct sl_pump_result *result, enum sl_input_id id)
{
    const struct sl_input *input = &result->inputs[id];

    return sl_input_is_open(input) && sl_input_lacks_bound(input);
}

static void weigh(const struct sl_judging *judging,
                  struct sl_pump_result *result, struct sl_input *input)
{
    enum sl_input_id id = input->id;
    double worst, best;

    if (id == SL_IN_RUNNING_TOGETHER) {
        weigh_together(judging, result, input);
        return;
    }
    worst = surplus_with(judging, SL_TYPICAL, id, SL_ADVERSE);
    best = surplus_with(judging, SL_TYPICAL, id, SL_FAVOURABLE);
    input->swing = best - worst;
    if (isnan(input->value.favourable)) {
        input->settles = !another_is_unbounded(result, id);
        return;
    }
    input->settles =
        surplus_with(judging, SL_FAVOURABLE, id, SL_ADVERSE) < 0 ||
        (judging->tally->all && !unbounded(result, SL_IN_RUNNING_TOGETHER) &&
         surplus_with(judging, SL_ADVERSE, id, SL_FAVOURABLE) >= 0);
}

/* Settling first, then without bound, then by swing, then by place. */
static bool matters_more(const struct sl_input *a, const struct sl_input *b)
{
    bool a_unbounded, b_unbounded;

    if (!b)
        return true;
    if (a->settles != b->settles)
        return a->settles;
    /* Not by the swing: that is NaN too where another input has no figure. */
    a_unbounded = sl_input_lacks_bound(a);
    b_unbounded = sl_input_lacks_bound(b);
    if (a_unbounded != b_unbounded)
        return a_unbounded;
    return a->swing > b->swing;
}

void sl_weigh_unknowns(const struct sl_judging *judging,
                       struct sl_pump_result *result)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        struct sl_input *input = &result->inputs[i];

        if (!sl_input_is_open(input))
            continue;
        input->open = true;
        weigh(judging, result, input);
        if (matters_more(input, result->leading_unknown))
            result->leading_unknown = input;
    }
}
