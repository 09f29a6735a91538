#include "evaluator/station.h"

#include <math.h>
#include <stdlib.h>

#include "evaluator/judge.h"
#include "evaluator/plan.h"
#include "evaluator/solve.h"

static bool draws_through(const struct sl_dossier_pump *pump,
                          const struct sl_dossier_pipe *pipe)
{
    const struct sl_dossier_pipe *place = pump->suction;

    while (place && place != pipe)
        place = place->draws_from;
    return place == pipe;
}

static int larger_first(const void *a, const void *b)
{
    double left = *(const double *)a, right = *(const double *)b;

    return (left < right) - (left > right);
}

/* How many pumps the controls may run at once: all, where that is not
 * recorded, which can only be worse. */
static size_t running_max(const struct sl_dossier *dossier)
{
    const struct sl_number *most = &dossier->record.pumps_running_max;
    size_t all = dossier->pump_count + (size_t)dossier->rejected_pumps;

    if (!most->known || most->value >= (double)all)
        return all;
    return most->value < 1 ? 1 : (size_t)most->value;
}

/* The most flow that the other pumps allowed to run beside one pump can
 * bring through a pipe; NaN when one of them has no bound. */
static double others_flow(const struct sl_plan *plans, size_t pump,
                          const double *most_flow,
                          const struct sl_dossier_pipe *pipe)
{
    const struct sl_dossier *dossier = plans[pump].dossier;
    size_t beside = running_max(dossier) - 1, count = 0;
    double *flows =
        sl_arena_new(plans[pump].arena, dossier->pump_count, sizeof *flows);
    double sum = 0;

    if (beside && dossier->rejected_pumps)
        return NAN; /* it may draw through this pipe, nobody knows how much */
    for (size_t i = 0; i < dossier->pump_count; i++) {
        if (i != pump && beside && plans[i].unmeasured == SL_IN_SUCTION_PIPING)
            return NAN; /* so may one whose suction is not recorded */
        if (i == pump || !draws_through(&dossier->pumps[i], pipe))
            continue;
        if (isnan(most_flow[i]) && beside)
            return NAN;
        flows[count++] = most_flow[i];
    }
    if (!beside)
        return 0;
    qsort(flows, count, sizeof *flows, larger_first);
    for (size_t i = 0; i < count && i < beside; i++)
        sum += flows[i];
    return sum;
}

static const char *together_rule(const struct sl_dossier *dossier, bool bounded)
{
    if (dossier->rejected_pumps)
        return "a pump of the station was rejected (see findings.csv); what "
               "it takes from shared pipes is not known";
    if (!bounded)
        return "the most that a pump beside it takes from the pipes they "
               "share is not known";
    if (dossier->record.pumps_running_max.known)
        return "others that may run beside it, at their largest flow, in the "
               "pipes they share";
    return "pumps_running_max is not recorded: all others, at their largest "
           "flow, in the pipes they share";
}

static void share_pipes(struct sl_plan *plans, size_t pump,
                        const double *most_flow)
{
    struct sl_plan *plan = &plans[pump];
    bool known = plan->dossier->record.pumps_running_max.known;
    bool shared = false, bounded = true;

    for (size_t i = 0; i < plan->path_count; i++) {
        double others = others_flow(plans, pump, most_flow, plan->path[i].pipe);

        plan->path[i].others = others;
        shared = shared || others != 0;
        bounded = bounded && !isnan(others);
    }
    if (shared)
        sl_plan_set(plan, SL_IN_RUNNING_TOGETHER,
                    known ? SL_DERIVED : SL_ASSUMED,
                    (struct sl_interval){0, NAN, 0},
                    together_rule(plan->dossier, bounded));
}

static void evaluate_condition(const struct sl_dossier *dossier,
                               const struct sl_condition *condition,
                               const struct sl_tables *tables,
                               const struct sl_margin_rule *rule,
                               struct sl_arena *arena,
                               struct sl_condition_result *result)
{
    size_t count = dossier->pump_count;
    struct sl_plan *plans = sl_arena_new(arena, count, sizeof *plans);
    double *most_flow = sl_arena_new(arena, count, sizeof *most_flow);

    result->condition = condition;
    result->pump_count = count;
    result->pumps = sl_arena_new(arena, count, sizeof *result->pumps);
    for (size_t i = 0; i < count; i++) {
        sl_plan_make(&plans[i], dossier, &dossier->pumps[i], condition, tables,
                     rule, arena);
        most_flow[i] = sl_solve_most_flow(&plans[i]);
    }
    for (size_t i = 0; i < count; i++) {
        share_pipes(plans, i, most_flow);
        sl_judge(&plans[i], &result->pumps[i]);
    }
}

/* Lower is worse; an unknown surplus comes after every known one. */
static double order_surplus(const struct sl_pump_result *pump)
{
    double surplus = pump->cases[SL_TYPICAL].surplus;

    return isnan(surplus) ? INFINITY : surplus;
}

static bool is_worse(const struct sl_pump_result *a,
                     const struct sl_pump_result *b)
{
    if (!b)
        return true;
    if (a->state != b->state)
        return a->state < b->state;
    if (a->likely != b->likely)
        return a->likely < b->likely;
    return order_surplus(a) < order_surplus(b);
}

void sl_evaluate_station(const struct sl_dossier *dossier,
                         const struct sl_tables *tables,
                         const struct sl_margin_rule *rule,
                         struct sl_arena *arena,
                         struct sl_station_result *result)
{
    *result =
        (struct sl_station_result){.dossier = dossier,
                                   .condition_count = tables->condition_count,
                                   .state = SL_UNPROVEN};
    result->conditions = sl_arena_new(arena, tables->condition_count,
                                      sizeof *result->conditions);
    /* The harshest is listed last: of equals it is the one to show. */
    for (size_t c = tables->condition_count; c-- > 0;) {
        struct sl_condition_result *condition = &result->conditions[c];

        evaluate_condition(dossier, &tables->conditions[c], tables, rule, arena,
                           condition);
        for (size_t i = 0; i < condition->pump_count; i++) {
            if (!is_worse(&condition->pumps[i], result->worst))
                continue;
            result->worst = &condition->pumps[i];
            result->worst_condition = condition;
        }
    }
    if (result->worst)
        result->state = result->worst->state;
    /* A pump that was rejected is not judged; the station is not clear. */
    if (result->state == SL_CLEAR && dossier->rejected_pumps)
        result->state = SL_UNPROVEN;
}
