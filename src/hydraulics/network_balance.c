/* What follows from the flows of a network: losses, heads and slopes. */
#include <float.h>
#include <math.h>

#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/network_parts.h"

/* Where heads are made continuous, the share of the flow at the end of
 * laminar flow over which they step up: small enough that no flow shows it,
 * large enough that slopes there leave digits for the others'. */
#define RAMP 1e-9
/* Flow of Re 2300 is told from the next double by more than this. */
#define ROUNDING (8.0 * DBL_EPSILON)

struct bore {
    double length, bore, roughness, c, minor_k;
};

static struct bore bore_of(const struct sl_network_pipe *pipe)
{
    return (struct bore){pipe->length, pipe->bore, pipe->roughness,
                         pipe->hazen_williams_c, pipe->minor_k};
}

static struct bore bore_of_delivery(const struct sl_network *network)
{
    return (struct bore){network->length, network->bore, network->roughness,
                         NAN, network->minor_k};
}

/* The flow at which laminar flow ends; NaN where the pipe has no such. */
static double jump_flow(const struct bore *pipe, double viscosity)
{
    if (!isnan(pipe->c) || pipe->length == 0.0)
        return NAN;
    return SL_LAMINAR_BELOW * viscosity /
           (pipe->bore * sl_pipe_velocity(1.0, pipe->bore)); /* F23 */
}

static struct sl_loss darcy(const struct bore *pipe, double viscosity,
                            double flow)
{
    return sl_darcy_loss(flow, pipe->length, pipe->bore, pipe->roughness,
                         viscosity);
}

static struct sl_loss friction(const struct bore *pipe, double viscosity,
                               bool ramps, double flow)
{
    struct sl_loss below, above;
    double jump, width, slope;

    if (pipe->length == 0.0)
        return (struct sl_loss){0.0, 0.0};
    if (!isnan(pipe->c))
        return sl_hazen_williams_loss(flow, pipe->c, pipe->length, pipe->bore);
    jump = ramps ? jump_flow(pipe, viscosity) : NAN;
    width = jump * RAMP;
    if (!(flow > jump - width && flow < jump + width))
        return darcy(pipe, viscosity, flow);
    below = darcy(pipe, viscosity, jump - width);
    above = darcy(pipe, viscosity, jump + width);
    slope = (above.head - below.head) / (2.0 * width);
    return (struct sl_loss){below.head + slope * (flow - (jump - width)),
                            slope};
}

/* Multiples of V²/2g. */
static struct sl_loss minor(double k, double bore, double flow)
{
    double head = sl_minor_head(k, sl_pipe_velocity(flow, bore));

    return (struct sl_loss){head, flow > 0.0 ? 2.0 * head / flow : 0.0};
}

static struct sl_loss pipe_loss(const struct bore *pipe, double viscosity,
                                bool ramps, double flow)
{
    struct sl_loss loss = friction(pipe, viscosity, ramps, flow);
    struct sl_loss fittings = minor(pipe->minor_k, pipe->bore, flow);

    return (struct sl_loss){loss.head + fittings.head,
                            loss.slope + fittings.slope};
}

static struct sl_loss delivery_loss(const struct sl_network_work *work,
                                    double flow)
{
    const struct sl_network *network = work->network;
    struct bore pipe = bore_of_delivery(network);
    double part = flow / network->loss_flow;

    if (isnan(network->loss_flow))
        return pipe_loss(&pipe, network->viscosity, work->ramps, flow);
    if (!(network->loss_flow > 0.0) || !(network->loss_head >= 0.0))
        return (struct sl_loss){NAN, NAN};
    return (struct sl_loss){network->loss_head * part * part, /* F21 */
                            2.0 * network->loss_head * part /
                                network->loss_flow};
}

/* What a gauge on the first pipe does not show (F12). */
static struct sl_loss gauge_help(const struct sl_network *network, size_t pipe,
                                 double flow)
{
    if (!network->gauge_on_pipe || network->pipes[pipe].draws_from >= 0)
        return (struct sl_loss){0.0, 0.0};
    return minor(1.0, network->pipes[pipe].bore, flow);
}

