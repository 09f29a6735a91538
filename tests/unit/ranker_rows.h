/* Invented rows for the tests of the ranker and for looking at a report.
 * No station, person or maker in them is real. */
#ifndef SL_TESTS_RANKER_ROWS_H
#define SL_TESTS_RANKER_ROWS_H

#include <math.h>
#include <stddef.h>

#include "model/row.h"

#define NO_FIGURE ((double)NAN)

/* One case from its terms; the rule is NPSHR + 1.5 m. */
static inline struct sl_case case_of(double flow, struct sl_terms terms,
                                     double npshr)
{
    terms.npsha = terms.atmosphere + terms.barometer + terms.gauge +
                  terms.elevation + terms.velocity + terms.friction +
                  terms.minor + terms.vapour + terms.gas;
    return (struct sl_case){.flow = flow,
                            .terms = terms,
                            .npshr = npshr,
                            .required = npshr + 1.5,
                            .margin = terms.npsha - npshr,
                            .surplus = terms.npsha - npshr - 1.5};
}

/* The three corners: `spread` m of elevation either way. */
static inline void fill_cases(struct sl_pump_row *row, double flow,
                              struct sl_terms terms, double npshr,
                              double spread)
{
    struct sl_terms adverse = terms, favourable = terms;

    adverse.elevation -= spread;
    favourable.elevation += spread;
    row->cases[SL_TYPICAL] = case_of(flow, terms, npshr);
    row->cases[SL_ADVERSE] = case_of(flow, adverse, npshr);
    row->cases[SL_FAVOURABLE] = case_of(flow, favourable, npshr);
}

static inline struct sl_station_row station_of(long rank, enum sl_state state,
                                               const char *id, const char *name,
                                               int service, int installation,
                                               double people)
{
    struct sl_station_row row = {
        .rank = rank,
        .worst = {.station_id = id,
                  .station_name = name,
                  .pump_id = "P-2",
                  .condition = "summer low",
                  .service = service,
                  .installation = installation,
                  .make_up = SL_SPLIT_CASE,
                  .state = state,
                  .likely = state,
                  .reason = "",
                  .flow_basis = SL_FLOW_SOLVED,
                  .source_basis = SL_SOURCE_CUT_OUT,
                  .altitude = 212.0,
                  .temperature = 297.15,
                  .recorded = 14,
                  .derived = 2},
        .state = state,
        .people_served = people,
        .latitude = 41.203817,
        .longitude = -104.82461,
        .pumps = 3,
        .line = rank + 1,
    };

    row.pumps_by_state[state] = 2;
    row.pumps_by_state[SL_CLEAR] += 1;
    return row;
}

/* 1,830 m up, water 3.4 m below the eye, rated flow. */
static inline struct sl_station_row high_lift_station(void)
{
    struct sl_station_row row = station_of(1, SL_SHORT, "0107", "Juniper Draw",
                                           SL_RAW_WATER, SL_DRY_PIT, 184200);

    row.worst.flow_basis = SL_FLOW_RATED;
    row.worst.altitude = 1830;
    row.worst.assumed = 3;
    fill_cases(&row.worst, 0.0953,
               (struct sl_terms){.atmosphere = 8.31,
                                 .elevation = -3.42,
                                 .friction = -0.73,
                                 .minor = -0.49,
                                 .vapour = -0.31},
               4.08, 0.3);
    return row;
}

/* Low water, a great need. */
static inline struct sl_station_row needy_station(void)
{
    struct sl_station_row row =
        station_of(2, SL_SHORT, "0042", "Lower Quillfeather", SL_POTABLE,
                   SL_DRY_PIT, 96500);

    fill_cases(&row.worst, 0.2118,
               (struct sl_terms){.atmosphere = 10.08,
                                 .barometer = -0.14,
                                 .elevation = -3.41,
                                 .friction = -0.11,
                                 .minor = -0.13,
                                 .vapour = -0.31},
               6.32, 0);
    return row;
}

/* Nothing is known of the eye's elevation. */
static inline struct sl_station_row unknown_station(void)
{
    struct sl_station_row row =
        station_of(1, SL_UNPROVEN, "0311", "Saltmarsh Gate", SL_STORMWATER,
                   SL_WET_PIT, NO_FIGURE);

    row.worst.likely = SL_UNPROVEN;
    row.worst.reason = "the elevation of the impeller eye is unknown";
    row.worst.leading_unknown = "datum_elevation";
    row.worst.unknown = 1;
    row.worst.assumed = 4;
    row.worst.altitude = NO_FIGURE;
    fill_cases(&row.worst, 0.412,
               (struct sl_terms){
                   .atmosphere = 10.3, .elevation = NO_FIGURE, .vapour = -0.43},
               5.2, 0);
    return row;
}

