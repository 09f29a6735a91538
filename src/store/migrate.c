/* The file's version: which migrations it has had.
 *
 * user_version is the number of the last one; application_id tells our files
 * from others.  Both are set inside the migration's own transaction. */
#include <stdio.h>
#include <string.h>

#include "base/text.h"
#include "store/statement.h"

#define APPLICATION_ID 0x736C7731 /* "slw1" */

static int newest_version(void)
{
    return sl_migrations[sl_migrations_count - 1].number;
}

/* One number from a statement that is no file of sql/queries, because the
 * schema may not be there yet. */
static enum sl_status ask(struct sl_store *store, const char *sql,
                          long long *answer, struct sl_error *error)
{
    sqlite3_stmt *asked = NULL;
    enum sl_status status = SL_OK;

    *answer = 0;
    if (sqlite3_prepare_v2(store->database, sql, -1, &asked, NULL) !=
            SQLITE_OK ||
        sqlite3_step(asked) != SQLITE_ROW)
        status = sl_store_fault(store, sql, error);
    else
        *answer = sqlite3_column_int64(asked, 0);
    sqlite3_finalize(asked);
    return status;
}

static enum sl_status refuse_foreign(struct sl_store *store,
                                     struct sl_error *error)
{
    long long application = 0, pages = 0;
    enum sl_status status =
        ask(store, "PRAGMA application_id", &application, error);

    if (status)
        return status;
    status = ask(store, "PRAGMA page_count", &pages, error);
    if (status || application == APPLICATION_ID)
        return status;
    if (pages == 0 && store->writing)
        return SL_OK;
    return sl_error_set(error, SL_STORE,
                        "the file \"%s\" is no store of this program; it was "
                        "not touched: name another",
                        store->path);
}

static enum sl_status check_version(struct sl_store *store, long long version,
                                    struct sl_error *error)
{
    if (version < 0)
        return sl_error_set(error, SL_STORE,
                            "the store \"%s\" says it is of version %lld, "
                            "which none is: it was changed by other means",
                            store->path, version);
    if (version > newest_version())
        return sl_error_set(error, SL_STORE,
                            "the store \"%s\" is of version %lld, this program "
                            "knows %d; use the newer program",
                            store->path, version, newest_version());
    if (version < newest_version() && !store->writing)
        return sl_error_set(error, SL_STORE,
                            "the store \"%s\" is of version %lld, this program "
                            "needs %d; import or evaluate with this program "
                            "once to bring it up to date",
                            store->path, version, newest_version());
    return SL_OK;
}

/* Inside a transaction that is open for writing. */
static enum sl_status migrate_once(struct sl_store *store,
                                   const struct sl_embedded *migration,
                                   struct sl_error *error)
{
    char marks[120] = "";
    long long version = 0;
    enum sl_status status = ask(store, "PRAGMA user_version", &version, error);

    /* Another program may have been faster, since we looked. */
    if (status || version >= migration->number)
        return status;
    status = sl_store_execute(store, migration->text, error);
    if (status)
        return status;
    snprintf(marks, sizeof marks,
             "PRAGMA application_id = %d; PRAGMA user_version = %d;",
             APPLICATION_ID, migration->number);
    return sl_store_execute(store, marks, error);
}

static enum sl_status in_transaction(
    struct sl_store *store,
    enum sl_status (*act)(struct sl_store *, const struct sl_embedded *,
                          struct sl_error *),
    const struct sl_embedded *what, struct sl_error *error)
{
    enum sl_status status = sl_store_execute(store, "BEGIN IMMEDIATE", error);

    if (status)
        return status;
    status = act(store, what, error);
    if (!status)
        status = sl_store_execute(store, "COMMIT", error);
    if (status)
        sl_store_rollback(store);
    return status;
}

/* A view's text as SQLite keeps it: without the semicolon. */
static size_t kept_length(const char *text)
{
    size_t length = strlen(text);

    while (length && strchr("; \n", text[length - 1]))
        length--;
    return length;
}

