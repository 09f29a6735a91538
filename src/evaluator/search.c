#include "evaluator/search.h"

#include <math.h>

/* Of the interval: how near to an end it is looked which way a function
 * goes from there. */
#define NEAR_END 0.002

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
static void fold_rules(const struct sl_search *search,
                       const struct sl_outcome *kept, struct sl_outcome *into)
{
    size_t rules = search->of->layout->plans[0].tables->rule_count;

    into->margin = toward(search->of->sense, into->margin, kept->margin);
    for (size_t i = 0; i < rules; i++)
        into->surplus[i] =
            toward(search->of->sense, into->surplus[i], kept->surplus[i]);
}

void sl_search_keep(struct sl_search *search, struct sl_outcome *tried)
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

double sl_search_aimed(const struct sl_search *search,
                       const struct sl_outcome *outcome, int aim)
{
    if (outcome->stands)
        return search->of->sense == SL_FAVOURABLE ? -INFINITY : INFINITY;
    if (aim == BY_RANK)
        return outcome->figures.surplus;
    return aim == BY_MARGIN ? outcome->margin : outcome->surplus[aim];
}

static double weight_of(const struct sl_search *search,
                        const struct sl_outcome *outcome)
{
    return sl_search_aimed(search, outcome, BY_RANK);
}

/* One case; returns its surplus. */
static double attempt(struct sl_search *search, const struct sl_ends *ends,
                      const double *given, struct sl_joint *joint)
{
    struct sl_joint_case one = {.layout = search->of->layout,
                                .counts = search->of->counts,
                                .focus = search->of->class,
                                .ends = *ends,
                                .liquid = search->liquid,
                                .given = given,
                                .imposed = search->imposed,
                                .start = search->start};
    struct sl_outcome outcome;

    sl_joint_solve(joint, &one);
    /* The next case lies near by. */
    sl_joint_flows(joint, search->of->layout->start);
    search->start = search->of->layout->start;
    sl_joint_outcome(joint, search->of->class, &outcome);
    search->stood = search->stood || outcome.stands;
    search->ran = search->ran || !outcome.stands;
    sl_search_keep(search, &outcome);
    return weight_of(search, &outcome);
}

/* Beside the pump looked at. */
static int beside(const struct sl_bound_case *of, size_t class)
{
    return of->counts[class] - (class == of->class);
}

bool sl_search_closed(const struct sl_interval *value)
{
    return value->adverse == value->favourable;
}

void sl_search_suction(const struct sl_plan *plan, bool *bounded, bool *exact)
{
    const struct sl_input *minor = &plan->inputs[SL_IN_SUCTION_MINOR];

    if (plan->unmeasured < SL_INPUT_COUNT) {
        *exact =
            *exact && sl_search_closed(&plan->inputs[plan->unmeasured].value);
        *bounded =
            *bounded && !isnan(plan->inputs[plan->unmeasured].value.adverse);
    }
    if (plan->path_count == 0 && minor->applies)
        *exact = *exact && sl_search_closed(&minor->value);
    for (size_t i = 0; i < plan->path_count; i++) {
        const struct sl_path_pipe *place = &plan->path[i];

        *exact = *exact && sl_search_closed(&place->minor_k) &&
                 (place->hazen_williams || sl_search_closed(&place->roughness));
        *bounded = *bounded && !isnan(place->minor_k.adverse) &&
                   (place->hazen_williams || !isnan(place->roughness.adverse));
    }
}

static void others_at(const struct sl_search *search,
                      const struct sl_joint *joint, double *flows)
{
    for (size_t c = 0; c < search->of->layout->class_count; c++)
        if (beside(search->of, c))
            flows[c] = sl_joint_other_flow(joint, c);
}

/* Others at flows between their ends; `part` is 0 at the worst. */
static double between(struct sl_search *search, const struct sl_ends *ends,
                      double part, struct sl_joint *joint)
{
    const struct sl_layout *layout = search->of->layout;

    for (size_t c = 0; c < layout->class_count; c++)
        layout->flows[c] =
            layout->worst_flows[c] +
            part * (layout->best_flows[c] - layout->worst_flows[c]);
    return attempt(search, ends, layout->flows, joint);
}

/* Whether a little way in from its further end a function is no further, and
 * half way neither: one that bends one way then is nowhere. */
static bool furthest_at_end(struct sl_search *search,
                            const struct sl_ends *ends, double worst,
                            double best, struct sl_joint *joint)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;
    bool at_best = sign * best >= sign * worst;
    double near_end =
        between(search, ends, at_best ? 1 - NEAR_END : NEAR_END, joint);

    if (sign * near_end > sign * (at_best ? best : worst))
        return false;
    /* Should it bend more than once, the middle tells most of the rest. */
    return sign * between(search, ends, 0.5, joint) <=
           sign * (at_best ? best : worst);
}

/* The furthest of a function that bends one way. */
static void section(struct sl_search *search, const struct sl_ends *ends,
                    struct sl_joint *joint)
{
    double sign = search->of->sense == SL_FAVOURABLE ? 1 : -1;
    double low = 0, high = 1;
    double left = high - SL_SEARCH_GOLDEN, right = low + SL_SEARCH_GOLDEN;
    double at_left = sign * between(search, ends, left, joint);
    double at_right = sign * between(search, ends, right, joint);

    for (int i = 0; i < SL_SEARCH_SECTIONS; i++) {
        if (at_left > at_right) {
            high = right;
            right = left;
            at_right = at_left;
            left = high - SL_SEARCH_GOLDEN * (high - low);
            at_left = sign * between(search, ends, left, joint);
        } else {
            low = left;
            left = right;
            at_left = at_right;
            right = low + SL_SEARCH_GOLDEN * (high - low);
            at_right = sign * between(search, ends, right, joint);
        }
    }
}

/* Whether a pump beside it draws through a pipe of its way. */
static bool shares(const struct sl_bound_case *of)
{
    const struct sl_layout *layout = of->layout;

    for (size_t c = 0; c < layout->class_count; c++)
        if (beside(of, c) > 0 &&
            sl_classes_share(&layout->classes[c], &layout->classes[of->class]))
            return true;
    return false;
}

void sl_search_others(struct sl_search *search, const struct sl_ends *ends,
                      struct sl_joint *joint)
{
    const struct sl_bound_case *of = search->of;
    const struct sl_layout *layout = of->layout;
    const struct sl_plan *self = layout->classes[of->class].plan;
    struct sl_ends at = *ends;
    bool bounded = true, exact = true;
    double worst = NAN, best;

    for (size_t c = 0; c < of->layout->class_count; c++)
        if (beside(of, c) > 0)
            sl_search_suction(of->layout->classes[c].plan, &bounded, &exact);
    if (of->ends.others == SL_TYPICAL || exact) {
        attempt(search, &at, NULL, joint);
        return;
    }
    if (self->npshr_rises && !shares(of)) {
        /* The less they draw, the further out this one runs: at worst they
         * draw nothing. */
        for (size_t c = 0; c < layout->class_count; c++)
            layout->flows[c] = 0;
        at.others =
            of->sense == SL_ADVERSE && bounded ? SL_ADVERSE : SL_FAVOURABLE;
        attempt(search, &at,
                of->sense == SL_ADVERSE && !bounded ? layout->flows : NULL,
                joint);
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
    if (bounded ? !furthest_at_end(search, &at, worst, best, joint)
                : of->sense == SL_FAVOURABLE || !self->npshr_rises ||
                      !self->head_is_steep)
        section(search, &at, joint);
}
