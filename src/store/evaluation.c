#include "store/evaluation.h"

#include "store/running_sets.h"
#include "store/statement.h"

enum sl_status sl_store_find_evaluation(struct sl_store *store,
                                        struct sl_evaluation *evaluation,
                                        bool *found, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIND_EVALUATION, &statement, error);

    *found = false;
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", evaluation->vintage);
    sl_bind_text(statement, "version", evaluation->version);
    sl_bind_text(statement, "rule", evaluation->rule);
    if (evaluation->year)
        sl_bind_whole(statement, "year", evaluation->year);
    status = sl_statement_step(statement, found, error);
    if (status || !*found)
        return status;
    evaluation->evaluation = sl_read_whole(statement, "evaluation");
    evaluation->version = sl_read_copy(statement, "version", &store->arena);
    evaluation->rule = sl_read_copy(statement, "rule", &store->arena);
    evaluation->year = (int)sl_read_whole(statement, "year");
    return sl_statement_end(statement, error);
}

enum sl_status sl_store_add_evaluation(struct sl_store *store,
                                       struct sl_evaluation *evaluation,
                                       struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_EVALUATION, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", evaluation->vintage);
    sl_bind_text(statement, "version", evaluation->version);
    sl_bind_text(statement, "rule", evaluation->rule);
    sl_bind_whole(statement, "year", evaluation->year);
    status = sl_statement_run(statement, error);
    if (!status)
        evaluation->evaluation = sqlite3_last_insert_rowid(store->database);
    return status;
}

static enum sl_status add_rule(struct sl_store *store, long long evaluation,
                               size_t place, const struct sl_margin_rule *rule,
                               struct sl_error *error)
{
    const char trust[] = {rule->trust, '\0'};
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(
        store, SL_QUERY_ADD_EVALUATION_RULE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", evaluation);
    sl_bind_whole(statement, "place", (long long)place);
    sl_bind_text(statement, "rule", rule->rule);
    sl_bind_text(statement, "edition", rule->edition);
    sl_bind_text(statement, "source", rule->source);
    sl_bind_text(statement, "trust", trust);
    return sl_statement_run(statement, error);
}

enum sl_status sl_store_add_rules(struct sl_store *store, long long evaluation,
                                  const struct sl_tables *tables,
                                  struct sl_error *error)
{
    enum sl_status status = SL_OK;

    for (size_t i = 0; !status && i < tables->rule_count; i++)
        status = add_rule(store, evaluation, i + 1, &tables->rules[i], error);
    return status;
}

static enum sl_status write_use(struct sl_store *store,
                                const struct sl_default_uses *use,
                                struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_DEFAULT_USES, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", store->counted_evaluation);
    sl_bind_text(statement, "field", use->row->field);
    sl_bind_text(statement, "circumstance", use->row->circumstance);
    sl_bind_whole(statement, "uses", use->uses);
    return sl_statement_run(statement, error);
}

enum sl_status sl_store_write_uses(struct sl_store *store,
                                   struct sl_error *error)
{
    for (size_t i = 0; i < store->use_count; i++) {
        enum sl_status status = write_use(store, &store->uses[i], error);

        if (status)
            return status;
    }
    store->use_count = 0;
    return sl_store_write_rule_counts(store, error);
}
