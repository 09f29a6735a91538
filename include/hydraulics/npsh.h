/* The head available at a pump's suction, and the head a rule asks for. */
#ifndef SL_HYDRAULICS_NPSH_H
#define SL_HYDRAULICS_NPSH_H

#include "model/result.h"

/* What a balance is made from.  Magnitudes: the function gives the signs. */
struct sl_balance {
    double air_pressure;   /* [Pa] absolute, standard air, >= 0 */
    double air_fall;       /* [Pa] how far the low barometer lies under it;
                              negative when a record low lies above it */
    double gauge_pressure; /* [Pa] over the air's; 0 for an open surface;
                              may be negative (a vacuum) */
    double surface; /* [m] elevation of the liquid surface, or of the gauge */
    double datum;   /* [m] elevation of the impeller eye, same origin */
    double velocity_head;   /* [m] at a gauge on a pipe; 0 from a surface, where
                               it cancels */
    double friction;        /* [m] >= 0, from there to the suction */
    double minor;           /* [m] >= 0, likewise */
    double gas;             /* [m] >= 0, allowance for gas in the water */
    double density;         /* [kg/m³] > 0 */
    double vapour_pressure; /* [Pa] absolute, >= 0 */
};

/* NPSHA and its terms, formula F1:
 * (p_air - fall + p_gauge)/(rho g) + z_surface - z_datum + V²/2g
 *     - h_friction - h_minor - p_v/(rho g) - h_gas.
 * out  every field of *terms [m of the water pumped], each signed as it
 *      acts (losses, vapour and gas negative), npsha their sum taken in the
 *      struct's order, so that adding them again gives the same digits.
 * A value outside the range above, NaN or infinite makes its own term NaN,
 * and with it npsha; the other terms keep their figures.  The sum may be
 * negative: the water would boil before it reached the pump. */
void sl_npsha(const struct sl_balance *balance, struct sl_terms *terms);

/* The NPSHA a margin rule asks for, formula F22:
 * the greater of ratio * NPSHR and NPSHR + floor.
 * in   npshr  [m], >= 0;  ratio  [-], >= 0 (1 or less: no ratio asked)
 *      floor  [m], >= 0 (0: no floor asked)
 * out  [m]; NaN outside these ranges and for NaN or infinity */
double sl_required_npsha(double npshr, double ratio, double floor);

#endif
