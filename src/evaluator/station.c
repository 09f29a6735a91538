#include "evaluator/station.h"

#include <math.h>

#include "evaluator/judge.h"

static const char *together_rule(const struct sl_layout *layout,
                                 const struct sl_dossier *dossier, bool sharing,
                                 bool hindered)
{
    if (dossier->rejected_pumps)
        return "a pump of the station was rejected (see findings.csv); what "
               "it takes from shared pipes is not known";
    if (layout->neighbour_unknown)
        return "the suction of a pump beside it is not on record; it may draw "
               "from the same pipes";
    if (sharing)
        return "the most that a pump beside it draws from the pipes they share "
               "is not known";
    if (hindered)
        return "what a pump beside it delivers is not known, and its NPSHR "
               "falls somewhere as its flow grows";
    if (dossier->record.pumps_running_max.known)
        return "";
    return "pumps_running_max is not recorded: all of them";
}

/* Whether a pump may run beside this one whose draw has no bound and, if so
 * asked, that shares its suction. */
static bool beside_unsure(const struct sl_layout *layout, size_t class,
                          bool sharing)
{
    for (size_t c = 0; c < layout->class_count; c++) {
        const struct sl_class *other = &layout->classes[c];

        if (other->unsure && other->count > (c == class) &&
            (!sharing || sl_classes_share(other, &layout->classes[class])))
            return true;
    }
    return false;
}

/* How many run together is an input like the others. */
static void set_running_together(const struct sl_layout *layout,
                                 const struct sl_dossier *dossier, size_t class,
                                 struct sl_plan *plan)
{
    bool known = dossier->record.pumps_running_max.known;
    bool sharing = layout->at_once > 1 && beside_unsure(layout, class, true);
    bool hindered = layout->at_once > 1 && !plan->npshr_rises &&
                    beside_unsure(layout, class, false);
    bool bounded = !sharing && !hindered &&
                   !(layout->neighbour_unknown && plan->path_count > 0);
    struct sl_interval value = sl_exactly(layout->at_once);
    struct sl_input *input;

    if (dossier->pump_count + (size_t)dossier->rejected_pumps < 2)
        return;
    if (!known)
        value.favourable = 1;
    if (!bounded)
        value.adverse = NAN;
    input =
        sl_plan_set(plan, SL_IN_RUNNING_TOGETHER,
                    !bounded ? SL_UNKNOWN
                    : known  ? SL_RECORDED
                             : SL_ASSUMED,
                    value, together_rule(layout, dossier, sharing, hindered));
    if (known)
        input->line = dossier->record.line;
}

static void judge_class(const struct sl_layout *layout,
                        const struct sl_tally *tally, size_t class,
                        struct sl_arena *arena,
                        struct sl_condition_result *result)
{
    const struct sl_class *of = &layout->classes[class];
    struct sl_pump_result *first = &result->pumps[of->pumps[0]];

    for (int i = 0; i < of->count; i++) {
        size_t pump = of->pumps[i];
        struct sl_judging judging = {layout, tally, class, pump, arena};

        if (i == 0)
            sl_judge(&judging, first);
        else
            sl_judge_alike(&judging, first, &result->pumps[pump]);
    }
}

static void evaluate_condition(const struct sl_dossier *dossier,
                               const struct sl_condition *condition,
                               const struct sl_tables *tables,
                               const struct sl_settings *settings,
                               struct sl_arena *arena,
                               struct sl_condition_result *result)
{
    struct sl_layout layout;
    struct sl_tally *tallies;

    result->condition = condition;
    result->pump_count = dossier->pump_count;
    result->pumps =
        sl_arena_new(arena, dossier->pump_count, sizeof *result->pumps);
    if (dossier->pump_count == 0)
        return;
    sl_layout_make(&layout, dossier, condition, tables, settings->rule,
                   settings->apart, arena);
    for (size_t c = 0; c < layout.class_count; c++)
        for (int i = 0; i < layout.classes[c].count; i++)
            set_running_together(&layout, dossier, c,
                                 &layout.plans[layout.classes[c].pumps[i]]);
    tallies = sl_arena_new(arena, layout.class_count, sizeof *tallies);
    sl_govern(&layout, settings->list_sets, arena, tallies);
    for (size_t c = 0; c < layout.class_count; c++)
        judge_class(&layout, &tallies[c], c, arena, result);
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
                         const struct sl_settings *settings,
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

        evaluate_condition(dossier, &tables->conditions[c], tables, settings,
                           arena, condition);
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
