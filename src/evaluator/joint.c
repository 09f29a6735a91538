#include "evaluator/joint.h"

#include <math.h>

/* Takes a suction input of another's way at the end for others. */
static double wall_of(const struct sl_setting *setting, bool own,
                      enum sl_input_id id, const struct sl_interval *interval)
{
    return own ? sl_setting_blend(setting, id, interval)
               : sl_interval_at(interval, setting->ends->others);
}

static int find_pipe(const struct sl_joint *joint,
                     const struct sl_dossier_pipe *pipe)
{
    for (size_t i = 0; i < joint->network.pipe_count; i++)
        if (joint->pipe_of[i] == pipe)
            return (int)i;
    return -1;
}

static int put_pipe(struct sl_joint *joint, const struct sl_dossier_pipe *of,
                    const struct sl_network_pipe *pipe)
{
    size_t place = joint->network.pipe_count;

    if (place == SL_NETWORK_PIPES) {
        joint->overfull = true;
        return -1;
    }
    joint->pipes[place] = *pipe;
    joint->pipe_of[place] = of;
    joint->network.pipe_count++;
    return (int)place;
}

/* A gauge on a main lies on the first pipe of the records.  The network sees
 * it on the first pipe it is given, which may be another or a bell: there its
 * V²/2g is taken back. */
static double no_gauge_here(const struct sl_plan *plan,
                            const struct sl_path_pipe *place, int draws_from)
{
    bool first = place && place == &plan->path[0];

    return plan->source_kind == SL_MAIN && draws_from < 0 && !first ? 1 : 0;
}

static int add_pipe(struct sl_joint *joint, const struct sl_setting *setting,
                    const struct sl_path_pipe *place, int draws_from, bool own)
{
    const struct sl_pipe *record = &place->pipe->record;
    bool full = record->length.known;
    struct sl_network_pipe pipe = {
        .draws_from = draws_from,
        .own = !place->shared,
        .length = full ? record->length.value : 0,
        .bore = record->bore.value,
        .hazen_williams_c = NAN,
        .minor_k = wall_of(setting, own, SL_IN_SUCTION_MINOR, &place->minor_k) +
                   no_gauge_here(setting->plan, place, draws_from),
    };

    if (place->hazen_williams)
        pipe.hazen_williams_c = record->hazen_williams_c.value;
    else if (full)
        pipe.roughness =
            wall_of(setting, own, SL_IN_SUCTION_ROUGHNESS, &place->roughness);
    return put_pipe(joint, place->pipe, &pipe);
}

/* The pipes on the way of a unit; returns the last.  The focus comes first:
 * what another shares with it is there already, at the focus's own end, and
 * the equal pipe of an equal pump beside it is another pipe. */
static int add_way(struct sl_joint *joint, const struct sl_setting *setting,
                   bool own)
{
    const struct sl_plan *plan = setting->plan;
    int last = -1;

    for (size_t i = 0; i < plan->path_count; i++) {
        const struct sl_path_pipe *place = &plan->path[i];
        int known = place->shared ? find_pipe(joint, place->pipe) : -1;

        if (!place->pipe->record.bore.known)
            continue; /* what it loses is in the stand-in */
        if (known < 0)
            known = add_pipe(joint, setting, place, last, own);
        last = known;
    }
    return last;
}

/* Loss of a pump without pipes, or of what cannot be worked out. */
static double fixed_loss(const struct sl_setting *setting, bool own)
{
    const struct sl_plan *plan = setting->plan;
    const struct sl_input *minor = &plan->inputs[SL_IN_SUCTION_MINOR];
    double loss = 0;

    if (plan->unmeasured < SL_INPUT_COUNT)
        loss += wall_of(setting, own, plan->unmeasured,
                        &plan->inputs[plan->unmeasured].value);
    if (plan->path_count == 0 && isnan(plan->inlet_diameter) && minor->applies)
        loss += wall_of(setting, own, SL_IN_SUCTION_MINOR, &minor->value);
    return loss;
}

