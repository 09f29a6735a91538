/* A plan solved with each of its unknowns at one end. */
#ifndef SL_EVALUATOR_SOLVE_H
#define SL_EVALUATOR_SOLVE_H

#include "evaluator/plan.h"

/* Which end each input is taken at. */
struct sl_ends {
    enum sl_corner of[SL_INPUT_COUNT];
};

/* How a case ended beside its figures. */
struct sl_case_notes {
    bool off_curve; /* the flow lies past an end of the published curve */
    bool stands;    /* the curve does not reach the discharge head */
};

struct sl_ends sl_ends_all(enum sl_corner corner);

/* Solve one case.  Where water temperature is an unknown, it is tried at
 * both ends and at its typical value: the adverse end is the one that gives
 * the least surplus and the favourable end the one that gives the most, for
 * cold water on a long smooth pipe loses more by friction.  One of the three
 * without a figure leaves both ends without one.
 *
 * A suction loss counts in NPSHA at the end asked for and in the flow at the
 * other one, where it has both; and the pump's own flow is that of running
 * alone, the most it can be, while others load the pipes it shares. */
void sl_solve_case(const struct sl_plan *plan, const struct sl_ends *ends,
                   struct sl_case *solved, struct sl_case_notes *notes);

/* The most this pump can deliver when it runs alone, m³/s; NaN when that is
 * not bounded. */
double sl_solve_most_flow(const struct sl_plan *plan);

/* The loss of the discharge at a flow, m. */
struct sl_interval sl_solve_discharge_loss(const struct sl_plan *plan,
                                           double flow);

/* The losses of each pipe of the path at a case's flow and the typical
 * ends; `losses` has room for path_count.  NaN where a pipe's length or bore
 * is not known. */
void sl_solve_losses(const struct sl_plan *plan, double flow,
                     struct sl_pipe_loss *losses);

#endif
