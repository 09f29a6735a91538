/* The head balance of one station: each term, for each kind of source. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "unit/evaluator_fixture.h"

static const double summer_kelvin = 299.35, normal_kelvin = 286.75;

static const struct sl_terms *typical_terms(struct fixture *f, int condition)
{
    return &judge_a(f, condition)->cases[SL_TYPICAL].terms;
}

static void open_source_has_air_level_and_losses(void **state)
{
    struct fixture *f = *state;
    const struct sl_terms *terms;
    double friction, minor, w = weight(summer_kelvin);

    fix_flow(f, 0.0571);
    terms = typical_terms(f, CONDITION_SUMMER);
    friction = friction_of(0.0571, suction_length, suction_bore, suction_wall,
                           summer_kelvin);
    minor = minor_of(0.0571, suction_bore, suction_k);
    check_close("air", terms->atmosphere, sl_standard_atmosphere(312.4) / w,
                1e-12, 0);
    check_close("gauge", terms->gauge, 0, 0, 0);
    check_close("elevation", terms->elevation, 298.35 - 296.85, 1e-12, 0);
    check_close("velocity", terms->velocity, 0, 0, 0);
    check_close("friction", terms->friction, -friction, 1e-12, 0);
    check_close("minor", terms->minor, -minor, 1e-12, 0);
    check_close("vapour", terms->vapour, -sl_vapour_pressure(summer_kelvin) / w,
                1e-12, 0);
    check_close("gas", terms->gas, 0, 0, 0);
    check_close("sum", terms->npsha,
                95120 / w + 1.5 - friction - minor -
                    sl_vapour_pressure(summer_kelvin) / w,
                1e-12, 0);
}

static void barometer_is_recorded_assumed_or_left_alone(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;
    double air = sl_standard_atmosphere(312.4), w = weight(summer_kelvin);

    check_close("normal", typical_terms(f, CONDITION_NORMAL)->barometer, 0, 0,
                0);
    assert_false(f->result.conditions[CONDITION_NORMAL]
                     .pumps[0]
                     .inputs[SL_IN_BAROMETER]
                     .applies);
    check_close("recorded", typical_terms(f, CONDITION_SUMMER)->barometer,
                -(air - 95120) / w, 1e-10, 0);
    f->dossier.record.barometer_low = known(98830);
    check_close("over the standard",
                typical_terms(f, CONDITION_SUMMER)->barometer,
                (98830 - air) / w, 1e-10, 0);
    forget(&f->dossier.record.barometer_low);
    pump = summer(f);
    check_close("typical", pump->cases[SL_TYPICAL].terms.barometer,
                -0.02 * air / w, 1e-12, 0);
    check_close("adverse", pump->cases[SL_ADVERSE].terms.barometer,
                -0.03 * air / w, 1e-12, 0);
    check_close("favourable", pump->cases[SL_FAVOURABLE].terms.barometer, 0, 0,
                0);
}

/* What the altitude of the barometer adds up to is the barometer. */
static void low_barometer_needs_no_elevation(void **state)
{
    struct fixture *f = *state;
    const struct sl_terms *terms;
    double with_elevation = typical_terms(f, CONDITION_SUMMER)->npsha;

    forget(&f->dossier.record.site_elevation);
    terms = typical_terms(f, CONDITION_SUMMER);
    check_close("npsha", terms->npsha, with_elevation, 1e-9, 0);
    check_close("air", terms->atmosphere, 95120 / weight(summer_kelvin), 1e-9,
                0);
    check_close("no fall beside it", terms->barometer, 0, 0, 0);
}

static void put_on_a_main(struct fixture *f)
{
    f->dossier.record.source_kind = SL_MAIN;
    f->dossier.record.source_pressure_normal = known(37300);
    f->dossier.record.source_pressure_low = known(11700);
    f->dossier.record.source_pressure_elevation = known(297.74);
}

