/* A network checked, and where the search for its flows starts. */
#include <math.h>

#include "hydraulics/network_parts.h"

/* Where on a curve that does not rise the search starts, as a share of its
 * last flow. */
#define START_SHARE 0.6

static double falls_from(const struct sl_curve_view *curve)
{
    size_t last = curve->count - 1, i = last;

    while (i > 0 && curve->y[i] <= curve->y[i - 1])
        i--;
    if (i == 0)
        return NAN;
    return i < last ? curve->x[i] : INFINITY;
}

bool sl_network_rises(const struct sl_network_work *work, size_t unit)
{
    return !isnan(work->falls_from[unit]);
}

static bool prepare_pipes(const struct sl_network *network,
                          struct sl_network_work *work)
{
    size_t i;

    for (i = 0; i < network->pipe_count; i++) {
        int from = network->pipes[i].draws_from;

        if (from < -1 || from >= (int)i)
            return false;
        work->fed[i] = 0;
    }
    return true;
}

static bool prepare_unit(const struct sl_network *network, size_t i,
                         struct sl_network_work *work)
{
    const struct sl_network_unit *unit = &network->units[i];
    int pipe;

    if (unit->count < 1 || unit->pipe < -1 ||
        unit->pipe >= (int)network->pipe_count)
        return false;
    for (pipe = unit->pipe; pipe >= 0; pipe = network->pipes[pipe].draws_from)
        work->fed[pipe] |= (uint64_t)1 << i;
    if (!isnan(unit->given_flow))
        return true;
    if (!sl_curve_usable(&unit->head) || unit->head.x[0] < 0.0)
        return false;
    work->sought[work->sought_count++] = i;
    work->most[i] = SL_NETWORK_REACH * unit->head.x[unit->head.count - 1];
    work->falls_from[i] = falls_from(&unit->head);
    return true;
}

/* An own pipe has one unit, and feeds no pipe that several pumps share. */
static bool own_pipe_fits(const struct sl_network *network, size_t i,
                          uint64_t fed)
{
    const struct sl_network_pipe *pipe = &network->pipes[i];
    size_t unit = 0;

    if (pipe->own)
        return (fed & (fed - 1)) == 0;
    if (pipe->draws_from < 0 || !network->pipes[pipe->draws_from].own)
        return true;
    while (!(fed >> unit & 1))
        unit++;
    return network->units[unit].count == 1;
}

static bool known(const struct sl_network *network)
{
    size_t i;

    for (i = 0; i < network->unit_count; i++) {
        const struct sl_network_unit *unit = &network->units[i];

        if (!(unit->fixed_loss >= 0.0 && isfinite(unit->fixed_loss)))
            return false;
        if (!isnan(unit->given_flow) &&
            !(unit->given_flow >= 0.0 && isfinite(unit->given_flow)))
            return false;
    }
    return true;
}

enum sl_network_end sl_network_prepare(const struct sl_network *network,
                                       struct sl_network_work *work)
{
    size_t i;

    work->network = network;
    work->ramps = false;
    work->used_count = work->sought_count = 0;
    if (network->unit_count > SL_NETWORK_UNITS ||
        network->pipe_count > SL_NETWORK_PIPES || !prepare_pipes(network, work))
        return SL_NETWORK_BAD_INPUT;
    for (i = 0; i < network->unit_count; i++)
        if (!prepare_unit(network, i, work))
            return SL_NETWORK_BAD_INPUT;
    for (i = 0; i < network->pipe_count; i++) {
        if (work->fed[i] == 0)
            continue;
        if (!own_pipe_fits(network, i, work->fed[i]))
            return SL_NETWORK_BAD_INPUT;
        work->used[work->used_count++] = i;
    }
    return known(network) ? SL_NETWORK_SOLVED : SL_NETWORK_NO_FIGURE;
}

static bool some_rises(const struct sl_network_work *work)
{
    size_t i;

    for (i = 0; i < work->sought_count; i++)
        if (sl_network_rises(work, work->sought[i]))
            return true;
    return false;
}

void sl_network_begin(struct sl_network_work *work, const double *start)
{
    const struct sl_network *network = work->network;
    bool guessed = start != NULL && !some_rises(work);
    size_t i;

    for (i = 0; i < network->unit_count; i++)
        work->flow[i] = network->units[i].given_flow;
    for (i = 0; i < work->sought_count; i++) {
        size_t unit = work->sought[i];
        double last = work->most[unit] / SL_NETWORK_REACH;

        /* Down from the end of a curve that rises, for the larger root. */
        work->flow[unit] =
            sl_network_rises(work, unit) ? last : last * START_SHARE;
        if (guessed && start[unit] > 0.0 && start[unit] <= last)
            work->flow[unit] = start[unit];
    }
}
