/* What is kept of a class of pumps while its running sets are tried. */
#ifndef SL_EVALUATOR_TALLY_H
#define SL_EVALUATOR_TALLY_H

#include "evaluator/bound.h"

/* A set that a class runs in, and what came of it. */
struct sl_tried {
    const int *counts; /* NULL: none */
    int running;
    struct sl_outcome outcome;
};

/* In as many sets of a class, what lies between the ends of unknowns is
 * searched, where it has to be; beyond, there is no adverse figure. */
#define SL_SEARCHED_SETS 64
/* As many sets are solved anew for the limits: those of least surplus. */
#define SL_LEAST_SETS 64

struct sl_least {
    const int *counts;
    int running;
    const double *flows; /* typical, by class, m³/s */
    double surplus;      /* typical; NaN comes before all figures */
};

/* What was found over the sets that a class runs in. */
struct sl_tally {
    struct sl_tried typical;    /* least surplus; without any, the first set */
    struct sl_tried adverse;    /* likewise; the first without a figure wins */
    struct sl_tried favourable; /* the best of the set that governs */
    struct sl_tried one_out;    /* least, among sets of one fewer than all */
    struct sl_tried off_curve;  /* the first */
    struct sl_tried stands;     /* the first in which it cannot deliver */
    bool runs;                  /* in some set it delivers */
    size_t sets;                /* it was in */
    bool all;                   /* every set that the controls allow */
    /* Sets it is in, where they are more than SL_SEARCHED_SETS and each would
     * have to be searched; else 0. */
    size_t unsearched;
    /* Over all sets, typical. */
    double least_flow, most_flow, most_velocity, least_pressure;
    bool two_crossings;
    struct sl_least *least; /* of the sets it delivers in, the least first */
    size_t least_count;
    struct sl_tried *list; /* every set, on demand */
    size_t list_count, list_room;
};

/* The present set, and where its outcomes go. */
struct sl_governing {
    const struct sl_layout *layout;
    struct sl_sets *sets;
    struct sl_arena *arena;
    struct sl_tally *tallies; /* one a class */
    bool list_sets;
    double *flows; /* typical, by class, of the present set */
};

/* Keep the present set with an outcome. */
void sl_tally_take(const struct sl_governing *all, struct sl_tried *into,
                   const struct sl_outcome *outcome);
/* Keep the present set if it is worse than the one kept, and each rule's
 * least of the two.  strict: one without a figure is the worst; else it
 * counts for nothing. */
void sl_tally_worst(const struct sl_governing *all, struct sl_tried *kept,
                    const struct sl_outcome *outcome, bool strict);
/* The worse of two outcomes in the present set, strictly, into the first. */
void sl_tally_fold(const struct sl_governing *all, struct sl_outcome *worst,
                   const struct sl_outcome *other);
/* All that is kept of a class's typical outcome in the present set. */
void sl_tally_typical(const struct sl_governing *all, struct sl_tally *tally,
                      const struct sl_outcome *outcome);

#endif