static void main_counts_gauge_its_elevation_and_velocity(void **state)
{
    struct fixture *f = *state;
    const struct sl_terms *terms;

    put_on_a_main(f);
    fix_flow(f, 0.0571);
    terms = typical_terms(f, CONDITION_SUMMER);
    check_close("low gauge", terms->gauge, 11700 / weight(summer_kelvin), 1e-12,
                0);
    check_close("gauge's elevation", terms->elevation, 297.74 - 296.85, 1e-12,
                0);
    check_close("velocity head", terms->velocity,
                sl_velocity_head(sl_pipe_velocity(0.0571, suction_bore)), 1e-12,
                0);
    assert_true(terms->velocity > 0.07);
    check_sum("main", terms);
    terms = typical_terms(f, CONDITION_NORMAL);
    check_close("normal gauge", terms->gauge, 37300 / weight(normal_kelvin),
                1e-12, 0);
    assert_false(
        f->result.conditions[0].pumps[0].inputs[SL_IN_SOURCE_LEVEL].applies);
}

/* More pressure at the suction lets a pump run out further. */
static void main_pressure_counts_in_the_flow(void **state)
{
    struct fixture *f = *state;
    double lower, higher;

    put_on_a_main(f);
    lower = summer(f)->cases[SL_TYPICAL].flow;
    f->dossier.record.source_pressure_low = known(51700);
    higher = summer(f)->cases[SL_TYPICAL].flow;
    assert_true(higher > lower + 0.001);
    /* 40 kPa are worth as much as raising the gauge by so many metres. */
    f->dossier.record.source_pressure_low = known(11700);
    f->dossier.record.source_pressure_elevation =
        known(297.74 + 40000 / weight(summer_kelvin));
    check_close("head is head", summer(f)->cases[SL_TYPICAL].flow, higher, 1e-9,
                0);
}

static void station_on_a_main_is_one_without_saying_so(void **state)
{
    struct fixture *f = *state;

    put_on_a_main(f);
    f->dossier.record.source_kind = 0;
    f->dossier.record.installation = SL_ON_MAIN;
    check_provenance("on main", &summer(f)->inputs[SL_IN_SOURCE_KIND],
                     SL_DERIVED);
    check_close("gauge", f->result.worst->cases[SL_TYPICAL].terms.gauge,
                11700 / weight(summer_kelvin), 1e-12, 0);
}

static void closed_tank_under_vacuum_loses_by_it(void **state)
{
    struct fixture *f = *state;
    const struct sl_terms *terms;
    double open;

    fix_flow(f, 0.0571);
    open = typical_terms(f, CONDITION_SUMMER)->npsha;
    f->dossier.record.source_kind = SL_CLOSED;
    f->dossier.record.source_pressure_low = known(-23400);
    f->dossier.record.source_pressure_normal = known(-6100);
    terms = typical_terms(f, CONDITION_SUMMER);
    check_close("vacuum", terms->gauge, -23400 / weight(summer_kelvin), 1e-12,
                0);
    check_close("npsha", terms->npsha, open - 23400 / weight(summer_kelvin),
                1e-12, 0);
    check_close("velocity", terms->velocity, 0, 0, 0);
    check_close("elevation", terms->elevation, 298.35 - 296.85, 1e-12, 0);
    check_sum("closed", terms);
}

/* An open surface has no gauge pressure, whatever stands in the record. */
static void open_source_ignores_a_gauge(void **state)
{
    struct fixture *f = *state;

    f->dossier.record.source_pressure_low = known(11700);
    check_close("gauge", typical_terms(f, CONDITION_SUMMER)->gauge, 0, 0, 0);
}

static void seawater_has_its_own_density_and_vapour(void **state)
{
    struct fixture *f = *state;
    const struct sl_terms *terms;
    double density = sl_seawater_density(summer_kelvin, 35), w;
    double velocity, factor;

    f->dossier.record.service = SL_SEAWATER;
    f->dossier.record.cut_out_level = known(297.6);
    fix_flow(f, 0.0571);
    terms = typical_terms(f, CONDITION_SUMMER);
    w = density * SL_GRAVITY;
    velocity = sl_pipe_velocity(0.0571, suction_bore);
    factor = sl_friction_factor(
        sl_reynolds(velocity, suction_bore,
                    sl_water_viscosity(summer_kelvin) / density),
        suction_wall / suction_bore);
    check_close("air", terms->atmosphere, sl_standard_atmosphere(312.4) / w,
                1e-12, 0);
    check_close("vapour", terms->vapour,
                -sl_seawater_vapour_pressure(summer_kelvin, 35) / w, 1e-12, 0);
    check_close("friction", terms->friction,
                -sl_darcy_head(factor, suction_length, suction_bore, velocity),
                1e-12, 0);
    /* UNESCO 1981: some 26 kg/m³ over fresh water. */
    check_close("heavier", density - sl_water_density(summer_kelvin), 26, 0,
                0.4);
    check_sum("seawater", terms);
}

