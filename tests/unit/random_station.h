/* Stations made at random from a seed: one to five pumps, alike or not, on
 * suctions of their own or on a tree, with curves of all kinds, and whatever
 * an inventory may lack forgotten.  And a point of one: the same station with
 * each unknown on record at a value within its interval.
 * Include after the headers cmocka.h asks for, and cmocka.h. */
#ifndef SL_TESTS_RANDOM_STATION_H
#define SL_TESTS_RANDOM_STATION_H

#include <stdint.h>
#include <string.h>

#include "evaluator/govern.h"
#include "unit/evaluator_fixture.h"

enum { PUMPS_MOST = 5, PIPES_MOST = 7, HEADER = 5, TRUNK = 6 };
enum { CURVE_POINTS = 6, RULES = 3, MORE_DEFAULTS = 2 };
enum { SOURCE = -1, NOWHERE = -2 };

/* Holds no pointer into itself that random_wire() does not set. */
struct random_station {
    struct sl_tables tables;
    struct sl_margin_rule rules[RULES];
    struct sl_default defaults[COUNT(defaults) + MORE_DEFAULTS];
    struct sl_fitting_k fitting_k[COUNT(fitting_k)];
    struct sl_ageing ageing[2];
    struct sl_condition condition;
    struct sl_dossier dossier;
    struct sl_dossier_pump pumps[PUMPS_MOST];
    struct sl_dossier_pipe pipes[PIPES_MOST];
    struct sl_fitting fittings[PIPES_MOST];
    struct sl_curve_point points[PUMPS_MOST][CURVE_POINTS];
    struct sl_curve curves[PUMPS_MOST];
    int suction[PUMPS_MOST]; /* a pipe, or NOWHERE */
    int curve[PUMPS_MOST];
    int from[PIPES_MOST]; /* a pipe, or SOURCE */
    struct sl_arena arena;
};

/* xorshift64* (Vigna 2016, ACM Trans. Math. Softw. 42, 30), in [0, 1). */
static inline double random_part(uint64_t *seed)
{
    *seed ^= *seed >> 12;
    *seed ^= *seed << 25;
    *seed ^= *seed >> 27;
    return (double)((*seed * 2685821657736338717u) >> 11) / 9007199254740992.0;
}

static inline double between(uint64_t *seed, double low, double high)
{
    return low + (high - low) * random_part(seed);
}

static inline int one_of(uint64_t *seed, int count)
{
    return (int)(random_part(seed) * count);
}

static inline bool chance(uint64_t *seed, double part)
{
    return random_part(seed) < part;
}

static inline void forget_some(uint64_t *seed, double part,
                               struct sl_number *number)
{
    if (chance(seed, part))
        forget(number);
}

static inline void random_wire(struct random_station *s)
{
    s->tables.defaults = s->defaults;
    s->tables.fittings = s->fitting_k;
    s->tables.ageing = s->ageing;
    s->tables.conditions = &s->condition;
    s->tables.rules = s->rules;
    s->dossier.pumps = s->pumps;
    s->dossier.pipes = s->pipes;
    for (int i = 0; i < PUMPS_MOST; i++) {
        s->curves[i].points = s->points[i];
        s->pumps[i].curve = s->curve[i] < 0 ? NULL : &s->curves[s->curve[i]];
        s->pumps[i].suction =
            s->suction[i] < 0 ? NULL : &s->pipes[s->suction[i]];
    }
    for (int i = 0; i < PIPES_MOST; i++) {
        s->pipes[i].fittings = &s->fittings[i];
        s->pipes[i].draws_from = s->from[i] < 0 ? NULL : &s->pipes[s->from[i]];
    }
}

