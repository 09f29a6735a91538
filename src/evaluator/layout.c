#include "evaluator/layout.h"

#include <math.h>
#include <string.h>

static bool same_number(double a, double b)
{
    return a == b || (isnan(a) && isnan(b));
}

static bool same_interval(const struct sl_interval *a,
                          const struct sl_interval *b)
{
    return same_number(a->typical, b->typical) &&
           same_number(a->adverse, b->adverse) &&
           same_number(a->favourable, b->favourable);
}

static bool same_inputs(const struct sl_plan *a, const struct sl_plan *b)
{
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *x = &a->inputs[i], *y = &b->inputs[i];

        if (x->applies != y->applies || x->provenance != y->provenance ||
            x->row != y->row || !same_interval(&x->value, &y->value) ||
            strcmp(x->rule, y->rule) != 0)
            return false;
    }
    return true;
}

static bool same_recorded(const struct sl_number *a, const struct sl_number *b)
{
    return a->known == b->known && (!a->known || a->value == b->value);
}

static bool same_place(const struct sl_path_pipe *a,
                       const struct sl_path_pipe *b)
{
    const struct sl_pipe *x = &a->pipe->record, *y = &b->pipe->record;

    if (a->pipe == b->pipe)
        return true;
    return !a->shared && !b->shared && a->hazen_williams == b->hazen_williams &&
           same_recorded(&x->length, &y->length) &&
           same_recorded(&x->bore, &y->bore) &&
           same_recorded(&x->hazen_williams_c, &y->hazen_williams_c) &&
           same_interval(&a->roughness, &b->roughness) &&
           same_interval(&a->minor_k, &b->minor_k);
}

static bool same_path(const struct sl_plan *a, const struct sl_plan *b)
{
    if (a->path_count != b->path_count || a->unmeasured != b->unmeasured ||
        !same_number(a->inlet_diameter, b->inlet_diameter))
        return false;
    for (size_t i = 0; i < a->path_count; i++)
        if (!same_place(&a->path[i], &b->path[i]))
            return false;
    return true;
}

/* What the companion checks read straight from the records. */
static bool same_build(const struct sl_pump *a, const struct sl_pump *b)
{
    return a->make_up == b->make_up &&
           same_recorded(&a->largest_recorded_flow,
                         &b->largest_recorded_flow) &&
           same_recorded(&a->bep_flow, &b->bep_flow) &&
           same_recorded(&a->rated_head, &b->rated_head) &&
           same_recorded(&a->stages, &b->stages) &&
           same_recorded(&a->straight_run, &b->straight_run) &&
           same_recorded(&a->suction_nozzle_bore, &b->suction_nozzle_bore) &&
           same_recorded(&a->inlet_elevation, &b->inlet_elevation) &&
           same_recorded(&a->inlet_diameter, &b->inlet_diameter);
}

static bool same_plan(const struct sl_plan *a, const struct sl_plan *b)
{
    return a->pump->curve == b->pump->curve && a->flow_basis == b->flow_basis &&
           same_number(a->speed_ratio, b->speed_ratio) &&
           same_number(a->rated_ratio, b->rated_ratio) &&
           same_number(a->rated_flow, b->rated_flow) &&
           same_number(a->rated_npshr, b->rated_npshr) &&
           same_number(a->suction_specific_speed, b->suction_specific_speed) &&
           same_number(a->suction_energy, b->suction_energy) &&
           same_build(&a->pump->record, &b->pump->record) && same_path(a, b) &&
           same_inputs(a, b);
}

bool sl_classes_share(const struct sl_class *a, const struct sl_class *b)
{
    if (a == b)
        return a->plan->path_count > 0 && a->plan->path[0].shared;
    /* The suction is a tree: ways that meet anywhere meet at its root. */
    return a->plan->path_count > 0 && b->plan->path_count > 0 &&
           a->plan->path[0].pipe == b->plan->path[0].pipe;
}

/* How many pumps draw through each pipe, as the dossier has them. */
static size_t *count_users(const struct sl_layout *layout,
                           const struct sl_dossier *dossier,
                           struct sl_arena *arena)
{
    size_t *users = sl_arena_new(arena, dossier->pipe_count, sizeof *users);

    for (size_t p = 0; p < layout->pump_count; p++)
        for (size_t i = 0; i < layout->plans[p].path_count; i++)
            users[layout->plans[p].path[i].pipe - dossier->pipes]++;
    return users;
}

static double most(double a, double b)
{
    return isnan(a) || isnan(b) ? NAN : fmax(a, b);
}

static struct sl_interval wider(const struct sl_interval *a,
                                const struct sl_interval *b)
{
    return (struct sl_interval){most(a->typical, b->typical),
                                most(a->adverse, b->adverse),
                                fmin(a->favourable, b->favourable)};
}

/* What stands in for fittings that no record has lies on the pipe at the
 * pump; where that is a pipe of others too, all ways must agree on it: of the
 * pumps at it on the most at the typical and the adverse end, on the least at
 * the favourable. */
