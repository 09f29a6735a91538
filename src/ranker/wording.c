/* The fixed words: states, trust, rules, conditions, columns. */
#include "ranker/words.h"

#include <math.h>

#include "ranker/digits.h"

const char *sl_words_state(enum sl_state state)
{
    static const char *const meanings[SL_STATE_COUNT] = {
        [SL_SHORT] = "The pump needs more suction head than the source can "
                     "give it, even with every unknown at its favourable "
                     "value.",
        [SL_THIN] = "The margin rule is not met, even with every unknown at "
                    "its favourable value, though NPSHR itself may be.",
        [SL_UNPROVEN] = "What is on record does not settle it: more facts "
                        "could show it short, thin or clear.",
        [SL_CLEAR] = "The margin rule is met, even with every unknown at its "
                     "adverse value.",
    };

    return state < SL_STATE_COUNT ? meanings[state] : "";
}

const char *sl_words_column(const char *column)
{
    for (int id = 0; id < SL_INPUT_COUNT; id++)
        if (sl_same(sl_input_column((enum sl_input_id)id), column))
            return sl_input_words((enum sl_input_id)id);
    return column;
}

const char *sl_words_default(const char *field)
{
    static const struct {
        const char *field, *words;
    } known[] = {
        {"barometer_fall", "fall of a low barometer, part of the air pressure"},
        {"discharge_minor_k", "K of the discharge's fittings together"},
        {"discharge_roughness", "roughness of the discharge main"},
        {"eye_of_nozzle", "impeller eye, part of the suction nozzle's bore"},
        {"gas_allowance", "allowance for gas in the water"},
        {"npshr_speed_exponent_down", "exponent of NPSHR, slower"},
        {"npshr_speed_exponent_up", "exponent of NPSHR, faster"},
        {"pipe_age", "age of a pipe, in years"},
        {"salinity", "salt in the water"},
        {"suction_energy_very_high",
         "very high suction energy, over the start of high"},
        {"suction_loss", "loss of a suction that is not recorded"},
        {"suction_minor_k", "K of a suction's fittings together"},
        {"suction_roughness", "roughness of a suction pipe"},
        {"suction_specific_speed",
         "suction specific speed that NPSHR is estimated by"},
        {"water_temp_normal", "usual water temperature"},
        {"water_temp_summer", "warmest water of the year"},
        {"wet_pit_inlet_loss", "loss of a wet-pit pump's inlet"},
    };

    for (size_t i = 0; i < sizeof known / sizeof known[0]; i++)
        if (sl_same(known[i].field, field))
            return known[i].words;
    return field;
}

const char *sl_words_trust(char trust)
{
    switch (trust) {
    case 'S':
        return "read in the named source";
    case 'C':
        return "computed from a named formula";
    case 'M':
        return "from memory, check the source";
    case 'N':
        return "common practice, no source";
    case 'O':
        return "the owner's own";
    case 'P':
        return "a proposal of summerlow's, no outside authority";
    default:
        return "trust not stated";
    }
}

static void add_length(double length, enum sl_unit_system units,
                       struct sl_text *text)
{
    sl_digits_add(text, &sl_digits_plain, sl_shown(SL_LENGTH, units, length),
                  1);
    sl_text_addf(text, " %s", sl_unit_shown(SL_LENGTH, units)->label);
}

static void add_tier(const struct sl_margin_tier *tier,
                     enum sl_unit_system units, struct sl_text *text)
{
    if (tier->ratio > 1)
        sl_text_addf(text, "%.2f × NPSHR", tier->ratio);
    if (tier->ratio > 1 && tier->floor > 0)
        sl_text_add_string(text, ", and at least ");
    if (tier->floor > 0) {
        sl_text_add_string(text, "NPSHR + ");
        add_length(tier->floor, units, text);
    }
    if (!(tier->ratio > 1) && !(tier->floor > 0))
        sl_text_add_string(text, "NPSHR, no margin asked");
}

