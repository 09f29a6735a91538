#include "hydraulics/atmosphere.h"

#include <math.h>

double sl_standard_atmosphere(double altitude)
{
    const double sea_level = 101325.0; /* Pa */
    const double temperature = 288.15; /* K, at sea level */
    const double lapse = 0.0065;       /* K/m */
    const double exponent = 5.255876;  /* g0 M / (R lapse) */

    if (!(altitude >= -1000.0 && altitude <= 11000.0))
        return NAN;
    return sea_level *
           pow(1.0 - lapse * altitude / temperature, exponent); /* F6 */
}
