#include "evaluator/judge.h"

#include <math.h>
#include <string.h>

#include "base/text.h"
#include "evaluator/solve.h"

/* Which state the figures of one corner show. */
static enum sl_state state_of(const struct sl_case *solved)
{
    if (isnan(solved->surplus))
        return SL_UNPROVEN;
    if (solved->margin < 0)
        return SL_SHORT;
    return solved->surplus < 0 ? SL_THIN : SL_CLEAR;
}

static enum sl_state drawn(const struct sl_case cases[SL_CORNER_COUNT])
{
    enum sl_state best = state_of(&cases[SL_FAVOURABLE]);

    if (best == SL_SHORT || best == SL_THIN)
        return best;
    /* The least flow may lie before the curve's first point: without a likely
     * NPSHR there is none that the adverse end could bound. */
    if (state_of(&cases[SL_ADVERSE]) == SL_CLEAR &&
        !isnan(cases[SL_TYPICAL].surplus))
        return SL_CLEAR;
    return SL_UNPROVEN;
}

/* Not known exactly, so that finding it out could change the verdict.  What
 * is derived and has no figure at all lacks it for want of others. */
static bool open_input(const struct sl_input *input)
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

/* No honest figure at its adverse end.  By its pipe the main's loss has one
 * at any flow: where the pump has none, it is the flow that lacks. */
static bool lacks_bound(const struct sl_input *input)
{
    return isnan(input->value.adverse) && (input->id != SL_IN_DISCHARGE_LOSS ||
                                           input->provenance == SL_UNKNOWN);
}

/* The case with one input at an end of its own. */
static struct sl_case case_with(const struct sl_plan *plan, enum sl_corner rest,
                                enum sl_input_id id, enum sl_corner end)
{
    struct sl_ends ends = sl_ends_all(rest);
    struct sl_case solved;
    struct sl_case_notes notes;

    ends.of[id] = end;
    sl_solve_case(plan, &ends, &solved, &notes);
    return solved;
}

static double surplus_with(const struct sl_plan *plan, enum sl_corner rest,
                           enum sl_input_id id, enum sl_corner end)
{
    return case_with(plan, rest, id, end).surplus;
}

/* Whether some other open input lacks an honest figure at its adverse end:
 * then this one alone settles nothing. */
static bool another_is_unbounded(const struct sl_pump_result *result,
                                 enum sl_input_id id)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &result->inputs[i];

        if (i != (int)id && open_input(input) && lacks_bound(input))
            return true;
    }
    return false;
}

static void weigh(const struct sl_plan *plan, struct sl_pump_result *result,
                  struct sl_input *input)
{
    enum sl_input_id id = input->id;
    double worst = surplus_with(plan, SL_TYPICAL, id, SL_ADVERSE);
    double best = surplus_with(plan, SL_TYPICAL, id, SL_FAVOURABLE);

    input->swing = best - worst;
    if (isnan(input->value.favourable)) {
        input->settles = !another_is_unbounded(result, id);
        return;
    }
    input->settles = surplus_with(plan, SL_ADVERSE, id, SL_FAVOURABLE) >= 0 ||
                     surplus_with(plan, SL_FAVOURABLE, id, SL_ADVERSE) < 0;
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
    a_unbounded = lacks_bound(a);
    b_unbounded = lacks_bound(b);
    if (a_unbounded != b_unbounded)
        return a_unbounded;
    return a->swing > b->swing;
}

static void weigh_unknowns(const struct sl_plan *plan,
                           struct sl_pump_result *result)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        struct sl_input *input = &result->inputs[i];

        if (!open_input(input))
            continue;
        input->open = true;
        weigh(plan, result, input);
        if (matters_more(input, result->leading_unknown))
            result->leading_unknown = input;
    }
}

/* A stand-in without a bound is counted as unknown, whatever it stands on. */
static enum sl_provenance how_known(const struct sl_input *input)
{
    if (open_input(input) && lacks_bound(input))
        return SL_UNKNOWN;
    return input->provenance;
}

static void count_inputs(struct sl_pump_result *result)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        if (result->inputs[i].applies)
            result->counts[how_known(&result->inputs[i])]++;
}

/* What running off its curve, or standing, makes unknown is told as such;
 * and an NPSHR that only lost its bounds has its own reason. */
static bool told_otherwise(const struct sl_pump_result *result,
                           const struct sl_input *input)
{
    if (input->id == SL_IN_NPSHR)
        return result->off_curve || !isnan(result->cases[SL_TYPICAL].npshr);
    return result->stands && input->id == SL_IN_FLOW;
}

/* "a, b and c are not known" over the inputs without any likely figure. */
static void name_missing(const struct sl_pump_result *result,
                         struct sl_text *text)
{
    const char *names[SL_INPUT_COUNT];
    size_t count = 0;

    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &result->inputs[i];

        if (input->applies && input->provenance == SL_UNKNOWN &&
            isnan(input->value.typical) && !told_otherwise(result, input))
            names[count++] = sl_input_words(input->id);
    }
    for (size_t i = 0; i < count; i++)
        sl_text_addf(text, "%s%s",
                     i == 0           ? ""
                     : i + 1 == count ? " and "
                                      : ", ",
                     names[i]);
    if (count)
        sl_text_addf(text, " %s not known", count == 1 ? "is" : "are");
}

