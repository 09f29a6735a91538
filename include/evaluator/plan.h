/* Everything one pump's balance is made from, under one condition.
 *
 * A plan holds each input as an interval with its provenance; the pumps of a
 * station are solved together with each input at one of its ends
 * (evaluator/joint.h).  The parts of a plan are filled by source.c, levels.c,
 * suction.c, walls.c, delivery.c and machine.c. */
#ifndef SL_EVALUATOR_PLAN_H
#define SL_EVALUATOR_PLAN_H

#include "base/memory.h"
#include "hydraulics/curve.h"
#include "model/result.h"

/* Of the bore: Colebrook's data end here (F8), and no wall is aged beyond. */
#define SL_ROUGHEST_OF_BORE 0.05

/* One pipe between the source and the pump. */
struct sl_path_pipe {
    const struct sl_dossier_pipe *pipe;
    bool hazen_williams;          /* only C is known of its surface */
    struct sl_interval roughness; /* m */
    struct sl_interval minor_k;   /* sum over its fittings */
    bool shared;                  /* other pumps draw through it too */
};

/* The discharge side, when it is known well enough to solve the flow. */
struct sl_delivery {
    bool known;
    double loss_flow, loss_head; /* a measured point; NaN: by pipe */
    double length, bore;         /* m */
    struct sl_interval roughness;
    struct sl_interval minor_k;
};

struct sl_plan {
    const struct sl_dossier *dossier;
    const struct sl_dossier_pump *pump;
    const struct sl_condition *condition;
    const struct sl_tables *tables;
    const struct sl_margin_rule *rule; /* ranked on */
    struct sl_arena *arena;

    struct sl_input inputs[SL_INPUT_COUNT];
    enum sl_source_kind source_kind;
    enum sl_source_basis source_basis;
    double salinity; /* g/kg; 0 for fresh water */

    struct sl_path_pipe *path; /* from the source to the pump */
    size_t path_count;
    /* The input whose default suction loss stands in for what cannot be
     * worked out; SL_INPUT_COUNT when nothing is missing. */
    enum sl_input_id unmeasured;
    double inlet_diameter; /* of a wet-pit inlet; NaN: none */

    struct sl_delivery delivery;
    enum sl_flow_basis flow_basis;
    enum sl_npshr_basis npshr_basis;
    double speed_ratio;         /* its speed over that of its curve's test */
    double rated_ratio;         /* its speed over that of its rated point */
    struct sl_curve_view head;  /* at the speed it runs at; empty: unknown */
    struct sl_curve_view npshr; /* likewise */
    double rated_flow;          /* scaled to that speed; NaN unknown */
    double rated_npshr;         /* likewise */
    /* NPSHR never falls with the flow, and at no flow does what a rule asks
     * for rise faster than the head falls: then more loss, or a lower
     * source, is worse whatever it does to the flow. */
    bool npshr_rises, head_is_steep;
    double suction_specific_speed; /* US customary (F14); NaN unknown */
    double suction_energy; /* over the start of high (F15); NaN unknown */
};

/* The plan of one pump; everything in it lives in the arena. */
void sl_plan_make(struct sl_plan *plan, const struct sl_dossier *dossier,
                  const struct sl_dossier_pump *pump,
                  const struct sl_condition *condition,
                  const struct sl_tables *tables,
                  const struct sl_margin_rule *rule, struct sl_arena *arena);

/* The parts, in the order they are filled. */
void sl_plan_source(struct sl_plan *plan);
void sl_plan_source_level(struct sl_plan *plan);
void sl_plan_suction(struct sl_plan *plan);
void sl_plan_machine(struct sl_plan *plan);
void sl_plan_delivery(struct sl_plan *plan);

/* Roughness of a wall of that material, as laid or aged to the audit's year;
 * its rough end is adverse.  Tells whether its age or condition is assumed. */
struct sl_interval sl_plan_roughness(const struct sl_plan *plan, int material,
                                     int condition,
                                     const struct sl_number *year_laid,
                                     double bore, enum sl_friction_state state,
                                     bool *assumed);
/* The row a wall of that material is aged by; NULL where nothing ages it. */
const struct sl_ageing *sl_plan_growth(const struct sl_plan *plan, int material,
                                       int condition,
                                       enum sl_friction_state state);
/* An exactly known value. */
struct sl_interval sl_exactly(double value);
/* No honest figure at any end. */
struct sl_interval sl_no_figure(void);
/* The lower of two levels of which either may be unknown. */
const struct sl_number *sl_lower_level(const struct sl_number *a,
                                       const struct sl_number *b);
/* A value recorded, or NaN. */
double sl_recorded(const struct sl_number *number);

/* Set an input.  `rule` says in words what it rests on. */
struct sl_input *sl_plan_set(struct sl_plan *plan, enum sl_input_id id,
                             enum sl_provenance provenance,
                             struct sl_interval value, const char *rule);
/* Set an input from a record's own value, known or not. */
struct sl_input *sl_plan_record(struct sl_plan *plan, enum sl_input_id id,
                                const struct sl_number *number,
                                enum sl_kind kind, long line,
                                const char *unknown_rule);
/* Add to an input what the condition adds, and say so. */
void sl_plan_add(struct sl_plan *plan, enum sl_input_id id, double addition);
/* Set an input of the station of which a lowest and a usual figure may be
 * recorded: the one wanted or, for want of it, the other one, which bounds
 * it from one side.  Lower is adverse. */
struct sl_input *sl_plan_low_or_normal(struct sl_plan *plan,
                                       enum sl_input_id id,
                                       const struct sl_number *low,
                                       const struct sl_number *normal,
                                       enum sl_level_basis wanted,
                                       const char *unknown_rule);
/* Set an input from the defaults: the row for the circumstance, else the
 * row for all others. */
struct sl_input *sl_plan_default(struct sl_plan *plan, enum sl_input_id id,
                                 const char *field, const char *circumstance);
const struct sl_default *sl_default_find(const struct sl_tables *tables,
                                         const char *field,
                                         const char *circumstance);
/* The same among the limits of the companion checks. */
const struct sl_check_limit *sl_check_limit_find(const struct sl_tables *tables,
                                                 const char *check,
                                                 const char *circumstance);

#endif
