/* Which running set governs, what the margin rules and the companion checks
 * say of it, and how far level, temperature and flow may go. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "evaluator/layout.h"
#include "hydraulics/specific_speed.h"
#include "unit/evaluator_fixture.h"

static struct sl_check_limit check_limits[] = {
    {"suction velocity", "", NAN, 1.9, SL_VELOCITY, "test", 'S'},
    {"suction velocity", "wastewater", 0.9, 1.1, SL_VELOCITY, "test", 'S'},
    {"suction lift", "", NAN, 4.6, SL_LENGTH, "test", 'S'},
    {"straight run", "", 5, NAN, SL_PURE, "test", 'S'},
    {"operating region", "", 0.7, 1.2, SL_PURE, "test", 'S'},
    {"bell velocity", "", 0.6, 2.7, SL_VELOCITY, "test", 'S'},
    {"suction pressure of a booster", "", 51000, NAN, SL_PRESSURE, "test", 'S'},
    {"suction energy", "end suction", NAN, 120e6, SL_PURE, "test", 'S'},
};

static struct sl_ageing ageing[] = {
    {"uncoated cast iron", 0, {0.00004, 0.00015, 0.00001}, "test", 'S'},
    {"uncoated cast iron", SL_POOR, {0.0002, 0.0002, 0.0002}, "test", 'S'},
};

static int setup(void **state)
{
    int failed = fixture_setup(state);
    struct fixture *f = *state;

    if (failed)
        return failed;
    f->tables.limits = check_limits;
    f->tables.limit_count = COUNT(check_limits);
    f->tables.ageing = ageing;
    f->tables.ageing_count = COUNT(ageing);
    f->tables.year = 2026;
    return 0;
}

#define TEST(test)                                                             \
    cmocka_unit_test_setup_teardown(test, setup, fixture_teardown)

/* --- which set governs ---------------------------------------------------- */

/* A and B, or all three, draw through pipe D; the main hardly hinders. */
static void on_a_header(struct fixture *f, int pumps)
{
    for (int i = 0; i < pumps; i++)
        f->pipes[i].draws_from = &f->pipes[3];
    f->pipes[3].fitting_count = 0;
    f->pipes[3].record.length = known(217.0);
    f->dossier.record.discharge_loss_head = known(0.37);
    f->dossier.pump_count = 3;
    f->dossier.record.pumps_running_max = known(3);
}

static void without_shared_pipes_a_pump_alone_governs(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    f->dossier.pump_count = 3;
    f->dossier.record.pumps_running_max = known(3);
    a = summer(f);
    assert_string_equal(a->governing.words, "alone");
    assert_string_equal(a->adverse_set, "alone");
    assert_int_equal(a->governing.running, 1);
    assert_int_equal(a->one_out.running, 2);
    assert_true(a->one_out.figures.surplus > a->governing.figures.surplus);
    assert_string_equal(a->one_out.words, "with any 1 of B, C");
    assert_null(a->stands_set);
}

static void through_a_shared_header_all_together_govern(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    on_a_header(f, 3);
    a = summer(f);
    assert_string_equal(a->governing.words, "with B, C");
    assert_int_equal(a->governing.running, 3);
    assert_int_equal(a->one_out.running, 2);
    assert_true(a->one_out.figures.surplus > a->governing.figures.surplus);
    assert_int_equal(a->sets_tried, 3);
}

/* C has its own pipe: beside A and B it only hinders them. */
static void one_fewer_than_all_may_govern(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    on_a_header(f, 2);
    a = summer(f);
    assert_string_equal(a->governing.words, "with B");
    assert_int_equal(a->governing.running, 2);
    assert_string_equal(a->one_out.words, "with B");
    check_close("the same", a->one_out.figures.surplus,
                a->governing.figures.surplus, 0, 0);
}

static void an_unknown_maximum_is_named(void **state)
{
    struct fixture *f = *state;
    const struct sl_input *together;

    on_a_header(f, 3);
    forget(&f->dossier.record.pumps_running_max);
    together = &summer(f)->inputs[SL_IN_RUNNING_TOGETHER];
    check_provenance("unknown", together, SL_ASSUMED);
    assert_string_equal(together->rule,
                        "pumps_running_max is not recorded: all of them");
    f->dossier.pump_count = 1;
    assert_false(summer(f)->inputs[SL_IN_RUNNING_TOGETHER].applies);
}

enum { MANY = SL_EXHAUSTIVE_PUMPS + 1 };