static void reason_unproven(const struct sl_pump_result *result,
                            const struct sl_case_notes notes[SL_CORNER_COUNT],
                            struct sl_text *text)
{
    const struct sl_input *leading = result->leading_unknown;

    name_missing(result, text);
    if (text->length)
        return;
    if (result->stands)
        sl_text_add_string(text, "its curve does not reach the discharge "
                                 "level: check curve, speed and levels");
    else if (result->off_curve)
        sl_text_add_string(text, "running alone it leaves the published end "
                                 "of its curve");
    else if (leading && lacks_bound(leading) && leading->rule[0])
        sl_text_addf(text, "%s: %s", sl_input_words(leading->id),
                     leading->rule);
    else if (notes[SL_ADVERSE].off_curve)
        sl_text_add_string(text, "at the adverse end of what is assumed it "
                                 "leaves the published end of its curve");
    else if (leading)
        sl_text_addf(text, "what is assumed decides, %s most",
                     sl_input_words(leading->id));
    else
        sl_text_add_string(text, "its figures allow no verdict");
}

static void explain(const struct sl_plan *plan, struct sl_pump_result *result,
                    const struct sl_case_notes notes[SL_CORNER_COUNT])
{
    struct sl_text text = {0};

    if (result->state == SL_UNPROVEN)
        reason_unproven(result, notes, &text);
    result->reason =
        sl_arena_text(plan->arena, sl_text_string(&text), text.length);
    sl_text_release(&text);
}

/* The extra loss that other pumps in a shared pipe may bring: from the
 * losses, which are known where the surplus may not be. */
static void set_running_together(const struct sl_plan *plan,
                                 struct sl_pump_result *result)
{
    struct sl_input *input = &result->inputs[SL_IN_RUNNING_TOGETHER];
    const struct sl_terms *alone = &result->cases[SL_TYPICAL].terms;
    struct sl_case together;

    if (!input->applies)
        return;
    together = case_with(plan, SL_TYPICAL, SL_IN_RUNNING_TOGETHER, SL_ADVERSE);
    input->value.adverse = (alone->friction + alone->minor) -
                           (together.terms.friction + together.terms.minor);
}

/* Off its published curve a pump's NPSHR is not known, and where it stands
 * its flow is none: that is then the thing to find out. */
static void mark_what_the_curve_lacks(struct sl_pump_result *result)
{
    struct sl_input *npshr = &result->inputs[SL_IN_NPSHR];
    struct sl_input *flow = &result->inputs[SL_IN_FLOW];

    if (result->off_curve) {
        npshr->provenance = SL_UNKNOWN;
        npshr->value = sl_no_figure();
        npshr->rule = "the published curve ends before the flow it runs at "
                      "alone";
    }
    if (result->stands) {
        flow->provenance = SL_UNKNOWN;
        flow->rule = "its curve does not reach the discharge level";
    }
}

/* What is known once the flow is solved: the flow, with a larger one on
 * record as its adverse end, and what a discharge known by its pipe loses. */
static void show_solved_flow(const struct sl_plan *plan,
                             struct sl_pump_result *result)
{
    const struct sl_number *largest = &plan->pump->record.largest_recorded_flow;
    struct sl_input *flow = &result->inputs[SL_IN_FLOW];
    double solved = result->cases[SL_TYPICAL].flow;

    if (isnan(plan->delivery.loss_flow)) /* by its pipe, not measured */
        result->inputs[SL_IN_DISCHARGE_LOSS].value =
            sl_solve_discharge_loss(plan, solved);
    flow->value = sl_exactly(solved);
    if (!(largest->known && largest->value > solved))
        return;
    flow->value.adverse = largest->value;
    flow->kind = SL_KIND_PUMP;
    flow->line = plan->pump->record.line;
    flow->rule = "solved for running alone; a larger flow is on record";
}

void sl_judge(const struct sl_plan *plan, struct sl_pump_result *result)
{
    struct sl_case_notes notes[SL_CORNER_COUNT];

    *result = (struct sl_pump_result){.pump = plan->pump,
                                      .flow_basis = plan->flow_basis,
                                      .source_basis = plan->source_basis,
                                      .loss_count = plan->path_count};
    memcpy(result->inputs, plan->inputs, sizeof result->inputs);
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
        struct sl_ends ends = sl_ends_all((enum sl_corner)corner);

        sl_solve_case(plan, &ends, &result->cases[corner], &notes[corner]);
    }
    result->off_curve = notes[SL_TYPICAL].off_curve;
    result->stands = notes[SL_TYPICAL].stands;
    result->state = drawn(result->cases);
    result->likely = result->state == SL_UNPROVEN
                         ? state_of(&result->cases[SL_TYPICAL])
                         : result->state;
    mark_what_the_curve_lacks(result);
    if (plan->flow_basis == SL_FLOW_SOLVED)
        show_solved_flow(plan, result);
    set_running_together(plan, result);
    count_inputs(result);
    if (result->state == SL_UNPROVEN)
        weigh_unknowns(plan, result);
    explain(plan, result, notes);
    result->losses =
        sl_arena_new(plan->arena, plan->path_count, sizeof *result->losses);
    sl_solve_losses(plan, result->cases[SL_TYPICAL].flow, result->losses);
}
