/* The flow a pump is judged at: how it is found, what a speed does to it,
 * and what other pumps add to the pipes they share. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "evaluator/plan.h"
#include "unit/evaluator_fixture.h"

static const double summer_kelvin = 299.35;

/* What the station asks of pump A in summer, by the formulas. */
static double asked_head(double flow, double lift)
{
    double part = flow / 0.06;

    return lift + 4.7 * part * part +
           friction_of(flow, suction_length, suction_bore, suction_wall,
                       summer_kelvin) +
           minor_of(flow, suction_bore, suction_k);
}

/* By bisection, with a curve of so many times the published speed. */
static double expected_flow(double lift, double ratio)
{
    const struct sl_curve_view head = {curve_flow, curve_head, POINTS};
    double low = curve_flow[0] * ratio, high = curve_flow[POINTS - 1] * ratio;

    for (int i = 0; i < 90; i++) {
        double flow = (low + high) / 2;
        double given = ratio * ratio * sl_curve_carried_on(&head, flow / ratio);

        if (given > asked_head(flow, lift))
            low = flow;
        else
            high = flow;
    }
    return low;
}

static void basis_goes_from_best_to_worst(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->pumps[0].record.largest_recorded_flow = known(0.0571);
    f->pumps[0].record.rated_flow = known(0.0523);
    pump = summer(f);
    assert_int_equal(pump->flow_basis, SL_FLOW_SOLVED);
    check_close("solved", pump->cases[SL_TYPICAL].flow,
                expected_flow(327.3 - 298.35, 1), 1e-10, 0);

    forget(&f->dossier.record.discharge_loss_flow);
    pump = summer(f);
    assert_int_equal(pump->flow_basis, SL_FLOW_RECORDED);
    check_close("recorded", pump->cases[SL_TYPICAL].flow, 0.0571, 0, 0);
    check_state("recorded", pump, SL_UNPROVEN, SL_CLEAR);
    assert_false(pump->inputs[SL_IN_DISCHARGE_LOSS].applies);
    assert_false(pump->inputs[SL_IN_DISCHARGE_LEVEL].applies);

    forget(&f->pumps[0].record.largest_recorded_flow);
    pump = summer(f);
    assert_int_equal(pump->flow_basis, SL_FLOW_RATED);
    check_close("rated", pump->cases[SL_TYPICAL].flow, 0.0523, 0, 0);
    check_state("rated", pump, SL_UNPROVEN, SL_CLEAR);

    forget(&f->pumps[0].record.rated_flow);
    pump = summer(f);
    assert_int_equal(pump->flow_basis, SL_FLOW_NONE);
    check_nan("none", pump->cases[SL_TYPICAL].flow);
    check_state("none", pump, SL_UNPROVEN, SL_UNPROVEN);
}

static void recorded_flow_is_seen_on_the_npshr_curve(void **state)
{
    struct fixture *f = *state;
    const struct sl_curve_view curve = npshr_curve();
    const struct sl_case *best;

    fix_flow(f, 0.0733);
    best = &summer(f)->cases[SL_FAVOURABLE];
    check_close("npshr", best->npshr, sl_curve_at(&curve, 0.0733), 1e-12, 0);
    check_nan("runout", f->result.worst->cases[SL_ADVERSE].flow);
    fix_flow(f, 0.0887);
    assert_true(summer(f)->off_curve);
    check_nan("past its end", f->result.worst->cases[SL_TYPICAL].npshr);
    check_state("past its end", f->result.worst, SL_UNPROVEN, SL_UNPROVEN);
    assert_non_null(
        strstr(f->result.worst->reason, "past the end of its published"));
}

/* The discharge lies so low that the pump runs past its last point. */
static void runout_past_the_curve_is_unproven(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.discharge_low = known(306.9);
    pump = summer(f);
    assert_true(pump->off_curve);
    assert_true(pump->cases[SL_TYPICAL].flow > curve_flow[POINTS - 1]);
    check_nan("npshr", pump->cases[SL_TYPICAL].npshr);
    check_state("past the end", pump, SL_UNPROVEN, SL_UNPROVEN);
    /* In the usual case it stays on its curve. */
    check_state("usual", &f->result.conditions[CONDITION_NORMAL].pumps[0],
                SL_CLEAR, SL_CLEAR);
}

