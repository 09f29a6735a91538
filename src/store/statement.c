#include "store/statement.h"

#include <stdlib.h>

/* What only a wrong statement or a wrong use of it can raise; everything
 * else is the world's doing. */
static bool ours(int code)
{
    switch (code & 0xFF) {
    case SQLITE_ERROR:
    case SQLITE_CONSTRAINT:
    case SQLITE_MISMATCH:
    case SQLITE_MISUSE:
    case SQLITE_RANGE:
        return true;
    default:
        return false;
    }
}

enum sl_status sl_store_fault(const struct sl_store *store, const char *sql,
                              struct sl_error *error)
{
    int code = sqlite3_extended_errcode(store->database);

    if ((code & 0xFF) == SQLITE_BUSY || (code & 0xFF) == SQLITE_LOCKED)
        return sl_error_set(error, SL_STORE,
                            "the store \"%s\" is in use by another program; "
                            "try again when that has ended",
                            store->path);
    if (code == SQLITE_FULL)
        return sl_error_set(error, SL_STORE,
                            "no room to write the store \"%s\"; it is as it "
                            "was: make room and try again",
                            store->path);
    if (code == SQLITE_READONLY_ROLLBACK)
        return sl_error_set(error, SL_STORE,
                            "the store \"%s\" was being written when its "
                            "writer died; import or evaluate once to bring it "
                            "back to what it was, and keep its journal",
                            store->path);
    if ((code & 0xFF) == SQLITE_NOTADB)
        return sl_error_set(error, SL_STORE,
                            "the file \"%s\" is no store of this program; "
                            "it was not touched: name another",
                            store->path);
    if (sql && ours(code))
        return sl_error_set(error, SL_BUG, "%s, in the statement: %s",
                            sqlite3_errmsg(store->database), sql);
    return sl_error_set(error, SL_STORE, "the store \"%s\": %s", store->path,
                        sqlite3_errmsg(store->database));
}

enum sl_status sl_store_execute(struct sl_store *store, const char *sql,
                                struct sl_error *error)
{
    if (sqlite3_exec(store->database, sql, NULL, NULL, NULL) != SQLITE_OK)
        return sl_store_fault(store, sql, error);
    return SL_OK;
}

enum sl_status sl_statement_use(struct sl_store *store, enum sl_query query,
                                struct sl_statement **statement,
                                struct sl_error *error)
{
    struct sl_statement *used = &store->statements[query];

    if (!used->prepared) {
        const char *sql = sl_queries[query].text;

        used->store = store;
        if (sqlite3_prepare_v3(store->database, sql, -1,
                               SQLITE_PREPARE_PERSISTENT, &used->prepared,
                               NULL) != SQLITE_OK)
            return sl_store_fault(store, sql, error);
    }
    sqlite3_reset(used->prepared);
    sqlite3_clear_bindings(used->prepared);
    used->parameters.next = 0;
    used->columns.next = 0;
    used->wrong_name = NULL;
    *statement = used;
    return SL_OK;
}

enum sl_status sl_statement_check(const struct sl_statement *statement,
                                  struct sl_error *error)
{
    if (!statement->wrong_name)
        return SL_OK;
    return sl_error_set(error, SL_BUG, "no name \"%s\" in the statement: %s",
                        statement->wrong_name,
                        sqlite3_sql(statement->prepared));
}

enum sl_status sl_statement_leave(struct sl_statement *statement,
                                  enum sl_status status)
{
    statement->wrong_name = NULL;
    sqlite3_reset(statement->prepared);
    return status;
}

enum sl_status sl_statement_step(struct sl_statement *statement, bool *row,
                                 struct sl_error *error)
{
    enum sl_status status = SL_OK;
    int code = SQLITE_OK;

    *row = false;
    if (statement->wrong_name)
        return sl_statement_leave(statement,
                                  sl_statement_check(statement, error));
    code = sqlite3_step(statement->prepared);
    statement->columns.next = 0;
    if (code == SQLITE_ROW) {
        *row = true;
        return SL_OK;
    }
    if (code != SQLITE_DONE)
        status = sl_store_fault(statement->store,
                                sqlite3_sql(statement->prepared), error);
    sqlite3_reset(statement->prepared);
    return status;
}

enum sl_status sl_statement_end(struct sl_statement *statement,
                                struct sl_error *error)
{
    return sl_statement_leave(statement, sl_statement_check(statement, error));
}

enum sl_status sl_statement_use_for(struct sl_store *store, enum sl_query query,
                                    const char *name, long long key,
                                    struct sl_statement **statement,
                                    struct sl_error *error)
{
    enum sl_status status = sl_statement_use(store, query, statement, error);

    if (!status)
        sl_bind_whole(*statement, name, key);
    return status;
}

enum sl_status sl_statement_run(struct sl_statement *statement,
                                struct sl_error *error)
{
    bool row = false;
    enum sl_status status = sl_statement_step(statement, &row, error);

    if (status == SL_OK && row) {
        sqlite3_reset(statement->prepared);
        status = sl_error_set(error, SL_BUG, "a row not asked for, by: %s",
                              sqlite3_sql(statement->prepared));
    }
    return status;
}

void sl_statement_release(struct sl_statement *statement)
{
    sqlite3_finalize(statement->prepared);
    free(statement->parameters.items);
    free(statement->columns.items);
    *statement = (struct sl_statement){.store = NULL};
}
