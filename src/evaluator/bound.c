#include "evaluator/bound.h"

#include <math.h>

#include "evaluator/search.h"

/* Steps of the first grid over a blend, and how often its step is halved
 * afterwards: to 2^-13 of the interval, with heads flat there. */
#define GRID 8
#define HALVINGS 10
/* Of the water's temperature, K: 0.4 mm of vapour pressure. */
#define WARMTH_STEP 0.02

static bool suction_open(const struct sl_plan *plan)
{
    static const enum sl_input_id source[] = {SL_IN_SOURCE_LEVEL,
                                              SL_IN_SOURCE_PRESSURE,
                                              SL_IN_SOURCE_PRESSURE_ELEVATION};
    bool bounded = true, exact = true;

    for (size_t i = 0; i < sizeof source / sizeof *source; i++)
        exact = exact && (!plan->inputs[source[i]].applies ||
                          sl_search_closed(&plan->inputs[source[i]].value));
    sl_search_suction(plan, &bounded, &exact);
    return !exact;
}

static bool discharge_open(const struct sl_plan *plan)
{
    const struct sl_delivery *delivery = &plan->delivery;

    if (plan->flow_basis != SL_FLOW_SOLVED)
        return false;
    if (!sl_search_closed(&plan->inputs[SL_IN_DISCHARGE_LEVEL].value))
        return true;
    return isnan(delivery->loss_flow) &&
           !(sl_search_closed(&delivery->roughness) &&
             sl_search_closed(&delivery->minor_k));
}

/* A place in the two blends. */
struct spot {
    double suction, discharge;
};

static void at_spot(struct sl_search *search, const struct sl_ends *ends,
                    struct spot spot, struct sl_joint *joint,
                    struct sl_outcome *here)
{
    struct sl_ends at = *ends;
    struct sl_outcome *all = search->best, copy;
    bool any = search->any;

    at.suction_blend = spot.suction;
    at.discharge_blend = spot.discharge;
    search->best = here;
    search->any = false;
    sl_search_others(search, &at, joint);
    search->best = all;
    search->any = any;
    copy = *here; /* to keep is to fold */
    sl_search_keep(search, &copy);
}

static double within(double blend)
{
    return fmin(fmax(blend, 0), 1);
}

static struct spot moved(struct spot from, int move, double step)
{
    static const int moves[][2] = {{1, 0}, {-1, 0}, {0, 1}, {0, -1}};

    return (struct spot){within(from.suction + moves[move][0] * step),
                         within(from.discharge + moves[move][1] * step)};
}

/* From the best of the grid, ever smaller steps; along the discharge only
 * where that is searched. */
static void refine(struct sl_search *search, const struct sl_ends *ends,
                   int aim, struct spot spot, double reached, int moves,
                   struct sl_joint *joint)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;
    double step = 1.0 / (2 * GRID);

    for (int i = 0; i < HALVINGS; i++, step /= 2)
        for (int move = 0; move < moves; move++) {
            struct spot next = moved(spot, move, step);
            struct sl_outcome here;

            if (next.suction == spot.suction &&
                next.discharge == spot.discharge)
                continue;
            at_spot(search, ends, next, joint, &here);
            if (sign * sl_search_aimed(search, &here, aim) > sign * reached) {
                reached = sl_search_aimed(search, &here, aim);
                spot = next;
            }
        }
}

/* The furthest of the grid by each aim. */
struct grid {
    struct spot spots[AIMS];
    double reached[AIMS];
};

static void clear(struct grid *grid)
{
    for (int aim = 0; aim < AIMS; aim++)
        grid->reached[aim] = NAN;
}

static void note(const struct sl_search *search, struct grid *grid,
                 struct spot spot, const struct sl_outcome *here)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;

    for (int aim = 0; aim < AIMS; aim++) {
        double tried = sl_search_aimed(search, here, aim);

        if (isnan(grid->reached[aim]) ||
            sign * tried > sign * grid->reached[aim]) {
            grid->reached[aim] = tried;
            grid->spots[aim] = spot;
        }
    }
}

/* A rule that asks what another aim before it does is that aim. */
static bool is_new(const struct grid *grid, int aim, int rules)
{
    for (int other = 0; other < AIMS; other++)
        if ((other < rules ? other < aim : other >= BY_RANK && other != aim) &&
            aim < rules && grid->reached[other] == grid->reached[aim])
            return false;
    return !isnan(grid->reached[aim]) && (aim < rules || aim >= BY_RANK);
}

static void over_blends(struct sl_search *search, const struct sl_ends *ends,
                        int suction_steps, int discharge_steps,
                        struct sl_joint *joint)
{
    int rules = (int)search->of->layout->plans[0].tables->rule_count;
    struct grid grid;

    clear(&grid);
    for (int s = 0; s <= suction_steps; s++)
        for (int d = 0; d <= discharge_steps; d++) {
            struct spot spot = {suction_steps ? (double)s / suction_steps : 0,
                                discharge_steps ? (double)d / discharge_steps
                                                : 0};
            struct sl_outcome here;

            at_spot(search, ends, spot, joint, &here);
            if (isnan(sl_search_aimed(search, &here, BY_RANK)))
                return; /* and so is the whole */
            note(search, &grid, spot, &here);
        }
    for (int aim = 0; aim < AIMS; aim++)
        if (is_new(&grid, aim, rules))
            refine(search, ends, aim, grid.spots[aim], grid.reached[aim],
                   discharge_steps ? 4 : 2, joint);
}

static bool searches_suction(const struct sl_bound_case *of)
{
    const struct sl_class *class = &of->layout->classes[of->class];

    return !class->given && !class->plan->head_is_steep &&
           suction_open(class->plan);
}

