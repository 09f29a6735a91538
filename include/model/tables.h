/* Published values: the figures an owner might dispute, each with its
 * source and a trust mark.  They are rows of the store, not code.
 *
 * Trust: 'S' read in the named source, 'C' computed from a named formula,
 * 'M' from memory and shown so, 'P' a proposal of ours without an outside
 * authority, 'N' common practice without a source. */
#ifndef SL_MODEL_TABLES_H
#define SL_MODEL_TABLES_H

#include <stddef.h>

#include "base/units.h"
#include "model/vocabulary.h"

/* A value that is not known exactly.  Adverse is the end that lowers the
 * margin; NaN there or in `typical` means there is no honest figure. */
struct sl_interval {
    double typical;
    double adverse;
    double favourable;
};

struct sl_fitting_k {
    const char *fitting;
    struct sl_interval k; /* of V²/2g in the fitting's bore */
    const char *source;
    char trust;
};

/* Absolute roughness by condition of the surface, m. */
struct sl_roughness {
    const char *material;
    double good, fair, poor;
    const char *source;
    char trust;
};

/* A value taken where none is recorded, by circumstance. */
struct sl_default {
    const char *field;        /* the input it stands for */
    const char *circumstance; /* a service; "" for all others */
    struct sl_interval value; /* SI */
    enum sl_quantity quantity;
    const char *source;
    char trust;
};

/* Rule met when NPSHA >= max(ratio * NPSHR, NPSHR + floor). */
struct sl_margin_rule {
    const char *rule;
    double ratio;
    double floor; /* m */
    const char *edition;
    const char *source;
    char trust;
};

enum sl_level_basis { SL_LEVEL_NORMAL, SL_LEVEL_LOW };

/* A case to audit. */
struct sl_condition {
    const char *condition; /* "summer low" */
    enum sl_level_basis level;
    enum sl_level_basis discharge;
    enum sl_level_basis pressure;
    int summer_temperature; /* else the normal one */
    int storm_barometer;    /* take the barometer allowance */
};

struct sl_tables {
    struct sl_fitting_k *fittings;
    size_t fitting_count;
    struct sl_roughness *roughness;
    size_t roughness_count;
    struct sl_default *defaults;
    size_t default_count;
    struct sl_margin_rule *rules;
    size_t rule_count;
    struct sl_condition *conditions;
    size_t condition_count;
    struct sl_vocabularies vocabularies;
};

#endif