static int add_inlet(struct sl_joint *joint, const struct sl_setting *setting,
                     bool own)
{
    const struct sl_plan *plan = setting->plan;
    struct sl_network_pipe inlet = {
        .draws_from = -1,
        .own = true,
        .bore = plan->inlet_diameter,
        .hazen_williams_c = NAN,
        .minor_k = wall_of(setting, own, SL_IN_SUCTION_MINOR,
                           &plan->inputs[SL_IN_SUCTION_MINOR].value) +
                   no_gauge_here(plan, NULL, -1),
    };

    return put_pipe(joint, NULL, &inlet);
}

static double flow_given(const struct sl_joint *joint, size_t class, bool own)
{
    const struct sl_joint_case *of = &joint->of;
    const struct sl_plan *plan = of->layout->classes[class].plan;
    const struct sl_interval *flow = &plan->inputs[SL_IN_FLOW].value;

    if (own && !isnan(of->imposed))
        return of->imposed;
    if (!own && of->given)
        return of->given[class];
    if (!of->layout->classes[class].given)
        return NAN;
    return sl_interval_at(flow, own ? of->ends.of[SL_IN_FLOW] : SL_TYPICAL);
}

struct sl_setting sl_joint_setting(const struct sl_joint *joint,
                                   const struct sl_plan *plan)
{
    return (struct sl_setting){plan, &joint->of.ends, joint->of.liquid};
}

/* `own`: on its way the unknowns are at the case's own ends. */
static void add_unit(struct sl_joint *joint, size_t class, int count, bool own)
{
    const struct sl_plan *plan = joint->of.layout->classes[class].plan;
    struct sl_setting setting = sl_joint_setting(joint, plan);
    size_t place = joint->network.unit_count++;
    struct sl_network_unit *unit = &joint->units[place];

    joint->class_of[place] = class;
    *unit = (struct sl_network_unit){
        .head = plan->head,
        .given_flow = flow_given(joint, class, own),
        .count = count,
        .fixed_loss = fixed_loss(&setting, own),
    };
    unit->pipe = plan->path_count == 0 && !isnan(plan->inlet_diameter)
                     ? add_inlet(joint, &setting, own)
                     : add_way(joint, &setting, own);
}

static void add_units(struct sl_joint *joint)
{
    const struct sl_joint_case *of = &joint->of;
    size_t focus = of->focus;

    if (focus != SL_NO_FOCUS)
        add_unit(joint, focus, 1, true);
    for (size_t c = 0; c < of->layout->class_count; c++) {
        int count = of->counts[c] - (c == focus);

        if (count <= 0)
            continue;
        if (joint->network.unit_count < SL_NETWORK_UNITS)
            add_unit(joint, c, count, focus == SL_NO_FOCUS);
        else
            joint->overfull = true;
    }
}

/* A plan of the set whose flow the station decides; it knows the discharge,
 * which all share.  NULL: every flow is given. */
static const struct sl_plan *delivering(const struct sl_joint_case *of)
{
    for (size_t c = 0; c < of->layout->class_count; c++)
        if (of->counts[c] && !of->layout->classes[c].given)
            return of->layout->classes[c].plan;
    return NULL;
}

static void set_discharge(struct sl_joint *joint, const struct sl_plan *plan)
{
    struct sl_setting setting = sl_joint_setting(joint, plan);
    const struct sl_delivery *delivery = &plan->delivery;
    struct sl_network *network = &joint->network;

    network->static_head = sl_setting_value(&setting, SL_IN_DISCHARGE_LEVEL) -
                           sl_setting_source_head(&setting);
    network->loss_flow = delivery->loss_flow;
    network->loss_head = delivery->loss_head;
    network->length = delivery->length;
    network->bore = delivery->bore;
    network->roughness =
        sl_setting_blend(&setting, SL_IN_DISCHARGE_LOSS, &delivery->roughness);
    network->minor_k =
        sl_setting_blend(&setting, SL_IN_DISCHARGE_LOSS, &delivery->minor_k);
}