static void too_many_pumps_are_tried_in_part(void **state)
{
    static struct sl_dossier_pump many[MANY];
    static struct sl_dossier_pipe pipes[MANY];
    static const char ids[MANY][2] = {"A", "B", "C", "D", "E", "F",
                                      "G", "H", "I", "J", "K", "L",
                                      "M", "N", "O", "P", "Q"};
    struct fixture *f = *state;
    const struct sl_pump_result *first;

    for (int i = 0; i < MANY; i++) {
        pipes[i] = f->pipes[0];
        many[i] = f->pumps[0];
        many[i].suction = &pipes[i];
        many[i].record.pump_id = ids[i];
        many[i].record.datum_elevation = known(296.85 - 0.01 * i);
    }
    f->dossier.pumps = many;
    f->dossier.pump_count = MANY;
    f->dossier.pipes = pipes;
    f->dossier.pipe_count = MANY;
    f->dossier.record.pumps_running_max = known(4);
    first = summer(f);
    assert_false(first->sets_all);
    /* Alone, and with one, two and three of those that flow most. */
    assert_int_equal(first->sets_tried, 4);
    assert_string_equal(first->governing.words, "alone");
    /* One that was not tried may be worse. */
    assert_true(first->cases[SL_ADVERSE].surplus >= 0);
    check_state("in part", first, SL_UNPROVEN, SL_CLEAR);
    assert_non_null(strstr(first->reason, "in the 4 running sets"));
    assert_int_equal(first->rules[0].state, SL_UNPROVEN);
    f->dossier.record.pumps_running_max = known(1);
    first = summer(f);
    assert_true(first->sets_all);
    check_state("one at a time", first, SL_CLEAR, SL_CLEAR);
    f->dossier.record.pumps_running_max = known(4);
    f->dossier.pump_count = MANY - 1;
    first = summer(f);
    assert_true(first->sets_all);
    assert_int_equal(first->sets_tried, 1 + 15 + 105 + 455);
}

/* Equal ones differ by how many run, which is soon tried. */
static void many_equal_pumps_are_tried_in_full(void **state)
{
    static struct sl_dossier_pump many[MANY];
    static struct sl_dossier_pipe pipes[MANY];
    struct fixture *f = *state;
    const struct sl_pump_result *first;

    for (int i = 0; i < MANY; i++) {
        pipes[i] = f->pipes[0];
        many[i] = f->pumps[0];
        many[i].suction = &pipes[i];
    }
    f->dossier.pumps = many;
    f->dossier.pump_count = MANY;
    f->dossier.pipes = pipes;
    f->dossier.pipe_count = MANY;
    f->dossier.record.pumps_running_max = known(MANY);
    f->dossier.record.discharge_loss_head = known(0.01);
    first = summer(f);
    assert_true(first->sets_all);
    assert_int_equal(first->sets_tried, MANY);
    assert_int_equal(first->one_out.running, MANY - 1);
    check_state("all", first, SL_CLEAR, SL_CLEAR);
}

static void a_set_in_which_a_pump_stands_is_told(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *b;
    double alone;

    f->dossier.pump_count = 2;
    f->pumps[1].record.max_speed = known(1222);
    f->dossier.record.pumps_running_max = known(1);
    alone = judge(f)
                ->conditions[CONDITION_SUMMER]
                .pumps[1]
                .cases[SL_TYPICAL]
                .surplus;
    f->dossier.record.pumps_running_max = known(2);
    b = &judge(f)->conditions[CONDITION_SUMMER].pumps[1];
    if (b->stands || !b->stands_set)
        fail_msg("stands: %d, in '%s'; flow alone %.4f", b->stands,
                 b->stands_set ? b->stands_set : "none",
                 b->cases[SL_TYPICAL].flow);
    assert_string_equal(b->stands_set, "with A");
    assert_string_equal(b->governing.words, "alone");
    check_close("judged without it", b->cases[SL_TYPICAL].surplus, alone, 0,
                1e-12);
}

static void two_crossings_are_told(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a = summer(f);

    assert_int_equal(a->checks[SL_CHECK_TWO_CROSSINGS].end, SL_CHECK_WITHIN);
    assert_false(a->governing.two_crossings);
    f->points[0].head = known(28.3);
    a = summer(f);
    assert_int_equal(a->checks[SL_CHECK_TWO_CROSSINGS].end, SL_CHECK_BEYOND);
    assert_true(a->governing.two_crossings);
    fix_flow(f, 0.05);
    assert_int_equal(summer(f)->checks[SL_CHECK_TWO_CROSSINGS].end,
                     SL_CHECK_NOT_MADE);
}

/* --- margin rules --------------------------------------------------------- */

/* No rule is clear by an adverse end that a neighbour denies it. */
static void a_given_neighbour_denies_every_rule_its_end(void **state)
{
    struct fixture *f = *state;
    struct sl_margin_rule rules[2] = {f->rule, f->rule};
    const struct sl_pump_result *a;

    rules[1].tiers[0].floor = 0.3;
    f->tables.rules = rules;
    f->tables.rule_count = 2;
    on_a_header(f, 2);
    f->pumps[1].curve = NULL;
    f->pumps[1].record.rated_flow = known(0.0523);
    f->pumps[1].record.rated_npshr = known(2.61);
    a = summer(f);
    for (int i = 0; i < 2; i++) {
        check_nan("no end", a->rules[i].surplus[SL_ADVERSE]);
        assert_int_equal(a->rules[i].state, SL_UNPROVEN);
    }
}