static void seawater_without_a_salinity_is_unproven(void **state)
{
    struct fixture *f = *state;

    f->dossier.record.service = SL_SEAWATER;
    f->tables.default_count--; /* the last row is the salinity */
    check_state("salinity", summer(f), SL_UNPROVEN, SL_UNPROVEN);
}

static void gas_is_a_term_of_its_own(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *cases;

    fix_flow(f, 0.0571);
    f->dossier.record.service = SL_WASTEWATER;
    cases = summer(f)->cases;
    check_close("likely", cases[SL_TYPICAL].terms.gas, -0.6, 0, 0);
    check_close("favourable", cases[SL_FAVOURABLE].terms.gas, 0, 0, 0);
    check_close("npsha",
                cases[SL_FAVOURABLE].terms.npsha -
                    cases[SL_TYPICAL].terms.npsha,
                0.6, 1e-9, 0);
    check_close("in the usual water too",
                typical_terms(f, CONDITION_NORMAL)->gas, -0.6, 0, 0);
}

static void pump_in_its_water_loses_at_its_inlet_alone(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *cases;

    f->dossier.record.installation = SL_WET_PIT;
    f->pumps[0].record.make_up = SL_VERTICAL_TURBINE;
    f->pumps[0].suction = NULL;
    fix_flow(f, 0.0571);
    cases = summer(f)->cases;
    check_close("friction", cases[SL_ADVERSE].terms.friction, 0, 0, 0);
    check_close("head assumed", cases[SL_TYPICAL].terms.minor, -0.02, 0, 0);
    assert_int_equal(f->result.worst->loss_count, 0);
    f->pumps[0].record.inlet_diameter = known(0.213);
    cases = summer(f)->cases;
    check_close("a bell's K", cases[SL_TYPICAL].terms.minor,
                -minor_of(0.0571, 0.213, 0.05), 1e-12, 0);
    check_close("at its best", cases[SL_FAVOURABLE].terms.minor,
                -minor_of(0.0571, 0.213, 0.03), 1e-12, 0);
}

/* Pump A's pipe draws from pipe D, which is wider. */
static void behind_a_wider_pipe(struct fixture *f)
{
    f->pipes[0].draws_from = &f->pipes[3];
    f->pipes[3].record.length = known(63.7);
    f->pipes[3].record.bore = known(0.391);
    f->pipes[3].fitting_count = 0;
}

static void path_adds_its_pipes(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;
    double wide, narrow;

    behind_a_wider_pipe(f);
    fix_flow(f, 0.0571);
    pump = summer(f);
    wide = friction_of(0.0571, 63.7, 0.391, suction_wall, summer_kelvin);
    narrow = friction_of(0.0571, suction_length, suction_bore, suction_wall,
                         summer_kelvin);
    check_close("friction", pump->cases[SL_TYPICAL].terms.friction,
                -(wide + narrow), 1e-12, 0);
    assert_int_equal(pump->loss_count, 2);
    assert_ptr_equal(pump->losses[0].pipe, &f->pipes[3]);
    assert_ptr_equal(pump->losses[1].pipe, &f->pipes[0]);
    check_close("wide", pump->losses[0].friction, wide, 1e-12, 0);
    check_close("narrow", pump->losses[1].friction, narrow, 1e-12, 0);
    check_close("no fitting", pump->losses[0].minor, 0, 0, 0);
    check_close("velocity", pump->losses[1].velocity,
                sl_pipe_velocity(0.0571, suction_bore), 1e-12, 0);
    check_close("whole length",
                pump->inputs[SL_IN_SUCTION_LENGTH].value.typical,
                63.7 + suction_length, 1e-12, 0);
    check_close("narrowest", pump->inputs[SL_IN_SUCTION_BORE].value.typical,
                suction_bore, 0, 0);
}

