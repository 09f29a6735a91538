/* The balance at the suction, and what a margin rule asks for. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <string.h>

#include <cmocka.h>

#include "check.h"
#include "hydraulics/constants.h"
#include "hydraulics/npsh.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

static const struct sl_balance sample = {
    .air_pressure = 95460.8,
    .air_fall = 2864.0,
    .gauge_pressure = 41300.0,
    .surface = 131.72,
    .datum = 134.05,
    .velocity_head = 0.213,
    .friction = 0.617,
    .minor = 0.384,
    .gas = 0.6,
    .density = 997.047,
    .vapour_pressure = 3169.7,
};

static double total(const struct sl_terms *terms)
{
    return terms->atmosphere + terms->barometer + terms->gauge +
           terms->elevation + terms->velocity + terms->friction + terms->minor +
           terms->vapour + terms->gas;
}

static void test_terms_are_signed_and_add_up(void **state)
{
    struct sl_terms terms;
    double weight = 997.047 * SL_GRAVITY;

    (void)state;
    sl_npsha(&sample, &terms);
    check_close("sum", total(&terms), terms.npsha, 0.0, 0.0);
    check_close("NPSHA", terms.npsha,
                (95460.8 - 2864.0 + 41300.0 - 3169.7) / weight + 131.72 -
                    134.05 + 0.213 - 0.617 - 0.384 - 0.6,
                1e-13, 0.0);
    check_close("elevation", terms.elevation, -2.33, 1e-12, 0.0);
    check_close("friction", terms.friction, -0.617, 0.0, 0.0);
    check_close("minor", terms.minor, -0.384, 0.0, 0.0);
    check_close("gas", terms.gas, -0.6, 0.0, 0.0);
    check_close("velocity", terms.velocity, 0.213, 0.0, 0.0);
    check_close("barometer", terms.barometer, -2864.0 / weight, 1e-15, 0.0);
    check_close("vapour", terms.vapour, -3169.7 / weight, 1e-15, 0.0);
    check_close("gauge", terms.gauge, 41300.0 / weight, 1e-15, 0.0);
}

static void test_no_loss_is_not_minus_nought(void **state)
{
    struct sl_balance still = sample;
    struct sl_terms terms;

    (void)state;
    still.friction = still.minor = still.gas = still.air_fall = 0.0;
    sl_npsha(&still, &terms);
    assert_false(signbit(terms.friction));
    assert_false(signbit(terms.minor));
    assert_false(signbit(terms.gas));
    assert_false(signbit(terms.barometer));
}

static void test_record_low_above_standard_adds(void **state)
{
    struct sl_balance high = sample;
    struct sl_terms terms;

    (void)state;
    high.air_fall = -312.0;
    sl_npsha(&high, &terms);
    assert_true(terms.barometer > 0.0);
}

/* `place` is the offset of a double in struct sl_balance. */
static double npsha_with(size_t place, double value)
{
    struct sl_balance balance = sample;
    struct sl_terms terms;

    memcpy((char *)&balance + place, &value, sizeof value);
    sl_npsha(&balance, &terms);
    return terms.npsha;
}

#define FIELD(name, may_be_negative)                                           \
    {                                                                          \
#name, offsetof(struct sl_balance, name), may_be_negative              \
    }

static void test_one_unknown_makes_npsha_unknown(void **state)
{
    static const struct {
        const char *name;
        size_t place;
        bool may_be_negative;
    } fields[] = {
        FIELD(air_pressure, false),
        FIELD(air_fall, true),
        FIELD(gauge_pressure, true),
        FIELD(surface, true),
        FIELD(datum, true),
        FIELD(velocity_head, false),
        FIELD(friction, false),
        FIELD(minor, false),
        FIELD(gas, false),
        FIELD(density, false),
        FIELD(vapour_pressure, false),
    };

    (void)state;
    assert_int_equal(COUNT(fields) * sizeof(double), sizeof(struct sl_balance));
    for (size_t i = 0; i < COUNT(fields); i++) {
        double below = npsha_with(fields[i].place, -0.37);

        check_nan(fields[i].name, npsha_with(fields[i].place, NAN));
        check_nan(fields[i].name, npsha_with(fields[i].place, INFINITY));
        if (isnan(below) == fields[i].may_be_negative)
            fail_msg("%s: -0.37 gave %g", fields[i].name, below);
    }
    check_nan("no density",
              npsha_with(offsetof(struct sl_balance, density), 0.0));
}

static void test_one_unknown_leaves_the_other_terms(void **state)
{
    struct sl_balance balance = sample;
    struct sl_terms terms;

    (void)state;
    balance.friction = NAN;
    sl_npsha(&balance, &terms);
    check_nan("friction", terms.friction);
    check_close("minor", terms.minor, -0.384, 0.0, 0.0);
}

static void test_rule_takes_the_greater(void **state)
{
    (void)state;
    check_close("the ratio governs", sl_required_npsha(7.31, 1.3, 1.5), 9.503,
                1e-14, 0.0);
    check_close("the floor governs", sl_required_npsha(2.385, 1.3, 1.5), 3.885,
                1e-14, 0.0);
    check_close("no floor", sl_required_npsha(2.385, 1.1, 0.0), 2.6235, 1e-14,
                0.0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_terms_are_signed_and_add_up),
        cmocka_unit_test(test_no_loss_is_not_minus_nought),
        cmocka_unit_test(test_record_low_above_standard_adds),
        cmocka_unit_test(test_one_unknown_makes_npsha_unknown),
        cmocka_unit_test(test_one_unknown_leaves_the_other_terms),
        cmocka_unit_test(test_rule_takes_the_greater),
    };

    return cmocka_run_group_tests_name("npsh", tests, NULL, NULL);
}
