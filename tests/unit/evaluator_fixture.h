/* A station all of whose figures are recorded, small tables of published
 * values, and the means to forget or change a figure and judge again.
 * Include after the headers cmocka.h asks for, and cmocka.h. */
#ifndef SL_TESTS_EVALUATOR_FIXTURE_H
#define SL_TESTS_EVALUATOR_FIXTURE_H

#include <math.h>
#include <stdlib.h>

#include "evaluator/station.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/constants.h"
#include "hydraulics/curve.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/water.h"
#include "unit/check.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

enum { PUMPS = 3, PIPES = 4, POINTS = 5, FITTINGS = 2 };
enum { CONDITION_NORMAL, CONDITION_SUMMER };
enum { K_BELLMOUTH = 1, K_GATE_VALVE, K_FOOT_VALVE }; /* rows of fitting_k */
enum { COATED_STEEL = 1, CAST_IRON };                 /* rows of roughness */

struct fixture {
    struct sl_tables tables;
    struct sl_margin_rule rule;
    struct sl_dossier dossier;
    struct sl_dossier_pump pumps[PUMPS];
    struct sl_dossier_pipe pipes[PIPES];
    struct sl_fitting fittings[FITTINGS];
    struct sl_curve_point points[POINTS];
    struct sl_curve curve;
    struct sl_arena arena;
    struct sl_station_result result;
};

static struct sl_fitting_k fitting_k[] = {
    {"bellmouth entrance", {0.05, 0.1, 0.03}, "test", 'S'},
    {"gate valve", {0.15, 0.3, 0.1}, "test", 'S'},
    {"foot valve", {1.5, 15, 0.8}, "test", 'P'},
};

static struct sl_roughness roughness[] = {
    {"coated steel", 0.00003, 0.00006, 0.00015, "test", 'S'},
    {"uncoated cast iron", 0.00017, 0.00031, 0.00064, "test", 'S'},
};

static struct sl_default defaults[] = {
    {"water_temp_summer",
     "",
     {297.15, 308.15, 283.15},
     SL_TEMPERATURE,
     "",
     'P'},
    {"water_temp_normal",
     "",
     {287.15, 297.15, 277.15},
     SL_TEMPERATURE,
     "",
     'P'},
    {"barometer_fall", "", {0.02, 0.03, 0}, SL_PURE, "", 'P'},
    {"gas_allowance", "wastewater", {0.6, 0.6, 0}, SL_LENGTH, "", 'M'},
    {"gas_allowance", "", {0, 0.6, 0}, SL_LENGTH, "", 'M'},
    {"suction_roughness", "", {0.00015, 0.006, 0.000003}, SL_BORE, "", 'S'},
    {"discharge_roughness", "", {0.00015, 0.000003, 0.006}, SL_BORE, "", 'S'},
    {"suction_minor_k", "", {0.93, 2.13, 0.23}, SL_PURE, "", 'C'},
    {"suction_minor_k", "suction lift", {2.43, 17.13, 0.23}, SL_PURE, "", 'C'},
    {"discharge_minor_k", "", {5, 0, 20}, SL_PURE, "", 'P'},
    {"wet_pit_inlet_loss", "", {0.02, 0.1, 0}, SL_LENGTH, "", 'P'},
    {"suction_loss", "", {0.5, NAN, 0}, SL_LENGTH, "", 'P'},
    {"npshr_speed_exponent_up", "", {2, 2, 2}, SL_PURE, "", 'S'},
    {"npshr_speed_exponent_down", "", {1.5, 1.5, 1.5}, SL_PURE, "", 'S'},
    {"salinity", "seawater", {35, 35, 35}, SL_PURE, "", 'C'},
};

static struct sl_condition conditions[] = {
    [CONDITION_NORMAL] = {.condition = "normal"},
    [CONDITION_SUMMER] = {.condition = "summer low",
                          .level = SL_LEVEL_LOW,
                          .discharge = SL_LEVEL_LOW,
                          .pressure = SL_LEVEL_LOW,
                          .summer_temperature = 1,
                          .storm_barometer = 1},
};

/* The complete station's figures. */
static const double curve_flow[POINTS] = {0.011, 0.031, 0.052, 0.071, 0.088};
static const double curve_head[POINTS] = {44.7, 41.9, 36.8, 29.6, 20.9};
static const double curve_npshr[POINTS] = {1.62, 1.81, 2.47, 3.74, 5.63};
static const double suction_bore = 0.247, suction_length = 14.3;
static const double suction_wall = 0.00032, suction_k = 0.52 + 2 * 0.237;

