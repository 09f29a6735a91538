#include "evaluator/judge.h"

#include <math.h>
#include <string.h>

#include "base/text.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"

/* Which state a corner shows. */
static enum sl_state state_of(const struct sl_tried *tried)
{
    double surplus = tried->outcome.figures.surplus;

    if (!tried->counts || isnan(surplus))
        return SL_UNPROVEN;
    if (tried->outcome.margin < 0)
        return SL_SHORT;
    return surplus < 0 ? SL_THIN : SL_CLEAR;
}

static enum sl_state drawn(const struct sl_tally *tally)
{
    enum sl_state best = state_of(&tally->favourable);

    if (best == SL_SHORT || best == SL_THIN)
        return best;
    /* A set that was not tried may be worse than all that were.  Off its curve
     * in any set, there is no NPSHR that the adverse end could bound. */
    if (state_of(&tally->adverse) == SL_CLEAR && tally->all &&
        !tally->off_curve.counts)
        return SL_CLEAR;
    return SL_UNPROVEN;
}

/* A stand-in without a bound is counted as unknown, whatever it stands on. */
static enum sl_provenance how_known(const struct sl_input *input)
{
    if (sl_input_is_open(input) && sl_input_lacks_bound(input))
        return SL_UNKNOWN;
    return input->provenance;
}

static void count_inputs(struct sl_pump_result *result)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        if (result->inputs[i].applies)
            result->counts[how_known(&result->inputs[i])]++;
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
        npshr->rule = result->off_curve_set.position == SL_BEFORE_START
                          ? "the published curve begins after a flow it runs at"
                          : "the published curve ends before a flow it runs at";
    }
    if (result->stands) {
        flow->provenance = SL_UNKNOWN;
        flow->rule = "its curve does not reach the discharge level";
    }
}

/* The loss of the discharge by its pipe at a flow, m. */
static double discharge_loss(const struct sl_plan *plan,
                             const struct sl_liquid *liquid, double flow,
                             enum sl_corner end)
{
    const struct sl_delivery *delivery = &plan->delivery;
    double velocity = sl_pipe_velocity(flow, delivery->bore);
    double factor = sl_friction_factor(
        sl_reynolds(velocity, delivery->bore, liquid->viscosity),
        sl_interval_at(&delivery->roughness, end) / delivery->bore);

    return sl_darcy_head(factor, delivery->length, delivery->bore, velocity) +
           sl_minor_head(sl_interval_at(&delivery->minor_k, end), velocity);
}

/* What is known once the flow is solved: the flow, with a larger one on
 * record as its adverse end, and what a discharge known by its pipe loses. */
static void show_solved_flow(const struct sl_plan *plan, double header_flow,
                             struct sl_pump_result *result)
{
    const struct sl_number *largest = &plan->pump->record.largest_recorded_flow;
    struct sl_input *flow = &result->inputs[SL_IN_FLOW];
    struct sl_interval *loss = &result->inputs[SL_IN_DISCHARGE_LOSS].value;
    double solved = result->cases[SL_TYPICAL].flow;
    struct sl_liquid liquid = sl_liquid_at(
        plan->salinity, plan->inputs[SL_IN_TEMPERATURE].value.typical);

    if (isnan(plan->delivery.loss_flow)) { /* by its pipe, not measured */
        loss->typical = discharge_loss(plan, &liquid, header_flow, SL_TYPICAL);
        loss->adverse = discharge_loss(plan, &liquid, header_flow, SL_ADVERSE);
        loss->favourable =
            discharge_loss(plan, &liquid, header_flow, SL_FAVOURABLE);
    }
    flow->value = sl_exactly(solved);
    if (!(largest->known && largest->value > solved))
        return;
    flow->value.adverse = largest->value;
    flow->kind = SL_KIND_PUMP;
    flow->line = plan->pump->record.line;
    flow->rule = "solved; a larger flow is on record";
}

static struct sl_set_case set_case(const struct sl_judging *judging,
                                   const struct sl_tried *tried)
{
    if (!tried->counts)
        return (struct sl_set_case){.words = NULL};
    return (struct sl_set_case){.words =
                                    sl_set_words(judging->layout, tried->counts,
                                                 judging->pump, judging->arena),
                                .running = tried->running,
                                .figures = tried->outcome.figures,
                                .position = tried->outcome.position,
                                .stands = tried->outcome.stands,
                                .two_crossings = tried->outcome.two_crossings,
                                .solution = tried->outcome.solution};
}

static void list_sets(const struct sl_judging *judging,
                      struct sl_pump_result *result)
{
    const struct sl_tally *tally = judging->tally;
    struct sl_set_case *sets =
        sl_arena_new(judging->arena, tally->list_count, sizeof *sets);

    for (size_t i = 0; i < tally->list_count; i++)
        sets[i] = set_case(judging, &tally->list[i]);
    result->sets = sets;
    result->set_count = tally->list_count;
}

