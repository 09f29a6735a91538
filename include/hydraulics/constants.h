/* Constants of nature that the formulas share. */
#ifndef SL_HYDRAULICS_CONSTANTS_H
#define SL_HYDRAULICS_CONSTANTS_H

/* Standard gravity [m/s²], by definition (3rd CGPM, 1901).  Real gravity
 * lies within 0.3 % of it everywhere; every head here is a standard metre. */
#define SL_GRAVITY 9.80665

#endif
