/* The standard atmosphere. */
#ifndef SL_HYDRAULICS_ATMOSPHERE_H
#define SL_HYDRAULICS_ATMOSPHERE_H

/* Pressure of the standard atmosphere, formula F6.
 * US Standard Atmosphere 1976, equation 33a = ISO 2533:1975, lowest layer.
 * in   altitude  -1000 to 11000 m over mean sea level.  The formula asks
 *                for geopotential height; an ordinary elevation is used as
 *                if it were one (0.02 % of the pressure at 3000 m).
 * out  [Pa], absolute: what a barometer on the spot shows in standard air,
 *      not the sea-level value that weather services give
 * Outside the range, and for NaN or infinity: NaN. */
double sl_standard_atmosphere(double altitude);

/* The altitude at which standard air has a pressure: F6 turned round.
 * in   pressure  [Pa], absolute, that of -1000 to 11000 m
 * out  [m] over mean sea level
 * Outside the range, and for NaN or infinity: NaN. */
double sl_standard_altitude(double pressure);

#endif
