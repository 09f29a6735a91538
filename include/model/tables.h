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

/* How the surface of a wall grows rougher (F10). */
struct sl_ageing {
    const char *material;
    int condition;           /* SL_GOOD to SL_POOR; 0: not recorded */
    struct sl_interval rate; /* m a year: typical, fastest, slowest */
    const char *source;
    char trust;
};

/* What a margin rule looks at to choose its tier. */
enum sl_rule_measure {
    SL_MEASURE_NONE,
    SL_MEASURE_SUCTION_ENERGY,         /* over the start of high (F15) */
    SL_MEASURE_SUCTION_SPECIFIC_SPEED, /* US customary (F14) */
    SL_MEASURE_SUCTION_LIFT            /* m, of the surface under the eye */
};

#define SL_RULE_TIERS 3
/* Most margin rules judged at once. */
#define SL_RULES_MOST 16

/* Asked for where the measure is more than `over`; the first tier always. */
struct sl_margin_tier {
    double over;
    double ratio;
    double floor; /* m */
};

/* Met when NPSHA >= max(ratio * NPSHR, NPSHR + floor) by the tier that
 * applies and, where there is a lift limit, when the suction lift with its
 * losses and NPSHR together stay within it. */
struct sl_margin_rule {
    const char *rule;
    int make_up; /* the only one it is about; 0: all */
    enum sl_rule_measure measure;
    struct sl_margin_tier tiers[SL_RULE_TIERS];
    size_t tier_count;
    double lift_limit; /* m; NaN: none */
    const char *edition;
    const char *source;
    char trust;
};

/* A limit that a companion check holds a figure to. */
struct sl_check_limit {
    const char *check;        /* "suction velocity" */
    const char *circumstance; /* a service or make-up; "" for all others */
    double lowest, highest;   /* SI; NaN: no limit on that side */
    enum sl_quantity quantity;
    const char *source;
    char trust;
};

/* A discharge level or a pressure is normal or low; a source level any. */
enum sl_level_basis {
    SL_LEVEL_NORMAL,
    SL_LEVEL_LOW, /* the lowest the audit knows of */
    SL_LEVEL_CUT_OUT,
    SL_LEVEL_RECORD_LOW
};

/* Walls as laid, or grown rougher with their years. */
enum sl_friction_state { SL_FRICTION_NEW, SL_FRICTION_AGED };

/* A case to audit. */
struct sl_condition {
    const char *condition; /* "summer low" */
    enum sl_level_basis level;
    double level_addition; /* m, to that level */
    enum sl_level_basis discharge;
    enum sl_level_basis pressure;
    int summer_temperature;      /* else the normal one */
    double temperature_addition; /* K, to that temperature */
    int storm_barometer;         /* take the barometer allowance */
    enum sl_friction_state suction_friction;
    enum sl_friction_state discharge_friction;
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
    struct sl_ageing *ageing;
    size_t ageing_count;
    struct sl_check_limit *limits;
    size_t limit_count;
    int year; /* of the audit: pipes are as old as that makes them */
    /* Of the inventory's own that were not kept: what they ask for is not
     * known, so nothing is clear. */
    long long rejected_conditions;
    struct sl_vocabularies vocabularies;
};

#endif
