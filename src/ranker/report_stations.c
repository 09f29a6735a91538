/* The lists of stations: at risk, clear, to find out about first. */
#include "ranker/page.h"

#include <math.h>

#include "ranker/words.h"

/* Clear by less than this is clear by little, m: common practice, no source.
 */
#define LITTLE 0.3
/* Ends of a range closer than this read the same at one decimal, m. */
#define SAME_HEAD 0.05

enum station_list { AT_RISK, CLEAR, FIND_OUT };

static void write_rank(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, ((const struct sl_station_row *)row)->rank);
}

static void write_word(const struct sl_report *report,
                       enum sl_vocabulary vocabulary, int kept)
{
    if (kept == 0)
        return;
    sl_markup(report->stream, " · ");
    sl_page_text(report, sl_word(&report->vocabularies->of[vocabulary], kept));
}

static void write_station(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row =
        &((const struct sl_station_row *)any)->worst;

    sl_page_name(report,
                 row->station_name ? row->station_name : row->station_id);
    sl_markup(report->stream, "<small>");
    sl_page_name(report, row->station_id);
    write_word(report, SL_WORDS_SERVICE, row->service);
    write_word(report, SL_WORDS_INSTALLATION, row->installation);
    sl_markup(report->stream, "</small>");
}

/* The state, and how many of the station's pumps are in it. */
static void write_state(const struct sl_report *report, const void *any)
{
    const struct sl_station_row *row = any;

    sl_page_state(report, row->state);
    if (row->pumps == 0 || row->state >= SL_STATE_COUNT)
        return;
    sl_markup(report->stream, "<small>");
    sl_markup_count(report->stream, row->pumps_by_state[row->state]);
    sl_markup(report->stream, " of ");
    sl_page_counted(report, row->pumps, "pump", "pumps");
    sl_markup(report->stream, "</small>");
}

static void write_likely(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row =
        &((const struct sl_station_row *)any)->worst;

    if (row->likely == SL_UNPROVEN)
        sl_markup(report->stream, "unknown");
    else
        sl_page_state(report, row->likely);
}

/* The adverse and favourable ends, where they differ from each other. */
static void write_range(const struct sl_report *report, double adverse,
                        double favourable)
{
    if (fabs(adverse - favourable) < SAME_HEAD)
        return;
    sl_markup(report->stream, "<small class=\"range\">");
    sl_page_number(report, SL_LENGTH, adverse, 1);
    sl_markup(report->stream, " … ");
    sl_page_number(report, SL_LENGTH, favourable, 1);
    sl_markup(report->stream, "</small>");
}

static void write_shortfall(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row =
        &((const struct sl_station_row *)any)->worst;
    enum sl_corner corner = sl_words_corner(row);

    if (corner == SL_FAVOURABLE)
        sl_markup(report->stream, "at least ");
    sl_markup(report->stream, "<b>");
    sl_page_quantity(report, SL_LENGTH, -row->cases[corner].surplus, 1);
    sl_markup(report->stream, "</b>");
    if (corner == SL_TYPICAL)
        write_range(report, -row->cases[SL_ADVERSE].surplus,
                    -row->cases[SL_FAVOURABLE].surplus);
}

static void write_surplus(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row =
        &((const struct sl_station_row *)any)->worst;

    sl_page_quantity(report, SL_LENGTH, row->cases[SL_TYPICAL].surplus, 1);
    write_range(report, row->cases[SL_ADVERSE].surplus,
                row->cases[SL_FAVOURABLE].surplus);
    if (row->cases[SL_ADVERSE].surplus < LITTLE)
        sl_markup(report->stream, "<small><b>by little</b></small>");
}

static void write_governing(const struct sl_report *report, const void *any)
{
    const struct sl_pump_row *row =
        &((const struct sl_station_row *)any)->worst;
    struct sl_text words = {0};

    sl_page_name(report, row->pump_id);
    sl_words_case(row, &words);
    sl_markup(report->stream, "<small>");
    sl_page_say(report, &words);
    sl_markup(report->stream, "</small>");
}

static void write_why(const struct sl_report *report, const void *any)
{
    struct sl_text words = {0};

    sl_words_why(&((const struct sl_station_row *)any)->worst, report->units,
                 &words);
    sl_page_say(report, &words);
}

/* The same, and below it what stands beside the margin. */
static void write_why_and_beside(const struct sl_report *report,
                                 const void *any)
{
    const struct sl_station_row *row = any;
    struct sl_text words = {0};

    write_why(report, row);
    sl_words_beside(&row->worst, report->summary, &words);
    if (words.length == 0 && row->any_beside)
        sl_text_add_string(&words, "nothing here, but in another case or on "
                                   "another pump of it: see pumps.csv");
    if (words.length == 0)
        return;
    sl_markup(report->stream, "<small class=\"besides\"><b>Beside the "
                              "margin</b> ");
    sl_page_say(report, &words);
    sl_markup(report->stream, "</small>");
}

