/* Laws that hold for every station, tried on many made at random from a fixed
 * seed; SL_LAW_STATIONS in the environment sets on how many each. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdlib.h>

#include <cmocka.h>

#include "base/units.h"
#include "model/fields.h"
#include "unit/random_station.h"

/* Of a head, m, and of what a search found, SI. */
#define CLOSE 1e-9
#define FOUND 1e-5

#ifdef __SANITIZE_ADDRESS__ /* several times slower */
enum { STATIONS = 100 };
#else
enum { STATIONS = 500 };
#endif

static int stations(void)
{
    const char *wanted = getenv("SL_LAW_STATIONS");

    return wanted ? (int)strtol(wanted, NULL, 10) : STATIONS;
}

static void evaluate(struct random_station *s, int rule, bool apart,
                     struct sl_station_result *result)
{
    const struct sl_settings settings = {.rule = &s->rules[rule],
                                         .apart = apart};

    sl_arena_reset(&s->arena);
    sl_evaluate_station(&s->dossier, &s->tables, &settings, &s->arena, result);
}

static bool close_to(double a, double b, double allowed)
{
    return (isnan(a) && isnan(b)) || a == b || fabs(a - b) <= allowed;
}

static void same_case(const char *law, const struct sl_case *a,
                      const struct sl_case *b)
{
    const double pairs[][2] = {
        {a->flow, b->flow},
        {a->terms.atmosphere, b->terms.atmosphere},
        {a->terms.barometer, b->terms.barometer},
        {a->terms.gauge, b->terms.gauge},
        {a->terms.elevation, b->terms.elevation},
        {a->terms.velocity, b->terms.velocity},
        {a->terms.friction, b->terms.friction},
        {a->terms.minor, b->terms.minor},
        {a->terms.vapour, b->terms.vapour},
        {a->terms.gas, b->terms.gas},
        {a->terms.npsha, b->terms.npsha},
        {a->npshr, b->npshr},
        {a->required, b->required},
        {a->margin, b->margin},
        {a->surplus, b->surplus},
    };

    for (size_t i = 0; i < COUNT(pairs); i++)
        if (!close_to(pairs[i][0], pairs[i][1], CLOSE))
            fail_msg("%s: figure %zu of a case is %.12g and %.12g", law, i,
                     pairs[i][0], pairs[i][1]);
}

static void same_pump(const char *law, const struct sl_pump_result *a,
                      const struct sl_pump_result *b)
{
    assert_int_equal(a->state, b->state);
    assert_int_equal(a->likely, b->likely);
    assert_int_equal(a->flow_basis, b->flow_basis);
    assert_int_equal(a->off_curve, b->off_curve);
    assert_int_equal(a->stands, b->stands);
    assert_int_equal(a->governing.running, b->governing.running);
    assert_memory_equal(a->counts, b->counts, sizeof a->counts);
    assert_int_equal(a->leading_unknown ? (int)a->leading_unknown->id : -1,
                     b->leading_unknown ? (int)b->leading_unknown->id : -1);
    for (int c = 0; c < SL_CORNER_COUNT; c++)
        same_case(law, &a->cases[c], &b->cases[c]);
    for (size_t i = 0; i < a->rule_count; i++) {
        assert_int_equal(a->rules[i].state, b->rules[i].state);
        for (int c = 0; c < SL_CORNER_COUNT; c++)
            assert_true(close_to(a->rules[i].surplus[c], b->rules[i].surplus[c],
                                 CLOSE));
    }
    for (int i = 0; i < SL_CHECK_COUNT; i++) {
        assert_int_equal(a->checks[i].end, b->checks[i].end);
        assert_true(close_to(a->checks[i].value, b->checks[i].value, CLOSE));
    }
    for (int i = 0; i < SL_LIMIT_COUNT; i++) {
        assert_int_equal(a->limits[i].end, b->limits[i].end);
        if (!close_to(a->limits[i].value, b->limits[i].value, FOUND))
            fail_msg("%s: limit %d is %.12g and %.12g", law, i,
                     a->limits[i].value, b->limits[i].value);
    }
}

/* --- the source ----------------------------------------------------------- */

