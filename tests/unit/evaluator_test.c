/* One station judged: its states, and what each missing figure does. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "unit/evaluator_fixture.h"

/* Worked by a separate script (bisection on the flow and on Colebrook's
 * equation, IAPWS and standard-atmosphere formulas written anew). */
static const struct {
    double flow, atmosphere, friction, minor, vapour, npsha, npshr;
} worked[] = {
    [CONDITION_NORMAL] = {0.0624059495149, 9.962240094, 0.1092753654,
                          0.08596469531, 0.158972403, 13.95802763, 3.070914238},
    [CONDITION_SUMMER] = {0.0605027997365, 9.987916633, 0.1017522099,
                          0.08080143638, 0.3482179461, 10.7005675, 2.940689685},
};

static void complete_record_agrees_with_the_worked_figures(void **state)
{
    struct fixture *f = *state;

    for (int c = CONDITION_NORMAL; c <= CONDITION_SUMMER; c++) {
        const struct sl_pump_result *pump = judge_a(f, c);
        const struct sl_case *typical = &pump->cases[SL_TYPICAL];
        const struct sl_terms *terms = &typical->terms;

        check_close("flow", typical->flow, worked[c].flow, 1e-10, 0);
        check_close("air", terms->atmosphere, worked[c].atmosphere, 1e-9, 0);
        check_close("friction", -terms->friction, worked[c].friction, 1e-8, 0);
        check_close("minor", -terms->minor, worked[c].minor, 1e-8, 0);
        check_close("vapour", -terms->vapour, worked[c].vapour, 1e-9, 0);
        check_close("npsha", terms->npsha, worked[c].npsha, 1e-9, 0);
        check_close("npshr", typical->npshr, worked[c].npshr, 1e-9, 0);
        check_close("required", typical->required, worked[c].npshr + 1.5, 1e-9,
                    0);
        check_close("margin", typical->margin,
                    worked[c].npsha - worked[c].npshr, 1e-8, 0);
        check_close("surplus", typical->surplus, typical->margin - 1.5, 0,
                    1e-12);
        check_sum("sum", terms);
    }
}

static void complete_record_has_equal_corners(void **state)
{
    struct fixture *f = *state;

    for (int c = CONDITION_NORMAL; c <= CONDITION_SUMMER; c++) {
        const struct sl_pump_result *pump = judge_a(f, c);

        check_state("complete", pump, SL_CLEAR, SL_CLEAR);
        assert_memory_equal(&pump->cases[SL_ADVERSE], &pump->cases[SL_TYPICAL],
                            sizeof(struct sl_case));
        assert_memory_equal(&pump->cases[SL_FAVOURABLE],
                            &pump->cases[SL_TYPICAL], sizeof(struct sl_case));
        assert_int_equal(pump->counts[SL_UNKNOWN], 0);
        assert_int_equal(pump->counts[SL_ASSUMED], 0);
        assert_null(pump->leading_unknown);
        assert_string_equal(pump->reason, "");
    }
}

/* The datum that leaves pump A this surplus over the rule in summer. */
static void leave_surplus(struct fixture *f, double surplus)
{
    const struct sl_pump_result *pump = summer(f);

    f->pumps[0].record.datum_elevation.value +=
        pump->cases[SL_TYPICAL].surplus - surplus;
}

static void state_turns_at_the_rule_and_at_npshr(void **state)
{
    static const struct {
        double surplus;
        enum sl_state want;
        const char *says;
    } rows[] = {
        {0.0007, SL_CLEAR, "just met is clear"},
        {-0.0007, SL_THIN, "just missed is thin"},
        {-1.4993, SL_THIN, "just over NPSHR is thin"},
        {-1.5007, SL_SHORT, "just under NPSHR is short"},
    };
    struct fixture *f = *state;

    for (size_t i = 0; i < COUNT(rows); i++) {
        leave_surplus(f, rows[i].surplus);
        check_state(rows[i].says, summer(f), rows[i].want, rows[i].want);
        assert_string_equal(f->result.worst->reason, "");
        assert_int_equal(f->result.state, rows[i].want);
    }
}

static void rule_with_a_ratio_asks_the_greater(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *typical;

    f->rule.tiers[0].ratio = 1.73;
    f->rule.tiers[0].floor = 0.61;
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("ratio rules", typical->required, 1.73 * typical->npshr, 1e-12,
                0);
    f->rule.tiers[0].floor = 2.31;
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("floor rules", typical->required, typical->npshr + 2.31, 1e-12,
                0);
}

