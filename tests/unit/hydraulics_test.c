/* The hydraulics room's behaviour: ranges, limits, statuses.  Its figures
 * are checked by reference_test. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>

#include "check.h"
#include "hydraulics/affinity.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/curve.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/npsh.h"
#include "hydraulics/water.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* --- closed forms: NaN outside the range --- */

static double seawater_vapour_35(double kelvin)
{
    return sl_seawater_vapour_pressure(kelvin, 35.0);
}
static double seawater_vapour_at_salinity(double salinity)
{
    return sl_seawater_vapour_pressure(291.4, salinity);
}
static double seawater_density_35(double kelvin)
{
    return sl_seawater_density(kelvin, 35.0);
}
static double seawater_density_at_salinity(double salinity)
{
    return sl_seawater_density(291.4, salinity);
}
static double factor_at_reynolds(double reynolds)
{
    return sl_friction_factor(reynolds, 0.0013);
}
static double factor_at_roughness(double relative)
{
    return sl_friction_factor(123456.0, relative);
}
static double velocity_of_flow(double flow)
{
    return sl_pipe_velocity(flow, 0.31);
}
static double velocity_in_bore(double bore)
{
    return sl_pipe_velocity(0.043, bore);
}
static double reynolds_of_velocity(double velocity)
{
    return sl_reynolds(velocity, 0.31, 1.1e-6);
}
static double reynolds_in_bore(double bore)
{
    return sl_reynolds(1.7, bore, 1.1e-6);
}
static double reynolds_of_viscosity(double viscosity)
{
    return sl_reynolds(1.7, 0.31, viscosity);
}
static double darcy_of_factor(double factor)
{
    return sl_darcy_head(factor, 12.3, 0.31, 1.7);
}
static double darcy_of_length(double length)
{
    return sl_darcy_head(0.021, length, 0.31, 1.7);
}
static double darcy_of_bore(double bore)
{
    return sl_darcy_head(0.021, 12.3, bore, 1.7);
}
static double darcy_of_velocity(double velocity)
{
    return sl_darcy_head(0.021, 12.3, 0.31, velocity);
}
static double hazen_of_flow(double flow)
{
    return sl_hazen_williams_head(flow, 117.0, 12.3, 0.31);
}
static double hazen_of_c(double c)
{
    return sl_hazen_williams_head(0.043, c, 12.3, 0.31);
}
static double hazen_of_length(double length)
{
    return sl_hazen_williams_head(0.043, 117.0, length, 0.31);
}
static double hazen_of_bore(double bore)
{
    return sl_hazen_williams_head(0.043, 117.0, 12.3, bore);
}
static double minor_of_k(double k)
{
    return sl_minor_head(k, 1.7);
}
static double minor_of_velocity(double velocity)
{
    return sl_minor_head(0.53, velocity);
}
static double scaled_flow(double flow)
{
    return sl_affinity_flow(flow, 1.13);
}
static double flow_by_ratio(double ratio)
{
    return sl_affinity_flow(0.043, ratio);
}
static double head_by_ratio(double ratio)
{
    return sl_affinity_head(31.2, ratio);
}
static double scaled_npshr(double npshr)
{
    return sl_affinity_npshr(npshr, 1.13, 1.5);
}
static double npshr_by_ratio(double ratio)
{
    return sl_affinity_npshr(2.385, ratio, 1.5);
}
static double npshr_by_exponent(double exponent)
{
    return sl_affinity_npshr(2.385, 1.13, exponent);
}
static double required_of_npshr(double npshr)
{
    return sl_required_npsha(npshr, 1.3, 1.5);
}
static double required_of_ratio(double ratio)
{
    return sl_required_npsha(2.385, ratio, 1.5);
}
static double required_of_floor(double floor)
{
    return sl_required_npsha(2.385, 1.3, floor);
}

/* Figures at both ends, none just past them.  An end that does not exist
 * is given as the largest value worth trying. */
