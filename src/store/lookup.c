#include "store/lookup.h"

#include <string.h>

#include "base/text.h"
#include "model/fields.h"
#include "store/statement.h"

static enum sl_status look_up(struct sl_statement *statement,
                              const char *key_column, bool has_station,
                              bool has_line, struct sl_found *found,
                              struct sl_error *error)
{
    enum sl_status status =
        sl_statement_step(statement, &found->is_kept, error);

    if (status || !found->is_kept)
        return status;
    found->key = sl_read_whole(statement, key_column);
    if (has_station)
        found->station = sl_read_whole(statement, "station");
    if (has_line)
        found->line = (long)sl_read_whole(statement, "line");
    return sl_statement_end(statement, error);
}

static bool found_last_time(const struct sl_last_found *last, long long vintage,
                            const char *id, struct sl_found *found)
{
    if (last->vintage != vintage || strcmp(last->id, id) != 0)
        return false;
    *found = (struct sl_found){true, last->key, last->station, last->line};
    return true;
}

static void remember(struct sl_last_found *last, long long vintage,
                     const char *id, const struct sl_found *found)
{
    size_t length = strlen(id);

    if (!found->is_kept || length >= sizeof last->id)
        return;
    memcpy(last->id, id, length + 1);
    last->vintage = vintage;
    last->key = found->key;
    last->station = found->station;
    last->line = found->line;
}

enum sl_status sl_store_look_up(struct sl_store *store, long long vintage,
                                enum sl_kind kind, const char *id,
                                struct sl_found *found, struct sl_error *error)
{
    static const struct {
        enum sl_query query;
        const char *key_column;
    } by_kind[SL_KIND_COUNT] = {
        [SL_KIND_STATION] = {SL_QUERY_FIND_STATION, "station"},
        [SL_KIND_CURVE] = {SL_QUERY_FIND_CURVE, "point"},
        [SL_KIND_PIPE] = {SL_QUERY_FIND_PIPE, "pipe"},
        [SL_KIND_PUMP] = {SL_QUERY_FIND_PUMP, "pump"},
        [SL_KIND_CONDITION] = {SL_QUERY_FIND_CONDITION, "owner_condition"},
        [SL_KIND_RULE] = {SL_QUERY_FIND_MARGIN_RULE, "owner_margin_rule"},
    };
    struct sl_statement *statement = NULL;
    enum sl_status status = SL_OK;

    *found = (struct sl_found){.is_kept = false};
    if (!by_kind[kind].key_column)
        return sl_error_set(error, SL_BUG, "a %s has no key",
                            sl_record_kind(kind)->name);
    if (found_last_time(&store->last_found[kind], vintage, id, found))
        return SL_OK;
    status = sl_statement_use(store, by_kind[kind].query, &statement, error);
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "id", id);
    status = look_up(statement, by_kind[kind].key_column, kind == SL_KIND_PIPE,
                     kind != SL_KIND_CURVE, found, error);
    if (!status)
        remember(&store->last_found[kind], vintage, id, found);
    return status;
}

enum sl_status sl_store_look_up_point(struct sl_store *store, long long vintage,
                                      const char *curve_id, double flow,
                                      struct sl_found *found,
                                      struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIND_POINT, &statement, error);

    *found = (struct sl_found){.is_kept = false};
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "curve_id", curve_id);
    sl_bind_number(statement, "flow", flow);
    return look_up(statement, "point", false, true, found, error);
}

enum sl_status sl_store_why_not_kept(struct sl_store *store, long long vintage,
                                     enum sl_kind kind, const char *id,
                                     struct sl_answer *answer,
                                     struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIND_SET_ASIDE, &statement, error);

    answer->kind = SL_ANSWER_NO_SUCH;
    answer->file = sl_record_kind(kind)->file;
    answer->line = 0;
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "file", answer->file);
    sl_bind_text(statement, "id", id);
    status = sl_statement_step(statement, &row, error);
    if (status || !row)
        return status;
    answer->kind =
        sl_same(sl_read_text(statement, "fate"), sl_fate_name(SL_OUT_OF_SCOPE))
            ? SL_ANSWER_REFERENCE_OUT_OF_SCOPE
            : SL_ANSWER_REFERENCE_REJECTED;
    answer->line = (long)sl_read_whole(statement, "line");
    return sl_statement_end(statement, error);
}
