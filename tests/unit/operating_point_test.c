/* The ways in which the search for a pump's operating point can end. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <string.h>

#include <cmocka.h>

#include "check.h"
#include "hydraulics/operating_point.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

static const double flows[] = {0.0, 0.013, 0.031, 0.044, 0.07};
static const double heads[] = {33.1, 32.4, 29.9, 26.2, 15.3};
static const struct sl_curve_view falling = {flows, heads, 5};
static const double droop_heads[] = {27.3, 30.2, 31.1, 27.6, 16.4};
static const struct sl_curve_view droop = {flows, droop_heads, 5};
static const double late_flows[] = {0.02, 0.031, 0.044, 0.07};
static const double late_heads[] = {31.7, 29.9, 26.2, 15.3};
static const struct sl_curve_view late = {late_flows, late_heads, 4};
static const double flat_heads[] = {33.1, 33.1, 33.1, 33.1, 33.1};
static const struct sl_curve_view flat = {flows, flat_heads, 5};

struct law {
    double static_head, coefficient;
    double unknown_from; /* flow at which the head is `unknown` */
    double unknown;
    double jump_at, jump; /* m more from that flow on */
    int calls;
};

static double law_head(void *context, double flow)
{
    struct law *law = context;

    law->calls++;
    if (flow >= law->unknown_from)
        return law->unknown;
    return law->static_head + law->coefficient * flow * flow +
           (flow >= law->jump_at ? law->jump : 0.0);
}

static struct law law_of(double static_head, double coefficient)
{
    return (struct law){static_head, coefficient, INFINITY, NAN,
                        INFINITY,    0.0,         0};
}

static enum sl_operating_end find(const struct sl_curve_view *pump,
                                  struct law law,
                                  struct sl_operating_point *point)
{
    struct sl_system system = {law_head, &law};
    enum sl_operating_end end;

    memset(point, 0x5a, sizeof *point);
    end = sl_operating_point_find(pump, &system, 1e-9, point);
    /* Never more than a scan of the curve and the root finder's own cap. */
    assert_true(law.calls <= 200);
    return end;
}

static bool untouched(const struct sl_operating_point *point)
{
    struct sl_operating_point before;

    memset(&before, 0x5a, sizeof before);
    return memcmp(point, &before, sizeof before) == 0;
}

static void check_crossing(const struct sl_curve_view *pump,
                           const struct law *law,
                           const struct sl_operating_point *point)
{
    double asked =
        law->static_head + law->coefficient * point->flow * point->flow;

    check_close("the two heads meet", point->head, asked, 0.0, 1e-5);
    check_close("head of the pump", point->head,
                sl_curve_carried_on(pump, point->flow), 0.0, 0.0);
    check_close("residual", point->residual, point->head - asked, 0.0, 1e-12);
    assert_in_range(point->iterations, 0, 64);
}

/* Each way to end but a bad curve, and why the row provokes it. */
static const struct {
    const char *sentence;
    const struct sl_curve_view *pump;
    double static_head, coefficient;
    enum sl_operating_end end;
    double from, to; /* the flow lies between */
} cases[] = {
    {"the system crosses the curve", &falling, 12.7, 3900.0, SL_OPERATING_FOUND,
     0.044, 0.07},
    {"the system meets the curve at a point exactly", &falling, 29.9, 0.0,
     SL_OPERATING_FOUND, 0.031, 0.031},
    {"the system meets the last point exactly", &falling, 15.3, 0.0,
     SL_OPERATING_FOUND, 0.07, 0.07},
    {"static head over the shut-off head", &falling, 33.4, 100.0,
     SL_OPERATING_STANDS, NAN, NAN},
    {"static head equal to the shut-off head", &falling, 33.1, 100.0,
     SL_OPERATING_STANDS, NAN, NAN},
    {"a system below the last point", &falling, 3.2, 900.0,
     SL_OPERATING_PAST_END, 0.07, 0.21},
    {"a system far below the reach", &falling, -900.0, 1.0,
     SL_OPERATING_NOT_FOUND, NAN, NAN},
    {"a curve that never falls", &flat, 12.7, 0.0, SL_OPERATING_NOT_FOUND, NAN,
     NAN},
    {"a curve that starts late, crossed before it starts", &late, 32.1, 900.0,
     SL_OPERATING_BEFORE_START, 0.0, 0.02},
    {"a curve that starts late, under the static head at nought", &late, 40.4,
     900.0, SL_OPERATING_STANDS, NAN, NAN},
    {"a droop crossed twice: the larger flow", &droop, 28.9, 310.0,
     SL_OPERATING_FOUND, 0.031, 0.044},
    {"a droop whose summit alone is over the system", &droop, 30.9, 3.0,
     SL_OPERATING_FOUND, 0.031, 0.044},
    {"a droop wholly under the system", &droop, 31.3, 310.0,
     SL_OPERATING_STANDS, NAN, NAN},
};

