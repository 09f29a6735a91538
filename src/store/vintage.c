#include "store/vintage.h"

#include <stdio.h>

#include "model/fields.h"
#include "store/statement.h"

enum sl_status sl_store_find_vintage(struct sl_store *store, const char *sha256,
                                     struct sl_arena *arena,
                                     struct sl_vintage *vintage, bool *found,
                                     struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIND_VINTAGE, &statement, error);

    *found = false;
    if (status)
        return status;
    sl_bind_text(statement, "sha256", sha256);
    status = sl_statement_step(statement, found, error);
    if (status || !*found)
        return status;
    vintage->vintage = sl_read_whole(statement, "vintage");
    vintage->label = sl_read_copy(statement, "label", arena);
    vintage->inventory_sha256 =
        sl_read_copy(statement, "inventory_sha256", arena);
    vintage->imported_at = sl_read_copy(statement, "imported_at", arena);
    return sl_statement_end(statement, error);
}

enum sl_status sl_store_add_vintage(struct sl_store *store,
                                    struct sl_vintage *vintage,
                                    struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_VINTAGE, &statement, error);

    if (status)
        return status;
    sl_bind_text(statement, "label", vintage->label);
    sl_bind_text(statement, "inventory_sha256", vintage->inventory_sha256);
    sl_bind_text(statement, "imported_at", vintage->imported_at);
    status = sl_statement_run(statement, error);
    if (!status)
        vintage->vintage = sqlite3_last_insert_rowid(store->database);
    return status;
}

enum sl_status sl_store_add_set_aside(struct sl_store *store, long long vintage,
                                      const struct sl_aside *aside,
                                      struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_SET_ASIDE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", sl_record_kind(aside->kind)->file);
    store->traits_vintage = 0;
    sl_bind_whole(statement, "line", aside->line);
    sl_bind_text(statement, "record_id", aside->record_id);
    sl_bind_text(statement, "station_id", aside->station_id);
    sl_bind_text(statement, "fate", sl_fate_name(aside->fate));
    sl_bind_text(statement, "reason", aside->reason);
    sl_bind_bytes(statement, "raw", aside->raw, aside->raw_length);
    return sl_statement_run(statement, error);
}

enum sl_status sl_store_add_finding(struct sl_store *store, long long vintage,
                                    const struct sl_finding *finding,
                                    struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_FINDING, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "code", finding->code);
    sl_bind_text(statement, "severity", sl_severity_name(finding->severity));
    sl_bind_text(statement, "file", finding->file);
    sl_bind_whole(statement, "line", finding->line);
    sl_bind_text(statement, "header", finding->column);
    sl_bind_text(statement, "record_id", finding->record_id);
    sl_bind_text(statement, "value", finding->value);
    sl_bind_text(statement, "reason", finding->reason);
    sl_bind_text(statement, "remedy", finding->remedy);
    return sl_statement_run(statement, error);
}

enum sl_status sl_store_add_column(struct sl_store *store, long long vintage,
                                   const struct sl_column_use *use,
                                   struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_COLUMN, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", use->file);
    sl_bind_whole(statement, "position", use->position);
    sl_bind_text(statement, "header", use->header);
    sl_bind_text(statement, "field", *use->field ? use->field : NULL);
    sl_bind_text(statement, "unit", use->unit ? use->unit->suffix : NULL);
    return sl_statement_run(statement, error);
}

enum sl_status sl_store_add_file(struct sl_store *store, long long vintage,
                                 const struct sl_file_sum *sum,
                                 struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_ADD_FILE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", sum->file);
    sl_bind_whole(statement, "present", sum->present);
    sl_bind_text(statement, "sha256", sum->sha256);
    sl_bind_whole(statement, "bytes", sum->bytes);
    sl_bind_whole(statement, "read", sum->read);
    sl_bind_whole(statement, "kept", sum->kept);
    sl_bind_whole(statement, "rejected", sum->rejected);
    sl_bind_whole(statement, "out_of_scope", sum->out_of_scope);
    return sl_statement_run(statement, error);
}

static enum sl_status read_file(struct sl_store *store, long long vintage,
                                struct sl_file_sum *sum, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIND_FILE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", sum->file);
    status = sl_statement_step(statement, &row, error);
    if (status || !row)
        return status;
    sum->present = sl_read_whole(statement, "present") != 0;
    snprintf(sum->sha256, sizeof sum->sha256, "%s",
             sl_read_text(statement, "sha256"));
    sum->bytes = sl_read_whole(statement, "bytes");
    sum->read = sl_read_whole(statement, "read");
    sum->kept = sl_read_whole(statement, "kept");
    sum->rejected = sl_read_whole(statement, "rejected");
    sum->out_of_scope = sl_read_whole(statement, "out_of_scope");
    return sl_statement_end(statement, error);
}

enum sl_status sl_store_read_files(struct sl_store *store, long long vintage,
                                   struct sl_file_sum sums[SL_KIND_COUNT],
                                   struct sl_error *error)
{
    enum sl_status status = SL_OK;

    for (int kind = 0; !status && kind < SL_KIND_COUNT; kind++) {
        sums[kind] = (struct sl_file_sum){
            .file = sl_record_kind((enum sl_kind)kind)->file};
        status = read_file(store, vintage, &sums[kind], error);
    }
    return status;
}

long long sl_store_count_stations(struct sl_store *store, long long vintage)
{
    struct sl_statement *statement = NULL;
    long long count = -1;
    bool row = false;

    if (sl_statement_use(store, SL_QUERY_COUNT_STATIONS, &statement, NULL))
        return -1;
    sl_bind_whole(statement, "vintage", vintage);
    if (sl_statement_step(statement, &row, NULL) || !row)
        return -1;
    count = sl_read_whole(statement, "stations");
    return sl_statement_end(statement, NULL) ? -1 : count;
}