static bool solved(const struct sl_joint *joint)
{
    return joint->end == SL_NETWORK_SOLVED || joint->end == SL_NETWORK_AT_JUMP;
}

/* Flow of each pipe, by the units that draw through it; none without a
 * solution. */
static void sum_pipes(struct sl_joint *joint)
{
    for (size_t i = 0; i < joint->network.pipe_count; i++)
        joint->pipe_flow[i] = solved(joint) ? 0 : NAN;
    if (!solved(joint))
        return;
    for (size_t u = 0; u < joint->network.unit_count; u++)
        for (int i = joint->units[u].pipe; i >= 0;
             i = joint->pipes[i].draws_from)
            joint->pipe_flow[i] +=
                joint->flows[u].flow *
                (joint->pipes[i].own ? 1 : joint->units[u].count);
}

void sl_joint_solve(struct sl_joint *joint, const struct sl_joint_case *of)
{
    const struct sl_plan *plan = delivering(of);
    const struct sl_plan *any = plan;
    double start[SL_NETWORK_UNITS];

    joint->of = *of;
    joint->overfull = false;
    joint->network = (struct sl_network){
        .pipes = joint->pipes, .units = joint->units, .loss_flow = NAN};
    for (size_t c = 0; !any; c++)
        if (of->counts[c])
            any = of->layout->classes[c].plan;
    joint->network.viscosity = of->liquid.viscosity;
    joint->network.gauge_on_pipe = any->source_kind == SL_MAIN;
    add_units(joint);
    joint->several =
        joint->network.unit_count > 1 || joint->units[0].count > 1;
    if (plan)
        set_discharge(joint, plan);
    for (size_t u = 0; of->start && u < joint->network.unit_count; u++)
        start[u] = of->start[joint->class_of[u]];
    joint->end = joint->overfull
                     ? SL_NETWORK_BAD_INPUT
                     : sl_network_solve(&joint->network,
                                        of->start ? start : NULL, joint->flows);
    sum_pipes(joint);
}

const struct sl_unit_flow *sl_joint_unit(const struct sl_joint *joint,
                                         size_t class)
{
    if (!solved(joint))
        return NULL;
    /* The focus is the first of all. */
    for (size_t u = 0; u < joint->network.unit_count; u++)
        if (joint->class_of[u] == class)
            return &joint->flows[u];
    return NULL;
}

double sl_joint_flow(const struct sl_joint *joint, size_t class)
{
    const struct sl_unit_flow *unit = sl_joint_unit(joint, class);

    return unit ? unit->flow : NAN;
}

double sl_joint_other_flow(const struct sl_joint *joint, size_t class)
{
    size_t u = joint->network.unit_count;

    if (!solved(joint))
        return NAN;
    while (u-- > 0)
        if (joint->class_of[u] == class)
            return joint->flows[u].flow;
    return NAN;
}

double sl_joint_pipe_flow(const struct sl_joint *joint,
                          const struct sl_path_pipe *place, double own)
{
    int shared = place->shared ? find_pipe(joint, place->pipe) : -1;

    return shared >= 0 ? joint->pipe_flow[shared] : own;
}

void sl_joint_losses(const struct sl_joint *joint, size_t class,
                     const struct sl_plan *plan, struct sl_pipe_loss *losses)
{
    struct sl_setting setting = sl_joint_setting(joint, plan);
    double own = sl_joint_flow(joint, class);

    for (size_t i = 0; i < plan->path_count; i++)
        losses[i] =
            sl_pipe_loss_at(&setting, &plan->path[i],
                            sl_joint_pipe_flow(joint, &plan->path[i], own));
}

void sl_joint_flows(const struct sl_joint *joint, double *flows)
{
    for (size_t u = 0; u < joint->network.unit_count; u++)
        flows[joint->class_of[u]] = solved(joint) ? joint->flows[u].flow : NAN;
}
