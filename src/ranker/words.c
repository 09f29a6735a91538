#include "ranker/words.h"

#include <math.h>
#include <stdbool.h>

#include "ranker/digits.h"
#include "ranker/takers.h"

#define MOST_TERMS_NAMED 3

/* What the sentences are about. */
struct telling {
    const struct sl_pump_row *row;
    const struct sl_case *told;
    enum sl_unit_system units;
    struct sl_text *text;
};

enum sl_corner sl_words_corner(const struct sl_pump_row *row)
{
    if (isfinite(row->cases[SL_TYPICAL].surplus))
        return SL_TYPICAL;
    if (isfinite(row->cases[SL_FAVOURABLE].surplus))
        return SL_FAVOURABLE;
    return SL_TYPICAL;
}

static struct telling telling_of(const struct sl_pump_row *row,
                                 enum sl_unit_system units,
                                 struct sl_text *text)
{
    return (struct telling){row, &row->cases[sl_words_corner(row)], units,
                            text};
}

static void say(const struct telling *telling, const char *words)
{
    sl_text_add_string(telling->text, words);
}

static void say_quantity(const struct telling *telling,
                         enum sl_quantity quantity, double si, int decimals)
{
    if (!isfinite(si)) {
        say(telling, "an unknown amount");
        return;
    }
    sl_digits_add(telling->text, &sl_digits_plain,
                  sl_shown(quantity, telling->units, si), decimals);
    say(telling, " ");
    say(telling, sl_unit_shown(quantity, telling->units)->label);
}

static void say_head(const struct telling *telling, double head)
{
    say_quantity(telling, SL_LENGTH, head, 1);
}

static void say_flow(const struct telling *telling)
{
    double flow = sl_shown(SL_FLOW, telling->units, telling->told->flow);

    if (isfinite(flow))
        say_quantity(telling, SL_FLOW, telling->told->flow,
                     fabs(flow) < 10 ? 1 : 0);
    else
        say(telling, "an unknown flow");
}

/* "lowest pressure is worth 21.0 m at a gauge 1.2 m above the eye" */
static void say_main(const struct telling *telling)
{
    const struct sl_terms *terms = &telling->told->terms;

    say(telling, " is worth ");
    say_head(telling, terms->gauge);
    say(telling, " at a gauge ");
    if (fabs(terms->elevation) < SL_LEAST_HEAD) {
        say(telling, "level with the eye");
        return;
    }
    say_head(telling, fabs(terms->elevation));
    say(telling, terms->elevation < 0 ? " below the eye" : " above the eye");
}

/* "low-level cut-out leaves 2.1 m over the eye" */
static void say_level(const struct telling *telling)
{
    double over = telling->told->terms.elevation;

    if (fabs(over) < SL_LEAST_HEAD) {
        say(telling, " leaves the water level with the eye");
    } else if (over < 0) {
        say(telling, " puts the water ");
        say_head(telling, -over);
        say(telling, " below the eye");
    } else {
        say(telling, " leaves ");
        say_head(telling, over);
        say(telling, " over the eye");
    }
}

static void say_source(const struct telling *telling)
{
    const struct sl_terms *terms = &telling->told->terms;

    if (telling->row->source_basis == SL_SOURCE_UNKNOWN)
        say(telling, "the source");
    else
        say(telling, sl_source_basis_name(telling->row->source_basis));
    if (sl_is_pressure_basis(telling->row->source_basis)) {
        say_main(telling);
        return;
    }
    say_level(telling);
    if (terms->gauge >= SL_LEAST_HEAD) {
        say(telling, "; gauge pressure adds ");
        say_head(telling, terms->gauge);
    }
}

static void say_warm_water(const struct telling *telling)
{
    say(telling, "warm water");
    if (isfinite(telling->row->temperature)) {
        say(telling, " (");
        say_quantity(telling, SL_TEMPERATURE, telling->row->temperature, 0);
        say(telling, ")");
    }
}

static void say_air(const struct telling *telling)
{
    say(telling, "air at ");
    say_quantity(telling, SL_LENGTH, telling->row->altitude, 0);
}

