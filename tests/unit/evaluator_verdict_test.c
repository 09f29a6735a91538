/* What is said beside the state: how many inputs are known, which unknown
 * matters most and why, and which pump stands for its station. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "unit/evaluator_fixture.h"

static int applying(const struct sl_pump_result *pump)
{
    int count = 0;

    for (int i = 0; i < SL_INPUT_COUNT; i++)
        count += pump->inputs[i].applies;
    return count;
}

static int counted(const struct sl_pump_result *pump)
{
    return pump->counts[SL_UNKNOWN] + pump->counts[SL_RECORDED] +
           pump->counts[SL_DERIVED] + pump->counts[SL_ASSUMED];
}

static void counts_follow_what_is_forgotten(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump = summer(f);

    /* Recorded: elevation, barometer, kind, level, datum, water, length,
     * bore, wall, fittings, discharge level and loss, NPSHR; derived: the
     * flow and, without a higher one, the speed. */
    assert_int_equal(pump->counts[SL_RECORDED], 13);
    assert_int_equal(pump->counts[SL_DERIVED], 2);
    assert_int_equal(counted(pump), applying(pump));

    forget(&f->dossier.record.water_temp_summer);
    forget(&f->pipes[0].record.roughness);
    forget(&f->pumps[0].record.datum_elevation);
    forget(&f->dossier.record.cut_out_level);
    pump = summer(f);
    assert_int_equal(pump->counts[SL_RECORDED], 9);
    /* The level that stands in has no bound: it counts as unknown. */
    assert_int_equal(pump->counts[SL_DERIVED], 2);
    assert_int_equal(pump->counts[SL_ASSUMED], 2);
    assert_int_equal(pump->counts[SL_UNKNOWN], 2);
    assert_int_equal(counted(pump), applying(pump));
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        assert_int_equal(pump->inputs[i].id, i);
}

static void inputs_point_to_their_records(void **state)
{
    static const struct {
        enum sl_input_id id;
        enum sl_kind kind;
        long line;
    } rows[] = {
        {SL_IN_SITE_ELEVATION, SL_KIND_STATION, 17},
        {SL_IN_BAROMETER, SL_KIND_STATION, 17},
        {SL_IN_SOURCE_KIND, SL_KIND_STATION, 17},
        {SL_IN_SOURCE_LEVEL, SL_KIND_STATION, 17},
        {SL_IN_DATUM, SL_KIND_PUMP, 23},
        {SL_IN_TEMPERATURE, SL_KIND_STATION, 17},
        {SL_IN_SUCTION_LENGTH, SL_KIND_PIPE, 31},
        {SL_IN_SUCTION_BORE, SL_KIND_PIPE, 31},
        {SL_IN_SUCTION_ROUGHNESS, SL_KIND_PIPE, 31},
        {SL_IN_DISCHARGE_LEVEL, SL_KIND_STATION, 17},
        {SL_IN_DISCHARGE_LOSS, SL_KIND_STATION, 17},
        {SL_IN_SPEED, SL_KIND_PUMP, 23},
        {SL_IN_NPSHR, SL_KIND_CURVE, 51},
    };
    struct fixture *f = *state;
    const struct sl_pump_result *pump = summer(f);

    for (size_t i = 0; i < COUNT(rows); i++) {
        const struct sl_input *input = &pump->inputs[rows[i].id];

        if (input->kind != rows[i].kind || input->line != rows[i].line)
            fail_msg("%s: kind %d line %ld, want kind %d line %ld",
                     sl_input_words(rows[i].id), (int)input->kind, input->line,
                     (int)rows[i].kind, rows[i].line);
    }
}

static void assumed_inputs_point_to_their_default(void **state)
{
    struct fixture *f = *state;
    const struct sl_default *row;

    f->dossier.record.service = SL_WASTEWATER;
    row = summer(f)->inputs[SL_IN_GAS].row;
    assert_non_null(row);
    assert_string_equal(row->field, "gas_allowance");
    assert_string_equal(row->circumstance, "wastewater");
    f->dossier.record.service = 0;
    row = summer(f)->inputs[SL_IN_GAS].row;
    assert_string_equal(row->circumstance, "");
}

/* Leave pump A this surplus in summer at the typical values. */
static void leave_surplus(struct fixture *f, double surplus)
{
    f->pumps[0].record.datum_elevation.value +=
        summer(f)->cases[SL_TYPICAL].surplus - surplus;
}

