#include "hydraulics/atmosphere.h"

#include <math.h>

#define SEA_LEVEL 101325.0 /* Pa */
#define TEMPERATURE 288.15 /* K, at sea level */
#define LAPSE 0.0065       /* K/m */
#define EXPONENT 5.255876  /* g0 M / (R lapse) */
#define LOWEST (-1000.0)   /* m */
#define HIGHEST 11000.0    /* m */

double sl_standard_atmosphere(double altitude)
{
    if (!(altitude >= LOWEST && altitude <= HIGHEST))
        return NAN;
    return SEA_LEVEL *
           pow(1.0 - LAPSE * altitude / TEMPERATURE, EXPONENT); /* F6 */
}

double sl_standard_altitude(double pressure)
{
    if (!(pressure <= sl_standard_atmosphere(LOWEST) &&
          pressure >= sl_standard_atmosphere(HIGHEST)))
        return NAN;
    return (1.0 - pow(pressure / SEA_LEVEL, 1.0 / EXPONENT)) * TEMPERATURE /
           LAPSE; /* F6 */
}
