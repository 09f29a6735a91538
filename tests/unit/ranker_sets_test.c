/* The ranker: running sets, flags, rules and limits, in words, cells and on
 * the page. */
#define _POSIX_C_SOURCE 200809L /* open_memstream */

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <cmocka.h>

#include "ranker/report.h"
#include "ranker/tables.h"
#include "ranker/words.h"
#include "ranker_rows.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

static struct sl_pump_row pump_with_sets(void)
{
    struct sl_pump_row row = high_lift_station().worst;

    fill_sets(&row);
    return row;
}

/* --- words --------------------------------------------------------------- */

static void test_sets_tried_in_words(void **state)
{
    static const struct {
        long long tried;
        bool all;
        const char *want;
    } cases[] = {
        {0, false, "which sets were tried was not kept"},
        {1, true, "the only set"},
        {7, true, "the worst of all 7 sets"},
        {131, false, "131 sets tried, not all that the controls allow"},
    };
    struct sl_text text = {0};

    (void)state;
    for (size_t i = 0; i < COUNT(cases); i++) {
        struct sl_pump_row row = {.sets_tried = cases[i].tried,
                                  .sets_all = cases[i].all};

        sl_text_clear(&text);
        sl_words_sets_tried(&row, &text);
        assert_string_equal(sl_text_string(&text), cases[i].want);
    }
    sl_text_release(&text);
}

static void test_a_case_names_its_set(void **state)
{
    struct sl_pump_row row = pump_with_sets();
    struct sl_text text = {0};

    (void)state;
    sl_words_case(&row, &text);
    assert_string_equal(sl_text_string(&text),
                        "summer low, with P-1, P-3, rated flow, low-level "
                        "cut-out");
    sl_text_clear(&text);
    row.sets_all = false;
    sl_words_case(&row, &text);
    assert_string_equal(sl_text_string(&text),
                        "summer low, with P-1, P-3, rated flow, low-level "
                        "cut-out; 7 sets tried, not all that the controls "
                        "allow");
    sl_text_release(&text);
}

static void test_rule_states_in_words(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_pump_row row = pump_with_sets();
    struct sl_text text = {0};

    (void)state;
    sl_words_rule_states(&row, &summary, &text);
    assert_string_equal(
        sl_text_string(&text),
        "fixed head: thin; a rule recalled (from memory): "
        "clear; the <b>board's</b>, own (the owner's own): does "
        "not apply");
    sl_text_clear(&text);
    row.rule_states = "SU";
    sl_words_rule_states(&row, &summary, &text);
    assert_non_null(strstr(sl_text_string(&text), "fixed head: short; a rule "
                                                  "recalled (from memory): "
                                                  "unproven; "));
    sl_text_clear(&text);
    row.rule_states = "";
    sl_words_rule_states(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text), "");
    row.rule_states = NULL;
    sl_words_rule_states(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text), "");
    sl_text_release(&text);
}

/* The rule ranked on, and those that find it clear, have no word there. */
static void test_what_stands_beside_in_words(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_pump_row row = pump_with_sets();
    struct sl_text text = {0};

    (void)state;
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text),
                        "flags: submergence; suction velocity (from memory)");
    sl_text_clear(&text);
    row.rule_states = "CTS";
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text),
                        "flags: submergence; suction velocity (from memory); "
                        "by a rule recalled (from memory): thin; by the "
                        "<b>board's</b>, own (the owner's own): short");
    sl_text_clear(&text);
    row.flags = "";
    row.rule_states = "CTU";
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text),
                        "by a rule recalled (from memory): thin");
    sl_text_clear(&text);
    row.rule_states = "TCU";
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text), "");
    row.flags = NULL;
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text), "flags not kept");
    sl_text_clear(&text);
    row.pump_id = "";
    sl_words_beside(&row, &summary, &text);
    assert_string_equal(sl_text_string(&text), "");
    sl_text_release(&text);
}

static void test_a_need_without_a_curve_says_so(void **state)
{
    static const struct {
        enum sl_npshr_basis basis;
        const char *want;
    } cases[] = {
        {SL_NPSHR_CURVE, "NPSHR 4.1 m at 95 L/s"},
        {SL_NPSHR_RATED, "NPSHR 4.1 m (rated point) at 95 L/s"},
        {SL_NPSHR_ESTIMATE, "NPSHR 4.1 m (estimated) at 95 L/s"},
        {SL_NPSHR_NONE, "NPSHR 4.1 m at 95 L/s"},
    };
    struct sl_pump_row row = pump_with_sets();
    struct sl_text text = {0};

    (void)state;
    for (size_t i = 0; i < sizeof cases / sizeof cases[0]; i++) {
        row.npshr_basis = cases[i].basis;
        sl_text_clear(&text);
        sl_words_why(&row, SL_SI, &text);
        if (!strstr(sl_text_string(&text), cases[i].want))
            fail_msg("%s is not in: %s", cases[i].want, sl_text_string(&text));
    }
    sl_text_release(&text);
}