/* The gas allowance is 0.6 m likely and none at best for wastewater, none
 * likely and 0.6 m at worst where the service is not known. */
static void state_is_drawn_from_the_corners(void **state)
{
    static const struct {
        int service;
        double surplus, floor; /* of the typical case; of the rule */
        enum sl_state want, likely;
        const char *says;
    } rows[] = {
        {0, 0.63, 1.5, SL_CLEAR, SL_CLEAR, "met at the adverse end"},
        {0, 0.57, 1.5, SL_UNPROVEN, SL_CLEAR, "missed at the adverse end"},
        {0, -0.03, 1.5, SL_THIN, SL_THIN, "missed at the favourable end"},
        {SL_WASTEWATER, -0.57, 1.5, SL_UNPROVEN, SL_THIN,
         "missed, but met at the favourable end"},
        {SL_WASTEWATER, -0.27, 0.2, SL_UNPROVEN, SL_SHORT,
         "under NPSHR, but the rule met at the favourable end"},
        {SL_WASTEWATER, -0.83, 1.5, SL_THIN, SL_THIN,
         "missed at the favourable end too"},
        {SL_WASTEWATER, -1.77, 1.5, SL_THIN, SL_THIN,
         "under NPSHR likely, thin established"},
        {SL_WASTEWATER, -2.13, 1.5, SL_SHORT, SL_SHORT,
         "under NPSHR at the favourable end"},
    };

    (void)state;
    for (size_t i = 0; i < COUNT(rows); i++) {
        struct fixture f;

        fixture_make(&f);
        f.dossier.record.service = rows[i].service;
        f.rule.tiers[0].floor = rows[i].floor;
        leave_surplus(&f, rows[i].surplus);
        check_state(rows[i].says, summer(&f), rows[i].want, rows[i].likely);
        assert_int_equal(f.result.worst->reason[0] != '\0',
                         rows[i].want == SL_UNPROVEN);
        sl_arena_release(&f.arena);
    }
}

/* --- what each missing figure does --------------------------------------- */

static void without_summer_temperature(struct fixture *f)
{
    forget(&f->dossier.record.water_temp_summer);
}

static void without_normal_temperature(struct fixture *f)
{
    forget(&f->dossier.record.water_temp_normal);
}

static void without_elevation(struct fixture *f)
{
    forget(&f->dossier.record.site_elevation);
}

static void without_barometer(struct fixture *f)
{
    forget(&f->dossier.record.barometer_low);
}

static void without_elevation_and_barometer(struct fixture *f)
{
    without_elevation(f);
    without_barometer(f);
}

static void without_datum(struct fixture *f)
{
    forget(&f->pumps[0].record.datum_elevation);
}

static void without_cut_out(struct fixture *f)
{
    forget(&f->dossier.record.cut_out_level);
}

static void river_without_cut_out(struct fixture *f)
{
    f->dossier.record.service = SL_RAW_WATER;
    without_cut_out(f);
}

static void with_normal_level_only(struct fixture *f)
{
    without_cut_out(f);
    forget(&f->dossier.record.record_low_level);
}

static void without_levels(struct fixture *f)
{
    with_normal_level_only(f);
    forget(&f->dossier.record.normal_level);
}

static void without_levels_and_elevation(struct fixture *f)
{
    without_levels(f);
    without_elevation_and_barometer(f);
}

static void without_normal_level(struct fixture *f)
{
    forget(&f->dossier.record.normal_level);
}

static void without_source_kind(struct fixture *f)
{
    f->dossier.record.source_kind = 0;
}

static void works_without_source_kind(struct fixture *f)
{
    f->dossier.record.service = SL_INDUSTRIAL;
    without_source_kind(f);
}

static void pit_without_source_kind(struct fixture *f)
{
    f->dossier.record.installation = SL_WET_PIT;
    works_without_source_kind(f);
}

static void without_service(struct fixture *f)
{
    f->dossier.record.service = 0;
}

static void with_wastewater(struct fixture *f)
{
    f->dossier.record.service = SL_WASTEWATER;
}

static void without_pipe(struct fixture *f)
{
    f->pumps[0].suction = NULL;
}

static void submersible_in_a_dry_pit(struct fixture *f)
{
    f->pumps[0].record.make_up = SL_SUBMERSIBLE;
    without_pipe(f);
}

static void submersible_in_a_wet_pit(struct fixture *f)
{
    f->dossier.record.installation = SL_WET_PIT;
    submersible_in_a_dry_pit(f);
}

