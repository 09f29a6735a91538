/* The worst, or the best, that a pump can come to in one running set. */
#ifndef SL_EVALUATOR_BOUND_H
#define SL_EVALUATOR_BOUND_H

#include "evaluator/joint.h"

struct sl_bound_case {
    const struct sl_layout *layout;
    const int *counts; /* the running set, by class */
    size_t class;      /* of the pump */
    struct sl_ends ends;
    /* Which way to look over what has no one end: the water's temperature,
     * other pumps' suctions, and for some curves the pump's own. */
    enum sl_corner sense;
    /* The set solved with all unknowns typical, if it is at hand. */
    const struct sl_joint *typical;
    const double *start; /* flows near by, by class; NULL: none */
};

/* Solves it.  At the typical sense there is one case.  Else:
 * - Water temperature, where it is an unknown not taken as typical: both
 *   ends are tried, and for the best also those between, for cold water on a
 *   long pipe loses more by friction.
 * - What other pumps lose in suctions of their own can help or harm: both
 *   ends are tried and, through the flows they run at, what lies between.
 * - Source and suction are at their end where the pump's head falls faster
 *   than what the rule asks for rises; elsewhere all between the ends is
 *   searched, and where NPSHR falls with the flow the discharge too.
 * One of these without a figure leaves the outcome without one.  Each rule's
 * surplus is the least (the most) over all that was tried. */
void sl_bound(const struct sl_bound_case *of, struct sl_outcome *outcome);

/* Whether what lies between the ends of the pump's own unknowns has to be
 * searched: a hundred cases and more, in place of a few. */
bool sl_bound_searches(const struct sl_bound_case *of);

#endif
