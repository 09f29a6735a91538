/* How rough a wall is: by its material and condition, as laid or aged. */
#include <math.h>

#include "base/text.h"
#include "evaluator/plan.h"
#include "hydraulics/friction.h"

static const struct sl_roughness *material_row(const struct sl_plan *plan,
                                               int material)
{
    if (material < 1 || (size_t)material > plan->tables->roughness_count)
        return NULL;
    return &plan->tables->roughness[material - 1];
}

/* Roughness as laid, from the material's row; where the condition is not
 * recorded, from good to poor. */
static struct sl_interval as_laid(const struct sl_roughness *row, int condition)
{
    if (condition == SL_GOOD)
        return sl_exactly(row->good);
    if (condition == SL_FAIR)
        return sl_exactly(row->fair);
    if (condition == SL_POOR)
        return sl_exactly(row->poor);
    return (struct sl_interval){row->fair, row->poor, row->good};
}

/* How fast it grows rougher: the row of its condition, else the one for any. */
static const struct sl_ageing *ageing_of(const struct sl_plan *plan,
                                         const char *material, int condition)
{
    const struct sl_ageing *general = NULL;

    for (size_t i = 0; i < plan->tables->ageing_count; i++) {
        const struct sl_ageing *row = &plan->tables->ageing[i];

        if (!sl_same(row->material, material))
            continue;
        if (row->condition == condition)
            return row;
        if (row->condition == 0)
            general = row;
    }
    return general;
}

static bool exact(const struct sl_interval *value)
{
    return value->adverse == value->favourable;
}

const struct sl_ageing *sl_plan_growth(const struct sl_plan *plan, int material,
                                       int condition,
                                       enum sl_friction_state state)
{
    const struct sl_roughness *row = material_row(plan, material);
    const struct sl_ageing *ageing = NULL;

    if (row && state == SL_FRICTION_AGED)
        ageing = ageing_of(plan, row->material, condition);
    return ageing && ageing->rate.adverse != 0 ? ageing : NULL;
}

/* A year after the audit's is a slip, and tells nothing. */
static bool laid_by_then(const struct sl_plan *plan,
                         const struct sl_number *year_laid)
{
    return year_laid->known && year_laid->value <= plan->tables->year;
}

static struct sl_interval years_since(const struct sl_plan *plan,
                                      const struct sl_number *year_laid)
{
    const struct sl_default *row =
        sl_default_find(plan->tables, "pipe_age", "");

    if (laid_by_then(plan, year_laid))
        return sl_exactly(plan->tables->year - year_laid->value);
    return row ? row->value : sl_no_figure();
}

static double aged(double laid, double rate, double years, double bore)
{
    double roughness = sl_aged_roughness(laid, rate, years);

    if (roughness > SL_ROUGHEST_OF_BORE * bore)
        return fmax(laid, SL_ROUGHEST_OF_BORE * bore);
    return roughness;
}

struct sl_interval sl_plan_roughness(const struct sl_plan *plan, int material,
                                     int condition,
                                     const struct sl_number *year_laid,
                                     double bore, enum sl_friction_state state,
                                     bool *assumed)
{
    const struct sl_roughness *row = material_row(plan, material);
    const struct sl_ageing *ageing;
    struct sl_interval laid, years;

    *assumed = true;
    if (!row)
        return sl_no_figure();
    laid = as_laid(row, condition);
    ageing = sl_plan_growth(plan, material, condition, state);
    *assumed = !exact(&laid);
    if (!ageing)
        return laid;
    years = years_since(plan, year_laid);
    *assumed =
        *assumed || !laid_by_then(plan, year_laid) || !exact(&ageing->rate);
    return (struct sl_interval){
        aged(laid.typical, ageing->rate.typical, years.typical, bore),
        aged(laid.adverse, ageing->rate.adverse, years.adverse, bore),
        aged(laid.favourable, ageing->rate.favourable, years.favourable,
             bore)}; /* F10 */
}
