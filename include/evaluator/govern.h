/* Which running set governs each class of pumps. */
#ifndef SL_EVALUATOR_GOVERN_H
#define SL_EVALUATOR_GOVERN_H

#include "evaluator/bound.h"

/* A set that a class runs in, and what came of it. */
struct sl_tried {
    const int *counts; /* NULL: none */
    int running;
    struct sl_outcome outcome;
};

/* As many sets are solved anew for the limits: those of least surplus. */
#define SL_LEAST_SETS 64

struct sl_least {
    const int *counts;
    double surplus; /* typical; NaN comes before all figures */
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
    /* Over all sets, typical. */
    double least_flow, most_flow, most_velocity, least_pressure;
    bool two_crossings;
    struct sl_least *least; /* of the sets it delivers in, the least first */
    size_t least_count;
    struct sl_tried *list; /* every set, on demand */
    size_t list_count, list_room;
};

/* `tallies` has room for every class of the layout. */
void sl_govern(const struct sl_layout *layout, bool list_sets,
               struct sl_arena *arena, struct sl_tally *tallies);

/* The least typical surplus of a class at the ends given, over the sets that
 * its tally holds as the least: NaN where one in which it delivers has no
 * figure. */
double sl_least_surplus(const struct sl_layout *layout, size_t class,
                        const struct sl_tally *tally,
                        const struct sl_ends *ends);

#endif