static void turbine_anywhere(struct fixture *f)
{
    f->dossier.record.installation = 0;
    f->pumps[0].record.make_up = SL_VERTICAL_TURBINE;
    without_pipe(f);
}

static void without_length(struct fixture *f)
{
    forget(&f->pipes[0].record.length);
}

static void without_bore(struct fixture *f)
{
    forget(&f->pipes[0].record.bore);
}

static void without_bore_and_length(struct fixture *f)
{
    without_length(f);
    without_bore(f);
}

static void without_wall(struct fixture *f)
{
    forget(&f->pipes[0].record.roughness);
}

static void iron_without_condition(struct fixture *f)
{
    without_wall(f);
    f->pipes[0].record.material = CAST_IRON;
}

static void poor_iron(struct fixture *f)
{
    iron_without_condition(f);
    f->pipes[0].record.condition = SL_POOR;
}

static void without_fittings(struct fixture *f)
{
    f->pipes[0].fitting_count = 0;
}

static void lift_without_fittings(struct fixture *f)
{
    without_fittings(f);
    f->pumps[0].record.datum_elevation = known(299.35);
}

static void without_a_k(struct fixture *f)
{
    forget(&f->fittings[0].k);
}

static void without_discharge_low(struct fixture *f)
{
    forget(&f->dossier.record.discharge_low);
}

static void without_discharge_normal(struct fixture *f)
{
    forget(&f->dossier.record.discharge_normal);
}

static void without_discharge_level(struct fixture *f)
{
    without_discharge_low(f);
    without_discharge_normal(f);
}

static void without_discharge_loss(struct fixture *f)
{
    forget(&f->dossier.record.discharge_loss_head);
}

static void with_a_bare_main(struct fixture *f)
{
    without_discharge_loss(f);
    f->dossier.record.discharge_length = known(812);
    f->dossier.record.discharge_bore = known(0.263);
}

static void without_npshr(struct fixture *f)
{
    for (int i = 0; i < POINTS; i++)
        forget(&f->points[i].npshr);
}

static void npshr_rated_below_the_flow(struct fixture *f)
{
    without_npshr(f);
    f->pumps[0].record.rated_flow = known(0.055);
    f->pumps[0].record.rated_npshr = known(2.61);
}

static void npshr_rated_beyond_the_flow(struct fixture *f)
{
    npshr_rated_below_the_flow(f);
    f->pumps[0].record.rated_flow = known(0.0655);
}

static void without_curve(struct fixture *f)
{
    f->pumps[0].curve = NULL;
}

static void rated_without_curve(struct fixture *f)
{
    npshr_rated_below_the_flow(f);
    without_curve(f);
}

static void without_test_speed(struct fixture *f)
{
    forget(&f->pumps[0].record.rated_speed);
    f->pumps[0].record.max_speed = known(1602);
}

static void main_with_normal_pressure(struct fixture *f)
{
    f->dossier.record.source_kind = SL_MAIN;
    f->dossier.record.source_pressure_normal = known(37300);
    f->dossier.record.source_pressure_elevation = known(297.7);
}

static void main_with_low_pressure(struct fixture *f)
{
    main_with_normal_pressure(f);
    forget(&f->dossier.record.source_pressure_normal);
    f->dossier.record.source_pressure_low = known(11700);
}

static void main_without_elevation(struct fixture *f)
{
    main_with_low_pressure(f);
    without_levels_and_elevation(f);
}

static void main_without_pressure(struct fixture *f)
{
    main_with_normal_pressure(f);
    forget(&f->dossier.record.source_pressure_normal);
}

static void main_without_gauge_elevation(struct fixture *f)
{
    main_with_low_pressure(f);
    forget(&f->dossier.record.source_pressure_elevation);
}

static void tank_with_normal_pressure(struct fixture *f)
{
    main_with_normal_pressure(f);
    f->dossier.record.source_kind = SL_CLOSED;
}

static void tank_without_pressure(struct fixture *f)
{
    f->dossier.record.source_kind = SL_CLOSED;
}

/* Where standard air is at the complete station's 95120 Pa, m. */
#define BAROMETER_ALTITUDE 529.8186041923514

/* The small bore's K: 12 inch less 9.7244 inch, 5 % each. */
#define SMALL_BORE 1.1137795275590551

