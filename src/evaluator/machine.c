/* The machine of a plan: its speed, its curves at that speed, its NPSHR, and
 * what these tell of how it behaves. */
#include <math.h>

#include "evaluator/plan.h"
#include "hydraulics/affinity.h"
#include "hydraulics/specific_speed.h"

/* The speed of a curve's test: the first that is recorded. */
static double test_speed(const struct sl_curve *curve)
{
    for (size_t i = 0; curve && i < curve->point_count; i++)
        if (curve->points[i].speed.known)
            return curve->points[i].speed.value;
    return NAN;
}

/* The speeds of its curve's test, of its rated point and the highest it runs
 * at, rpm; each stands in for another that is not recorded. */
struct speeds {
    double test, rated, top;
};

static struct speeds speeds_of(const struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    double rated = sl_recorded(&pump->rated_speed);
    double test = test_speed(plan->pump->curve);
    double top = sl_recorded(&pump->max_speed);

    if (isnan(test))
        test = rated;
    if (isnan(rated))
        rated = test;
    if (isnan(top))
        top = rated;
    return (struct speeds){test, rated, top};
}

static void speed(struct sl_plan *plan, const struct speeds *speeds)
{
    const struct sl_pump *pump = &plan->pump->record;
    struct sl_input *input;

    if (isnan(speeds->top)) {
        plan->inputs[SL_IN_SPEED].rule =
            "no speed is recorded: that of its curve";
        plan->inputs[SL_IN_SPEED].value = sl_no_figure();
        return;
    }
    input = sl_plan_set(
        plan, SL_IN_SPEED, pump->max_speed.known ? SL_RECORDED : SL_DERIVED,
        sl_exactly(speeds->top),
        pump->max_speed.known ? ""
                              : "no higher speed is recorded: a fixed drive");
    input->kind = SL_KIND_PUMP;
    input->line = pump->line;
    if (isnan(speeds->test)) {
        input->provenance = SL_UNKNOWN;
        input->value = (struct sl_interval){speeds->top, NAN, NAN};
        input->rule = "the speed its figures were tested at is not recorded";
    }
}

/* 1 where nothing is known to scale by. */
static double ratio_of(double speed, double test)
{
    return isnan(speed / test) ? 1 : speed / test;
}

static const struct sl_default *npshr_exponent_row(const struct sl_plan *plan,
                                                   double ratio)
{
    return sl_default_find(plan->tables,
                           ratio > 1 ? "npshr_speed_exponent_up"
                                     : "npshr_speed_exponent_down",
                           "");
}

static double npshr_exponent(const struct sl_plan *plan, double ratio)
{
    const struct sl_default *row = npshr_exponent_row(plan, ratio);

    if (ratio == 1)
        return 1; /* any: nothing is scaled */
    return row ? row->value.typical : NAN;
}

enum curve_column { HEAD, NPSHR };

/* The points of a curve that have a head, or an NPSHR, at the speed the
 * pump runs at. */
static struct sl_curve_view view_of(struct sl_plan *plan,
                                    enum curve_column column)
{
    const struct sl_curve *curve = plan->pump->curve;
    double ratio = plan->speed_ratio;
    size_t room = curve ? curve->point_count : 0;
    double *flow = sl_arena_new(plan->arena, room, sizeof *flow);
    double *value = sl_arena_new(plan->arena, room, sizeof *value);
    double exponent = npshr_exponent(plan, ratio);
    size_t count = 0;

    for (size_t i = 0; i < room; i++) {
        const struct sl_curve_point *point = &curve->points[i];
        const struct sl_number *number =
            column == HEAD ? &point->head : &point->npshr;

        if (!number->known)
            continue;
        flow[count] = sl_affinity_flow(point->flow.value, ratio);
        value[count] = column == HEAD
                           ? sl_affinity_head(number->value, ratio)
                           : sl_affinity_npshr(number->value, ratio, exponent);
        count++;
    }
    return (struct sl_curve_view){flow, value, count};
}

