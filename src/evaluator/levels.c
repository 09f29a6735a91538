/* The source level of a plan: the one its condition asks for, or what stands
 * in for it. */
#include <math.h>

#include "evaluator/plan.h"

const struct sl_number *sl_lower_level(const struct sl_number *a,
                                       const struct sl_number *b)
{
    if (!a->known)
        return b;
    return b->known && b->value < a->value ? b : a;
}

/* Sources that no control can keep from falling to their record low; a
 * station whose service is not recorded may be one. */
static bool natural_source(const struct sl_station *station)
{
    return station->service == 0 || station->service == SL_RAW_WATER ||
           station->service == SL_IRRIGATION || station->service == SL_SEAWATER;
}

/* The lowest level the audit knows of: what the controls permit; for a
 * natural source also the lowest on record. */
static const struct sl_number *lowest_level(const struct sl_station *station)
{
    if (natural_source(station) || !station->cut_out_level.known)
        return sl_lower_level(&station->cut_out_level,
                              &station->record_low_level);
    return &station->cut_out_level;
}

static enum sl_source_basis basis_of(const struct sl_station *station,
                                     const struct sl_number *low)
{
    return low == &station->cut_out_level ? SL_SOURCE_CUT_OUT
                                          : SL_SOURCE_RECORD_LOW;
}

static void level(struct sl_plan *plan, const struct sl_number *number,
                  enum sl_source_basis basis, struct sl_interval value,
                  enum sl_provenance provenance, const char *rule)
{
    struct sl_input *input =
        sl_plan_set(plan, SL_IN_SOURCE_LEVEL, provenance, value, rule);

    plan->source_basis = basis;
    if (number)
        input->line = plan->dossier->record.line;
}

/* A level that is not the lowest is a bound from above: it can prove a pump
 * short, never clear. */
static void stands_in(struct sl_plan *plan, const struct sl_number *number,
                      enum sl_source_basis basis, const char *rule)
{
    level(plan, number, basis,
          (struct sl_interval){number->value, NAN, number->value}, SL_DERIVED,
          rule);
}

static void no_level(struct sl_plan *plan)
{
    level(plan, NULL, SL_SOURCE_UNKNOWN, sl_no_figure(), SL_UNKNOWN,
          "no source level is recorded");
}

static void low_level(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_number *lowest = lowest_level(station);
    const struct sl_number *normal = &station->normal_level;

    if (lowest->known &&
        (station->cut_out_level.known || natural_source(station)))
        level(plan, lowest, basis_of(station, lowest),
              sl_exactly(lowest->value), SL_RECORDED, "");
    else if (lowest->known)
        stands_in(plan, lowest, SL_SOURCE_RECORD_LOW,
                  "the lowest on record stands in for the cut-out level, "
                  "which may be lower");
    else if (normal->known)
        stands_in(plan, normal, SL_SOURCE_NORMAL,
                  "the normal level stands in for the lowest, which is not "
                  "recorded");
    else
        no_level(plan);
}

/* One level that a condition names; what stands in for it may lie higher. */
static void named_level(struct sl_plan *plan, const struct sl_number *wanted,
                        enum sl_source_basis basis,
                        const struct sl_number *other,
                        enum sl_source_basis other_basis)
{
    const struct sl_number *normal = &plan->dossier->record.normal_level;

    if (wanted->known)
        level(plan, wanted, basis, sl_exactly(wanted->value), SL_RECORDED, "");
    else if (other->known)
        stands_in(plan, other, other_basis,
                  "stands in for the level the condition names, which is not "
                  "recorded");
    else if (normal->known)
        stands_in(plan, normal, SL_SOURCE_NORMAL,
                  "the normal level stands in for the one the condition "
                  "names");
    else
        no_level(plan);
}

static void usual_level(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_number *low = lowest_level(station);

    if (station->normal_level.known)
        level(plan, &station->normal_level, SL_SOURCE_NORMAL,
              sl_exactly(station->normal_level.value), SL_RECORDED, "");
    else if (low->known)
        level(plan, low, basis_of(station, low),
              (struct sl_interval){low->value, low->value, NAN}, SL_DERIVED,
              "the lowest known level stands in for the normal one");
    else
        no_level(plan);
}

void sl_plan_source_level(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;

    switch (plan->condition->level) {
    case SL_LEVEL_NORMAL:
        usual_level(plan);
        break;
    case SL_LEVEL_LOW:
        low_level(plan);
        break;
    case SL_LEVEL_CUT_OUT:
        named_level(plan, &station->cut_out_level, SL_SOURCE_CUT_OUT,
                    &station->record_low_level, SL_SOURCE_RECORD_LOW);
        break;
    case SL_LEVEL_RECORD_LOW:
        named_level(plan, &station->record_low_level, SL_SOURCE_RECORD_LOW,
                    &station->cut_out_level, SL_SOURCE_CUT_OUT);
        break;
    }
    sl_plan_add(plan, SL_IN_SOURCE_LEVEL, plan->condition->level_addition);
}
