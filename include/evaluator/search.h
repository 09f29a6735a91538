/* The cases that a bound is sought among, and the furthest of them. */
#ifndef SL_EVALUATOR_SEARCH_H
#define SL_EVALUATOR_SEARCH_H

#include "evaluator/bound.h"

/* Golden sections of an interval: to 0.618^18, 0.0002 of it. */
#define SL_SEARCH_SECTIONS 18
#define SL_SEARCH_GOLDEN 0.6180339887498949

struct sl_search {
    const struct sl_bound_case *of;
    struct sl_outcome *best;
    bool any;
    struct sl_liquid liquid;
    double imposed;      /* flow of the pump; NaN: solved */
    bool stood, ran;     /* in some case */
    const double *start; /* flows of the last case, by class; NULL: none */
};

/* What the furthest is sought of: each rule of the tables, by its place, and
 * these. */
enum { BY_RANK = SL_RULES_MOST, BY_MARGIN, AIMS };

/* Keep the furthest by the rule ranked on, and with it the extremes of the
 * margin and of each rule.  A case in which the pump stands is not judged: it
 * counts only where no other is left.  `tried` is changed. */
void sl_search_keep(struct sl_search *search, struct sl_outcome *tried);

/* The figure of an aim; where the pump stands, never the furthest. */
double sl_search_aimed(const struct sl_search *search,
                       const struct sl_outcome *outcome, int aim);

/* The others' suctions: where no pipe is shared the end at which they draw
 * least is the worst; else both ends, and the flows between.  Where they have
 * no adverse end they may draw nothing at all: for the worst that is the set
 * without them, which is tried too; for the best it bounds the flows. */
void sl_search_others(struct sl_search *search, const struct sl_ends *ends,
                      struct sl_joint *joint);

/* Whether both ends are one. */
bool sl_search_closed(const struct sl_interval *value);
/* Whether a suction has figures at its adverse end, and whether it is the
 * same at both; either is only ever made false. */
void sl_search_suction(const struct sl_plan *plan, bool *bounded, bool *exact);

#endif