/* Every flow on record, none solved. */
static void give_flows(struct random_station *s, uint64_t *seed)
{
    forget(&s->dossier.record.discharge_low);
    forget(&s->dossier.record.discharge_normal);
    for (size_t i = 0; i < s->dossier.pump_count; i++)
        s->pumps[i].record.largest_recorded_flow =
            known(s->points[i][2].flow.value * between(seed, 0.5, 1.6));
}

static void lower_source(struct sl_station *station, double fall)
{
    struct sl_number *const levels[] = {
        &station->cut_out_level, &station->record_low_level,
        &station->normal_level, &station->source_pressure_elevation};

    for (size_t i = 0; i < COUNT(levels); i++)
        levels[i]->value -= levels[i]->known ? fall : 0;
}

static void a_lower_source_never_raises_npsha(void **state)
{
    uint64_t seed = 60203;
    long held = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station s, lower;
        struct sl_station_result high, low;
        double fall = between(&seed, 0.001, 9);
        int rule = one_of(&seed, RULES);

        random_make(&s, &seed);
        give_flows(&s, &seed);
        lower = s;
        random_wire(&lower);
        /* The air stays: it is taken from a level where nothing tells it. */
        if (!s.dossier.record.site_elevation.known)
            s.dossier.record.site_elevation =
                lower.dossier.record.site_elevation = known(77);
        lower_source(&lower.dossier.record, fall);
        evaluate(&s, rule, false, &high);
        evaluate(&lower, rule, false, &low);
        for (size_t p = 0; p < s.dossier.pump_count; p++)
            for (int c = 0; c < SL_CORNER_COUNT; c++) {
                double before =
                    high.conditions[0].pumps[p].cases[c].terms.npsha;
                double after = low.conditions[0].pumps[p].cases[c].terms.npsha;

                if (after > before)
                    fail_msg("source %.4f m lower: NPSHA from %.6f to %.6f m",
                             fall, before, after);
                held += !isnan(after - before);
            }
        sl_arena_release(&s.arena);
        sl_arena_release(&lower.arena);
    }
    print_message("%ld corners held\n", held);
    assert_true(held > 2 * stations());
}

/* --- names and order ------------------------------------------------------ */

/* Pump i of the one is pump `place[i]` of the other, under another name. */
static void shuffle(const struct random_station *s, uint64_t *seed,
                    struct random_station *other, size_t *place)
{
    static const char *const names[PUMPS_MOST] = {"9", "x", "Z", "P", "01"};
    size_t count = s->dossier.pump_count;

    for (size_t i = 0; i < count; i++)
        place[i] = i;
    for (size_t i = count; i > 1; i--) {
        size_t j = (size_t)one_of(seed, (int)i), kept = place[i - 1];

        place[i - 1] = place[j];
        place[j] = kept;
    }
    *other = *s;
    other->arena = (struct sl_arena){0};
    for (size_t i = 0; i < count; i++) {
        other->pumps[place[i]] = s->pumps[i];
        other->pumps[place[i]].record.pump_id = names[place[i]];
        other->suction[place[i]] = s->suction[i];
        other->curve[place[i]] = s->curve[i];
    }
    random_wire(other);
}

static void names_and_order_change_nothing(void **state)
{
    uint64_t seed = 7710034;
    int held = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station s, other;
        struct sl_station_result one, two;
        int rule = one_of(&seed, RULES);
        size_t place[PUMPS_MOST];

        random_make(&s, &seed);
        if (s.dossier.pump_count < 2)
            continue;
        shuffle(&s, &seed, &other, place);
        evaluate(&s, rule, false, &one);
        evaluate(&other, rule, false, &two);
        assert_int_equal(one.state, two.state);
        for (size_t p = 0; p < s.dossier.pump_count; p++, held++)
            same_pump("order", &one.conditions[0].pumps[p],
                      &two.conditions[0].pumps[place[p]]);
        sl_arena_release(&s.arena);
        sl_arena_release(&other.arena);
    }
    print_message("%d pumps held\n", held);
    assert_true(held > stations());
}

/* --- units ---------------------------------------------------------------- */

/* A value through the unit it is shown in, and back. */
static void through(enum sl_quantity quantity, enum sl_unit_system system,
                    struct sl_number *number)
{
    const struct sl_unit *unit = sl_unit_shown(quantity, system);

    if (number->known)
        number->value = sl_to_si(unit, sl_from_si(unit, number->value));
}

