#include "store/missed.h"

#include "model/fields.h"
#include "store/statement.h"
#include "store/vintage.h"

enum sl_status sl_learn_traits(struct sl_store *store, long long vintage,
                               struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = SL_OK;

    if (store->traits_vintage == vintage)
        return SL_OK;
    status =
        sl_statement_use(store, SL_QUERY_VINTAGE_TRAITS, &statement, error);
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    status = sl_statement_step(statement, &row, error);
    if (status)
        return status;
    store->graded = sl_read_whole(statement, "graded") != 0;
    store->has_rejected = sl_read_whole(statement, "rejected") != 0;
    store->traits_vintage = vintage;
    return sl_statement_end(statement, error);
}

/* The count that a bound statement gives. */
static enum sl_status read_count(struct sl_statement *statement,
                                 long long *rejected, struct sl_error *error)
{
    bool row = false;
    enum sl_status status = sl_statement_step(statement, &row, error);

    if (status)
        return status;
    *rejected = sl_read_whole(statement, "rejected");
    return sl_statement_end(statement, error);
}

enum sl_status sl_count_rejected(struct sl_store *store, long long vintage,
                                 enum sl_kind kind, const char *record_id,
                                 long long *rejected, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status = SL_OK;

    *rejected = 0;
    if (!store->has_rejected)
        return SL_OK;
    status =
        sl_statement_use(store, SL_QUERY_REJECTED_OF_RECORD, &statement, error);
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", sl_record_kind(kind)->file);
    sl_bind_text(statement, "id", record_id);
    return read_count(statement, rejected, error);
}

enum sl_status sl_count_rejected_pumps(struct sl_store *store,
                                       long long vintage,
                                       const char *station_id,
                                       long long *rejected,
                                       struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status = SL_OK;

    *rejected = 0;
    if (!store->has_rejected)
        return SL_OK;
    status = sl_statement_use(store, SL_QUERY_REJECTED_PUMPS_OF_STATION,
                              &statement, error);
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "id", station_id);
    return read_count(statement, rejected, error);
}

enum sl_status sl_store_each_unused(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const char *file, long line,
                           const char *id, struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = sl_statement_use_for(
        store, SL_QUERY_UNUSED_RECORDS, "vintage", vintage, &statement, error);

    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        status = each(context, sl_read_text(statement, "file"),
                      (long)sl_read_whole(statement, "line"),
                      sl_read_text(statement, "id"), error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}

enum sl_status sl_store_each_rule_name(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_rule_name *name,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(store, SL_QUERY_OWNER_RULE_NAMES, "vintage",
                             vintage, &statement, error);

    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        struct sl_rule_name name = {
            .rule = sl_read_text(statement, "rule"),
            .line = (long)sl_read_whole(statement, "line"),
            .shipped = sl_read_text(statement, "shipped"),
            .first_line = (long)sl_read_whole(statement, "first_line"),
        };

        status = each(context, &name, error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}