static const struct range {
    const char *name;
    double (*run)(double value);
    double lowest, highest;
    double below, above; /* NaN: there is no end */
} ranges[] = {
    {"vapour pressure", sl_vapour_pressure, 273.15, 647.096, 273.149, 647.1},
    {"water density", sl_water_density, 253.15, 383.15, 253.1, 383.2},
    {"water viscosity", sl_water_viscosity, 253.15, 383.15, 253.1, 383.2},
    {"seawater vapour", seawater_vapour_35, 273.15, 313.15, 273.1, 313.2},
    {"seawater vapour by salinity", seawater_vapour_at_salinity, 0, 40, -0.001,
     40.1},
    {"seawater density", seawater_density_35, 271.15, 313.15, 271.1, 313.2},
    {"seawater density by salinity", seawater_density_at_salinity, 0, 42,
     -0.001, 42.1},
    {"standard atmosphere", sl_standard_atmosphere, -1000, 11000, -1000.1,
     11000.1},
    {"friction factor by Re", factor_at_reynolds, 1e-3, 1e9, 0, 1.001e9},
    {"friction factor by roughness", factor_at_roughness, 0, 0.1, -1e-9,
     0.1001},
    {"velocity by flow", velocity_of_flow, 0, 98.7, -1e-9, NAN},
    {"velocity by bore", velocity_in_bore, 1e-3, 9.87, 0, NAN},
    {"Re by velocity", reynolds_of_velocity, 0, 98.7, -1e-9, NAN},
    {"Re by bore", reynolds_in_bore, 1e-3, 9.87, 0, NAN},
    {"Re by viscosity", reynolds_of_viscosity, 1e-8, 1.2, 0, NAN},
    {"Darcy by factor", darcy_of_factor, 0, 64, -1e-9, NAN},
    {"Darcy by length", darcy_of_length, 0, 9.8e5, -1e-9, NAN},
    {"Darcy by bore", darcy_of_bore, 1e-3, 9.87, 0, NAN},
    {"Darcy by velocity", darcy_of_velocity, 0, 98.7, -1e-9, NAN},
    {"Hazen-Williams by flow", hazen_of_flow, 0, 98.7, -1e-9, NAN},
    {"Hazen-Williams by C", hazen_of_c, 10, 200, 9.99, 200.1},
    {"Hazen-Williams by length", hazen_of_length, 0, 9.8e5, -1e-9, NAN},
    {"Hazen-Williams by bore", hazen_of_bore, 1e-3, 9.87, 0, NAN},
    {"velocity head", sl_velocity_head, 0, 98.7, -1e-9, NAN},
    {"minor by K", minor_of_k, 0, 987, -1e-9, NAN},
    {"minor by velocity", minor_of_velocity, 0, 98.7, -1e-9, NAN},
    {"affinity flow", scaled_flow, 0, 98.7, -1e-9, NAN},
    {"affinity flow by ratio", flow_by_ratio, 1e-3, 9.87, 0, NAN},
    {"affinity head by ratio", head_by_ratio, 1e-3, 9.87, 0, NAN},
    {"affinity NPSHR", scaled_npshr, 0, 98.7, -1e-9, NAN},
    {"affinity NPSHR by ratio", npshr_by_ratio, 1e-3, 9.87, 0, NAN},
    {"affinity NPSHR by exponent", npshr_by_exponent, 0, 3, -1e-9, 3.001},
    {"required by NPSHR", required_of_npshr, 0, 98.7, -1e-9, NAN},
    {"required by ratio", required_of_ratio, 0, 9.87, -1e-9, NAN},
    {"required by floor", required_of_floor, 0, 98.7, -1e-9, NAN},
};

static void test_ranges(void **state)
{
    (void)state;
    for (size_t i = 0; i < COUNT(ranges); i++) {
        const struct range *r = &ranges[i];

        if (!isfinite(r->run(r->lowest)) || !isfinite(r->run(r->highest)))
            fail_msg("%s: no figure at an end of its range", r->name);
        check_nan(r->name, r->run(r->below));
        check_nan(r->name, r->run(r->above));
        check_nan(r->name, r->run(NAN));
        check_nan(r->name, r->run(INFINITY));
        check_nan(r->name, r->run(-INFINITY));
    }
}

/* --- water --- */

