#include "evaluator/plan.h"

#include <math.h>
#include <string.h>

struct sl_interval sl_exactly(double value)
{
    return (struct sl_interval){value, value, value};
}

struct sl_interval sl_no_figure(void)
{
    return sl_exactly(NAN);
}

double sl_recorded(const struct sl_number *number)
{
    return number->known ? number->value : NAN;
}

struct sl_input *sl_plan_set(struct sl_plan *plan, enum sl_input_id id,
                             enum sl_provenance provenance,
                             struct sl_interval value, const char *rule)
{
    struct sl_input *input = &plan->inputs[id];

    *input = (struct sl_input){.id = id,
                               .applies = true,
                               .provenance = provenance,
                               .value = value,
                               .rule = rule};
    return input;
}

struct sl_input *sl_plan_record(struct sl_plan *plan, enum sl_input_id id,
                                const struct sl_number *number,
                                enum sl_kind kind, long line,
                                const char *unknown_rule)
{
    struct sl_input *input;

    if (!number->known)
        return sl_plan_set(plan, id, SL_UNKNOWN, sl_no_figure(), unknown_rule);
    input = sl_plan_set(plan, id, SL_RECORDED, sl_exactly(number->value), "");
    input->kind = kind;
    input->line = line;
    return input;
}

void sl_plan_add(struct sl_plan *plan, enum sl_input_id id, double addition)
{
    struct sl_input *input = &plan->inputs[id];

    if (addition == 0 || !input->applies)
        return;
    input->value.typical += addition;
    input->value.adverse += addition;
    input->value.favourable += addition;
    if (input->provenance == SL_RECORDED) {
        input->provenance = SL_DERIVED;
        input->rule = "as recorded, and what the condition adds";
    }
}

struct sl_input *sl_plan_low_or_normal(struct sl_plan *plan,
                                       enum sl_input_id id,
                                       const struct sl_number *low,
                                       const struct sl_number *normal,
                                       enum sl_level_basis wanted,
                                       const char *unknown_rule)
{
    bool want_low = wanted == SL_LEVEL_LOW;
    const struct sl_number *number = want_low ? low : normal;
    const struct sl_number *other = want_low ? normal : low;
    struct sl_interval bound = {other->value, NAN, other->value};
    struct sl_input *input;

    if (number->known || !other->known)
        return sl_plan_record(plan, id, number, SL_KIND_STATION,
                              plan->dossier->record.line, unknown_rule);
    if (!want_low)
        bound = (struct sl_interval){other->value, other->value, NAN};
    input = sl_plan_set(plan, id, SL_DERIVED, bound,
                        want_low ? "the usual one stands in for the lowest, "
                                   "which is not recorded"
                                 : "the lowest one stands in for the usual, "
                                   "which is not recorded");
    input->line = plan->dossier->record.line;
    return input;
}

const struct sl_default *sl_default_find(const struct sl_tables *tables,
                                         const char *field,
                                         const char *circumstance)
{
    const struct sl_default *general = NULL;

    for (size_t i = 0; i < tables->default_count; i++) {
        const struct sl_default *row = &tables->defaults[i];

        if (strcmp(row->field, field) != 0)
            continue;
        if (strcmp(row->circumstance, circumstance) == 0)
            return row;
        if (row->circumstance[0] == '\0')
            general = row;
    }
    return general;
}

const struct sl_check_limit *sl_check_limit_find(const struct sl_tables *tables,
                                                 const char *check,
                                                 const char *circumstance)
{
    const struct sl_check_limit *general = NULL;

    for (size_t i = 0; i < tables->limit_count; i++) {
        const struct sl_check_limit *row = &tables->limits[i];

        if (strcmp(row->check, check) != 0)
            continue;
        if (strcmp(row->circumstance, circumstance) == 0)
            return row;
        if (row->circumstance[0] == '\0')
            general = row;
    }
    return general;
}

struct sl_input *sl_plan_default(struct sl_plan *plan, enum sl_input_id id,
                                 const char *field, const char *circumstance)
{
    const struct sl_default *row =
        sl_default_find(plan->tables, field, circumstance);
    struct sl_input *input;

    if (!row)
        return sl_plan_set(plan, id, SL_UNKNOWN, sl_no_figure(),
                           "not recorded, and there is no default");
    input = sl_plan_set(plan, id, SL_ASSUMED, row->value, row->source);
    input->row = row;
    return input;
}

void sl_plan_make(struct sl_plan *plan, const struct sl_dossier *dossier,
                  const struct sl_dossier_pump *pump,
                  const struct sl_condition *condition,
                  const struct sl_tables *tables,
                  const struct sl_margin_rule *rule, struct sl_arena *arena)
{
    *plan = (struct sl_plan){.dossier = dossier,
                             .pump = pump,
                             .condition = condition,
                             .tables = tables,
                             .rule = rule,
                             .arena = arena,
                             .unmeasured = SL_INPUT_COUNT,
                             .inlet_diameter = NAN,
                             .rated_flow = NAN,
                             .rated_npshr = NAN};
    for (int id = 0; id < SL_INPUT_COUNT; id++)
        plan->inputs[id] = (struct sl_input){.id = (enum sl_input_id)id,
                                             .provenance = SL_DERIVED,
                                             .rule = "does not apply"};
    sl_plan_source(plan);
    sl_plan_suction(plan);
    sl_plan_machine(plan);
    sl_plan_delivery(plan);
}
