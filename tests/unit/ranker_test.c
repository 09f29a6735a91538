/* The ranker: escaping, digits, sentences, tables, the page. */
#define _POSIX_C_SOURCE 200809L /* open_memstream */

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <cmocka.h>

#include "ranker/cells.h"
#include "ranker/digits.h"
#include "ranker/markup.h"
#include "ranker/page.h"
#include "ranker/report.h"
#include "ranker/tables.h"
#include "ranker/words.h"
#include "ranker_rows.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* What was written to a stream, as a string. */
struct capture {
    FILE *stream;
    char *bytes;
    size_t length;
};

static void capture_begin(struct capture *capture)
{
    *capture = (struct capture){0};
    capture->stream = open_memstream(&capture->bytes, &capture->length);
    assert_non_null(capture->stream);
}

static const char *captured(struct capture *capture)
{
    assert_int_equal(fclose(capture->stream), 0);
    capture->stream = NULL;
    return capture->bytes;
}

static size_t occurrences(const char *text, const char *wanted)
{
    size_t count = 0;

    for (const char *at = strstr(text, wanted); at;
         at = strstr(at + strlen(wanted), wanted))
        count++;
    return count;
}

static void check_string(const char *label, const char *got, const char *want)
{
    if (strcmp(got, want) != 0)
        fail_msg("%s:\n  got  \"%s\"\n  want \"%s\"", label, got, want);
}

/* --- escaping ------------------------------------------------------------ */

static const struct {
    const char *text;
    const char *want;
    const char *label;
} escapes[] = {
    {"Alder Brook", "Alder Brook", "plain text stays"},
    {"<script>alert(1)</script>", "&lt;script&gt;alert(1)&lt;/script&gt;",
     "markup becomes text"},
    {"\" onclick='x' a&b", "&quot; onclick=&#39;x&#39; a&amp;b",
     "quotes and ampersand are references"},
    {"&lt;", "&amp;lt;", "a reference is not passed on"},
    {"a\r\nb\tc", "a\u240D\u240Ab\u2409c", "line ends and tab are pictures"},
    {"\x01\x1F\x7F", "\u2401\u241F\u2421", "controls are pictures"},
    {"a\u202Eb\u2066c\u2069", "a\uFFFDb\uFFFDc\uFFFD",
     "text-turning controls are shown"},
    {"\u061C\u200E\u200F", "\uFFFD\uFFFD\uFFFD", "direction marks are shown"},
    {"\u2028\uFFFE\U0001FFFF", "\uFFFD\uFFFD\uFFFD",
     "separators and noncharacters are shown"},
    {"\xC2\x85", "\uFFFD", "a C1 control is shown"},
    {"a\xFF\xC3", "a\uFFFD\uFFFD", "bytes that are not UTF-8 are shown"},
    {"\xED\xA0\x80", "\uFFFD\uFFFD\uFFFD", "a surrogate is three stray bytes"},
    {"Čerpací 泵站 \U0001F4A7", "Čerpací 泵站 \U0001F4A7",
     "other scripts stay"},
    {"", "", "nothing is nothing"},
};

static void test_text_is_escaped(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(escapes); i++) {
        struct capture capture;

        capture_begin(&capture);
        sl_markup_text(capture.stream, escapes[i].text);
        check_string(escapes[i].label, captured(&capture), escapes[i].want);
        free(capture.bytes);
        capture_begin(&capture);
        sl_markup_attribute(capture.stream, escapes[i].text);
        check_string(escapes[i].label, captured(&capture), escapes[i].want);
        free(capture.bytes);
    }
}

static void test_no_text_writes_nothing(void **state)
{
    struct capture capture;

    (void)state;
    capture_begin(&capture);
    sl_markup_text(capture.stream, NULL);
    check_string("NULL", captured(&capture), "");
    free(capture.bytes);
}

static void test_every_byte_is_safe(void **state)
{
    (void)state;
    for (int byte = 1; byte < 256; byte++) {
        char text[] = {'x', (char)byte, 'y', '\0'};
        struct capture capture;

        capture_begin(&capture);
        sl_markup_text(capture.stream, text);
        captured(&capture);
        assert_null(strpbrk(capture.bytes, "<>\"'\r\n\t\x01\x7F"));
        assert_int_equal(sl_utf8_valid_length(capture.bytes, capture.length),
                         capture.length);
        free(capture.bytes);
    }
}

/* --- digits -------------------------------------------------------------- */

static const struct {
    double value;
    int decimals;
    const char *want;
} numbers[] = {
    {2.385, 1, "2.4"},
    {-2.385, 2, "\u22122.38"},
    {-0.0004, 1, "0.0"},
    {-0.0, 3, "0.000"},
    {0.96, 1, "1.0"},
    {999.6, 0, "1\u202F000"},
    {999, 0, "999"},
    {184200, 0, "184\u202F200"},
    {-1234567.25, 1, "\u22121\u202F234\u202F567.2"},
    {(double)NAN, 1, "unknown"},
    {(double)INFINITY, 1, "unknown"},
    {-(double)INFINITY, 0, "unknown"},
};

