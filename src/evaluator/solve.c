#include "evaluator/solve.h"

#include <math.h>

#include "evaluator/losses.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/constants.h"
#include "hydraulics/npsh.h"
#include "hydraulics/operating_point.h"
#include "hydraulics/water.h"

/* Flows are solved to this, m³/s: far below what any head shows. */
#define FLOW_TOLERANCE 1e-13

struct sl_ends sl_ends_all(enum sl_corner corner)
{
    struct sl_ends ends;

    for (int i = 0; i < SL_INPUT_COUNT; i++)
        ends.of[i] = corner;
    return ends;
}

/* NaN where the input has no honest figure at its end, else 0. */
static double doubt(const struct sl_setting *setting, enum sl_input_id id)
{
    return sl_setting_value(setting, id) * 0;
}

/* The head one pump alone must give at this flow (F12 for a set of one). */
static double system_head(void *context, double flow)
{
    const struct sl_setting *setting = context;
    struct sl_suction_loss suction = sl_suction_loss_at(setting, flow);

    return sl_setting_value(setting, SL_IN_DISCHARGE_LEVEL) -
           setting->source_head - sl_gauge_velocity_head(setting, flow) +
           sl_discharge_loss_at(setting, flow) + suction.friction +
           suction.minor;
}

static const enum sl_input_id suction_losses[] = {
    SL_IN_SUCTION_PIPING, SL_IN_SUCTION_LENGTH, SL_IN_SUCTION_BORE,
    SL_IN_SUCTION_ROUGHNESS, SL_IN_SUCTION_MINOR};

#define SUCTION_LOSSES (sizeof suction_losses / sizeof *suction_losses)

/* The ends at which the flow is sought.  Loss on the suction side lessens
 * NPSHA, but the flow too and with it NPSHR, which tells where the head curve
 * is flat; so a loss counts at one end in the balance and at the other in the
 * flow, where it has both, and the two together bound every case between.
 * Other pumps never count in the flow: it is that of running alone. */
static struct sl_ends flow_ends(const struct sl_plan *plan,
                                const struct sl_ends *ends)
{
    struct sl_ends sought = *ends;

    for (size_t i = 0; i < SUCTION_LOSSES; i++) {
        enum sl_input_id id = suction_losses[i];

        if (ends->of[id] == SL_ADVERSE)
            sought.of[id] = SL_FAVOURABLE;
        else if (ends->of[id] == SL_FAVOURABLE &&
                 !isnan(plan->inputs[id].value.adverse))
            sought.of[id] = SL_ADVERSE;
    }
    sought.of[SL_IN_RUNNING_TOGETHER] = SL_FAVOURABLE;
    return sought;
}

/* At the adverse end no less than the largest flow on record: what the pump
 * has run at, it may run at again. */
static double at_least_recorded(const struct sl_setting *setting, double flow)
{
    const struct sl_number *largest =
        &setting->plan->pump->record.largest_recorded_flow;

    if (setting->ends->of[SL_IN_FLOW] != SL_ADVERSE || !largest->known)
        return flow;
    return flow < largest->value ? largest->value : flow;
}

static double flow_of(const struct sl_setting *setting,
                      struct sl_case_notes *notes)
{
    const struct sl_plan *plan = setting->plan;
    struct sl_ends ends = flow_ends(plan, setting->ends);
    struct sl_setting seeking = *setting;
    struct sl_system system = {system_head, &seeking};
    struct sl_operating_point point;

    if (plan->flow_basis != SL_FLOW_SOLVED)
        return sl_setting_value(setting, SL_IN_FLOW);
    seeking.ends = &ends;
    switch (
        sl_operating_point_find(&plan->head, &system, FLOW_TOLERANCE, &point)) {
    case SL_OPERATING_FOUND:
        return at_least_recorded(setting, point.flow);
    case SL_OPERATING_PAST_END:
    case SL_OPERATING_BEFORE_START:
        notes->off_curve = true;
        return point.flow;
    case SL_OPERATING_STANDS:
        notes->stands = true;
        return NAN;
    case SL_OPERATING_NOT_FOUND:
        notes->off_curve = true;
        return NAN;
    default:
        return NAN;
    }
}

