#include "hydraulics/curve.h"

#include <math.h>

bool sl_curve_usable(const struct sl_curve_view *curve)
{
    size_t i;

    if (curve->count < 2 || curve->x == NULL || curve->y == NULL)
        return false;
    for (i = 0; i < curve->count; i++) {
        if (!isfinite(curve->x[i]) || !isfinite(curve->y[i]))
            return false;
        if (i > 0 && !(curve->x[i] > curve->x[i - 1]))
            return false;
    }
    return true;
}

static double width(const struct sl_curve_view *curve, size_t piece)
{
    return curve->x[piece + 1] - curve->x[piece];
}

static double secant(const struct sl_curve_view *curve, size_t piece)
{
    return (curve->y[piece + 1] - curve->y[piece]) / width(curve, piece);
}

static bool same_sign(double a, double b)
{
    return (a > 0.0 && b > 0.0) || (a < 0.0 && b < 0.0);
}

/* Slope at an inner point: nought at a turn, else the harmonic mean of the
 * secants on either side, the nearer one weighing more. */
static double inner_slope(const struct sl_curve_view *curve, size_t point)
{
    double h_left = width(curve, point - 1), h_right = width(curve, point);
    double d_left = secant(curve, point - 1), d_right = secant(curve, point);
    double w_left = 2.0 * h_right + h_left, w_right = h_right + 2.0 * h_left;

    if (!same_sign(d_left, d_right))
        return 0.0;
    return (w_left + w_right) / (w_left / d_left + w_right / d_right); /* F19 */
}

/* Slope at an end, from its own piece and the next one in: three points,
 * held to the shape of the points. */
static double end_slope(double h_own, double h_next, double d_own,
                        double d_next)
{
    double slope = ((2.0 * h_own + h_next) * d_own - h_own * d_next) /
                   (h_own + h_next); /* F19 */

    if (!same_sign(slope, d_own))
        return 0.0;
    if (!same_sign(d_own, d_next) && fabs(slope) > 3.0 * fabs(d_own))
        return 3.0 * d_own;
    return slope;
}

static double point_slope(const struct sl_curve_view *curve, size_t point)
{
    size_t last = curve->count - 1;

    if (curve->count == 2)
        return secant(curve, 0);
    if (point == 0)
        return end_slope(width(curve, 0), width(curve, 1), secant(curve, 0),
                         secant(curve, 1));
    if (point == last)
        return end_slope(width(curve, last - 1), width(curve, last - 2),
                         secant(curve, last - 1), secant(curve, last - 2));
    return inner_slope(curve, point);
}

/* One piece in Hermite's form, and where in it x lies. */
struct piece {
    double start, secant, slope_left, slope_right, width;
    double along; /* 0 to 1 */
};

static struct piece piece_at(const struct sl_curve_view *curve, double x)
{
    size_t i = 0;

    while (i + 2 < curve->count && x >= curve->x[i + 1])
        i++;
    return (struct piece){
        .start = curve->y[i],
        .secant = secant(curve, i),
        .slope_left = point_slope(curve, i),
        .slope_right = point_slope(curve, i + 1),
        .width = width(curve, i),
        .along = (x - curve->x[i]) / width(curve, i),
    };
}

/* start + s (c1 + s (c2 + s c3)) in the distance s from the left point. */
static void coefficients(const struct piece *p, double *c2, double *c3)
{
    double bend = p->slope_left + p->slope_right - 2.0 * p->secant;

    *c2 = p->secant - p->slope_left - bend;
    *c3 = bend;
}

static double inside(const struct sl_curve_view *curve, double x)
{
    struct piece p = piece_at(curve, x);
    double c2, c3;

    coefficients(&p, &c2, &c3);
    return p.start +
           p.width * p.along * (p.slope_left + p.along * (c2 + p.along * c3));
}

double sl_curve_at(const struct sl_curve_view *curve, double x)
{
    size_t last = curve->count - 1;

    if (!sl_curve_usable(curve) || !(x >= curve->x[0] && x <= curve->x[last]))
        return NAN;
    return x == curve->x[last] ? curve->y[last] : inside(curve, x);
}

double sl_curve_carried_on(const struct sl_curve_view *curve, double x)
{
    size_t last = curve->count - 1;

    if (!isfinite(x) || !sl_curve_usable(curve))
        return NAN;
    if (x < curve->x[0])
        return curve->y[0] + point_slope(curve, 0) * (x - curve->x[0]);
    if (x >= curve->x[last])
        return curve->y[last] +
               point_slope(curve, last) * (x - curve->x[last]); /* F20 */
    return inside(curve, x);
}

double sl_curve_slope_at(const struct sl_curve_view *curve, double x)
{
    size_t last = curve->count - 1;
    struct piece p;
    double c2, c3;

    if (!isfinite(x) || !sl_curve_usable(curve))
        return NAN;
    if (x <= curve->x[0])
        return point_slope(curve, 0);
    if (x >= curve->x[last])
        return point_slope(curve, last);
    p = piece_at(curve, x);
    coefficients(&p, &c2, &c3);
    return p.slope_left + p.along * (2.0 * c2 + 3.0 * p.along * c3);
}

double sl_curve_carried_on_and_slope(const struct sl_curve_view *curve,
                                     double x, double *slope)
{
    size_t last = curve->count - 1, end = x < curve->x[0] ? 0 : last;
    struct piece p;
    double c2, c3;

    *slope = NAN;
    if (!isfinite(x))
        return NAN;
    if (x < curve->x[0] || x >= curve->x[last]) {
        *slope = point_slope(curve, end);
        return curve->y[end] + *slope * (x - curve->x[end]); /* F20 */
    }
    p = piece_at(curve, x);
    coefficients(&p, &c2, &c3);
    *slope = p.slope_left + p.along * (2.0 * c2 + 3.0 * p.along * c3);
    return p.start +
           p.width * p.along * (p.slope_left + p.along * (c2 + p.along * c3));
}