/* The worst of seven sets, all told. */
static inline void fill_sets(struct sl_pump_row *row)
{
    row->running_set = "with P-1, P-3";
    row->running = 3;
    row->sets_tried = 7;
    row->sets_all = true;
    row->adverse_set = "with any 1 of P-1, P-3";
    row->one_out_set = "with P-3";
    row->one_out_margin = 1.283;
    row->one_out_surplus = -0.217;
    row->off_curve_set = "alone";
    row->curve_position = SL_PAST_END;
    row->npshr_basis = SL_NPSHR_RATED;
    row->flags = "submergence; suction velocity (from memory)";
    row->rule_states = "TC-";
    row->limits[SL_LIMIT_LEVEL] = (struct sl_limit){SL_LIMIT_FOUND, 208.4375};
    row->limits[SL_LIMIT_TEMPERATURE] = (struct sl_limit){SL_LIMIT_NONE, NAN};
    row->limits[SL_LIMIT_FLOW] = (struct sl_limit){SL_LIMIT_FOUND, 0.12345};
}

static const struct sl_rule_row sample_rules[] = {
    {{.rule = "fixed head",
      .tiers = {{NAN, 1, 1.5}},
      .tier_count = 1,
      .lift_limit = NAN,
      .edition = "",
      .source = "common practice, no source",
      .trust = 'N'},
     {5, 7, 9, 24},
     0},
    {{.rule = "a rule recalled",
      .tiers = {{NAN, 1.1, 0.6}},
      .tier_count = 1,
      .lift_limit = NAN,
      .edition = "1998",
      .source = "a standard, as one remembers it",
      .trust = 'M'},
     {4, 3, 11, 27},
     0},
    {{.rule = "the <b>board's</b>, own",
      .tiers = {{NAN, 1.25, 0}},
      .tier_count = 1,
      .lift_limit = NAN,
      .edition = "",
      .source = "the owner's own",
      .trust = 'O'},
     {1, 0, 0, 2},
     42},
};

static struct sl_ageing sample_ageing[] = {
    {"uncoated <steel>",
     SL_POOR,
     {0.25e-3, 0.76e-3, 0.25e-3},
     "attack, as one remembers it",
     'M'},
    {"smooth plastic", 0, {0, 0, 0}, "none", 'P'},
};

static struct sl_check_limit sample_limits[] = {
    {"suction velocity", "", NAN, 2.4, SL_VELOCITY, "8 ft/s, recalled", 'M'},
    {"straight run", "<long>", 5, NAN, SL_PURE, "read so", 'S'},
};

static struct sl_fitting_k sample_fittings[] = {
    {"elbow", {0.3, 0.4, 0.2}, "handbook tables; ranges differ", 'S'},
    {"clean <strainer>", {1, 4, 1}, "recalled", 'M'},
};

static struct sl_roughness sample_roughness[] = {
    {"GRP", 3e-5, 6e-5, 9e-5, "printed tables", 'S'},
};

/* The published rows that the foot of a report lists. */
static const struct sl_tables sample_tables = {
    .ageing = sample_ageing,
    .ageing_count = sizeof sample_ageing / sizeof sample_ageing[0],
    .limits = sample_limits,
    .limit_count = sizeof sample_limits / sizeof sample_limits[0],
    .fittings = sample_fittings,
    .fitting_count = sizeof sample_fittings / sizeof sample_fittings[0],
    .roughness = sample_roughness,
    .roughness_count = sizeof sample_roughness / sizeof sample_roughness[0],
};

static inline struct sl_summary summary_of(const struct sl_condition *condition)
{
    static const char *const files[SL_KIND_COUNT] = {
        "stations.csv",         "curves.csv", "suction_pipes.csv",
        "suction_fittings.csv", "pumps.csv",  "conditions.csv",
        "margin_rules.csv"};
    struct sl_summary summary = {
        .label = "2026",
        .inventory_sha256 = "3f9a1c07be52d8844f60aa1be7c35d9210c4e6f8a7b3d592e1"
                            "f06c8d4b7a9350",
        .version = "0.1.0",
        .vintage = 3,
        .evaluation = 5,
        .stations_by_state = {2, 3, 4, 6},
        .pumps_by_state = {5, 7, 9, 24},
        .stations_without_pumps = 1,
        .clear_beside = 4,
        .year = 2026,
        .rules = sample_rules,
        .rule_count = sizeof sample_rules / sizeof sample_rules[0],
        .rule = {.rule = "fixed head",
                 .tiers = {{NAN, 1, 1.5}},
                 .tier_count = 1,
                 .lift_limit = NAN,
                 .trust = 'N'},
        .conditions = condition,
        .condition_count = condition ? 1 : 0,
    };

    for (int kind = 0; kind < SL_KIND_COUNT; kind++)
        summary.sums[kind] = (struct sl_file_sum){.file = files[kind],
                                                  .present = true,
                                                  .read = 1240 + kind,
                                                  .kept = 1231 + kind,
                                                  .rejected = 6,
                                                  .out_of_scope = 3};
    return summary;
}

#endif
