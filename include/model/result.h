/* What the evaluator finds. */
#ifndef SL_MODEL_RESULT_H
#define SL_MODEL_RESULT_H

#include <stdbool.h>
#include <stddef.h>

#include "model/dossier.h"
#include "model/tables.h"

/* In order of what an owner must do first; stored as these words. */
enum sl_state { SL_SHORT, SL_THIN, SL_UNPROVEN, SL_CLEAR, SL_STATE_COUNT };
const char *sl_state_name(enum sl_state state);

/* Where a value comes from. */
enum sl_provenance {
    SL_UNKNOWN,  /* not recorded, and no honest figure exists */
    SL_RECORDED, /* the inventory's own */
    SL_DERIVED,  /* from recorded values, by a named rule */
    SL_ASSUMED   /* a row of the defaults, or of a published table's range */
};
const char *sl_provenance_name(enum sl_provenance provenance);

/* The head balance of one pump, m of the water pumped.  Each term is signed
 * as it acts: together they are `npsha` (formula F1). */
struct sl_terms {
    double atmosphere; /* standard air at the site */
    double barometer;  /* its fall in a storm, or the record low's */
    double gauge;      /* gauge pressure of a closed tank or main */
    double elevation;  /* liquid surface, or gauge, over the datum */
    double velocity;   /* V²/2g at a main's gauge; 0 elsewhere */
    double friction;
    double minor;
    double vapour;
    double gas;
    double npsha;
};

/* Which values of the unknowns a case was solved with. */
enum sl_corner { SL_TYPICAL, SL_ADVERSE, SL_FAVOURABLE, SL_CORNER_COUNT };

/* One solved corner.  NaN: no honest figure at this corner. */
struct sl_case {
    double flow; /* of this pump, m³/s */
    struct sl_terms terms;
    double npshr;
    double required; /* NPSHA the margin rule asks for */
    double margin;   /* npsha - npshr */
    double surplus;  /* npsha - required */
};

/* Where a flow lies on the published curve. */
enum sl_curve_position {
    SL_ON_CURVE, /* or no curve is published */
    SL_BEFORE_START,
    SL_PAST_END
};
const char *sl_curve_position_name(enum sl_curve_position position);

/* One running set, as one of its pumps sees it, at the typical values. */
struct sl_set_case {
    const char *words; /* "alone", "with P-2 and P-3"; NULL: no such set */
    int running;       /* pumps in it, this one counted */
    struct sl_case figures;
    enum sl_curve_position position;
    bool stands;        /* it cannot reach the header's head in this set */
    bool two_crossings; /* its head meets the system's at a lesser flow too */
    /* How the set's flows ended, in words; NULL: solved, or on record. */
    const char *solution;
};

/* What a margin rule says of a pump, over all its sets. */
struct sl_rule_verdict {
    const struct sl_margin_rule *rule;
    bool applies;
    enum sl_state state;
    double measure; /* what its tier is chosen by, typical; NaN: unknown */
    double required[SL_CORNER_COUNT]; /* m */
    double surplus[SL_CORNER_COUNT];  /* m */
};

/* Companion checks, beside the margin and never mixed into it. */
enum sl_check_id {
    SL_CHECK_SUBMERGENCE,
    SL_CHECK_OPERATING_REGION,
    SL_CHECK_SUCTION_VELOCITY,
    SL_CHECK_BELL_VELOCITY,
    SL_CHECK_SUCTION_LIFT,
    SL_CHECK_STRAIGHT_RUN,
    SL_CHECK_BOOSTER_PRESSURE,
    SL_CHECK_SUCTION_ENERGY,
    SL_CHECK_OFF_CURVE,
    SL_CHECK_TWO_CROSSINGS,
    SL_CHECK_ROUGHNESS,
    SL_CHECK_COUNT
};
const char *sl_check_name(enum sl_check_id id);

enum sl_check_end {
    SL_CHECK_NOT_MADE,
    SL_CHECK_UNKNOWN,
    SL_CHECK_WITHIN,
    SL_CHECK_BEYOND
};

