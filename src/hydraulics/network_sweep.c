/* One unit of a network at a time, the others held. */
#include <math.h>

#include "hydraulics/network_parts.h"

/* Sweeps until the flows stand still, to this share of a curve's reach.
 * Where most of the loss is shared a sweep gains little. */
#define STILL 1e-13
/* Steps in which a rising piece is searched, as F20 has it. */
#define SCAN_STEPS 16
/* A crossing nearer than this share of the flow is the same one. */
#define SAME 1e-9

struct held {
    const struct sl_network_work *work;
    size_t unit;
    bool alone;
};

static double asked_at(void *context, double flow)
{
    const struct held *held = context;

    return sl_network_asked(held->work, held->unit, held->alone, flow);
}

/* NaN: no figure. */
static double find_flow(const struct held *held)
{
    const struct sl_network_work *work = held->work;
    struct sl_system system = {asked_at, (void *)held};
    struct sl_operating_point point;

    switch (sl_operating_point_find(&work->network->units[held->unit].head,
                                    &system, 0.0, &point)) { /* F20 */
    case SL_OPERATING_FOUND:
    case SL_OPERATING_PAST_END:
    case SL_OPERATING_BEFORE_START:
        return point.flow;
    case SL_OPERATING_STANDS:
        return 0.0;
    case SL_OPERATING_NOT_FOUND:
        return work->most[held->unit];
    case SL_OPERATING_BAD_CURVE:
    case SL_OPERATING_BAD_SYSTEM:
        break;
    }
    return NAN;
}

/* Whether a unit is taken before another: an order of their own, so that the
 * one they are listed in does not count. */
static bool before(const struct sl_network_work *work, size_t a, size_t b)
{
    const double *heads_a = work->network->units[a].head.y;
    const double *heads_b = work->network->units[b].head.y;

    if (work->most[a] != work->most[b])
        return work->most[a] > work->most[b];
    return heads_a[0] > heads_b[0];
}

static void put_in_order(const struct sl_network_work *work, size_t *order)
{
    size_t i, k;

    for (i = 0; i < work->sought_count; i++) {
        for (k = i; k > 0 && before(work, work->sought[i], order[k - 1]); k--)
            order[k] = order[k - 1];
        order[k] = work->sought[i];
    }
}

/* The largest move, as a share of the reach; NaN: no figure. */
static double sweep_once(struct sl_network_work *work, const size_t *order)
{
    double moved = 0.0;
    size_t i;

    for (i = 0; i < work->sought_count; i++) {
        size_t unit = order[i];
        struct held held = {work, unit, false};
        double flow = find_flow(&held);

        if (isnan(flow))
            return NAN;
        moved = fmax(moved, fabs(flow - work->flow[unit]) / work->most[unit]);
        work->flow[unit] = flow;
        if (!sl_network_weigh(work))
            return NAN;
    }
    return moved;
}

enum sl_network_search sl_network_sweep(struct sl_network_work *work, int most)
{
    size_t order[SL_NETWORK_UNITS];
    int i;

    put_in_order(work, order);
    for (i = 0; i < most; i++) {
        double moved = sweep_once(work, order);

        if (isnan(moved))
            return SL_SEARCH_NO_FIGURE;
        if (moved <= STILL || work->sought_count == 1)
            break;
    }
    return sl_network_worst(work) < SL_NETWORK_HEAD_TOLERANCE
               ? SL_SEARCH_SETTLED
               : SL_SEARCH_STALLED;
}

double sl_network_larger(struct sl_network_work *work, size_t unit)
{
    struct held held = {work, unit, true};
    double flow;

    if (work->flow[unit] >= work->falls_from[unit])
        return work->flow[unit];
    flow = find_flow(&held);
    if (flow <= work->flow[unit] * (1.0 + SAME))
        return work->flow[unit];
    return flow;
}

/* What is asked does not fall as flow grows: a head given at a smaller flow
 * that is over the one here is over what is asked there. */
static bool lies_under(const struct sl_network_work *work, size_t unit,
                       double here, double flow)
{
    double head = sl_curve_carried_on(&work->network->units[unit].head, flow);

    return head < here && head < sl_network_asked(work, unit, true, flow);
}

bool sl_network_crosses_twice(const struct sl_network_work *work, size_t unit)
{
    const struct sl_curve_view *curve = &work->network->units[unit].head;
    double end = work->flow[unit] * (1.0 - SAME);
    double here = sl_curve_carried_on(curve, work->flow[unit]);
    size_t piece;
    int step;

    for (piece = 0; piece + 1 < curve->count; piece++) {
        double width = curve->x[piece + 1] - curve->x[piece];
        int steps = curve->y[piece + 1] > curve->y[piece] ? SCAN_STEPS : 1;

        for (step = 0; step < steps; step++) {
            double flow = curve->x[piece] + width * step / steps;

            if (!(flow < end))
                return false;
            if (lies_under(work, unit, here, flow))
                return true;
        }
    }
    return false;
}
