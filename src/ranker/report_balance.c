/* The terms: the head balance of each pump, formula F1. */
#include "ranker/page.h"

#include "ranker/words.h"

static const struct sl_case *typical(const void *row)
{
    return &((const struct sl_pump_row *)row)->cases[SL_TYPICAL];
}

static void write_head(const struct sl_report *report, double head)
{
    sl_page_number(report, SL_LENGTH, head, 2);
}

static void write_pump(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row = any;

    sl_page_pump(report, row->pump_id,
                 row->station_name ? row->station_name : row->station_id,
                 row->condition);
}

static void write_state(const struct sl_report *report, const void *any)
{
    sl_page_state(report, ((const struct sl_pump_row *)any)->state);
}

static void write_flow(const struct sl_report *report, const void *any)
{
    sl_page_quantity(report, SL_FLOW, typical(any)->flow, 0);
    sl_markup(report->stream, "<small>");
    sl_page_text(report, sl_flow_basis_name(
                             ((const struct sl_pump_row *)any)->flow_basis));
    sl_markup(report->stream, "</small>");
}

/* One function a figure of the typical case: the list's columns name them. */
#define FIGURE(name, member)                                                   \
    static void name(const struct sl_report *report, const void *row)          \
    {                                                                          \
        write_head(report, typical(row)->member);                              \
    }

FIGURE(write_atmosphere, terms.atmosphere)
FIGURE(write_barometer, terms.barometer)
FIGURE(write_gauge, terms.gauge)
FIGURE(write_elevation, terms.elevation)
FIGURE(write_velocity, terms.velocity)
FIGURE(write_friction, terms.friction)
FIGURE(write_minor, terms.minor)
FIGURE(write_vapour, terms.vapour)
FIGURE(write_gas, terms.gas)
FIGURE(write_npsha, terms.npsha)
FIGURE(write_npshr, npshr)
FIGURE(write_margin, margin)
FIGURE(write_required, required)

static void write_margin_range(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row = any;

    write_head(report, row->cases[SL_ADVERSE].margin);
    sl_markup(report->stream, " … ");
    write_head(report, row->cases[SL_FAVOURABLE].margin);
}

static const struct sl_page_column columns[] = {
    {"Pump", "name", write_pump, true},
    {"State", "brief", write_state, false},
    {"Flow", "number", write_flow, false},
    {"Atmosphere", "number", write_atmosphere, false},
    {"Barometer", "number", write_barometer, false},
    {"Gauge", "number", write_gauge, false},
    {"Elevation", "number", write_elevation, false},
    {"Velocity", "number", write_velocity, false},
    {"Friction", "number", write_friction, false},
    {"Minor losses", "number", write_minor, false},
    {"Vapour", "number", write_vapour, false},
    {"Gas", "number", write_gas, false},
    {"= NPSHA", "number total", write_npsha, false},
    {"NPSHR", "number", write_npshr, false},
    {"Margin", "number total", write_margin, false},
    {"Rule asks for", "number", write_required, false},
    {"Margin, adverse … favourable", "number", write_margin_range, false},
};

static const struct sl_page_list list = {
    "Head balance of the pumps at risk, at the typical values", "wide balance",
    columns, sizeof columns / sizeof columns[0],
    "No pump is at risk under these conditions, so no balance is shown."};

void sl_report_begin_terms(struct sl_report *report)
{
    sl_page_unknowns_end(report);
    report->rows = 0;
    sl_page_section(
        report, "terms", "The terms, pump by pump",
        "Formula F1: each term is signed as it acts on the pump, and the terms "
        "from atmosphere to gas add up to NPSHA. Margin = NPSHA &minus; "
        "NPSHR. Heads are of the water pumped. Each pump is told in the "
        "running "
        "set that governs it; below its terms stands what else was found.");
    sl_markup(report->stream, "<p>All heads in ");
    sl_page_text(report, sl_page_unit(report, SL_LENGTH));
    sl_markup(report->stream, ".</p>\n");
}

void sl_report_pump(struct sl_report *report, const struct sl_pump_row *row)
{
    sl_page_list_row(report, &list, row);
    sl_page_list_more(report, &list, sl_page_beside, row);
}

void sl_report_begin_set_aside(struct sl_report *report)
{
    sl_page_list_end(report, &list);
    sl_page_section_end(report);
    report->rows = 0;
    sl_page_rules(report);
    sl_page_files(report);
}