/* What tells suction energy, at a part of the start of high. */
static void tell_energy(struct fixture *f, double part)
{
    struct sl_pump *pump = &f->pumps[0].record;
    const struct sl_curve_view npshr = npshr_curve();
    double specific;

    pump->bep_flow = known(0.0571);
    specific =
        sl_suction_specific_speed(1478, 0.0571, sl_curve_at(&npshr, 0.0571));
    pump->eye_diameter = known(1);
    pump->eye_diameter.value =
        part * 120e6 / sl_suction_energy(1, 1478, specific, 1);
}

static void three_tiers(struct fixture *f, enum sl_rule_measure measure)
{
    f->rule.measure = measure;
    f->rule.tiers[0] = (struct sl_margin_tier){NAN, 1.1, 0};
    f->rule.tiers[1] = (struct sl_margin_tier){1, 1.3, 0};
    f->rule.tiers[2] = (struct sl_margin_tier){2, 1.7, 0};
    f->rule.tier_count = 3;
}

static void the_tier_goes_by_the_measure(void **state)
{
    static const struct {
        double part, ratio;
    } rows[] = {{0.4, 1.1}, {0.99, 1.1}, {1.01, 1.3}, {1.9, 1.3}, {2.1, 1.7}};
    struct fixture *f = *state;

    three_tiers(f, SL_MEASURE_SUCTION_ENERGY);
    for (size_t i = 0; i < COUNT(rows); i++) {
        const struct sl_pump_result *a;
        const struct sl_case *typical;

        tell_energy(f, rows[i].part);
        a = summer(f);
        typical = &a->cases[SL_TYPICAL];
        check_close("measure", a->rules[0].measure, rows[i].part, 1e-9, 0);
        check_close("asked", typical->required, rows[i].ratio * typical->npshr,
                    1e-12, 0);
        check_provenance("measure", &a->inputs[SL_IN_RULE_MEASURE], SL_DERIVED);
    }
}

static void an_unknown_measure_takes_the_strictest_tier_as_adverse(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    three_tiers(f, SL_MEASURE_SUCTION_SPECIFIC_SPEED);
    a = summer(f);
    check_provenance("measure", &a->inputs[SL_IN_RULE_MEASURE], SL_UNKNOWN);
    check_nan("typical", a->cases[SL_TYPICAL].required);
    check_close("adverse", a->cases[SL_ADVERSE].required,
                1.7 * a->cases[SL_ADVERSE].npshr, 1e-12, 0);
    check_close("favourable", a->cases[SL_FAVOURABLE].required,
                1.1 * a->cases[SL_FAVOURABLE].npshr, 1e-12, 0);
    /* By the strictest tier it is clear, whatever the measure. */
    check_state("met", a, SL_CLEAR, SL_CLEAR);
    f->pumps[0].record.datum_elevation.value +=
        a->cases[SL_ADVERSE].surplus + 0.07;
    check_state("not met", summer(f), SL_UNPROVEN, SL_UNPROVEN);
    f->rule.measure = SL_MEASURE_NONE;
    assert_false(summer(f)->inputs[SL_IN_RULE_MEASURE].applies);
}

static void a_lift_chooses_its_tier(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *typical;

    three_tiers(f, SL_MEASURE_SUCTION_LIFT);
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("flooded", typical->required, 1.1 * typical->npshr, 1e-12, 0);
    f->pumps[0].record.datum_elevation = known(298.35 + 1.4);
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("1.4 m", typical->required, 1.3 * typical->npshr, 1e-12, 0);
    f->pumps[0].record.datum_elevation = known(298.35 + 2.3);
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("2.3 m", typical->required, 1.7 * typical->npshr, 1e-12, 0);
}

static void a_rule_for_one_make_up_asks_others_for_npshr_alone(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    f->rule.make_up = SL_SPLIT_CASE;
    a = summer(f);
    assert_false(a->rules[0].applies);
    check_close("asked", a->cases[SL_TYPICAL].required,
                a->cases[SL_TYPICAL].npshr, 0, 0);
    f->pumps[0].record.make_up = SL_SPLIT_CASE;
    a = summer(f);
    assert_true(a->rules[0].applies);
    check_close("asked of its own", a->cases[SL_TYPICAL].required,
                a->cases[SL_TYPICAL].npshr + 1.5, 1e-12, 0);
}

static void a_lift_limit_counts_lift_losses_and_npshr(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *typical;
    double used;

    f->pumps[0].record.datum_elevation = known(298.35 + 1.4);
    typical = &summer(f)->cases[SL_TYPICAL];
    used =
        1.4 - typical->terms.friction - typical->terms.minor + typical->npshr;
    f->rule.lift_limit = used + 0.21;
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("within", typical->surplus, 0.21, 0, 1e-9);
    check_state("within", f->result.worst, SL_CLEAR, SL_CLEAR);
    f->rule.lift_limit = used - 0.21;
    check_close("beyond", summer(f)->cases[SL_TYPICAL].surplus, -0.21, 0, 1e-9);
    check_state("beyond", f->result.worst, SL_THIN, SL_THIN);
}

