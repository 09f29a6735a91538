/* A measured curve (head or NPSHR against flow) through given points.
 *
 * Formula F19: monotone piecewise cubic (Fritsch and Carlson 1980, SIAM J.
 * Numer. Anal. 17, 238; slopes of Fritsch and Butland 1984, SIAM J. Sci.
 * Stat. Comput. 5, 300; end slopes as SciPy's PchipInterpolator).  It goes
 * through every point, makes no rise or fall that the points do not have,
 * and needs no stored coefficients: slopes come from the neighbours.
 * Two points give a straight line. */
#ifndef SL_HYDRAULICS_CURVE_H
#define SL_HYDRAULICS_CURVE_H

#include <stdbool.h>
#include <stddef.h>

/* Points owned by the caller; x strictly increasing. */
struct sl_curve_view {
    const double *x;
    const double *y;
    size_t count;
};

/* At least two points, all finite, x strictly increasing. */
bool sl_curve_usable(const struct sl_curve_view *curve);

/* y at x, in the units of the points.  NaN outside [first x, last x], for
 * NaN or infinity, and for a curve that is not usable. */
double sl_curve_at(const struct sl_curve_view *curve, double x);

/* The same inside; beyond either end the curve is carried on straight at
 * its slope there.  For finding flows only: what a maker did not publish is
 * not known, and an NPSHR must never be read from here. */
double sl_curve_carried_on(const struct sl_curve_view *curve, double x);

/* dy/dx at x, the end slope beyond either end.  NaN as for
 * sl_curve_carried_on: not finite x, or a curve that is not usable. */
double sl_curve_slope_at(const struct sl_curve_view *curve, double x);

/* sl_curve_carried_on and sl_curve_slope_at at once, to the same digits, for
 * searches that need both often.  The curve must be usable, which is not
 * looked into again; NaN where x is not finite. */
double sl_curve_carried_on_and_slope(const struct sl_curve_view *curve,
                                     double x, double *slope);

#endif
