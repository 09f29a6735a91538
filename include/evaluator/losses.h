/* What pipes, fittings and the discharge lose at a flow, each unknown at the
 * end that a case takes it at.  Every loss is NaN where it has no figure. */
#ifndef SL_EVALUATOR_LOSSES_H
#define SL_EVALUATOR_LOSSES_H

#include "evaluator/plan.h"

/* Where each input is taken in its interval. */
struct sl_ends {
    enum sl_corner of[SL_INPUT_COUNT];
    enum sl_corner others;  /* suctions that are not on the pump's own way */
    double suction_blend;   /* 0 to 1: source and suction, toward the other
                               end than `of` says */
    double discharge_blend; /* likewise the discharge */
    double level_shift;     /* m, added to the source's level or gauge */
    double temperature;     /* K, in place of the input's; NaN: the input's */
};

struct sl_ends sl_ends_all(enum sl_corner corner);

/* The water at one temperature. */
struct sl_liquid {
    double density;
    double viscosity; /* kinematic, m²/s */
    double vapour_pressure;
};

struct sl_liquid sl_liquid_at(double salinity, double kelvin);

/* What stays the same while the flow is sought. */
struct sl_setting {
    const struct sl_plan *plan;
    const struct sl_ends *ends;
    struct sl_liquid liquid;
};

/* Friction and fittings from the source to the pump, m. */
struct sl_suction_loss {
    double friction;
    double minor;
};

double sl_interval_at(const struct sl_interval *interval, enum sl_corner end);
/* The value of an input at its end; 0 when it plays no part. */
double sl_setting_value(const struct sl_setting *setting, enum sl_input_id id);
/* Elevation of the liquid's surface or the main's gauge, m. */
double sl_setting_surface(const struct sl_setting *setting);
/* That, and the head of the source's gauge pressure over it, m. */
double sl_setting_source_head(const struct sl_setting *setting);
/* An interval at the end of a suction input, or of a discharge one, and the
 * blend toward the other. */
double sl_setting_blend(const struct sl_setting *setting, enum sl_input_id id,
                        const struct sl_interval *interval);
/* Loss of the inlet of a pump that stands in its water at `flow`, m. */
double sl_inlet_loss_at(const struct sl_setting *setting, double flow);

struct sl_pipe_loss sl_pipe_loss_at(const struct sl_setting *setting,
                                    const struct sl_path_pipe *place,
                                    double flow);
/* `flows` is of each pipe of the path; `flow` the pump's own. */
struct sl_suction_loss sl_suction_loss_at(const struct sl_setting *setting,
                                          const double *flows, double flow);
/* V²/2g where the balance starts at a gauge on a pipe, and only there;
 * `flow` is that pipe's.  Of a bore that is not known 0, and no figure at the
 * favourable end. */
double sl_gauge_velocity_head(const struct sl_setting *setting, double flow);

#endif
