/* The margin rules on a calculation sheet. */
#include <math.h>

#include "app/sheet_parts.h"
#include "app/terminal.h"
#include "base/text.h"
#include "ranker/words.h"

/* What decides the tier, where anything does. */
static void measure(const struct sl_sheet *sheet,
                    const struct sl_rule_verdict *verdict)
{
    static const struct {
        const char *words;
        enum sl_quantity quantity;
        int decimals;
    } measures[] = {
        [SL_MEASURE_NONE] = {"", SL_PURE, 0},
        [SL_MEASURE_SUCTION_ENERGY] = {"suction energy over the start of high",
                                       SL_PURE, 2},
        [SL_MEASURE_SUCTION_SPECIFIC_SPEED] = {"suction specific speed in US "
                                               "units",
                                               SL_PURE, 0},
        [SL_MEASURE_SUCTION_LIFT] = {"suction lift", SL_LENGTH, 2},
    };
    enum sl_rule_measure by = verdict->rule->measure;
    size_t tier = 0;
    char room[SL_FIGURE_ROOM];

    if (by == SL_MEASURE_NONE)
        return;
    fprintf(sheet->stream, "; %s %s", measures[by].words,
            sl_sheet_figure(sheet, measures[by].quantity, verdict->measure,
                            measures[by].decimals, room));
    if (isnan(verdict->measure))
        return;
    for (size_t i = 1; i < verdict->rule->tier_count; i++)
        if (verdict->measure > verdict->rule->tiers[i].over)
            tier = i;
    fprintf(sheet->stream, ", so tier %zu of %zu", tier + 1,
            verdict->rule->tier_count);
}

static void rule_line(const struct sl_sheet *sheet,
                      const struct sl_rule_verdict *verdict)
{
    struct sl_text name = {0};
    char asked[SL_FIGURE_ROOM], surplus[SL_FIGURE_ROOM];

    sl_words_rule_name(verdict->rule, &name);
    fputs("  ", sheet->stream);
    sl_print_safely(sheet->stream, sl_text_string(&name));
    sl_text_release(&name);
    if (!verdict->applies) {
        fputs(": does not apply\n", sheet->stream);
        return;
    }
    fprintf(sheet->stream, ": %s; asks for %s, surplus %s",
            sl_state_name(verdict->state),
            sl_sheet_figure(sheet, SL_LENGTH, verdict->required[SL_TYPICAL], 2,
                            asked),
            sl_sheet_figure(sheet, SL_LENGTH, verdict->surplus[SL_TYPICAL], 2,
                            surplus));
    measure(sheet, verdict);
    fputs(verdict->rule == sheet->rule ? "; ranked on\n" : "\n", sheet->stream);
}

void sl_sheet_rules(const struct sl_sheet *sheet,
                    const struct sl_pump_result *pump)
{
    fputs("\nWhat every margin rule says, each by its own worst set, at the "
          "typical values\n",
          sheet->stream);
    for (size_t i = 0; i < pump->rule_count; i++)
        rule_line(sheet, &pump->rules[i]);
}

static void rule_form(const struct sl_sheet *sheet,
                      const struct sl_margin_rule *rule)
{
    struct sl_text name = {0}, form = {0};

    sl_words_rule_name(rule, &name);
    sl_words_rule(rule, sheet->units, &form);
    fputs("  ", sheet->stream);
    sl_print_safely(sheet->stream, sl_text_string(&name));
    fprintf(sheet->stream, ": %s\n    ", sl_text_string(&form));
    sl_print_safely(sheet->stream, rule->source);
    fprintf(sheet->stream, " [trust %c]\n", rule->trust);
    sl_text_release(&name);
    sl_text_release(&form);
}

void sl_sheet_rule_forms(const struct sl_sheet *sheet,
                         const struct sl_tables *tables)
{
    fputs("The margin rules\n", sheet->stream);
    for (size_t i = 0; i < tables->rule_count; i++)
        rule_form(sheet, &tables->rules[i]);
    putc('\n', sheet->stream);
}