static void test_limits_in_words(void **state)
{
    struct sl_pump_row row = {.source_basis = SL_SOURCE_PRESSURE_NORMAL};

    (void)state;
    assert_string_equal(sl_words_limit(SL_LIMIT_LEVEL, &row),
                        "lowest gauge elevation at that pressure");
    row.source_basis = SL_SOURCE_CUT_OUT;
    assert_string_equal(sl_words_limit(SL_LIMIT_LEVEL, &row),
                        "lowest source level");
    assert_string_equal(sl_words_limit(SL_LIMIT_FLOW, &row), "largest flow");
    assert_string_equal(sl_words_limit_end(SL_LIMIT_FOUND), "found");
    assert_string_equal(sl_words_limit_end(SL_LIMIT_NONE),
                        "not met anywhere within the range");
    assert_string_equal(sl_words_limit_end(SL_LIMIT_ALWAYS),
                        "always within the range");
    assert_string_equal(sl_words_limit_end(SL_LIMIT_FIGURES_END),
                        "as far as there are figures");
    assert_string_equal(sl_words_limit_end(SL_LIMIT_UNKNOWN), "unknown");
}

/* --- pumps.csv ----------------------------------------------------------- */

/* The table of one pump, head and row, in these units. */
static char *pumps_table(const struct sl_pump_row *row,
                         enum sl_unit_system units)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_summary summary = summary_of(NULL);
    struct sl_table_writer writer = {NULL, units, &summary, &vocabularies};
    char *bytes = NULL;
    size_t length = 0;

    summary.inventory_sha256 = "3f9a";
    writer.stream = open_memstream(&bytes, &length);
    assert_non_null(writer.stream);
    sl_table_pumps_head(&writer);
    sl_table_pump(&writer, row);
    assert_int_equal(fclose(writer.stream), 0);
    return bytes;
}

static void assert_in(const char *text, const char *want)
{
    if (!strstr(text, want))
        fail_msg("not found: %s\nin: %s", want, text);
}

static void test_pumps_table_tells_the_sets(void **state)
{
    struct sl_pump_row row = pump_with_sets();
    char *table = pumps_table(&row, SL_SI);

    (void)state;
    assert_in(table, ",condition,running_set,flow_basis,source_basis,");
    assert_in(table, ",npshr_basis,running,sets_tried,sets_all,adverse_set,one_"
                     "out_set,"
                     "one_out_margin_m,one_out_surplus_m,curve_position,"
                     "off_curve_set,stands_set,flags,rule_states,"
                     "limit_lowest_level_m,limit_lowest_level_end,"
                     "limit_warmest_water_c,limit_warmest_water_end,"
                     "limit_largest_flow_l_s,limit_largest_flow_end,");
    assert_in(table, ",margin_rule,margin_rule_trust,year,");
    assert_in(table, ",summer low,\"with P-1, P-3\",rated,");
    assert_in(
        table,
        ",rated point,3,7,yes,\"with any 1 of P-1, P-3\",with P-3,1.283,-0.217,"
        "past its end,alone,,submergence; suction velocity (from memory),"
        "\"fixed head: thin; a rule recalled (from memory): clear; the "
        "<b>board's</b>, own (the owner's own): does not apply\","
        "208.438,found,,not met anywhere within the range,123.45,found,");
    assert_in(table, ",fixed head,\"common practice, no source\",2026,");
    free(table);
}

static void test_pumps_table_in_us_units(void **state)
{
    struct sl_pump_row row = pump_with_sets();
    char *table = pumps_table(&row, SL_US);

    (void)state;
    assert_in(table, ",limit_lowest_level_ft,");
    assert_in(table, ",limit_largest_flow_gpm,");
    /* 208.4375 m and 123.45 L/s. */
    assert_in(table, ",683.850,found,,not met anywhere within the "
                     "range,1956.72,found,");
    free(table);
}

/* A limit that was not found has no figure, whatever stands in its place. */
static void test_no_figure_where_none_was_found(void **state)
{
    struct sl_pump_row row = pump_with_sets();
    char *table = NULL;

    (void)state;
    for (int i = 0; i < SL_LIMIT_COUNT; i++)
        row.limits[i] = (struct sl_limit){SL_LIMIT_ALWAYS, 77.125};
    row.one_out_set = NULL;
    row.one_out_margin = row.one_out_surplus = NAN;
    table = pumps_table(&row, SL_SI);
    assert_in(table, ",,always within the range,,always within the range,,"
                     "always within the range,");
    assert_in(table, ",\"with any 1 of P-1, P-3\",,,,past its end,");
    assert_null(strstr(table, "77.1"));
    free(table);
}

