/* The evaluation as a whole. */
#include <math.h>

#include "base/text.h"
#include "store/evaluation.h"
#include "store/rules.h"
#include "store/statement.h"
#include "store/vintage.h"

static enum sl_status read_head(struct sl_store *store, struct sl_arena *arena,
                                struct sl_summary *summary,
                                struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_READ_EVALUATION, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", summary->evaluation);
    status = sl_statement_step(statement, &row, error);
    if (status)
        return status;
    if (!row)
        return sl_error_set(error, SL_BUG, "there is no evaluation %lld",
                            summary->evaluation);
    summary->vintage = sl_read_whole(statement, "vintage");
    summary->year = (int)sl_read_whole(statement, "year");
    summary->label = sl_read_filled(statement, "label", arena);
    summary->inventory_sha256 =
        sl_read_filled(statement, "inventory_sha256", arena);
    summary->rule = (struct sl_margin_rule){
        .rule = sl_read_filled(statement, "rule", arena),
        .lift_limit = NAN,
        .edition = "",
        .source = ""};
    return sl_statement_end(statement, error);
}

/* A rule that was taken out of the table is known by its name alone. */
static enum sl_status read_rule(struct sl_store *store, struct sl_arena *arena,
                                struct sl_summary *summary,
                                struct sl_error *error)
{
    struct sl_margin_rule *rules = NULL;
    size_t count = 0;
    enum sl_status status =
        sl_read_rules(store, summary->vintage, summary->rule.rule, arena,
                      &rules, &count, error);

    if (!status && count)
        summary->rule = rules[0];
    return status;
}

static const char *const pumps[SL_STATE_COUNT] = {
    "pumps_short", "pumps_thin", "pumps_unproven", "pumps_clear"};

/* As it was judged by; its tiers are those of the rule of that name. */
static void read_judged(struct sl_statement *row, struct sl_arena *arena,
                        const struct sl_margin_rule *known, size_t count,
                        struct sl_rule_row *judged)
{
    const char *name = sl_read_filled(row, "rule", arena);

    judged->rule = (struct sl_margin_rule){.lift_limit = NAN};
    for (size_t i = 0; i < count; i++)
        if (sl_same(known[i].rule, name))
            judged->rule = known[i];
    judged->rule.rule = name;
    judged->rule.edition = sl_read_filled(row, "edition", arena);
    judged->rule.source = sl_read_filled(row, "source", arena);
    judged->rule.trust = sl_read_text(row, "trust")[0];
    for (int state = 0; state < SL_STATE_COUNT; state++)
        judged->pumps_by_state[state] = sl_read_whole(row, pumps[state]);
    judged->pumps_apart = sl_read_whole(row, "pumps_apart");
}

static enum sl_status read_rules(struct sl_store *store, struct sl_arena *arena,
                                 struct sl_summary *summary,
                                 struct sl_error *error)
{
    struct sl_rule_row *rules =
        sl_arena_new(arena, SL_RULES_MOST, sizeof *rules);
    struct sl_margin_rule *known = NULL;
    struct sl_statement *statement = NULL;
    size_t count = 0;
    bool row = false;
    enum sl_status status = sl_read_rules(store, summary->vintage, NULL, arena,
                                          &known, &count, error);

    if (!status)
        status =
            sl_statement_use_for(store, SL_QUERY_EVALUATION_RULES, "evaluation",
                                 summary->evaluation, &statement, error);
    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row)
        if (summary->rule_count < SL_RULES_MOST)
            read_judged(statement, arena, known, count,
                        &rules[summary->rule_count++]);
    summary->rules = rules;
    return status;
}

static void add_counts(struct sl_statement *row, struct sl_summary *summary)
{
    const char *word = sl_read_text(row, "state");
    int state = 0;

    while (state < SL_CLEAR &&
           !sl_same(word, sl_state_name((enum sl_state)state)))
        state++;
    summary->stations_by_state[state] += sl_read_whole(row, "stations");
    summary->stations_without_pumps += sl_read_whole(row, "without_pumps");
    for (int i = 0; i < SL_STATE_COUNT; i++)
        summary->pumps_by_state[i] += sl_read_whole(row, pumps[i]);
}

static enum sl_status read_counts(struct sl_store *store,
                                  struct sl_summary *summary,
                                  struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_COUNT_RESULTS, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", summary->evaluation);
    while (!(status = sl_statement_step(statement, &row, error)) && row)
        add_counts(statement, summary);
    return status;
}

static enum sl_status count_beside(struct sl_store *store,
                                   struct sl_summary *summary,
                                   struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(store, SL_QUERY_COUNT_BESIDE, "evaluation",
                             summary->evaluation, &statement, error);

    if (!status)
        status = sl_statement_step(statement, &row, error);
    if (status || !row)
        return status;
    summary->clear_beside = sl_read_whole(statement, "stations");
    return sl_statement_end(statement, error);
}

enum sl_status sl_store_read_summary(struct sl_store *store,
                                     long long evaluation,
                                     struct sl_arena *arena,
                                     struct sl_summary *summary,
                                     struct sl_error *error)
{
    struct sl_summary read = {
        .evaluation = evaluation,
        .version = summary->version,
        .conditions = summary->conditions,
        .condition_count = summary->condition_count,
    };
    enum sl_status status = sl_store_write_uses(store, error);

    if (!status)
        status = read_head(store, arena, &read, error);

    if (!status)
        status = read_rule(store, arena, &read, error);
    if (!status)
        status = read_rules(store, arena, &read, error);
    if (!status)
        status = read_counts(store, &read, error);
    if (!status)
        status = count_beside(store, &read, error);
    if (!status)
        status = sl_store_read_files(store, read.vintage, read.sums, error);
    if (!status)
        *summary = read;
    return status;
}