/* NPSHR published further than the head proves nothing: the flow there is a
 * guess.  And far under its eye nothing is proven either. */
static void npshr_past_the_head_curve_is_not_used(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    forget(&f->points[POINTS - 1].head);
    f->dossier.record.discharge_low = known(316.3);
    pump = summer(f);
    assert_true(pump->cases[SL_TYPICAL].flow > curve_flow[POINTS - 2]);
    assert_true(pump->cases[SL_TYPICAL].flow < curve_flow[POINTS - 1]);
    assert_true(pump->off_curve);
    check_state("on a guess", pump, SL_UNPROVEN, SL_UNPROVEN);
    f->pumps[0].record.datum_elevation = known(315.2);
    check_state("on a guess, high", summer(f), SL_UNPROVEN, SL_UNPROVEN);
}

static void flow_before_the_first_point_is_unproven(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.discharge_low = known(298.35 + 44.9);
    pump = summer(f);
    assert_true(pump->cases[SL_TYPICAL].flow < curve_flow[0]);
    assert_true(pump->off_curve);
    check_state("before the first", pump, SL_UNPROVEN, SL_UNPROVEN);
}

static void flat_curve_without_a_crossing_is_unproven(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    for (int i = 0; i < POINTS; i++)
        f->points[i].head = known(417.3);
    pump = summer(f);
    assert_true(pump->off_curve);
    check_nan("no flow", pump->cases[SL_TYPICAL].flow);
    check_state("no crossing", pump, SL_UNPROVEN, SL_UNPROVEN);
}

static void pump_that_stands_says_so(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->dossier.record.discharge_low = known(351.7);
    pump = summer(f);
    assert_true(pump->stands);
    assert_false(pump->off_curve);
    check_state("stands", pump, SL_UNPROVEN, SL_UNPROVEN);
    assert_non_null(strstr(pump->reason, "does not reach"));
}

/* --- speed ---------------------------------------------------------------- */

static void faster_pump_is_scaled_with_exponent_two(void **state)
{
    struct fixture *f = *state;
    const struct sl_curve_view curve = npshr_curve();
    const struct sl_pump_result *pump;
    double ratio = 1591.0 / 1478.0, flow;

    f->pumps[0].record.max_speed = known(1591);
    pump = summer(f);
    flow = expected_flow(327.3 - 298.35, ratio);
    check_close("flow", pump->cases[SL_TYPICAL].flow, flow, 1e-10, 0);
    check_close("npshr", pump->cases[SL_TYPICAL].npshr,
                ratio * ratio * sl_curve_at(&curve, flow / ratio), 1e-9, 0);
    assert_non_null(pump->inputs[SL_IN_NPSHR].row);
    assert_string_equal(pump->inputs[SL_IN_NPSHR].row->field,
                        "npshr_speed_exponent_up");
    check_provenance("speed", &pump->inputs[SL_IN_SPEED], SL_RECORDED);
}

static void slower_pump_is_scaled_with_exponent_one_and_a_half(void **state)
{
    struct fixture *f = *state;
    const struct sl_curve_view curve = npshr_curve();
    const struct sl_pump_result *pump;
    double ratio = 1391.0 / 1478.0, flow;

    f->pumps[0].record.max_speed = known(1391);
    pump = summer(f);
    flow = expected_flow(327.3 - 298.35, ratio);
    check_close("flow", pump->cases[SL_TYPICAL].flow, flow, 1e-10, 0);
    check_close("npshr", pump->cases[SL_TYPICAL].npshr,
                pow(ratio, 1.5) * sl_curve_at(&curve, flow / ratio), 1e-9, 0);
    assert_string_equal(pump->inputs[SL_IN_NPSHR].row->field,
                        "npshr_speed_exponent_down");
}

