/* Ranges of the suction's closed forms and of ageing, and how they hang
 * together.  Published figures are checked by reference_test. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>

#include "check.h"
#include "hydraulics/constants.h"
#include "hydraulics/friction.h"
#include "hydraulics/specific_speed.h"
#include "hydraulics/submergence.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

static double s_of_speed(double speed)
{
    return sl_suction_specific_speed(speed, 0.0631, 4.97);
}
static double s_of_flow(double flow)
{
    return sl_suction_specific_speed(1780, flow, 4.97);
}
static double s_of_npshr(double npshr)
{
    return sl_suction_specific_speed(1780, 0.0631, npshr);
}
static double specific_of_speed(double speed)
{
    return sl_specific_speed(speed, 0.0631, 31.7);
}
static double specific_of_flow(double flow)
{
    return sl_specific_speed(1780, flow, 31.7);
}
static double specific_of_head(double head)
{
    return sl_specific_speed(1780, 0.0631, head);
}
static double estimate_of_speed(double speed)
{
    return sl_estimated_npshr(speed, 0.0631, 164.6);
}
static double estimate_of_flow(double flow)
{
    return sl_estimated_npshr(1780, flow, 164.6);
}
static double estimate_of_s(double s)
{
    return sl_estimated_npshr(1780, 0.0631, s);
}
static double energy_of_eye(double eye)
{
    return sl_suction_energy(eye, 1780, 164.6, 0.996);
}
static double energy_of_speed(double speed)
{
    return sl_suction_energy(0.1829, speed, 164.6, 0.996);
}
static double energy_of_s(double s)
{
    return sl_suction_energy(0.1829, 1780, s, 0.996);
}
static double energy_of_gravity(double gravity)
{
    return sl_suction_energy(0.1829, 1780, 164.6, gravity);
}
static double submergence_of_diameter(double diameter)
{
    return sl_minimum_submergence(diameter, 0.2019);
}
static double submergence_of_flow(double flow)
{
    return sl_minimum_submergence(0.4064, flow);
}
static double aged_from(double roughness)
{
    return sl_aged_roughness(roughness, 7.6e-5, 31.5);
}
static double aged_by_rate(double rate)
{
    return sl_aged_roughness(4.5e-5, rate, 31.5);
}
static double aged_by_years(double years)
{
    return sl_aged_roughness(4.5e-5, 7.6e-5, years);
}

/* A figure at both ends, none just below.  Nothing ends the ranges upward
 * but what a double holds: `above` is where a figure no longer fits, or
 * NaN where that was not looked for. */
static const struct range {
    const char *name;
    double (*run)(double value);
    double lowest, highest;
    double below, above;
} ranges[] = {
    {"S by speed", s_of_speed, 1e-3, 98765, 0, NAN},
    {"S by flow", s_of_flow, 1e-6, 98.7, 0, NAN},
    {"S by NPSHR", s_of_npshr, 1e-3, 98.7, 0, NAN},
    {"specific speed by speed", specific_of_speed, 1e-3, 98765, 0, NAN},
    {"specific speed by flow", specific_of_flow, 1e-6, 98.7, 0, NAN},
    {"specific speed by head", specific_of_head, 1e-3, 987, 0, NAN},
    {"estimate by speed", estimate_of_speed, 1e-3, 98765, 0, 1e300},
    {"estimate by flow", estimate_of_flow, 1e-6, 98.7, 0, NAN},
    {"estimate by S", estimate_of_s, 1e-3, 987, 0, 0},
    {"energy by eye", energy_of_eye, 1e-3, 9.87, 0, 1e305},
    {"energy by speed", energy_of_speed, 1e-3, 98765, 0, 1e305},
    {"energy by S", energy_of_s, 1e-3, 987, 0, 1e305},
    {"energy by gravity", energy_of_gravity, 1e-3, 1.87, 0, 1e305},
    {"submergence by diameter", submergence_of_diameter, 1e-3, 9.87, 0, NAN},
    {"submergence by flow", submergence_of_flow, 0, 98.7, -1e-9, NAN},
    {"aged from new", aged_from, 0, 0.0987, -1e-12, NAN},
    {"aged by rate", aged_by_rate, 0, 9.87e-3, -1e-12, NAN},
    {"aged by years", aged_by_years, 0, 987, -1e-9, NAN},
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
        check_nan(r->name, r->run(-r->highest));
        check_nan(r->name, r->run(NAN));
        check_nan(r->name, r->run(INFINITY));
        check_nan(r->name, r->run(-INFINITY));
    }
}