struct sl_check {
    enum sl_check_end end;
    double value;           /* the worst over the sets tried, typical */
    double lowest, highest; /* NaN: no limit on that side */
    enum sl_quantity quantity;
    const char *source;
    char trust;
};

/* How far one thing may go until the rule is just met, all else typical and
 * the whole station solved anew. */
enum sl_limit_end {
    SL_LIMIT_UNKNOWN, /* there are no figures to tell it by */
    SL_LIMIT_FOUND,
    SL_LIMIT_NONE,   /* it is not met anywhere within the range */
    SL_LIMIT_ALWAYS, /* it is met over the whole range */
    /* It is met up to the value, and there is no figure beyond: some pump
     * leaves its published curve. */
    SL_LIMIT_FIGURES_END
};
const char *sl_limit_end_name(enum sl_limit_end end);

struct sl_limit {
    enum sl_limit_end end;
    double value; /* SI; NaN unless found, or where figures end */
};

/* Its figure; NaN at an end that has none, whatever stands there. */
double sl_limit_value(const struct sl_limit *limit);

/* The range looked at: either way from where the level is, m; K. */
#define SL_LIMIT_REACH 20.0
#define SL_LIMIT_COLDEST 273.15
#define SL_LIMIT_WARMEST 333.15
#define SL_LIMIT_WARMEST_SEAWATER 313.15

enum sl_limit_id {
    SL_LIMIT_LEVEL,       /* lowest source level, or gauge pressure head of a
                             main as an elevation, m */
    SL_LIMIT_TEMPERATURE, /* highest, K */
    SL_LIMIT_FLOW,        /* largest of this pump, m³/s */
    SL_LIMIT_COUNT
};

/* How the flow was found, best first. */
enum sl_flow_basis {
    SL_FLOW_SOLVED,   /* this pump's curve on the station's system */
    SL_FLOW_RECORDED, /* largest ever recorded */
    SL_FLOW_RATED,    /* the rated point */
    SL_FLOW_NONE
};
const char *sl_flow_basis_name(enum sl_flow_basis basis);

/* Where NPSHR comes from. */
enum sl_npshr_basis {
    SL_NPSHR_CURVE,    /* the maker's, at the flow */
    SL_NPSHR_RATED,    /* the rated point's, at any flow */
    SL_NPSHR_ESTIMATE, /* by suction specific speed (F13) */
    SL_NPSHR_NONE
};
const char *sl_npshr_basis_name(enum sl_npshr_basis basis);

/* Which level, pressure or grade was used for the source. */
enum sl_source_basis {
    SL_SOURCE_CUT_OUT,
    SL_SOURCE_RECORD_LOW,
    SL_SOURCE_NORMAL,
    SL_SOURCE_PRESSURE_LOW,
    SL_SOURCE_PRESSURE_NORMAL,
    SL_SOURCE_UNKNOWN
};
const char *sl_source_basis_name(enum sl_source_basis basis);

/* The things a pump's balance is made from. */
enum sl_input_id {
    SL_IN_SITE_ELEVATION,
    SL_IN_BAROMETER,
    SL_IN_SOURCE_KIND,
    SL_IN_SOURCE_PRESSURE,
    SL_IN_SOURCE_PRESSURE_ELEVATION,
    SL_IN_SOURCE_LEVEL,
    SL_IN_DATUM,
    SL_IN_TEMPERATURE,
    SL_IN_GAS,
    SL_IN_SUCTION_PIPING, /* whether there is a pipe at all, and its loss */
    SL_IN_SUCTION_LENGTH,
    SL_IN_SUCTION_BORE,
    SL_IN_SUCTION_ROUGHNESS,
    SL_IN_SUCTION_MINOR,
    SL_IN_DISCHARGE_LEVEL,
    SL_IN_DISCHARGE_LOSS,
    SL_IN_FLOW,
    SL_IN_SPEED,
    SL_IN_NPSHR,
    SL_IN_RUNNING_TOGETHER, /* most pumps that run at once */
    SL_IN_RULE_MEASURE,     /* what the rule's tier is chosen by */
    SL_INPUT_COUNT
};
/* The column an owner would fill in, e.g. "site_elevation". */
const char *sl_input_column(enum sl_input_id id);
/* The same in words, e.g. "the site's elevation". */
const char *sl_input_words(enum sl_input_id id);
enum sl_quantity sl_input_quantity(enum sl_input_id id);

