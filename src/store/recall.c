/* Taking suction pipes back whose way to the source is not there.
 *
 * A pipe may draw only from a pipe of its own station, so each station is
 * sound or not by itself: they are gone through once, in the order they
 * were kept, each until nothing is found in it. */
#include <stdio.h>

#include "model/fields.h"
#include "store/lookup.h"
#include "store/statement.h"
#include "store/vintage.h"

static enum sl_status next_station(struct sl_store *store, long long vintage,
                                   bool *found, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(
        store, SL_QUERY_NEXT_DOUBTFUL_STATION, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_whole(statement, "after", store->recall_station);
    status = sl_statement_step(statement, found, error);
    if (status || !*found)
        return status;
    store->recall_station = sl_read_whole(statement, "station");
    return sl_statement_end(statement, error);
}

static enum sl_status delete_by(struct sl_store *store, enum sl_query query,
                                long long pipe, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(store, query, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "pipe", pipe);
    return sl_statement_run(statement, error);
}

static enum sl_status take_back(struct sl_store *store, long long pipe,
                                struct sl_error *error)
{
    enum sl_status status =
        delete_by(store, SL_QUERY_DELETE_PIPE_GRADES, pipe, error);

    store->last_found[SL_KIND_PIPE].vintage = 0;
    if (status)
        return status;
    return delete_by(store, SL_QUERY_DELETE_PIPE, pipe, error);
}

static void name_recalled(struct sl_statement *statement,
                          struct sl_recall *recall)
{
    snprintf(recall->record_id, sizeof recall->record_id, "%s",
             sl_read_text(statement, "pipe_id"));
    snprintf(recall->value, sizeof recall->value, "%s",
             sl_read_text(statement, "draws_from"));
}

/* Draws from what is not kept, or from another station's pipe. */
static enum sl_status recall_unsound(struct sl_store *store, long long vintage,
                                     struct sl_recall *recall, bool *found,
                                     struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    struct sl_answer *answer = &recall->answer;
    long long pipe = 0;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIRST_UNSOUND_PIPE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "station", store->recall_station);
    status = sl_statement_step(statement, found, error);
    if (status || !*found)
        return status;
    pipe = sl_read_whole(statement, "pipe");
    recall->line = (long)sl_read_whole(statement, "line");
    name_recalled(statement, recall);
    *answer = (struct sl_answer){SL_ANSWER_OTHER_STATION, "draws_from",
                                 sl_record_kind(SL_KIND_PIPE)->file,
                                 (long)sl_read_whole(statement, "other_line")};
    if (sl_read_null(statement, "other_line"))
        status = sl_store_why_not_kept(store, vintage, SL_KIND_PIPE,
                                       sl_read_text(statement, "draws_from"),
                                       answer, error);
    if (!status)
        status = sl_statement_end(statement, error);
    return status ? status : take_back(store, pipe, error);
}

/* One step from a pipe to the one it draws from.  The recall is filled with
 * the latter when it is the first by line so far. */
static enum sl_status step_up(struct sl_store *store, long long *pipe,
                              bool going_round, long long *first,
                              struct sl_recall *recall, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    long line = 0;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_UPSTREAM_PIPE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "pipe", *pipe);
    status = sl_statement_step(statement, &row, error);
    if (status)
        return status;
    if (!row)
        return sl_error_set(error, SL_BUG, "the way round a loop is broken");
    *pipe = sl_read_whole(statement, "pipe");
    line = (long)sl_read_whole(statement, "line");
    if (going_round && (!*first || line < recall->line)) {
        *first = *pipe;
        recall->line = line;
        name_recalled(statement, recall);
    }
    return sl_statement_end(statement, error);
}

static enum sl_status recall_loop(struct sl_store *store, long long vintage,
                                  struct sl_recall *recall, bool *found,
                                  struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    long long pipe = 0, pipes = 0, first = 0;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_FIRST_LOOPING_PIPE, &statement, error);

    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_whole(statement, "station", store->recall_station);
    status = sl_statement_step(statement, found, error);
    if (status || !*found)
        return status;
    pipe = sl_read_whole(statement, "pipe");
    pipes = sl_read_whole(statement, "pipes");
    status = sl_statement_end(statement, error);
    /* After as many steps as the station has pipes the way goes round; as
     * many again see every pipe of the loop. */
    for (long long i = 0; !status && i < 2 * pipes; i++)
        status = step_up(store, &pipe, i >= pipes, &first, recall, error);
    if (status)
        return status;
    recall->answer =
        (struct sl_answer){SL_ANSWER_CYCLE, "draws_from",
                           sl_record_kind(SL_KIND_PIPE)->file, recall->line};
    return take_back(store, first, error);
}

enum sl_status sl_store_recall_pipe(struct sl_store *store, long long vintage,
                                    struct sl_recall *recall, bool *found,
                                    struct sl_error *error)
{
    enum sl_status status = SL_OK;

    *found = false;
    *recall = (struct sl_recall){.line = 0};
    if (store->recall_vintage != vintage) {
        store->recall_vintage = vintage;
        store->recall_station = 0;
    }
    while (!status) {
        bool any = false;

        if (store->recall_station)
            status = recall_unsound(store, vintage, recall, found, error);
        if (!status && !*found && store->recall_station)
            status = recall_loop(store, vintage, recall, found, error);
        if (status || *found)
            break;
        status = next_station(store, vintage, &any, error);
        if (!status && !any) {
            store->recall_vintage = 0;
            break;
        }
    }
    return status;
}
