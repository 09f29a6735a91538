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
    bool off_curve;
    bool stands;
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

/* The audit as a whole. */
struct sl_summary {
    const char *label; /* of the vintage */
    const char *inventory_sha256;
    const char *version; /* of the program */
    long long vintage, evaluation;
    long long stations_by_state[SL_STATE_COUNT];
    long long pumps_by_state[SL_STATE_COUNT];
    long long stations_without_pumps;
    struct sl_margin_rule rule;
    const struct sl_condition *conditions;
    size_t condition_count;
    struct sl_file_sum sums[SL_KIND_COUNT];
};

#endif