static const struct {
    void (*change)(struct fixture *f);
    int condition;
    enum sl_input_id input;
    enum sl_provenance provenance;
    double typical, adverse, favourable;
    enum sl_state state, likely;
    bool can_be_short; /* with its eye far too high */
    const char *says;
} missing[] = {
    {without_summer_temperature, CONDITION_SUMMER, SL_IN_TEMPERATURE,
     SL_ASSUMED, 297.15, 308.15, 286.75, SL_CLEAR, SL_CLEAR, true,
     "summer water is assumed, no colder than the usual"},
    {without_normal_temperature, CONDITION_NORMAL, SL_IN_TEMPERATURE,
     SL_ASSUMED, 287.15, 297.15, 277.15, SL_CLEAR, SL_CLEAR, true,
     "usual water is assumed"},
    {without_elevation_and_barometer, CONDITION_SUMMER, SL_IN_SITE_ELEVATION,
     SL_DERIVED, 301.2, NAN, -430, SL_UNPROVEN, SL_CLEAR, true,
     "a level stands in for the site, and bounds nothing above"},
    {without_elevation_and_barometer, CONDITION_SUMMER, SL_IN_BAROMETER,
     SL_ASSUMED, 0.02, 0.03, 0, SL_UNPROVEN, SL_CLEAR, true,
     "the storm's fall is assumed at any elevation"},
    {without_elevation, CONDITION_SUMMER, SL_IN_SITE_ELEVATION, SL_DERIVED,
     BAROMETER_ALTITUDE, BAROMETER_ALTITUDE, BAROMETER_ALTITUDE, SL_CLEAR,
     SL_CLEAR, true, "a low barometer is the air itself"},
    {without_elevation, CONDITION_NORMAL, SL_IN_SITE_ELEVATION, SL_DERIVED,
     BAROMETER_ALTITUDE, BAROMETER_ALTITUDE, -430, SL_CLEAR, SL_CLEAR, true,
     "usual air is no thinner than the lowest"},
    {main_without_elevation, CONDITION_SUMMER, SL_IN_SITE_ELEVATION, SL_DERIVED,
     297.7, NAN, -430, SL_UNPROVEN, SL_CLEAR, true,
     "a gauge's elevation stands in where there is no level"},
    {without_levels_and_elevation, CONDITION_SUMMER, SL_IN_SITE_ELEVATION,
     SL_UNKNOWN, NAN, NAN, -430, SL_UNPROVEN, SL_UNPROVEN, false,
     "no level, no hint of the site's elevation"},
    {without_barometer, CONDITION_SUMMER, SL_IN_BAROMETER, SL_ASSUMED, 0.02,
     0.03, 0, SL_CLEAR, SL_CLEAR, true, "the storm's fall is assumed"},
    {without_datum, CONDITION_SUMMER, SL_IN_DATUM, SL_UNKNOWN, NAN, NAN, NAN,
     SL_UNPROVEN, SL_UNPROVEN, false, "an eye has no default"},
    {without_cut_out, CONDITION_SUMMER, SL_IN_SOURCE_LEVEL, SL_DERIVED, 297.9,
     NAN, 297.9, SL_UNPROVEN, SL_CLEAR, true,
     "a record low bounds the cut-out from above"},
    {river_without_cut_out, CONDITION_SUMMER, SL_IN_SOURCE_LEVEL, SL_RECORDED,
     297.9, 297.9, 297.9, SL_CLEAR, SL_CLEAR, true,
     "a river's record low is its lowest"},
    {with_normal_level_only, CONDITION_SUMMER, SL_IN_SOURCE_LEVEL, SL_DERIVED,
     301.2, NAN, 301.2, SL_UNPROVEN, SL_CLEAR, true,
     "the normal level bounds the lowest from above"},
    {without_levels, CONDITION_SUMMER, SL_IN_SOURCE_LEVEL, SL_UNKNOWN, NAN, NAN,
     NAN, SL_UNPROVEN, SL_UNPROVEN, false, "a level has no default"},
    {without_normal_level, CONDITION_NORMAL, SL_IN_SOURCE_LEVEL, SL_DERIVED,
     298.35, 298.35, NAN, SL_CLEAR, SL_CLEAR, false,
     "the lowest level bounds the normal one from below"},
    {works_without_source_kind, CONDITION_SUMMER, SL_IN_SOURCE_KIND, SL_UNKNOWN,
     SL_OPEN, NAN, NAN, SL_UNPROVEN, SL_CLEAR, false,
     "a works' source may be a closed tank"},
    {without_source_kind, CONDITION_SUMMER, SL_IN_SOURCE_KIND, SL_DERIVED,
     SL_OPEN, SL_OPEN, SL_OPEN, SL_CLEAR, SL_CLEAR, true,
     "a level without a gauge speaks of an open surface"},
    {pit_without_source_kind, CONDITION_SUMMER, SL_IN_SOURCE_KIND, SL_DERIVED,
     SL_OPEN, SL_OPEN, SL_OPEN, SL_CLEAR, SL_CLEAR, true, "a wet pit is open"},
    {without_service, CONDITION_SUMMER, SL_IN_GAS, SL_ASSUMED, 0, 0.6, 0,
     SL_CLEAR, SL_CLEAR, true, "an unknown service may be wastewater"},
    {with_wastewater, CONDITION_SUMMER, SL_IN_GAS, SL_ASSUMED, 0.6, 0.6, 0,
     SL_CLEAR, SL_CLEAR, true, "wastewater holds gas"},
    {without_pipe, CONDITION_SUMMER, SL_IN_SUCTION_PIPING, SL_ASSUMED, 0.5, NAN,
     0, SL_UNPROVEN, SL_CLEAR, true, "a dry pit's suction has no bound"},
    {submersible_in_a_dry_pit, CONDITION_SUMMER, SL_IN_SUCTION_PIPING,
     SL_ASSUMED, 0.5, NAN, 0, SL_UNPROVEN, SL_CLEAR, true,
     "a dry-installed submersible has a suction pipe too"},
    {submersible_in_a_wet_pit, CONDITION_SUMMER, SL_IN_SUCTION_PIPING,
     SL_DERIVED, 0, 0, 0, SL_CLEAR, SL_CLEAR, true,
     "a submersible in its pit has no suction pipe"},
    {submersible_in_a_wet_pit, CONDITION_SUMMER, SL_IN_SUCTION_MINOR,
     SL_ASSUMED, 0.02, 0.1, 0, SL_CLEAR, SL_CLEAR, true,
     "its inlet's loss is assumed"},
    {turbine_anywhere, CONDITION_SUMMER, SL_IN_SUCTION_PIPING, SL_DERIVED, 0, 0,
     0, SL_CLEAR, SL_CLEAR, true, "a vertical turbine stands in its water"},
    {without_length, CONDITION_SUMMER, SL_IN_SUCTION_LENGTH, SL_ASSUMED, 0.5,
     NAN, 0, SL_UNPROVEN, SL_CLEAR, true, "an unknown length has no bound"},
    {without_bore, CONDITION_SUMMER, SL_IN_SUCTION_BORE, SL_ASSUMED, 0.5, NAN,
     0, SL_UNPROVEN, SL_CLEAR, true, "an unknown bore has no bound"},
    {without_bore_and_length, CONDITION_SUMMER, SL_IN_SUCTION_BORE, SL_ASSUMED,
     0.5, NAN, 0, SL_UNPROVEN, SL_CLEAR, true,
     "both unknown take one stand-in"},
    {without_wall, CONDITION_SUMMER, SL_IN_SUCTION_ROUGHNESS, SL_ASSUMED,
     0.00015, 0.006, 0.000003, SL_CLEAR, SL_CLEAR, true,
     "the widest roughness is assumed"},
    {iron_without_condition, CONDITION_SUMMER, SL_IN_SUCTION_ROUGHNESS,
     SL_ASSUMED, 0.00031, 0.00064, 0.00017, SL_CLEAR, SL_CLEAR, true,
     "a material runs from good to poor"},
    {poor_iron, CONDITION_SUMMER, SL_IN_SUCTION_ROUGHNESS, SL_DERIVED, 0.00064,
     0.00064, 0.00064, SL_CLEAR, SL_CLEAR, true,
     "material and condition give the wall"},
    {without_fittings, CONDITION_SUMMER, SL_IN_SUCTION_MINOR, SL_ASSUMED, 0.93,
     2.13, 0.23, SL_CLEAR, SL_CLEAR, true, "no fitting recorded, some assumed"},
    {lift_without_fittings, CONDITION_SUMMER, SL_IN_SUCTION_MINOR, SL_ASSUMED,
     2.43, 17.13, 0.23, SL_CLEAR, SL_CLEAR, true,
     "a lift may hold a foot valve"},
    {without_a_k, CONDITION_SUMMER, SL_IN_SUCTION_MINOR, SL_ASSUMED,
     0.15 * SMALL_BORE + 0.474, 0.3 * SMALL_BORE + 0.474,
     0.1 * SMALL_BORE + 0.474, SL_CLEAR, SL_CLEAR, true,
     "the table's K, more in a small bore, and the owner's as it is"},
    {without_discharge_low, CONDITION_SUMMER, SL_IN_DISCHARGE_LEVEL, SL_DERIVED,
     329.1, NAN, 329.1, SL_UNPROVEN, SL_CLEAR, true,
     "a lower discharge would let it run out further"},
    {without_discharge_normal, CONDITION_NORMAL, SL_IN_DISCHARGE_LEVEL,
     SL_DERIVED, 327.3, 327.3, NAN, SL_CLEAR, SL_CLEAR, false,
     "the lowest discharge is the adverse end of the normal one"},
    {without_discharge_level, CONDITION_SUMMER, SL_IN_FLOW, SL_UNKNOWN, NAN,
     NAN, NAN, SL_UNPROVEN, SL_UNPROVEN, false, "nothing gives the flow"},
    {without_discharge_loss, CONDITION_SUMMER, SL_IN_FLOW, SL_UNKNOWN, NAN, NAN,
     NAN, SL_UNPROVEN, SL_UNPROVEN, false, "no loss, no operating point"},
    {with_a_bare_main, CONDITION_SUMMER, SL_IN_DISCHARGE_LOSS, SL_ASSUMED, NAN,
     NAN, NAN, SL_CLEAR, SL_CLEAR, true, "a main's wall and K are assumed"},
    {without_npshr, CONDITION_SUMMER, SL_IN_NPSHR, SL_UNKNOWN, NAN, NAN, NAN,
     SL_UNPROVEN, SL_UNPROVEN, false, "NPSHR has no default"},
    {npshr_rated_below_the_flow, CONDITION_SUMMER, SL_IN_NPSHR, SL_DERIVED,
     2.61, NAN, 2.61, SL_UNPROVEN, SL_CLEAR, true,
     "NPSHR is no less beyond the rated point"},
    {npshr_rated_beyond_the_flow, CONDITION_SUMMER, SL_IN_NPSHR, SL_DERIVED,
     2.61, NAN, 2.61, SL_UNPROVEN, SL_CLEAR, false,
     "NPSHR before the rated point is not bounded by it"},
    {rated_without_curve, CONDITION_SUMMER, SL_IN_FLOW, SL_DERIVED, 0.055, NAN,
     0.055, SL_UNPROVEN, SL_CLEAR, true, "a rated flow cannot see runout"},
    {without_curve, CONDITION_SUMMER, SL_IN_FLOW, SL_UNKNOWN, NAN, NAN, NAN,
     SL_UNPROVEN, SL_UNPROVEN, false, "no curve, no rated point, no flow"},
    {without_test_speed, CONDITION_SUMMER, SL_IN_SPEED, SL_UNKNOWN, 1602, NAN,
     NAN, SL_UNPROVEN, SL_CLEAR, false,
     "a speed without that of the test scales nothing"},
    {main_with_normal_pressure, CONDITION_SUMMER, SL_IN_SOURCE_PRESSURE,
     SL_DERIVED, 37300, NAN, 37300, SL_UNPROVEN, SL_CLEAR, true,
     "the normal pressure bounds the lowest from above"},
    {main_with_low_pressure, CONDITION_NORMAL, SL_IN_SOURCE_PRESSURE,
     SL_DERIVED, 11700, 11700, NAN, SL_CLEAR, SL_CLEAR, false,
     "the lowest pressure bounds the normal one from below"},
    {main_without_pressure, CONDITION_SUMMER, SL_IN_SOURCE_PRESSURE, SL_UNKNOWN,
     NAN, NAN, NAN, SL_UNPROVEN, SL_UNPROVEN, false,
     "a main's pressure has no default"},
    {main_without_gauge_elevation, CONDITION_SUMMER,
     SL_IN_SOURCE_PRESSURE_ELEVATION, SL_UNKNOWN, NAN, NAN, NAN, SL_UNPROVEN,
     SL_UNPROVEN, false, "a gauge's elevation has no default"},
    {tank_with_normal_pressure, CONDITION_SUMMER, SL_IN_SOURCE_PRESSURE,
     SL_DERIVED, 37300, NAN, 37300, SL_UNPROVEN, SL_CLEAR, true,
     "a tank's normal pressure bounds the lowest"},
    {tank_without_pressure, CONDITION_SUMMER, SL_IN_SOURCE_PRESSURE, SL_UNKNOWN,
     NAN, NAN, NAN, SL_UNPROVEN, SL_UNPROVEN, false,
     "a tank's pressure has no default"},
};

