/* Running sets, the rules' verdicts and the limits, in words. */
#include "ranker/words.h"

#include <string.h>

#include "ranker/takers.h"

static bool is_there(const char *words)
{
    return words && words[0] != '\0';
}

void sl_words_set(const struct sl_pump_row *row, struct sl_text *text)
{
    if (is_there(row->running_set))
        sl_text_add_string(text, row->running_set);
}

void sl_words_sets_tried(const struct sl_pump_row *row, struct sl_text *text)
{
    if (row->sets_tried <= 0)
        sl_text_add_string(text, "which sets were tried was not kept");
    else if (!row->sets_all)
        sl_text_addf(text, "%lld sets tried, not all that the controls allow",
                     row->sets_tried);
    else if (row->sets_tried == 1)
        sl_text_add_string(text, "the only set");
    else
        sl_text_addf(text, "the worst of all %lld sets", row->sets_tried);
}

void sl_words_rule_name(const struct sl_margin_rule *rule, struct sl_text *text)
{
    sl_text_add_string(text, rule->rule);
    if (rule->trust == 'M')
        sl_text_add_string(text, " (from memory)");
    if (rule->trust == 'O')
        sl_text_add_string(text, " (the owner's own)");
}

bool sl_rule_state(const struct sl_pump_row *row, size_t rule,
                   enum sl_state *state)
{
    static const char letters[] = "STUC";
    const char *at = NULL;

    if (is_there(row->rule_states) && rule < strlen(row->rule_states))
        at = strchr(letters, row->rule_states[rule]);
    if (at)
        *state = (enum sl_state)(at - letters);
    return at != NULL;
}

void sl_words_rule_states(const struct sl_pump_row *row,
                          const struct sl_summary *summary,
                          struct sl_text *text)
{
    if (!is_there(row->rule_states))
        return;
    for (size_t i = 0; i < summary->rule_count; i++) {
        enum sl_state state = SL_UNPROVEN;
        bool applies = sl_rule_state(row, i, &state);

        if (i)
            sl_text_add_string(text, "; ");
        sl_words_rule_name(&summary->rules[i].rule, text);
        sl_text_addf(text, ": %s",
                     applies ? sl_state_name(state) : "does not apply");
    }
}

/* The rules beside the one ranked on that find it short or thin. */
static void add_worse_rules(const struct sl_pump_row *row,
                            const struct sl_summary *summary,
                            struct sl_text *text)
{
    for (size_t i = 0; i < summary->rule_count; i++) {
        const struct sl_margin_rule *rule = &summary->rules[i].rule;
        enum sl_state state = SL_UNPROVEN;

        if (!sl_rule_state(row, i, &state) || state >= SL_UNPROVEN ||
            sl_same(rule->rule, summary->rule.rule))
            continue;
        sl_text_add_string(text, text->length ? "; by " : "by ");
        sl_words_rule_name(rule, text);
        sl_text_addf(text, ": %s", sl_state_name(state));
    }
}

void sl_words_beside(const struct sl_pump_row *row,
                     const struct sl_summary *summary, struct sl_text *text)
{
    if (!is_there(row->pump_id))
        return;
    if (!row->flags)
        sl_text_add_string(text, "flags not kept");
    else if (is_there(row->flags))
        sl_text_addf(text, "flags: %s", row->flags);
    add_worse_rules(row, summary, text);
}

const char *sl_words_limit(enum sl_limit_id id, const struct sl_pump_row *row)
{
    static const char *const words[SL_LIMIT_COUNT] = {
        [SL_LIMIT_LEVEL] = "lowest source level",
        [SL_LIMIT_TEMPERATURE] = "warmest water",
        [SL_LIMIT_FLOW] = "largest flow",
    };

    if (id == SL_LIMIT_LEVEL && sl_is_pressure_basis(row->source_basis))
        return "lowest gauge elevation at that pressure";
    return words[id];
}

const char *sl_words_limit_end(enum sl_limit_end end)
{
    switch (end) {
    case SL_LIMIT_FOUND:
        return "found";
    case SL_LIMIT_NONE:
        return "not met anywhere within the range";
    case SL_LIMIT_ALWAYS:
        return "always within the range";
    case SL_LIMIT_FIGURES_END:
        return "as far as there are figures";
    case SL_LIMIT_UNKNOWN:
        break;
    }
    return "unknown";
}
