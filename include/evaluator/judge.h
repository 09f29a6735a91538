/* The verdict on one pump: its corners, its state, what would settle it. */
#ifndef SL_EVALUATOR_JUDGE_H
#define SL_EVALUATOR_JUDGE_H

#include "evaluator/plan.h"

/* Solve the three corners of a plan and draw the state from them:
 * short   NPSHA below NPSHR even with every unknown at its favourable end;
 * thin    likewise the margin rule not met;
 * clear   the rule met with every unknown at its adverse end, and figures
 *         at the typical one;
 * unproven otherwise: then each unknown is weighed by what the surplus
 *         would gain if it alone went from its adverse to its favourable
 *         end, and marked when it alone could settle the state.
 * Everything lives in the plan's arena. */
void sl_judge(const struct sl_plan *plan, struct sl_pump_result *result);

#endif