static bool delivers(enum sl_operating_end end)
{
    return end == SL_OPERATING_FOUND || end == SL_OPERATING_PAST_END ||
           end == SL_OPERATING_BEFORE_START;
}

static void test_cases(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(cases); i++) {
        struct law law = law_of(cases[i].static_head, cases[i].coefficient);
        struct sl_operating_point point;
        enum sl_operating_end end = find(cases[i].pump, law, &point);

        if (end != cases[i].end)
            fail_msg("%s: ended as '%s'", cases[i].sentence,
                     sl_operating_end_name(end));
        if (!delivers(end)) {
            assert_true(untouched(&point));
            continue;
        }
        if (point.flow < cases[i].from - 1e-9 ||
            point.flow > cases[i].to + 1e-9)
            fail_msg("%s: found at %.17g", cases[i].sentence, point.flow);
        check_crossing(cases[i].pump, &law, &point);
    }
}

/* Rising from 20.1 to 30.2, the first piece crosses a steep system and is
 * crossed back before its second point: neither point tells. */
static void test_two_crossings_between_rising_points(void **state)
{
    static const double x[] = {0.0, 0.05, 0.08}, y[] = {20.1, 30.2, 12.3};
    const struct sl_curve_view pump = {x, y, 3};
    struct law law = law_of(21.9, 3500.0);
    struct sl_operating_point point;

    (void)state;
    assert_true(y[0] < law.static_head);
    assert_true(y[1] < law.static_head + law.coefficient * x[1] * x[1]);
    assert_int_equal(find(&pump, law, &point), SL_OPERATING_FOUND);
    check_crossing(&pump, &law, &point);
    assert_true(point.flow > 0.03 && point.flow < 0.05);
    assert_true(sl_curve_slope_at(&pump, point.flow) <
                2 * law.coefficient * point.flow);
}

static void test_bad_curves(void **state)
{
    static const double back[] = {-0.01, 0.02}, twice[] = {0.02, 0.02};
    const struct sl_curve_view bad[] = {
        {flows, heads, 1}, {twice, heads, 2}, {back, heads, 2}};
    struct sl_operating_point point;

    (void)state;
    for (size_t i = 0; i < COUNT(bad); i++) {
        assert_int_equal(find(&bad[i], law_of(12.7, 3900.0), &point),
                         SL_OPERATING_BAD_CURVE);
        assert_true(untouched(&point));
    }
}

/* Not a number at the last point, and past it. */
static void test_bad_systems(void **state)
{
    static const struct {
        double static_head, coefficient, from, unknown;
    } bad[] = {{12.7, 3900.0, 0.06, NAN},
               {12.7, 3900.0, 0.06, INFINITY},
               {3.2, 900.0, 0.1, NAN},
               {3.2, 900.0, 0.08, -INFINITY}};
    struct sl_operating_point point;

    (void)state;
    for (size_t i = 0; i < COUNT(bad); i++) {
        struct law law = law_of(bad[i].static_head, bad[i].coefficient);

        law.unknown_from = bad[i].from;
        law.unknown = bad[i].unknown;
        assert_int_equal(find(&falling, law, &point), SL_OPERATING_BAD_SYSTEM);
        assert_true(untouched(&point));
    }
}

