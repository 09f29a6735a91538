/* Properties of the water pumped.
 *
 * Closed forms.  Outside its range, and for NaN or infinity, each returns
 * NaN.  Temperatures are absolute [K], ITS-90. */
#ifndef SL_HYDRAULICS_WATER_H
#define SL_HYDRAULICS_WATER_H

/* Saturation (vapour) pressure of pure water, formula F2.
 * IAPWS R7-97(2012), IAPWS-IF97, region 4, equation 30.
 * in   kelvin  273.15 to 647.096 K
 * out  [Pa], absolute */
double sl_vapour_pressure(double kelvin);

/* Density of liquid water at 0.1 MPa, formula F3.
 * IAPWS SR6-08(2011), equation 1 (as specific volume).
 * in   kelvin  253.15 to 383.15 K (super-cooled and superheated ends
 *              included, as in the source)
 * out  [kg/m³] */
double sl_water_density(double kelvin);

/* Dynamic viscosity of liquid water at 0.1 MPa, formula F4.
 * IAPWS SR6-08(2011), the viscosity equation.
 * in   kelvin  253.15 to 383.15 K
 * out  [Pa s]; divide by the density for the kinematic viscosity [m²/s] */
double sl_water_viscosity(double kelvin);

/* Vapour pressure of seawater, formula F5.
 * Weiss and Price 1980, Marine Chemistry 8, 347, equation 10.
 * in   kelvin    273.15 to 313.15 K
 *      salinity  0 to 40, practical salinity (about g/kg)
 * out  [Pa], absolute.  At salinity 0 it differs from F2 by up to 0.13 %:
 *      do not mix the two in one comparison of small differences. */
double sl_seawater_vapour_pressure(double kelvin, double salinity);

/* Density of seawater at one atmosphere, formula F17.
 * UNESCO 1981, Technical Papers in Marine Science 36 (EOS-80; Millero and
 * Poisson 1981, Deep-Sea Research 28A, 625).
 * in   kelvin    271.15 to 313.15 K (-2 to 40 °C; the 1968 and the 1990
 *                temperature scales are not told apart: at most
 *                0.004 kg/m³)
 *      salinity  0 to 42, practical salinity
 * out  [kg/m³] */
double sl_seawater_density(double kelvin, double salinity);

#endif