static void curves(struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    struct speeds speeds = speeds_of(plan);

    speed(plan, &speeds);
    plan->speed_ratio = ratio_of(speeds.top, speeds.test);
    plan->rated_ratio = ratio_of(speeds.top, speeds.rated);
    plan->head = view_of(plan, HEAD);
    plan->npshr = view_of(plan, NPSHR);
    if (pump->rated_flow.known)
        plan->rated_flow =
            sl_affinity_flow(pump->rated_flow.value, plan->rated_ratio);
    if (pump->rated_npshr.known)
        plan->rated_npshr =
            sl_affinity_npshr(pump->rated_npshr.value, plan->rated_ratio,
                              npshr_exponent(plan, plan->rated_ratio));
}

static long first_npshr_line(const struct sl_curve *curve)
{
    size_t i = 0;

    while (i + 1 < curve->point_count && !curve->points[i].npshr.known)
        i++;
    return curve->points[i].line;
}

/* Eyes by its record; a pump not known to have two is not known to have one
 * where its build allows both. */
static double eyes_of(const struct sl_pump *pump)
{
    if (pump->double_suction)
        return pump->double_suction == SL_YES ? 2 : 1;
    return pump->make_up && pump->make_up != SL_SPLIT_CASE ? 1 : NAN;
}

/* Flow of best efficiency, at the speed the pump runs at. */
static double best_flow(const struct sl_plan *plan)
{
    const struct sl_number *best = &plan->pump->record.bep_flow;

    return best->known ? sl_affinity_flow(best->value, plan->rated_ratio) : NAN;
}

/* An estimate is likely, never a bound (F13). */
static void estimated_npshr(struct sl_plan *plan)
{
    const struct sl_default *row =
        sl_default_find(plan->tables, "suction_specific_speed", "");
    const struct sl_pump *pump = &plan->pump->record;
    double flow = best_flow(plan), eyes = eyes_of(pump), guess = NAN;
    struct sl_input *input;

    if (isnan(flow))
        flow = plan->rated_flow;
    if (isnan(eyes))
        eyes = pump->make_up == SL_SPLIT_CASE ? 2 : 1;
    if (row)
        guess = sl_estimated_npshr(plan->inputs[SL_IN_SPEED].value.typical,
                                   flow / eyes, row->value.typical);
    plan->npshr_basis = isnan(guess) ? SL_NPSHR_NONE : SL_NPSHR_ESTIMATE;
    if (isnan(guess)) {
        sl_plan_set(plan, SL_IN_NPSHR, SL_UNKNOWN, sl_no_figure(),
                    "not recorded, and nothing bounds it");
        return;
    }
    input = sl_plan_set(plan, SL_IN_NPSHR, SL_UNKNOWN,
                        (struct sl_interval){guess, NAN, NAN},
                        "not recorded: estimated from the suction specific "
                        "speed that such pumps have, which bounds nothing");
    input->row = row;
}

static void npshr(struct sl_plan *plan)
{
    struct sl_input *input;

    if (sl_curve_usable(&plan->npshr)) {
        input = sl_plan_set(plan, SL_IN_NPSHR, SL_RECORDED, sl_no_figure(),
                            "the maker's curve, at this flow");
        if (plan->speed_ratio != 1) {
            input->rule = "the maker's curve at this flow, brought to its "
                          "highest speed";
            input->row = npshr_exponent_row(plan, plan->speed_ratio);
        }
        input->kind = SL_KIND_CURVE;
        input->line = first_npshr_line(plan->pump->curve);
    } else if (!isnan(plan->rated_npshr)) {
        plan->npshr_basis = SL_NPSHR_RATED;
        input = sl_plan_set(
            plan, SL_IN_NPSHR, SL_DERIVED,
            (struct sl_interval){plan->rated_npshr, NAN, plan->rated_npshr},
            "known at the rated point alone; it rises with the flow");
        input->kind = SL_KIND_PUMP;
        input->line = plan->pump->record.line;
        if (plan->rated_ratio != 1)
            input->row = npshr_exponent_row(plan, plan->rated_ratio);
    } else {
        estimated_npshr(plan);
    }
}

static void miss_rejected_points(struct sl_plan *plan)
{
    struct sl_input *input = &plan->inputs[SL_IN_NPSHR];

    if (!plan->pump->curve || !plan->pump->curve->rejected_points)
        return;
    input->provenance = SL_UNKNOWN;
    input->value.adverse = input->value.favourable = NAN;
    input->rule = "a point of its curve was rejected (see findings.csv); the "
                  "curve without it bounds nothing";
}