/* The test's speed is the curve's, not the rated one, where it is given. */
static void curve_with_a_speed_is_scaled_from_it(void **state)
{
    struct fixture *f = *state;
    double from_test, ratio = 1478.0 / 1391.0;

    f->points[2].speed = known(1391);
    from_test = summer(f)->cases[SL_TYPICAL].flow;
    check_close("flow", from_test, expected_flow(327.3 - 298.35, ratio), 1e-10,
                0);
    check_provenance("no higher speed", &f->result.worst->inputs[SL_IN_SPEED],
                     SL_DERIVED);
}

static void no_speed_at_all_leaves_the_curve_as_it_is(void **state)
{
    struct fixture *f = *state;
    double as_it_is = summer(f)->cases[SL_TYPICAL].flow;

    forget(&f->pumps[0].record.rated_speed);
    check_close("flow", summer(f)->cases[SL_TYPICAL].flow, as_it_is, 0, 0);
    check_state("no speed", f->result.worst, SL_CLEAR, SL_CLEAR);
    assert_false(f->result.worst->inputs[SL_IN_SPEED].applies);
}

static void rate_without_curve(struct fixture *f)
{
    f->pumps[0].curve = NULL;
    f->pumps[0].record.rated_flow = known(0.0523);
    f->pumps[0].record.rated_npshr = known(2.61);
}

static void rated_point_is_scaled_like_a_curve(void **state)
{
    struct fixture *f = *state;
    const struct sl_case *typical;
    double up = 1591.0 / 1478.0, down = 1391.0 / 1478.0;

    rate_without_curve(f);
    f->pumps[0].record.max_speed = known(1591);
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("flow up", typical->flow, 0.0523 * up, 1e-12, 0);
    check_close("npshr up", typical->npshr, 2.61 * up * up, 1e-12, 0);
    f->pumps[0].record.max_speed = known(1391);
    typical = &summer(f)->cases[SL_TYPICAL];
    check_close("flow down", typical->flow, 0.0523 * down, 1e-12, 0);
    check_close("npshr down", typical->npshr, 2.61 * pow(down, 1.5), 1e-12, 0);
}

/* Without a rated speed the rated point is taken at that of the test. */
static void rated_point_takes_the_speed_of_the_test(void **state)
{
    struct fixture *f = *state;
    double down = 1391.0 / 1478.0;

    for (int i = 0; i < POINTS; i++)
        forget(&f->points[i].npshr);
    f->points[0].speed = known(1478);
    f->pumps[0].record.rated_flow = known(0.0523);
    f->pumps[0].record.rated_npshr = known(2.61);
    forget(&f->pumps[0].record.rated_speed);
    f->pumps[0].record.max_speed = known(1391);
    check_close("npshr", summer(f)->cases[SL_TYPICAL].npshr,
                2.61 * pow(down, 1.5), 1e-12, 0);
}

/* --- pipes that pumps share ----------------------------------------------- */

/* A and B draw through pipe D, C from the source alone. */
static void share_a_header(struct fixture *f)
{
    f->pipes[0].draws_from = &f->pipes[3];
    f->pipes[1].draws_from = &f->pipes[3];
    f->pipes[3].fitting_count = 0;
    f->pipes[3].record.length = known(63.7);
    f->dossier.pump_count = 3;
    f->dossier.record.pumps_running_max = known(3);
}

/* A pump's result in summer with every set it was tried in. */
static const struct sl_pump_result *with_sets(struct fixture *f, size_t pump)
{
    sl_arena_reset(&f->arena);
    sl_evaluate_station(
        &f->dossier, &f->tables,
        &(struct sl_settings){.rule = &f->rule, .list_sets = true}, &f->arena,
        &f->result);
    return &f->result.conditions[CONDITION_SUMMER].pumps[pump];
}

static const struct sl_set_case *set_named(const struct sl_pump_result *pump,
                                           const char *words)
{
    for (size_t i = 0; i < pump->set_count; i++)
        if (strcmp(pump->sets[i].words, words) == 0)
            return &pump->sets[i];
    fail_msg("no set '%s' among %zu", words, pump->set_count);
    return NULL;
}

