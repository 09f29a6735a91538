#define _POSIX_C_SOURCE 200809L /* access */

#include "store/store.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "store/statement.h"

/* How long to wait for another program's lock. */
#define BUSY_MILLISECONDS 5000

/* The file is given by an owner and opened again years later: its schema is
 * not trusted to call anything, nor open to a statement gone wrong.  The
 * rollback journal keeps the store one file, whole after any interruption.
 * 32 MiB of cache hold the inner pages of every index at a million pumps. */
static const char settings[] = "PRAGMA foreign_keys = ON;"
                               "PRAGMA trusted_schema = OFF;"
                               "PRAGMA cell_size_check = ON;"
                               "PRAGMA cache_size = -32768;";

static enum sl_status configure(struct sl_store *store, struct sl_error *error)
{
    sqlite3_busy_timeout(store->database, BUSY_MILLISECONDS);
    sqlite3_extended_result_codes(store->database, 1);
    sqlite3_db_config(store->database, SQLITE_DBCONFIG_DEFENSIVE, 1,
                      (int *)NULL);
    sqlite3_db_config(store->database, SQLITE_DBCONFIG_DQS_DML, 0, (int *)NULL);
    sqlite3_db_config(store->database, SQLITE_DBCONFIG_DQS_DDL, 0, (int *)NULL);
    return sl_store_execute(store, settings, error);
}

static enum sl_status not_opened(const struct sl_store *store, const char *path,
                                 enum sl_store_mode mode,
                                 struct sl_error *error)
{
    if (mode != SL_STORE_CREATE && access(path, F_OK) != 0 && errno == ENOENT)
        return sl_error_set(error, SL_STORE,
                            "there is no store \"%s\"; summerlow import makes "
                            "one",
                            path);
    return sl_error_set(error, SL_STORE,
                        "the store \"%s\" cannot be opened: %s; check its "
                        "name and who may read it",
                        path, sqlite3_errmsg(store->database));
}

enum sl_status sl_store_open(const char *path, enum sl_store_mode mode,
                             struct sl_store **store, struct sl_error *error)
{
    struct sl_store *opened = sl_new(1, sizeof *opened);
    static const int flags_of[] = {
        [SL_STORE_READ] = SQLITE_OPEN_READONLY,
        [SL_STORE_WRITE] = SQLITE_OPEN_READWRITE,
        [SL_STORE_CREATE] = SQLITE_OPEN_READWRITE | SQLITE_OPEN_CREATE,
    };
    enum sl_status status = SL_OK;

    *store = NULL;
    opened->writing = mode != SL_STORE_READ;
    opened->path = sl_new(strlen(path) + 1, 1);
    memcpy(opened->path, path, strlen(path));
    /* SQLite takes an empty name for a file that it deletes when done. */
    if (!*path) {
        status = sl_error_set(error, SL_STORE,
                              "the name of the store is empty; name a file");
        goto done;
    }
    /* No mutex: a store is used by one thread at a time. */
    if (sqlite3_open_v2(path, &opened->database,
                        flags_of[mode] | SQLITE_OPEN_NOMUTEX,
                        NULL) != SQLITE_OK) {
        status = not_opened(opened, path, mode, error);
        goto done;
    }
    status = configure(opened, error);
    if (status)
        goto done;
    status = sl_store_migrate(opened, error);
    if (status)
        goto done;
    *store = opened;
    opened = NULL;
done:
    sl_store_close(opened);
    return status;
}

void sl_store_close(struct sl_store *store)
{
    if (!store)
        return;
    for (size_t i = 0; i < SL_QUERY_COUNT; i++)
        sl_statement_release(&store->statements[i]);
    /* With no statement left this closes, and rolls back what is open. */
    sqlite3_close(store->database);
    sl_arena_release(&store->arena);
    free(store->uses);
    free(store->path);
    free(store);
}

enum sl_status sl_store_begin(struct sl_store *store, struct sl_error *error)
{
    return sl_store_execute(store, store->writing ? "BEGIN IMMEDIATE" : "BEGIN",
                            error);
}

enum sl_status sl_store_commit(struct sl_store *store, struct sl_error *error)
{
    enum sl_status status = sl_store_write_uses(store, error);

    if (status)
        return status;
    return sl_store_execute(store, "COMMIT", error);
}

static void forget_pending(struct sl_store *store)
{
    for (int kind = 0; kind < SL_KIND_COUNT; kind++)
        store->last_found[kind].vintage = 0;
    store->traits_vintage = 0;
    store->recall_vintage = 0;
    store->recall_station = 0;
    store->counted_evaluation = 0;
    store->use_count = 0;
    memset(store->rule_pumps, 0, sizeof store->rule_pumps);
}

void sl_store_rollback(struct sl_store *store)
{
    /* Outside a transaction, and after SQLite has already rolled back by
     * itself, there is nothing to do and nothing to tell. */
    for (size_t i = 0; i < SL_QUERY_COUNT; i++)
        sqlite3_reset(store->statements[i].prepared);
    if (!sqlite3_get_autocommit(store->database))
        sqlite3_exec(store->database, "ROLLBACK", NULL, NULL, NULL);
    forget_pending(store);
}

enum sl_status sl_store_prepare_all(struct sl_store *store,
                                    struct sl_error *error)
{
    for (int i = 0; i < SL_QUERY_COUNT; i++) {
        struct sl_statement *statement = NULL;
        enum sl_status status =
            sl_statement_use(store, (enum sl_query)i, &statement, error);

        if (status)
            return status;
    }
    return SL_OK;
}