static void missing_figures_keep_from_clear_where_they_must(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(missing); i++) {
        const char *says = missing[i].says;
        const struct sl_pump_result *pump;
        const struct sl_input *input;
        struct fixture f;

        fixture_make(&f);
        missing[i].change(&f);
        pump = judge_a(&f, missing[i].condition);
        input = &pump->inputs[missing[i].input];
        check_state(says, pump, missing[i].state, missing[i].likely);
        check_provenance(says, input, missing[i].provenance);
        /* That of a bare main depends on the flow: a test of its own. */
        if (missing[i].input != SL_IN_DISCHARGE_LOSS)
            check_interval(says, &input->value, missing[i].typical,
                           missing[i].adverse, missing[i].favourable);
        assert_int_equal(pump->reason[0] != '\0', pump->state == SL_UNPROVEN);
        sl_arena_release(&f.arena);
    }
}

static void missing_figures_prove_short_where_they_can(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(missing); i++) {
        enum sl_state want = missing[i].can_be_short ? SL_SHORT : SL_UNPROVEN;
        const struct sl_pump_result *pump;
        struct fixture f;

        fixture_make(&f);
        missing[i].change(&f);
        if (f.pumps[0].record.datum_elevation.known)
            f.pumps[0].record.datum_elevation.value += 18.7;
        pump = judge_a(&f, missing[i].condition);
        if (pump->state != want)
            fail_msg("%s: %s with its eye too high, want %s", missing[i].says,
                     sl_state_name(pump->state), sl_state_name(want));
        sl_arena_release(&f.arena);
    }
}