static double header_friction(double flow)
{
    return friction_of(flow, 63.7, suction_bore, suction_wall, summer_kelvin);
}

/* Head at the header of a pump on the complete station's curve, less what is
 * asked when `all` flows through the discharge and `header` through D. */
static double left_over(double flow, double header, double all)
{
    const struct sl_curve_view head = {curve_flow, curve_head, POINTS};

    return sl_curve_at(&head, flow) - (327.3 - 298.35) -
           4.7 * (all / 0.06) * (all / 0.06) -
           friction_of(flow, suction_length, suction_bore, suction_wall,
                       summer_kelvin) -
           minor_of(flow, suction_bore, suction_k) - header_friction(header);
}

static void each_set_is_solved_with_all_its_flows(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;
    const struct sl_set_case *alone, *pair;
    double one, two;

    share_a_header(f);
    a = with_sets(f, 0);
    assert_int_equal(a->sets_tried, 4);
    assert_true(a->sets_all);
    alone = set_named(a, "alone");
    pair = set_named(a, "with B");
    one = alone->figures.flow;
    two = pair->figures.flow;
    assert_true(two < one);
    check_close("alone", left_over(one, one, one), 0, 0, 1e-9);
    check_close("with B", left_over(two, 2 * two, 2 * two), 0, 0, 1e-9);
    check_close("friction with B", pair->figures.terms.friction,
                -(friction_of(two, suction_length, suction_bore, suction_wall,
                              summer_kelvin) +
                  header_friction(2 * two)),
                1e-9, 0);
    assert_int_equal(pair->running, 2);
    assert_int_equal(set_named(a, "with B and C")->running, 3);
}

static void the_worst_set_governs(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    share_a_header(f);
    for (int pump = 0; pump < 3; pump++) {
        double least = INFINITY;
        a = with_sets(f, (size_t)pump);
        for (size_t i = 0; i < a->set_count; i++)
            least = fmin(least, a->sets[i].figures.surplus);
        check_close("least", a->cases[SL_TYPICAL].surplus, least, 0, 1e-9);
        check_close("set", a->governing.figures.surplus, least, 0, 1e-9);
        check_close("named", set_named(a, a->governing.words)->figures.surplus,
                    least, 0, 1e-9);
    }
}

static void others_are_limited_by_what_may_run(void **state)
{
    static const struct {
        double most;
        size_t sets;
    } rows[] = {{1, 1}, {2, 3}, {3, 4}, {7, 4}, {NAN, 4}};
    struct fixture *f = *state;

    share_a_header(f);
    for (size_t i = 0; i < COUNT(rows); i++) {
        const struct sl_pump_result *a;
        const struct sl_input *together;

        f->dossier.record.pumps_running_max = known(rows[i].most);
        if (isnan(rows[i].most))
            forget(&f->dossier.record.pumps_running_max);
        a = summer(f);
        together = &a->inputs[SL_IN_RUNNING_TOGETHER];
        assert_int_equal(a->sets_tried, rows[i].sets);
        check_provenance("together", together,
                         isnan(rows[i].most) ? SL_ASSUMED : SL_RECORDED);
        check_interval("together", &together->value,
                       isnan(rows[i].most) ? 3 : fmin(rows[i].most, 3),
                       isnan(rows[i].most) ? 3 : fmin(rows[i].most, 3),
                       isnan(rows[i].most) ? 1 : fmin(rows[i].most, 3));
        check_state("all", a, SL_CLEAR, SL_CLEAR);
    }
}

/* A wide main, so that pumps hardly hinder one another there, and a narrow
 * header, so that they do here. */
static void load_the_header(struct fixture *f)
{
    share_a_header(f);
    f->dossier.record.discharge_loss_head = known(0.37);
    f->pipes[3].record.length = known(217.0);
}