/* --- companion checks ----------------------------------------------------- */

static void held(struct fixture *f, enum sl_check_id id, enum sl_check_end end,
                 double value)
{
    const struct sl_check *check = &summer(f)->checks[id];

    if (check->end != end)
        fail_msg("%s: end %d (value %.6f), want %d", sl_check_name(id),
                 check->end, check->value, end);
    if (isnan(value))
        check_nan(sl_check_name(id), check->value);
    else
        check_close(sl_check_name(id), check->value, value, 1e-9, 1e-12);
}

static void velocities_are_held_to_their_limits(void **state)
{
    struct fixture *f = *state;
    double flow = summer(f)->cases[SL_TYPICAL].flow;
    double velocity = sl_pipe_velocity(flow, suction_bore);

    held(f, SL_CHECK_SUCTION_VELOCITY, SL_CHECK_WITHIN, velocity);
    f->dossier.record.service = SL_WASTEWATER; /* a row of its own */
    held(f, SL_CHECK_SUCTION_VELOCITY, SL_CHECK_BEYOND, velocity);
    f->dossier.record.service = SL_POTABLE;
    forget(&f->pipes[0].record.bore);
    held(f, SL_CHECK_SUCTION_VELOCITY, SL_CHECK_UNKNOWN, NAN);
    held(f, SL_CHECK_BELL_VELOCITY, SL_CHECK_NOT_MADE, NAN);
    f->pumps[0].suction = NULL;
    held(f, SL_CHECK_SUCTION_VELOCITY, SL_CHECK_NOT_MADE, NAN);
    f->pumps[0].record.make_up = SL_SUBMERSIBLE;
    f->dossier.record.installation = SL_WET_PIT;
    f->pumps[0].record.inlet_diameter = known(0.301);
    flow = summer(f)->cases[SL_TYPICAL].flow;
    held(f, SL_CHECK_BELL_VELOCITY, SL_CHECK_WITHIN,
         sl_pipe_velocity(flow, 0.301));
    f->pumps[0].record.inlet_diameter = known(0.141);
    flow = summer(f)->cases[SL_TYPICAL].flow;
    held(f, SL_CHECK_BELL_VELOCITY, SL_CHECK_BEYOND,
         sl_pipe_velocity(flow, 0.141));
}

static void submergence_goes_by_the_bell_and_the_flow(void **state)
{
    struct fixture *f = *state;
    double least;

    held(f, SL_CHECK_SUBMERGENCE, SL_CHECK_NOT_MADE, NAN);
    f->pumps[0].record.inlet_elevation = known(297.1);
    held(f, SL_CHECK_SUBMERGENCE, SL_CHECK_UNKNOWN, 1.25);
    f->pumps[0].record.inlet_diameter = known(0.387);
    held(f, SL_CHECK_SUBMERGENCE, SL_CHECK_WITHIN, 1.25);
    least = summer(f)->checks[SL_CHECK_SUBMERGENCE].lowest;
    f->pumps[0].record.inlet_elevation = known(298.35 - least + 0.013);
    held(f, SL_CHECK_SUBMERGENCE, SL_CHECK_BEYOND, least - 0.013);
    forget(&f->pumps[0].record.inlet_elevation);
    held(f, SL_CHECK_SUBMERGENCE, SL_CHECK_UNKNOWN, NAN);
}

static void a_lift_is_held_to_its_limit(void **state)
{
    struct fixture *f = *state;

    held(f, SL_CHECK_SUCTION_LIFT, SL_CHECK_WITHIN, 296.85 - 298.35);
    f->pumps[0].record.datum_elevation = known(303.17);
    held(f, SL_CHECK_SUCTION_LIFT, SL_CHECK_BEYOND, 303.17 - 298.35);
    forget(&f->pumps[0].record.datum_elevation);
    held(f, SL_CHECK_SUCTION_LIFT, SL_CHECK_UNKNOWN, NAN);
    f->dossier.record.source_kind = SL_MAIN;
    held(f, SL_CHECK_SUCTION_LIFT, SL_CHECK_NOT_MADE, NAN);
}

static void a_straight_run_is_held_in_bores(void **state)
{
    struct fixture *f = *state;

    held(f, SL_CHECK_STRAIGHT_RUN, SL_CHECK_NOT_MADE, NAN);
    f->pumps[0].record.straight_run = known(1.31);
    held(f, SL_CHECK_STRAIGHT_RUN, SL_CHECK_WITHIN, 1.31 / suction_bore);
    f->pumps[0].record.straight_run = known(1.17);
    held(f, SL_CHECK_STRAIGHT_RUN, SL_CHECK_BEYOND, 1.17 / suction_bore);
    f->pumps[0].suction = NULL;
    held(f, SL_CHECK_STRAIGHT_RUN, SL_CHECK_UNKNOWN, NAN);
    f->pumps[0].record.suction_nozzle_bore = known(0.203);
    held(f, SL_CHECK_STRAIGHT_RUN, SL_CHECK_WITHIN, 1.17 / 0.203);
}

