/* The fixed words: states, trust, rules, conditions, columns. */
#include "ranker/words.h"

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
        {"gas_allowance", "allowance for gas in the water"},
        {"npshr_speed_exponent_down", "exponent of NPSHR, slower"},
        {"npshr_speed_exponent_up", "exponent of NPSHR, faster"},
        {"salinity", "salinity"},
        {"suction_loss", "loss of a suction that is not recorded"},
        {"suction_minor_k", "K of a suction's fittings together"},
        {"suction_roughness", "roughness of a suction pipe"},
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
    case 'P':
        return "a proposal of summerlow's, no outside authority";
    default:
        return "trust not stated";
    }
}

static void add_floor(const struct sl_margin_rule *rule,
                      enum sl_unit_system units, struct sl_text *text)
{
    sl_text_add_string(text, "NPSHR + ");
    sl_digits_add(text, &sl_digits_plain,
                  sl_shown(SL_LENGTH, units, rule->floor), 1);
    sl_text_addf(text, " %s", sl_unit_shown(SL_LENGTH, units)->label);
}

void sl_words_rule(const struct sl_margin_rule *rule, enum sl_unit_system units,
                   struct sl_text *text)
{
    sl_text_add_string(text, "NPSHA at least ");
    if (rule->ratio > 1)
        sl_text_addf(text, "%.2f × NPSHR", rule->ratio);
    if (rule->ratio > 1 && rule->floor > 0)
        sl_text_add_string(text, ", and at least ");
    if (rule->floor > 0)
        add_floor(rule, units, text);
    if (!(rule->ratio > 1) && !(rule->floor > 0))
        sl_text_add_string(text, "NPSHR, no margin asked");
}

static const char *level_word(enum sl_level_basis basis)
{
    return basis == SL_LEVEL_LOW ? "lowest" : "normal";
}

void sl_words_condition(const struct sl_condition *condition,
                        struct sl_text *text)
{
    sl_text_addf(text, "source at its %s level", level_word(condition->level));
    sl_text_addf(text, ", mains at their %s pressure",
                 level_word(condition->pressure));
    sl_text_addf(text, ", discharge at its %s level",
                 level_word(condition->discharge));
    sl_text_addf(text, ", water at its %s temperature",
                 condition->summer_temperature ? "summer" : "normal");
    sl_text_addf(text, ", %s barometer",
                 condition->storm_barometer ? "storm" : "standard");
}