static inline void random_tables(struct random_station *s, uint64_t *seed)
{
    static const struct sl_default more[MORE_DEFAULTS] = {
        {"pipe_age", "", {30, 60, 10}, SL_PURE, "", 'P'},
        {"suction_specific_speed", "", {8500, 8500, 8500}, SL_PURE, "", 'N'},
    };
    static const struct sl_ageing ageing[2] = {
        {"coated steel", 0, {0.00002, 0.00008, 0.000005}, "test", 'S'},
        {"uncoated cast iron", 0, {0.00004, 0.00015, 0.00001}, "test", 'S'},
    };
    const struct sl_margin_rule rules[RULES] = {
        {"floor", 0, SL_MEASURE_NONE, {{NAN, 1, 1.5}}, 1, NAN, "", "", 'N'},
        {"ratio", 0, SL_MEASURE_NONE, {{NAN, 1.35, 1.0}}, 1, NAN, "", "", 'N'},
        {"by lift",
         0,
         SL_MEASURE_SUCTION_LIFT,
         {{NAN, 1.1, 0.6}, {0, 1.3, 0.9}},
         2,
         chance(seed, 0.5) ? 7.0 : NAN,
         "",
         "",
         'N'},
    };

    memcpy(s->defaults, defaults, sizeof defaults);
    memcpy(s->defaults + COUNT(defaults), more, sizeof more);
    memcpy(s->fitting_k, fitting_k, sizeof fitting_k);
    memcpy(s->ageing, ageing, sizeof ageing);
    memcpy(s->rules, rules, sizeof rules);
    s->tables = (struct sl_tables){.fitting_count = COUNT(fitting_k),
                                   .roughness = roughness,
                                   .roughness_count = COUNT(roughness),
                                   .default_count = COUNT(s->defaults),
                                   .rule_count = RULES,
                                   .condition_count = 1,
                                   .ageing_count = COUNT(ageing),
                                   .year = 2026,
                                   .vocabularies = sl_fixed_vocabularies()};
    s->condition = (struct sl_condition){
        .condition = "case",
        .level = (enum sl_level_basis)one_of(seed, 4),
        .discharge = (enum sl_level_basis)one_of(seed, 2),
        .pressure = (enum sl_level_basis)one_of(seed, 2),
        .summer_temperature = chance(seed, 0.6),
        .storm_barometer = chance(seed, 0.6),
        .suction_friction = (enum sl_friction_state)one_of(seed, 2),
        .discharge_friction = (enum sl_friction_state)one_of(seed, 2)};
    if (chance(seed, 0.3))
        s->condition.level_addition = between(seed, -0.7, 0.4);
    if (chance(seed, 0.3))
        s->condition.temperature_addition = between(seed, 0, 3);
}

/* What a station is made to: of one pump at best efficiency. */
struct random_size {
    double flow, head, npshr;
    bool low_lift;
};

/* Head at a part of the flow of best efficiency, of that head. */
static inline double head_shape(double part, double fall)
{
    return 1 + fall * (1 - part * part);
}

static inline void random_curve(struct random_station *s, uint64_t *seed, int c,
                                const struct random_size *size)
{
    static const double parts[CURVE_POINTS] = {0.0, 0.3, 0.6, 0.9, 1.15, 1.4};
    double fall =
        size->low_lift ? between(seed, 0.04, 0.3) : between(seed, 0.15, 0.6);
    double flow = size->flow * (c ? between(seed, 0.5, 1.5) : 1);
    double head = size->head * (c ? between(seed, 0.92, 1.15) : 1);
    double npshr = size->npshr * between(seed, 0.7, 1.4);
    double power = size->low_lift ? between(seed, 2, 4) : between(seed, 1.4, 3);
    double dip = chance(seed, 0.3) ? between(seed, 0.1, 0.8) : 0;
    double hump = chance(seed, 0.1) ? between(seed, 0, 0.12) : 0;
    int first = chance(seed, 0.6) ? 0 : 1;

    for (int i = first; i < CURVE_POINTS; i++) {
        double part = parts[i] * (i ? between(seed, 0.95, 1.05) : 1);
        double low = fmax(0.75 - part, 0);

        s->points[c][i - first] = (struct sl_curve_point){
            .line = 51 + i,
            .flow = known(flow * part),
            .head = known(head * (head_shape(part, fall) - hump * low)),
            .npshr =
                known(npshr * (0.35 + 0.65 * pow(part, power) + dip * low)),
            .speed = unknown()};
    }
    s->curves[c] = (struct sl_curve){
        .curve_id = "C", .point_count = (size_t)(CURVE_POINTS - first)};
}

