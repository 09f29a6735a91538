#include "evaluator/bound.h"

#include <math.h>

/* Steps of the first grid over a blend, and how often its step is halved
 * afterwards: to 2^-13 of the interval, with heads flat there. */
#define GRID 8
#define HALVINGS 10
/* Golden sections of an interval: to 0.618^18, 0.0002 of it. */
#define SECTIONS 18
#define GOLDEN 0.6180339887498949
/* Of the water's temperature, K: 0.4 mm of vapour pressure. */
#define WARMTH_STEP 0.02

struct search {
    const struct sl_bound_case *of;
    struct sl_outcome *best;
    bool any;
    struct sl_liquid liquid;
    double imposed;  /* flow of the pump; NaN: solved */
    bool stood, ran; /* in some case */
};

/* What the furthest is sought of: each rule of the tables, by its place, and
 * these. */
enum { BY_RANK = SL_RULES_MOST, BY_MARGIN, AIMS };

/* Whether one outcome lies further toward an end than another; the one
 * without a figure does, at either end. */
static bool further(enum sl_corner sense, const struct sl_case *tried,
                    const struct sl_case *kept)
{
    double a = tried->surplus, b = kept->surplus;

    if (isnan(a) && isnan(b)) { /* without an NPSHR, NPSHA still has ends */
        a = tried->terms.npsha;
        b = kept->terms.npsha;
    }
    if (isnan(a) || isnan(b))
        return isnan(a) && !isnan(b);
    return sense == SL_FAVOURABLE ? a > b : a < b;
}

static double toward(enum sl_corner sense, double a, double b)
{
    if (isnan(a) || isnan(b))
        return NAN;
    return sense == SL_FAVOURABLE ? fmax(a, b) : fmin(a, b);
}

/* The margin and each rule keep their own extremes, beside the outcome that
 * is furthest by the rule ranked on. */
static void fold_rules(const struct search *search,
                       const struct sl_outcome *kept, struct sl_outcome *into)
{
    size_t rules = search->of->layout->plans[0].tables->rule_count;

    into->margin = toward(search->of->sense, into->margin, kept->margin);
    for (size_t i = 0; i < rules; i++)
        into->surplus[i] =
            toward(search->of->sense, into->surplus[i], kept->surplus[i]);
}

/* A case in which the pump stands is not judged: it counts only where no
 * other is left. */
static void keep(struct search *search, struct sl_outcome *tried)
{
    if (search->any && tried->stands && !search->best->stands)
        return;
    if (!search->any || (search->best->stands && !tried->stands)) {
        *search->best = *tried;
        search->any = true;
        return;
    }
    if (further(search->of->sense, &tried->figures, &search->best->figures)) {
        fold_rules(search, search->best, tried);
        *search->best = *tried;
    } else {
        fold_rules(search, tried, search->best);
    }
}

/* Its figure to the searches: where it stands, never the furthest. */
static double aimed_at(const struct search *search,
                       const struct sl_outcome *outcome, int aim)
{
    if (outcome->stands)
        return search->of->sense == SL_FAVOURABLE ? -INFINITY : INFINITY;
    if (aim == BY_RANK)
        return outcome->figures.surplus;
    return aim == BY_MARGIN ? outcome->margin : outcome->surplus[aim];
}

static double weight_of(const struct search *search,
                        const struct sl_outcome *outcome)
{
    return aimed_at(search, outcome, BY_RANK);
}

/* One case; returns its surplus. */
static double attempt(struct search *search, const struct sl_ends *ends,
                      const double *given, struct sl_joint *joint)
{
    struct sl_joint_case one = {.layout = search->of->layout,
                                .counts = search->of->counts,
                                .focus = search->of->class,
                                .ends = *ends,
                                .liquid = search->liquid,
                                .given = given,
                                .imposed = search->imposed};
    struct sl_outcome outcome;

    sl_joint_solve(joint, &one);
    sl_joint_outcome(joint, search->of->class, &outcome);
    search->stood = search->stood || outcome.stands;
    search->ran = search->ran || !outcome.stands;
    keep(search, &outcome);
    return weight_of(search, &outcome);
}

/* Beside the pump looked at. */
static int beside(const struct sl_bound_case *of, size_t class)
{
    return of->counts[class] - (class == of->class);
}

static bool closed(const struct sl_interval *value)
{
    return value->adverse == value->favourable;
}

/* Whether a suction has figures at its adverse end, and whether it is the
 * same at both. */