/* Pumps that only a check tells apart are no equal pumps. */
static void each_pump_is_held_by_its_own_nozzle_and_speed(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pumps;

    f->dossier.pump_count = 2;
    for (int i = 0; i < 2; i++) {
        struct sl_pump *pump = &f->pumps[i].record;

        f->pumps[i].suction = NULL;
        pump->make_up = SL_SPLIT_CASE; /* eyes unknown: no specific speed */
        pump->straight_run = known(1.17);
        pump->suction_nozzle_bore = known(i ? 0.307 : 0.203);
    }
    pumps = judge(f)->conditions[CONDITION_SUMMER].pumps;
    for (int i = 0; i < 2; i++)
        check_close("straight run",
                    pumps[i].checks[SL_CHECK_STRAIGHT_RUN].value,
                    1.17 / (i ? 0.307 : 0.203), 1e-12, 0);
    for (int i = 0; i < POINTS; i++)
        f->points[i].speed = known(1478);
    for (int i = 0; i < 2; i++) {
        struct sl_pump *pump = &f->pumps[i].record;

        pump->suction_nozzle_bore = known(0.203);
        pump->max_speed = known(1478);
        pump->rated_speed = known(i ? 1190 : 1478);
        pump->bep_flow = known(0.0531);
    }
    pumps = judge(f)->conditions[CONDITION_SUMMER].pumps;
    check_close("region of the slower",
                pumps[1].checks[SL_CHECK_OPERATING_REGION].value,
                pumps[0].checks[SL_CHECK_OPERATING_REGION].value * 1190 / 1478,
                1e-9, 0);
}

/* The flow furthest from best efficiency over the sets is the one told. */
static void the_operating_region_looks_at_all_sets(void **state)
{
    struct fixture *f = *state;
    double alone = summer(f)->cases[SL_TYPICAL].flow, together;

    held(f, SL_CHECK_OPERATING_REGION, SL_CHECK_UNKNOWN, NAN);
    f->pumps[0].record.bep_flow = known(alone / 1.03);
    held(f, SL_CHECK_OPERATING_REGION, SL_CHECK_WITHIN, 1.03);
    f->pumps[0].record.bep_flow = known(alone / 1.27);
    held(f, SL_CHECK_OPERATING_REGION, SL_CHECK_BEYOND, 1.27);
    f->pumps[0].record.bep_flow = known(alone / 1.03);
    f->dossier.pump_count = 3;
    f->dossier.record.pumps_running_max = known(3);
    f->dossier.record.discharge_loss_head = known(11.3);
    alone = summer(f)->cases[SL_TYPICAL].flow;
    together =
        f->result.conditions[CONDITION_SUMMER].pumps[0].one_out.figures.flow;
    assert_true(together < 0.9 * alone);
    f->pumps[0].record.bep_flow = known(alone);
    assert_int_equal(summer(f)->checks[SL_CHECK_OPERATING_REGION].end,
                     SL_CHECK_BEYOND);
    assert_true(f->result.conditions[CONDITION_SUMMER]
                    .pumps[0]
                    .checks[SL_CHECK_OPERATING_REGION]
                    .value < together / alone);
}

static void a_booster_keeps_its_suction_pressure(void **state)
{
    struct fixture *f = *state;
    const struct sl_check *check;
    double pressure;

    held(f, SL_CHECK_BOOSTER_PRESSURE, SL_CHECK_NOT_MADE, NAN);
    f->dossier.record.source_kind = SL_MAIN;
    f->dossier.record.source_pressure_low = known(61700);
    f->dossier.record.source_pressure_elevation = known(297.74);
    check = &summer(f)->checks[SL_CHECK_BOOSTER_PRESSURE];
    pressure = check->value;
    assert_int_equal(check->end, SL_CHECK_WITHIN);
    assert_true(pressure > 51000 && pressure < 61700 + weight(299.35));
    f->dossier.record.source_pressure_low = known(61700 - pressure + 49000);
    assert_int_equal(summer(f)->checks[SL_CHECK_BOOSTER_PRESSURE].end,
                     SL_CHECK_BEYOND);
    forget(&f->dossier.record.source_pressure_low);
    held(f, SL_CHECK_BOOSTER_PRESSURE, SL_CHECK_UNKNOWN, NAN);
}

static void suction_energy_is_held_to_the_start_of_high(void **state)
{
    struct fixture *f = *state;

    held(f, SL_CHECK_SUCTION_ENERGY, SL_CHECK_UNKNOWN, NAN);
    tell_energy(f, 0.83);
    held(f, SL_CHECK_SUCTION_ENERGY, SL_CHECK_WITHIN, 0.83);
    tell_energy(f, 1.19);
    held(f, SL_CHECK_SUCTION_ENERGY, SL_CHECK_BEYOND, 1.19);
    f->pumps[0].record.make_up = SL_SPLIT_CASE; /* without a row */
    held(f, SL_CHECK_SUCTION_ENERGY, SL_CHECK_NOT_MADE, NAN);
}