static void every_input_takes_part_somewhere(void **state)
{
    bool seen[SL_INPUT_COUNT] = {
        [SL_IN_RUNNING_TOGETHER] = true, [SL_IN_RULE_MEASURE] = true};

    (void)state;
    for (size_t i = 0; i < COUNT(missing); i++)
        seen[missing[i].input] = true;
    for (int id = 0; id < SL_INPUT_COUNT; id++)
        if (!seen[id])
            fail_msg("no row forgets %s", sl_input_words((enum sl_input_id)id));
}

static void source_basis_names_the_level_used(void **state)
{
    static const struct {
        void (*change)(struct fixture *f);
        int condition;
        enum sl_source_basis want;
    } rows[] = {
        {without_barometer, CONDITION_SUMMER, SL_SOURCE_CUT_OUT},
        {without_barometer, CONDITION_NORMAL, SL_SOURCE_NORMAL},
        {without_cut_out, CONDITION_SUMMER, SL_SOURCE_RECORD_LOW},
        {river_without_cut_out, CONDITION_SUMMER, SL_SOURCE_RECORD_LOW},
        {with_normal_level_only, CONDITION_SUMMER, SL_SOURCE_NORMAL},
        {without_normal_level, CONDITION_NORMAL, SL_SOURCE_CUT_OUT},
        {without_levels, CONDITION_SUMMER, SL_SOURCE_UNKNOWN},
        {tank_with_normal_pressure, CONDITION_SUMMER, SL_SOURCE_CUT_OUT},
        {main_with_normal_pressure, CONDITION_SUMMER,
         SL_SOURCE_PRESSURE_NORMAL},
        {main_with_normal_pressure, CONDITION_NORMAL,
         SL_SOURCE_PRESSURE_NORMAL},
        {main_with_low_pressure, CONDITION_NORMAL, SL_SOURCE_PRESSURE_LOW},
        {main_without_pressure, CONDITION_NORMAL, SL_SOURCE_UNKNOWN},
    };

    (void)state;
    for (size_t i = 0; i < COUNT(rows); i++) {
        struct fixture f;

        fixture_make(&f);
        rows[i].change(&f);
        assert_int_equal(judge_a(&f, rows[i].condition)->source_basis,
                         rows[i].want);
        sl_arena_release(&f.arena);
    }
}