static void agree(struct sl_layout *layout, const struct sl_dossier_pipe *pipe)
{
    struct sl_interval k = {0, 0, INFINITY};

    for (size_t p = 0; p < layout->pump_count; p++) {
        const struct sl_plan *plan = &layout->plans[p];

        if (plan->path_count && plan->path[plan->path_count - 1].pipe == pipe)
            k = wider(&k, &plan->path[plan->path_count - 1].minor_k);
    }
    for (size_t p = 0; p < layout->pump_count; p++)
        for (size_t i = 0; i < layout->plans[p].path_count; i++)
            if (layout->plans[p].path[i].pipe == pipe)
                layout->plans[p].path[i].minor_k = k;
}

static void mark_shared(struct sl_layout *layout,
                        const struct sl_dossier *dossier,
                        struct sl_arena *arena)
{
    const size_t *users = count_users(layout, dossier, arena);

    for (size_t p = 0; p < layout->pump_count; p++) {
        struct sl_plan *plan = &layout->plans[p];

        for (size_t i = 0; i < plan->path_count; i++)
            plan->path[i].shared =
                users[plan->path[i].pipe - dossier->pipes] > 1;
    }
    for (size_t p = 0; p < layout->pump_count; p++) {
        const struct sl_plan *plan = &layout->plans[p];
        const struct sl_path_pipe *last =
            plan->path_count ? &plan->path[plan->path_count - 1] : NULL;

        if (last && last->shared)
            agree(layout, last->pipe);
    }
}

static bool draws_unsure(const struct sl_plan *plan)
{
    const struct sl_input *speed = &plan->inputs[SL_IN_SPEED];

    return plan->flow_basis != SL_FLOW_SOLVED ||
           plan->pump->curve->rejected_points ||
           (speed->applies && isnan(speed->value.adverse));
}

static void join_class(struct sl_layout *layout, size_t pump, bool apart,
                       size_t *places)
{
    const struct sl_plan *plan = &layout->plans[pump];
    size_t c = 0;

    while (c < layout->class_count &&
           (apart || !same_plan(layout->classes[c].plan, plan)))
        c++;
    if (c == layout->class_count) {
        layout->class_count++;
        layout->classes[c] =
            (struct sl_class){.plan = plan,
                              .given = plan->flow_basis != SL_FLOW_SOLVED,
                              .unsure = draws_unsure(plan)};
    }
    layout->classes[c].count++;
    places[pump] = c;
}

static void list_members(struct sl_layout *layout, const size_t *class_of,
                         struct sl_arena *arena)
{
    for (size_t c = 0; c < layout->class_count; c++) {
        struct sl_class *class = &layout->classes[c];
        size_t *pumps =
            sl_arena_new(arena, (size_t) class->count, sizeof *pumps);
        size_t next = 0;

        for (size_t p = 0; p < layout->pump_count; p++)
            if (class_of[p] == c)
                pumps[next++] = p;
        class->pumps = pumps;
    }
}

/* How many pumps the controls may run at once: all, where that is not
 * recorded, which can only be worse. */
static int running_max(const struct sl_dossier *dossier)
{
    const struct sl_number *most = &dossier->record.pumps_running_max;
    size_t all = dossier->pump_count + (size_t)dossier->rejected_pumps;

    if (!most->known || most->value >= (double)all)
        return (int)all;
    return most->value < 1 ? 1 : (int)most->value;
}

/* A rejected pump, or one whose suction is not on record, may draw through
 * the pipes of any other. */
static bool neighbour_unknown(const struct sl_layout *layout,
                              const struct sl_dossier *dossier)
{
    if (dossier->rejected_pumps)
        return true;
    for (size_t p = 0; p < layout->pump_count; p++)
        if (layout->plans[p].unmeasured == SL_IN_SUCTION_PIPING)
            return true;
    return false;
}

void sl_layout_make(struct sl_layout *layout, const struct sl_dossier *dossier,
                    const struct sl_condition *condition,
                    const struct sl_tables *tables,
                    const struct sl_margin_rule *rule, bool apart,
                    struct sl_arena *arena)
{
    size_t count = dossier->pump_count;
    size_t *class_of = sl_arena_new(arena, count, sizeof *class_of);

    *layout = (struct sl_layout){
        .plans = sl_arena_new(arena, count, sizeof *layout->plans),
        .pump_count = count,
        .classes = sl_arena_new(arena, count, sizeof *layout->classes),
        .at_once = running_max(dossier),
        .worst_flows = sl_arena_new(arena, count, sizeof(double)),
        .best_flows = sl_arena_new(arena, count, sizeof(double)),
        .flows = sl_arena_new(arena, count, sizeof(double)),
        .start = sl_arena_new(arena, count, sizeof(double)),
    };
    for (size_t p = 0; p < count; p++)
        sl_plan_make(&layout->plans[p], dossier, &dossier->pumps[p], condition,
                     tables, rule, arena);
    mark_shared(layout, dossier, arena);
    for (size_t p = 0; p < count; p++)
        join_class(layout, p, apart, class_of);
    list_members(layout, class_of, arena);
    layout->neighbour_unknown =
        layout->at_once > 1 && neighbour_unknown(layout, dossier);
}
