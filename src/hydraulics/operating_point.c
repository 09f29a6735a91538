#include "hydraulics/operating_point.h"

#include <float.h>
#include <math.h>

/* Steps in which a rising piece of the curve is searched. */
#define SCAN_STEPS 16
/* ITP needs at most one step more than bisection, and bisection from any
 * bracket that starts at or over a double's own spacing is through in 53;
 * a bracket that starts at flow nought is stopped by the same spacing of
 * its upper end.  Reaching the cap would be an error in this file. */
#define STEPS_MOST 64

struct search {
    const struct sl_curve_view *pump;
    const struct sl_system *system;
};

/* A flow and the pump's head less the system's there. */
struct sample {
    double flow;
    double excess;
};

struct bracket {
    struct sample left;  /* excess >= 0 */
    struct sample right; /* excess < 0, or 0 */
};

const char *sl_operating_end_name(enum sl_operating_end end)
{
    switch (end) {
    case SL_OPERATING_FOUND:
        return "found on the curve";
    case SL_OPERATING_STANDS:
        return "shut-off head below the system's: delivers nothing";
    case SL_OPERATING_PAST_END:
        return "found past the curve's last point";
    case SL_OPERATING_BEFORE_START:
        return "found before the curve's first point";
    case SL_OPERATING_NOT_FOUND:
        return "the curve does not fall to the system's head";
    case SL_OPERATING_BAD_CURVE:
        return "the pump's curve is not usable";
    case SL_OPERATING_BAD_SYSTEM:
        return "the system's head is not a number";
    }
    return "unknown end";
}

static struct sample sample_at(const struct search *search, double flow)
{
    double asked = search->system->head(search->system->context, flow);

    return (struct sample){
        flow, isfinite(asked) ? sl_curve_carried_on(search->pump, flow) - asked
                              : NAN};
}

/* The next flow to try, by interpolation, truncation and projection: the
 * secant's, moved toward the middle, and no further from the middle than
 * keeps the count of steps within bisection's and one. */
static double next_flow(const struct bracket *b, double span, double tolerance,
                        int step, int bisections)
{
    const double kappa = 0.2 / span; /* the authors' choices */
    double width = b->right.flow - b->left.flow;
    double middle = b->left.flow + width / 2.0;
    double radius =
        fmax(0.0, tolerance * ldexp(1.0, bisections + 1 - step) - width / 2.0);
    double secant =
        (b->right.excess * b->left.flow - b->left.excess * b->right.flow) /
        (b->right.excess - b->left.excess);
    double side = middle >= secant ? 1.0 : -1.0;
    double moved = fmin(kappa * width * width, fabs(middle - secant));
    double flow = secant + side * moved;

    return fabs(flow - middle) <= radius ? flow : middle - side * radius;
}

/* Narrows the bracket to twice the tolerance.  FOUND or BAD_SYSTEM, or
 * NOT_FOUND at the cap. */
static enum sl_operating_end narrow(const struct search *search,
                                    struct bracket *b, double tolerance,
                                    int *steps)
{
    double span = b->right.flow - b->left.flow;
    int bisections = (int)fmax(0.0, ceil(log2(span / (2.0 * tolerance))));

    for (*steps = 0; *steps < STEPS_MOST; (*steps)++) {
        struct sample tried;

        if (b->right.flow - b->left.flow <= 2.0 * tolerance)
            return SL_OPERATING_FOUND;
        tried = sample_at(search,
                          next_flow(b, span, tolerance, *steps, bisections));
        if (isnan(tried.excess))
            return SL_OPERATING_BAD_SYSTEM;
        if (tried.excess >= 0.0)
            b->left = tried;
        if (tried.excess <= 0.0)
            b->right = tried;
    }
    return SL_OPERATING_NOT_FOUND;
}

/* The crossing inside the bracket; `end` is what to call it. */
static enum sl_operating_end finish(const struct search *search,
                                    struct bracket b, double flow_tolerance,
                                    enum sl_operating_end end,
                                    struct sl_operating_point *point)
{
    double spacing = 2.0 * DBL_EPSILON * b.right.flow;
    double tolerance = flow_tolerance > spacing ? flow_tolerance : spacing;
    enum sl_operating_end ended;
    struct sample at;
    int steps;

