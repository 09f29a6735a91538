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

static void add_counts(struct sl_statement *row, struct sl_summary *summary)
{
    static const char *const pumps[SL_STATE_COUNT] = {
        "pumps_short", "pumps_thin", "pumps_unproven", "pumps_clear"};
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
    enum sl_status status = read_head(store, arena, &read, error);

    if (!status)
        status = read_rule(store, arena, &read, error);
    if (!status)
        status = read_counts(store, &read, error);
    if (!status)
        status = sl_store_read_files(store, read.vintage, read.sums, error);
    if (!status)
        *summary = read;
    return status;
}