static void a_shared_header_makes_the_pair_govern(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;
    double alone, together;

    load_the_header(f);
    a = with_sets(f, 0);
    assert_string_equal(a->governing.words, "with B");
    alone = set_named(a, "alone")->figures.surplus;
    together = a->cases[SL_TYPICAL].surplus;
    assert_true(together < alone - 0.1);
    f->pumps[0].record.datum_elevation.value += (alone + together) / 2;
    f->pumps[1].record.datum_elevation.value += (alone + together) / 2;

    /* That the two may run together is on record: it is proven. */
    check_state("on record", summer(f), SL_THIN, SL_THIN);
    /* Where it is not, one at a time would do. */
    forget(&f->dossier.record.pumps_running_max);
    a = summer(f);
    check_state("assumed", a, SL_UNPROVEN, SL_THIN);
    assert_ptr_equal(a->leading_unknown, &a->inputs[SL_IN_RUNNING_TOGETHER]);
    assert_true(a->leading_unknown->settles);
    check_close("swing", a->leading_unknown->swing, alone - together, 1e-9, 0);
    f->dossier.record.pumps_running_max = known(1);
    check_state("one at a time", summer(f), SL_CLEAR, SL_CLEAR);
}

static void a_flow_from_the_records_has_no_bound_for_others(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a, *c;

    share_a_header(f);
    f->pumps[1].curve = NULL;
    f->pumps[1].record.rated_flow = known(0.0523);
    f->pumps[1].record.rated_npshr = known(2.61);
    a = summer(f);
    check_nan("together", a->inputs[SL_IN_RUNNING_TOGETHER].value.adverse);
    check_nan("adverse", a->cases[SL_ADVERSE].surplus);
    check_state("neighbour", a, SL_UNPROVEN, SL_CLEAR);
    assert_non_null(strstr(a->reason, "the most that a pump beside it draws"));
    /* C draws nothing through the header: beside B it only flows less. */
    c = &f->result.conditions[CONDITION_SUMMER].pumps[2];
    check_state("no shared pipe", c, SL_CLEAR, SL_CLEAR);
    /* With one pump at a time the neighbour does not matter. */
    f->dossier.record.pumps_running_max = known(1);
    check_state("alone", summer(f), SL_CLEAR, SL_CLEAR);
}

static void pump_that_stands_adds_nothing(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a, *b;

    share_a_header(f);
    f->pumps[1].record.max_speed = known(1013);
    a = with_sets(f, 0);
    check_close("beside it", set_named(a, "with B")->figures.flow,
                set_named(a, "alone")->figures.flow, 1e-12, 0);
    b = &f->result.conditions[CONDITION_SUMMER].pumps[1];
    assert_true(b->stands);
    assert_string_equal(b->stands_set, "alone");
    for (size_t i = 0; i < b->set_count; i++)
        assert_true(b->sets[i].stands);
}

/* The usual level not recorded bounds the flow of the others too: the
 * lowest one, at which this pump is judged, is the one they have. */
static void one_source_serves_all_pumps(void **state)
{
    struct fixture *f = *state;

    share_a_header(f);
    forget(&f->dossier.record.normal_level);
    check_state("usual", judge_a(f, CONDITION_NORMAL), SL_CLEAR, SL_CLEAR);
}

static void one_main_serves_all_pumps(void **state)
{
    struct fixture *f = *state;

    share_a_header(f);
    f->dossier.record.source_kind = SL_MAIN;
    f->dossier.record.source_pressure_low = known(11700);
    f->dossier.record.source_pressure_elevation = known(297.74);
    check_state("usual", judge_a(f, CONDITION_NORMAL), SL_CLEAR, SL_CLEAR);
}

static void an_unknown_eye_leads_whatever_the_others_cost(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *a;

    share_a_header(f);
    forget(&f->pumps[0].record.datum_elevation);
    a = summer(f);
    check_nan("surplus", a->cases[SL_TYPICAL].surplus);
    assert_true(a->cases[SL_TYPICAL].flow > curve_flow[0]);
    assert_ptr_equal(a->leading_unknown, &a->inputs[SL_IN_DATUM]);
    assert_true(a->leading_unknown->settles);
}

