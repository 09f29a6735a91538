/* What the margin rules ask for. */
#include <math.h>

#include "evaluator/joint.h"
#include "hydraulics/constants.h"
#include "hydraulics/npsh.h"

bool sl_rule_applies(const struct sl_margin_rule *rule,
                     const struct sl_plan *plan)
{
    return rule->make_up == 0 || rule->make_up == plan->pump->record.make_up;
}

/* Of cold fresh water, kg/m³: a tier is not to change with the warmth. */
#define LIFT_DENSITY 1000.0

/* Gauge head of the source at an end, 0 of an open one, m. */
static double gauge_head(const struct sl_plan *plan, enum sl_corner corner)
{
    const struct sl_input *pressure = &plan->inputs[SL_IN_SOURCE_PRESSURE];

    return pressure->applies ? sl_interval_at(&pressure->value, corner) /
                                   (LIFT_DENSITY * SL_GRAVITY)
                             : 0;
}

double sl_rule_measure(const struct sl_margin_rule *rule,
                       const struct sl_plan *plan, enum sl_corner corner,
                       const struct sl_case *figures)
{
    switch (rule->measure) {
    case SL_MEASURE_SUCTION_ENERGY:
        return plan->suction_energy;
    case SL_MEASURE_SUCTION_SPECIFIC_SPEED:
        return plan->suction_specific_speed;
    case SL_MEASURE_SUCTION_LIFT:
        /* On a main there is no surface to lift from. */
        return plan->source_kind == SL_MAIN
                   ? 0
                   : 0 - figures->terms.elevation - gauge_head(plan, corner);
    case SL_MEASURE_NONE:
        break;
    }
    return 0;
}

static double asked_by(const struct sl_margin_tier *tier, double npshr)
{
    return sl_required_npsha(npshr, tier->ratio, tier->floor);
}

/* The tier of a measure; of an unknown one the strictest at the adverse end,
 * the mildest at the favourable one, and none that is likely. */
static double required_by_tier(const struct sl_margin_rule *rule,
                               double measure, enum sl_corner corner,
                               double npshr)
{
    double required = asked_by(&rule->tiers[0], npshr);

    if (isnan(measure) && corner == SL_TYPICAL)
        return NAN;
    for (size_t i = 1; i < rule->tier_count; i++) {
        double asked = asked_by(&rule->tiers[i], npshr);

        if (measure > rule->tiers[i].over)
            required = asked;
        if (isnan(measure))
            required = corner == SL_ADVERSE ? fmax(required, asked)
                                            : fmin(required, asked);
    }
    return required;
}

void sl_rule_apply(const struct sl_margin_rule *rule,
                   const struct sl_plan *plan, enum sl_corner corner,
                   const struct sl_case *figures, double *required,
                   double *surplus)
{
    const struct sl_terms *terms = &figures->terms;
    /* Gauge pressure over the source lifts as well as height does. */
    double lift = 0 - terms->elevation - terms->gauge - terms->velocity -
                  terms->friction - terms->minor;

    *required = figures->npshr; /* a rule that is not about it asks nothing */
    if (sl_rule_applies(rule, plan) && rule->tier_count)
        *required =
            required_by_tier(rule, sl_rule_measure(rule, plan, corner, figures),
                             corner, figures->npshr);
    *surplus = terms->npsha - *required;
    if (!sl_rule_applies(rule, plan) || isnan(rule->lift_limit))
        return;
    /* Suction lift, its losses and NPSHR together within the limit. */
    *surplus = isnan(*surplus)
                   ? NAN
                   : fmin(*surplus, rule->lift_limit - lift - figures->npshr);
    *required = terms->npsha - *surplus;
}