static inline void random_pipe(struct random_station *s, uint64_t *seed, int i,
                               double flow)
{
    struct sl_pipe *pipe = &s->pipes[i].record;
    double velocity = between(seed, 0.7, 3.2);

    *pipe = complete_pipe("S");
    pipe->length = known(chance(seed, 0.1) ? between(seed, 60, 600)
                                           : between(seed, 1.5, 60));
    pipe->bore = known(sqrt(4 * flow / (3.14159 * velocity)));
    pipe->roughness = known(between(seed, 0.00001, 0.0021));
    pipe->material = one_of(seed, 3);
    pipe->condition = one_of(seed, 4);
    pipe->year_installed = known(1930 + one_of(seed, 95));
    s->fittings[i] = (struct sl_fitting){41, "S", 1 + one_of(seed, 3),
                                         known(1 + one_of(seed, 3)),
                                         known(between(seed, 0.05, 1.7))};
    s->pipes[i].fitting_count = i < PUMPS_MOST || chance(seed, 0.5);
    if (chance(seed, 0.06)) {
        forget(&pipe->roughness);
        pipe->hazen_williams_c = known(between(seed, 80, 140));
    }
}

static inline void random_suctions(struct random_station *s, uint64_t *seed,
                                   const struct random_size *size)
{
    double shared = chance(seed, 0.45) ? 0 : between(seed, 0.3, 1);
    bool alike = chance(seed, 0.4);

    random_pipe(s, seed, HEADER, size->flow * between(seed, 1, 3));
    random_pipe(s, seed, TRUNK, size->flow * between(seed, 1.5, 4));
    s->from[TRUNK] = SOURCE;
    s->from[HEADER] = chance(seed, 0.4) ? TRUNK : SOURCE;
    for (int i = 0; i < PUMPS_MOST; i++) {
        random_pipe(s, seed, i, size->flow);
        if (i && alike) {
            s->pipes[i] = s->pipes[0];
            s->fittings[i] = s->fittings[0];
        }
        s->suction[i] = i;
        s->from[i] = SOURCE;
        if (!chance(seed, shared))
            continue;
        s->from[i] = chance(seed, 0.8) ? HEADER : TRUNK;
        if (chance(seed, 0.15))
            s->suction[i] = HEADER;
    }
}

static inline void random_source(struct random_station *s, uint64_t *seed,
                                 const struct random_size *size)
{
    struct sl_station *station = &s->dossier.record;
    double level = between(seed, 90, 110);
    double weight = 9790, altitude;

    altitude = between(seed, -20, 1800);
    station->service = 1 + one_of(seed, 6);
    station->installation = one_of(seed, 3);
    station->source_kind = SL_OPEN;
    station->site_elevation = known(altitude);
    station->cut_out_level = known(level);
    station->record_low_level = known(level + between(seed, -0.9, 0.4));
    station->normal_level = known(level + between(seed, 0.3, 2.1));
    station->water_temp_normal = known(between(seed, 277, 292));
    station->water_temp_summer =
        known(station->water_temp_normal.value + between(seed, 1, 14));
    station->barometer_low =
        known(sl_standard_atmosphere(altitude) * between(seed, 0.96, 1.0));
    if (chance(seed, 0.25))
        station->source_kind = chance(seed, 0.6) ? SL_MAIN : SL_CLOSED;
    if (station->source_kind != SL_OPEN) {
        station->source_pressure_low = known(between(seed, -20000, 60000));
        station->source_pressure_normal = known(
            station->source_pressure_low.value + between(seed, 5000, 90000));
        station->source_pressure_elevation = known(level);
        level += station->source_pressure_low.value / weight;
    }
    for (int i = 0; i < PUMPS_MOST; i++)
        s->pumps[i].record.datum_elevation =
            known(level - size->npshr - between(seed, 0, 5) +
                  sl_standard_atmosphere(altitude) / weight);
}

static inline void random_discharge(struct random_station *s, uint64_t *seed,
                                    const struct random_size *size)
{
    struct sl_station *station = &s->dossier.record;
    double loss = size->head * between(seed, 0.02, 0.5);
    double source = station->cut_out_level.value;

    if (station->source_kind != SL_OPEN)
        source += station->source_pressure_low.value / 9790;
    station->discharge_low = known(source + size->head - loss -
                                   size->head * between(seed, -0.12, 0.15));
    station->discharge_normal = known(station->discharge_low.value +
                                      size->head * between(seed, 0.01, 0.12));
    station->discharge_loss_flow =
        known(size->flow * between(seed, 0.8, (double)s->dossier.pump_count));
    station->discharge_loss_head = known(loss);
}