/* A name out of the file is text like any other: one with a quote in it
 * must not end its own quoting. */
static void add_drop(struct sl_text *drop, const char *view)
{
    sl_text_add_string(drop, "DROP VIEW \"");
    for (; *view; view++)
        sl_text_add(drop, *view == '"' ? "\"\"" : view, *view == '"' ? 2 : 1);
    sl_text_add_string(drop, "\";");
}

static bool is_ours(const char *kept)
{
    for (size_t i = 0; i < sl_views_count; i++)
        if (strlen(kept) == kept_length(sl_views[i].text) &&
            strncmp(kept, sl_views[i].text, strlen(kept)) == 0)
            return true;
    return false;
}

/* Whether the file's views are those of this program; adds the statements
 * that drop them all. */
static enum sl_status compare_views(struct sl_store *store, bool *same,
                                    struct sl_text *drop,
                                    struct sl_error *error)
{
    const char *sql = "SELECT name, sql FROM main.sqlite_schema"
                      " WHERE type = 'view' ORDER BY name";
    sqlite3_stmt *asked = NULL;
    size_t count = 0;
    enum sl_status status = SL_OK;
    int code = sqlite3_prepare_v2(store->database, sql, -1, &asked, NULL);

    *same = true;
    while (code == SQLITE_OK && sqlite3_step(asked) == SQLITE_ROW) {
        add_drop(drop, (const char *)sqlite3_column_text(asked, 0));
        if (!is_ours((const char *)sqlite3_column_text(asked, 1)))
            *same = false;
        count++;
    }
    *same = *same && count == sl_views_count;
    if (sqlite3_finalize(asked) != SQLITE_OK || code != SQLITE_OK)
        status = sl_store_fault(store, sql, error);
    return status;
}

static enum sl_status replace_views(struct sl_store *store,
                                    const struct sl_embedded *drop,
                                    struct sl_error *error)
{
    enum sl_status status = sl_store_execute(store, drop->text, error);

    for (size_t i = 0; !status && i < sl_views_count; i++)
        status = sl_store_execute(store, sl_views[i].text, error);
    return status;
}

/* A store that may not be written gets this program's views for as long as
 * it is open. */
static enum sl_status overlay_views(struct sl_store *store,
                                    struct sl_error *error)
{
    static const char create[] = "CREATE VIEW";
    enum sl_status status = SL_OK;

    for (size_t i = 0; !status && i < sl_views_count; i++) {
        struct sl_text text = {NULL, 0, 0};

        sl_text_add_string(&text, "CREATE TEMP VIEW");
        sl_text_add_string(&text, sl_views[i].text + strlen(create));
        status = sl_store_execute(store, sl_text_string(&text), error);
        sl_text_release(&text);
    }
    return status;
}

static enum sl_status renew_views(struct sl_store *store,
                                  struct sl_error *error)
{
    struct sl_text drop = {NULL, 0, 0};
    bool same = false;
    enum sl_status status = compare_views(store, &same, &drop, error);
    struct sl_embedded dropping = {"drop views", 0, sl_text_string(&drop)};

    if (!status && !same && store->writing)
        status = in_transaction(store, replace_views, &dropping, error);
    else if (!status && !same)
        status = overlay_views(store, error);
    sl_text_release(&drop);
    return status;
}

enum sl_status sl_store_migrate(struct sl_store *store, struct sl_error *error)
{
    long long version = 0;
    enum sl_status status = refuse_foreign(store, error);

    if (status)
        return status;
    status = ask(store, "PRAGMA user_version", &version, error);
    if (status)
        return status;
    status = check_version(store, version, error);
    for (size_t i = 0; !status && i < sl_migrations_count; i++)
        if (sl_migrations[i].number > version)
            status =
                in_transaction(store, migrate_once, &sl_migrations[i], error);
    if (!status)
        status = renew_views(store, error);
    return status;
}