static void load_pipes(struct sl_network_work *work)
{
    const struct sl_network *network = work->network;
    size_t i;
    int pipe;

    for (i = 0; i < work->used_count; i++)
        work->pipe_flow[work->used[i]] = 0.0;
    work->total = 0.0;
    for (i = 0; i < network->unit_count; i++) {
        const struct sl_network_unit *unit = &network->units[i];
        double all = unit->count * work->flow[i];

        work->total += all;
        for (pipe = unit->pipe; pipe >= 0;
             pipe = network->pipes[pipe].draws_from)
            work->pipe_flow[pipe] +=
                network->pipes[pipe].own ? work->flow[i] : all;
    }
}

static bool weigh_pipes(struct sl_network_work *work)
{
    const struct sl_network *network = work->network;
    size_t i;

    for (i = 0; i < work->used_count; i++) {
        size_t pipe = work->used[i];
        double flow = work->pipe_flow[pipe];
        struct bore bore = bore_of(&network->pipes[pipe]);
        struct sl_loss loss =
            pipe_loss(&bore, network->viscosity, work->ramps, flow);
        struct sl_loss help = gauge_help(network, pipe, flow);

        work->pipe_loss[pipe] = loss.head;
        work->pipe_asks[pipe] = loss.head - help.head;
        work->pipe_slope[pipe] = loss.slope - help.slope;
        if (!isfinite(work->pipe_asks[pipe]))
            return false;
    }
    return true;
}

/* F12, for each sought unit. */
static bool weigh_units(struct sl_network_work *work)
{
    const struct sl_network *network = work->network;
    size_t i;
    int pipe;

    work->largest_head = fabs(network->static_head);
    for (i = 0; i < work->sought_count; i++) {
        size_t at = work->sought[i];
        const struct sl_network_unit *unit = &network->units[at];
        double asked = network->static_head + work->delivery_loss;
        double head = sl_curve_carried_on_and_slope(&unit->head, work->flow[at],
                                                    &work->head_slope[at]);

        for (pipe = unit->pipe; pipe >= 0;
             pipe = network->pipes[pipe].draws_from)
            asked += work->pipe_asks[pipe];
        work->lack[at] = asked + unit->fixed_loss - head; /* F12 */
        work->largest_head = fmax(work->largest_head, fabs(head));
        if (!isfinite(work->lack[at]))
            return false;
    }
    return true;
}

bool sl_network_weigh(struct sl_network_work *work)
{
    struct sl_loss delivery;

    load_pipes(work);
    if (!weigh_pipes(work))
        return false;
    if (work->sought_count == 0)
        return true;
    delivery = delivery_loss(work, work->total);
    work->delivery_loss = delivery.head;
    work->delivery_slope = delivery.slope;
    return weigh_units(work);
}

double sl_network_asked(const struct sl_network_work *work, size_t unit,
                        bool alone, double flow)
{
    const struct sl_network *network = work->network;
    double more = flow - work->flow[unit];
    double all = alone ? more : more * network->units[unit].count;
    double asked = network->static_head + network->units[unit].fixed_loss +
                   delivery_loss(work, fmax(0.0, work->total + all)).head;
    int pipe;

    for (pipe = network->units[unit].pipe; pipe >= 0;
         pipe = network->pipes[pipe].draws_from) {
        struct bore bore = bore_of(&network->pipes[pipe]);
        double through = network->pipes[pipe].own
                             ? flow
                             : fmax(0.0, work->pipe_flow[pipe] + all);

        asked +=
            pipe_loss(&bore, network->viscosity, work->ramps, through).head -
            gauge_help(network, (size_t)pipe, through).head;
    }
    return asked;
}

static bool near_jump(const struct bore *pipe, double viscosity, double flow)
{
    double jump = jump_flow(pipe, viscosity);

    return fabs(flow - jump) <= (RAMP + ROUNDING) * jump;
}

bool sl_network_at_jump(const struct sl_network_work *work)
{
    const struct sl_network *network = work->network;
    struct bore delivery = bore_of_delivery(network);
    size_t i;

    for (i = 0; i < work->used_count; i++) {
        struct bore bore = bore_of(&network->pipes[work->used[i]]);

        if (near_jump(&bore, network->viscosity,
                      work->pipe_flow[work->used[i]]))
            return true;
    }
    return isnan(network->loss_flow) &&
           near_jump(&delivery, network->viscosity, work->total);
}