static void pipe_known_by_its_c_uses_it(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget(&f->pipes[0].record.roughness);
    f->pipes[0].record.hazen_williams_c = known(113);
    fix_flow(f, 0.0571);
    pump = summer(f);
    check_close(
        "friction", pump->cases[SL_TYPICAL].terms.friction,
        -sl_hazen_williams_head(0.0571, 113, suction_length, suction_bore),
        1e-12, 0);
    check_provenance("c", &pump->inputs[SL_IN_SUCTION_ROUGHNESS], SL_RECORDED);
    check_nan("no factor", pump->losses[0].factor);
    check_nan("no roughness", pump->losses[0].roughness);
    check_nan("nor a likely one",
              pump->inputs[SL_IN_SUCTION_ROUGHNESS].value.typical);
}

static void wall_recorded_is_preferred_to_c(void **state)
{
    struct fixture *f = *state;

    f->pipes[0].record.hazen_williams_c = known(113);
    fix_flow(f, 0.0571);
    check_close("friction", typical_terms(f, CONDITION_SUMMER)->friction,
                -friction_of(0.0571, suction_length, suction_bore, suction_wall,
                             summer_kelvin),
                1e-12, 0);
}

/* The stand-in for what a pipe loses is added once; what is known of the
 * rest counts beside it; and no unknown is shown as nought. */
static void stand_in_is_added_once(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;
    double wide = friction_of(0.0571, 63.7, 0.391, suction_wall, summer_kelvin);

    behind_a_wider_pipe(f);
    fix_flow(f, 0.0571);
    forget(&f->pipes[0].record.length);
    pump = summer(f);
    check_close("friction", pump->cases[SL_TYPICAL].terms.friction,
                -(wide + 0.5), 1e-12, 0);
    check_close("best", pump->cases[SL_FAVOURABLE].terms.friction, -wide, 1e-12,
                0);
    check_nan("worst", pump->cases[SL_ADVERSE].terms.friction);
    check_close("fittings", pump->cases[SL_TYPICAL].terms.minor,
                -minor_of(0.0571, suction_bore, suction_k), 1e-12, 0);
    check_nan("its friction", pump->losses[1].friction);
    forget(&f->pipes[0].record.bore);
    pump = summer(f);
    check_close("no fittings", pump->cases[SL_TYPICAL].terms.minor, 0, 0, 0);
    check_nan("its velocity", pump->losses[1].velocity);
    check_nan("its fittings", pump->losses[1].minor);
    check_close("the other's", pump->losses[0].friction, wide, 1e-12, 0);
}

static void default_k_lies_on_the_pipe_at_the_pump(void **state)
{
    struct fixture *f = *state;

    behind_a_wider_pipe(f);
    f->pipes[0].fitting_count = 0;
    fix_flow(f, 0.0571);
    check_close("on the narrow one", typical_terms(f, CONDITION_SUMMER)->minor,
                -minor_of(0.0571, suction_bore, 0.93), 1e-12, 0);
}

static void table_k_grows_in_a_small_bore(void **state)
{
    struct fixture *f = *state;

    forget(&f->fittings[0].k);
    f->pipes[0].fitting_count = 1;
    f->pipes[0].record.bore = known(0.1524); /* 6 inch: six times 5 % */
    fix_flow(f, 0.0171);
    check_close("0.15 and 30 %", typical_terms(f, CONDITION_SUMMER)->minor,
                -minor_of(0.0171, 0.1524, 0.195), 1e-9, 0);
}

/* Cold water on a long smooth pipe loses more by friction than warm water
 * by vapour: the adverse end is the cold one, wherever it lies; and the best
 * may lie between the ends.  4, 14 and 24 °C are assumed. */
/* The surplus of the usual case with its water at a temperature on record. */
static double surplus_at(struct fixture *f, double kelvin)
{
    double surplus;

    f->dossier.record.water_temp_normal = known(kelvin);
    surplus = judge_a(f, CONDITION_NORMAL)->cases[SL_TYPICAL].surplus;
    forget(&f->dossier.record.water_temp_normal);
    return surplus;
}

/* The favourable water may lie anywhere between its ends: no warmth on a
 * grid betters it, and one a little off it is not better by much. */