static void look_at_suction(const struct sl_plan *plan, bool *bounded,
                            bool *exact)
{
    const struct sl_input *minor = &plan->inputs[SL_IN_SUCTION_MINOR];

    if (plan->unmeasured < SL_INPUT_COUNT) {
        *exact = *exact && closed(&plan->inputs[plan->unmeasured].value);
        *bounded =
            *bounded && !isnan(plan->inputs[plan->unmeasured].value.adverse);
    }
    if (plan->path_count == 0 && minor->applies)
        *exact = *exact && closed(&minor->value);
    for (size_t i = 0; i < plan->path_count; i++) {
        const struct sl_path_pipe *place = &plan->path[i];

        *exact = *exact && closed(&place->minor_k) &&
                 (place->hazen_williams || closed(&place->roughness));
        *bounded = *bounded && !isnan(place->minor_k.adverse) &&
                   (place->hazen_williams || !isnan(place->roughness.adverse));
    }
}

static void others_at(const struct search *search, const struct sl_joint *joint,
                      double *flows)
{
    for (size_t c = 0; c < search->of->layout->class_count; c++)
        if (beside(search->of, c))
            flows[c] = sl_joint_other_flow(joint, c);
}

/* Others at flows between their ends; `part` is 0 at the worst. */
static double between(struct search *search, const struct sl_ends *ends,
                      double part, struct sl_joint *joint)
{
    const struct sl_layout *layout = search->of->layout;

    for (size_t c = 0; c < layout->class_count; c++)
        layout->flows[c] =
            layout->worst_flows[c] +
            part * (layout->best_flows[c] - layout->worst_flows[c]);
    return attempt(search, ends, layout->flows, joint);
}

/* The furthest of a function that bends one way. */
static void section(struct search *search, const struct sl_ends *ends,
                    struct sl_joint *joint)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;
    double low = 0, high = 1;
    double left = high - GOLDEN, right = low + GOLDEN;
    double at_left = sign * between(search, ends, left, joint);
    double at_right = sign * between(search, ends, right, joint);

    for (int i = 0; i < SECTIONS; i++) {
        if (at_left > at_right) {
            high = right;
            right = left;
            at_right = at_left;
            left = high - GOLDEN * (high - low);
            at_left = sign * between(search, ends, left, joint);
        } else {
            low = left;
            left = right;
            at_left = at_right;
            right = low + GOLDEN * (high - low);
            at_right = sign * between(search, ends, right, joint);
        }
    }
}

/* The others' suctions: both ends, and the flows between.  Where they have
 * no adverse end they may draw nothing at all: for the worst that is the set
 * without them, which is tried too; for the best it bounds the flows. */
static void over_others(struct search *search, const struct sl_ends *ends,
                        struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_layout *layout = of->layout;
    const struct sl_plan *self = layout->classes[of->class].plan;
    struct sl_ends at = *ends;
    bool bounded = true, exact = true;
    bool middle;
    double worst = NAN, best;

    for (size_t c = 0; c < of->layout->class_count; c++)
        if (beside(of, c) > 0)
            look_at_suction(of->layout->classes[c].plan, &bounded, &exact);
    if (of->ends.others == SL_TYPICAL || exact) {
        attempt(search, &at, NULL, joint);
        return;
    }
    at.others = SL_FAVOURABLE;
    best = attempt(search, &at, NULL, joint);
    others_at(search, joint, layout->best_flows);
    at.others = SL_ADVERSE;
    for (size_t c = 0; c < of->layout->class_count; c++)
        layout->worst_flows[c] = 0;
    if (bounded) {
        worst = attempt(search, &at, NULL, joint);
        others_at(search, joint, layout->worst_flows);
    }
    at.others = SL_FAVOURABLE;
    if (of->sense == SL_FAVOURABLE) {
        section(search, &at, joint);
        return;
    }
    middle = bounded ? between(search, &at, 0.5, joint) < fmin(worst, best)
                     : !self->npshr_rises || !self->head_is_steep;
    if (middle)
        section(search, &at, joint);
}

static bool suction_open(const struct sl_plan *plan)
{
    static const enum sl_input_id source[] = {SL_IN_SOURCE_LEVEL,
                                              SL_IN_SOURCE_PRESSURE,
                                              SL_IN_SOURCE_PRESSURE_ELEVATION};
    bool bounded = true, exact = true;

    for (size_t i = 0; i < sizeof source / sizeof *source; i++)
        exact = exact && (!plan->inputs[source[i]].applies ||
                          closed(&plan->inputs[source[i]].value));
    look_at_suction(plan, &bounded, &exact);
    return !exact;
}

static bool discharge_open(const struct sl_plan *plan)
{
    const struct sl_delivery *delivery = &plan->delivery;

    if (plan->flow_basis != SL_FLOW_SOLVED)
        return false;
    if (!closed(&plan->inputs[SL_IN_DISCHARGE_LEVEL].value))
        return true;
    return isnan(delivery->loss_flow) &&
           !(closed(&delivery->roughness) && closed(&delivery->minor_k));
}

/* A place in the two blends. */
struct spot {
    double suction, discharge;
};