/* Where figures end the value is how far the rule is met. */
static void test_a_figure_where_figures_end(void **state)
{
    struct sl_pump_row row = pump_with_sets();
    char *table = NULL;

    (void)state;
    row.limits[SL_LIMIT_LEVEL] =
        (struct sl_limit){SL_LIMIT_FIGURES_END, 77.125};
    table = pumps_table(&row, SL_SI);
    assert_in(table, ",77.125,as far as there are figures,");
    free(table);
}

/* --- the page ------------------------------------------------------------ */

static char *page_with(const struct sl_station_row *station,
                       const struct sl_pump_row *row,
                       struct sl_summary *summary)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_report report = {.summary = summary,
                               .vocabularies = &vocabularies,
                               .tables = &sample_tables};
    char *bytes = NULL;
    size_t length = 0;

    report.stream = open_memstream(&bytes, &length);
    assert_non_null(report.stream);
    sl_report_begin(&report);
    sl_report_begin_ranked(&report);
    if (station)
        sl_report_station(&report, station);
    sl_report_begin_unknowns(&report);
    sl_report_begin_terms(&report);
    if (row)
        sl_report_pump(&report, row);
    sl_report_begin_set_aside(&report);
    sl_report_begin_defaults(&report);
    sl_report_end(&report);
    assert_int_equal(fclose(report.stream), 0);
    return bytes;
}

static char *page_of(const struct sl_pump_row *row, struct sl_summary *summary)
{
    return page_with(NULL, row, summary);
}

/* A station clear by the rule ranked on, and what else is told of it. */
static struct sl_station_row clear_station(double surplus)
{
    struct sl_station_row station = high_lift_station();

    station.state = station.worst.state = station.worst.likely = SL_CLEAR;
    fill_sets(&station.worst);
    station.worst.rule_states = "CT-";
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++)
        station.worst.cases[corner].surplus = surplus;
    station.any_beside = true;
    return station;
}

static void test_a_clear_station_tells_what_stands_beside(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_station_row station = clear_station(0.299);
    char *page = page_with(&station, NULL, &summary);

    (void)state;
    assert_in(page, "<b>Beside the margin</b> flags: submergence; suction "
                    "velocity (from memory); by a rule recalled (from memory): "
                    "thin</small>");
    assert_in(page, "<small><b>by little</b></small>");
    assert_in(page, "4 of them carry a flag, or are thin or short by another "
                    "rule</a>");
    free(page);
    station = clear_station(0.301);
    station.worst.flags = "";
    station.worst.rule_states = "CC-";
    summary.clear_beside = 1;
    page = page_with(&station, NULL, &summary);
    assert_null(strstr(page, "<b>by little</b></small>"));
    assert_in(page, "<b>Beside the margin</b> nothing here, but in another "
                    "case or on another pump of it");
    assert_in(page, "1 of them carries a flag, or is thin or short by another");
    free(page);
    station.any_beside = false;
    summary.clear_beside = 0;
    page = page_with(&station, NULL, &summary);
    assert_null(strstr(page, "Beside the margin"));
    assert_null(strstr(page, "of them carr"));
    free(page);
}

static void test_an_unproven_station_tells_it_too(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_station_row station = clear_station(2.1);
    char *page = NULL;

    (void)state;
    station.state = station.worst.state = SL_UNPROVEN;
    page = page_with(&station, NULL, &summary);
    assert_in(page, "<b>Beside the margin</b> flags: submergence;");
    free(page);
}

static void test_the_published_rows_are_listed(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    char *page = page_of(NULL, &summary);

    (void)state;
    assert_in(page, "uncoated &lt;steel&gt;");
    assert_in(page, "0.250&nbsp;mm <span class=\"range\">(0.760 … 0.250)");
    assert_in(page, "attack, as one remembers it");
    assert_in(page, "data-label=\"At most\"><div>2.40&nbsp;m/s</div>");
    assert_in(page, "data-label=\"At least\"><div>none</div>");
    assert_in(page, "8 ft/s, recalled</bdi></div></td><td role=\"cell\" "
                    "class=\"case\" data-label=\"Trust\"><div>from memory, "
                    "check the source</div>");
    assert_in(page, "<b>K of fittings</b>, 2 rows; read in the named source: "
                    "handbook tables; from memory, check the source: <bdi>"
                    "clean &lt;strainer&gt;</bdi>.</p>");
    assert_in(page, "<b>Roughness of walls as laid</b>, 1 row; read in the "
                    "named source: printed tables.</p>");
    free(page);
}

