/* How deep an inlet must lie. */
#ifndef SL_HYDRAULICS_SUBMERGENCE_H
#define SL_HYDRAULICS_SUBMERGENCE_H

/* Least submergence against a vortex from the surface, formula F16:
 * S = D (1 + 2.3 F_D), F_D = V / sqrt(g D).
 * ANSI/HI 9.8, Rotodynamic Pumps for Pump Intake Design.
 * in   diameter  [m], > 0: outside diameter of the bell, or bore of a plain
 *              opening
 *      flow  [m³/s], >= 0, through it
 * out  [m], from the lip of the inlet up to the surface; NaN outside these
 *      ranges and for NaN or infinity */
double sl_minimum_submergence(double diameter, double flow);

#endif