static void roughness_is_held_to_the_bore(void **state)
{
    struct fixture *f = *state;

    held(f, SL_CHECK_ROUGHNESS, SL_CHECK_WITHIN, suction_wall / suction_bore);
    f->pipes[0].record.roughness = known(0.0147);
    held(f, SL_CHECK_ROUGHNESS, SL_CHECK_BEYOND, 0.0147 / suction_bore);
    forget(&f->pipes[0].record.roughness);
    f->pipes[0].record.hazen_williams_c = known(117);
    held(f, SL_CHECK_ROUGHNESS, SL_CHECK_NOT_MADE, NAN);
}

static void off_the_curve_is_told(void **state)
{
    struct fixture *f = *state;

    held(f, SL_CHECK_OFF_CURVE, SL_CHECK_WITHIN, NAN);
    f->dossier.record.discharge_low = known(306.9);
    held(f, SL_CHECK_OFF_CURVE, SL_CHECK_BEYOND, NAN);
    fix_flow(f, 0.05);
    held(f, SL_CHECK_OFF_CURVE, SL_CHECK_NOT_MADE, NAN);
}

/* --- limits --------------------------------------------------------------- */

static double surplus(struct fixture *f)
{
    return summer(f)->cases[SL_TYPICAL].surplus;
}

static void at_the_limit_level_nothing_is_left(void **state)
{
    struct fixture *f = *state;
    struct sl_limit limit;

    on_a_header(f, 3);
    for (int i = 0; i < 3; i++)
        f->pumps[i].record.datum_elevation = known(294.3);
    limit = summer(f)->limits[SL_LIMIT_LEVEL];
    if (limit.end != SL_LIMIT_FOUND)
        fail_msg("%s, surplus %.3f", sl_limit_end_name(limit.end),
                 f->result.conditions[1].pumps[0].cases[0].surplus);
    assert_true(limit.value < 298.35);
    f->dossier.record.cut_out_level = known(limit.value);
    check_close("clear: lower", surplus(f), 0, 0, 1e-6);
    /* From where it is not met the limit lies higher. */
    f->dossier.record.cut_out_level = known(limit.value - 0.83);
    limit = summer(f)->limits[SL_LIMIT_LEVEL];
    assert_int_equal(limit.end, SL_LIMIT_FOUND);
    f->dossier.record.cut_out_level = known(limit.value);
    check_close("thin: higher", surplus(f), 0, 0, 1e-6);
}

static void at_the_limit_of_a_main_nothing_is_left(void **state)
{
    struct fixture *f = *state;
    struct sl_limit limit;

    f->dossier.record.source_kind = SL_MAIN;
    f->dossier.record.source_pressure_low = known(11700);
    f->dossier.record.source_pressure_elevation = known(297.74);
    limit = summer(f)->limits[SL_LIMIT_LEVEL];
    assert_int_equal(limit.end, SL_LIMIT_FOUND);
    f->dossier.record.source_pressure_elevation = known(limit.value);
    check_close("main", surplus(f), 0, 0, 1e-6);
}

static void at_the_limit_temperature_nothing_is_left(void **state)
{
    struct fixture *f = *state;
    struct sl_limit limit;

    f->pumps[0].record.datum_elevation.value += surplus(f) - 0.31;
    limit = summer(f)->limits[SL_LIMIT_TEMPERATURE];
    assert_int_equal(limit.end, SL_LIMIT_FOUND);
    assert_true(limit.value > 299.35 + 5);
    f->dossier.record.water_temp_summer = known(limit.value);
    check_close("temperature", surplus(f), 0, 0, 1e-6);
}

static void at_the_limit_flow_nothing_is_left(void **state)
{
    struct fixture *f = *state;
    struct sl_limit limit;

    f->pumps[0].record.datum_elevation.value += surplus(f) - 0.31;
    limit = summer(f)->limits[SL_LIMIT_FLOW];
    assert_int_equal(limit.end, SL_LIMIT_FOUND);
    assert_true(limit.value > f->result.worst->cases[SL_TYPICAL].flow);
    fix_flow(f, limit.value);
    check_close("flow", surplus(f), 0, 0, 1e-6);
}

static void a_limit_may_be_nowhere_or_everywhere(void **state)
{
    struct fixture *f = *state;
    const struct sl_limit *limits;

    limits = summer(f)->limits;
    assert_int_equal(limits[SL_LIMIT_FLOW].end, SL_LIMIT_ALWAYS);
    check_nan("always", limits[SL_LIMIT_FLOW].value);
    f->pumps[0].record.datum_elevation = known(296.85 + 29);
    limits = summer(f)->limits;
    for (int i = 0; i < SL_LIMIT_COUNT; i++) {
        /* With the source 20 m higher it leaves its curve. */
        assert_int_equal(limits[i].end, i == SL_LIMIT_LEVEL ? SL_LIMIT_UNKNOWN
                                                            : SL_LIMIT_NONE);
        check_nan("none", limits[i].value);
    }
    forget(&f->pumps[0].record.datum_elevation);
    limits = summer(f)->limits;
    for (int i = 0; i < SL_LIMIT_COUNT; i++)
        assert_int_equal(limits[i].end, SL_LIMIT_UNKNOWN);
    f->pumps[0].record.datum_elevation = known(268.3);
    f->dossier.record.discharge_low.value -= 0.4;
    limits = summer(f)->limits;
    assert_int_equal(limits[SL_LIMIT_TEMPERATURE].end, SL_LIMIT_ALWAYS);
}

