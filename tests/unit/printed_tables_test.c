/* What published examples and tables trip readers up with: which way the
 * velocity head counts, which friction factor is meant, and digits that a
 * printer exchanged.
 *
 * A misprint in a table of a smooth quantity sticks out from the curve
 * through its neighbours.  The test below looks for that in tables as they
 * are printed, misprints and all, and asks that it finds those and no
 * others. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "base/units.h"
#include "check.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/constants.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/npsh.h"
#include "hydraulics/water.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])
#define ROWS_MOST 16

/* --- smoothness --- */

struct printed {
    double x, y;
};

/* Lagrange's cubic of log y through four of the other rows, at row i. */
static double foretold(const struct printed *rows, size_t count, size_t i)
{
    size_t first = i < 2 ? 0 : i - 2, near[4], taken = 0;
    double sum = 0.0;

    if (first + 5 > count)
        first = count - 5;
    for (size_t k = first; taken < 4; k++)
        if (k != i)
            near[taken++] = k;
    for (size_t a = 0; a < 4; a++) {
        double weight = 1.0;

        for (size_t b = 0; b < 4; b++)
            if (b != a)
                weight *= (rows[i].x - rows[near[b]].x) /
                          (rows[near[a]].x - rows[near[b]].x);
        sum += weight * log(rows[near[a]].y);
    }
    return exp(sum);
}

/* How far the row that sticks out most lies from the foretold, as a share;
 * the first and the last row are not foretold, only used. */
static double roughness(const struct printed *rows, size_t count)
{
    double most = 0.0;

    for (size_t i = 1; i + 1 < count; i++)
        most = fmax(most, fabs(rows[i].y / foretold(rows, count, i) - 1.0));
    return most;
}

static void take_out(const struct printed *rows, size_t count, size_t out,
                     struct printed *left)
{
    memcpy(left, rows, out * sizeof *rows);
    memcpy(left + out, rows + out + 1, (count - out - 1) * sizeof *rows);
}

/* While the table is rough, takes out the row without which it is the
 * smoothest.  Writes their x and gives their number. */
static size_t misprints(const struct printed *printed, size_t count,
                        double allowed, double *found)
{
    struct printed rows[ROWS_MOST], left[ROWS_MOST];
    size_t taken = 0;

    assert_true(count <= ROWS_MOST);
    memcpy(rows, printed, count * sizeof *rows);
    while (count > 6 && roughness(rows, count) > allowed) {
        size_t worst = 0;
        double least = INFINITY;

        for (size_t i = 0; i < count; i++) {
            take_out(rows, count, i, left);
            if (roughness(left, count - 1) < least) {
                least = roughness(left, count - 1);
                worst = i;
            }
        }
        found[taken++] = rows[worst].x;
        take_out(rows, count, worst, left);
        memcpy(rows, left, --count * sizeof *rows);
    }
    return taken;
}

/* Davis, Water and Wastewater Engineering, 2010, Table 3-8: degrees C, kPa. */
static const struct printed vapour[] = {
    {0, 0.611},  {5, 0.872},  {10, 1.228}, {15, 1.706}, {20, 2.339},
    {25, 3.169}, {30, 4.246}, {35, 5.627}, {40, 7.381}, {50, 12.34},
};

/* The same, Table 3-7: m, kPa. */
static const struct printed air[] = {
    {-1000, 113.9}, {-500, 107.5}, {0, 101.3},    {500, 95.46},  {1000, 89.88},
    {1500, 84.56},  {2000, 79.50}, {2500, 74.69}, {3000, 70.12},
};

static void none_found(const char *what, const struct printed *rows,
                       size_t count, double allowed)
{
    double found[ROWS_MOST];

    if (misprints(rows, count, allowed, found) != 0)
        fail_msg("%s: the row at %g is taken for a misprint", what, found[0]);
}

static void one_found(const char *what, const struct printed *rows,
                      size_t count, double allowed, double x)
{
    double found[ROWS_MOST] = {NAN};

    if (misprints(rows, count, allowed, found) != 1 || found[0] != x)
        fail_msg("%s: the misprint at %g is not the one row found (%g)", what,
                 x, found[0]);
}

static void test_sound_tables_are_smooth(void **state)
{
    (void)state;
    none_found("vapour pressure", vapour, COUNT(vapour), 0.002);
    none_found("standard air", air, COUNT(air), 0.002);
    for (size_t i = 0; i < COUNT(vapour); i++)
        check_close("vapour pressure, as printed",
                    sl_vapour_pressure(vapour[i].x + 273.15), vapour[i].y * 1e3,
                    0.0011, 0.0);
    for (size_t i = 0; i < COUNT(air); i++)
        check_close("standard air, as printed",
                    sl_standard_atmosphere(air[i].x), air[i].y * 1e3, 0.0003,
                    0.0);
}

/* One table's misprint, put where it belongs among sound rows: in the place
 * of the row at its temperature, else between the rows around it. */
static size_t with_misprint(struct printed misprint, struct printed *rows)
{
    size_t count = 0;
    int placed = 0;

    for (size_t i = 0; i < COUNT(vapour); i++) {
        if (!placed && vapour[i].x >= misprint.x) {
            rows[count++] = misprint;
            placed = 1;
        }
        if (vapour[i].x != misprint.x)
            rows[count++] = vapour[i];
    }
    return count;
}

