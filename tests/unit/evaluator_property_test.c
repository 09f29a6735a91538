/* What holds for every station: tried on many made at random from
 * a fixed seed. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "unit/random_station.h"

enum { STATIONS = 1200 };

/* A curve of this size: the fixture's, stretched. */
static void random_size_curve(struct fixture *f, uint64_t *seed, double flow)
{
    double head = between(seed, 0.6, 2.3), npshr = between(seed, 0.7, 1.7);

    for (int i = 0; i < POINTS; i++) {
        f->points[i].flow = known(curve_flow[i] * flow);
        f->points[i].head = known(curve_head[i] * head);
        f->points[i].npshr = known(curve_npshr[i] * npshr);
    }
    f->dossier.record.discharge_low = known(298.35 + 29.1 * head);
    f->dossier.record.discharge_normal =
        known(298.35 + 29.1 * head + between(seed, 0.4, 3.1));
    f->dossier.record.discharge_loss_flow = known(0.06 * flow);
    f->dossier.record.discharge_loss_head = known(between(seed, 1.7, 6.3));
}

/* All recorded; two or three pumps on a header or on pipes of their own. */
static void make_random(struct fixture *f, uint64_t *seed)
{
    struct sl_station *station = &f->dossier.record;
    double flow = between(seed, 0.4, 4.7), level;

    fixture_make(f);
    random_size_curve(f, seed, flow);
    station->service = 1 + (int)between(seed, 0, 6);
    station->site_elevation = known(between(seed, -20, 2300));
    station->cut_out_level = known(between(seed, 297.6, 299.1));
    level = station->cut_out_level.value;
    station->record_low_level = known(level + between(seed, -0.9, 0.4));
    station->normal_level = known(level + between(seed, 0.1, 1.9));
    station->water_temp_normal = known(between(seed, 277, 290));
    station->water_temp_summer =
        known(station->water_temp_normal.value + between(seed, 2, 19));
    station->barometer_low =
        known(sl_standard_atmosphere(station->site_elevation.value) *
              between(seed, 0.96, 1.0));
    f->dossier.pump_count = 1 + (size_t)between(seed, 0, 3);
    station->pumps_running_max = known(1 + floor(between(seed, 0, 3)));
    for (int i = 0; i < PIPES; i++) {
        struct sl_pipe *pipe = &f->pipes[i].record;

        pipe->length = known(between(seed, 2.1, 47));
        pipe->bore = known(suction_bore * sqrt(flow) * between(seed, 0.9, 1.5));
        pipe->roughness = known(between(seed, 0.00001, 0.0021));
        if (i < PUMPS && chance(seed, 0.4))
            f->pipes[i].draws_from = &f->pipes[3];
    }
    for (int i = 0; i < PUMPS; i++)
        f->pumps[i].record.datum_elevation = known(between(seed, 295, 305));
}

static void forget_at_times(struct sl_number *number, uint64_t *seed)
{
    if (chance(seed, 0.35))
        forget(number);
}

/* What has an honest figure at either end. */
static void forget_bounded(struct fixture *f, uint64_t *seed)
{
    struct sl_station *station = &f->dossier.record;

    forget_at_times(&station->water_temp_summer, seed);
    forget_at_times(&station->water_temp_normal, seed);
    forget_at_times(&station->barometer_low, seed);
    forget_at_times(&station->pumps_running_max, seed);
    if (chance(seed, 0.35))
        station->service = 0;
    if (chance(seed, 0.35)) {
        station->discharge_length = known(between(seed, 90, 1100));
        station->discharge_bore = known(
            sqrt(station->discharge_loss_flow.value) * between(seed, 1.0, 1.3));
        forget(&station->discharge_loss_head);
        station->discharge_material = (int)between(seed, 0, 3);
    }
    for (int i = 0; i < PIPES; i++) {
        forget_at_times(&f->pipes[i].record.roughness, seed);
        f->pipes[i].record.material = (int)between(seed, 0, 3);
        if (chance(seed, 0.35))
            f->pipes[i].fitting_count = 0;
    }
    for (int i = 0; i < FITTINGS; i++)
        forget_at_times(&f->fittings[i].k, seed);
}

/* What has none. */
static void forget_unbounded(struct fixture *f, uint64_t *seed)
{
    struct sl_station *station = &f->dossier.record;
    struct sl_number *const numbers[] = {
        &station->site_elevation,
        &station->cut_out_level,
        &station->record_low_level,
        &station->normal_level,
        &station->discharge_low,
        &station->discharge_normal,
        &f->pipes[0].record.length,
        &f->pipes[3].record.bore,
        &f->pumps[0].record.datum_elevation,
        &f->pumps[1].record.rated_speed,
    };

    for (size_t i = 0; i < COUNT(numbers); i++)
        if (chance(seed, 0.1))
            forget(numbers[i]);
    if (chance(seed, 0.1))
        station->source_kind = 0;
    if (chance(seed, 0.1))
        f->pumps[2].suction = NULL;
    if (chance(seed, 0.1))
        f->pumps[1].curve = NULL;
}