static void adverse_water_may_be_the_cold(void **state)
{
    static const struct {
        double length, adverse, coldest, warmest;
        const char *says;
    } rows[] = {
        {17.3, 297.15, 277.15, 277.15, "short: warm is worst, cold is best"},
        {433, 297.15, 277.25, 296.9, "longer: warm is worst, between is best"},
        {733, 277.15, 277.25, 296.9, "longer: cold is worst, between is best"},
        {2830, 277.15, 291.15, 297.15, "long: cold is worst, warm is better"},
    };
    struct fixture *f = *state;

    forget(&f->dossier.record.water_temp_normal);
    forget(&f->dossier.record.water_temp_summer);
    f->pipes[0].record.roughness = known(0.000003);
    for (size_t i = 0; i < COUNT(rows); i++) {
        struct sl_case cases[SL_CORNER_COUNT];
        double best = -INFINITY;

        f->pipes[0].record.length = known(rows[i].length);
        memcpy(cases, judge_a(f, CONDITION_NORMAL)->cases, sizeof cases);
        check_close(rows[i].says, cases[SL_ADVERSE].terms.vapour,
                    -sl_vapour_pressure(rows[i].adverse) /
                        weight(rows[i].adverse),
                    1e-12, 0);
        if (-cases[SL_FAVOURABLE].terms.vapour <
                sl_vapour_pressure(rows[i].coldest) / weight(rows[i].coldest) -
                    1e-9 ||
            -cases[SL_FAVOURABLE].terms.vapour >
                sl_vapour_pressure(rows[i].warmest) / weight(rows[i].warmest) +
                    1e-9)
            fail_msg("%s: vapour pressure head %.6f m at the favourable end",
                     rows[i].says, -cases[SL_FAVOURABLE].terms.vapour);
        for (int k = 0; k <= 80; k++)
            best = fmax(best, surplus_at(f, 277.15 + k * 0.25));
        check_close(rows[i].says, cases[SL_FAVOURABLE].surplus, best, 0, 1e-4);
        assert_true(cases[SL_FAVOURABLE].surplus >= best - 1e-6);
        assert_true(cases[SL_TYPICAL].surplus >= cases[SL_ADVERSE].surplus);
    }
}

/* At 45 °C the seawater formulas have no figure: neither end has one. */
static void water_beyond_the_formulas_proves_nothing(void **state)
{
    struct fixture *f = *state;
    struct sl_default rows[COUNT(defaults)];
    const struct sl_pump_result *pump;

    memcpy(rows, defaults, sizeof rows);
    rows[0].value.adverse = 318.15;
    f->tables.defaults = rows;
    f->dossier.record.service = SL_SEAWATER;
    f->pumps[0].record.datum_elevation = known(311.2);
    check_state("recorded", summer(f), SL_SHORT, SL_SHORT);
    forget(&f->dossier.record.water_temp_summer);
    pump = summer(f);
    check_state("assumed", pump, SL_UNPROVEN, SL_SHORT);
    check_nan("adverse", pump->cases[SL_ADVERSE].surplus);
    check_nan("favourable", pump->cases[SL_FAVOURABLE].surplus);
}

#define TEST(test)                                                             \
    cmocka_unit_test_setup_teardown(test, fixture_setup, fixture_teardown)

int main(void)
{
    const struct CMUnitTest tests[] = {
        TEST(open_source_has_air_level_and_losses),
        TEST(barometer_is_recorded_assumed_or_left_alone),
        TEST(low_barometer_needs_no_elevation),
        TEST(main_counts_gauge_its_elevation_and_velocity),
        TEST(main_pressure_counts_in_the_flow),
        TEST(station_on_a_main_is_one_without_saying_so),
        TEST(closed_tank_under_vacuum_loses_by_it),
        TEST(open_source_ignores_a_gauge),
        TEST(seawater_has_its_own_density_and_vapour),
        TEST(seawater_without_a_salinity_is_unproven),
        TEST(gas_is_a_term_of_its_own),
        TEST(pump_in_its_water_loses_at_its_inlet_alone),
        TEST(path_adds_its_pipes),
        TEST(pipe_known_by_its_c_uses_it),
        TEST(wall_recorded_is_preferred_to_c),
        TEST(stand_in_is_added_once),
        TEST(default_k_lies_on_the_pipe_at_the_pump),
        TEST(table_k_grows_in_a_small_bore),
        TEST(adverse_water_may_be_the_cold),
        TEST(water_beyond_the_formulas_proves_nothing),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