static inline void random_pumps(struct random_station *s, uint64_t *seed,
                                const struct random_size *size)
{
    static const char *const names[PUMPS_MOST] = {"A", "B", "C", "D", "E"};
    int alike = one_of(seed, 3); /* all, some, none */

    for (int i = 0; i < PUMPS_MOST; i++) {
        struct sl_pump *pump = &s->pumps[i].record;
        double datum = pump->datum_elevation.value;

        random_curve(s, seed, i, size);
        *pump = complete_pump(names[i]);
        pump->datum_elevation = known(
            i && alike == 0 ? s->pumps[0].record.datum_elevation.value : datum);
        pump->make_up = 1 + one_of(seed, 4);
        if (i && alike == 0)
            pump->make_up = s->pumps[0].record.make_up;
        s->curve[i] = alike == 0 ? 0 : alike == 1 ? one_of(seed, i + 1) : i;
        if (chance(seed, 0.08))
            pump->max_speed = known(1478 * between(seed, 0.85, 1.1));
    }
}

static inline void random_complete(struct random_station *s, uint64_t *seed)
{
    struct random_size size;

    memset(s, 0, sizeof *s);
    random_tables(s, seed);
    size.low_lift = chance(seed, 0.35);
    size.flow = pow(10, between(seed, -2, -0.2));
    size.head = size.low_lift ? between(seed, 2.5, 9) : between(seed, 10, 70);
    size.npshr = between(seed, 1.5, 7);
    s->dossier = (struct sl_dossier){.station = 1,
                                     .record = complete_station(),
                                     .pump_count = 1,
                                     .pipe_count = PIPES_MOST};
    if (chance(seed, 0.65))
        s->dossier.pump_count +=
            (size_t)one_of(seed, chance(seed, 0.2) ? PUMPS_MOST : 3);
    random_source(s, seed, &size);
    random_discharge(s, seed, &size);
    random_pumps(s, seed, &size);
    random_suctions(s, seed, &size);
    s->dossier.record.pumps_running_max =
        known(1 + one_of(seed, (int)s->dossier.pump_count));
    random_wire(s);
}

/* --- what is forgotten ---------------------------------------------------- */

static inline void forget_of_station(struct random_station *s, uint64_t *seed)
{
    struct sl_station *station = &s->dossier.record;

    forget_some(seed, 0.3, &station->water_temp_summer);
    forget_some(seed, 0.3, &station->water_temp_normal);
    forget_some(seed, 0.3, &station->barometer_low);
    forget_some(seed, 0.3, &station->pumps_running_max);
    forget_some(seed, 0.07, &station->site_elevation);
    forget_some(seed, 0.1, &station->cut_out_level);
    forget_some(seed, 0.1, &station->record_low_level);
    forget_some(seed, 0.1, &station->normal_level);
    forget_some(seed, 0.08, &station->discharge_low);
    forget_some(seed, 0.08, &station->discharge_normal);
    if (station->source_kind != SL_OPEN) {
        forget_some(seed, 0.15, &station->source_pressure_low);
        forget_some(seed, 0.15, &station->source_pressure_normal);
    }
    if (chance(seed, 0.3))
        station->service = 0;
    if (!chance(seed, 0.5))
        return;
    station->discharge_length = known(between(seed, 20, 2500));
    station->discharge_bore = known(sqrt(station->discharge_loss_flow.value) *
                                    between(seed, 0.8, 1.6));
    forget(&station->discharge_loss_head);
    station->discharge_material = one_of(seed, 3);
    station->discharge_year = known(1990);
    forget_some(seed, 0.5, &station->discharge_year);
    if (chance(seed, 0.3))
        station->discharge_minor_k = known(between(seed, 0, 12));
}