/* Runs a check on every pump result of stations made by `make`. */
static void
for_each_pump(uint64_t seed, void (*make)(struct fixture *f, uint64_t *seed),
              void (*check)(const struct sl_pump_result *pump, void *context),
              void *context)
{
    for (int n = 0; n < STATIONS; n++) {
        struct fixture f;

        make(&f, &seed);
        judge(&f);
        for (size_t c = 0; c < f.result.condition_count; c++)
            for (size_t i = 0; i < f.dossier.pump_count; i++)
                check(&f.result.conditions[c].pumps[i], context);
        sl_arena_release(&f.arena);
    }
}

static void make_bounded(struct fixture *f, uint64_t *seed)
{
    make_random(f, seed);
    forget_bounded(f, seed);
}

static void make_any(struct fixture *f, uint64_t *seed)
{
    make_bounded(f, seed);
    forget_unbounded(f, seed);
}

/* Head curves so flat that more suction loss, by lessening the flow, lowers
 * NPSHR by more than NPSHA. */
static void make_low_lift(struct fixture *f, uint64_t *seed)
{
    struct sl_station *station = &f->dossier.record;
    double part = between(seed, 0.06, 0.3);

    make_bounded(f, seed);
    for (int i = 0; i < POINTS; i++)
        f->points[i].head.value = 3 + part * curve_head[i];
    station->discharge_low.value = 298.35 + 2 + 33 * part;
    station->discharge_normal.value = station->discharge_low.value + 0.2;
    station->discharge_loss_head.value *= part;
}

struct tally {
    int checked;
    int by_state[SL_STATE_COUNT];
};

static void check_order(const struct sl_pump_result *pump, void *context)
{
    const struct sl_case *cases = pump->cases;
    double adverse = cases[SL_ADVERSE].surplus;
    double typical = cases[SL_TYPICAL].surplus;
    double favourable = cases[SL_FAVOURABLE].surplus;
    struct tally *tally = context;

    if (isnan(adverse) || isnan(typical) || isnan(favourable))
        return;
    tally->checked++;
    if (adverse > typical + 0.001 || typical > favourable + 0.001)
        fail_msg("surplus %.6f, %.6f, %.6f from adverse to favourable", adverse,
                 typical, favourable);
}

static void check_adverse_is_least(const struct sl_pump_result *pump,
                                   void *context)
{
    const struct sl_case *cases = pump->cases;
    double adverse = cases[SL_ADVERSE].surplus;
    struct tally *tally = context;

    if (adverse > cases[SL_TYPICAL].surplus + 0.001 ||
        adverse > cases[SL_FAVOURABLE].surplus + 0.001)
        fail_msg("surplus %.6f adverse, %.6f typical, %.6f favourable", adverse,
                 cases[SL_TYPICAL].surplus, cases[SL_FAVOURABLE].surplus);
    tally->checked += !isnan(adverse);
}

static void adverse_end_is_the_least_on_a_flat_curve_too(void **state)
{
    struct tally tally = {0};

    (void)state;
    for_each_pump(3307741, make_low_lift, check_adverse_is_least, &tally);
    assert_true(tally.checked > 1000);
}

static void corners_lie_in_order(void **state)
{
    struct tally tally = {0};

    (void)state;
    for_each_pump(7230915, make_bounded, check_order, &tally);
    for_each_pump(4418207, make_any, check_order, &tally);
    print_message("corners in order on %d pump results\n", tally.checked);
    assert_true(tally.checked > 1000);
}

/* Short and thin by the favourable end, clear by the adverse one, and no
 * other way. */
static void check_verdict(const struct sl_pump_result *pump, void *context)
{
    const struct sl_case *best = &pump->cases[SL_FAVOURABLE];
    bool is_short = best->margin < 0, is_thin = best->surplus < 0;
    bool is_clear = pump->cases[SL_ADVERSE].surplus >= 0;
    enum sl_state want = is_short   ? SL_SHORT
                         : is_thin  ? SL_THIN
                         : is_clear ? SL_CLEAR
                                    : SL_UNPROVEN;
    struct tally *tally = context;

    assert_int_equal(pump->state, want);
    tally->by_state[pump->state]++;
    for (int corner = 0; corner < SL_CORNER_COUNT; corner++)
        if (!isnan(pump->cases[corner].terms.npsha))
            check_sum("terms", &pump->cases[corner].terms);
    if (pump->state != SL_UNPROVEN) {
        assert_int_equal(pump->likely, pump->state);
        assert_null(pump->leading_unknown);
    } else {
        assert_true(pump->reason[0] != '\0');
    }
    tally->checked++;
}