static inline struct sl_number known(double value)
{
    return (struct sl_number){value, true, 0};
}

/* What an unknown's value holds must not matter. */
static inline struct sl_number unknown(void)
{
    return (struct sl_number){-7777.7, false, 0};
}

static inline void forget(struct sl_number *number)
{
    *number = unknown();
}

static inline struct sl_station complete_station(void)
{
    return (struct sl_station){
        .line = 17,
        .station_id = "S-017",
        .name = "Lower Weir",
        .service = SL_POTABLE,
        .installation = SL_DRY_PIT,
        .source_kind = SL_OPEN,
        .site_elevation = known(312.4),
        .cut_out_level = known(298.35),
        .record_low_level = known(297.9),
        .normal_level = known(301.2),
        .water_temp_summer = known(299.35),
        .water_temp_normal = known(286.75),
        .barometer_low = known(95120),
        .discharge_low = known(327.3),
        .discharge_normal = known(329.1),
        .discharge_loss_flow = known(0.06),
        .discharge_loss_head = known(4.7),
        .pumps_running_max = known(1),
        .source_pressure_low = unknown(),
        .source_pressure_normal = unknown(),
        .source_pressure_elevation = unknown(),
        .discharge_length = unknown(),
        .discharge_bore = unknown(),
        .discharge_minor_k = unknown(),
    };
}

static inline struct sl_pump complete_pump(const char *pump_id)
{
    return (struct sl_pump){
        .line = 23,
        .pump_id = pump_id,
        .make_up = SL_END_SUCTION,
        .datum_elevation = known(296.85),
        .rated_speed = known(1478),
        .rated_flow = unknown(),
        .rated_npshr = unknown(),
        .max_speed = unknown(),
        .inlet_elevation = unknown(),
        .inlet_diameter = unknown(),
        .largest_recorded_flow = unknown(),
    };
}

static inline struct sl_pipe complete_pipe(const char *pipe_id)
{
    return (struct sl_pipe){
        .line = 31,
        .pipe_id = pipe_id,
        .length = known(suction_length),
        .bore = known(suction_bore),
        .roughness = known(suction_wall),
        .hazen_williams_c = unknown(),
    };
}

/* Pumps A, B, C with one curve, each on a pipe of its own from the source;
 * only A is there until pump_count says more. */
static inline void fixture_make(struct fixture *f)
{
    static const char *const pump_ids[PUMPS] = {"A", "B", "C"};
    static const char *const pipe_ids[PIPES] = {"SA", "SB", "SC", "SD"};

    *f = (struct fixture){.rule = {.rule = "fixed head",
                                   .tiers = {{NAN, 1, 1.5}},
                                   .tier_count = 1,
                                   .lift_limit = NAN,
                                   .edition = "",
                                   .source = "test",
                                   .trust = 'N'}};
    f->tables = (struct sl_tables){
        .fittings = fitting_k,
        .fitting_count = COUNT(fitting_k),
        .roughness = roughness,
        .roughness_count = COUNT(roughness),
        .defaults = defaults,
        .default_count = COUNT(defaults),
        .rules = &f->rule,
        .rule_count = 1,
        .conditions = conditions,
        .condition_count = COUNT(conditions),
        .vocabularies = sl_fixed_vocabularies(),
    };
    f->fittings[0] =
        (struct sl_fitting){41, "SA", K_GATE_VALVE, unknown(), known(0.52)};
    f->fittings[1] =
        (struct sl_fitting){42, "SA", K_BELLMOUTH, known(2), known(0.237)};
    for (int i = 0; i < POINTS; i++)
        f->points[i] = (struct sl_curve_point){.line = 51 + i,
                                               .curve_id = "C1",
                                               .flow = known(curve_flow[i]),
                                               .head = known(curve_head[i]),
                                               .npshr = known(curve_npshr[i]),
                                               .speed = unknown()};
    f->curve = (struct sl_curve){"C1", f->points, POINTS, 0};
    for (int i = 0; i < PIPES; i++)
        f->pipes[i] =
            (struct sl_dossier_pipe){.record = complete_pipe(pipe_ids[i]),
                                     .fittings = f->fittings,
                                     .fitting_count = FITTINGS};
    for (int i = 0; i < PUMPS; i++)
        f->pumps[i] = (struct sl_dossier_pump){complete_pump(pump_ids[i]),
                                               &f->pipes[i], &f->curve};
    f->dossier = (struct sl_dossier){.station = 1,
                                     .record = complete_station(),
                                     .pumps = f->pumps,
                                     .pump_count = 1,
                                     .pipes = f->pipes,
                                     .pipe_count = PIPES};
}

