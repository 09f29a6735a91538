#include "evaluator/losses.h"

#include <math.h>

#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"

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

double sl_setting_value(const struct sl_setting *setting, enum sl_input_id id)
{
    const struct sl_input *input = &setting->plan->inputs[id];

    return input->applies ? sl_interval_at(&input->value, setting->ends->of[id])
                          : 0;
}

struct sl_pipe_loss sl_pipe_loss_at(const struct sl_setting *setting,
                                    const struct sl_path_pipe *place,
                                    double flow)
{
    const struct sl_pipe *pipe = &place->pipe->record;
    const struct sl_ends *ends = setting->ends;
    struct sl_pipe_loss loss = {.pipe = place->pipe, .factor = NAN};
    double bore = pipe->bore.value;

    loss.velocity = loss.reynolds = loss.friction = loss.minor = NAN;
    loss.roughness =
        sl_interval_at(&place->roughness, ends->of[SL_IN_SUCTION_ROUGHNESS]);
    loss.minor_k =
        sl_interval_at(&place->minor_k, ends->of[SL_IN_SUCTION_MINOR]);
    loss.flow = flow;
    if (ends->of[SL_IN_RUNNING_TOGETHER] == SL_ADVERSE)
        loss.flow += place->others;
    if (!pipe->bore.known)
        return loss;
    loss.velocity = sl_pipe_velocity(loss.flow, bore);
    loss.reynolds = sl_reynolds(loss.velocity, bore, setting->viscosity);
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

/* A pump that stands in its water loses only what its inlet takes: K on the
 * inlet's diameter, or a default head. */
static double inlet_loss(const struct sl_setting *setting, double flow)
{
    const struct sl_plan *plan = setting->plan;
    double amount = sl_setting_value(setting, SL_IN_SUCTION_MINOR);

    if (isnan(plan->inlet_diameter))
        return amount;
    return sl_minor_head(amount, sl_pipe_velocity(flow, plan->inlet_diameter));
}

struct sl_suction_loss sl_suction_loss_at(const struct sl_setting *setting,
                                          double flow)
{
    const struct sl_plan *plan = setting->plan;
    struct sl_suction_loss sum = {0};

    for (size_t i = 0; i < plan->path_count; i++) {
        struct sl_pipe_loss loss =
            sl_pipe_loss_at(setting, &plan->path[i], flow);
        const struct sl_pipe *pipe = &loss.pipe->record;

        /* What a pipe without bore or length loses is in the stand-in. */
        if (pipe->bore.known && pipe->length.known)
            sum.friction += loss.friction;
        if (pipe->bore.known)
            sum.minor += loss.minor;
    }
    if (plan->path_count == 0)
        sum.minor += inlet_loss(setting, flow);
    if (plan->unmeasured < SL_INPUT_COUNT)
        sum.friction += sl_setting_value(setting, plan->unmeasured);
    return sum;
}

double sl_discharge_loss_at(const struct sl_setting *setting, double flow)
{
    const struct sl_delivery *delivery = &setting->plan->delivery;
    enum sl_corner end = setting->ends->of[SL_IN_DISCHARGE_LOSS];
    double velocity, reynolds, factor;

    if (!isnan(delivery->loss_flow)) {
        double part = flow / delivery->loss_flow;

        return delivery->loss_head * part * part; /* F21 */
    }
    if (flow == 0)
        return 0;
    velocity = sl_pipe_velocity(flow, delivery->bore);
    reynolds = sl_reynolds(velocity, delivery->bore, setting->viscosity);
    factor = sl_friction_factor(
        reynolds, sl_interval_at(&delivery->roughness, end) / delivery->bore);
    return sl_darcy_head(factor, delivery->length, delivery->bore, velocity) +
           sl_minor_head(sl_interval_at(&delivery->minor_k, end), velocity);
}

double sl_gauge_velocity_head(const struct sl_setting *setting, double flow)
{
    const struct sl_plan *plan = setting->plan;

    if (plan->source_kind != SL_MAIN || plan->path_count == 0 ||
        !plan->path[0].pipe->record.bore.known)
        return 0;
    return sl_velocity_head(
        sl_pipe_velocity(flow, plan->path[0].pipe->record.bore.value));
}
