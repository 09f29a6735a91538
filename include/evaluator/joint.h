/* The pumps of a running set, solved together with each unknown at one
 * place in its interval. */
#ifndef SL_EVALUATOR_JOINT_H
#define SL_EVALUATOR_JOINT_H

#include "evaluator/layout.h"
#include "evaluator/losses.h"
#include "hydraulics/network.h"

/* No class is looked at apart from the others. */
#define SL_NO_FOCUS ((size_t)-1)

/* What is to be solved. */
struct sl_joint_case {
    const struct sl_layout *layout;
    const int *counts; /* of each class */
    /* The class of one pump whose own way is taken at the ends, while other
     * suctions are taken at `ends.others`. */
    size_t focus;
    struct sl_ends ends;
    struct sl_liquid liquid;
    /* The others' flows, by class, in place of solving them; NULL: solved. */
    const double *given;
    double imposed; /* flow of the focus, m³/s; NaN: solved */
    /* Flows to start from, by class; NULL: none. */
    const double *start;
};

struct sl_joint {
    struct sl_joint_case of;
    enum sl_network_end end;
    bool several;  /* more than one pump runs */
    bool overfull; /* more pipes or units than can be solved at once */
    struct sl_network network;
    struct sl_network_pipe pipes[SL_NETWORK_PIPES];
    const struct sl_dossier_pipe *pipe_of[SL_NETWORK_PIPES];
    double pipe_flow[SL_NETWORK_PIPES]; /* m³/s */
    struct sl_network_unit units[SL_NETWORK_UNITS];
    size_t class_of[SL_NETWORK_UNITS];
    struct sl_unit_flow flows[SL_NETWORK_UNITS];
};

/* What came of it for one pump. */
struct sl_outcome {
    struct sl_case figures; /* all NaN where the set has no solution */
    bool stands;
    bool two_crossings;
    enum sl_curve_position position;
    const char *solution;    /* NULL: solved */
    double suction_velocity; /* in the pipe at the pump, m/s; NaN: none */
    double flange_pressure;  /* gauge, at the suction flange, Pa */
    double required[SL_RULES_MOST];
    /* Where several cases or sets are looked at each of these keeps its own
     * extreme, which need not be that of the figures. */
    double margin;
    double surplus[SL_RULES_MOST]; /* of each rule of the tables */
};

/* A case without any figure. */
struct sl_case sl_no_case(void);

void sl_joint_solve(struct sl_joint *joint, const struct sl_joint_case *of);

/* The outcome for a pump of a class in the set: of the focus, if that is its
 * class.  `ends` are those of its balance; the flows are as solved. */
void sl_joint_outcome(const struct sl_joint *joint, size_t class,
                      struct sl_outcome *outcome);

/* The same with the balance's unknowns at other ends, where the flows do not
 * change with them. */
void sl_joint_outcome_at(const struct sl_joint *joint, size_t class,
                         const struct sl_ends *ends,
                         struct sl_outcome *outcome);
/* The flow of one pump of each class in the set, to start from elsewhere. */
void sl_joint_flows(const struct sl_joint *joint, double *flows);

/* The setting of a plan of the set: its ends and its water. */
struct sl_setting sl_joint_setting(const struct sl_joint *joint,
                                   const struct sl_plan *plan);
/* How a class's pump, the focus if that is its class, ended; NULL where the
 * set has no solution or not this class. */
const struct sl_unit_flow *sl_joint_unit(const struct sl_joint *joint,
                                         size_t class);
/* Flow of one pipe of a plan's way: a shared one is found by what it is,
 * one of its own flows as the pump does, m³/s. */
double sl_joint_pipe_flow(const struct sl_joint *joint,
                          const struct sl_path_pipe *place, double own);
/* Flow of one pump of a class, the focus if that is its class, m³/s; NaN
 * where there is none. */
double sl_joint_flow(const struct sl_joint *joint, size_t class);
/* The same of one beside the focus. */
double sl_joint_other_flow(const struct sl_joint *joint, size_t class);

/* The losses of each pipe of a plan's way; `losses` has room for them. */
void sl_joint_losses(const struct sl_joint *joint, size_t class,
                     const struct sl_plan *plan, struct sl_pipe_loss *losses);

/* NPSHA that a rule asks for, and what is left over it, in a case. */
void sl_rule_apply(const struct sl_margin_rule *rule,
                   const struct sl_plan *plan, enum sl_corner corner,
                   const struct sl_case *figures, double *required,
                   double *surplus);
/* Whether a rule is about this pump at all. */
bool sl_rule_applies(const struct sl_margin_rule *rule,
                     const struct sl_plan *plan);
/* What its tier is chosen by; NaN: not known. */
double sl_rule_measure(const struct sl_margin_rule *rule,
                       const struct sl_plan *plan, enum sl_corner corner,
                       const struct sl_case *figures);

#endif