static inline void forget_of_pumps(struct random_station *s, uint64_t *seed)
{
    for (size_t i = 0; i < s->dossier.pump_count; i++) {
        struct sl_pump *pump = &s->pumps[i].record;

        if (chance(seed, 0.1)) {
            s->suction[i] = NOWHERE;
            pump->make_up =
                chance(seed, 0.7) ? SL_SUBMERSIBLE : SL_VERTICAL_TURBINE;
            if (chance(seed, 0.7))
                s->dossier.record.installation = SL_WET_PIT;
            if (chance(seed, 0.5))
                pump->inlet_diameter = known(s->pipes[i].record.bore.value);
        }
        if (chance(seed, 0.03))
            s->curve[i] = -1;
        if (s->curve[i] < 0) {
            pump->rated_flow = s->points[i][2].flow;
            pump->rated_npshr = s->points[i][2].npshr;
        }
    }
}

static inline void forget_of_pipes(struct random_station *s, uint64_t *seed)
{
    bool most = chance(seed, 0.5);

    for (int i = 0; i < PIPES_MOST; i++) {
        struct sl_pipe *pipe = &s->pipes[i].record;

        forget_some(seed, most ? 0.8 : 0.2, &pipe->roughness);
        forget_some(seed, 0.5, &pipe->year_installed);
        forget_some(seed, 0.03, &pipe->length);
        forget_some(seed, 0.02, &pipe->bore);
        forget_some(seed, most ? 0.6 : 0.2, &s->fittings[i].k);
        if (chance(seed, most ? 0.5 : 0.2))
            s->pipes[i].fitting_count = 0;
    }
}

static inline void random_make(struct random_station *s, uint64_t *seed)
{
    random_complete(s, seed);
    forget_of_station(s, seed);
    forget_of_pumps(s, seed);
    forget_of_pipes(s, seed);
    random_wire(s);
}

/* --- one point ------------------------------------------------------------ */

/* Where in an interval: NaN for anywhere, else 0 adverse to 1 favourable. */
static inline double pick(uint64_t *seed, const struct sl_interval *value,
                          double corner, double reach)
{
    double adverse = value->adverse, favourable = value->favourable;
    double part =
        isnan(corner) ? random_part(seed) : corner > random_part(seed);

    if (isnan(adverse) && isnan(favourable))
        return value->typical;
    if (isnan(adverse))
        adverse = favourable + reach;
    if (isnan(favourable))
        favourable = adverse - reach;
    return adverse + part * (favourable - adverse);
}

static inline bool is_open(const struct sl_interval *value)
{
    return !(value->adverse == value->favourable);
}

/* `reach` says how far, and which way, an end that is not known may lie. */
static inline double pick_input(uint64_t *seed, const struct sl_plan *plan,
                                enum sl_input_id id, double corner,
                                double reach)
{
    return pick(seed, &plan->inputs[id].value, corner, reach);
}

static inline void set_default(struct random_station *s, const char *field,
                               double value)
{
    for (size_t i = 0; i < COUNT(s->defaults); i++)
        if (strcmp(s->defaults[i].field, field) == 0)
            s->defaults[i].value = (struct sl_interval){value, value, value};
}

static inline void point_of_source(struct random_station *s, uint64_t *seed,
                                   const struct sl_plan *plan, double corner)
{
    struct sl_station *station = &s->dossier.record;
    const struct sl_input *inputs = plan->inputs;

    station->water_temp_summer = station->water_temp_normal =
        known(pick_input(seed, plan, SL_IN_TEMPERATURE, corner, 0) -
              s->condition.temperature_addition);
    if (inputs[SL_IN_SITE_ELEVATION].applies &&
        is_open(&inputs[SL_IN_SITE_ELEVATION].value))
        station->site_elevation =
            known(pick_input(seed, plan, SL_IN_SITE_ELEVATION, corner, 1500));
    if (inputs[SL_IN_SOURCE_LEVEL].applies &&
        is_open(&inputs[SL_IN_SOURCE_LEVEL].value)) {
        double level =
            pick_input(seed, plan, SL_IN_SOURCE_LEVEL, corner, -2.5) -
            s->condition.level_addition;

        station->cut_out_level = station->record_low_level =
            station->normal_level = known(level);
        if (isnan(level))
            forget(&station->cut_out_level), forget(&station->record_low_level),
                forget(&station->normal_level);
    }
    if (inputs[SL_IN_SOURCE_PRESSURE].applies &&
        is_open(&inputs[SL_IN_SOURCE_PRESSURE].value) &&
        !isnan(inputs[SL_IN_SOURCE_PRESSURE].value.typical))
        station->source_pressure_low = station->source_pressure_normal = known(
            pick_input(seed, plan, SL_IN_SOURCE_PRESSURE, corner, -30000));
    if (inputs[SL_IN_GAS].applies)
        set_default(s, "gas_allowance",
                    pick_input(seed, plan, SL_IN_GAS, corner, 0));
    if (inputs[SL_IN_BAROMETER].applies &&
        is_open(&inputs[SL_IN_BAROMETER].value))
        set_default(s, "barometer_fall",
                    pick_input(seed, plan, SL_IN_BAROMETER, corner, 0));
}

