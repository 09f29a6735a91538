/* What pipes, fittings and the discharge lose at a flow, each unknown at the
 * end that a case takes it at.  Every loss is NaN where it has no figure. */
#ifndef SL_EVALUATOR_LOSSES_H
#define SL_EVALUATOR_LOSSES_H

#include "evaluator/plan.h"
#include "evaluator/solve.h"

/* What stays the same while the flow is sought. */
struct sl_setting {
    const struct sl_plan *plan;
    const struct sl_ends *ends;
    double density;
    double viscosity; /* kinematic, m²/s */
    double vapour_pressure;
    double source_head; /* m, of the surface or main, gauge */
};

/* Friction and fittings from the source to the pump, m. */
struct sl_suction_loss {
    double friction;
    double minor;
};

double sl_interval_at(const struct sl_interval *interval, enum sl_corner end);
/* The value of an input at its end; 0 when it plays no part. */
double sl_setting_value(const struct sl_setting *setting, enum sl_input_id id);

struct sl_pipe_loss sl_pipe_loss_at(const struct sl_setting *setting,
                                    const struct sl_path_pipe *place,
                                    double flow);
struct sl_suction_loss sl_suction_loss_at(const struct sl_setting *setting,
                                          double flow);
/* By a measured point (F21), else by the main's pipe, m. */
double sl_discharge_loss_at(const struct sl_setting *setting, double flow);
/* V²/2g where the balance starts at a gauge on a pipe, and only there. */
double sl_gauge_velocity_head(const struct sl_setting *setting, double flow);

#endif