static void test_the_rule_ranked_on_is_named_once(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    char *page = NULL;

    (void)state;
    summary.rule.rule = "A standard-1998";
    summary.rule.edition = "1998";
    summary.rule.trust = 'M';
    page = page_of(NULL, &summary);
    assert_in(page, "<bdi>A standard-1998</bdi></b> (from memory, check the "
                    "source): NPSHA at least");
    free(page);
    summary.rule.edition = "second";
    page = page_of(NULL, &summary);
    assert_in(page, "(from memory, check the source), <bdi>second</bdi>: ");
    free(page);
}

static void test_a_balance_tells_what_stands_beside_it(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_pump_row row = pump_with_sets();
    char *page = page_of(&row, &summary);

    (void)state;
    assert_in(page, "<td role=\"cell\" colspan=\"17\">");
    assert_in(page, "<dt>Running</dt> <dd><b><bdi>with P-1, P-3</bdi></b>, the "
                    "worst of all 7 sets</dd>");
    assert_in(page, "<dt>One pump less</dt> <dd><bdi>with P-3</bdi>: margin "
                    "1.28&nbsp;m, over the rule \u22120.22&nbsp;m</dd>");
    assert_in(page, "<dt>Off its curve</dt> <dd><bdi>alone</bdi></dd>");
    assert_null(strstr(page, "Delivers nothing</dt>"));
    assert_in(page, "<dt>Flags</dt> <dd>submergence; suction velocity (from "
                    "memory)</dd>");
    assert_in(page, "thin</span> by fixed head; <span class=\"state clear\">");
    assert_in(page, "clear</span> by a rule recalled (from memory)</dd>");
    assert_in(page,
              "lowest source level 208.44&nbsp;m; warmest water: not met "
              "anywhere within the range; largest flow 123.5&nbsp;L/s</dd>");
    free(page);
}

static void test_rules_stand_side_by_side(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_pump_row row = pump_with_sets();
    char *page = page_of(&row, &summary);

    (void)state;
    assert_in(page, "<section id=\"rules\"");
    assert_in(page, "<bdi>a rule recalled</bdi><small>from memory</small>"
                    "<small><bdi>1998</bdi></small>");
    assert_in(page, "<small><b>from memory: check the source</b></small>");
    assert_in(page, "<bdi>fixed head</bdi><small>ranked on</small>");
    assert_in(page, "<bdi>the &lt;b&gt;board&#39;s&lt;/b&gt;, own</bdi>");
    assert_in(page, "data-label=\"Clear\"><div>27</div>");
    assert_in(page, "data-label=\"Does not apply\"><div>42</div>");
    assert_in(page, "<dt>Year</dt>\n<dd>2026, for the age of pipes");
    free(page);
}

/* An evaluation of an older version kept none of it, and says so. */
static void test_an_older_evaluation_says_so(void **state)
{
    struct sl_summary summary = summary_of(NULL);
    struct sl_pump_row row = high_lift_station().worst;
    char *page = NULL;

    (void)state;
    summary.rule_count = 0;
    page = page_of(&row, &summary);
    assert_in(page, "What each rule finds was not kept");
    assert_in(page,
              "<dt>Running</dt> <dd>which sets were tried was not kept</dd>");
    assert_in(page, "<dt>Flags</dt> <dd>not kept</dd>");
    assert_null(strstr(page, "<dt>Rules</dt>"));
    assert_null(strstr(page, "<dt>One pump less</dt> <dd><bdi>"));
    free(page);
    row.one_out_margin = row.one_out_surplus = NAN;
    page = pumps_table(&row, SL_SI);
    assert_in(page, ",,,,,,,,,,,,,unknown,,unknown,,unknown,1830.000,");
    free(page);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_sets_tried_in_words),
        cmocka_unit_test(test_a_case_names_its_set),
        cmocka_unit_test(test_rule_states_in_words),
        cmocka_unit_test(test_limits_in_words),
        cmocka_unit_test(test_pumps_table_tells_the_sets),
        cmocka_unit_test(test_pumps_table_in_us_units),
        cmocka_unit_test(test_no_figure_where_none_was_found),
        cmocka_unit_test(test_a_figure_where_figures_end),
        cmocka_unit_test(test_a_balance_tells_what_stands_beside_it),
        cmocka_unit_test(test_rules_stand_side_by_side),
        cmocka_unit_test(test_an_older_evaluation_says_so),
        cmocka_unit_test(test_what_stands_beside_in_words),
        cmocka_unit_test(test_a_need_without_a_curve_says_so),
        cmocka_unit_test(test_a_clear_station_tells_what_stands_beside),
        cmocka_unit_test(test_an_unproven_station_tells_it_too),
        cmocka_unit_test(test_the_published_rows_are_listed),
        cmocka_unit_test(test_the_rule_ranked_on_is_named_once),
    };

    return cmocka_run_group_tests_name("ranker sets", tests, NULL, NULL);
}