/* --- the owner's conditions ----------------------------------------------- */

/* One condition of the test's own. */
static const struct sl_pump_result *under(struct fixture *f,
                                          struct sl_condition condition)
{
    static struct sl_condition kept;

    kept = condition;
    f->tables.conditions = &kept;
    f->tables.condition_count = 1;
    return &judge(f)->conditions[0].pumps[0];
}

static const struct sl_input *
level_under(struct fixture *f, enum sl_level_basis basis, double addition)
{
    return &under(f, (struct sl_condition){.condition = "own",
                                           .level = basis,
                                           .level_addition = addition})
                ->inputs[SL_IN_SOURCE_LEVEL];
}

static void a_condition_names_its_level(void **state)
{
    static const struct {
        enum sl_level_basis basis;
        double level;
        enum sl_source_basis used;
    } rows[] = {
        {SL_LEVEL_NORMAL, 301.2, SL_SOURCE_NORMAL},
        {SL_LEVEL_LOW, 298.35, SL_SOURCE_CUT_OUT},
        {SL_LEVEL_CUT_OUT, 298.35, SL_SOURCE_CUT_OUT},
        {SL_LEVEL_RECORD_LOW, 297.9, SL_SOURCE_RECORD_LOW},
    };
    struct fixture *f = *state;

    for (size_t i = 0; i < COUNT(rows); i++) {
        const struct sl_input *level = level_under(f, rows[i].basis, 0);

        check_interval("level", &level->value, rows[i].level, rows[i].level,
                       rows[i].level);
        check_provenance("level", level, SL_RECORDED);
        assert_int_equal(f->result.worst->source_basis, rows[i].used);
        level = level_under(f, rows[i].basis, -1.37);
        check_interval("lower", &level->value, rows[i].level - 1.37,
                       rows[i].level - 1.37, rows[i].level - 1.37);
        check_provenance("lower", level, SL_DERIVED);
    }
    forget(&f->dossier.record.cut_out_level);
    check_interval("in its place",
                   &level_under(f, SL_LEVEL_CUT_OUT, 0.2)->value, 298.1, NAN,
                   298.1);
    forget(&f->dossier.record.record_low_level);
    check_interval("the normal one",
                   &level_under(f, SL_LEVEL_CUT_OUT, 0)->value, 301.2, NAN,
                   301.2);
}

static void a_condition_warms_the_water(void **state)
{
    struct fixture *f = *state;
    const struct sl_input *warmth;

    warmth = &under(f, (struct sl_condition){.condition = "own",
                                             .summer_temperature = 1,
                                             .temperature_addition = 2.7})
                  ->inputs[SL_IN_TEMPERATURE];
    check_interval("recorded", &warmth->value, 302.05, 302.05, 302.05);
    check_provenance("recorded", warmth, SL_DERIVED);
    forget(&f->dossier.record.water_temp_summer);
    warmth = &judge(f)->conditions[0].pumps[0].inputs[SL_IN_TEMPERATURE];
    check_interval("by default", &warmth->value, 299.85, 310.85, 289.45);
}

static void water_below_freezing_is_told(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a =
        under(f, (struct sl_condition){.condition = "own",
                                       .summer_temperature = 1,
                                       .temperature_addition = -29.3});

    check_state("frozen", a, SL_UNPROVEN, SL_UNPROVEN);
    assert_non_null(strstr(a->reason, "the water is colder or warmer"));
    a = under(f, (struct sl_condition){.condition = "own",
                                       .summer_temperature = 1,
                                       .temperature_addition = -21.7});
    assert_null(strstr(a->reason, "the water is colder or warmer"));
}

static struct sl_interval wall_of(struct fixture *f,
                                  enum sl_friction_state friction)
{
    return under(f, (struct sl_condition){.condition = "own",
                                          .suction_friction = friction})
        ->inputs[SL_IN_SUCTION_ROUGHNESS]
        .value;
}

/* How the roughness of the first pipe's wall is told. */
static const char *wall_rule(struct fixture *f, enum sl_friction_state friction,
                             char trust, const char *source)
{
    struct sl_ageing rows[COUNT(ageing)];

    memcpy(rows, ageing, sizeof ageing);
    rows[0].trust = trust;
    rows[0].source = source;
    f->tables.ageing = rows;
    return under(f, (struct sl_condition){.condition = "own",
                                          .suction_friction = friction})
        ->inputs[SL_IN_SUCTION_ROUGHNESS]
        .rule;
}

