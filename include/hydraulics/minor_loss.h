/* Velocity head, and losses given as multiples of it.
 *
 * Magnitudes only: a negative, NaN or infinite input gives NaN. */
#ifndef SL_HYDRAULICS_MINOR_LOSS_H
#define SL_HYDRAULICS_MINOR_LOSS_H

/* Velocity head, formula F24: V²/2g.
 * in   velocity  [m/s], >= 0
 * out  [m] */
double sl_velocity_head(double velocity);

/* Loss of a fitting, or of several in one bore, formula F24: K V²/2g.
 * in   k         [-], >= 0, sum over the fittings of that bore
 *      velocity  [m/s], >= 0, in the bore that k belongs to
 * out  [m] */
double sl_minor_head(double k, double velocity);

/* K of a fitting in a small bore, formula F30: tabulated K are for bores of
 * 12 inch and more; below that 5 % are added for each inch.
 * Source: common practice of handbook tables, no single source.
 * in   k     [-], >= 0, as tabulated
 *      bore  [m], > 0; NaN (not known) leaves k as it is
 * out  [-] */
double sl_small_bore_k(double k, double bore);

#endif