static void verdict_follows_from_the_corners(void **state)
{
    struct tally tally = {0};

    (void)state;
    for_each_pump(9920441, make_any, check_verdict, &tally);
    print_message("%d short, %d thin, %d unproven, %d clear\n",
                  tally.by_state[SL_SHORT], tally.by_state[SL_THIN],
                  tally.by_state[SL_UNPROVEN], tally.by_state[SL_CLEAR]);
    for (int i = 0; i < SL_STATE_COUNT; i++)
        assert_true(tally.by_state[i] > 100);
}

/* Not a law: a pump may run past its curve at the usual level alone, and
 * cold water in a long pipe may cost more.  None of these stations is so. */
static void normal_is_clear_where_summer_low_is(void **state)
{
    uint64_t seed = 5541093;
    int clear = 0;

    (void)state;
    for (int n = 0; n < STATIONS; n++) {
        struct fixture f;

        make_bounded(&f, &seed);
        if (chance(&seed, 0.2))
            forget(&f.dossier.record.normal_level);
        judge(&f);
        for (size_t i = 0; i < f.dossier.pump_count; i++) {
            const struct sl_pump_result *low = &f.result.conditions[1].pumps[i];
            const struct sl_pump_result *usual =
                &f.result.conditions[0].pumps[i];

            if (low->state != SL_CLEAR)
                continue;
            check_state("usual", usual, SL_CLEAR, SL_CLEAR);
            clear++;
        }
        sl_arena_release(&f.arena);
    }
    print_message("%d clear in both conditions\n", clear);
    assert_true(clear > 500);
}

static void lower_level_never_raises_npsha(void **state)
{
    uint64_t seed = 1830274;
    int checked = 0;

    (void)state;
    for (int n = 0; n < STATIONS; n++) {
        struct fixture f;
        double before[SL_CORNER_COUNT], fall;
        const struct sl_pump_result *pump;

        make_bounded(&f, &seed);
        fix_flow(&f, between(&seed, 0.01, 0.2));
        fall = between(&seed, 0.001, 9.3);
        pump = summer(&f);
        for (int c = 0; c < SL_CORNER_COUNT; c++)
            before[c] = pump->cases[c].terms.npsha;
        f.dossier.record.cut_out_level.value -= fall;
        f.dossier.record.record_low_level.value -= fall;
        pump = summer(&f);
        for (int c = 0; c < SL_CORNER_COUNT; c++) {
            double after = pump->cases[c].terms.npsha;

            if (isnan(before[c]) || isnan(after))
                continue;
            if (after > before[c] - fall + 1e-9)
                fail_msg("level %.4f m lower: NPSHA from %.6f to %.6f m", fall,
                         before[c], after);
            checked++;
        }
        sl_arena_release(&f.arena);
    }
    assert_true(checked > 1000);
}

static void check_same(const struct sl_pump_result *a,
                       const struct sl_pump_result *b)
{
    assert_int_equal(a->state, b->state);
    assert_int_equal(a->likely, b->likely);
    assert_string_equal(a->reason, b->reason);
    assert_memory_equal(a->counts, b->counts, sizeof a->counts);
    for (int c = 0; c < SL_CORNER_COUNT; c++) {
        check_interval(
            "case",
            &(struct sl_interval){a->cases[c].flow, a->cases[c].surplus,
                                  a->cases[c].terms.npsha},
            b->cases[c].flow, b->cases[c].surplus, b->cases[c].terms.npsha);
    }
    assert_int_equal(a->leading_unknown ? (int)a->leading_unknown->id : -1,
                     b->leading_unknown ? (int)b->leading_unknown->id : -1);
}

static void order_of_pumps_changes_only_the_order(void **state)
{
    uint64_t seed = 8106623;
    int checked = 0;

    (void)state;
    for (int n = 0; n < STATIONS / 4; n++) {
        struct fixture f;
        struct sl_station_result first;
        struct sl_arena kept = {0};
        struct sl_dossier_pump a;

        make_any(&f, &seed);
        f.dossier.pump_count = PUMPS;
        sl_evaluate_station(&f.dossier, &f.tables,
                            &(struct sl_settings){.rule = &f.rule}, &kept,
                            &first);
        a = f.pumps[0];
        f.pumps[0] = f.pumps[2];
        f.pumps[2] = a;
        judge(&f);
        for (size_t c = 0; c < first.condition_count; c++)
            for (int i = 0; i < PUMPS; i++, checked++)
                check_same(&first.conditions[c].pumps[i],
                           &f.result.conditions[c].pumps[PUMPS - 1 - i]);
        assert_int_equal(first.state, f.result.state);
        sl_arena_release(&kept);
        sl_arena_release(&f.arena);
    }
    assert_int_equal(checked, STATIONS / 4 * PUMPS * 2);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(corners_lie_in_order),
        cmocka_unit_test(adverse_end_is_the_least_on_a_flat_curve_too),
        cmocka_unit_test(verdict_follows_from_the_corners),
        cmocka_unit_test(normal_is_clear_where_summer_low_is),
        cmocka_unit_test(lower_level_never_raises_npsha),
        cmocka_unit_test(order_of_pumps_changes_only_the_order),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
