/* Why a pump is unproven, or proven only at least, in one sentence. */
#include <math.h>
#include <string.h>

#include "base/text.h"
#include "evaluator/judge.h"

/* What running off its curve, or standing, makes unknown is told as such;
 * and an NPSHR that only lost its bounds has its own reason. */
static bool told_otherwise(const struct sl_pump_result *result,
                           const struct sl_input *input)
{
    if (input->id == SL_IN_NPSHR)
        return result->off_curve || !isnan(result->cases[SL_TYPICAL].npshr);
    return result->stands && input->id == SL_IN_FLOW;
}

/* "a, b and c are not known" over the inputs without any likely figure. */
static void name_missing(const struct sl_pump_result *result,
                         struct sl_text *text)
{
    const char *names[SL_INPUT_COUNT];
    size_t count = 0;

    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &result->inputs[i];

        if (input->applies && input->provenance == SL_UNKNOWN &&
            isnan(input->value.typical) && !told_otherwise(result, input))
            names[count++] = sl_input_words(input->id);
    }
    for (size_t i = 0; i < count; i++)
        sl_text_addf(text, "%s%s",
                     i == 0           ? ""
                     : i + 1 == count ? " and "
                                      : ", ",
                     names[i]);
    if (count)
        sl_text_addf(text, " %s not known", count == 1 ? "is" : "are");
}

static const char *curve_end(enum sl_curve_position position)
{
    return position == SL_BEFORE_START ? "runs before the first point of its "
                                         "published curve"
                                       : "runs past the end of its published "
                                         "curve";
}

static void add_off_curve(const struct sl_pump_result *result,
                          struct sl_text *text)
{
    sl_text_addf(text, "%s it %s",
                 strcmp(result->off_curve_set.words, "alone") == 0
                     ? "running alone"
                     : result->off_curve_set.words,
                 curve_end(result->off_curve_set.position));
}

/* An unknown without a bound that has a rule to tell: the leading one, else
 * the first. */
static const struct sl_input *
first_unbounded(const struct sl_pump_result *result)
{
    const struct sl_input *leading = result->leading_unknown;

    if (leading && sl_input_lacks_bound(leading) && leading->rule[0])
        return leading;
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &result->inputs[i];

        if (sl_input_is_open(input) && sl_input_lacks_bound(input) &&
            input->rule[0])
            return input;
    }
    return NULL;
}

/* Whether the water is colder or warmer than its properties are known for. */
static bool water_is_out_of_range(const struct sl_judging *judging)
{
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    double kelvin = plan->inputs[SL_IN_TEMPERATURE].value.typical;

    return !isnan(kelvin) && !isnan(plan->salinity) &&
           isnan(sl_liquid_at(plan->salinity, kelvin).vapour_pressure);
}

static void reason_unproven(const struct sl_judging *judging,
                            const struct sl_pump_result *result,
                            struct sl_text *text)
{
    const struct sl_input *leading = result->leading_unknown;
    const struct sl_input *unbounded = first_unbounded(result);
    const struct sl_plan *plan = &judging->layout->plans[judging->pump];
    const struct sl_outcome *adverse = &judging->tally->adverse.outcome;

    name_missing(result, text);
    if (text->length)
        return;
    if (water_is_out_of_range(judging))
        sl_text_add_string(text, "the water is colder or warmer, with what "
                                 "the condition adds, than its properties "
                                 "are known for");
    else if (plan->tables->rejected_conditions && result->likely == SL_CLEAR &&
             !unbounded)
        sl_text_add_string(text, "a condition to audit was rejected (see "
                                 "findings.csv); what it asks is not known");
    else if (result->stands)
        sl_text_add_string(text, "its curve does not reach the discharge "
                                 "level: check curve, speed and levels");
    else if (result->off_curve)
        add_off_curve(result, text);
    else if (!judging->tally->all && judging->tally->adverse.counts &&
             adverse->figures.surplus >= 0)
        sl_text_addf(text,
                     "its rule is met in the %zu running sets that were tried; "
                     "its station has too many pumps to try every one",
                     result->sets_tried);
    else if (unbounded)
        sl_text_addf(text, "%s: %s", sl_input_words(unbounded->id),
                     unbounded->rule);
    else if (judging->tally->unsearched)
        sl_text_add_string(text, "its station has too many running sets to "
                                 "search its unknowns between their ends");
    else if (judging->tally->adverse.counts && adverse->position != SL_ON_CURVE)
        sl_text_addf(text, "at the adverse end of what is assumed it %s",
                     curve_end(adverse->position));
    else if (judging->tally->adverse.counts && adverse->solution)
        sl_text_addf(text, "%s: %s", result->adverse_set, adverse->solution);
    else if (leading)
        sl_text_addf(text, "what is assumed decides, %s most",
                     sl_input_words(leading->id));
    else
        sl_text_add_string(text, "its figures allow no verdict");
}

void sl_give_reason(const struct sl_judging *judging,
                    struct sl_pump_result *result)
{
    struct sl_text text = {0};

    if (result->state == SL_UNPROVEN) {
        reason_unproven(judging, result, &text);
    } else if (result->off_curve) {
        sl_text_add_string(&text, "at least: ");
        add_off_curve(result, &text);
    }
    result->reason =
        sl_arena_text(judging->arena, sl_text_string(&text), text.length);
    sl_text_release(&text);
}