/* Where the tier begins, in the rule's measure. */
static void add_over(const struct sl_margin_rule *rule, double over,
                     enum sl_unit_system units, struct sl_text *text)
{
    switch (rule->measure) {
    case SL_MEASURE_NONE:
        break;
    case SL_MEASURE_SUCTION_ENERGY:
        sl_text_add_string(text, "where suction energy is over ");
        if (over != 1)
            sl_text_addf(text, "%.2g times ", over);
        sl_text_add_string(text, "the start of high, ");
        break;
    case SL_MEASURE_SUCTION_SPECIFIC_SPEED:
        sl_text_addf(text,
                     "where suction specific speed is over %.0f in US units, ",
                     over);
        break;
    case SL_MEASURE_SUCTION_LIFT:
        sl_text_add_string(text, "where there is a suction lift");
        if (over > 0) {
            sl_text_add_string(text, " over ");
            add_length(over, units, text);
        }
        sl_text_add_string(text, ", ");
        break;
    }
}

void sl_words_rule(const struct sl_margin_rule *rule, enum sl_unit_system units,
                   struct sl_text *text)
{
    const struct sl_vocabularies fixed = sl_fixed_vocabularies();

    if (rule->tier_count == 0) {
        sl_text_add_string(text, "a rule that the store no longer holds");
        return;
    }
    if (rule->make_up)
        sl_text_addf(text, "for %s pumps alone: ",
                     sl_word(&fixed.of[SL_WORDS_MAKE_UP], rule->make_up));
    sl_text_add_string(text, "NPSHA at least ");
    for (size_t i = 0; i < rule->tier_count; i++) {
        if (i)
            sl_text_add_string(text, "; ");
        if (i)
            add_over(rule, rule->tiers[i].over, units, text);
        add_tier(&rule->tiers[i], units, text);
    }
    if (isnan(rule->lift_limit))
        return;
    sl_text_add_string(text, "; suction lift with its losses and NPSHR "
                             "together at most ");
    add_length(rule->lift_limit, units, text);
}

static const char *level_word(enum sl_level_basis basis)
{
    switch (basis) {
    case SL_LEVEL_NORMAL:
        return "normal";
    case SL_LEVEL_LOW:
        return "lowest";
    case SL_LEVEL_CUT_OUT:
        return "cut-out";
    case SL_LEVEL_RECORD_LOW:
        break;
    }
    return "lowest recorded";
}

static const char *friction_word(enum sl_friction_state state)
{
    return state == SL_FRICTION_NEW ? "as laid" : "at their age";
}

/* " + 0.5 m", " - 1.8 °F"; nothing for none. */
static void add_addition(enum sl_quantity quantity, double addition,
                         enum sl_unit_system units, struct sl_text *text)
{
    if (addition == 0)
        return;
    sl_text_addf(text, " %c %.3g %s", addition < 0 ? '-' : '+',
                 fabs(sl_shown(quantity, units, addition)),
                 sl_unit_shown(quantity, units)->label);
}

void sl_words_condition(const struct sl_condition *condition,
                        enum sl_unit_system units, struct sl_text *text)
{
    sl_text_addf(text, "source at its %s level", level_word(condition->level));
    add_addition(SL_LENGTH, condition->level_addition, units, text);
    sl_text_addf(text, ", mains at their %s pressure",
                 level_word(condition->pressure));
    sl_text_addf(text, ", discharge at its %s level",
                 level_word(condition->discharge));
    sl_text_addf(text, ", water at its %s temperature",
                 condition->summer_temperature ? "summer" : "normal");
    add_addition(SL_TEMPERATURE_DIFFERENCE, condition->temperature_addition,
                 units, text);
    sl_text_addf(text, ", %s barometer",
                 condition->storm_barometer ? "storm" : "standard");
    sl_text_addf(text, ", suction pipes %s, discharge pipes %s",
                 friction_word(condition->suction_friction),
                 friction_word(condition->discharge_friction));
}
