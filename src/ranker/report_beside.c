/* What stands below a pump's balance: sets, flags, rules, limits. */
#include "ranker/page.h"

#include <math.h>

#include "ranker/words.h"

static bool is_there(const char *words)
{
    return words && words[0] != '\0';
}

static void open_fact(const struct sl_report *report, const char *name)
{
    sl_markup(report->stream, "<div><dt>");
    sl_page_text(report, name);
    sl_markup(report->stream, "</dt> <dd>");
}

static void close_fact(const struct sl_report *report)
{
    sl_markup(report->stream, "</dd></div>\n");
}

static void write_running(const struct sl_report *report,
                          const struct sl_pump_row *row)
{
    struct sl_text tried = {0};

    open_fact(report, "Running");
    if (is_there(row->running_set)) {
        sl_markup(report->stream, "<b>");
        sl_page_name(report, row->running_set);
        sl_markup(report->stream, "</b>, ");
    }
    sl_words_sets_tried(row, &tried);
    sl_page_say(report, &tried);
    close_fact(report);
}

/* A set that was found to be so, where there is one. */
static void write_set(const struct sl_report *report, const char *name,
                      const char *set)
{
    if (!is_there(set))
        return;
    open_fact(report, name);
    sl_page_name(report, set);
    close_fact(report);
}

static void write_one_out(const struct sl_report *report,
                          const struct sl_pump_row *row)
{
    if (!is_there(row->one_out_set))
        return;
    open_fact(report, "One pump less");
    sl_page_name(report, row->one_out_set);
    sl_markup(report->stream, ": margin ");
    sl_page_quantity(report, SL_LENGTH, row->one_out_margin, 2);
    sl_markup(report->stream, ", over the rule ");
    sl_page_quantity(report, SL_LENGTH, row->one_out_surplus, 2);
    close_fact(report);
}

static void write_flags(const struct sl_report *report,
                        const struct sl_pump_row *row)
{
    const char *flags = row->flags ? row->flags : "not kept";

    open_fact(report, "Flags");
    sl_page_text(report, is_there(flags) ? flags : "none");
    close_fact(report);
}

/* The rules that find it in one state; nothing when there is none. */
static bool write_rules_of(const struct sl_report *report,
                           const struct sl_pump_row *row, enum sl_state wanted,
                           bool first)
{
    const struct sl_summary *summary = report->summary;
    bool any = false;

    for (size_t i = 0; i < summary->rule_count; i++) {
        enum sl_state state = SL_UNPROVEN;
        struct sl_text name = {0};

        if (!sl_rule_state(row, i, &state) || state != wanted)
            continue;
        if (any) {
            sl_markup(report->stream, " · ");
        } else {
            sl_markup(report->stream, first ? "" : "; ");
            sl_page_state(report, state);
            sl_markup(report->stream, " by ");
        }
        sl_words_rule_name(&summary->rules[i].rule, &name);
        sl_page_say(report, &name);
        any = true;
    }
    return any;
}

static void write_rules(const struct sl_report *report,
                        const struct sl_pump_row *row)
{
    bool any = false;

    if (!is_there(row->rule_states))
        return;
    open_fact(report, "Rules");
    for (int state = SL_SHORT; state < SL_STATE_COUNT; state++)
        if (write_rules_of(report, row, (enum sl_state)state, !any))
            any = true;
    if (!any)
        sl_markup(report->stream, "none applies");
    close_fact(report);
}

static void write_limit(const struct sl_report *report,
                        const struct sl_pump_row *row, enum sl_limit_id id)
{
    static const enum sl_quantity quantities[SL_LIMIT_COUNT] = {
        [SL_LIMIT_LEVEL] = SL_LENGTH,
        [SL_LIMIT_TEMPERATURE] = SL_TEMPERATURE,
        [SL_LIMIT_FLOW] = SL_FLOW,
    };
    static const int decimals[SL_LIMIT_COUNT] = {
        [SL_LIMIT_LEVEL] = 2, [SL_LIMIT_TEMPERATURE] = 1, [SL_LIMIT_FLOW] = 1};
    const struct sl_limit *limit = &row->limits[id];

    sl_page_text(report, sl_words_limit(id, row));
    sl_markup(report->stream, isnan(limit->value) ? ": " : " ");
    if (!isnan(limit->value))
        sl_page_quantity(report, quantities[id], limit->value, decimals[id]);
    if (limit->end == SL_LIMIT_FOUND)
        return;
    if (!isnan(limit->value))
        sl_markup(report->stream, ", ");
    sl_page_text(report, sl_words_limit_end(limit->end));
}

static void write_limits(const struct sl_report *report,
                         const struct sl_pump_row *row)
{
    open_fact(report, "Rule just met at");
    for (int id = 0; id < SL_LIMIT_COUNT; id++) {
        sl_markup(report->stream, id ? "; " : "");
        write_limit(report, row, (enum sl_limit_id)id);
    }
    close_fact(report);
}

void sl_page_beside(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row = any;

    sl_markup(report->stream, "<dl class=\"beside\">\n");
    write_running(report, row);
    write_one_out(report, row);
    write_set(report, "Off its curve", row->off_curve_set);
    write_set(report, "Delivers nothing", row->stands_set);
    write_flags(report, row);
    write_rules(report, row);
    write_limits(report, row);
    sl_markup(report->stream, "</dl>");
}
