/* A pump curve at another speed: formula F18, the affinity laws.
 *
 * Points (Q, H) of a curve tested at speed n1 go to (Q r, H r²) at speed
 * n2, r = n2/n1.  Good to about a fifth of the speed either way [from
 * memory, check the source].  Outside its range, and for NaN or infinity,
 * each returns NaN. */
#ifndef SL_HYDRAULICS_AFFINITY_H
#define SL_HYDRAULICS_AFFINITY_H

/* in   flow  [m³/s], >= 0;  speed_ratio  [-], > 0
 * out  [m³/s]: flow * speed_ratio */
double sl_affinity_flow(double flow, double speed_ratio);

/* in   head  [m], any finite;  speed_ratio  [-], > 0
 * out  [m]: head * speed_ratio² */
double sl_affinity_head(double head, double speed_ratio);

/* in   npshr  [m], >= 0;  speed_ratio  [-], > 0
 *      exponent  [-], 0 to 3: 2 in theory, nearer 1.5 in some tests; data
 *                of the owner's, not a constant here
 * out  [m]: npshr * speed_ratio^exponent, at the flow scaled likewise */
double sl_affinity_npshr(double npshr, double speed_ratio, double exponent);

#endif