static void a_wall_aged_from_memory_says_so(void **state)
{
    struct fixture *f = *state;
    struct sl_pipe *pipe = &f->pipes[0].record;

    forget(&pipe->roughness);
    pipe->material = CAST_IRON;
    pipe->year_installed = known(1983);
    assert_non_null(strstr(wall_rule(f, SL_FRICTION_AGED, 'M', "recalled"),
                           "rates of the table, from memory"));
    assert_non_null(strstr(
        wall_rule(f, SL_FRICTION_AGED, 'P', "a proposal; at worst from memory"),
        "rates of the table, from memory"));
    assert_non_null(strstr(wall_rule(f, SL_FRICTION_AGED, 'P', "so we say"),
                           "rates of the table, a proposal"));
    assert_null(strstr(wall_rule(f, SL_FRICTION_AGED, 'S', "read"), "rates"));
    assert_null(
        strstr(wall_rule(f, SL_FRICTION_NEW, 'M', "recalled"), "rates"));
}

static void an_aged_wall_is_rougher_by_its_years(void **state)
{
    static const struct sl_default age = {"pipe_age", "", {30, 60, 10},
                                          SL_PURE,    "", 'P'};
    struct sl_default rows[COUNT(defaults) + 1];
    struct fixture *f = *state;
    struct sl_pipe *pipe = &f->pipes[0].record;
    struct sl_interval wall;

    memcpy(rows, defaults, sizeof defaults);
    rows[COUNT(defaults)] = age;
    f->tables.defaults = rows;
    f->tables.default_count = COUNT(rows);
    forget(&pipe->roughness);
    pipe->material = CAST_IRON;
    wall = wall_of(f, SL_FRICTION_NEW);
    check_interval("as laid", &wall, 0.00031, 0.00064, 0.00017);
    pipe->year_installed = known(1983);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("43 years", &wall, 0.00031 + 43 * 0.00004,
                   0.00064 + 43 * 0.00015, 0.00017 + 43 * 0.00001);
    forget(&pipe->year_installed);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("of unknown age", &wall, 0.00031 + 30 * 0.00004,
                   0.00064 + 60 * 0.00015, 0.00017 + 10 * 0.00001);
    pipe->year_installed = known(2031);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("not yet laid", &wall, 0.00031 + 30 * 0.00004,
                   0.00064 + 60 * 0.00015, 0.00017 + 10 * 0.00001);
    pipe->condition = SL_POOR; /* a row of its own */
    pipe->year_installed = known(2016);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("poor", &wall, 0.00264, 0.00264, 0.00264);
    pipe->year_installed = known(1926);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("at most 0.05 of the bore", &wall, 0.05 * suction_bore,
                   0.05 * suction_bore, 0.05 * suction_bore);
    pipe->roughness = known(0.00071);
    wall = wall_of(f, SL_FRICTION_AGED);
    check_interval("recorded", &wall, 0.00071, 0.00071, 0.00071);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        TEST(without_shared_pipes_a_pump_alone_governs),
        TEST(through_a_shared_header_all_together_govern),
        TEST(one_fewer_than_all_may_govern),
        TEST(an_unknown_maximum_is_named),
        TEST(too_many_pumps_are_tried_in_part),
        TEST(many_equal_pumps_are_tried_in_full),
        TEST(a_set_in_which_a_pump_stands_is_told),
        TEST(two_crossings_are_told),
        TEST(a_given_neighbour_denies_every_rule_its_end),
        TEST(the_tier_goes_by_the_measure),
        TEST(an_unknown_measure_takes_the_strictest_tier_as_adverse),
        TEST(a_lift_chooses_its_tier),
        TEST(a_rule_for_one_make_up_asks_others_for_npshr_alone),
        TEST(a_lift_limit_counts_lift_losses_and_npshr),
        TEST(velocities_are_held_to_their_limits),
        TEST(submergence_goes_by_the_bell_and_the_flow),
        TEST(a_lift_is_held_to_its_limit),
        TEST(a_straight_run_is_held_in_bores),
        TEST(the_operating_region_looks_at_all_sets),
        TEST(a_booster_keeps_its_suction_pressure),
        TEST(suction_energy_is_held_to_the_start_of_high),
        TEST(each_pump_is_held_by_its_own_nozzle_and_speed),
        TEST(roughness_is_held_to_the_bore),
        TEST(off_the_curve_is_told),
        TEST(at_the_limit_level_nothing_is_left),
        TEST(at_the_limit_of_a_main_nothing_is_left),
        TEST(at_the_limit_temperature_nothing_is_left),
        TEST(at_the_limit_flow_nothing_is_left),
        TEST(a_limit_may_be_nowhere_or_everywhere),
        TEST(a_condition_names_its_level),
        TEST(a_condition_warms_the_water),
        TEST(water_below_freezing_is_told),
        TEST(an_aged_wall_is_rougher_by_its_years),
        TEST(a_wall_aged_from_memory_says_so),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