/* A river is audited at the lower of its record low and the cut-out. */
static void natural_source_takes_the_lower_level(void **state)
{
    static const int natural[] = {SL_RAW_WATER, SL_IRRIGATION, SL_SEAWATER};
    struct fixture *f = *state;

    for (size_t i = 0; i < COUNT(natural); i++) {
        f->dossier.record.service = natural[i];
        check_close("river", summer(f)->cases[SL_ADVERSE].terms.elevation,
                    297.9 - 296.85, 0, 1e-9);
    }
    f->dossier.record.service = SL_STORMWATER;
    check_close("pit", summer(f)->cases[SL_ADVERSE].terms.elevation,
                298.35 - 296.85, 0, 1e-9);
}

/* The eye of a pump in its pit lies no lower than its inlet's lip, which is
 * enough to prove it short. */
static void lip_of_an_inlet_bounds_the_eye(void **state)
{
    struct fixture *f = *state;

    submersible_in_a_wet_pit(f);
    without_datum(f);
    f->pumps[0].record.inlet_elevation = known(295.9);
    check_state("bounded", summer(f), SL_UNPROVEN, SL_UNPROVEN);
    check_interval("lip", &f->result.worst->inputs[SL_IN_DATUM].value, NAN, NAN,
                   295.9);
    f->pumps[0].record.inlet_elevation = known(314.6);
    check_state("too high", summer(f), SL_SHORT, SL_SHORT);
    f->pumps[0].record.make_up = SL_END_SUCTION;
    f->pumps[0].suction = &f->pipes[0];
    check_state("dry", summer(f), SL_UNPROVEN, SL_UNPROVEN);
}