static inline void point_of_discharge(struct random_station *s, uint64_t *seed,
                                      const struct sl_plan *plan, double corner)
{
    struct sl_station *station = &s->dossier.record;

    if (plan->flow_basis != SL_FLOW_SOLVED)
        return;
    if (is_open(&plan->inputs[SL_IN_DISCHARGE_LEVEL].value))
        station->discharge_low = station->discharge_normal =
            known(pick_input(seed, plan, SL_IN_DISCHARGE_LEVEL, corner, -4));
    if (!isnan(plan->delivery.loss_flow))
        return;
    station->discharge_minor_k =
        known(pick(seed, &plan->delivery.minor_k, corner, 0));
    station->discharge_material = 0;
    set_default(s, "discharge_roughness",
                pick(seed, &plan->delivery.roughness, corner, 0));
}

static inline void point_of_pipe(struct random_station *s, uint64_t *seed,
                                 const struct sl_path_pipe *place, int i,
                                 double corner)
{
    struct sl_pipe *pipe = &s->pipes[i].record;

    if (!place->hazen_williams)
        pipe->roughness = known(pick(seed, &place->roughness, corner, 0));
    s->pipes[i].fitting_count = 1;
    s->fittings[i].k = known(pick(seed, &place->minor_k, corner, 0));
    s->fittings[i].count = known(1);
    if (!pipe->length.known)
        pipe->length = known(between(seed, 0, 40));
    if (!pipe->bore.known)
        pipe->bore = known(suction_bore * between(seed, 0.7, 2));
}

/* The corner of each pipe is drawn for itself. */
static inline void random_point(const struct random_station *s, uint64_t *seed,
                                const struct sl_layout *layout, bool at_corners,
                                struct random_station *point)
{
    bool done[PIPES_MOST] = {false};
    double lean = at_corners ? random_part(seed) : NAN;

    *point = *s;
    point->arena = (struct sl_arena){0};
    point_of_source(point, seed, &layout->plans[0], lean);
    for (size_t p = 0; p < layout->pump_count; p++) {
        const struct sl_plan *plan = &layout->plans[p];

        if (p == 0 || plan->flow_basis == SL_FLOW_SOLVED)
            point_of_discharge(point, seed, plan, lean);
        if (plan->unmeasured == SL_IN_SUCTION_PIPING)
            set_default(point, "suction_loss", between(seed, 0, 1.5));
        for (size_t i = 0; i < plan->path_count; i++) {
            int pipe = (int)(plan->path[i].pipe - s->pipes);

            if (!done[pipe])
                point_of_pipe(point, seed, &plan->path[i], pipe, lean);
            done[pipe] = true;
        }
    }
    if (at_corners)
        lean = chance(seed, 0.5);
    set_default(point, "wet_pit_inlet_loss",
                pick(seed, &(struct sl_interval){0.02, 0.1, 0}, lean, 0));
    point->fitting_k[0].k.typical = pick(seed, &fitting_k[0].k, lean, 0);
    point->fitting_k[0].k.adverse = point->fitting_k[0].k.favourable =
        point->fitting_k[0].k.typical;
    if (!s->dossier.record.pumps_running_max.known)
        point->dossier.record.pumps_running_max =
            known(1 + one_of(seed, (int)s->dossier.pump_count));
    random_wire(point);
}

#endif