/* Each corner is the balance of a station: of one whose records hold the
 * ends of the unknowns. */
static void a_corner_is_a_station_with_its_ends_on_record(void **state)
{
    struct fixture *f = *state;
    struct sl_case cases[SL_CORNER_COUNT];
    const struct sl_case *known_end;

    forget(&f->pipes[0].record.roughness);
    f->pipes[0].fitting_count = 0;
    memcpy(cases, summer(f)->cases, sizeof cases);
    assert_true(cases[SL_ADVERSE].flow < cases[SL_FAVOURABLE].flow);

    f->pipes[0].fitting_count = 1;
    f->fittings[0].k = known(2.13);
    f->pipes[0].record.roughness = known(0.006);
    known_end = &summer(f)->cases[SL_TYPICAL];
    check_close("flow", known_end->flow, cases[SL_ADVERSE].flow, 1e-10, 0);
    check_close("NPSHA", known_end->terms.npsha, cases[SL_ADVERSE].terms.npsha,
                0, 1e-9);
    check_close("NPSHR", known_end->npshr, cases[SL_ADVERSE].npshr, 0, 1e-9);
    f->fittings[0].k = known(0.23);
    f->pipes[0].record.roughness = known(0.000003);
    known_end = &summer(f)->cases[SL_TYPICAL];
    check_close("flow", known_end->flow, cases[SL_FAVOURABLE].flow, 1e-10, 0);
    check_close("NPSHA", known_end->terms.npsha,
                cases[SL_FAVOURABLE].terms.npsha, 0, 1e-9);
    check_close("NPSHR", known_end->npshr, cases[SL_FAVOURABLE].npshr, 0, 1e-9);
}

/* On a flat head curve a rough suction lessens NPSHR by more than it costs: a
 * wall that is not recorded must not prove short what a rough one is not. */
static void flat_curve_is_not_short_for_want_of_its_wall(void **state)
{
    const double part = 0.082;
    struct fixture *f = *state;
    struct sl_station *station = &f->dossier.record;

    for (int i = 0; i < POINTS; i++)
        f->points[i].head = known(3 + part * curve_head[i]);
    station->discharge_loss_head.value *= part;
    station->discharge_low = known(298.35 + 3.848);
    f->pumps[0].record.datum_elevation = known(302.356);
    f->pipes[0].record.roughness = known(0.006);
    check_state("rough", summer(f), SL_THIN, SL_THIN);
    forget(&f->pipes[0].record.roughness);
    assert_int_not_equal(summer(f)->state, SL_SHORT);
}

#define TEST(test)                                                             \
    cmocka_unit_test_setup_teardown(test, fixture_setup, fixture_teardown)

/* A record that was rejected is missed: what rests on it has no bound, and
 * is not called clear. */
static void a_rejected_fitting_leaves_the_losses_without_a_bound(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    check_state("complete", summer(f), SL_CLEAR, SL_CLEAR);
    f->pipes[0].rejected_fittings = 1;
    pump = summer(f);
    check_state("one rejected", pump, SL_UNPROVEN, SL_CLEAR);
    check_nan("adverse", pump->cases[SL_ADVERSE].surplus);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_SUCTION_MINOR]);
    assert_non_null(strstr(pump->reason, "was rejected"));
}

/* Nor is a lone fitting that was rejected taken for none: a likely sum stands
 * in. */
static void a_lone_rejected_fitting_is_not_nought(void **state)
{
    struct fixture *f = *state;
    const struct sl_input *input;

    f->pipes[0].fitting_count = 0;
    f->pipes[0].rejected_fittings = 1;
    input = &summer(f)->inputs[SL_IN_SUCTION_MINOR];
    check_provenance("losses", input, SL_UNKNOWN);
    assert_true(input->value.typical > 0.1);
    check_nan("no bound", input->value.adverse);
    assert_ptr_equal(input->row,
                     sl_default_find(&f->tables, "suction_minor_k", ""));
}

