/* The margin rules side by side. */
#include "ranker/page.h"

#include <string.h>

#include "base/text.h"
#include "ranker/words.h"

static const struct sl_rule_row *rule_of(const void *row)
{
    return row;
}

static void write_name(const struct sl_report *report, const void *row)
{
    const struct sl_margin_rule *rule = &rule_of(row)->rule;
    const char *edition = rule->edition ? rule->edition : "";

    sl_page_name(report, rule->rule);
    if (rule->trust == 'M')
        sl_markup(report->stream, "<small>from memory</small>");
    if (rule->trust == 'O')
        sl_markup(report->stream, "<small>the owner&#39;s own</small>");
    if (edition[0] != '\0' && !strstr(rule->rule, edition)) {
        sl_markup(report->stream, "<small>");
        sl_page_name(report, edition);
        sl_markup(report->stream, "</small>");
    }
    if (sl_same(rule->rule, report->summary->rule.rule))
        sl_markup(report->stream, "<small>ranked on</small>");
}

static void write_form(const struct sl_report *report, const void *row)
{
    struct sl_text words = {0};

    sl_words_rule(&rule_of(row)->rule, report->units, &words);
    sl_page_say(report, &words);
}

static void write_source(const struct sl_report *report, const void *row)
{
    const struct sl_margin_rule *rule = &rule_of(row)->rule;

    const char *trust = sl_words_trust(rule->trust);

    sl_page_name(report, rule->source);
    if (rule->trust == 'M') {
        sl_markup(report->stream,
                  "<small><b>from memory: check the source</b></small>");
    } else if (!sl_same(rule->source, trust)) {
        sl_markup(report->stream, "<small>");
        sl_page_text(report, trust);
        sl_markup(report->stream, "</small>");
    }
}

static void write_count(const struct sl_report *report, long long count)
{
    sl_markup_count(report->stream, count);
}

/* One function a state: the list's columns name them. */
#define COUNT_OF(name, state)                                                  \
    static void name(const struct sl_report *report, const void *row)          \
    {                                                                          \
        write_count(report, rule_of(row)->pumps_by_state[state]);              \
    }

COUNT_OF(write_short, SL_SHORT)
COUNT_OF(write_thin, SL_THIN)
COUNT_OF(write_unproven, SL_UNPROVEN)
COUNT_OF(write_clear, SL_CLEAR)

static void write_apart(const struct sl_report *report, const void *row)
{
    write_count(report, rule_of(row)->pumps_apart);
}

static const struct sl_page_column columns[] = {
    {"Rule", "name", write_name, true},
    {"Asks for", "long sentence", write_form, false},
    {"Source", "long", write_source, false},
    {"Short", "number", write_short, false},
    {"Thin", "number", write_thin, false},
    {"Unproven", "number", write_unproven, false},
    {"Clear", "number", write_clear, false},
    {"Does not apply", "number", write_apart, false},
};

static const struct sl_page_list list = {
    "Pumps by what each rule finds, each by its worst condition",
    "wide compact rules", columns, sizeof columns / sizeof columns[0],
    "What each rule finds was not kept: this evaluation is of an older "
    "version. Evaluate anew."};

void sl_page_rules(struct sl_report *report)
{
    const struct sl_summary *summary = report->summary;

    sl_page_section(report, "rules", "Margin rules",
                    "Every pump is judged by every rule; the lists above rank "
                    "by one. The editions of one standard differ: a pump can "
                    "pass one and fail the other.");
    for (size_t i = 0; i < summary->rule_count; i++)
        sl_page_list_row(report, &list, &summary->rules[i]);
    sl_page_list_end(report, &list);
    sl_page_section_end(report);
}
