/* Inside the store's room only: the open store, and its statements.
 *
 * A statement is a file of sql/queries, prepared when first used and kept.
 * Parameters and columns are named, never numbered, by literals or names of
 * the list of fields; a name the statement does not have, and any error that
 * only a wrong statement can raise, is SL_BUG with the SQL.  Binding and
 * reading cannot fail on the spot: the first wrong name is kept in the
 * statement and reported by the next step or end.
 *
 * Texts are bound as they stand and must live until the statement ends; a
 * text read lives until the next step. */
#ifndef SL_STORE_STATEMENT_H
#define SL_STORE_STATEMENT_H

#include <sqlite3.h>
#include <stdbool.h>
#include <stddef.h>

#include "base/memory.h"
#include "base/status.h"
#include "model/records.h"
#include "model/result.h"
#include "model/tables.h"
#include "model/vocabulary.h"
#include "store/catalogue.h"
#include "store/store.h"

/* A name and where the statement has it, in the order names were used last
 * time: a row costs no search as long as the order stays. */
struct sl_place {
    const char *name;
    int at; /* 0: no such name */
};

struct sl_places {
    struct sl_place *items;
    size_t count, capacity, next;
};

struct sl_statement {
    struct sl_store *store;
    sqlite3_stmt *prepared;
    struct sl_places parameters, columns;
    const char *wrong_name; /* NULL: none */
};

/* Uses of a default counted since they were last written. */
struct sl_default_uses {
    const struct sl_default *row;
    long long uses;
};

/* The record of a kind last found by its key: files come grouped, and the
 * next record mostly refers to the same. */
struct sl_last_found {
    long long vintage; /* 0: none */
    char id[64];
    long long key, station;
    long line;
};

struct sl_store {
    sqlite3 *database;
    char *path;
    bool writing;
    struct sl_statement statements[SL_QUERY_COUNT];
    /* NULL until the published tables were read. */
    const struct sl_vocabularies *vocabularies;
    struct sl_arena arena; /* texts that live as long as the store */

    struct sl_last_found last_found[SL_KIND_COUNT];
    /* Whether a vintage has any grade: 0 is no vintage. */
    long long traits_vintage;
    bool graded;
    bool has_rejected;
    /* Up to which station the pipes of a vintage were found sound. */
    long long recall_vintage, recall_station;
    /* Written when the transaction is committed or the sums are read. */
    long long counted_evaluation;
    struct sl_default_uses *uses;
    size_t use_count, use_capacity;
    /* By state, and behind them those a rule is not about; likewise. */
    long long rule_pumps[SL_RULES_MOST][SL_STATE_COUNT + 1];
};

/* What SQLite last said about this store, as our status and message; `sql`
 * is told when the fault is ours. */
enum sl_status sl_store_fault(const struct sl_store *store, const char *sql,
                              struct sl_error *error);
/* Run a text of one or more statements. */
enum sl_status sl_store_execute(struct sl_store *store, const char *sql,
                                struct sl_error *error);
/* Write the counted uses of defaults and what was counted by each rule
 * (evaluation.c). */
enum sl_status sl_store_write_uses(struct sl_store *store,
                                   struct sl_error *error);
/* Bring the file to the newest version; refuse one that is not ours. */
enum sl_status sl_store_migrate(struct sl_store *store, struct sl_error *error);

/* The quantity a row of the defaults names (published.c). */
enum sl_quantity sl_quantity_named(const char *word);

/* The statement, ready to bind. */
enum sl_status sl_statement_use(struct sl_store *store, enum sl_query query,
                                struct sl_statement **statement,
                                struct sl_error *error);
/* The next row, or *row false after the last. */
enum sl_status sl_statement_step(struct sl_statement *statement, bool *row,
                                 struct sl_error *error);
/* Give it back before its last row was reached. */
enum sl_status sl_statement_end(struct sl_statement *statement,
                                struct sl_error *error);
/* Whether a wrong name was used since the last step. */
enum sl_status sl_statement_check(const struct sl_statement *statement,
                                  struct sl_error *error);
/* Give it back because of `status`, which is returned. */
enum sl_status sl_statement_leave(struct sl_statement *statement,
                                  enum sl_status status);
/* The statement, with its first parameter bound. */
enum sl_status sl_statement_use_for(struct sl_store *store, enum sl_query query,
                                    const char *name, long long key,
                                    struct sl_statement **statement,
                                    struct sl_error *error);
/* Step to the end of a statement that gives no rows. */
enum sl_status sl_statement_run(struct sl_statement *statement,
                                struct sl_error *error);
void sl_statement_release(struct sl_statement *statement);

void sl_bind_whole(struct sl_statement *statement, const char *name,
                   long long value);
/* NaN is NULL. */
void sl_bind_number(struct sl_statement *statement, const char *name,
                    double value);
/* NULL is NULL. */
void sl_bind_text(struct sl_statement *statement, const char *name,
                  const char *text);
/* As a text when it is UTF-8 without NUL, else as a blob. */
void sl_bind_bytes(struct sl_statement *statement, const char *name,
                   const char *bytes, size_t length);

bool sl_read_null(struct sl_statement *statement, const char *name);
/* NULL is 0. */
long long sl_read_whole(struct sl_statement *statement, const char *name);
/* NULL is NaN. */
double sl_read_number(struct sl_statement *statement, const char *name);
/* NULL is "". */
const char *sl_read_text(struct sl_statement *statement, const char *name);
/* NULL is NULL; else a copy in the arena. */
const char *sl_read_copy(struct sl_statement *statement, const char *name,
                         struct sl_arena *arena);
/* The same; NULL is "". */
const char *sl_read_filled(struct sl_statement *statement, const char *name,
                           struct sl_arena *arena);

#endif