/* Known at the curve's points, unknown between them. */
static double holed_head(void *context, double flow)
{
    (void)context;
    return flow > 0.05 && flow < 0.069 ? NAN : 20.0;
}

static void test_bad_system_inside_the_bracket(void **state)
{
    struct sl_system system = {holed_head, NULL};
    struct sl_operating_point point;

    (void)state;
    memset(&point, 0x5a, sizeof point);
    assert_int_equal(sl_operating_point_find(&falling, &system, 1e-9, &point),
                     SL_OPERATING_BAD_SYSTEM);
    assert_true(untouched(&point));
}

static void test_a_jump_is_told_by_the_residual(void **state)
{
    struct law law = law_of(12.7, 900.0);
    struct sl_operating_point point;

    (void)state;
    law.jump_at = 0.0517;
    law.jump = 20.3;
    assert_int_equal(find(&falling, law, &point), SL_OPERATING_FOUND);
    check_close("at the jump", point.flow, 0.0517, 0.0, 1e-9);
    assert_true(fabs(point.residual) > 1.0);
}

static void test_tolerance_is_kept(void **state)
{
    static const double tolerances[] = {1e-2, 1e-4, 1e-7, 1e-12,
                                        0.0,  -1.0, NAN};
    struct law law = law_of(12.7, 3900.0);
    struct sl_system system = {law_head, &law};
    struct sl_operating_point exact, point;

    (void)state;
    assert_int_equal(sl_operating_point_find(&falling, &system, 0.0, &exact),
                     SL_OPERATING_FOUND);
    check_close("found to a double's spacing", exact.residual, 0.0, 0.0, 1e-12);
    for (size_t i = 0; i < COUNT(tolerances); i++) {
        double allowed = tolerances[i] > 1e-16 ? tolerances[i] : 1e-16;

        assert_int_equal(
            sl_operating_point_find(&falling, &system, tolerances[i], &point),
            SL_OPERATING_FOUND);
        check_close("within the tolerance", point.flow, exact.flow, 0.0,
                    allowed + 1e-16);
    }
}

/* A higher static head never gives more flow. */
static void test_flow_falls_as_static_head_rises(void **state)
{
    double before = INFINITY;
    struct sl_operating_point point;

    (void)state;
    for (double head = -20.0; head < 33.1; head += 0.37) {
        assert_true(delivers(find(&falling, law_of(head, 1234.5), &point)));
        assert_true(point.flow < before);
        before = point.flow;
    }
}

static void test_every_end_has_a_name(void **state)
{
    (void)state;
    for (int end = 0; end <= SL_OPERATING_BAD_SYSTEM; end++) {
        const char *name = sl_operating_end_name((enum sl_operating_end)end);

        assert_string_not_equal(name, "unknown end");
        for (int other = 0; other < end; other++)
            assert_string_not_equal(
                name, sl_operating_end_name((enum sl_operating_end)other));
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_cases),
        cmocka_unit_test(test_two_crossings_between_rising_points),
        cmocka_unit_test(test_bad_curves),
        cmocka_unit_test(test_bad_systems),
        cmocka_unit_test(test_bad_system_inside_the_bracket),
        cmocka_unit_test(test_a_jump_is_told_by_the_residual),
        cmocka_unit_test(test_tolerance_is_kept),
        cmocka_unit_test(test_flow_falls_as_static_head_rises),
        cmocka_unit_test(test_every_end_has_a_name),
    };

    return cmocka_run_group_tests_name("operating point", tests, NULL, NULL);
}