static void write_leading(const struct sl_report *report, const void *any)
{
    struct sl_text words = {0};

    sl_words_leading_term(&((const struct sl_station_row *)any)->worst,
                          report->units, &words);
    if (words.length == 0)
        sl_text_add_string(&words, "unknown");
    sl_page_say(report, &words);
}

static void write_people(const struct sl_report *report, const void *any)
{
    sl_markup_number(report->stream,
                     ((const struct sl_station_row *)any)->people_served, 0);
}

static void write_confidence(const struct sl_report *report, const void *any)
{
    struct sl_text words = {0};

    sl_words_confidence(&((const struct sl_station_row *)any)->worst, &words);
    sl_page_say(report, &words);
}

static void write_next_step(const struct sl_report *report, const void *any)
{
    struct sl_text words = {0};

    sl_words_next_step(&((const struct sl_station_row *)any)->worst, &words);
    sl_page_say(report, &words);
}

static const struct sl_page_column at_risk_columns[] = {
    {"Rank", "number rank", write_rank, false},
    {"Station", "name", write_station, true},
    {"State", "brief", write_state, false},
    {"Short of the rule by", "number", write_shortfall, false},
    {"Governing pump and case", "case", write_governing, false},
    {"Why", "long sentence", write_why, false},
    {"Takes most", "case", write_leading, false},
    {"People served", "number", write_people, false},
    {"How sure", "brief", write_confidence, false},
    {"Next step", "long sentence", write_next_step, false},
};

static const struct sl_page_column clear_columns[] = {
    {"Rank", "number rank", write_rank, false},
    {"Station", "name", write_station, true},
    {"State", "brief", write_state, false},
    {"To spare over the rule", "number", write_surplus, false},
    {"Governing pump and case", "case", write_governing, false},
    {"Why", "long sentence", write_why_and_beside, false},
    {"Takes most", "case", write_leading, false},
    {"People served", "number", write_people, false},
    {"How sure", "brief", write_confidence, false},
};

static const struct sl_page_column find_out_columns[] = {
    {"Rank", "number rank", write_rank, false},
    {"Station", "name", write_station, true},
    {"State", "brief", write_state, false},
    {"Likely", "brief", write_likely, false},
    {"Find out", "long sentence strong", write_next_step, false},
    {"Why it is not settled", "long sentence", write_why_and_beside, false},
    {"Governing pump and case", "case", write_governing, false},
    {"People served", "number", write_people, false},
    {"How sure", "brief", write_confidence, false},
};

#define COUNT(columns) (sizeof(columns) / sizeof((columns)[0]))

static const struct sl_page_list lists[] = {
    [AT_RISK] = {"Stations short or thin, the worst first", "wide",
                 at_risk_columns, COUNT(at_risk_columns),
                 "No station is at risk under these conditions."},
    [CLEAR] = {"Stations that are clear, the smallest margin first",
               "wide compact", clear_columns, COUNT(clear_columns),
               "No station is clear under these conditions."},
    [FIND_OUT] = {"Stations that the records do not settle", "wide",
                  find_out_columns, COUNT(find_out_columns),
                  "No station is unproven: the records settle every one."},
};

static void open_section(struct sl_report *report)
{
    if (report->list == AT_RISK)
        sl_page_section(
            report, "at-risk", "Stations at risk",
            "Ranked by state, then by how far each falls short of the margin "
            "rule, then by the people it serves. Figures are for the typical "
            "values; a range runs from the adverse to the favourable values "
            "of what is assumed.");
    else if (report->list == CLEAR)
        sl_page_section(report, "clear", "Stations that are clear",
                        "The margin rule is met under every condition "
                        "audited, even at the adverse values; <b>by "
                        "little</b>: with less than 0.3&nbsp;m "
                        "(1&nbsp;ft) to spare there. Flags, and what other "
                        "rules find short or thin, stand below the reason; "
                        "they change no state.");
    else
        sl_page_section(report, "find-out", "Find out first",
                        "These may be short, thin or clear. The likely state "
                        "is by typical values and proves nothing; the fact "
                        "named is the one that matters most.");
}

static void open_next(struct sl_report *report)
{
    sl_page_list_end(report, &lists[report->list]);
    sl_page_section_end(report);
    report->list++;
    open_section(report);
}

static void open_until(struct sl_report *report, int wanted)
{
    while (report->list < wanted)
        open_next(report);
}

static int list_of(enum sl_state state)
{
    if (state == SL_CLEAR)
        return CLEAR;
    return state == SL_UNPROVEN ? FIND_OUT : AT_RISK;
}

void sl_report_begin_ranked(struct sl_report *report)
{
    report->rows = 0;
    report->list = AT_RISK;
    open_section(report);
}

void sl_report_station(struct sl_report *report,
                       const struct sl_station_row *row)
{
    open_until(report, list_of(row->state));
    sl_page_list_row(report, &lists[report->list], row);
}

void sl_page_stations_end(struct sl_report *report)
{
    open_until(report, FIND_OUT);
    sl_page_list_end(report, &lists[FIND_OUT]);
}
