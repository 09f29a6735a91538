/* The inventory's records, one struct a kind, in SI.
 *
 * What is not recorded is unknown and says so: a number has `known`, a text
 * is NULL, a word is 0.  Which column fills which member is said once, in
 * model/fields.h; the importer, the store and the documentation all walk
 * that list.  Texts belong to whoever filled the record: the reader's line
 * while importing, an arena when read from a store. */
#ifndef SL_MODEL_RECORDS_H
#define SL_MODEL_RECORDS_H

#include <stdbool.h>

struct sl_number {
    double value; /* SI; meaningless unless known */
    bool known;
    char grade; /* 'A' to 'E' as the owner wrote it, 0 when not given */
};

/* Which inventory file a record is from, in the order they are read: every
 * reference but a pipe's draws_from points to a kind before. */
enum sl_kind {
    SL_KIND_STATION,
    SL_KIND_CURVE,
    SL_KIND_PIPE,
    SL_KIND_FITTING,
    SL_KIND_PUMP,
    SL_KIND_CONDITION,
    SL_KIND_RULE,
    SL_KIND_COUNT
};

struct sl_station {
    long line; /* of the record's first byte in its file */
    const char *station_id;
    const char *name;
    int service;
    int in_service;
    struct sl_number year_retired;
    struct sl_number latitude;
    struct sl_number longitude;
    struct sl_number site_elevation;
    int installation;
    int source_kind;
    struct sl_number source_pressure_low;
    struct sl_number source_pressure_normal;
    struct sl_number source_pressure_elevation;
    struct sl_number cut_out_level;
    struct sl_number record_low_level;
    struct sl_number normal_level;
    struct sl_number water_temp_summer;
    struct sl_number water_temp_normal;
    struct sl_number barometer_low;
    struct sl_number discharge_low;
    struct sl_number discharge_normal;
    struct sl_number discharge_loss_flow;
    struct sl_number discharge_loss_head;
    struct sl_number discharge_length;
    struct sl_number discharge_bore;
    int discharge_material;
    struct sl_number discharge_year;
    struct sl_number discharge_minor_k;
    struct sl_number pumps_running_max;
    struct sl_number pumps_running_firm;
    struct sl_number people_served;
    struct sl_number flow_served;
    struct sl_number outage_cost_per_day;
    struct sl_number days_to_restore;
    const char *note;
};

struct sl_pump {
    long line;
    const char *pump_id;
    const char *station_id;
    const char *position;
    int make_up;
    int in_service;
    struct sl_number datum_elevation;
    const char *curve_id;
    struct sl_number rated_flow;
    struct sl_number rated_head;
    struct sl_number rated_npshr;
    struct sl_number rated_speed;
    struct sl_number max_speed;
    struct sl_number bep_flow;
    struct sl_number stages;
    int double_suction;
    struct sl_number suction_nozzle_bore;
    struct sl_number eye_diameter;
    struct sl_number inlet_elevation;
    struct sl_number inlet_diameter;
    const char *suction_pipe_id;
    struct sl_number largest_recorded_flow;
    struct sl_number motor_power;
    struct sl_number year_installed;
    struct sl_number straight_run;
};

/* One point of a maker's curve. */
struct sl_curve_point {
    long line;
    const char *curve_id;
    struct sl_number flow;
    struct sl_number head;
    struct sl_number npshr;
    struct sl_number efficiency;
    struct sl_number speed;
};

struct sl_pipe {
    long line;
    const char *pipe_id;
    const char *station_id;
    const char *draws_from; /* NULL: the source itself */
    struct sl_number length;
    struct sl_number bore;
    int material;
    const char *lining;
    int condition;
    struct sl_number year_installed;
    struct sl_number roughness;
    struct sl_number hazen_williams_c;
};

struct sl_fitting {
    long line;
    const char *pipe_id;
    int fitting;
    struct sl_number count;
    struct sl_number k;
};

/* A case to audit of the owner's own; what is not recorded takes the adverse
 * choice when it is read (model/tables.h). */
struct sl_owner_condition {
    long line;
    const char *condition;
    int level_basis;
    struct sl_number level_addition;
    int discharge_basis;
    int pressure_basis;
    int temperature_basis;
    struct sl_number temperature_addition;
    int barometer;
    int suction_friction;
    int discharge_friction;
};

/* A margin rule of the owner's own, of a single tier. */
struct sl_owner_rule {
    long line;
    const char *rule;
    struct sl_number ratio;
    struct sl_number floor;
    const char *edition;
    const char *source;
};

/* Room for a record of any kind. */
union sl_record {
    struct sl_station station;
    struct sl_curve_point point;
    struct sl_pipe pipe;
    struct sl_fitting fitting;
    struct sl_pump pump;
    struct sl_owner_condition condition;
    struct sl_owner_rule rule;
};

#endif
