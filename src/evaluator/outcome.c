/* What came of a running set for one of its pumps. */
#include <math.h>

#include "evaluator/joint.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/constants.h"
#include "hydraulics/npsh.h"

/* NaN where the input has no honest figure at its end, else 0. */
static double doubt(const struct sl_setting *setting, enum sl_input_id id)
{
    return sl_setting_value(setting, id) * 0;
}

static void balance(const struct sl_joint *joint,
                    const struct sl_setting *setting, double flow,
                    struct sl_outcome *outcome)
{
    const struct sl_plan *plan = setting->plan;
    double flows[SL_NETWORK_PIPES];
    struct sl_suction_loss suction;
    double air =
        sl_standard_atmosphere(sl_setting_value(setting, SL_IN_SITE_ELEVATION));
    struct sl_balance heads = {
        .air_pressure = air,
        .air_fall = air * sl_setting_value(setting, SL_IN_BAROMETER),
        .gauge_pressure = sl_setting_value(setting, SL_IN_SOURCE_PRESSURE),
        .surface = sl_setting_surface(setting),
        .datum = sl_setting_value(setting, SL_IN_DATUM),
        .gas = sl_setting_value(setting, SL_IN_GAS),
        .density = setting->liquid.density,
        .vapour_pressure = setting->liquid.vapour_pressure,
    };

    for (size_t i = 0; i < plan->path_count; i++)
        flows[i] = sl_joint_pipe_flow(joint, &plan->path[i], flow);
    suction = sl_suction_loss_at(setting, flows, flow);
    heads.friction = suction.friction;
    heads.minor = suction.minor;
    heads.velocity_head =
        sl_gauge_velocity_head(setting, plan->path_count ? flows[0] : flow);
    sl_npsha(&heads, &outcome->figures.terms);
    outcome->figures.terms.npsha +=
        doubt(setting, SL_IN_SOURCE_KIND) + doubt(setting, SL_IN_SPEED);
    outcome->flange_pressure =
        heads.gauge_pressure +
        (heads.surface - heads.datum + heads.velocity_head - suction.friction -
         suction.minor) *
            setting->liquid.density * SL_GRAVITY;
    if (plan->path_count)
        outcome->suction_velocity =
            sl_pipe_loss_at(setting, &plan->path[plan->path_count - 1],
                            flows[plan->path_count - 1])
                .velocity;
}

/* NPSHR at a flow; off the curve the flow is a guess, and NPSHR there none.
 * A value known at the rated point alone holds from there on as a bound from
 * below, and nowhere as one from above. */
static double npshr_at(const struct sl_setting *setting, double flow,
                       struct sl_outcome *outcome)
{
    const struct sl_plan *plan = setting->plan;
    enum sl_corner end = setting->ends->of[SL_IN_NPSHR];
    double npshr;

    if (outcome->position != SL_ON_CURVE)
        return NAN;
    if (end != SL_TYPICAL && plan->pump->curve &&
        plan->pump->curve->rejected_points)
        return NAN;
    if (sl_curve_usable(&plan->npshr)) {
        npshr = sl_curve_at(&plan->npshr, flow);
        if (isnan(npshr) && !isnan(flow))
            outcome->position =
                flow < plan->npshr.x[0] ? SL_BEFORE_START : SL_PAST_END;
        return npshr;
    }
    npshr = sl_setting_value(setting, SL_IN_NPSHR);
    if (end == SL_FAVOURABLE && !(flow >= plan->rated_flow))
        return NAN;
    return npshr;
}

static void apply_rules(const struct sl_setting *setting,
                        struct sl_outcome *outcome)
{
    const struct sl_plan *plan = setting->plan;
    const struct sl_tables *tables = plan->tables;
    struct sl_case *figures = &outcome->figures;
    enum sl_corner corner = setting->ends->of[SL_IN_RULE_MEASURE];

    for (size_t i = 0; i < tables->rule_count; i++)
        sl_rule_apply(&tables->rules[i], plan, corner, figures,
                      &outcome->required[i], &outcome->surplus[i]);
    sl_rule_apply(plan->rule, plan, corner, figures, &figures->required,
                  &figures->surplus);
}

struct sl_case sl_no_case(void)
{
    const struct sl_terms none = {NAN, NAN, NAN, NAN, NAN,
                                  NAN, NAN, NAN, NAN, NAN};

    return (struct sl_case){NAN, none, NAN, NAN, NAN, NAN};
}

static void note_end(const struct sl_unit_flow *unit,
                     struct sl_outcome *outcome)
{
    outcome->stands = unit->end == SL_UNIT_STANDS;
    outcome->two_crossings = unit->two_crossings;
    if (unit->end == SL_UNIT_PAST_END)
        outcome->position = SL_PAST_END;
    if (unit->end == SL_UNIT_BEFORE_START)
        outcome->position = SL_BEFORE_START;
}

void sl_joint_outcome_at(const struct sl_joint *joint, size_t class,
                         const struct sl_ends *ends, struct sl_outcome *outcome)
{
    const struct sl_plan *plan = joint->of.layout->classes[class].plan;
    struct sl_setting setting = {plan, ends, joint->of.liquid};
    const struct sl_unit_flow *unit = sl_joint_unit(joint, class);
    struct sl_case *figures = &outcome->figures;
    double flow = unit && unit->end != SL_UNIT_STANDS ? unit->flow : NAN;

    *outcome = (struct sl_outcome){.figures = sl_no_case(),
                                   .suction_velocity = NAN,
                                   .flange_pressure = NAN};
    if (joint->end == SL_NETWORK_BEYOND)
        outcome->position = SL_PAST_END;
    if (joint->overfull)
        outcome->solution = "more unlike pumps or pipes than can be solved at "
                            "once";
    else if (joint->end == SL_NETWORK_AT_JUMP ||
             joint->end == SL_NETWORK_BEYOND ||
             joint->end == SL_NETWORK_NOT_FOUND)
        outcome->solution = sl_network_end_name(joint->end);
    if (unit)
        note_end(unit, outcome);
    figures->flow = flow;
    if (plan->path_count <= SL_NETWORK_PIPES)
        balance(joint, &setting, flow, outcome);
    figures->npshr = unit || !joint->several
                         ? npshr_at(&setting, flow, outcome)
                         : NAN; /* of a set without a solution */
    figures->margin = figures->terms.npsha - figures->npshr;
    outcome->margin = figures->margin;
    apply_rules(&setting, outcome);
}

void sl_joint_outcome(const struct sl_joint *joint, size_t class,
                      struct sl_outcome *outcome)
{
    sl_joint_outcome_at(joint, class, &joint->of.ends, outcome);
}