static void test_salt_lowers_vapour_and_raises_density(void **state)
{
    double fresh = sl_seawater_vapour_pressure(298.15, 0.0);

    (void)state;
    check_close("vapour pressure of seawater over fresh water's",
                seawater_vapour_35(298.15) / fresh, 0.981, 0.0, 0.0005);
    check_close("density of seawater over fresh water's",
                seawater_density_35(298.15) / sl_water_density(298.15), 1.026,
                0.0, 0.0005);
    check_close("F5 without salt against F2", fresh, sl_vapour_pressure(298.15),
                0.0013, 0.0);
    check_close("F17 without salt against F3", sl_seawater_density(298.15, 0.0),
                sl_water_density(298.15), 1e-5, 0.0);
}

/* --- friction --- */

static void test_laminar_flow_forgets_roughness(void **state)
{
    (void)state;
    check_close("laminar", sl_friction_factor(2299.0, 0.05), 64.0 / 2299.0,
                1e-15, 0.0);
    check_close("laminar, smooth", sl_friction_factor(2299.0, 0.0),
                sl_friction_factor(2299.0, 0.05), 0.0, 0.0);
}

static void test_transition_takes_the_larger_factor(void **state)
{
    (void)state;
    for (double reynolds = 2300.0; reynolds <= 4000.0; reynolds += 17.0) {
        double factor = sl_friction_factor(reynolds, 0.0);
        double x = 1.0 / sqrt(factor);

        assert_true(factor > 64.0 / reynolds);
        check_close("Colebrook's equation, in the transition",
                    -2.0 * log10(2.51 * x / reynolds), x, 1e-14, 0.0);
    }
}

static void test_factor_solves_colebrook(void **state)
{
    (void)state;
    for (double reynolds = 2300.0; reynolds < 1e9; reynolds *= 1.37)
        for (double rough = 0.0; rough <= 0.1; rough += 0.00317) {
            double factor = sl_friction_factor(reynolds, rough);
            double x = 1.0 / sqrt(factor);

            check_close("Colebrook's equation",
                        -2.0 * log10(rough / 3.7 + 2.51 * x / reynolds), x,
                        1e-14, 0.0);
            assert_true(sl_friction_factor(reynolds, rough * 0.9) <= factor);
        }
}

static void test_water_at_rest_loses_nothing(void **state)
{
    double none = sl_friction_factor(0.0, 0.001);

    (void)state;
    check_nan("factor at rest", none);
    check_close("loss at rest", sl_darcy_head(none, 12.3, 0.31, 0.0), 0.0, 0.0,
                0.0);
    check_nan("no factor in flow", sl_darcy_head(none, 12.3, 0.31, 0.1));
}

/* --- minor losses --- */

static void test_small_bores_lose_more(void **state)
{
    (void)state;
    check_close("6.5 inch", sl_small_bore_k(0.37, 0.1651), 0.37 * 1.275, 1e-14,
                0.0);
    check_close("12 inch", sl_small_bore_k(0.37, 0.3048), 0.37, 0.0, 0.0);
    check_close("no bore known", sl_small_bore_k(0.37, NAN), 0.37, 0.0, 0.0);
    check_nan("no bore at all", sl_small_bore_k(0.37, 0.0));
}

/* --- curve --- */

static const double flows[] = {0.0, 0.013, 0.031, 0.044, 0.07};
static const double heads[] = {33.1, 32.4, 29.9, 26.2, 15.3};
static const struct sl_curve_view falling = {flows, heads, 5};

static void test_unusable_curves(void **state)
{
    static const double back[] = {0.0, 0.02, 0.02};
    static const double holed[] = {33.1, NAN, 15.3};
    static const double endless[] = {0.0, 0.02, INFINITY};
    const struct {
        const char *why;
        struct sl_curve_view curve;
    } bad[] = {
        {"no point", {flows, heads, 0}},     {"one point", {flows, heads, 1}},
        {"x stands", {back, heads, 3}},      {"a y is NaN", {flows, holed, 3}},
        {"infinite x", {endless, heads, 3}}, {"no array", {NULL, NULL, 3}},
    };

    (void)state;
    assert_true(sl_curve_usable(&falling));
    for (size_t i = 0; i < COUNT(bad); i++) {
        if (sl_curve_usable(&bad[i].curve))
            fail_msg("%s: taken for usable", bad[i].why);
        check_nan(bad[i].why, sl_curve_at(&bad[i].curve, 0.01));
        check_nan(bad[i].why, sl_curve_carried_on(&bad[i].curve, 0.01));
        check_nan(bad[i].why, sl_curve_slope_at(&bad[i].curve, 0.01));
    }
}

