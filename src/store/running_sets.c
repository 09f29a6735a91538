#include "store/running_sets.h"

#include <math.h>
#include <string.h>

/* A letter a state, in the order of enum sl_state. */
static const char letters[] = "STUC";

static const struct {
    const char *value, *end;
} limit_columns[SL_LIMIT_COUNT] = {
    [SL_LIMIT_LEVEL] = {"limit_level", "limit_level_end"},
    [SL_LIMIT_TEMPERATURE] = {"limit_temperature", "limit_temperature_end"},
    [SL_LIMIT_FLOW] = {"limit_flow", "limit_flow_end"},
};

static void add_flags(const struct sl_pump_result *pump, struct sl_text *text)
{
    for (int id = 0; id < SL_CHECK_COUNT; id++) {
        if (pump->checks[id].end != SL_CHECK_BEYOND)
            continue;
        if (text->length)
            sl_text_add_string(text, "; ");
        sl_text_add_string(text, sl_check_name((enum sl_check_id)id));
        if (pump->checks[id].trust == 'M')
            sl_text_add_string(text, " (from memory)");
    }
}

static void add_rule_states(const struct sl_pump_result *pump,
                            struct sl_text *text)
{
    for (size_t i = 0; i < pump->rule_count; i++) {
        const struct sl_rule_verdict *verdict = &pump->rules[i];

        sl_text_add(text, verdict->applies ? &letters[verdict->state] : "-", 1);
    }
}

/* A set that is none has no figures either. */
static void bind_one_out(struct sl_statement *statement,
                         const struct sl_set_case *one_out)
{
    bool none = !one_out->words;

    sl_bind_text(statement, "one_out_set", one_out->words);
    sl_bind_number(statement, "one_out_margin",
                   none ? NAN : one_out->figures.margin);
    sl_bind_number(statement, "one_out_surplus",
                   none ? NAN : one_out->figures.surplus);
}

static void bind_limits(struct sl_statement *statement,
                        const struct sl_pump_result *pump)
{
    for (int id = 0; id < SL_LIMIT_COUNT; id++) {
        const struct sl_limit *limit = &pump->limits[id];

        sl_bind_number(statement, limit_columns[id].value,
                       sl_limit_value(limit));
        sl_bind_text(statement, limit_columns[id].end,
                     sl_limit_end_name(limit->end));
    }
}

/* Where no set has a figure at that end, none is the worst of them. */
static const char *adverse_set(const struct sl_pump_result *pump)
{
    return isnan(pump->cases[SL_ADVERSE].surplus) ? NULL : pump->adverse_set;
}

void sl_bind_sets(struct sl_statement *statement,
                  const struct sl_pump_result *pump, struct sl_sets_room *room)
{
    const struct sl_set_case *off = &pump->off_curve_set;

    add_flags(pump, &room->flags);
    add_rule_states(pump, &room->rule_states);
    sl_bind_text(statement, "npshr_basis",
                 sl_npshr_basis_name(pump->npshr_basis));
    sl_bind_text(statement, "running_set", pump->governing.words);
    if (pump->governing.words)
        sl_bind_whole(statement, "running", pump->governing.running);
    sl_bind_whole(statement, "sets_tried", (long long)pump->sets_tried);
    sl_bind_whole(statement, "sets_all", pump->sets_all);
    sl_bind_text(statement, "adverse_set", adverse_set(pump));
    bind_one_out(statement, &pump->one_out);
    sl_bind_text(
        statement, "curve_position",
        sl_curve_position_name(off->words ? off->position : SL_ON_CURVE));
    sl_bind_text(statement, "off_curve_set", off->words);
    sl_bind_text(statement, "stands_set", pump->stands_set);
    sl_bind_whole(statement, "two_crossings",
                  pump->checks[SL_CHECK_TWO_CROSSINGS].end == SL_CHECK_BEYOND);
    sl_bind_text(statement, "flags", sl_text_string(&room->flags));
    sl_bind_text(statement, "rule_states", sl_text_string(&room->rule_states));
    bind_limits(statement, pump);
}

void sl_sets_room_release(struct sl_sets_room *room)
{
    sl_text_release(&room->flags);
    sl_text_release(&room->rule_states);
}

static enum sl_curve_position position_named(const char *word)
{
    int position = SL_PAST_END;

    while (position > SL_ON_CURVE &&
           !sl_same(word,
                    sl_curve_position_name((enum sl_curve_position)position)))
        position--;
    return (enum sl_curve_position)position;
}