static void test_misprinted_vapour_pressures_stick_out(void **state)
{
    const double fahrenheit_70 = (70 - 32) / 1.8, psi_in_kpa = 6.894757;
    const struct {
        const char *source;
        struct printed row;
    } cases[] = {
        {"Potter and Wiggert 2010, Table B.1, 10 C", {10, 1.13}},
        {"Potter and Wiggert 2010, Table B.1, 15 C", {15, 1.60}},
        {"Potter and Wiggert 2010, Table B.1, 40 C", {40, 3.38}},
        {"Potter and Wiggert 2010, Table B.1 English, 70 F",
         {fahrenheit_70, 0.340 * psi_in_kpa}},
        {"Bachus and Custodio 2003, Properties of water II, 70 F",
         {fahrenheit_70, 0.6331 * psi_in_kpa}},
    };
    struct printed rows[ROWS_MOST];

    (void)state;
    for (size_t i = 0; i < COUNT(cases); i++) {
        size_t count = with_misprint(cases[i].row, rows);

        one_found(cases[i].source, rows, count, 0.005, cases[i].row.x);
        if (fabs(sl_vapour_pressure(cases[i].row.x + 273.15) / 1e3 /
                     cases[i].row.y -
                 1) < 0.05)
            fail_msg("%s is no misprint", cases[i].source);
    }
    /* With its digits set right the last of them fits in. */
    none_found("0.3631 psi at 70 F", rows,
               with_misprint(
                   (struct printed){fahrenheit_70, 0.3631 * psi_in_kpa}, rows),
               0.005);
}

/* Of Table 3-7's column of heads only the misprint was read, 8.66 m at
 * 1500 m; the other rows are its pressures over 9.80665, as the source
 * made them. */
static void test_misprinted_head_of_air_sticks_out(void **state)
{
    struct printed heads[COUNT(air)];

    (void)state;
    for (size_t i = 0; i < COUNT(air); i++)
        heads[i] = (struct printed){
            air[i].x,
            air[i].x == 1500 ? 8.66 : round(air[i].y / SL_GRAVITY * 100) / 100};
    one_found("Davis 2010, Table 3-7, head at 1500 m", heads, COUNT(heads),
              0.002, 1500);
}

/* UFC 4-832-01N's table of suction inlets gives each figure twice. */
static void test_metric_twin_that_is_misprinted(void **state)
{
    const struct sl_unit *feet = sl_unit_by_suffix(SL_LENGTH, "ft");
    const struct sl_unit *fps = sl_unit_by_suffix(SL_VELOCITY, "ft_s");

    (void)state;
    check_close("1.0 ft", sl_to_si(feet, 1.0), 0.30, 0.0, 0.005);
    check_close("2 fps", sl_to_si(fps, 2.0), 0.61, 0.0, 0.005);
    check_close("2.6 ft, printed as 0.63 m", sl_to_si(feet, 2.6), 0.79, 0.0,
                0.005);
    assert_true(fabs(sl_to_si(feet, 2.6) - 0.63) > 0.1);
}

/* --- the velocity head --- */

/* The same suction, told from three places. */
static void test_velocity_head_counts_three_ways(void **state)
{
    const double weight = 997.0 * SL_GRAVITY;
    const double velocity_head = sl_velocity_head(3.17);
    const double pressure_head = 10.33 - 2.41 - 0.67 - velocity_head;
    struct sl_balance surface = {.air_pressure = 10.33 * weight,
                                 .surface = -2.41,
                                 .friction = 0.67,
                                 .density = 997.0,
                                 .vapour_pressure = 3169.0};
    struct sl_balance gauge = {.air_pressure = 10.33 * weight,
                               .gauge_pressure =
                                   (pressure_head - 10.33) * weight,
                               .velocity_head = velocity_head,
                               .density = 997.0,
                               .vapour_pressure = 3169.0};
    struct sl_terms from_surface, from_gauge;

    (void)state;
    sl_npsha(&surface, &from_surface);
    sl_npsha(&gauge, &from_gauge);
    check_close("a surface has none", from_surface.velocity, 0.0, 0.0, 0.0);
    check_close("a gauge at the eye is given it back", from_gauge.npsha,
                from_surface.npsha, 1e-13, 0.0);
    check_close("a limit on static pressure is short of it",
                pressure_head - 3169.0 / weight,
                from_surface.npsha - velocity_head, 1e-13, 0.0);
    assert_true(velocity_head > 0.5);
}

/* --- Darcy's factor --- */

static void test_factor_is_darcys_not_fannings(void **state)
{
    double re = 1234.0, v = 0.0617, bore = 0.05, nu = v * bore / re;
    double factor = sl_friction_factor(re, 0.0);

    (void)state;
    check_close("64/Re, where Fanning's is 16/Re", factor, 4 * 16 / re, 1e-15,
                0.0);
    /* Hagen and Poiseuille's loss has no factor in it to mistake. */
    check_close("laminar loss", sl_darcy_head(factor, 12.3, bore, v),
                32 * nu * 12.3 * v / (SL_GRAVITY * bore * bore), 1e-14, 0.0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_sound_tables_are_smooth),
        cmocka_unit_test(test_misprinted_vapour_pressures_stick_out),
        cmocka_unit_test(test_misprinted_head_of_air_sticks_out),
        cmocka_unit_test(test_metric_twin_that_is_misprinted),
        cmocka_unit_test(test_velocity_head_counts_three_ways),
        cmocka_unit_test(test_factor_is_darcys_not_fannings),
    };

    return cmocka_run_group_tests_name("printed tables", tests, NULL, NULL);
}