static void take_sets(const struct sl_judging *judging,
                      struct sl_pump_result *result)
{
    const struct sl_tally *tally = judging->tally;

    result->cases[SL_TYPICAL] = tally->typical.outcome.figures;
    /* Without an adverse case (it stands wherever all is adverse) none. */
    result->cases[SL_ADVERSE] =
        tally->adverse.counts ? tally->adverse.outcome.figures : sl_no_case();
    result->cases[SL_FAVOURABLE] = tally->favourable.outcome.figures;
    result->governing = set_case(judging, &tally->typical);
    result->one_out = set_case(judging, &tally->one_out);
    result->off_curve_set = set_case(judging, &tally->off_curve);
    result->adverse_set = set_case(judging, &tally->adverse).words;
    result->stands_set = set_case(judging, &tally->stands).words;
    result->sets_tried = tally->sets;
    result->sets_all = tally->all;
    result->off_curve = tally->off_curve.counts != NULL;
    result->stands = !tally->runs && tally->stands.counts;
    list_sets(judging, result);
}

/* Flow through the discharge in the governing set; none where the pump runs
 * in no set. */
static double header_flow(const struct sl_judging *judging,
                          struct sl_joint *joint)
{
    const struct sl_layout *layout = judging->layout;
    double sum = judging->tally->runs ? 0 : NAN;

    for (size_t c = 0; c < layout->class_count; c++)
        if (judging->tally->typical.counts[c])
            sum += judging->tally->typical.counts[c] * sl_joint_flow(joint, c);
    return sum;
}

/* The governing set once more, for what is not kept of every set. */
static void look_closer(const struct sl_judging *judging,
                        const struct sl_plan *plan,
                        struct sl_pump_result *result)
{
    struct sl_joint_case typical = {
        .layout = judging->layout,
        .counts = judging->tally->typical.counts,
        .focus = SL_NO_FOCUS,
        .ends = sl_ends_all(SL_TYPICAL),
        .liquid = sl_liquid_at(plan->salinity,
                               plan->inputs[SL_IN_TEMPERATURE].value.typical),
        .imposed = NAN};
    struct sl_joint joint;

    sl_joint_solve(&joint, &typical);
    result->loss_count = plan->path_count;
    result->losses =
        sl_arena_new(judging->arena, plan->path_count, sizeof *result->losses);
    sl_joint_losses(&joint, judging->class, plan, result->losses);
    if (plan->flow_basis == SL_FLOW_SOLVED)
        show_solved_flow(plan, header_flow(judging, &joint), result);
}

void sl_judge(const struct sl_judging *judging, struct sl_pump_result *result)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];

    *result = (struct sl_pump_result){.pump = plan->pump,
                                      .flow_basis = plan->flow_basis,
                                      .source_basis = plan->source_basis,
                                      .npshr_basis = plan->npshr_basis};
    memcpy(result->inputs, plan->inputs, sizeof result->inputs);
    take_sets(judging, result);
    result->state = drawn(judging->tally);
    /* Nobody knows what a condition that was rejected would have asked. */
    if (result->state == SL_CLEAR && plan->tables->rejected_conditions)
        result->state = SL_UNPROVEN;
    result->likely = result->state == SL_UNPROVEN
                         ? state_of(&judging->tally->typical)
                         : result->state;
    look_closer(judging, plan, result);
    mark_what_the_curve_lacks(result);
    count_inputs(result);
    if (result->state == SL_UNPROVEN)
        sl_weigh_unknowns(judging, result);
    sl_give_reason(judging, result);
    sl_judge_rules(judging, result);
    sl_check_companions(judging, result);
    sl_find_limits(judging, result);
}

/* The pipes of an equal pump's own way, which lose as the first one's. */
static void rename_losses(const struct sl_judging *judging,
                          const struct sl_plan *plan,
                          struct sl_pump_result *result)
{
    const struct sl_pipe_loss *first = result->losses;

    result->losses =
        sl_arena_new(judging->arena, plan->path_count, sizeof *result->losses);
    for (size_t i = 0; i < plan->path_count; i++) {
        result->losses[i] = first[i];
        result->losses[i].pipe = plan->path[i].pipe;
    }
}

void sl_judge_alike(const struct sl_judging *judging,
                    const struct sl_pump_result *first,
                    struct sl_pump_result *result)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];

    *result = *first;
    result->pump = plan->pump;
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        struct sl_input *input = &result->inputs[i];

        if (plan->inputs[i].line)
            input->line = plan->inputs[i].line;
        else if (input->line) /* a flow of its own, found later */
            input->line = plan->pump->record.line;
    }
    if (first->leading_unknown)
        result->leading_unknown = &result->inputs[first->leading_unknown->id];
    take_sets(judging, result);
    sl_give_reason(judging, result);
    rename_losses(judging, plan, result);
}
