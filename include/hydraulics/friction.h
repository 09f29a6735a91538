/* Friction in full round pipes.
 *
 * Closed forms and one equation solved to machine accuracy.  Magnitudes
 * only: a negative, NaN or infinite input gives NaN.  f is always the Darcy
 * factor, four times the Fanning factor.  bore is the inside diameter. */
#ifndef SL_HYDRAULICS_FRICTION_H
#define SL_HYDRAULICS_FRICTION_H

/* Re from which flow is no longer laminar (F8). */
#define SL_LAMINAR_BELOW 2300.0

/* Mean velocity, formula F23: V = 4 Q / (pi D²).
 * in   flow  [m³/s], >= 0;  bore  [m], > 0
 * out  [m/s] */
double sl_pipe_velocity(double flow, double bore);

/* Reynolds number, formula F23: Re = V D / nu.
 * in   velocity  [m/s], >= 0;  bore  [m], > 0
 *      kinematic_viscosity  [m²/s], > 0
 * out  [-] */
double sl_reynolds(double velocity, double bore, double kinematic_viscosity);

/* Darcy friction factor, formula F8.
 * Laminar: Hagen-Poiseuille.  Turbulent: Colebrook 1939, Journal of the
 * Institution of Civil Engineers 11, 133, solved by Halley's method to
 * the last digits of a double.
 * in   reynolds  [-]      0 < Re <= 1e9
 *      relative_roughness  [-], roughness over bore, 0 to 0.1.  Colebrook's
 *              data end at 0.05; up to 0.1 the equation is carried on, and
 *              a caller who meets more than 0.05 should say so.
 * out  [-]: 64/Re below Re 2300; Colebrook above 4000; between them, where
 *      the flow may be either, the larger of the two, which is Colebrook's
 *      throughout, so the factor steps up at 2300.
 * Re 0 gives NaN: water at rest has no friction factor (and no loss: see
 * sl_darcy_head). */
double sl_friction_factor(double reynolds, double relative_roughness);

/* Roughness of a wall that has grown rougher with age, formula F10:
 * eps(t) = eps0 + a t.
 * Colebrook and White 1937, Journal of the Institution of Civil Engineers
 * 7, 99 [place from memory, check the source].
 * in   new_roughness  [m], >= 0, as laid
 *      rate  [m a year], >= 0: data, by the water and the wall
 *      years  [years], >= 0, since it was laid
 * out  [m].  A straight line for ever: beside the bore it may come out
 *      rougher than sl_friction_factor takes. */
double sl_aged_roughness(double new_roughness, double rate, double years);

/* Loss of head, Darcy-Weisbach, formula F7: h = f (L/D) V²/2g.
 * in   factor  [-], Darcy, >= 0;  length  [m], >= 0;  bore  [m], > 0
 *      velocity  [m/s], >= 0
 * out  [m].  At velocity 0 the loss is 0 whatever the factor, NaN
 *      included: sl_friction_factor has none to give there. */
double sl_darcy_head(double factor, double length, double bore,
                     double velocity);

/* Loss of head, Hazen-Williams, formula F9:
 * h = 10.67 L Q^1.852 / (C^1.852 D^4.87).
 * Williams and Hazen 1905 in the usual SI rounding.  For water at ordinary
 * temperature in turbulent flow; where roughness is known prefer F7.
 * in   flow  [m³/s], >= 0;  c  [-], 10 to 200
 *      length  [m], >= 0;  bore  [m], > 0
 * out  [m] */
double sl_hazen_williams_head(double flow, double c, double length,
                              double bore);

/* A loss and how it grows with flow. */
struct sl_loss {
    double head;  /* [m] */
    double slope; /* d head / d flow [s/m²] */
};

/* Darcy-Weisbach at a flow, F23, F8 and F7 in one, and its exact slope.
 * in   flow  [m³/s], >= 0;  length  [m], >= 0;  bore  [m], > 0
 *      roughness  [m], >= 0;  kinematic_viscosity  [m²/s], > 0
 * out  the head is that of sl_friction_factor and sl_darcy_head.  At flow 0
 *      the head is 0 and the slope that of laminar flow.  NaN, both, outside
 *      the range of sl_friction_factor. */
struct sl_loss sl_darcy_loss(double flow, double length, double bore,
                             double roughness, double kinematic_viscosity);

/* sl_hazen_williams_head and its slope. */
struct sl_loss sl_hazen_williams_loss(double flow, double c, double length,
                                      double bore);

#endif