static void record_through(enum sl_kind kind, enum sl_unit_system system,
                           void *record)
{
    const struct sl_record_kind *fields = sl_record_kind(kind);

    for (size_t i = 0; i < fields->field_count; i++)
        if (fields->fields[i].type == SL_FIELD_NUMBER)
            through(fields->fields[i].quantity, system,
                    sl_field_number(&fields->fields[i], record));
}

static void all_through(struct random_station *s, enum sl_unit_system system)
{
    record_through(SL_KIND_STATION, system, &s->dossier.record);
    for (int i = 0; i < PUMPS_MOST; i++) {
        record_through(SL_KIND_PUMP, system, &s->pumps[i].record);
        for (int k = 0; k < CURVE_POINTS; k++)
            record_through(SL_KIND_CURVE, system, &s->points[i][k]);
    }
    for (int i = 0; i < PIPES_MOST; i++)
        record_through(SL_KIND_PIPE, system, &s->pipes[i].record);
}

static void units_change_nothing(void **state)
{
    uint64_t seed = 9914;
    int held = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station metric, customary;
        struct sl_station_result one, two;
        int rule = one_of(&seed, RULES);

        random_make(&metric, &seed);
        customary = metric;
        random_wire(&customary);
        all_through(&metric, SL_SI);
        all_through(&customary, SL_US);
        evaluate(&metric, rule, false, &one);
        evaluate(&customary, rule, false, &two);
        assert_int_equal(one.state, two.state);
        for (size_t p = 0; p < metric.dossier.pump_count; p++, held++)
            same_pump("units", &one.conditions[0].pumps[p],
                      &two.conditions[0].pumps[p]);
        sl_arena_release(&metric.arena);
        sl_arena_release(&customary.arena);
    }
    print_message("%d pumps held\n", held);
    assert_true(held > stations());
}

/* --- equal pumps ---------------------------------------------------------- */

/* Makes pumps from `first` on equal to it, on equal pipes of their own. */
static void make_equal(struct random_station *s, size_t first)
{
    for (size_t i = first + 1; i < s->dossier.pump_count; i++) {
        const char *name = s->pumps[i].record.pump_id;

        s->pumps[i] = s->pumps[first];
        s->pumps[i].record.pump_id = name;
        s->pipes[i] = s->pipes[first];
        s->fittings[i] = s->fittings[first];
        s->curve[i] = s->curve[first];
        s->from[i] = s->from[first];
        s->suction[i] =
            s->suction[first] == (int)first ? (int)i : s->suction[first];
    }
    random_wire(s);
}

static void equal_pumps_are_solved_as_if_one_by_one(void **state)
{
    uint64_t seed = 5533;
    int held = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station s, apart;
        struct sl_station_result one, two;
        int rule = one_of(&seed, RULES);

        random_make(&s, &seed);
        if (s.dossier.pump_count < 2)
            continue;
        make_equal(&s, s.dossier.pump_count > 2 && chance(&seed, 0.5));
        apart = s;
        random_wire(&apart);
        evaluate(&s, rule, false, &one);
        evaluate(&apart, rule, true, &two);
        for (size_t p = 0; p < s.dossier.pump_count; p++, held++)
            same_pump("apart", &one.conditions[0].pumps[p],
                      &two.conditions[0].pumps[p]);
        sl_arena_release(&s.arena);
        sl_arena_release(&apart.arena);
    }
    print_message("%d pumps held\n", held);
    assert_true(held > stations());
}

/* A pump more that no set has room for: as equal to all as the controls do
 * not let it run beside them, or any at all where one runs at a time. */