static void at_spot(struct search *search, const struct sl_ends *ends,
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
    over_others(search, &at, joint);
    search->best = all;
    search->any = any;
    copy = *here; /* to keep is to fold */
    keep(search, &copy);
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
static void refine(struct search *search, const struct sl_ends *ends, int aim,
                   struct spot spot, double reached, int moves,
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
            if (sign * aimed_at(search, &here, aim) > sign * reached) {
                reached = aimed_at(search, &here, aim);
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

static void note(const struct search *search, struct grid *grid,
                 struct spot spot, const struct sl_outcome *here)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;

    for (int aim = 0; aim < AIMS; aim++) {
        double tried = aimed_at(search, here, aim);

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

static void over_blends(struct search *search, const struct sl_ends *ends,
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
            if (isnan(weight_of(search, &here)))
                return; /* and so is the whole */
            note(search, &grid, spot, &here);
        }
    for (int aim = 0; aim < AIMS; aim++)
        if (is_new(&grid, aim, rules))
            refine(search, ends, aim, grid.spots[aim], grid.reached[aim],
                   discharge_steps ? 4 : 2, joint);
}

/* All but the temperature. */
static void at_temperature(struct search *search, double kelvin,
                           struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_plan *plan = of->layout->classes[of->class].plan;
    bool blend = of->sense != SL_TYPICAL && isnan(search->imposed) &&
                 !of->layout->classes[of->class].given;
    bool turns = !plan->npshr_rises;
    int suction = blend && (turns || !plan->head_is_steep) && suction_open(plan)
                      ? GRID
                      : 0;
    int discharge = blend && turns && discharge_open(plan) ? GRID : 0;

    search->liquid = sl_liquid_at(plan->salinity, kelvin);
    if (suction || discharge)
        over_blends(search, &of->ends, suction, discharge, joint);
    else
        over_others(search, &of->ends, joint);
}

/* Warm water boils sooner, cold water loses more: the surplus bends down on
 * both sides, so the best may lie between. */
static void between_temperatures(struct search *search, int aim, double low,
                                 double high, struct sl_joint *joint)
{
    for (int i = 0; i < SECTIONS && high - low > WARMTH_STEP; i++) {
        double left = high - GOLDEN * (high - low);
        double right = low + GOLDEN * (high - low);
        struct sl_outcome *all = search->best, at_left, at_right;

        search->best = &at_left;
        search->any = false;
        at_temperature(search, left, joint);
        search->best = &at_right;
        search->any = false;
        at_temperature(search, right, joint);
        search->best = all;
        search->any = true;
        if (aimed_at(search, &at_left, aim) > aimed_at(search, &at_right, aim))
            high = right;
        else
            low = left;
        keep(search, &at_left); /* to keep is to fold */
        keep(search, &at_right);
    }
}

static void over_temperatures(struct search *search,
                              const struct sl_interval *warmth,
                              struct sl_joint *joint)
{
    double coldest = fmin(warmth->adverse, warmth->favourable);
    double warmest = fmax(warmth->adverse, warmth->favourable);
    int rules = (int)search->of->layout->plans[0].tables->rule_count;
    struct grid cold;

    at_temperature(search, coldest, joint);
    clear(&cold);
    note(search, &cold, (struct spot){0, 0}, search->best);
    at_temperature(search, warmest, joint);
    at_temperature(search, warmth->typical, joint);
    if (isnan(warmth->adverse) || isnan(warmth->favourable)) {
        at_temperature(search, NAN, joint);
        return;
    }
    if (search->of->sense != SL_FAVOURABLE)
        return;
    /* Most often the coldest is the best, and a little warmer is worse. */
    at_temperature(search, coldest + WARMTH_STEP, joint);
    for (int aim = 0; aim < AIMS; aim++)
        if (is_new(&cold, aim, rules) &&
            aimed_at(search, search->best, aim) > cold.reached[aim])
            between_temperatures(search, aim, coldest, warmest, joint);
}

static void over_all(struct search *search, struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_interval *warmth =
        &of->layout->classes[of->class].plan->inputs[SL_IN_TEMPERATURE].value;
    enum sl_corner end = of->ends.of[SL_IN_TEMPERATURE];

    if (!isnan(of->ends.temperature))
        at_temperature(search, of->ends.temperature, joint);
    else if (end == SL_TYPICAL || closed(warmth))
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

void sl_bound(const struct sl_bound_case *of, struct sl_outcome *outcome)
{
    struct search search = {.of = of, .best = outcome, .imposed = NAN};
    struct sl_joint joint;

    over_all(&search, &joint);
    /* Somewhere between, it just runs. */
    if (of->sense == SL_TYPICAL || !search.stood || !search.ran)
        return;
    search.imposed = least_flow(of->layout->classes[of->class].plan);
    over_all(&search, &joint);
}