/* NPSHR at a flow; off the curve the flow is a guess, and NPSHR there none.
 * A value known at the rated point alone holds from there on as a bound from
 * below, and nowhere as one from above. */
static double npshr_at(const struct sl_setting *setting, double flow,
                       struct sl_case_notes *notes)
{
    const struct sl_plan *plan = setting->plan;
    double npshr;

    if (notes->off_curve)
        return NAN;
    if (setting->ends->of[SL_IN_NPSHR] != SL_TYPICAL && plan->pump->curve &&
        plan->pump->curve->rejected_points)
        return NAN;
    if (sl_curve_usable(&plan->npshr)) {
        npshr = sl_curve_at(&plan->npshr, flow);
        notes->off_curve = isnan(npshr) && !isnan(flow);
        return npshr;
    }
    npshr = sl_setting_value(setting, SL_IN_NPSHR);
    if (setting->ends->of[SL_IN_NPSHR] == SL_FAVOURABLE &&
        !(flow >= plan->rated_flow))
        return NAN;
    return npshr;
}

static struct sl_setting setting_of(const struct sl_plan *plan,
                                    const struct sl_ends *ends,
                                    double temperature)
{
    struct sl_setting setting = {.plan = plan, .ends = ends};
    double salinity = plan->salinity;

    if (salinity == 0) {
        setting.density = sl_water_density(temperature);
        setting.vapour_pressure = sl_vapour_pressure(temperature);
    } else {
        setting.density = sl_seawater_density(temperature, salinity);
        setting.vapour_pressure =
            sl_seawater_vapour_pressure(temperature, salinity);
    }
    setting.viscosity = sl_water_viscosity(temperature) / setting.density;
    setting.source_head =
        sl_setting_value(&setting, plan->source_kind == SL_MAIN
                                       ? SL_IN_SOURCE_PRESSURE_ELEVATION
                                       : SL_IN_SOURCE_LEVEL) +
        sl_setting_value(&setting, SL_IN_SOURCE_PRESSURE) /
            (setting.density * SL_GRAVITY);
    return setting;
}

static void balance(const struct sl_setting *setting, double flow,
                    struct sl_terms *terms)
{
    const struct sl_plan *plan = setting->plan;
    struct sl_suction_loss suction = sl_suction_loss_at(setting, flow);
    double air =
        sl_standard_atmosphere(sl_setting_value(setting, SL_IN_SITE_ELEVATION));
    struct sl_balance heads = {
        .air_pressure = air,
        .air_fall = air * sl_setting_value(setting, SL_IN_BAROMETER),
        .gauge_pressure = sl_setting_value(setting, SL_IN_SOURCE_PRESSURE),
        .surface =
            sl_setting_value(setting, plan->source_kind == SL_MAIN
                                          ? SL_IN_SOURCE_PRESSURE_ELEVATION
                                          : SL_IN_SOURCE_LEVEL),
        .datum = sl_setting_value(setting, SL_IN_DATUM),
        .velocity_head = sl_gauge_velocity_head(setting, flow),
        .friction = suction.friction,
        .minor = suction.minor,
        .gas = sl_setting_value(setting, SL_IN_GAS),
        .density = setting->density,
        .vapour_pressure = setting->vapour_pressure,
    };

    sl_npsha(&heads, terms);
    terms->npsha +=
        doubt(setting, SL_IN_SOURCE_KIND) + doubt(setting, SL_IN_SPEED);
}

static void solve_at(const struct sl_plan *plan, const struct sl_ends *ends,
                     double temperature, struct sl_case *solved,
                     struct sl_case_notes *notes)
{
    struct sl_setting setting = setting_of(plan, ends, temperature);

    *notes = (struct sl_case_notes){0};
    solved->flow = flow_of(&setting, notes);
    balance(&setting, solved->flow, &solved->terms);
    solved->npshr = npshr_at(&setting, solved->flow, notes);
    solved->required = sl_required_npsha(
        solved->npshr, plan->rule->tiers[0].ratio, plan->rule->tiers[0].floor);
    solved->margin = solved->terms.npsha - solved->npshr;
    solved->surplus = solved->terms.npsha - solved->required;
}