/* The swing of an unknown head is the head. */
static void swing_is_what_an_unknown_is_worth(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;
    double air = sl_standard_atmosphere(312.4) / weight(299.35);

    f->dossier.record.service = SL_WASTEWATER;
    forget(&f->dossier.record.barometer_low);
    leave_surplus(f, 0.05);
    pump = summer(f);
    check_state("gas and barometer", pump, SL_UNPROVEN, SL_CLEAR);
    check_close("gas", pump->inputs[SL_IN_GAS].swing, 0.6, 1e-9, 0);
    check_close("barometer", pump->inputs[SL_IN_BAROMETER].swing, 0.03 * air,
                1e-9, 0);
    check_close("known", pump->inputs[SL_IN_DATUM].swing, 0, 0, 0);
    assert_false(pump->inputs[SL_IN_DATUM].settles);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_GAS]);
    assert_non_null(strstr(pump->reason, "the gas allowance most"));
}

static void unknown_settles_when_it_alone_decides(void **state)
{
    static const struct {
        double surplus;
        bool gas, barometer;
        const char *says;
    } rows[] = {
        /* Gas is worth 0.6 m from its typical value, the barometer +0.20
         * and -0.10 m. */
        {0.05, true, true, "either could clear it"},
        {-0.17, true, true, "either could show it thin or clear"},
        {-0.43, true, false, "the barometer cannot clear it"},
        {-0.57, true, true, "the barometer could still show it thin"},
        {-0.63, true, true, "only both at their best clear it"},
    };
    struct fixture *f = *state;

    f->dossier.record.service = SL_WASTEWATER;
    forget(&f->dossier.record.barometer_low);
    for (size_t i = 0; i < COUNT(rows); i++) {
        const struct sl_pump_result *pump;
        bool gas, barometer;

        leave_surplus(f, rows[i].surplus);
        pump = summer(f);
        gas = pump->inputs[SL_IN_GAS].settles;
        barometer = pump->inputs[SL_IN_BAROMETER].settles;
        if (pump->state != SL_UNPROVEN || gas != rows[i].gas ||
            barometer != rows[i].barometer)
            fail_msg("%s: %s, gas %d, barometer %d", rows[i].says,
                     sl_state_name(pump->state), gas, barometer);
    }
}

static void nothing_is_weighed_once_the_state_stands(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.service = SL_WASTEWATER;
    pump = summer(f);
    check_state("clear", pump, SL_CLEAR, SL_CLEAR);
    assert_null(pump->leading_unknown);
    check_close("swing", pump->inputs[SL_IN_GAS].swing, 0, 0, 0);
}

static void only_unknown_without_bound_leads_and_settles(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.service = SL_WASTEWATER;
    forget(&f->pumps[0].record.datum_elevation);
    pump = summer(f);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_DATUM]);
    assert_true(pump->leading_unknown->settles);
    check_nan("swing", pump->leading_unknown->swing);
    assert_false(pump->inputs[SL_IN_GAS].settles);
    assert_string_equal(pump->reason,
                        "the elevation of the impeller eye is not known");
}

/* Two without bound: neither settles alone, and one of them still leads. */
static void two_unknowns_without_bound_are_both_named(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.service = SL_WASTEWATER;
    forget(&f->dossier.record.barometer_low);
    forget(&f->pumps[0].record.datum_elevation);
    for (int i = 0; i < POINTS; i++)
        forget(&f->points[i].npshr);
    pump = summer(f);
    assert_string_equal(pump->reason, "the elevation of the impeller eye and "
                                      "NPSHR at the flow it runs at are not "
                                      "known");
    assert_false(pump->inputs[SL_IN_DATUM].settles);
    assert_false(pump->inputs[SL_IN_NPSHR].settles);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_DATUM]);
}

static void level_that_stands_in_is_the_reason(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget(&f->dossier.record.cut_out_level);
    pump = summer(f);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_SOURCE_LEVEL]);
    assert_true(pump->leading_unknown->settles);
    assert_non_null(strstr(pump->reason, "the source level: the lowest "
                                         "on record stands in"));
}

