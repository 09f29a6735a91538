/* The parts of the solver of hydraulics/network.h: for its own files, and
 * for tests of one part alone. */
#ifndef SL_HYDRAULICS_NETWORK_PARTS_H
#define SL_HYDRAULICS_NETWORK_PARTS_H

#include <stdint.h>

#include "hydraulics/network.h"

/* Heads of a balance that are nearer than this are equal [m]; what is
 * reached is mostly 1e-14. */
#define SL_NETWORK_HEAD_TOLERANCE 1e-9

/* A network in work: flows, and all that follows from them. */
struct sl_network_work {
    const struct sl_network *network;
    size_t sought[SL_NETWORK_UNITS]; /* the units whose flow is sought */
    size_t sought_count;
    double most[SL_NETWORK_UNITS]; /* the reach of each sought one [m³/s] */
    /* The flow from which on its curve falls; NaN: it falls throughout. */
    double falls_from[SL_NETWORK_UNITS];

    size_t used[SL_NETWORK_PIPES]; /* the pipes on the way of some unit */
    size_t used_count;
    uint64_t fed[SL_NETWORK_PIPES]; /* the units on whose way each lies */

    /* Where laminar flow ends, spread the step of head over a sliver of
     * flow, so that heads are continuous. */
    bool ramps;

    double flow[SL_NETWORK_UNITS]; /* of one pump: what all below is at */

    double pipe_flow[SL_NETWORK_PIPES];
    double pipe_loss[SL_NETWORK_PIPES];  /* friction and fittings */
    double pipe_asks[SL_NETWORK_PIPES];  /* the same less V²/2g at a gauge */
    double pipe_slope[SL_NETWORK_PIPES]; /* of what it asks, over its flow */
    double total, delivery_loss, delivery_slope;

    /* Of sought units: the head asked of it at a flow over nought less the
     * head it gives, and the slope of what it gives. */
    double lack[SL_NETWORK_UNITS];
    double head_slope[SL_NETWORK_UNITS];
    double largest_head; /* the scale of rounding */
};

/* Checks the network, and sets all of `work` up to `ramps`, which is off.
 * SOLVED, BAD_INPUT or, where a flow or loss given is no number, NO_FIGURE. */
enum sl_network_end sl_network_prepare(const struct sl_network *network,
                                       struct sl_network_work *work);

/* Whether its curve rises somewhere. */
bool sl_network_rises(const struct sl_network_work *work, size_t unit);

/* The flows to start from: those given, else those of `start` where it has
 * a possible one, else one on each curve. */
void sl_network_begin(struct sl_network_work *work, const double *start);

/* All that follows from the flows; false when some of it is not a number. */
bool sl_network_weigh(struct sl_network_work *work);

/* What is asked of one unit when its pumps, or one of them, run at another
 * flow and all else stands as last weighed. */
double sl_network_asked(const struct sl_network_work *work, size_t unit,
                        bool alone, double flow);

/* Whether laminar flow ends about here, in some pipe. */
bool sl_network_at_jump(const struct sl_network_work *work);

/* Whether the unit is kept where it is: by its check valve, or at the reach
 * of its curve. */
bool sl_network_kept(const struct sl_network_work *work, size_t unit);

/* The largest lack of a unit that is not kept [m]. */
double sl_network_worst(const struct sl_network_work *work);

/* Those that are not kept. */
struct sl_free_units {
    size_t unit[SL_NETWORK_UNITS];
    size_t count;
};

/* Newton's step of the flows of free units, bent to stay between nought and
 * their reach.
 * in   near_root  the step to the root as it is, be it no least point of the
 *      potential, as where curves rise
 * out  step [m³/s], one each in the order of `freed`
 * The potential's slope along it: under 0, or, unless near a root, there is
 * no way on. */
double sl_network_step(const struct sl_network_work *work,
                       const struct sl_free_units *freed, bool near_root,
                       double *step);

/* The flow held between nought and the reach of the unit. */
double sl_network_within(const struct sl_network_work *work, size_t unit,
                         double flow);

/* Slope of the potential along a step: each lack times its unit's count
 * times its step, summed. */
double sl_network_along(const struct sl_network_work *work,
                        const struct sl_free_units *freed, const double *step);

enum sl_network_search {
    SL_SEARCH_SETTLED,  /* within the tolerance, and no better to be had */
    SL_SEARCH_STALLED,  /* stopped short of it */
    SL_SEARCH_NO_FIGURE /* not a number where the search led */
};

/* Newton's method on all flows at once, from flows that are weighed; they
 * are weighed at the end too, unless there is no figure. */
enum sl_network_search sl_network_newton(struct sl_network_work *work,
                                         int weighings);

/* Unit after unit, each by sl_operating_point_find with the others held,
 * round and round, `most` times at the most.  For curves that do not rise it
 * gets there from everywhere, if slowly (with `ramps`; without, or with one
 * unit, it may stop at a jump). */
enum sl_network_search sl_network_sweep(struct sl_network_work *work, int most);

/* The larger flow at which one pump's head falls through the system's, all
 * others held, or its own flow where there is none larger.  NaN: no figure. */
double sl_network_larger(struct sl_network_work *work, size_t unit);

/* sl_unit_flow's two_crossings. */
bool sl_network_crosses_twice(const struct sl_network_work *work, size_t unit);

/* sl_network_solve by sl_network_sweep alone. */
enum sl_network_end sl_network_solve_by_sweeps(const struct sl_network *network,
                                               struct sl_unit_flow *flows);

#endif
