/* Newton's method on all flows of a network at once. */
#include <float.h>
#include <math.h>

#include "hydraulics/network_parts.h"

/* A step is cut where the potential's slope along it has grown from falling
 * to rising by more than this share. */
#define OVERSHOOT 0.5
#define CUT_LEAST 0.1
#define CUT_MOST 0.7
/* Steps that did not halve a lack within the tolerance, until given up. */
#define IN_VAIN_MOST 2

bool sl_network_kept(const struct sl_network_work *work, size_t unit)
{
    return (work->flow[unit] == 0.0 && work->lack[unit] >= 0.0) ||
           (work->flow[unit] == work->most[unit] && work->lack[unit] <= 0.0);
}

double sl_network_worst(const struct sl_network_work *work)
{
    double worst = 0.0;
    size_t i;

    for (i = 0; i < work->sought_count; i++)
        if (!sl_network_kept(work, work->sought[i]))
            worst = fmax(worst, fabs(work->lack[work->sought[i]]));
    return worst;
}

static void find_free(const struct sl_network_work *work,
                      struct sl_free_units *freed)
{
    size_t i;

    freed->count = 0;
    for (i = 0; i < work->sought_count; i++)
        if (!sl_network_kept(work, work->sought[i]))
            freed->unit[freed->count++] = work->sought[i];
}

static void copy_flows(size_t count, const double *from, double *to)
{
    size_t i;

    for (i = 0; i < count; i++)
        to[i] = from[i];
}

/* Goes along the step, as far as the potential does not rise.  Near the end
 * its slope is rounding, and the step is gone whole. */
static bool advance(struct sl_network_work *work,
                    const struct sl_free_units *freed, const double *step,
                    double falls, bool whole, int *weighings)
{
    double from[SL_NETWORK_UNITS], part = 1.0;
    size_t i;

    copy_flows(work->network->unit_count, work->flow, from);
    while (whole || (*weighings)-- > 0) {
        double rise = NAN;

        for (i = 0; i < freed->count; i++)
            work->flow[freed->unit[i]] = sl_network_within(
                work, freed->unit[i], from[freed->unit[i]] + part * step[i]);
        if (sl_network_weigh(work)) {
            rise = sl_network_along(work, freed, step);
            if (whole || rise <= -OVERSHOOT * falls)
                return true;
        }
        part *= isnan(rise)
                    ? CUT_LEAST
                    : fmin(fmax(falls / (falls - rise), CUT_LEAST), CUT_MOST);
    }
    copy_flows(work->network->unit_count, from, work->flow);
    return false;
}

/* Whether the lack, if not rounding, has stopped to fall: near the end each
 * step all but ends it, save one over a kink or a valve. */
static bool no_better(double worst, double before, int *in_vain)
{
    if (before >= SL_NETWORK_HEAD_TOLERANCE || worst <= 0.5 * before)
        return false;
    return ++*in_vain == IN_VAIN_MOST;
}

enum sl_network_search sl_network_newton(struct sl_network_work *work,
                                         int weighings)
{
    double best[SL_NETWORK_UNITS], least = INFINITY, worst;
    size_t count = work->network->unit_count;
    int in_vain = 0;

    for (;;) {
        struct sl_free_units freed;
        double step[SL_NETWORK_UNITS], falls, before = least;
        bool near_root;

        worst = sl_network_worst(work);
        if (worst < least) {
            least = worst;
            copy_flows(count, work->flow, best);
        }
        if (least <= DBL_EPSILON * work->largest_head ||
            no_better(worst, before, &in_vain))
            break;
        near_root = least < SL_NETWORK_HEAD_TOLERANCE;
        find_free(work, &freed);
        falls = sl_network_step(work, &freed, near_root, step);
        if ((!near_root && !(falls < 0.0)) ||
            !advance(work, &freed, step, falls, near_root, &weighings))
            break;
    }
    if (worst > least || weighings < 0) {
        copy_flows(count, best, work->flow);
        if (!sl_network_weigh(work))
            return SL_SEARCH_NO_FIGURE;
    }
    return least < SL_NETWORK_HEAD_TOLERANCE ? SL_SEARCH_SETTLED
                                             : SL_SEARCH_STALLED;
}