static bool searches_discharge(const struct sl_bound_case *of)
{
    const struct sl_class *class = &of->layout->classes[of->class];

    return !class->given && !class->plan->npshr_rises &&
           discharge_open(class->plan);
}

bool sl_bound_searches(const struct sl_bound_case *of)
{
    return searches_suction(of) || searches_discharge(of);
}

/* All but the temperature. */
static void at_temperature(struct sl_search *search, double kelvin,
                           struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_plan *plan = of->layout->classes[of->class].plan;
    bool blend = of->sense != SL_TYPICAL && isnan(search->imposed);
    int suction = blend && searches_suction(of) ? GRID : 0;
    int discharge = blend && searches_discharge(of) ? GRID : 0;

    search->liquid = sl_liquid_at(plan->salinity, kelvin);
    if (suction || discharge)
        over_blends(search, &of->ends, suction, discharge, joint);
    else
        sl_search_others(search, &of->ends, joint);
}

/* Warm water boils sooner, cold water loses more: the surplus bends down on
 * both sides, so the best may lie between. */
static void between_temperatures(struct sl_search *search, int aim, double low,
                                 double high, struct sl_joint *joint)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;

    for (int i = 0; i < SL_SEARCH_SECTIONS && high - low > WARMTH_STEP; i++) {
        double left = high - SL_SEARCH_GOLDEN * (high - low);
        double right = low + SL_SEARCH_GOLDEN * (high - low);
        struct sl_outcome *all = search->best, at_left, at_right;

        search->best = &at_left;
        search->any = false;
        at_temperature(search, left, joint);
        search->best = &at_right;
        search->any = false;
        at_temperature(search, right, joint);
        search->best = all;
        search->any = true;
        if (sign * sl_search_aimed(search, &at_left, aim) >
            sign * sl_search_aimed(search, &at_right, aim))
            high = right;
        else
            low = left;
        sl_search_keep(search, &at_left); /* to keep is to fold */
        sl_search_keep(search, &at_right);
    }
}

/* A limit on the lift does not count the vapour pressure: what is left of it
 * need not bend down. */
static bool limits_lift(const struct sl_bound_case *of)
{
    const struct sl_plan *plan = of->layout->classes[of->class].plan;

    for (size_t i = 0; i < plan->tables->rule_count; i++)
        if (!isnan(plan->tables->rules[i].lift_limit) &&
            sl_rule_applies(&plan->tables->rules[i], plan))
            return true;
    return false;
}

static void over_temperatures(struct sl_search *search,
                              const struct sl_interval *warmth,
                              struct sl_joint *joint)
{
    double coldest = fmin(warmth->adverse, warmth->favourable);
    double warmest = fmax(warmth->adverse, warmth->favourable);
    int rules = (int)search->of->layout->plans[0].tables->rule_count;
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;
    struct grid cold;

    at_temperature(search, coldest, joint);
    clear(&cold);
    note(search, &cold, (struct spot){0, 0}, search->best);
    at_temperature(search, warmest, joint);
    if (isnan(warmth->adverse) || isnan(warmth->favourable)) {
        at_temperature(search, NAN, joint);
        return;
    }
    if (search->of->sense != SL_FAVOURABLE && !limits_lift(search->of))
        return; /* it bends down: the worst is at an end */
    at_temperature(search, warmth->typical, joint);
    /* Most often the coldest is the best, and a little warmer is worse. */
    at_temperature(search, coldest + WARMTH_STEP, joint);
    for (int aim = 0; aim < AIMS; aim++)
        if (is_new(&cold, aim, rules) &&
            sign * sl_search_aimed(search, search->best, aim) >
                sign * cold.reached[aim])
            between_temperatures(search, aim, coldest, warmest, joint);
}

static void over_all(struct sl_search *search, struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_interval *warmth =
        &of->layout->classes[of->class].plan->inputs[SL_IN_TEMPERATURE].value;
    enum sl_corner end = of->ends.of[SL_IN_TEMPERATURE];

    if (!isnan(of->ends.temperature))
        at_temperature(search, of->ends.temperature, joint);
    else if (end == SL_TYPICAL || sl_search_closed(warmth))
        at_temperature(search, sl_interval_at(warmth, end), joint);
    else
        over_temperatures(search, warmth, joint);
}

/* The least flow at which the pump has figures. */
static double least_flow(const struct sl_plan *plan)
{
    double least = plan->head.count ? plan->head.x[0] : 0;

    return plan->npshr.count ? fmax(least, plan->npshr.x[0]) : least;
}

/* Whether anything that the set's flows depend on is an unknown. */
static bool flows_open(const struct sl_bound_case *of)
{
    const struct sl_layout *layout = of->layout;
    const struct sl_plan *self = layout->classes[of->class].plan;

    if (layout->classes[of->class].given || discharge_open(self) ||
        !sl_search_closed(&self->inputs[SL_IN_TEMPERATURE].value))
        return true;
    for (size_t c = 0; c < layout->class_count; c++)
        if (of->counts[c] && (layout->classes[c].unsure ||
                              suction_open(layout->classes[c].plan)))
            return true;
    return false;
}

void sl_bound(const struct sl_bound_case *of, struct sl_outcome *outcome)
{
    struct sl_search search = {
        .of = of, .best = outcome, .imposed = NAN, .start = of->start};
    struct sl_joint joint;

    if (of->typical && !flows_open(of)) {
        sl_joint_outcome_at(of->typical, of->class, &of->ends, outcome);
        return;
    }
    over_all(&search, &joint);
    /* Somewhere between, it just runs. */
    if (of->sense == SL_TYPICAL || !search.stood || !search.ran)
        return;
    search.imposed = least_flow(of->layout->classes[of->class].plan);
    over_all(&search, &joint);
}