static void usual_water_is_no_warmer_than_the_warmest(void **state)
{
    struct fixture *f = *state;

    without_normal_temperature(f);
    f->dossier.record.water_temp_summer = known(284.35);
    check_interval(
        "held from above",
        &judge_a(f, CONDITION_NORMAL)->inputs[SL_IN_TEMPERATURE].value, 284.35,
        284.35, 277.15);
}

static void summer_water_is_no_colder_than_the_usual(void **state)
{
    struct fixture *f = *state;

    without_summer_temperature(f);
    f->dossier.record.water_temp_normal = known(324.15);
    check_interval("held from below",
                   &summer(f)->inputs[SL_IN_TEMPERATURE].value, 324.15, 324.15,
                   324.15);
}

static void empty_tables_leave_unknowns_unknown(void **state)
{
    struct fixture *f = *state;

    f->tables.default_count = 0;
    without_summer_temperature(f);
    without_wall(f);
    check_state("no defaults", summer(f), SL_UNPROVEN, SL_UNPROVEN);
    check_provenance("water", &f->result.worst->inputs[SL_IN_TEMPERATURE],
                     SL_UNKNOWN);
    check_provenance("wall", &f->result.worst->inputs[SL_IN_SUCTION_ROUGHNESS],
                     SL_UNKNOWN);
    assert_int_equal(f->result.worst->counts[SL_UNKNOWN], 2);
}

#define TEST(test)                                                             \
    cmocka_unit_test_setup_teardown(test, fixture_setup, fixture_teardown)

/* The loss of a main whose wall and K are assumed, at the flow that is
 * solved: more of it is favourable, as it lessens the flow. */
static void a_bare_mains_loss_is_told_at_its_flow(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;
    const struct sl_interval *loss;
    double flow;

    with_a_bare_main(f);
    pump = summer(f);
    loss = &pump->inputs[SL_IN_DISCHARGE_LOSS].value;
    flow = pump->cases[SL_TYPICAL].flow;
    check_interval("bare main", loss,
                   friction_of(flow, 812, 0.263, 0.00015, 299.35) +
                       minor_of(flow, 0.263, 5),
                   friction_of(flow, 812, 0.263, 0.000003, 299.35),
                   friction_of(flow, 812, 0.263, 0.006, 299.35) +
                       minor_of(flow, 0.263, 20));
    assert_true(loss->adverse < loss->typical &&
                loss->typical < loss->favourable);
    /* Both defaults it rests on are named, and so are counted. */
    assert_string_equal(pump->inputs[SL_IN_DISCHARGE_LOSS].row->field,
                        "discharge_minor_k");
    assert_string_equal(pump->inputs[SL_IN_DISCHARGE_LOSS].other->field,
                        "discharge_roughness");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        TEST(complete_record_agrees_with_the_worked_figures),
        TEST(complete_record_has_equal_corners),
        TEST(state_turns_at_the_rule_and_at_npshr),
        TEST(rule_with_a_ratio_asks_the_greater),
        TEST(state_is_drawn_from_the_corners),
        TEST(missing_figures_keep_from_clear_where_they_must),
        TEST(missing_figures_prove_short_where_they_can),
        TEST(every_input_takes_part_somewhere),
        TEST(source_basis_names_the_level_used),
        TEST(natural_source_takes_the_lower_level),
        TEST(lip_of_an_inlet_bounds_the_eye),
        TEST(usual_water_is_no_warmer_than_the_warmest),
        TEST(summer_water_is_no_colder_than_the_usual),
        TEST(empty_tables_leave_unknowns_unknown),
        TEST(a_bare_mains_loss_is_told_at_its_flow),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