static void test_curve_meets_its_points_and_ends(void **state)
{
    (void)state;
    for (size_t i = 0; i < falling.count; i++)
        check_close("at a point", sl_curve_at(&falling, flows[i]), heads[i],
                    0.0, 0.0);
    check_nan("before the first", sl_curve_at(&falling, -1e-12));
    check_nan("past the last", sl_curve_at(&falling, 0.0700001));
    check_nan("NaN", sl_curve_at(&falling, NAN));
    check_nan("carried on to infinity",
              sl_curve_carried_on(&falling, INFINITY));
    check_nan("slope at infinity", sl_curve_slope_at(&falling, -INFINITY));
}

static void test_curve_carried_on_straight(void **state)
{
    double first = sl_curve_slope_at(&falling, 0.0);
    double last = sl_curve_slope_at(&falling, 0.07);

    (void)state;
    assert_true(last < 0.0 && first <= 0.0);
    check_close("past the end", sl_curve_carried_on(&falling, 0.0913),
                15.3 + 0.0213 * last, 1e-15, 0.0);
    check_close("before the start", sl_curve_carried_on(&falling, -0.004),
                33.1 - 0.004 * first, 1e-15, 0.0);
    check_close("slope past the end", sl_curve_slope_at(&falling, 0.2), last,
                0.0, 0.0);
    check_close("slope before the start", sl_curve_slope_at(&falling, -0.2),
                first, 0.0, 0.0);
    check_close("inside as sl_curve_at", sl_curve_carried_on(&falling, 0.0377),
                sl_curve_at(&falling, 0.0377), 0.0, 0.0);
}

static void test_falling_points_give_a_falling_curve(void **state)
{
    double before = INFINITY;

    (void)state;
    for (double x = 0.0; x < 0.07; x += 0.00013) {
        double y = sl_curve_at(&falling, x);

        assert_true(y < before);
        assert_true(sl_curve_slope_at(&falling, x) <= 0.0);
        before = y;
    }
}

/* --- affinity --- */

static void test_affinity(void **state)
{
    (void)state;
    check_close("flow", sl_affinity_flow(0.043, 1.13), 0.04859, 1e-14, 0.0);
    check_close("head", sl_affinity_head(31.2, 1.13), 31.2 * 1.2769, 1e-14,
                0.0);
    check_close("NPSHR by 2", sl_affinity_npshr(2.385, 1.13, 2.0),
                2.385 * 1.2769, 1e-14, 0.0);
    check_close("NPSHR by 1.5", sl_affinity_npshr(2.385, 0.81, 1.5),
                2.385 * 0.729, 1e-14, 0.0);
    check_nan("head NaN", sl_affinity_head(NAN, 1.13));
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_ranges),
        cmocka_unit_test(test_salt_lowers_vapour_and_raises_density),
        cmocka_unit_test(test_laminar_flow_forgets_roughness),
        cmocka_unit_test(test_transition_takes_the_larger_factor),
        cmocka_unit_test(test_factor_solves_colebrook),
        cmocka_unit_test(test_water_at_rest_loses_nothing),
        cmocka_unit_test(test_small_bores_lose_more),
        cmocka_unit_test(test_unusable_curves),
        cmocka_unit_test(test_curve_meets_its_points_and_ends),
        cmocka_unit_test(test_curve_carried_on_straight),
        cmocka_unit_test(test_falling_points_give_a_falling_curve),
        cmocka_unit_test(test_affinity),
    };

    return cmocka_run_group_tests_name("hydraulics", tests, NULL, NULL);
}
