/* Where one pump alone runs on a system: formula F20.
 *
 * The flow at which the pump's curve meets the head the system asks for.
 * A curve that droops toward shut-off can meet it twice; the crossing at
 * the larger flow, where the pump's head falls through the system's, is the
 * stable one and the one found. */
#ifndef SL_HYDRAULICS_OPERATING_POINT_H
#define SL_HYDRAULICS_OPERATING_POINT_H

#include "hydraulics/curve.h"

enum sl_operating_end {
    /* On the curve, between its first and last point. */
    SL_OPERATING_FOUND = 0,
    /* The pump's head lies under the system's at every point, and at flow
     * nought (carried on to there where the curve starts later): it
     * delivers nothing behind its check valve. */
    SL_OPERATING_STANDS,
    /* Found beyond the curve's last point, on its end slope carried on. */
    SL_OPERATING_PAST_END,
    /* Found left of the curve's first point, on the slope carried on. */
    SL_OPERATING_BEFORE_START,
    /* The curve, carried on to SL_OPERATING_REACH times its last flow,
     * still lies over the system. */
    SL_OPERATING_NOT_FOUND,
    /* Not usable by sl_curve_usable, or a first flow below nought. */
    SL_OPERATING_BAD_CURVE,
    /* The system gave a head that is NaN or infinite. */
    SL_OPERATING_BAD_SYSTEM
};

/* The end in words, e.g. "found past the curve's last point". */
const char *sl_operating_end_name(enum sl_operating_end end);

/* How far past the last point, as a multiple of its flow, a crossing is
 * looked for.  At three times the last published flow no pump follows its
 * end slope, so a crossing there would be no more than arithmetic. */
#define SL_OPERATING_REACH 3.0

/* Head [m] the system asks for at a flow [m³/s] >= 0: static head and all
 * losses.  It must not fall as the flow grows; it may jump up. */
struct sl_system {
    double (*head)(void *context, double flow);
    void *context;
};

struct sl_operating_point {
    double flow; /* [m³/s] */
    double head; /* [m], the pump's at that flow */
    /* [m], the pump's head less the system's there; not small only where
     * the system's head jumps, as it may where laminar flow ends. */
    double residual;
    int iterations; /* of the root finder; 0 when a point was hit */
};

/* Finds it.
 * in   pump  head [m] over flow [m³/s], first flow >= 0
 *      flow_tolerance  [m³/s]: the flow is found to within this.  Less than
 *              the spacing of doubles there, nought or less, or NaN: it is
 *              found to that spacing.
 * out  point, written only for FOUND, PAST_END and BEFORE_START.
 * The points are searched from the right for the change of sign, and also
 * between two points where the pump's head rises, in sixteen steps; two
 * crossings closer together than a step are missed.  Then ITP (Oliveira and
 * Takahashi 2020, ACM Trans. Math. Softw. 47, 5) inside the bracket. */
enum sl_operating_end sl_operating_point_find(const struct sl_curve_view *pump,
                                              const struct sl_system *system,
                                              double flow_tolerance,
                                              struct sl_operating_point *point);

#endif
