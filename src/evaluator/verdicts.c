/* What every margin rule says of a pump, over all its running sets. */
#include <math.h>

#include "evaluator/judge.h"

static enum sl_state by_surplus(double surplus, double margin)
{
    if (isnan(surplus))
        return SL_UNPROVEN;
    if (surplus >= 0)
        return SL_CLEAR;
    return margin < 0 ? SL_SHORT : SL_THIN;
}

/* As for the rule ranked on: what the best proves, else what the worst. */
static enum sl_state verdict_of(const struct sl_rule_verdict *verdict,
                                const struct sl_tally *tally)
{
    enum sl_state best = by_surplus(verdict->surplus[SL_FAVOURABLE],
                                    tally->favourable.outcome.margin);

    if (best == SL_SHORT || best == SL_THIN)
        return best;
    if (verdict->surplus[SL_ADVERSE] >= 0 && tally->all &&
        !tally->off_curve.counts)
        return SL_CLEAR;
    return SL_UNPROVEN;
}

void sl_judge_rules(const struct sl_judging *judging,
                    struct sl_pump_result *result)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    const struct sl_tables *tables = plan->tables;
    const struct sl_tally *tally = judging->tally;
    const struct sl_tried *tried[SL_CORNER_COUNT] = {
        [SL_TYPICAL] = &tally->typical,
        [SL_ADVERSE] = &tally->adverse,
        [SL_FAVOURABLE] = &tally->favourable};

    result->rule_count = tables->rule_count;
    result->rules =
        sl_arena_new(judging->arena, tables->rule_count, sizeof *result->rules);
    for (size_t i = 0; i < tables->rule_count; i++) {
        struct sl_rule_verdict *verdict = &result->rules[i];

        verdict->rule = &tables->rules[i];
        verdict->applies = sl_rule_applies(verdict->rule, plan);
        verdict->measure = sl_rule_measure(verdict->rule, plan, SL_TYPICAL,
                                           &tally->typical.outcome.figures);
        for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
            bool none = !tried[corner]->counts;

            verdict->required[corner] =
                none ? NAN : tried[corner]->outcome.required[i];
            verdict->surplus[corner] =
                none ? NAN : tried[corner]->outcome.surplus[i];
        }
        verdict->state = verdict_of(verdict, tally);
        if (verdict->state == SL_CLEAR && tables->rejected_conditions)
            verdict->state = SL_UNPROVEN;
    }
}
