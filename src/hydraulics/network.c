#include "hydraulics/network.h"

#include <math.h>

#include "hydraulics/network_parts.h"

/* Weighings given to Newton's method: a few are taken, and those it takes
 * in vain at a jump are dear. */
#define WEIGHINGS_FIRST 40
#define WEIGHINGS_RAMPED 300
/* Times that rising curves are looked over again. */
#define ROUNDS_MOST 16
/* Sweeps that let the others settle beside one that was moved, and those
 * after which sweeping is given up. */
#define SWEEPS_TO_SETTLE 30
#define SWEEPS_MOST 3000
/* A flow that is this share of a curve's reach is nought or rounding, and
 * one that is this near to a curve's end is at it. */
#define ROUNDING_SHARE 1e-14

const char *sl_network_end_name(enum sl_network_end end)
{
    switch (end) {
    case SL_NETWORK_SOLVED:
        return "solved";
    case SL_NETWORK_AT_JUMP:
        return "found where laminar flow ends";
    case SL_NETWORK_BEYOND:
        return "a curve does not fall to the system's head";
    case SL_NETWORK_NOT_FOUND:
        return "the search was given up";
    case SL_NETWORK_BAD_INPUT:
        return "a curve, an index or a count is not usable";
    case SL_NETWORK_NO_FIGURE:
        return "a head is not a number";
    }
    return "unknown end";
}

/* Newton's method; where it stalls, with heads made continuous; where that
 * stalls too, sweeps, and Newton's method from where they end. */
static enum sl_network_search balance(struct sl_network_work *work)
{
    enum sl_network_search ended = sl_network_newton(work, WEIGHINGS_FIRST);

    if (ended != SL_SEARCH_STALLED)
        return ended;
    if (work->sought_count == 1)
        return sl_network_sweep(work, SWEEPS_MOST);
    work->ramps = true;
    if (!sl_network_weigh(work))
        return SL_SEARCH_NO_FIGURE;
    ended = sl_network_newton(work, WEIGHINGS_RAMPED);
    if (ended != SL_SEARCH_STALLED)
        return ended;
    ended = sl_network_sweep(work, SWEEPS_MOST);
    if (ended == SL_SEARCH_NO_FIGURE)
        return ended;
    return sl_network_newton(work, WEIGHINGS_RAMPED);
}

/* Moves each unit whose curve rises to its larger flow, all at once, so
 * that their order does not count.  Whether one moved; NaN flows where there
 * is no figure, which weighing tells. */
static bool move_to_larger(struct sl_network_work *work)
{
    double larger[SL_NETWORK_UNITS];
    bool moved = false;
    size_t i;

    for (i = 0; i < work->sought_count; i++) {
        size_t unit = work->sought[i];

        larger[i] = sl_network_rises(work, unit) ? sl_network_larger(work, unit)
                                                 : work->flow[unit];
    }
    for (i = 0; i < work->sought_count; i++) {
        moved = moved || larger[i] != work->flow[work->sought[i]];
        work->flow[work->sought[i]] = larger[i];
    }
    return moved;
}

/* Balances after units were moved to a larger flow.  Newton's step may take
 * them off it again, where it is narrow; so, at the second time, the others
 * make room first. */
static enum sl_network_search balance_from_there(struct sl_network_work *work,
                                                 int round)
{
    if (!sl_network_weigh(work) ||
        (round > 0 &&
         sl_network_sweep(work, SWEEPS_TO_SETTLE) == SL_SEARCH_NO_FIGURE))
        return SL_SEARCH_NO_FIGURE;
    return balance(work);
}

/* A set of one, and not where its curve falls: F20's own search says what
 * is to be taken for a crossing there. */
static bool is_one_short_of_fall(const struct sl_network_work *work)
{
    size_t unit = work->sought[0];

    return work->sought_count == 1 && work->network->units[unit].count == 1 &&
           work->flow[unit] < work->falls_from[unit];
}

/* Balances until no unit has a larger flow to run at.  Two pumps that each
 * can run only where the other does not have no such balance; then the one
 * of the largest total met stands. */
static enum sl_network_search balance_at_larger(struct sl_network_work *work)
{
    double most[SL_NETWORK_UNITS], total = -1.0;
    enum sl_network_search ended = balance(work);
    size_t i;
    int round;

    if (ended != SL_SEARCH_NO_FIGURE && is_one_short_of_fall(work))
        return sl_network_sweep(work, 1);
    for (round = 0; round < ROUNDS_MOST && ended == SL_SEARCH_SETTLED;
         round++) {
        if (work->total > total) {
            total = work->total;
            for (i = 0; i < work->network->unit_count; i++)
                most[i] = work->flow[i];
        }
        if (!move_to_larger(work))
            return ended;
        ended = balance_from_there(work, round);
    }
    if (ended == SL_SEARCH_NO_FIGURE || total < 0.0)
        return ended;
    for (i = 0; i < work->network->unit_count; i++)
        work->flow[i] = most[i];
    return sl_network_weigh(work) ? balance(work) : SL_SEARCH_NO_FIGURE;
}

