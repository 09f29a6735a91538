/* The pumps of a station and how they hang together.
 *
 * Pumps that are equal in every figure, on equal branches of the suction
 * tree, are one class: they run alike and are judged once.  A running set
 * says how many of each class run. */
#ifndef SL_EVALUATOR_LAYOUT_H
#define SL_EVALUATOR_LAYOUT_H

#include "evaluator/plan.h"

/* Up to this many pumps every set that the controls allow is tried; of more,
 * where all are equal or one runs at a time. */
#define SL_EXHAUSTIVE_PUMPS 16

struct sl_class {
    const size_t *pumps; /* places in the dossier, rising */
    int count;
    const struct sl_plan *plan; /* of the first */
    /* Its flow comes from the records, not from the station's system. */
    bool given;
    /* What it draws has no bound: the flow is given, or a point of its curve
     * was rejected, or the speed of its curve's test is not known. */
    bool unsure;
};

struct sl_layout {
    struct sl_plan *plans; /* as the dossier's pumps */
    size_t pump_count;
    struct sl_class *classes; /* in order of their first pump */
    size_t class_count;
    int at_once; /* most pumps that run together */
    /* No honest bound on what others draw from the pipes of one of these. */
    bool neighbour_unknown;
    /* Room for the flows of each class, for whoever solves a set. */
    double *worst_flows, *best_flows, *flows, *start;
};

/* Makes the plans of all pumps under a condition, and the classes of them.
 * `apart` keeps each pump a class of its own. */
void sl_layout_make(struct sl_layout *layout, const struct sl_dossier *dossier,
                    const struct sl_condition *condition,
                    const struct sl_tables *tables,
                    const struct sl_margin_rule *rule, bool apart,
                    struct sl_arena *arena);

/* Whether pumps of two classes, or two pumps of one, draw through a pipe that
 * both use. */
bool sl_classes_share(const struct sl_class *a, const struct sl_class *b);

/* The sets to try, one after another. */
struct sl_sets {
    const struct sl_layout *layout;
    int *counts;         /* of each class, in the present set */
    int running;         /* their sum */
    bool all;            /* every allowed set comes */
    const size_t *order; /* not all: classes, the largest flow first */
    size_t about;        /* not all: the class the present set is about */
};

/* Before the first.  `flows` of the classes running alone, m³/s, are used
 * only where there are too many pumps to try every set: then each class is
 * tried alone, with 1 to 15 of the others that flow most, and with as many
 * as may run. */
void sl_sets_begin(struct sl_sets *sets, const struct sl_layout *layout,
                   const double *flows, struct sl_arena *arena);
bool sl_sets_next(struct sl_sets *sets);

/* The set in words, as one pump of it sees it: "alone", "with P-2". */
const char *sl_set_words(const struct sl_layout *layout, const int *counts,
                         size_t pump, struct sl_arena *arena);

#endif