static void a_rejected_curve_point_leaves_npshr_without_a_bound(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    f->curve.rejected_points = 2;
    pump = summer(f);
    check_state("points rejected", pump, SL_UNPROVEN, SL_CLEAR);
    check_nan("adverse", pump->cases[SL_ADVERSE].npshr);
    check_nan("favourable", pump->cases[SL_FAVOURABLE].npshr);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_NPSHR]);
    f->pumps[0].record.datum_elevation = known(318.0);
    check_state("nor short", summer(f), SL_UNPROVEN, SL_SHORT);
}

/* Nor does the rated point, or the speed, stand in for what is missed. */
static void a_rejected_curve_point_is_told_whatever_npshr_rests_on(void **state)
{
    struct fixture *f = *state;
    const struct sl_input *npshr;

    f->curve.rejected_points = 1;
    f->pumps[0].record.max_speed = known(1500);
    npshr = &summer(f)->inputs[SL_IN_NPSHR];
    assert_non_null(strstr(npshr->rule, "was rejected"));
    f->pumps[0].record.rated_flow = known(0.0523);
    f->pumps[0].record.rated_npshr = known(2.61);
    for (int i = 0; i < POINTS; i++)
        forget(&f->points[i].npshr);
    npshr = &summer(f)->inputs[SL_IN_NPSHR];
    check_provenance("rated", npshr, SL_UNKNOWN);
    check_nan("favourable", npshr->value.favourable);
    assert_true(npshr->settles);
    assert_non_null(strstr(npshr->rule, "was rejected"));
}

/* Two ways in which a neighbour's curve tells no largest flow of it. */
static void neighbour_whose_curve_bounds_nothing_has_no_most_flow(void **state)
{
    struct fixture *f = *state;
    struct sl_curve holed = f->curve;

    share_a_header(f);
    f->pumps[0].record.datum_elevation = known(294.0);
    check_state("all known", summer(f), SL_CLEAR, SL_CLEAR);
    holed.rejected_points = 1;
    f->pumps[1].curve = &holed;
    check_state("a point rejected", summer(f), SL_UNPROVEN, SL_CLEAR);
    f->pumps[1].curve = &f->curve;
    forget(&f->pumps[1].record.rated_speed);
    f->pumps[1].record.max_speed = known(1790);
    check_state("speed of the test unknown", summer(f), SL_UNPROVEN, SL_CLEAR);
    assert_non_null(
        strstr(f->result.conditions[CONDITION_SUMMER].pumps[0].reason,
               "the most that a pump beside it draws"));
}

static void a_rejected_pump_keeps_its_station_from_clear(void **state)
{
    struct fixture *f = *state;

    f->dossier.record.pumps_running_max = known(1);
    assert_int_equal(judge(f)->state, SL_CLEAR);
    f->dossier.rejected_pumps = 1;
    assert_int_equal(judge(f)->state, SL_UNPROVEN);
    assert_int_equal(f->result.worst->state, SL_CLEAR);
    /* Beside it, it could draw through the same pipe. */
    f->dossier.record.pumps_running_max = known(2);
    check_state("beside a rejected one", summer(f), SL_UNPROVEN, SL_CLEAR);
}

/* A pump beside it whose suction is not recorded may draw through the same
 * pipe. */
static void a_neighbour_without_suction_records_has_no_bound(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump;

    share_a_header(f);
    f->dossier.record.pumps_running_max = known(2);
    check_state("both recorded", summer(f), SL_CLEAR, SL_CLEAR);
    f->pumps[1].suction = NULL;
    pump = judge_a(f, CONDITION_SUMMER);
    check_state("the other is not", pump, SL_UNPROVEN, SL_CLEAR);
    f->dossier.record.pumps_running_max = known(1);
    pump = judge_a(f, CONDITION_SUMMER);
    check_state("never beside it", pump, SL_CLEAR, SL_CLEAR);
}

