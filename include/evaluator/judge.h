/* The verdict on one pump: its corners, its state, what would settle it. */
#ifndef SL_EVALUATOR_JUDGE_H
#define SL_EVALUATOR_JUDGE_H

#include "evaluator/govern.h"

/* A pump, its class and what was found of that over its running sets. */
struct sl_judging {
    const struct sl_layout *layout;
    const struct sl_tally *tally;
    size_t class;
    size_t pump; /* its place in the dossier */
    struct sl_arena *arena;
};

/* Draw the state from the corners:
 * short   NPSHA below NPSHR even with every unknown at its favourable end,
 *         in the set that governs;
 * thin    likewise the margin rule not met;
 * clear   the rule met with every unknown at its adverse end in every set
 *         that the controls allow, on the published curve in each;
 * unproven otherwise: then each unknown is weighed by what the surplus
 *         would gain if it alone went from its adverse to its favourable
 *         end, and marked when it alone could settle the state. */
void sl_judge(const struct sl_judging *judging, struct sl_pump_result *result);

/* The verdict on another pump of the class: the first one's, under its own
 * names and lines. */
void sl_judge_alike(const struct sl_judging *judging,
                    const struct sl_pump_result *first,
                    struct sl_pump_result *result);

/* Not known exactly, so that finding it out could change the verdict.  What
 * is derived and has no figure at all lacks it for want of others. */
bool sl_input_is_open(const struct sl_input *input);
/* No honest figure at its adverse end.  By its pipe the main's loss has one
 * at any flow: where the pump has none, it is the flow that lacks. */
bool sl_input_lacks_bound(const struct sl_input *input);

/* Parts of it: each unknown's worth; the sentence that gives the reason;
 * what every margin rule says; the companion checks; how far
 * level, temperature and flow may go. */
void sl_weigh_unknowns(const struct sl_judging *judging,
                       struct sl_pump_result *result);
void sl_give_reason(const struct sl_judging *judging,
                    struct sl_pump_result *result);
void sl_judge_rules(const struct sl_judging *judging,
                    struct sl_pump_result *result);
void sl_check_companions(const struct sl_judging *judging,
                         struct sl_pump_result *result);
void sl_find_limits(const struct sl_judging *judging,
                    struct sl_pump_result *result);

#endif
