#include "evaluator/losses.h"

#include <math.h>

#include "hydraulics/constants.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/water.h"

struct sl_ends sl_ends_all(enum sl_corner corner)
{
    struct sl_ends ends = {.others = corner, .temperature = NAN};

    for (int i = 0; i < SL_INPUT_COUNT; i++)
        ends.of[i] = corner;
    return ends;
}

double sl_interval_at(const struct sl_interval *interval, enum sl_corner end)
{
    switch (end) {
    case SL_ADVERSE:
        return interval->adverse;
    case SL_FAVOURABLE:
        return interval->favourable;
    default:
        return interval->typical;
    }
}

static double blend_of(const struct sl_setting *setting, enum sl_input_id id)
{
    switch (id) {
    case SL_IN_SOURCE_LEVEL:
    case SL_IN_SOURCE_PRESSURE:
    case SL_IN_SOURCE_PRESSURE_ELEVATION:
    case SL_IN_SUCTION_PIPING:
    case SL_IN_SUCTION_LENGTH:
    case SL_IN_SUCTION_BORE:
    case SL_IN_SUCTION_ROUGHNESS:
    case SL_IN_SUCTION_MINOR:
        return setting->ends->suction_blend;
    case SL_IN_DISCHARGE_LEVEL:
    case SL_IN_DISCHARGE_LOSS:
        return setting->ends->discharge_blend;
    default:
        return 0;
    }
}

double sl_setting_blend(const struct sl_setting *setting, enum sl_input_id id,
                        const struct sl_interval *interval)
{
    enum sl_corner end = setting->ends->of[id];
    double value = sl_interval_at(interval, end);
    double blend = blend_of(setting, id);

    if (blend == 0 || end == SL_TYPICAL)
        return value;
    return value +
           blend * (sl_interval_at(interval, end == SL_ADVERSE ? SL_FAVOURABLE
                                                               : SL_ADVERSE) -
                    value);
}

double sl_setting_value(const struct sl_setting *setting, enum sl_input_id id)
{
    const struct sl_input *input = &setting->plan->inputs[id];

    return input->applies ? sl_setting_blend(setting, id, &input->value) : 0;
}

double sl_setting_surface(const struct sl_setting *setting)
{
    return sl_setting_value(setting, setting->plan->source_kind == SL_MAIN
                                         ? SL_IN_SOURCE_PRESSURE_ELEVATION
                                         : SL_IN_SOURCE_LEVEL) +
           setting->ends->level_shift;
}

double sl_setting_source_head(const struct sl_setting *setting)
{
    /* Of what kind it is not known, nor is its pressure. */
    double doubt = sl_setting_value(setting, SL_IN_SOURCE_KIND) * 0;

    return sl_setting_surface(setting) +
           sl_setting_value(setting, SL_IN_SOURCE_PRESSURE) /
               (setting->liquid.density * SL_GRAVITY) +
           doubt;
}

struct sl_liquid sl_liquid_at(double salinity, double kelvin)
{
    struct sl_liquid liquid;

    if (salinity == 0) {
        liquid.density = sl_water_density(kelvin);
        liquid.vapour_pressure = sl_vapour_pressure(kelvin);
    } else {
        liquid.density = sl_seawater_density(kelvin, salinity);
        liquid.vapour_pressure = sl_seawater_vapour_pressure(kelvin, salinity);
    }
    liquid.viscosity = sl_water_viscosity(kelvin) / liquid.density;
    return liquid;
}

struct sl_pipe_loss sl_pipe_loss_at(const struct sl_setting *setting,
                                    const struct sl_path_pipe *place,
                                    double flow)
{
    const struct sl_pipe *pipe = &place->pipe->record;
    struct sl_pipe_loss loss = {.pipe = place->pipe, .factor = NAN};
    double bore = pipe->bore.value;

    loss.velocity = loss.reynolds = loss.friction = loss.minor = NAN;
    loss.roughness =
        sl_setting_blend(setting, SL_IN_SUCTION_ROUGHNESS, &place->roughness);
    loss.minor_k =
        sl_setting_blend(setting, SL_IN_SUCTION_MINOR, &place->minor_k);
    loss.flow = flow;
    if (!pipe->bore.known)
        return loss;
    loss.velocity = sl_pipe_velocity(loss.flow, bore);
    loss.reynolds = sl_reynolds(loss.velocity, bore, setting->liquid.viscosity);
    loss.minor = sl_minor_head(loss.minor_k, loss.velocity);
    if (!pipe->length.known)
        return loss;
    if (place->hazen_williams) {
        loss.friction = sl_hazen_williams_head(
            loss.flow, pipe->hazen_williams_c.value, pipe->length.value, bore);
        return loss;
    }
    /* At rest there is no factor, and no loss either. */
    loss.factor = sl_friction_factor(loss.reynolds, loss.roughness / bore);
    loss.friction =
        sl_darcy_head(loss.factor, pipe->length.value, bore, loss.velocity);
    return loss;
}

double sl_inlet_loss_at(const struct sl_setting *setting, double flow)
{
    const struct sl_plan *plan = setting->plan;
    double amount = sl_setting_value(setting, SL_IN_SUCTION_MINOR);

    if (isnan(plan->inlet_diameter))
        return amount;
    return sl_minor_head(amount, sl_pipe_velocity(flow, plan->inlet_diameter));
}

struct sl_suction_loss sl_suction_loss_at(const struct sl_setting *setting,
                                          const double *flows, double flow)
{
    const struct sl_plan *plan = setting->plan;
    struct sl_suction_loss sum = {0};

    for (size_t i = 0; i < plan->path_count; i++) {
        struct sl_pipe_loss loss =
            sl_pipe_loss_at(setting, &plan->path[i], flows[i]);
        const struct sl_pipe *pipe = &loss.pipe->record;

        /* What a pipe without bore or length loses is in the stand-in. */
        if (pipe->bore.known && pipe->length.known)
            sum.friction += loss.friction;
        if (pipe->bore.known)
            sum.minor += loss.minor;
    }
    if (plan->path_count == 0)
        sum.minor += sl_inlet_loss_at(setting, flow);
    if (plan->unmeasured < SL_INPUT_COUNT)
        sum.friction += sl_setting_value(setting, plan->unmeasured);
    return sum;
}

double sl_gauge_velocity_head(const struct sl_setting *setting, double flow)
{
    const struct sl_plan *plan = setting->plan;

    if (plan->source_kind != SL_MAIN)
        return 0;
    /* It only helps, and without a bore nothing says how much. */
    if (plan->path_count == 0 || !plan->path[0].pipe->record.bore.known)
        return setting->ends->of[SL_IN_SUCTION_BORE] == SL_FAVOURABLE ? NAN : 0;
    return sl_velocity_head(
        sl_pipe_velocity(flow, plan->path[0].pipe->record.bore.value));
}
