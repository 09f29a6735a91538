/* Rows of the ranked outputs, as the store gives them and the ranker writes
 * them.  Texts live until the next row is read. */
#ifndef SL_MODEL_ROW_H
#define SL_MODEL_ROW_H

#include "model/finding.h"
#include "model/result.h"

/* One pump under one condition. */
struct sl_pump_row {
    const char *station_id;
    const char *station_name;
    const char *pump_id;
    const char *condition;
    int service;
    int installation;
    int make_up;
    enum sl_state state;
    enum sl_state likely;
    const char *reason;
    enum sl_flow_basis flow_basis;
    enum sl_source_basis source_basis;
    enum sl_npshr_basis npshr_basis; /* none where it was not kept, too */
    bool off_curve;
    bool stands;
    /* Over all running sets; each set in words, "" where there is none. */
    const char *running_set; /* the one that governs */
    const char *adverse_set; /* "" too where there is no adverse surplus */
    const char *one_out_set;
    const char *off_curve_set;
    const char *stands_set;
    int running;          /* pumps in the one that governs */
    long long sets_tried; /* 0: not kept */
    bool sets_all;        /* those are all the controls allow */
    double one_out_margin, one_out_surplus; /* m */
    enum sl_curve_position curve_position;  /* in off_curve_set */
    bool two_crossings;
    /* Names of the checks that are beyond, "; " between, and "(from memory)"
     * behind those whose limit is; NULL: not kept. */
    const char *flags;
    /* A letter a rule of the summary: S, T, U, C as enum sl_state, or - where
     * it does not apply; "" when they were not kept. */
    const char *rule_states;
    struct sl_limit limits[SL_LIMIT_COUNT];
    struct sl_case cases[SL_CORNER_COUNT];
    double altitude;                         /* m, NaN when unknown */
    double temperature;                      /* K, typical */
    int recorded, derived, assumed, unknown; /* inputs by provenance */
    /* The unknown that matters most; NULL when there is none. */
    const char *leading_unknown; /* sl_input_column() */
};

struct sl_station_row {
    long rank; /* from 1, within its block */
    /* Clear pumps beside a rejected one: told as unproven, with the reason. */
    struct sl_pump_row worst;
    enum sl_state state;
    double people_served; /* NaN: not recorded */
    double latitude, longitude;
    int pumps;          /* that were judged */
    int pumps_rejected; /* that were not kept, so could not be */
    int pumps_by_state[SL_STATE_COUNT];
    /* Some pump, in some condition, has a flag or is short or thin by some
     * rule. */
    bool any_beside;
    long line; /* in stations.csv */
};

/* One thing to find out, for an unproven pump. */
struct sl_unknown_row {
    long rank;
    const char *station_id;
    const char *station_name;
    const char *pump_id;
    const char *condition;
    enum sl_state likely;
    enum sl_input_id input;
    enum sl_provenance provenance;
    struct sl_interval value; /* SI */
    double swing;             /* m; NaN: no bound */
    bool settles;
    double people_served;
    const char *what; /* the rule or source it rests on now */
};

struct sl_default_row {
    struct sl_default row;
    long long uses;
};

struct sl_set_aside_row {
    const char *file;
    long line;
    const char *record_id;
    enum sl_fate fate;
    const char *reason;
};

/* A margin rule, and what it says of the pumps, each by its worst condition.
 */
struct sl_rule_row {
    struct sl_margin_rule rule; /* no tiers: the store no longer holds it */
    long long pumps_by_state[SL_STATE_COUNT];
    long long pumps_apart; /* that it is not about */
};

/* The audit as a whole. */
struct sl_summary {
    const char *label; /* of the vintage */
    const char *inventory_sha256;
    const char *version; /* of the program */
    long long vintage, evaluation;
    long long stations_by_state[SL_STATE_COUNT];
    long long pumps_by_state[SL_STATE_COUNT];
    long long stations_without_pumps;
    long long clear_beside; /* clear, and `any_beside` */
    int year; /* of the audit: pipes are as old as that makes them */
    struct sl_margin_rule rule;      /* ranked on */
    const struct sl_rule_row *rules; /* every one judged by, in order */
    size_t rule_count;
    const struct sl_condition *conditions;
    size_t condition_count;
    struct sl_file_sum sums[SL_KIND_COUNT];
};

#endif