/* The term's name and its verb. */
static void say_taker_name(const struct telling *telling, enum sl_taker_id id)
{
    static const char *const names[SL_TAKER_COUNT] = {
        [SL_TAKES_LOSSES] = "suction losses",
        [SL_TAKES_GAS] = "the gas allowance",
        [SL_TAKES_BAROMETER] = "a storm barometer",
        [SL_TAKES_VACUUM] = "the vacuum over the water",
    };

    if (id == SL_TAKES_VAPOUR)
        say_warm_water(telling);
    else if (id == SL_TAKES_AIR)
        say_air(telling);
    else
        say(telling, names[id]);
}

static void say_taker(const struct telling *telling,
                      const struct sl_taker *taker)
{
    say_taker_name(telling, taker->id);
    if (taker->id == SL_TAKES_AIR) {
        say(telling, " is worth only ");
        say_head(telling, telling->told->terms.atmosphere);
    } else {
        say(telling, taker->id == SL_TAKES_LOSSES ? " take " : " takes ");
        say_head(telling, taker->head);
    }
}

static void say_takers(const struct telling *telling)
{
    struct sl_taker takers[SL_TAKER_COUNT];
    size_t count = sl_takers_find(telling->row, &telling->told->terms, takers);

    for (size_t i = 0; i < count && i < MOST_TERMS_NAMED; i++) {
        say(telling, "; ");
        say_taker(telling, &takers[i]);
    }
}

/* Where no curve has it; nothing where one does, or that was not kept. */
static const char *need_basis(enum sl_npshr_basis basis)
{
    if (basis == SL_NPSHR_ESTIMATE)
        return " (estimated)";
    return basis == SL_NPSHR_RATED ? " (rated point)" : "";
}

/* "NPSHR 4.1 m (estimated) at 95 L/s (rated flow)" */
static void say_need(const struct telling *telling)
{
    if (isfinite(telling->told->npshr)) {
        say(telling, "NPSHR ");
        say_head(telling, telling->told->npshr);
        say(telling, need_basis(telling->row->npshr_basis));
    } else {
        say(telling, "NPSHR unknown");
    }
    say(telling, " at ");
    say_flow(telling);
    if (telling->row->flow_basis == SL_FLOW_RATED)
        say(telling, " (rated flow)");
    if (telling->row->flow_basis == SL_FLOW_RECORDED)
        say(telling, " (largest recorded flow)");
    if (telling->row->off_curve)
        say(telling, ", past an end of its curve");
}

static bool is_proven(const struct sl_pump_row *row)
{
    return row->state != SL_UNPROVEN;
}

static bool has_pump(const struct sl_pump_row *row)
{
    return row->pump_id && row->pump_id[0] != '\0';
}

/* What comes before the balance; false when there is nothing to say. */
static bool say_opening(const struct telling *telling)
{
    const struct sl_pump_row *row = telling->row;

    if (!is_proven(row) && row->reason && row->reason[0] != '\0')
        say(telling, row->reason);
    else if (!has_pump(row))
        say(telling, "no pump of this station is on record");
    else if (row->stands)
        say(telling, "its curve cannot reach the discharge head");
    else
        return false;
    return true;
}

void sl_words_why(const struct sl_pump_row *row, enum sl_unit_system units,
                  struct sl_text *text)
{
    struct telling telling = telling_of(row, units, text);
    bool opened = say_opening(&telling);

    if (!has_pump(row))
        return;
    if (isfinite(telling.told->terms.npsha)) {
        say(&telling, opened ? "; " : "");
        say_source(&telling);
        say_takers(&telling);
        opened = true;
    }
    /* An evaluator's reason has already told of a need that is unknown. */
    if (is_proven(row) || isfinite(telling.told->npshr) || !opened) {
        say(&telling, opened ? "; " : "");
        say_need(&telling);
    }
}

/* The taker that weighs most, a source below the eye among them. */
static bool find_leading(const struct telling *telling,
                         struct sl_taker *leading)
{
    struct sl_taker takers[SL_TAKER_COUNT];
    size_t count = sl_takers_find(telling->row, &telling->told->terms, takers);

    if (count > 0)
        *leading = takers[0];
    return count > 0;
}

static bool level_leads(const struct telling *telling,
                        const struct sl_taker *leading)
{
    double below = -telling->told->terms.elevation;

    return below >= SL_LEAST_HEAD && (!leading || below >= leading->head);
}

void sl_words_leading_term(const struct sl_pump_row *row,
                           enum sl_unit_system units, struct sl_text *text)
{
    struct telling telling = telling_of(row, units, text);
    struct sl_taker leading;
    bool found;