/* Whether one surplus lies further toward an end than another; the one
 * without a figure does, at either end. */
static bool further(enum sl_corner end, const struct sl_case *tried,
                    const struct sl_case *kept)
{
    double a = tried->surplus, b = kept->surplus;

    if (isnan(a) && isnan(b)) { /* without an NPSHR, NPSHA still has ends */
        a = tried->terms.npsha;
        b = kept->terms.npsha;
    }
    if (isnan(a) || isnan(b))
        return isnan(a);
    return end == SL_ADVERSE ? a < b : a > b;
}

void sl_solve_case(const struct sl_plan *plan, const struct sl_ends *ends,
                   struct sl_case *solved, struct sl_case_notes *notes)
{
    const struct sl_interval *warmth = &plan->inputs[SL_IN_TEMPERATURE].value;
    enum sl_corner end = ends->of[SL_IN_TEMPERATURE];

    solve_at(plan, ends, sl_interval_at(warmth, end), solved, notes);
    if (end == SL_TYPICAL || warmth->adverse == warmth->favourable)
        return;
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
        struct sl_case tried;
        struct sl_case_notes tried_notes;

        if (corner == (int)end)
            continue;
        solve_at(plan, ends, sl_interval_at(warmth, (enum sl_corner)corner),
                 &tried, &tried_notes);
        if (further(end, &tried, solved)) {
            *solved = tried;
            *notes = tried_notes;
        }
    }
}

/* A curve that lacks a point, or of which the speed it was tested at is not
 * known, tells where the pump may run, not where it runs at most. */
static bool curve_bounds_flow(const struct sl_plan *plan)
{
    const struct sl_input *speed = &plan->inputs[SL_IN_SPEED];

    if (plan->pump->curve && plan->pump->curve->rejected_points)
        return false;
    return !(speed->applies && isnan(speed->value.adverse));
}

double sl_solve_most_flow(const struct sl_plan *plan)
{
    struct sl_ends ends = sl_ends_all(SL_FAVOURABLE);
    struct sl_case solved;
    struct sl_case_notes notes;

    if (!curve_bounds_flow(plan))
        return NAN;
    for (size_t i = 0; i < SUCTION_LOSSES; i++)
        ends.of[suction_losses[i]] = SL_ADVERSE; /* least in the flow */
    ends.of[SL_IN_DISCHARGE_LEVEL] = SL_ADVERSE;
    ends.of[SL_IN_DISCHARGE_LOSS] = SL_ADVERSE;
    ends.of[SL_IN_FLOW] = SL_ADVERSE;
    /* All pumps of a station draw from one source: a higher one than known
     * would help this pump more than it lets the others take. */
    ends.of[SL_IN_SOURCE_LEVEL] = SL_TYPICAL;
    ends.of[SL_IN_SOURCE_PRESSURE] = SL_TYPICAL;
    solve_at(plan, &ends, plan->inputs[SL_IN_TEMPERATURE].value.adverse,
             &solved, &notes);
    return notes.stands ? 0 : solved.flow;
}

struct sl_interval sl_solve_discharge_loss(const struct sl_plan *plan,
                                           double flow)
{
    double loss[SL_CORNER_COUNT];

    for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
        struct sl_ends ends = sl_ends_all((enum sl_corner)corner);
        struct sl_setting setting = setting_of(
            plan, &ends, plan->inputs[SL_IN_TEMPERATURE].value.typical);

        loss[corner] = sl_discharge_loss_at(&setting, flow);
    }
    return (struct sl_interval){loss[SL_TYPICAL], loss[SL_ADVERSE],
                                loss[SL_FAVOURABLE]};
}

void sl_solve_losses(const struct sl_plan *plan, double flow,
                     struct sl_pipe_loss *losses)
{
    struct sl_ends ends = sl_ends_all(SL_TYPICAL);
    struct sl_setting setting =
        setting_of(plan, &ends, plan->inputs[SL_IN_TEMPERATURE].value.typical);

    for (size_t i = 0; i < plan->path_count; i++)
        losses[i] = sl_pipe_loss_at(&setting, &plan->path[i], flow);
}