static enum sl_npshr_basis basis_named(const char *word)
{
    int basis = SL_NPSHR_CURVE;

    while (basis < SL_NPSHR_NONE &&
           !sl_same(word, sl_npshr_basis_name((enum sl_npshr_basis)basis)))
        basis++;
    return (enum sl_npshr_basis)basis;
}

static struct sl_limit read_limit(struct sl_statement *row, int id)
{
    const char *word = sl_read_text(row, limit_columns[id].end);
    int end = SL_LIMIT_FIGURES_END;

    while (end > SL_LIMIT_UNKNOWN &&
           !sl_same(word, sl_limit_end_name((enum sl_limit_end)end)))
        end--;
    return (struct sl_limit){(enum sl_limit_end)end,
                             sl_read_number(row, limit_columns[id].value)};
}

void sl_read_sets(struct sl_statement *row, struct sl_pump_row *pump)
{
    pump->npshr_basis = basis_named(sl_read_text(row, "npshr_basis"));
    pump->running_set = sl_read_text(row, "running_set");
    pump->running = (int)sl_read_whole(row, "running");
    pump->sets_tried = sl_read_whole(row, "sets_tried");
    pump->sets_all = sl_read_whole(row, "sets_all") != 0;
    pump->adverse_set = sl_read_text(row, "adverse_set");
    pump->one_out_set = sl_read_text(row, "one_out_set");
    pump->one_out_margin = sl_read_number(row, "one_out_margin");
    pump->one_out_surplus = sl_read_number(row, "one_out_surplus");
    pump->curve_position = position_named(sl_read_text(row, "curve_position"));
    pump->off_curve_set = sl_read_text(row, "off_curve_set");
    pump->stands_set = sl_read_text(row, "stands_set");
    pump->two_crossings = sl_read_whole(row, "two_crossings") != 0;
    pump->flags =
        sl_read_null(row, "flags") ? NULL : sl_read_text(row, "flags");
    pump->rule_states = sl_read_text(row, "rule_states");
    for (int id = 0; id < SL_LIMIT_COUNT; id++)
        pump->limits[id] = read_limit(row, id);
}

/* The worst a rule says of the pump; SL_STATE_COUNT where it is about none. */
static enum sl_state worst_by(const struct sl_station_result *result,
                              size_t pump, size_t rule)
{
    enum sl_state worst = SL_STATE_COUNT;

    for (size_t i = 0; i < result->condition_count; i++) {
        const struct sl_pump_result *found = &result->conditions[i].pumps[pump];

        if (rule < found->rule_count && found->rules[rule].applies &&
            found->rules[rule].state < worst)
            worst = found->rules[rule].state;
    }
    return worst;
}

void sl_count_rules(struct sl_store *store,
                    const struct sl_station_result *result, size_t pump)
{
    size_t count = 0;

    if (result->condition_count)
        count = result->conditions[0].pumps[pump].rule_count;
    for (size_t rule = 0; rule < count && rule < SL_RULES_MOST; rule++)
        store->rule_pumps[rule][worst_by(result, pump, rule)]++;
}

static enum sl_status write_counts(struct sl_store *store, size_t rule,
                                   struct sl_error *error)
{
    const long long *counts = store->rule_pumps[rule];
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_COUNT_RULE_PUMPS, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", store->counted_evaluation);
    sl_bind_whole(statement, "place", (long long)rule + 1);
    sl_bind_whole(statement, "pumps_short", counts[SL_SHORT]);
    sl_bind_whole(statement, "pumps_thin", counts[SL_THIN]);
    sl_bind_whole(statement, "pumps_unproven", counts[SL_UNPROVEN]);
    sl_bind_whole(statement, "pumps_clear", counts[SL_CLEAR]);
    sl_bind_whole(statement, "pumps_apart", counts[SL_STATE_COUNT]);
    return sl_statement_run(statement, error);
}

static bool any(const long long counts[SL_STATE_COUNT + 1])
{
    for (int i = 0; i <= SL_STATE_COUNT; i++)
        if (counts[i])
            return true;
    return false;
}

enum sl_status sl_store_write_rule_counts(struct sl_store *store,
                                          struct sl_error *error)
{
    enum sl_status status = SL_OK;

    for (size_t rule = 0; !status && rule < SL_RULES_MOST; rule++)
        if (any(store->rule_pumps[rule]))
            status = write_counts(store, rule, error);
    if (!status)
        memset(store->rule_pumps, 0, sizeof store->rule_pumps);
    return status;
}