/* A flow within rounding of nought is a pump that stands, if it then does
 * not open its check valve; one within rounding of an end is at it. */
static bool round_flows(struct sl_network_work *work)
{
    size_t i;

    for (i = 0; i < work->sought_count; i++) {
        size_t unit = work->sought[i];
        const struct sl_curve_view *curve = &work->network->units[unit].head;
        double last = curve->x[curve->count - 1], first = curve->x[0];
        double flow = work->flow[unit], rounded = flow;

        if (fabs(flow - last) <= ROUNDING_SHARE * last)
            rounded = last;
        else if (fabs(flow - first) <= ROUNDING_SHARE * last)
            rounded = first;
        if (flow <= ROUNDING_SHARE * last)
            rounded = 0.0;
        if (rounded == flow)
            continue;
        work->flow[unit] = rounded;
        if (!sl_network_weigh(work))
            return false;
        if (rounded == 0.0 && work->lack[unit] < -SL_NETWORK_HEAD_TOLERANCE) {
            work->flow[unit] = flow;
            if (!sl_network_weigh(work))
                return false;
        }
    }
    return true;
}

static bool beyond(const struct sl_network_work *work)
{
    size_t i;

    for (i = 0; i < work->sought_count; i++) {
        size_t unit = work->sought[i];

        if (work->flow[unit] == work->most[unit] &&
            work->lack[unit] < -SL_NETWORK_HEAD_TOLERANCE)
            return true;
    }
    return false;
}

static enum sl_unit_end end_of(const struct sl_network_unit *unit, double flow)
{
    if (!isnan(unit->given_flow))
        return SL_UNIT_RUNS;
    if (flow == 0.0)
        return SL_UNIT_STANDS;
    if (flow < unit->head.x[0])
        return SL_UNIT_BEFORE_START;
    if (flow > unit->head.x[unit->head.count - 1])
        return SL_UNIT_PAST_END;
    return SL_UNIT_RUNS;
}

static void report(const struct sl_network_work *work, size_t i,
                   struct sl_unit_flow *flow)
{
    const struct sl_network_unit *unit = &work->network->units[i];
    bool sought = isnan(unit->given_flow);
    int pipe;

    flow->flow = work->flow[i];
    flow->end = end_of(unit, flow->flow);
    flow->two_crossings = sought && flow->flow > 0.0 &&
                          sl_network_rises(work, i) &&
                          sl_network_crosses_twice(work, i);
    flow->suction_loss = flow->flow > 0.0 ? unit->fixed_loss : 0.0;
    for (pipe = unit->pipe; pipe >= 0;
         pipe = work->network->pipes[pipe].draws_from)
        flow->suction_loss += work->pipe_loss[pipe];
    flow->residual = sought && flow->flow > 0.0 ? -work->lack[i] : 0.0;
}

/* How a search that did not fail ended, with flows weighed as they are. */
static enum sl_network_end judge(struct sl_network_work *work)
{
    bool ramped = work->ramps;

    work->ramps = false;
    if ((ramped && !sl_network_weigh(work)) || !round_flows(work))
        return SL_NETWORK_NO_FIGURE;
    if (beyond(work))
        return SL_NETWORK_BEYOND;
    if (sl_network_worst(work) < SL_NETWORK_HEAD_TOLERANCE)
        return SL_NETWORK_SOLVED;
    return sl_network_at_jump(work) ? SL_NETWORK_AT_JUMP : SL_NETWORK_NOT_FOUND;
}

static enum sl_network_end
solve(const struct sl_network *network, const double *start,
      enum sl_network_search (*search)(struct sl_network_work *),
      struct sl_unit_flow *flows)
{
    struct sl_network_work work;
    enum sl_network_end end = sl_network_prepare(network, &work);
    size_t i;

    if (end != SL_NETWORK_SOLVED)
        return end;
    sl_network_begin(&work, start);
    if (!sl_network_weigh(&work) ||
        (work.sought_count > 0 && search(&work) == SL_SEARCH_NO_FIGURE))
        return SL_NETWORK_NO_FIGURE;
    end = judge(&work);
    if (end == SL_NETWORK_SOLVED || end == SL_NETWORK_AT_JUMP)
        for (i = 0; i < network->unit_count; i++)
            report(&work, i, &flows[i]);
    return end;
}

enum sl_network_end sl_network_solve(const struct sl_network *network,
                                     const double *start,
                                     struct sl_unit_flow *flows)
{
    return solve(network, start, balance_at_larger, flows);
}

static enum sl_network_search sweep_ramped(struct sl_network_work *work)
{
    work->ramps = work->sought_count > 1;
    if (!sl_network_weigh(work))
        return SL_SEARCH_NO_FIGURE;
    return sl_network_sweep(work, SWEEPS_MOST);
}

enum sl_network_end sl_network_solve_by_sweeps(const struct sl_network *network,
                                               struct sl_unit_flow *flows)
{
    return solve(network, NULL, sweep_ramped, flows);
}
