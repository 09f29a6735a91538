/* Which running set governs each class of pumps. */
#ifndef SL_EVALUATOR_GOVERN_H
#define SL_EVALUATOR_GOVERN_H

#include "evaluator/tally.h"

/* `tallies` has room for every class of the layout. */
void sl_govern(const struct sl_layout *layout, bool list_sets,
               struct sl_arena *arena, struct sl_tally *tallies);

/* The least typical surplus of a class at the ends given, over the first
 * `sets` that its tally holds as the least: NaN where one in which it
 * delivers has no figure. */
double sl_least_surplus(const struct sl_layout *layout, size_t class,
                        const struct sl_tally *tally,
                        const struct sl_ends *ends, size_t sets);

#endif
