/* Quantities and their units.
 *
 * Inside the program every number is SI (m, m³/s, Pa, K, rad-free degrees,
 * rev/min, W); the units below are met only at the edges.  A unit is known
 * by the suffix a column header ends in: "site_elevation_ft".
 *
 * SI value = (value + offset) * factor, exact by NIST SP 811 (2008),
 * appendix B; the horsepower is the mechanical one of 550 ft lbf/s. */
#ifndef SL_BASE_UNITS_H
#define SL_BASE_UNITS_H

#include <stddef.h>

enum sl_quantity {
    SL_PURE,        /* no dimension: K, counts, years, degrees of arc */
    SL_LENGTH,      /* m: lengths, elevations, levels, heads */
    SL_BORE,        /* m: bores, diameters, roughness */
    SL_FLOW,        /* m³/s */
    SL_PRESSURE,    /* Pa */
    SL_TEMPERATURE, /* K */
    SL_SPEED,       /* rev/min, kept as the trade's unit */
    SL_POWER,       /* W */
    SL_VELOCITY,    /* m/s */
    SL_TEMPERATURE_DIFFERENCE /* K: how much warmer, not how warm */
};

enum sl_unit_system { SL_SI, SL_US };

struct sl_unit {
    const char *suffix; /* in headers: "l_s" */
    const char *label;  /* for people: "L/s" */
    enum sl_quantity quantity;
    double factor;
    double offset;
};

/* The unit of this quantity written `suffix` in a header, or NULL. */
const struct sl_unit *sl_unit_by_suffix(enum sl_quantity quantity,
                                        const char *suffix);
/* The unit results of this quantity are shown in. */
const struct sl_unit *sl_unit_shown(enum sl_quantity quantity,
                                    enum sl_unit_system system);
/* All suffixes of a quantity as "m, ft, ..."; static text. */
const char *sl_unit_choices(enum sl_quantity quantity);

double sl_to_si(const struct sl_unit *unit, double value);
double sl_from_si(const struct sl_unit *unit, double si);
/* A value of this quantity, SI, in the unit shown for the system. */
double sl_shown(enum sl_quantity quantity, enum sl_unit_system system,
                double si);

#endif