static void a_standby_pump_changes_nothing(void **state)
{
    uint64_t seed = 80021;
    int held = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station s, more;
        struct sl_station_result one, two;
        int rule = one_of(&seed, RULES);
        bool equal = chance(&seed, 0.5);
        size_t count;

        random_make(&s, &seed);
        if (s.dossier.pump_count == PUMPS_MOST)
            s.dossier.pump_count--;
        count = s.dossier.pump_count;
        s.dossier.record.pumps_running_max =
            known(equal ? 1 + one_of(&seed, (int)count) : 1);
        more = s;
        more.dossier.pump_count = count + 1;
        if (equal) {
            make_equal(&s, 0);
            make_equal(&more, 0);
        }
        if (more.suction[count] == HEADER) {
            /* Not on the others' last pipe, whose fittings it would share. */
            more.suction[count] = (int)count;
            more.from[count] = HEADER;
        }
        if (equal && more.suction[0] == HEADER)
            continue;
        random_wire(&more);
        evaluate(&s, rule, false, &one);
        evaluate(&more, rule, false, &two);
        for (size_t p = 0; p < count; p++, held++) {
            const struct sl_pump_result *a = &one.conditions[0].pumps[p];
            const struct sl_pump_result *b = &two.conditions[0].pumps[p];

            assert_int_equal(a->state, b->state);
            for (int c = 0; c < SL_CORNER_COUNT; c++)
                same_case("standby", &a->cases[c], &b->cases[c]);
        }
        sl_arena_release(&s.arena);
        sl_arena_release(&more.arena);
    }
    print_message("%d pumps held\n", held);
    assert_true(held > stations());
}

/* --- the balance ---------------------------------------------------------- */

/* Head of a pump at its highest speed. */
static double head_at(const struct random_station *s, double flow)
{
    const struct sl_curve *curve = &s->curves[s->curve[0]];
    const struct sl_number *top = &s->pumps[0].record.max_speed;
    double ratio = top->known ? top->value / 1478 : 1;
    double x[CURVE_POINTS], y[CURVE_POINTS];

    for (size_t i = 0; i < curve->point_count; i++) {
        x[i] = curve->points[i].flow.value * ratio;
        y[i] = curve->points[i].head.value * ratio * ratio;
    }
    return sl_curve_carried_on(
        &(struct sl_curve_view){x, y, curve->point_count}, flow);
}

/* What the station asks of each of so many equal pumps, from its result. */
static double asked(const struct random_station *s,
                    const struct sl_pump_result *pump)
{
    const struct sl_station *station = &s->dossier.record;
    const struct sl_case *typical = &pump->cases[SL_TYPICAL];
    const struct sl_terms *terms = &typical->terms;
    double all = typical->flow * pump->governing.running;
    double loss = pump->inputs[SL_IN_DISCHARGE_LOSS].value.typical;

    if (station->discharge_loss_head.known) {
        double part = all / station->discharge_loss_flow.value;

        loss = station->discharge_loss_head.value * part * part;
    }
    return pump->inputs[SL_IN_DISCHARGE_LEVEL].value.typical -
           (terms->elevation + pump->inputs[SL_IN_DATUM].value.typical) -
           terms->gauge - terms->velocity + loss - terms->friction -
           terms->minor;
}

static void the_balance_closes(void **state)
{
    uint64_t seed = 1207;
    int sums = 0, heads = 0;
    double most = 0;

    (void)state;
    for (int n = stations(); n > 0; n--) {
        struct random_station s;
        struct sl_station_result result;
        const struct sl_pump_result *pump;
        double apart;

        random_make(&s, &seed);
        make_equal(&s, 0);
        evaluate(&s, one_of(&seed, RULES), false, &result);
        pump = &result.conditions[0].pumps[0];
        for (int c = 0; c < SL_CORNER_COUNT; c++)
            if (!isnan(pump->cases[c].terms.npsha)) {
                check_sum("terms", &pump->cases[c].terms);
                sums++;
            }
        if (pump->flow_basis == SL_FLOW_SOLVED && !pump->stands &&
            !isnan(pump->cases[SL_TYPICAL].flow)) {
            apart = head_at(&s, pump->cases[SL_TYPICAL].flow) - asked(&s, pump);
            if (isnan(apart))
                fail_msg("no balance of station %d", n);
            most = fmax(most, fabs(apart));
            heads++;
        }
        sl_arena_release(&s.arena);
    }
    print_message("%d sums; %d heads, most apart %.2e m\n", sums, heads, most);
    assert_true(sums > 2 * stations() && heads > stations() / 2);
    assert_true(most < CLOSE);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_lower_source_never_raises_npsha),
        cmocka_unit_test(names_and_order_change_nothing),
        cmocka_unit_test(units_change_nothing),
        cmocka_unit_test(equal_pumps_are_solved_as_if_one_by_one),
        cmocka_unit_test(a_standby_pump_changes_nothing),
        cmocka_unit_test(the_balance_closes),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