/* Samples of a piece of a curve when its slopes are looked at. */
#define SLOPE_SAMPLES 8

/* The most that any rule multiplies NPSHR by. */
static double largest_ratio(const struct sl_tables *tables)
{
    double largest = 1;

    for (size_t i = 0; i < tables->rule_count; i++)
        for (size_t t = 0; t < tables->rules[i].tier_count; t++)
            largest = fmax(largest, tables->rules[i].tiers[t].ratio);
    return largest;
}

static void look_at_slopes(struct sl_plan *plan)
{
    const struct sl_curve_view *npshr = &plan->npshr;
    double ratio = largest_ratio(plan->tables);

    plan->npshr_rises = plan->head_is_steep = true;
    if (!sl_curve_usable(npshr))
        return;
    for (size_t i = 0; i + 1 < npshr->count; i++)
        for (int k = 0; k <= SLOPE_SAMPLES; k++) {
            double flow = npshr->x[i] +
                          (npshr->x[i + 1] - npshr->x[i]) * k / SLOPE_SAMPLES;
            double rise = sl_curve_slope_at(npshr, flow);

            if (rise < 0)
                plan->npshr_rises = false;
            if (-sl_curve_slope_at(&plan->head, flow) < ratio * rise)
                plan->head_is_steep = false;
        }
}

/* The bore of the eye: recorded, or a part of the suction nozzle's. */
static double eye_of(const struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    const struct sl_words *make_ups =
        &plan->tables->vocabularies.of[SL_WORDS_MAKE_UP];
    const struct sl_default *row = sl_default_find(
        plan->tables, "eye_of_nozzle", sl_word(make_ups, pump->make_up));

    if (pump->eye_diameter.known)
        return pump->eye_diameter.value;
    if (!row || !pump->suction_nozzle_bore.known)
        return NAN;
    return pump->suction_nozzle_bore.value * row->value.typical;
}

/* Suction specific speed at best efficiency (F14) and suction energy over
 * the start of high for its build (F15). */
static void suction_traits(struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    const struct sl_words *make_ups =
        &plan->tables->vocabularies.of[SL_WORDS_MAKE_UP];
    double speed = plan->inputs[SL_IN_SPEED].value.typical;
    double flow = best_flow(plan);
    double npshr = sl_curve_at(&plan->npshr, flow);
    double specific;
    const struct sl_check_limit *start;

    plan->suction_specific_speed = plan->suction_energy = NAN;
    if (isnan(npshr) && flow == plan->rated_flow)
        npshr = plan->rated_npshr;
    specific = sl_suction_specific_speed(speed, flow / eyes_of(pump), npshr);
    plan->suction_specific_speed = specific * sl_us_specific_speed_factor();
    start = sl_check_limit_find(plan->tables, "suction energy",
                                sl_word(make_ups, pump->make_up));
    if (start)
        plan->suction_energy =
            sl_suction_energy(eye_of(plan), speed, specific, 1.0) /
            start->highest;
}

/* What the rule ranked on goes by, where that is the pump's own. */
static void rule_measure(struct sl_plan *plan)
{
    const struct sl_margin_rule *rule = plan->rule;
    double measure = rule->measure == SL_MEASURE_SUCTION_ENERGY
                         ? plan->suction_energy
                         : plan->suction_specific_speed;
    double strictest =
        rule->tier_count ? rule->tiers[rule->tier_count - 1].over : NAN;

    if (rule->measure != SL_MEASURE_SUCTION_ENERGY &&
        rule->measure != SL_MEASURE_SUCTION_SPECIFIC_SPEED)
        return;
    if (isnan(measure))
        sl_plan_set(plan, SL_IN_RULE_MEASURE, SL_UNKNOWN,
                    (struct sl_interval){NAN, strictest, 0},
                    "speed, flow of best efficiency, eye or nozzle, and NPSHR "
                    "there do not tell it");
    else
        sl_plan_set(plan, SL_IN_RULE_MEASURE, SL_DERIVED, sl_exactly(measure),
                    "from speed, best efficiency and NPSHR there");
}

void sl_plan_machine(struct sl_plan *plan)
{
    curves(plan);
    npshr(plan);
    miss_rejected_points(plan);
    look_at_slopes(plan);
    suction_traits(plan);
    rule_measure(plan);
}