static inline int fixture_setup(void **state)
{
    struct fixture *f = malloc(sizeof *f);

    if (!f)
        return -1;
    fixture_make(f);
    *state = f;
    return 0;
}

static inline int fixture_teardown(void **state)
{
    struct fixture *f = *state;

    sl_arena_release(&f->arena);
    free(f);
    return 0;
}

static inline const struct sl_station_result *judge(struct fixture *f)
{
    sl_arena_reset(&f->arena);
    sl_evaluate_station(&f->dossier, &f->tables,
                        &(struct sl_settings){.rule = &f->rule}, &f->arena,
                        &f->result);
    return &f->result;
}

/* Judge anew; pump A under one condition. */
static inline const struct sl_pump_result *judge_a(struct fixture *f,
                                                   int condition)
{
    return &judge(f)->conditions[condition].pumps[0];
}

static inline const struct sl_pump_result *summer(struct fixture *f)
{
    return judge_a(f, CONDITION_SUMMER);
}

/* Set the flow by record, so that a test knows it without solving. */
static inline void fix_flow(struct fixture *f, double flow)
{
    forget(&f->dossier.record.discharge_low);
    forget(&f->dossier.record.discharge_normal);
    f->pumps[0].record.largest_recorded_flow = known(flow);
}

static inline struct sl_curve_view npshr_curve(void)
{
    return (struct sl_curve_view){curve_flow, curve_npshr, POINTS};
}

static inline double weight(double kelvin)
{
    return sl_water_density(kelvin) * SL_GRAVITY;
}

/* Friction of a pipe, by the formulas. */
static inline double friction_of(double flow, double length, double bore,
                                 double wall, double kelvin)
{
    double viscosity = sl_water_viscosity(kelvin) / sl_water_density(kelvin);
    double velocity = sl_pipe_velocity(flow, bore);

    return sl_darcy_head(
        sl_friction_factor(sl_reynolds(velocity, bore, viscosity), wall / bore),
        length, bore, velocity);
}

static inline double minor_of(double flow, double bore, double k)
{
    return sl_minor_head(k, sl_pipe_velocity(flow, bore));
}

static inline void check_state(const char *label,
                               const struct sl_pump_result *pump,
                               enum sl_state state, enum sl_state likely)
{
    if (pump->state != state || pump->likely != likely)
        fail_msg("%s: %s (likely %s, reason '%s'), want %s (likely %s)", label,
                 sl_state_name(pump->state), sl_state_name(pump->likely),
                 pump->reason, sl_state_name(state), sl_state_name(likely));
}

static inline void check_provenance(const char *label,
                                    const struct sl_input *input,
                                    enum sl_provenance provenance)
{
    if (!input->applies || input->provenance != provenance)
        fail_msg("%s: %s is %s%s, want %s", label, sl_input_words(input->id),
                 sl_provenance_name(input->provenance),
                 input->applies ? "" : " and plays no part",
                 sl_provenance_name(provenance));
}

/* NaN is equal to NaN here. */
static inline void check_interval(const char *label,
                                  const struct sl_interval *got, double typical,
                                  double adverse, double favourable)
{
    const double pairs[][2] = {{got->typical, typical},
                               {got->adverse, adverse},
                               {got->favourable, favourable}};

    for (size_t i = 0; i < COUNT(pairs); i++) {
        if (isnan(pairs[i][1]))
            check_nan(label, pairs[i][0]);
        else
            check_close(label, pairs[i][0], pairs[i][1], 1e-12, 0);
    }
}

/* The terms of a corner are its NPSHA. */
static inline void check_sum(const char *label, const struct sl_terms *t)
{
    check_close(label, t->npsha,
                t->atmosphere + t->barometer + t->gauge + t->elevation +
                    t->velocity + t->friction + t->minor + t->vapour + t->gas,
                0, 1e-12);
}

#endif