static void test_the_estimate_turns_specific_speed_round(void **state)
{
    (void)state;
    for (double npshr = 0.37; npshr < 29; npshr *= 1.73)
        for (double flow = 0.0017; flow < 3; flow *= 2.9) {
            double s = sl_suction_specific_speed(1187, flow, npshr);

            check_close("F13 of F14", sl_estimated_npshr(1187, flow, s), npshr,
                        1e-13, 0.0);
        }
    check_close("half the S", sl_estimated_npshr(1780, 0.0631, 82.3),
                2.5198421 * sl_estimated_npshr(1780, 0.0631, 164.6), 1e-7, 0.0);
}

static void test_us_numbers_by_hand(void **state)
{
    double us = sl_us_specific_speed_factor();

    (void)state;
    /* 2.385 m are 7.8248 ft; 0.0631 m³/s are 1000.155 gpm. */
    check_close("worked in US units",
                us * sl_suction_specific_speed(1780, 0.0631, 2.385),
                1780 * sqrt(0.0631 / 3.785411784e-3 * 60) /
                    pow(2.385 / 0.3048, 0.75),
                1e-14, 0.0);
    check_close("energy of a 7.2 inch eye",
                sl_suction_energy(7.2 * 0.0254, 1780, 8500 / us, 0.996),
                7.2 * 1780 * 8500 * 0.996, 1e-14, 0.0);
    check_close("specific and suction specific speed are one form",
                sl_specific_speed(1187, 0.0431, 17.3),
                sl_suction_specific_speed(1187, 0.0431, 17.3), 0.0, 0.0);
}

/* The form in inches and gallons a minute has its coefficient in three
 * digits, 0.574 for 0.57379. */
static void test_submergence_forms_agree(void **state)
{
    const double inch = 0.0254, gpm = 3.785411784e-3 / 60;

    (void)state;
    for (double diameter = 4; diameter < 120; diameter *= 1.31)
        for (double velocity = 0.11; velocity < 4; velocity *= 1.7) {
            double flow = velocity / sl_pipe_velocity(1.0, diameter * inch);
            double us = diameter + 0.574 * flow / gpm / pow(diameter, 1.5);

            check_close("in inches",
                        sl_minimum_submergence(diameter * inch, flow) / inch,
                        us, 3.7e-4, 0.0);
        }
    check_close("nothing flows", sl_minimum_submergence(0.4064, 0.0), 0.4064,
                0.0, 0.0);
    check_close(
        "F_D 1 takes 3.3 diameters",
        sl_minimum_submergence(0.4064, sqrt(SL_GRAVITY * 0.4064) /
                                           sl_pipe_velocity(1.0, 0.4064)),
        3.3 * 0.4064, 1e-14, 0.0);
}

static void test_ageing_is_a_line(void **state)
{
    (void)state;
    check_close("as laid", sl_aged_roughness(4.5e-5, 7.6e-5, 0), 4.5e-5, 0.0,
                0.0);
    check_close("a wall that does not age", sl_aged_roughness(4.5e-5, 0, 31.5),
                4.5e-5, 0.0, 0.0);
    check_close("after 31.5 years", sl_aged_roughness(4.5e-5, 7.6e-5, 31.5),
                2.439e-3, 1e-14, 0.0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_ranges),
        cmocka_unit_test(test_the_estimate_turns_specific_speed_round),
        cmocka_unit_test(test_us_numbers_by_hand),
        cmocka_unit_test(test_submergence_forms_agree),
        cmocka_unit_test(test_ageing_is_a_line),
    };

    return cmocka_run_group_tests_name("suction", tests, NULL, NULL);
}