/* A service that is not recorded may be that of a river. */
static void unknown_service_takes_the_lower_level_too(void **state)
{
    struct fixture *f = *state;

    f->dossier.record.service = 0;
    f->dossier.record.cut_out_level = known(298.35);
    f->dossier.record.record_low_level = known(297.1);
    check_close("level", summer(f)->inputs[SL_IN_SOURCE_LEVEL].value.typical,
                297.1, 0, 0);
}

/* What it has run at it may run at again: a larger flow on record is the
 * adverse end of a solved one. */
static void a_larger_flow_on_record_is_the_adverse_end(void **state)
{
    struct fixture *f = *state;
    const struct sl_pump_result *pump = summer(f);
    double solved = pump->cases[SL_TYPICAL].flow;
    struct sl_curve_view curve = npshr_curve();

    f->pumps[0].record.largest_recorded_flow = known(0.93 * solved);
    pump = summer(f);
    check_close("a smaller one", pump->cases[SL_ADVERSE].flow, solved, 0, 0);
    f->pumps[0].record.largest_recorded_flow = known(1.07 * solved);
    pump = summer(f);
    check_close("typical", pump->cases[SL_TYPICAL].flow, solved, 0, 0);
    check_close("adverse", pump->cases[SL_ADVERSE].flow, 1.07 * solved, 0, 0);
    check_close("NPSHR there", pump->cases[SL_ADVERSE].npshr,
                sl_curve_at(&curve, 1.07 * solved), 1e-14, 0);
    check_state("still clear", pump, SL_CLEAR, SL_CLEAR);
    /* Past the published curve it bounds nothing. */
    f->pumps[0].record.largest_recorded_flow = known(2 * solved);
    pump = summer(f);
    check_state("off the curve", pump, SL_UNPROVEN, SL_CLEAR);
    assert_ptr_equal(pump->leading_unknown, &pump->inputs[SL_IN_FLOW]);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        TEST(basis_goes_from_best_to_worst),
        TEST(recorded_flow_is_seen_on_the_npshr_curve),
        TEST(runout_past_the_curve_is_unproven),
        TEST(npshr_past_the_head_curve_is_not_used),
        TEST(flow_before_the_first_point_is_unproven),
        TEST(flat_curve_without_a_crossing_is_unproven),
        TEST(pump_that_stands_says_so),
        TEST(faster_pump_is_scaled_with_exponent_two),
        TEST(slower_pump_is_scaled_with_exponent_one_and_a_half),
        TEST(curve_with_a_speed_is_scaled_from_it),
        TEST(no_speed_at_all_leaves_the_curve_as_it_is),
        TEST(rated_point_is_scaled_like_a_curve),
        TEST(rated_point_takes_the_speed_of_the_test),
        TEST(each_set_is_solved_with_all_its_flows),
        TEST(the_worst_set_governs),
        TEST(others_are_limited_by_what_may_run),
        TEST(a_shared_header_makes_the_pair_govern),
        TEST(a_flow_from_the_records_has_no_bound_for_others),
        TEST(pump_that_stands_adds_nothing),
        TEST(one_source_serves_all_pumps),
        TEST(one_main_serves_all_pumps),
        TEST(an_unknown_eye_leads_whatever_the_others_cost),
        TEST(a_corner_is_a_station_with_its_ends_on_record),
        TEST(flat_curve_is_not_short_for_want_of_its_wall),
        TEST(a_rejected_fitting_leaves_the_losses_without_a_bound),
        TEST(a_lone_rejected_fitting_is_not_nought),
        TEST(a_rejected_curve_point_leaves_npshr_without_a_bound),
        TEST(a_rejected_curve_point_is_told_whatever_npshr_rests_on),
        TEST(neighbour_whose_curve_bounds_nothing_has_no_most_flow),
        TEST(a_rejected_pump_keeps_its_station_from_clear),
        TEST(a_neighbour_without_suction_records_has_no_bound),
        TEST(unknown_service_takes_the_lower_level_too),
        TEST(a_larger_flow_on_record_is_the_adverse_end),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