    if (!isfinite(telling.told->terms.npsha))
        return;
    found = find_leading(&telling, &leading);
    if (level_leads(&telling, found ? &leading : NULL)) {
        say(&telling, "lift to the eye ");
        say_head(&telling, -telling.told->terms.elevation);
    } else if (found) {
        say_taker_name(&telling, leading.id);
        say(&telling, leading.id == SL_TAKES_AIR ? ", less by " : " ");
        say_head(&telling, leading.head);
    } else {
        say(&telling, "the pump's own need");
    }
}

static const char *step_for(enum sl_taker_id id)
{
    static const char *const steps[SL_TAKER_COUNT] = {
        [SL_TAKES_LOSSES] = "confirm the suction pipes and fittings on site; "
                            "then look into their losses and into how many "
                            "pumps run together",
        [SL_TAKES_AIR] = "measure the suction pressure at the flow it runs at; "
                         "then look into running it at less flow",
        [SL_TAKES_VAPOUR] = "record the water temperature in the hottest week; "
                            "then look into a higher low-level cut-out for it",
        [SL_TAKES_GAS] = "confirm how much gas the water carries; then look "
                         "into a higher low-level cut-out",
        [SL_TAKES_BAROMETER] = "record the lowest barometer on site; then look "
                               "into a higher low-level cut-out",
        [SL_TAKES_VACUUM] = "confirm the lowest pressure over the water; then "
                            "look into raising it",
    };

    return steps[id];
}

/* Controls can hold a pit's water higher; no control holds a river. */
static const char *step_for_level(enum sl_source_basis basis)
{
    if (basis == SL_SOURCE_CUT_OUT)
        return "confirm the eye's elevation and the lowest source level on "
               "site; then look into a higher low-level cut-out";
    return "confirm the eye's elevation and the lowest source level on site; "
           "then look into stopping at a higher level, or less flow at low "
           "water";
}

static void say_step_at_risk(const struct telling *telling)
{
    struct sl_taker leading;
    bool found =
        isfinite(telling->told->terms.npsha) && find_leading(telling, &leading);

    if (level_leads(telling, found ? &leading : NULL))
        say(telling, step_for_level(telling->row->source_basis));
    else if (found)
        say(telling, step_for(leading.id));
    else
        say(telling, "ask the maker for NPSHR at the flow it runs at; then "
                     "look into running it at less flow");
}

void sl_words_next_step(const struct sl_pump_row *row, struct sl_text *text)
{
    struct telling telling = telling_of(row, SL_SI, text);

    if (row->state == SL_CLEAR) {
        say(&telling, "nothing under these conditions");
    } else if (is_proven(row)) {
        say_step_at_risk(&telling);
    } else if (row->leading_unknown && row->leading_unknown[0] != '\0') {
        say(&telling, "find out ");
        say(&telling, sl_words_column(row->leading_unknown));
    } else if (!has_pump(row)) {
        say(&telling, "add its pumps to the inventory");
    } else {
        say(&telling, "mend the records that were rejected (findings.csv), "
                      "then audit again");
    }
}

void sl_words_confidence(const struct sl_pump_row *row, struct sl_text *text)
{
    if (row->assumed > 0)
        sl_text_addf(text, "%d assumed", row->assumed);
    if (row->assumed > 0 && row->unknown > 0)
        sl_text_add_string(text, ", ");
    if (row->unknown > 0)
        sl_text_addf(text, "%d unknown", row->unknown);
    if (row->assumed <= 0 && row->unknown <= 0)
        sl_text_add_string(text, has_pump(row) ? "nothing assumed" : "no pump");
}

void sl_words_case(const struct sl_pump_row *row, struct sl_text *text)
{
    if (!has_pump(row)) {
        sl_text_add_string(text, "no pump");
        return;
    }
    sl_text_add_string(text, row->condition ? row->condition : "");
    if (row->running_set && row->running_set[0] != '\0') {
        sl_text_add_string(text, ", ");
        sl_words_set(row, text);
    }
    sl_text_addf(text, ", %s flow, ", sl_flow_basis_name(row->flow_basis));
    if (row->source_basis == SL_SOURCE_UNKNOWN)
        sl_text_add_string(text, "source unknown");
    else
        sl_text_add_string(text, sl_source_basis_name(row->source_basis));
    if (row->sets_tried > 0 && !row->sets_all) {
        sl_text_add_string(text, "; ");
        sl_words_sets_tried(row, text);
    }
}
