#include "hydraulics/water.h"

#include <math.h>
#include <stdbool.h>
#include <stddef.h>

#define PASCALS_IN_MPA 1.0e6
#define PASCALS_IN_ATMOSPHERE 101325.0
#define CELSIUS_ZERO 273.15

/* False for NaN too. */
static bool within(double value, double low, double high)
{
    return value >= low && value <= high;
}

double sl_vapour_pressure(double kelvin)
{
    static const double n[] = {
        0.0, /* so that n[1] is the source's n1 */
        0.11670521452767e4,
        -0.72421316703206e6,
        -0.17073846940092e2,
        0.12020824702470e5,
        -0.32325550322333e7,
        0.14915108613530e2,
        -0.48232657361591e4,
        0.40511340542057e6,
        -0.23855557567849,
        0.65017534844798e3,
    };
    double theta, a, b, c, root;

    if (!within(kelvin, 273.15, 647.096))
        return NAN;
    theta = kelvin + n[9] / (kelvin - n[10]); /* F2 */
    a = theta * theta + n[1] * theta + n[2];
    b = n[3] * theta * theta + n[4] * theta + n[5];
    c = n[6] * theta * theta + n[7] * theta + n[8];
    root = 2.0 * c / (-b + sqrt(b * b - 4.0 * a * c));
    return root * root * root * root * PASCALS_IN_MPA;
}

double sl_water_density(double kelvin)
{
    static const struct {
        double coefficient;
        double power;
    } alphas[] = {{6.74458446e3, 4.0},
                  {-2.22521604e5, 5.0},
                  {1.00231247e8, 7.0},
                  {-1.63552118e9, 8.0},
                  {8.32299658e9, 9.0}};
    static const double betas[] = {5.78545292e-3, -1.53195665e-2,
                                   3.11337859e-2, -4.23546241e-2,
                                   3.38713507e-2, -1.19946761e-2};
    const double gas_constant = 461.51805; /* J/(kg K) */
    const double pressure = 1.0e5;         /* Pa */
    double alpha, beta, beta_power = 1.0, sum = 1.93763157e-2;
    size_t i;

    if (!within(kelvin, 253.15, 383.15))
        return NAN;
    alpha = 10.0 / (593.0 - kelvin);
    beta = 10.0 / (kelvin - 232.0);
    for (i = 0; i < sizeof alphas / sizeof *alphas; i++)
        sum += alphas[i].coefficient * pow(alpha, alphas[i].power);
    for (i = 0; i < sizeof betas / sizeof *betas; i++) {
        beta_power *= beta;
        sum += betas[i] * beta_power;
    }
    return pressure / (gas_constant * 10.0 * sum); /* F3 */
}

double sl_water_viscosity(double kelvin)
{
    static const struct {
        double coefficient;
        double power;
    } terms[] = {
        {280.68, -1.9}, {511.45, -7.7}, {61.131, -19.6}, {0.45903, -40.0}};
    double sum = 0.0;
    size_t i;

    if (!within(kelvin, 253.15, 383.15))
        return NAN;
    for (i = 0; i < sizeof terms / sizeof *terms; i++)
        sum += terms[i].coefficient * pow(kelvin / 300.0, terms[i].power);
    return sum * 1.0e-6; /* F4 */
}

double sl_seawater_vapour_pressure(double kelvin, double salinity)
{
    if (!within(kelvin, 273.15, 313.15) || !within(salinity, 0.0, 40.0))
        return NAN;
    return PASCALS_IN_ATMOSPHERE *
           exp(24.4543 - 67.4509 * (100.0 / kelvin) -
               4.8489 * log(kelvin / 100.0) - 0.000544 * salinity); /* F5 */
}

double sl_seawater_density(double kelvin, double salinity)
{
    double t = kelvin - CELSIUS_ZERO;
    double fresh, first, three_halves;

    if (!within(kelvin, 271.15, 313.15) || !within(salinity, 0.0, 42.0))
        return NAN;
    fresh =
        999.842594 +
        t * (6.793952e-2 +
             t * (-9.095290e-3 +
                  t * (1.001685e-4 + t * (-1.120083e-6 + t * 6.536332e-9))));
    first =
        8.24493e-1 +
        t * (-4.0899e-3 + t * (7.6438e-5 + t * (-8.2467e-7 + t * 5.3875e-9)));
    three_halves = -5.72466e-3 + t * (1.0227e-4 + t * -1.6546e-6);
    return fresh + salinity * (first + sqrt(salinity) * three_halves +
                               salinity * 4.8314e-4); /* F17 */
}