    ended = narrow(search, &b, tolerance, &steps);
    if (ended != SL_OPERATING_FOUND)
        return ended;
    at = sample_at(search, b.left.flow + (b.right.flow - b.left.flow) / 2.0);
    if (isnan(at.excess))
        return SL_OPERATING_BAD_SYSTEM;
    *point = (struct sl_operating_point){
        .flow = at.flow,
        .head = sl_curve_carried_on(search->pump, at.flow),
        .residual = at.excess,
        .iterations = steps,
    };
    return end;
}

/* Looks for the crossing nearest the right end of one piece, whose right
 * point lies under the system.  Where the pump's head does not rise the two
 * heads part but once, and the left point alone tells; where it rises they
 * can cross and cross back between the points. */
static enum sl_operating_end search_piece(const struct search *search,
                                          size_t piece, struct bracket *b)
{
    const double *x = search->pump->x, *y = search->pump->y;
    int steps = y[piece + 1] > y[piece] ? SCAN_STEPS : 1;
    int step;

    for (step = steps - 1; step >= 0; step--) {
        double width = x[piece + 1] - x[piece];

        b->left = sample_at(search, x[piece] + width * step / steps);
        if (isnan(b->left.excess))
            return SL_OPERATING_BAD_SYSTEM;
        /* Just meeting at flow nought delivers nothing. */
        if (b->left.excess > 0.0 ||
            (b->left.excess == 0.0 && b->left.flow > 0.0))
            return SL_OPERATING_FOUND;
        b->right = b->left;
    }
    return SL_OPERATING_STANDS;
}

/* FOUND with the bracket around it, STANDS when the whole curve lies under
 * the system (the bracket's right end is then its first point), or
 * BAD_SYSTEM. */
static enum sl_operating_end search_curve(const struct search *search,
                                          struct bracket *b)
{
    enum sl_operating_end end = SL_OPERATING_STANDS;
    size_t piece = search->pump->count - 1;

    while (piece-- > 0 && end == SL_OPERATING_STANDS)
        end = search_piece(search, piece, b);
    return end;
}

static enum sl_operating_end past_end(const struct search *search,
                                      struct sample last, double flow_tolerance,
                                      struct sl_operating_point *point)
{
    struct bracket b = {
        last, sample_at(search, SL_OPERATING_REACH * last.flow)}; /* F20 */

    if (isnan(b.right.excess))
        return SL_OPERATING_BAD_SYSTEM;
    if (b.right.excess > 0.0)
        return SL_OPERATING_NOT_FOUND;
    return finish(search, b, flow_tolerance, SL_OPERATING_PAST_END, point);
}

static enum sl_operating_end before_start(const struct search *search,
                                          struct sample first,
                                          double flow_tolerance,
                                          struct sl_operating_point *point)
{
    struct bracket b = {sample_at(search, 0.0), first};

    if (isnan(b.left.excess))
        return SL_OPERATING_BAD_SYSTEM;
    if (b.left.excess <= 0.0)
        return SL_OPERATING_STANDS;
    return finish(search, b, flow_tolerance, SL_OPERATING_BEFORE_START, point);
}

enum sl_operating_end sl_operating_point_find(const struct sl_curve_view *pump,
                                              const struct sl_system *system,
                                              double flow_tolerance,
                                              struct sl_operating_point *point)
{
    const struct search search = {pump, system};
    enum sl_operating_end end;
    struct bracket b;

    if (!sl_curve_usable(pump) || pump->x[0] < 0.0)
        return SL_OPERATING_BAD_CURVE;
    b.right = sample_at(&search, pump->x[pump->count - 1]);
    if (isnan(b.right.excess))
        return SL_OPERATING_BAD_SYSTEM;
    if (b.right.excess > 0.0)
        return past_end(&search, b.right, flow_tolerance, point);
    b.left = b.right;
    end =
        b.right.excess == 0.0 ? SL_OPERATING_FOUND : search_curve(&search, &b);
    if (end == SL_OPERATING_FOUND)
        return finish(&search, b, flow_tolerance, end, point);
    if (end == SL_OPERATING_STANDS && pump->x[0] > 0.0)
        return before_start(&search, b.right, flow_tolerance, point);
    return end;
}
