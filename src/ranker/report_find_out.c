/* What to find out, pump by pump. */
#include "ranker/page.h"

#include <math.h>

#include "ranker/words.h"

static const struct sl_unknown_row *unknown(const void *row)
{
    return row;
}

static void write_rank(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, unknown(row)->rank);
}

static void write_pump(const struct sl_report *report, const void *any)
{
    const struct sl_unknown_row *row = any;

    sl_page_pump(report, row->pump_id,
                 row->station_name ? row->station_name : row->station_id,
                 row->condition);
}

static void write_input(const struct sl_report *report, const void *row)
{
    sl_page_text(report, sl_input_words(unknown(row)->input));
    sl_markup(report->stream, "<small><code>");
    sl_page_text(report, sl_input_column(unknown(row)->input));
    sl_markup(report->stream, "</code></small>");
}

static void write_now(const struct sl_report *report, const void *row)
{
    if (unknown(row)->provenance == SL_UNKNOWN) {
        sl_markup(report->stream, "unknown");
    } else {
        sl_page_text(report, sl_provenance_name(unknown(row)->provenance));
        sl_markup(report->stream, ": ");
        sl_page_interval(report, sl_input_quantity(unknown(row)->input),
                         &unknown(row)->value);
    }
    sl_markup(report->stream, "<small>");
    sl_page_text(report, unknown(row)->what);
    sl_markup(report->stream, "</small>");
}

static void write_swing(const struct sl_report *report, const void *row)
{
    const struct sl_interval *value = &unknown(row)->value;

    if (isfinite(unknown(row)->swing))
        sl_page_quantity(report, SL_LENGTH, unknown(row)->swing, 1);
    else if (isfinite(value->adverse) && isfinite(value->favourable))
        sl_markup(report->stream, "unknown");
    else
        sl_markup(report->stream, "no bound");
}

static void write_settles(const struct sl_report *report, const void *row)
{
    sl_markup(report->stream, unknown(row)->settles ? "yes" : "no");
}

static void write_likely(const struct sl_report *report, const void *row)
{
    if (unknown(row)->likely == SL_UNPROVEN)
        sl_markup(report->stream, "unknown");
    else
        sl_page_state(report, unknown(row)->likely);
}

static void write_people(const struct sl_report *report, const void *row)
{
    sl_markup_number(report->stream, unknown(row)->people_served, 0);
}

static const struct sl_page_column columns[] = {
    {"Rank", "number rank", write_rank, false},
    {"Pump", "name", write_pump, true},
    {"Find out", "case strong", write_input, false},
    {"What is known now", "long", write_now, false},
    {"Moves the margin by", "number", write_swing, false},
    {"Settles it alone", "brief", write_settles, false},
    {"Likely", "brief", write_likely, false},
    {"People served", "number", write_people, false},
};

static const struct sl_page_list list = {
    "Facts to find out, the ones that matter most first", "wide", columns,
    sizeof columns / sizeof columns[0],
    "No pump is unproven, so there is nothing to find out."};

void sl_report_begin_unknowns(struct sl_report *report)
{
    sl_page_stations_end(report);
    report->rows = 0;
    sl_markup(report->stream,
              "<h3>Pump by pump</h3>\n<p>How far the margin would move if this "
              "fact alone went from its adverse to its favourable value, and "
              "whether it could settle the state by itself.</p>\n");
}

void sl_report_unknown(struct sl_report *report,
                       const struct sl_unknown_row *row)
{
    sl_page_list_row(report, &list, row);
}

void sl_page_unknowns_end(struct sl_report *report)
{
    sl_page_list_end(report, &list);
    sl_page_section_end(report);
}
