/* The flows of pumps that run together (formula F12).
 *
 * Pumps draw through a tree of pipes from one source, each behind its own
 * check valve, and lift into one discharge.  All flows are solved at once:
 * every running pump's head equals the static head and all losses on its
 * way, each pipe losing at the flow of all pumps it feeds; a pump that
 * cannot reach that head stands at nought.
 *
 * Equal pumps on equal branches are one unit: they run at the same flow and
 * are not solved twice.  A pipe that each of them has for itself is `own`.
 *
 * Where every curve falls and every loss grows with flow there is one
 * solution.  A curve that rises somewhere may allow several: then no pump is
 * left at a flow where, the others held, it could run at a larger one, if
 * that can be; equal pumps then run alike only as one unit.
 *
 * Pure numbers: no heap, no state.  SI throughout. */
#ifndef SL_HYDRAULICS_NETWORK_H
#define SL_HYDRAULICS_NETWORK_H

#include <stdbool.h>
#include <stddef.h>

#include "hydraulics/curve.h"
#include "hydraulics/operating_point.h"

/* Most units solved at once. */
#define SL_NETWORK_UNITS 64
/* Most pipes. */
#define SL_NETWORK_PIPES 256
/* How far past its last point a head curve is carried on in the search for
 * a flow, as for one pump alone: to this many times the last point's flow. */
#define SL_NETWORK_REACH SL_OPERATING_REACH

struct sl_network_pipe {
    int draws_from;   /* a pipe before it in the list; -1: the source itself */
    bool own;         /* each pump of its one unit has such a pipe for itself;
                         no shared pipe draws from it, unless that unit is
                         of one pump */
    double length;    /* [m] >= 0; 0: fittings only */
    double bore;      /* [m] > 0 */
    double roughness; /* [m] >= 0; not used with a C, nor where length is 0 */
    double hazen_williams_c; /* NaN: by roughness (F7, F8); else F9 */
    double minor_k;          /* of V²/2g in its bore, >= 0 (F24) */
};

struct sl_network_unit {
    struct sl_curve_view head; /* of one pump [m] over [m³/s]; not used where
                                  the flow is given */
    double given_flow;         /* [m³/s] >= 0; NaN: sought */
    int count;                 /* equal pumps, >= 1 */
    int pipe;                  /* the last of its suction; -1: none */
    double fixed_loss;         /* [m] >= 0 of its suction, at any flow > 0 and
                                  in what it must overcome to start */
};

struct sl_network {
    const struct sl_network_pipe *pipes; /* upstream ones first */
    size_t pipe_count;
    const struct sl_network_unit *units;
    size_t unit_count;
    double static_head; /* [m], from the source to the discharge */
    bool gauge_on_pipe; /* the source is a gauge on a pipe: V²/2g in the first
                           pipe of a unit's way helps it */
    /* The discharge: one measured point (F21) or, with loss_flow NaN, a pipe
     * (F7, F8, F24).  Not used when no flow is sought. */
    double loss_flow, loss_head; /* [m³/s] > 0, [m] >= 0 */
    double length, bore, roughness, minor_k;
    double viscosity; /* kinematic [m²/s] > 0 */
};

/* How one unit ended. */
enum sl_unit_end {
    SL_UNIT_RUNS,        /* on its head curve, or at the flow given */
    SL_UNIT_STANDS,      /* behind its check valve at flow nought */
    SL_UNIT_PAST_END,    /* past its curve's last point, carried on */
    SL_UNIT_BEFORE_START /* before its curve's first point, carried on */
};

struct sl_unit_flow {
    double flow; /* of one pump [m³/s] */
    enum sl_unit_end end;
    /* Its curve rises somewhere, and at the flows of the others (of its
     * equals too) this pump's head also meets the system's at a smaller flow:
     * the larger one is given. */
    bool two_crossings;
    double suction_loss; /* [m] friction, fittings and fixed, to the pump */
    double residual;     /* [m] pump's head less what is asked; 0 standing */
};

enum sl_network_end {
    SL_NETWORK_SOLVED,
    /* Finished, but look: flows stand where laminar flow ends in some pipe,
     * to 2e-9 of its flow, and the residual lies within the jump of head
     * there. */
    SL_NETWORK_AT_JUMP,
    /* Some pump's curve does not come down to the system's head within
     * SL_NETWORK_REACH. */
    SL_NETWORK_BEYOND,
    /* The caps on steps were reached: an error in this file. */
    SL_NETWORK_NOT_FOUND,
    /* A curve that is not usable or starts below flow 0, an index out of
     * place, a count below 1, an own pipe that others use, or too many units
     * or pipes. */
    SL_NETWORK_BAD_INPUT,
    /* A head or loss is not a number at some flow: a NaN among the values,
     * or out of a formula's range. */
    SL_NETWORK_NO_FIGURE
};
const char *sl_network_end_name(enum sl_network_end end);

/* Solves it.
 * in   start  a guess of the flows, one a unit, or NULL.  It saves steps and
 *      changes no more than the last digits.  A figure that is no flow on or
 *      left of the unit's curve is not used; nor is any where a curve rises,
 *      for it might lead to another solution.
 * out  flows, one a unit, written only for SOLVED and AT_JUMP
 * For SOLVED each residual is under 1e-9 m, mostly rounding. */
enum sl_network_end sl_network_solve(const struct sl_network *network,
                                     const double *start,
                                     struct sl_unit_flow *flows);

#endif