static void test_numbers_on_the_page(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(numbers); i++) {
        struct capture capture;

        capture_begin(&capture);
        sl_markup_number(capture.stream, numbers[i].value, numbers[i].decimals);
        check_string("number", captured(&capture), numbers[i].want);
        free(capture.bytes);
    }
}

static void test_decimals_leave_three_digits(void **state)
{
    (void)state;
    assert_int_equal(sl_digits_decimals(250.4), 0);
    assert_int_equal(sl_digits_decimals(-42.7), 1);
    assert_int_equal(sl_digits_decimals(2.385), 2);
    assert_int_equal(sl_digits_decimals(0.0303), 4);
    assert_int_equal(sl_digits_decimals(1e-9), 4);
    assert_int_equal(sl_digits_decimals(0), 0);
    assert_int_equal(sl_digits_decimals((double)NAN), 0);
}

/* --- sentences ----------------------------------------------------------- */

static void check_why(const struct sl_pump_row *row, enum sl_unit_system units,
                      const char *want)
{
    struct sl_text text = {0};

    sl_words_why(row, units, &text);
    check_string("why", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void check_next_step(const struct sl_pump_row *row, const char *want)
{
    struct sl_text text = {0};

    sl_words_next_step(row, &text);
    check_string("next step", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void check_leading(const struct sl_pump_row *row, const char *want)
{
    struct sl_text text = {0};

    sl_words_leading_term(row, SL_SI, &text);
    check_string("leading term", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void test_why_names_what_takes_most(void **state)
{
    struct sl_station_row high = high_lift_station();
    struct sl_station_row needy = needy_station();

    (void)state;
    check_why(&high.worst, SL_SI,
              "low-level cut-out puts the water 3.4 m below the eye; air at "
              "1,830 m is worth only 8.3 m; suction losses take 1.2 m; NPSHR "
              "4.1 m at 95 L/s (rated flow)");
    check_why(&high.worst, SL_US,
              "low-level cut-out puts the water 11.2 ft below the eye; air at "
              "6,004 ft is worth only 27.3 ft; suction losses take 4.0 ft; "
              "NPSHR 13.4 ft at 1,511 gpm (rated flow)");
    needy.worst.cases[SL_TYPICAL].terms.elevation = 2.13;
    check_why(&needy.worst, SL_SI,
              "low-level cut-out leaves 2.1 m over the eye; NPSHR 6.3 m at "
              "212 L/s");
}

static void test_why_names_three_terms_at_most(void **state)
{
    struct sl_station_row row = needy_station();

    (void)state;
    row.worst.altitude = 1402;
    row.worst.temperature = 308.15;
    fill_cases(&row.worst, 0.0061,
               (struct sl_terms){.atmosphere = 8.73,
                                 .barometer = -0.27,
                                 .elevation = 0.02,
                                 .friction = -0.31,
                                 .minor = -0.11,
                                 .vapour = -0.58,
                                 .gas = -0.61},
               3.3, 0);
    check_why(&row.worst, SL_SI,
              "low-level cut-out leaves the water level with the eye; air at "
              "1,402 m is worth only 8.7 m; the gas allowance takes 0.6 m; "
              "warm water (35 °C) takes 0.6 m; NPSHR 3.3 m at 6.1 L/s");
    check_leading(&row.worst, "air at 1,402 m, less by 1.6 m");
}

static void test_why_of_a_main_and_a_tank(void **state)
{
    struct sl_station_row row = needy_station();

    (void)state;
    row.worst.source_basis = SL_SOURCE_PRESSURE_LOW;
    row.worst.flow_basis = SL_FLOW_RECORDED;
    row.worst.cases[SL_TYPICAL].terms.gauge = 21.04;
    row.worst.cases[SL_TYPICAL].terms.elevation = -1.21;
    check_why(&row.worst, SL_SI,
              "lowest pressure is worth 21.0 m at a gauge 1.2 m below the eye; "
              "NPSHR 6.3 m at 212 L/s (largest recorded flow)");
    row.worst.source_basis = SL_SOURCE_NORMAL;
    row.worst.cases[SL_TYPICAL].terms.gauge = 3.1;
    row.worst.cases[SL_TYPICAL].terms.elevation = 1.21;
    row.worst.flow_basis = SL_FLOW_SOLVED;
    check_why(&row.worst, SL_SI,
              "normal level leaves 1.2 m over the eye; gauge pressure adds "
              "3.1 m; NPSHR 6.3 m at 212 L/s");
    row.worst.cases[SL_TYPICAL].terms.gauge = -2.2;
    check_why(&row.worst, SL_SI,
              "normal level leaves 1.2 m over the eye; the vacuum over the "
              "water takes 2.2 m; NPSHR 6.3 m at 212 L/s");
    check_next_step(&row.worst, "confirm the lowest pressure over the water; "
                                "then look into raising it");
}

static void test_why_of_what_is_not_proven(void **state)
{
    struct sl_station_row row = unknown_station();

    (void)state;
    check_why(&row.worst, SL_SI,
              "the elevation of the impeller eye is unknown; NPSHR 5.2 m at "
              "412 L/s");
    check_next_step(&row.worst, "find out the elevation of the impeller eye");
    check_leading(&row.worst, "");
    row.worst.leading_unknown = NULL;
    check_next_step(&row.worst, "mend the records that were rejected "
                                "(findings.csv), then audit "
                                "again");
    row.worst.reason = "";
    row.worst.pump_id = NULL;
    check_why(&row.worst, SL_SI, "no pump of this station is on record");
    check_next_step(&row.worst, "add its pumps to the inventory");
}

static void test_a_need_that_is_unknown_is_told(void **state)
{
    struct sl_station_row row = needy_station();

    (void)state;
    row.worst.off_curve = true;
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++) {
        row.worst.cases[corner].npshr = NO_FIGURE;
        row.worst.cases[corner].margin = NO_FIGURE;
        row.worst.cases[corner].surplus = NO_FIGURE;
    }
    check_why(&row.worst, SL_SI,
              "low-level cut-out puts the water 3.4 m below the eye; NPSHR "
              "unknown at 212 L/s, past an end of its curve");
    row.worst.stands = true;
    row.worst.off_curve = false;
    row.worst.cases[SL_TYPICAL].flow = NO_FIGURE;
    check_why(&row.worst, SL_SI,
              "its curve cannot reach the discharge head; low-level cut-out "
              "puts the water 3.4 m below the eye; NPSHR unknown at an "
              "unknown flow");
}

static void test_the_favourable_case_stands_in(void **state)
{
    struct sl_station_row row = needy_station();

    (void)state;
    assert_int_equal(sl_words_corner(&row.worst), SL_TYPICAL);
    row.worst.cases[SL_TYPICAL].surplus = NO_FIGURE;
    assert_int_equal(sl_words_corner(&row.worst), SL_FAVOURABLE);
    row.worst.cases[SL_FAVOURABLE].surplus = NO_FIGURE;
    assert_int_equal(sl_words_corner(&row.worst), SL_TYPICAL);
}

static void test_next_step_follows_the_leading_term(void **state)
{
    struct sl_station_row row = needy_station();
    struct sl_terms *terms = &row.worst.cases[SL_TYPICAL].terms;

    (void)state;
    check_leading(&row.worst, "lift to the eye 3.4 m");
    check_next_step(&row.worst,
                    "confirm the eye's elevation and the lowest source level "
                    "on site; then look into a higher low-level cut-out");
    terms->elevation = 1.7;
    check_leading(&row.worst, "the pump's own need");
    check_next_step(&row.worst,
                    "ask the maker for NPSHR at the flow it runs at; then look "
                    "into running it at less flow");
    terms->friction = -1.9;
    check_leading(&row.worst, "suction losses 2.0 m");
    check_next_step(&row.worst,
                    "confirm the suction pipes and fittings on site; then look "
                    "into their losses and into how many pumps run together");
    row.worst.state = SL_CLEAR;
    check_next_step(&row.worst, "nothing under these conditions");
}

static const struct {
    int assumed, unknown;
    const char *want;
} confidences[] = {
    {0, 0, "nothing assumed"},
    {3, 0, "3 assumed"},
    {0, 2, "2 unknown"},
    {3, 1, "3 assumed, 1 unknown"},
};

static void test_confidence(void **state)
{
    struct sl_station_row row = needy_station();

    (void)state;
    for (size_t i = 0; i < COUNT(confidences); i++) {
        struct sl_text text = {0};

        row.worst.assumed = confidences[i].assumed;
        row.worst.unknown = confidences[i].unknown;
        sl_words_confidence(&row.worst, &text);
        check_string("confidence", sl_text_string(&text), confidences[i].want);
        sl_text_release(&text);
    }
}

static void test_case_in_words(void **state)
{
    struct sl_station_row row = needy_station();
    struct sl_text text = {0};

    (void)state;
    sl_words_case(&row.worst, &text);
    check_string("case", text.bytes,
                 "summer low, solved flow, low-level cut-out");
    sl_text_clear(&text);
    row.worst.flow_basis = SL_FLOW_NONE;
    row.worst.source_basis = SL_SOURCE_UNKNOWN;
    sl_words_case(&row.worst, &text);
    check_string("case", text.bytes,
                 "summer low, unknown flow, source unknown");
    sl_text_release(&text);
}

static void check_rule(double ratio, double floor, enum sl_unit_system units,
                       const char *want)
{
    struct sl_margin_rule rule = {
        .tiers = {{NAN, ratio, floor}}, .tier_count = 1, .lift_limit = NAN};
    struct sl_text text = {0};

    sl_words_rule(&rule, units, &text);
    check_string("rule", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void test_rule_in_words(void **state)
{
    (void)state;
    check_rule(1, 1.5, SL_SI, "NPSHA at least NPSHR + 1.5 m");
    check_rule(0, 1.524, SL_US, "NPSHA at least NPSHR + 5.0 ft");
    check_rule(1.35, 0, SL_SI, "NPSHA at least 1.35 × NPSHR");
    check_rule(1.35, 1.5, SL_SI,
               "NPSHA at least 1.35 × NPSHR, and at least NPSHR + 1.5 m");
    check_rule(1, 0, SL_SI, "NPSHA at least NPSHR, no margin asked");
    check_string("trust", sl_words_trust('O'), "the owner's own");
    check_string("trust", sl_words_trust('N'), "common practice, no source");
    check_string("trust", sl_words_trust('M'), "from memory, check the source");
    check_string("trust", sl_words_trust('?'), "trust not stated");
}

static void check_whole_rule(const struct sl_margin_rule *rule,
                             enum sl_unit_system units, const char *want)
{
    struct sl_text text = {0};

    sl_words_rule(rule, units, &text);
    check_string("rule", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void test_rule_with_tiers_in_words(void **state)
{
    struct sl_margin_rule rule = {
        .measure = SL_MEASURE_SUCTION_ENERGY,
        .tiers = {{NAN, 1.1, 0.6}, {1, 1.3, 1.5}, {1.5, 2, 1.5}},
        .tier_count = 3,
        .lift_limit = NAN};

    (void)state;
    check_whole_rule(
        &rule, SL_SI,
        "NPSHA at least 1.10 × NPSHR, and at least NPSHR + 0.6 m; where "
        "suction energy is over the start of high, 1.30 × NPSHR, and "
        "at least NPSHR + 1.5 m; where suction energy is over 1.5 times the "
        "start of high, 2.00 × NPSHR, and at least NPSHR + 1.5 m");
    rule.measure = SL_MEASURE_SUCTION_SPECIFIC_SPEED;
    rule.tiers[1] = (struct sl_margin_tier){7500, 1.2, 0};
    rule.tier_count = 2;
    check_whole_rule(
        &rule, SL_SI,
        "NPSHA at least 1.10 × NPSHR, and at least NPSHR + 0.6 m; where "
        "suction specific speed is over 7500 in US units, 1.20 × NPSHR");
    rule.measure = SL_MEASURE_SUCTION_LIFT;
    rule.tiers[0] = (struct sl_margin_tier){NAN, 1, 0};
    rule.tiers[1] = (struct sl_margin_tier){0, 1, 1.83};
    check_whole_rule(&rule, SL_US,
                     "NPSHA at least NPSHR, no margin asked; where there is "
                     "a suction lift, NPSHR + 6.0 ft");
    rule.tiers[1].over = 3.048;
    check_whole_rule(&rule, SL_US,
                     "NPSHA at least NPSHR, no margin asked; where there is "
                     "a suction lift over 10.0 ft, NPSHR + 6.0 ft");
    rule.tier_count = 1;
    rule.make_up = SL_SELF_PRIMING;
    rule.lift_limit = 6.7;
    check_whole_rule(&rule, SL_SI,
                     "for self-priming pumps alone: NPSHA at least NPSHR, no "
                     "margin asked; suction lift with its losses and NPSHR "
                     "together at most 6.7 m");
    rule.tier_count = 0;
    check_whole_rule(&rule, SL_SI, "a rule that the store no longer holds");
}

static void check_condition(const struct sl_condition *condition,
                            enum sl_unit_system units, const char *want)
{
    struct sl_text text = {0};

    sl_words_condition(condition, units, &text);
    check_string("condition", sl_text_string(&text), want);
    sl_text_release(&text);
}

static void test_condition_in_words(void **state)
{
    struct sl_condition condition = {
        .level = SL_LEVEL_RECORD_LOW,
        .level_addition = -0.4572,
        .discharge = SL_LEVEL_NORMAL,
        .pressure = SL_LEVEL_LOW,
        .summer_temperature = 1,
        .temperature_addition = 2.5,
        .suction_friction = SL_FRICTION_AGED,
        .discharge_friction = SL_FRICTION_NEW,
    };

    (void)state;
    check_condition(&condition, SL_US,
                    "source at its lowest recorded level - 1.5 ft, mains at "
                    "their lowest pressure, discharge at its normal level, "
                    "water at its summer temperature + 4.5 °F, standard "
                    "barometer, suction pipes at their age, discharge pipes "
                    "as laid");
    condition.level = SL_LEVEL_CUT_OUT;
    condition.level_addition = 0;
    condition.storm_barometer = 1;
    condition.suction_friction = SL_FRICTION_NEW;
    check_condition(&condition, SL_SI,
                    "source at its cut-out level, mains at their lowest "
                    "pressure, discharge at its normal level, water at its "
                    "summer temperature + 2.5 K, storm barometer, suction "
                    "pipes as laid, discharge pipes as laid");
}

static void test_every_state_says_what_it_means(void **state)
{
    (void)state;
    for (int one = 0; one < SL_STATE_COUNT; one++) {
        const char *meaning = sl_words_state((enum sl_state)one);

        assert_true(strlen(meaning) > 40);
        assert_int_equal(meaning[strlen(meaning) - 1], '.');
        for (int other = 0; other < one; other++)
            assert_string_not_equal(meaning,
                                    sl_words_state((enum sl_state)other));
    }
}

/* --- tables -------------------------------------------------------------- */

static const struct {
    const char *text;
    const char *want;
} cell_texts[] = {
    {"Alder Brook", "Alder Brook"},
    {"Brook, upper", "\"Brook, upper\""},
    {"the \"old\" one", "\"the \"\"old\"\" one\""},
    {"two\r\nlines", "\"two\r\nlines\""},
    {"=1+1", "'=1+1"},
    {"+44", "'+44"},
    {"-3", "'-3"},
    {"@x", "'@x"},
    {"\tx", "'\tx"},
    {"\rx", "\"'\rx\""},
    {"=HYPERLINK(\"x\",\"y\")", "\"'=HYPERLINK(\"\"x\"\",\"\"y\"\")\""},
    {"0107", "0107"},
    {"\x1B[2J\x7F", "\u241B[2J\u2421"},
    {"\xC2\x9B"
     "2J, \xC2\x80\xC2\xA0",
     "\"\uFFFD2J, \uFFFD\u00A0\""},
    {NULL, ""},
};

static void test_text_cells(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(cell_texts); i++) {
        struct capture capture;
        struct sl_cells cells = {0};

        capture_begin(&capture);
        cells.stream = capture.stream;
        sl_cell_text(&cells, "name", cell_texts[i].text);
        check_string("cell", captured(&capture), cell_texts[i].want);
        free(capture.bytes);
    }
}

static void check_cell_number(enum sl_quantity quantity,
                              enum sl_unit_system units, double si,
                              const char *want)
{
    struct capture capture;
    struct sl_cells cells = {.units = units};

    capture_begin(&capture);
    cells.stream = capture.stream;
    sl_cell_number(&cells, "name", quantity, si);
    check_string("cell", captured(&capture), want);
    free(capture.bytes);
}

static void test_number_cells(void **state)
{
    (void)state;
    check_cell_number(SL_LENGTH, SL_SI, -2.3854, "-2.385");
    check_cell_number(SL_LENGTH, SL_US, 0.3048, "1.000");
    check_cell_number(SL_LENGTH, SL_SI, -0.0004, "0.000");
    check_cell_number(SL_LENGTH, SL_SI, (double)NAN, "");
    check_cell_number(SL_LENGTH, SL_SI, (double)INFINITY, "");
    check_cell_number(SL_FLOW, SL_SI, 1.234567, "1234.57");
    check_cell_number(SL_TEMPERATURE, SL_SI, 297.19, "24.0");
    check_cell_number(SL_TEMPERATURE, SL_US, 297.15, "75.2");
    check_cell_number(SL_PURE, SL_SI, 0.123456789, "0.123457");
    check_cell_number(SL_PURE, SL_SI, -0.0, "0");
    check_cell_number(SL_PURE, SL_SI, (double)NAN, "");
}

/* Cells of the line at `*at`, quotes minded; moves to the next line. */
static size_t count_cells(const char **at)
{
    bool quoted = false;
    size_t count = 1;

    for (; **at != '\0'; (*at)++) {
        if (**at == '"')
            quoted = !quoted;
        if (!quoted && **at == ',')
            count++;
        if (!quoted && strncmp(*at, "\r\n", 2) == 0) {
            *at += 2;
            return count;
        }
    }
    fail_msg("the line does not end in CRLF");
    return 0;
}

static void check_two_lines(struct capture *capture, size_t least)
{
    const char *at = captured(capture);
    size_t head = count_cells(&at);
    size_t row = count_cells(&at);

    assert_true(head >= least);
    assert_int_equal(head, row);
    assert_string_equal(at, "");
}

static struct sl_station_row hostile_station(void)
{
    struct sl_station_row row = needy_station();

    row.worst.station_name = "=a,\"b\"\r\n<i>c</i>\u202E";
    row.worst.station_id = "\"</td><script>x</script>";
    row.worst.pump_id = "<b onload=x>&";
    row.worst.condition = "summer, \"low\"";
    row.worst.reason = "-because";
    fill_sets(&row.worst);
    row.worst.running_set = "=with <b onload=y>";
    row.worst.one_out_set = "+<b onload=z>";
    row.worst.stands_set = "<i>c";
    return row;
}

static const struct sl_unknown_row hostile_unknown = {
    .rank = 1,
    .station_id = "<s>",
    .station_name = "a,b",
    .pump_id = "\"p\"",
    .condition = "summer low",
    .likely = SL_UNPROVEN,
    .input = SL_IN_SUCTION_BORE,
    .provenance = SL_ASSUMED,
    .value = {0.4, 0.35, (double)NAN},
    .swing = (double)NAN,
    .people_served = (double)NAN,
    .what = "<u>a default</u>",
};

static void test_head_and_row_have_the_same_cells(void **state)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_summary summary = summary_of(NULL);
    struct sl_table_writer writer = {NULL, SL_SI, &summary, &vocabularies};
    struct sl_station_row station = hostile_station();
    struct sl_finding finding = {
        "number-form", SL_ERROR, "pumps.csv", 12,           "rated_flow_gpm",
        "P-1",         "1,500",  "a comma",   "take it out"};
    struct capture capture;

    (void)state;
    capture_begin(&capture);
    writer.stream = capture.stream;
    sl_table_stations_head(&writer);
    sl_table_station(&writer, &station);
    check_two_lines(&capture, 30);
    free(capture.bytes);
    capture_begin(&capture);
    writer.stream = capture.stream;
    sl_table_pumps_head(&writer);
    sl_table_pump(&writer, &station.worst);
    check_two_lines(&capture, 40);
    free(capture.bytes);
    capture_begin(&capture);
    writer.stream = capture.stream;
    sl_table_unknowns_head(&writer);
    sl_table_unknown(&writer, &hostile_unknown);
    check_two_lines(&capture, 15);
    free(capture.bytes);
    capture_begin(&capture);
    writer.stream = capture.stream;
    sl_table_findings_head(&writer);
    sl_table_finding(&writer, &finding);
    check_two_lines(&capture, 9);
    free(capture.bytes);
}

static void test_ranked_stations_golden(void **state)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_summary summary = summary_of(NULL);
    struct sl_table_writer writer = {NULL, SL_SI, &summary, &vocabularies};
    struct sl_station_row station = high_lift_station();
    struct capture capture;

    (void)state;
    summary.inventory_sha256 = "3f9a";
    capture_begin(&capture);
    writer.stream = capture.stream;
    sl_table_stations_head(&writer);
    sl_table_station(&writer, &station);
    check_string(
        "ranked-stations.csv", captured(&capture),
        "rank,block,state,station_id,name,service,installation,likely,pump_id,"
        "condition,running_set,flow_basis,source_basis,shortfall_m,margin_m,"
        "margin_adverse_m,margin_favourable_m,npsha_m,npshr_m,required_m,"
        "flow_l_s,flags,why,next_step,inputs_recorded,inputs_derived,"
        "inputs_assumed,inputs_unknown,people_served,pumps,pumps_rejected,"
        "pumps_short,"
        "pumps_thin,pumps_unproven,pumps_clear,latitude,longitude,"
        "stations_csv_line,margin_rule,margin_rule_trust,year,vintage,"
        "inventory_sha256\r\n"
        "1,at risk,short,0107,Juniper Draw,raw water,dry pit,short,P-2,"
        "summer low,,rated,low-level cut-out,2.220,-0.720,-1.020,-0.420,3.360,"
        "4.080,5.580,95.30,,\"low-level cut-out puts the water 3.4 m below the "
        "eye; air at 1,830 m is worth only 8.3 m; suction losses take 1.2 m; "
        "NPSHR 4.1 m at 95 L/s (rated flow)\",confirm the eye's elevation and "
        "the lowest source level on site; then look into a higher low-level "
        "cut-out,14,2,3,0,184200,3,0,2,0,0,1,41.203817,-104.824610,2,"
        "fixed head,\"common practice, no source\",2026,2026,3f9a\r\n");
    free(capture.bytes);
}

/* --- the page ------------------------------------------------------------ */

static const struct sl_condition summer_low = {
    .condition = "summer low",
    .level = SL_LEVEL_LOW,
    .discharge = SL_LEVEL_LOW,
    .pressure = SL_LEVEL_LOW,
    .summer_temperature = 1,
    .storm_barometer = 1,
    .suction_friction = SL_FRICTION_AGED,
    .discharge_friction = SL_FRICTION_NEW,
};

/* A page of these stations, and of hostile rows when there are any. */
static void write_page(struct capture *capture,
                       const struct sl_station_row *rows, size_t count)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_summary summary = summary_of(&summer_low);
    struct sl_report report = {.summary = &summary,
                               .vocabularies = &vocabularies,
                               .tables = &sample_tables};
    struct sl_set_aside_row aside = {"<f>.csv", 0, "", SL_REJECTED, "<r>"};
    struct sl_default_row standard = {
        {"<d>", "<c>", {1.5, 2.5, 0.5}, SL_LENGTH, "<source>", 'S'}, 1318};

    capture_begin(capture);
    report.stream = capture->stream;
    if (count > 0)
        summary.label = "<label>\"";
    sl_report_begin(&report);
    sl_report_begin_ranked(&report);
    for (size_t i = 0; i < count; i++)
        sl_report_station(&report, &rows[i]);
    sl_report_begin_unknowns(&report);
    if (count > 0)
        sl_report_unknown(&report, &hostile_unknown);
    sl_report_begin_terms(&report);
    for (size_t i = 0; i < count; i++)
        sl_report_pump(&report, &rows[i].worst);
    sl_report_begin_set_aside(&report);
    if (count > 0)
        sl_report_set_aside(&report, &aside);
    sl_report_begin_defaults(&report);
    if (count > 0)
        sl_report_default(&report, &standard);
    sl_report_end(&report);
    captured(capture);
}

static void test_a_small_value_is_not_shown_as_zero(void **state)
{
    static const struct {
        enum sl_quantity quantity;
        enum sl_unit_system units;
        struct sl_interval value;
        const char *want;
    } cases[] = {
        {SL_LENGTH, SL_SI, {0.023, 0.12, 0}, "0.02&nbsp;m (0.12 … 0.00)"},
        {SL_LENGTH, SL_US, {0.023, 0.12, 0}, "0.1&nbsp;ft (0.4 … 0.0)"},
        {SL_LENGTH, SL_SI, {1.52, 2.31, 0}, "1.5&nbsp;m (2.3 … 0.0)"},
        {SL_BORE,
         SL_SI,
         {0.25, 0.25, 0.0000015},
         "250.000&nbsp;mm (250.000 … 0.002)"},
        {SL_BORE, SL_SI, {NAN, 0.00123, NAN}, "unknown (1 … unknown)"},
        {SL_TEMPERATURE,
         SL_US,
         {255.372222, 273.15, 255.37},
         "0.0&nbsp;°F (32.0 … 0.0)"},
    };

    (void)state;
    for (size_t i = 0; i < COUNT(cases); i++) {
        struct capture capture;
        struct sl_report report = {.units = cases[i].units};
        struct sl_text want = {0};
        const char *range = strchr(cases[i].want, '(');

        capture_begin(&capture);
        report.stream = capture.stream;
        sl_page_interval(&report, cases[i].quantity, &cases[i].value);
        sl_text_add(&want, cases[i].want, (size_t)(range - cases[i].want));
        sl_text_addf(&want, "<span class=\"range\">%s</span>", range);
        check_string("interval", captured(&capture), want.bytes);
        sl_text_release(&want);
        free(capture.bytes);
    }
}

static void check_paired(const char *page, const char *open, const char *close,
                         size_t least)
{
    assert_int_equal(occurrences(page, open), occurrences(page, close));
    assert_true(occurrences(page, open) >= least);
}

static void check_sound(const char *page)
{
    check_paired(page, "<section", "</section>", 9);
    check_paired(page, "<table", "</table>", 1);
    check_paired(page, "<tr", "</tr>", 6);
    check_paired(page, "<div", "</div>", 1);
    check_paired(page, "<bdi>", "</bdi>", 2);
    check_paired(page, "<small", "</small>", 0);
    assert_int_equal(occurrences(page, "<h1"), 1);
    assert_int_equal(occurrences(page, "<main"), 1);
    assert_int_equal(occurrences(page, "<table"),
                     occurrences(page, "<caption>"));
    assert_int_equal(occurrences(page, "<script"), 0);
    assert_int_equal(occurrences(page, "http"), 1); /* http-equiv */
    assert_int_equal(occurrences(page, ">nan"), 0);
    assert_int_equal(occurrences(page, "inf</"), 0);
    assert_int_equal(occurrences(page, "<html lang=\"en\">"), 1);
}

static void test_an_empty_page_says_so(void **state)
{
    static const char *const sentences[] = {
        "No station is at risk under these conditions.",
        "No station is clear under these conditions.",
        "No station is unproven: the records settle every one.",
        "No pump is unproven, so there is nothing to find out.",
        "No pump is at risk under these conditions, so no balance is shown.",
        "No record was rejected and none is out of scope.",
        "No value was assumed: every one used is recorded or derived.",
    };
    struct capture capture;

    (void)state;
    write_page(&capture, NULL, 0);
    check_sound(capture.bytes);
    for (size_t i = 0; i < COUNT(sentences); i++)
        if (occurrences(capture.bytes, sentences[i]) != 1)
            fail_msg("not once on an empty page: %s", sentences[i]);
    free(capture.bytes);
}

static void test_a_hostile_inventory_stays_text(void **state)
{
    struct sl_station_row rows[3] = {hostile_station(), hostile_station(),
                                     hostile_station()};
    static const char *const never[] = {
        "<i>c",    "<b onload", "<s>",          "<u>a",     "<f>",
        "<r>",     "<d>",       "<c>",          "<b>board", "<source>",
        "<label>", "\u202E",    "</td><script",
    };
    struct capture capture;

    (void)state;
    rows[1].state = rows[1].worst.state = SL_CLEAR;
    rows[2].state = rows[2].worst.state = SL_UNPROVEN;
    write_page(&capture, rows, COUNT(rows));
    check_sound(capture.bytes);
    for (size_t i = 0; i < COUNT(never); i++)
        if (strstr(capture.bytes, never[i]))
            fail_msg("reached the page raw: %s", never[i]);
    assert_non_null(strstr(capture.bytes, "=a,&quot;b&quot;\u240D\u240A"
                                          "&lt;i&gt;c&lt;/i&gt;\uFFFD"));
    free(capture.bytes);
}

static void test_a_page_tells_the_audit(void **state)
{
    struct sl_station_row rows[] = {high_lift_station(), unknown_station()};
    struct capture capture;
    const char *page;

    (void)state;
    write_page(&capture, rows, COUNT(rows));
    page = capture.bytes;
    assert_non_null(strstr(page, "5 of 15 stations are established to be at "
                                 "risk of cavitation under the conditions "
                                 "audited. What is on "
                                 "record does not settle 4 more."));
    assert_non_null(
        strstr(page, "<b>2</b> stations <span class=\"state short"));
    assert_non_null(
        strstr(page, "<b>6</b> stations <span class=\"state clear"));
    assert_non_null(strstr(page, "8\u202F701 read = 8\u202F638 kept + 42 "
                                 "rejected + 21 out of scope"));
    assert_non_null(strstr(page, ">3f9a1c07be52</code>"));
    assert_int_equal(occurrences(page, "3f9a1c07be52d8844f60aa1be7c35d9210c4e6"
                                       "f8a7b3d592e1f06c8d4b7a9350"),
                     2);
    assert_non_null(strstr(page, "(common practice, no source): NPSHA at "
                                 "least NPSHR + 1.5 m; <a"));
    assert_non_null(strstr(page, "<b>2.2&nbsp;m</b>"));
    assert_non_null(strstr(page, ">2.5 … 1.9</small>"));
    assert_non_null(strstr(page, "184\u202F200"));
    assert_non_null(strstr(page, "\u22123.42"));
    assert_non_null(strstr(page, "1.5&nbsp;m <span class=\"range\">(2.5 … 0.5)"
                                 "</span>"));
    assert_non_null(strstr(page, ">no bound<"));
    free(capture.bytes);
}

static void test_blocks_come_in_order(void **state)
{
    struct sl_station_row rows[] = {high_lift_station(), needy_station(),
                                    unknown_station()};
    struct capture capture;
    const char *at;
    static const char *const order[] = {
        "id=\"at-risk\"",  "Juniper Draw",        "Lower Quillfeather",
        "id=\"clear\"",    "No station is clear", "id=\"find-out\"",
        "Saltmarsh Gate",  "id=\"terms\"",        "id=\"records\"",
        "id=\"defaults\"", "id=\"words\"",        "<footer>",
    };

    (void)state;
    write_page(&capture, rows, COUNT(rows));
    at = capture.bytes;
    for (size_t i = 0; i < COUNT(order); i++) {
        at = strstr(at, order[i]);
        if (!at)
            fail_msg("missing or out of order: %s", order[i]);
    }
    free(capture.bytes);
}

static void test_a_very_long_name(void **state)
{
    struct sl_station_row row = needy_station();
    char *name = malloc(100001);
    struct capture capture;

    (void)state;
    assert_non_null(name);
    memset(name, '<', 100000);
    name[100000] = '\0';
    row.worst.station_name = name;
    write_page(&capture, &row, 1);
    check_sound(capture.bytes);
    assert_int_equal(occurrences(capture.bytes, "&lt;&lt;&lt;&lt;"),
                     2 * 100000 / 4);
    free(capture.bytes);
    free(name);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_text_is_escaped),
        cmocka_unit_test(test_no_text_writes_nothing),
        cmocka_unit_test(test_every_byte_is_safe),
        cmocka_unit_test(test_numbers_on_the_page),
        cmocka_unit_test(test_decimals_leave_three_digits),
        cmocka_unit_test(test_why_names_what_takes_most),
        cmocka_unit_test(test_why_names_three_terms_at_most),
        cmocka_unit_test(test_why_of_a_main_and_a_tank),
        cmocka_unit_test(test_why_of_what_is_not_proven),
        cmocka_unit_test(test_a_need_that_is_unknown_is_told),
        cmocka_unit_test(test_the_favourable_case_stands_in),
        cmocka_unit_test(test_next_step_follows_the_leading_term),
        cmocka_unit_test(test_confidence),
        cmocka_unit_test(test_case_in_words),
        cmocka_unit_test(test_rule_in_words),
        cmocka_unit_test(test_rule_with_tiers_in_words),
        cmocka_unit_test(test_condition_in_words),
        cmocka_unit_test(test_every_state_says_what_it_means),
        cmocka_unit_test(test_text_cells),
        cmocka_unit_test(test_number_cells),
        cmocka_unit_test(test_head_and_row_have_the_same_cells),
        cmocka_unit_test(test_ranked_stations_golden),
        cmocka_unit_test(test_a_small_value_is_not_shown_as_zero),
        cmocka_unit_test(test_an_empty_page_says_so),
        cmocka_unit_test(test_a_hostile_inventory_stays_text),
        cmocka_unit_test(test_a_page_tells_the_audit),
        cmocka_unit_test(test_blocks_come_in_order),
        cmocka_unit_test(test_a_very_long_name),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