static void curve_left_at_the_adverse_end_is_the_reason(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget(&f->dossier.record.discharge_loss_flow);
    f->dossier.record.discharge_length = known(1630);
    f->dossier.record.discharge_bore = known(0.263);
    f->dossier.record.discharge_low = known(307.3);
    pump = summer(f);
    assert_false(pump->off_curve);
    check_state("adverse end", pump, SL_UNPROVEN, SL_CLEAR);
    assert_non_null(strstr(pump->reason, "at the adverse end"));
    assert_ptr_equal(pump->leading_unknown,
                     &pump->inputs[SL_IN_DISCHARGE_LOSS]);
}

/* The main's pipe known, its roughness and fittings not. */
static void forget_the_mains_loss(struct fixture *f)
{
    forget(&f->dossier.record.discharge_loss_flow);
    f->dossier.record.discharge_length = known(600);
    f->dossier.record.discharge_bore = known(0.12);
}

/* Its likely flow lies before the curve's first point, its largest does
 * not: that one is clear, and its NPSHR is not known all the same. */
static void pump_whose_likely_npshr_is_unknown_is_not_clear(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget_the_mains_loss(f);
    f->dossier.record.discharge_low = known(338);
    pump = summer(f);
    assert_true(pump->off_curve);
    assert_true(pump->cases[SL_ADVERSE].surplus > 0);
    check_state("off the curve", pump, SL_UNPROVEN, SL_UNPROVEN);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_NPSHR]);
}

/* Without a flow the main's loss has no figure; it is not what lacks. */
static void pump_that_stands_leads_with_its_flow(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget_the_mains_loss(f);
    f->points[0].flow = known(0);
    f->dossier.record.discharge_low = known(345);
    pump = summer(f);
    assert_true(pump->stands);
    check_nan("loss", pump->inputs[SL_IN_DISCHARGE_LOSS].value.adverse);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_FLOW]);
    assert_true(pump->leading_unknown->settles);
    assert_int_equal(pump->counts[SL_UNKNOWN], 1);
}

/* --- conditions and stations ---------------------------------------------- */

static void each_condition_takes_its_own_figures(void **state)
{
    struct fixture *f = *state;
    const struct sl_station_result *result = judge(f);
    const struct sl_pump_result *normal = &result->conditions[0].pumps[0];
    const struct sl_pump_result *low = &result->conditions[1].pumps[0];

    assert_int_equal(result->condition_count, 2);
    assert_ptr_equal(result->dossier, &f->dossier);
    assert_ptr_equal(result->conditions[0].condition, &conditions[0]);
    assert_ptr_equal(result->conditions[1].condition, &conditions[1]);
    check_close("usual level", normal->inputs[SL_IN_SOURCE_LEVEL].value.typical,
                301.2, 0, 0);
    check_close("low level", low->inputs[SL_IN_SOURCE_LEVEL].value.typical,
                298.35, 0, 0);
    check_close("usual water", normal->inputs[SL_IN_TEMPERATURE].value.typical,
                286.75, 0, 0);
    check_close("summer water", low->inputs[SL_IN_TEMPERATURE].value.typical,
                299.35, 0, 0);
    check_close("usual discharge",
                normal->inputs[SL_IN_DISCHARGE_LEVEL].value.typical, 329.1, 0,
                0);
    check_close("low discharge",
                low->inputs[SL_IN_DISCHARGE_LEVEL].value.typical, 327.3, 0, 0);
    assert_ptr_equal(result->worst, low);
    assert_ptr_equal(result->worst_condition, &result->conditions[1]);
    assert_int_equal(result->state, SL_CLEAR);
}

static void station_without_pumps_has_no_worst(void **state)
{
    struct fixture *f = *state;
    const struct sl_station_result *result;

    f->dossier.pump_count = 0;
    result = judge(f);
    assert_null(result->worst);
    assert_null(result->worst_condition);
    assert_int_equal(result->state, SL_UNPROVEN);
    assert_int_equal(result->conditions[0].pump_count, 0);
}

/* Give a pump a surplus in summer by its datum. */
static void lay(struct fixture *f, int pump, double surplus)
{
    judge(f);
    f->pumps[pump].record.datum_elevation.value +=
        f->result.conditions[1].pumps[pump].cases[SL_TYPICAL].surplus - surplus;
}

