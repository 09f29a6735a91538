/* Numbers of a pump's shape: specific speeds, and what is told from them,
 * an estimated NPSHR and suction energy.
 *
 * Closed forms.  Outside its range, and for NaN or infinity, each returns
 * NaN; so it does where the result would be infinite.  A specific speed is
 * in rpm, m³/s and m, and its number differs from the US customary one by
 * the factor sl_us_specific_speed_factor(). */
#ifndef SL_HYDRAULICS_SPECIFIC_SPEED_H
#define SL_HYDRAULICS_SPECIFIC_SPEED_H

/* Suction specific speed, formula F14: S = N sqrt(Q) / NPSHR^0.75.
 * Wislicenus, Watson and Karassik 1939 [from memory, check the source].
 * in   speed  [rpm], > 0
 *      flow_per_eye  [m³/s], > 0: at best efficiency with the full-diameter
 *              impeller; half the pump's where the impeller is of double
 *              suction
 *      npshr  [m], > 0, at that flow
 * out  [rpm, m³/s, m] */
double sl_suction_specific_speed(double speed, double flow_per_eye,
                                 double npshr);

/* Specific speed, formula F14 with the head: N sqrt(Q) / H^0.75.
 * in   speed  [rpm], > 0
 *      flow  [m³/s], > 0, the whole pump's at best efficiency
 *      head_per_stage  [m], > 0, at that flow
 * out  [rpm, m³/s, m] */
double sl_specific_speed(double speed, double flow, double head_per_stage);

/* What turns either of them, in rpm, m³/s and m, into the US customary one,
 * in rpm, US gallons a minute and feet: about 51.645.  Divide by it to go
 * the other way. */
double sl_us_specific_speed_factor(void);

/* NPSHR where none is recorded, formula F13: F14 solved for it,
 * (N sqrt(Q) / S)^(4/3).  An estimate, and what it is given as must say
 * so: pumps of one kind differ in S, and half the S gives 2.5 times the
 * NPSHR.
 * in   speed  [rpm], > 0;  flow_per_eye  [m³/s], > 0, as for F14
 *      suction_specific_speed  [rpm, m³/s, m], > 0, of pumps of its kind
 * out  [m] */
double sl_estimated_npshr(double speed, double flow_per_eye,
                          double suction_specific_speed);

/* Suction energy, formula F15: D_eye N S times the specific gravity.
 * ANSI/HI 9.6.1 [from memory, check the source].  The only published
 * limits are of US customary numbers, so this one is: inches, rpm, and S in
 * rpm, US gallons a minute and feet.
 * in   eye_diameter  [m], > 0, of the impeller's inlet
 *      speed  [rpm], > 0
 *      suction_specific_speed  [rpm, m³/s, m], > 0, by F14
 *      specific_gravity  [-], > 0, density over that of cold fresh water
 * out  [in rpm rpm gpm^0.5 / ft^0.75], of the order of 1e8 */
double sl_suction_energy(double eye_diameter, double speed,
                         double suction_specific_speed,
                         double specific_gravity);

#endif