struct sl_input {
    enum sl_input_id id;
    bool applies; /* it is part of this pump's balance at all */
    bool open;    /* not known exactly: finding it out could change the
                     verdict */
    enum sl_provenance provenance;
    struct sl_interval value; /* SI; NaN where there is no honest figure */
    enum sl_kind kind;        /* of the record it was read from */
    long line;                /* its line, 0 when not recorded */
    const char *rule;         /* in words: how derived, or what it rests on */
    const struct sl_default *row;   /* the default used, or NULL */
    const struct sl_default *other; /* a second one beside it, or NULL */
    /* How much the margin would move if this alone went from its adverse
     * to its favourable value, m; NaN when an end has no bound; 0 when it
     * is not an unknown. */
    double swing;
    /* It alone, once known, could settle the state. */
    bool settles;
};

/* One pipe of a pump's suction path at the typical corner. */
struct sl_pipe_loss {
    const struct sl_dossier_pipe *pipe;
    double flow;     /* m³/s */
    double velocity; /* m/s */
    double reynolds;
    double roughness; /* m; NaN where Hazen-Williams was used */
    double factor;    /* Darcy f; NaN where Hazen-Williams was used */
    double minor_k;   /* sum over its fittings */
    double friction;  /* m */
    double minor;     /* m */
};

struct sl_pump_result {
    const struct sl_dossier_pump *pump;
    enum sl_state state;
    /* By the typical values; SL_UNPROVEN when there are none. */
    enum sl_state likely;
    /* One sentence: why it is not clear, or not proven. */
    const char *reason;
    enum sl_flow_basis flow_basis;
    enum sl_source_basis source_basis;
    enum sl_npshr_basis npshr_basis;
    /* In some set, at the typical values. */
    bool off_curve; /* the flow lies past an end of the NPSHR curve */
    bool stands;    /* its curve cannot reach the header's head: no set runs */
    struct sl_set_case off_curve_set; /* the first such; words NULL: none */
    /* Each corner over all running sets: the least surplus of any at the
     * typical and the adverse one; the governing set's at the favourable. */
    struct sl_case cases[SL_CORNER_COUNT];
    struct sl_set_case governing; /* of the typical corner */
    struct sl_set_case one_out;   /* the most that may run, less one */
    const char *stands_set;       /* the first it stands in; NULL: none */
    const char *adverse_set;      /* of the adverse corner; NULL: none */
    size_t sets_tried;
    bool sets_all;                  /* every set the controls allow */
    const struct sl_set_case *sets; /* on demand, as tried; else NULL */
    size_t set_count;
    struct sl_rule_verdict *rules; /* as in the tables */
    size_t rule_count;
    struct sl_check checks[SL_CHECK_COUNT];
    struct sl_limit limits[SL_LIMIT_COUNT];
    struct sl_input inputs[SL_INPUT_COUNT]; /* `id` equal to the place */
    int counts[SL_ASSUMED + 1]; /* inputs that apply, by provenance */
    /* The unknown that matters most; NULL when all is known. */
    const struct sl_input *leading_unknown;
    struct sl_pipe_loss *losses; /* from the source to the pump */
    size_t loss_count;
};

struct sl_condition_result {
    const struct sl_condition *condition;
    struct sl_pump_result *pumps; /* as in the dossier */
    size_t pump_count;
};

/* A station's results; `worst` points into them. */
struct sl_station_result {
    const struct sl_dossier *dossier;
    struct sl_condition_result *conditions;
    size_t condition_count;
    enum sl_state state;
    const struct sl_condition_result *worst_condition;
    const struct sl_pump_result *worst; /* NULL: it has no pump */
};

#endif