static void worst_goes_by_state_then_likely_then_surplus(void **state)
{
    struct fixture *f = *state;

    f->dossier.pump_count = 3;
    lay(f, 0, 1.31);
    lay(f, 1, 0.73);
    lay(f, 2, 0.91);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[1]);
    assert_int_equal(f->result.state, SL_CLEAR);

    /* Unproven goes before clear, whatever the surplus. */
    forget(&f->pipes[0].record.length);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[0]);
    assert_int_equal(f->result.state, SL_UNPROVEN);

    /* Likely thin goes before likely clear. */
    forget(&f->pipes[2].record.length);
    lay(f, 2, -0.17);
    lay(f, 0, 0.23);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[2]);
    assert_int_equal(f->result.worst->likely, SL_THIN);

    /* Thin goes before unproven, short before thin. */
    lay(f, 1, -0.37);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[1]);
    assert_int_equal(f->result.state, SL_THIN);
    lay(f, 0, -9.1);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[0]);
    assert_int_equal(f->result.state, SL_SHORT);
}

/* An unproven pump whose likely state is not known comes after one that is
 * likely thin. */
static void unknown_likely_comes_after_likely_thin(void **state)
{
    struct fixture *f = *state;

    f->dossier.pump_count = 2;
    forget(&f->pumps[0].record.datum_elevation);
    forget(&f->pipes[1].record.length);
    lay(f, 1, -0.17);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[1]);
    assert_int_equal(f->result.worst->likely, SL_THIN);
}

/* Of two that are short the one without a likely figure comes after. */
static void short_without_a_figure_comes_after_one_with(void **state)
{
    struct fixture *f = *state;

    f->dossier.pump_count = 2;
    forget(&f->pumps[0].record.datum_elevation);
    f->pumps[0].record.inlet_elevation = known(314.6);
    f->pumps[0].record.make_up = SL_SUBMERSIBLE;
    lay(f, 1, -1.73);
    assert_ptr_equal(judge(f)->worst->pump, &f->pumps[1]);
    check_nan("no likely figure",
              f->result.conditions[1].pumps[0].cases[SL_TYPICAL].surplus);
    check_state("by its lip", &f->result.conditions[1].pumps[0], SL_SHORT,
                SL_SHORT);
}

/* Conditions are listed mildest first: of equals the harshest is shown. */
static void ties_go_to_the_first_pump_and_last_condition(void **state)
{
    struct fixture *f = *state;
    struct sl_condition twice[] = {conditions[1], conditions[1]};

    f->dossier.pump_count = 3;
    f->tables.conditions = twice;
    judge(f);
    assert_ptr_equal(f->result.worst->pump, &f->pumps[0]);
    assert_ptr_equal(f->result.worst_condition, &f->result.conditions[1]);
}

#define TEST(test)                                                             \
    cmocka_unit_test_setup_teardown(test, fixture_setup, fixture_teardown)

/* A bounded unknown decides, but the given flow has no bound: that is told,
 * not how the search for one ended. */
static void reason_tells_what_lacks_a_bound(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    fix_flow(f, 0.0613);
    f->dossier.record.service = SL_WASTEWATER; /* with gas, or without */
    f->pumps[0].record.datum_elevation.value +=
        summer(f)->cases[SL_TYPICAL].surplus + 0.001;
    a = summer(f);
    check_state("gas", a, SL_UNPROVEN, SL_THIN);
    if (strncmp(a->reason, "the flow it really runs at: ", 28) != 0)
        fail_msg("reason: %s", a->reason);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        TEST(counts_follow_what_is_forgotten),
        TEST(inputs_point_to_their_records),
        TEST(assumed_inputs_point_to_their_default),
        TEST(swing_is_what_an_unknown_is_worth),
        TEST(unknown_settles_when_it_alone_decides),
        TEST(nothing_is_weighed_once_the_state_stands),
        TEST(only_unknown_without_bound_leads_and_settles),
        TEST(two_unknowns_without_bound_are_both_named),
        TEST(reason_tells_what_lacks_a_bound),
        TEST(level_that_stands_in_is_the_reason),
        TEST(curve_left_at_the_adverse_end_is_the_reason),
        TEST(pump_whose_likely_npshr_is_unknown_is_not_clear),
        TEST(pump_that_stands_leads_with_its_flow),
        TEST(each_condition_takes_its_own_figures),
        TEST(station_without_pumps_has_no_worst),
        TEST(worst_goes_by_state_then_likely_then_surplus),
        TEST(unknown_likely_comes_after_likely_thin),
        TEST(short_without_a_figure_comes_after_one_with),
        TEST(ties_go_to_the_first_pump_and_last_condition),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
