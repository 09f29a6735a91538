/* The store: one SQLite file that holds every vintage of the inventory as
 * it was recorded (facts) and every evaluation of one (derived).
 *
 * Opening for writing brings an older one up to date; a newer one, and a file
 * that is no store of ours, are refused untouched.  All writing happens between
 * begin and commit; a store that is closed, killed or out of disk before the
 * commit is as it was.  Errors of SQLite come as SL_STORE with its words, and
 * the SQL when it is our bug. */
#ifndef SL_STORE_STORE_H
#define SL_STORE_STORE_H

#include <stdbool.h>

#include "base/memory.h"
#include "base/status.h"
#include "model/tables.h"

struct sl_store;

enum sl_store_mode {
    SL_STORE_READ,
    SL_STORE_WRITE, /* one that is there */
    SL_STORE_CREATE /* likewise, or a new one where there is none */
};

enum sl_status sl_store_open(const char *path, enum sl_store_mode mode,
                             struct sl_store **store, struct sl_error *error);
/* Rolls an open transaction back.  NULL is harmless. */
void sl_store_close(struct sl_store *store);

enum sl_status sl_store_begin(struct sl_store *store, struct sl_error *error);
enum sl_status sl_store_commit(struct sl_store *store, struct sl_error *error);
void sl_store_rollback(struct sl_store *store);

/* The published tables, into the arena; also hands the store the
 * vocabularies it writes words with, so `tables` must outlive the store.
 *
 * The conditions are the vintage's own where it has any, else the published
 * ones; its margin rules come behind the published ones, but one that has
 * the name of a published one takes its place.  Vintage 0 is none: all as
 * published.  `tables->year` is left as it is.  SL_REFUSED where there are
 * more margin rules than SL_RULES_MOST. */
enum sl_status sl_store_read_tables(struct sl_store *store, long long vintage,
                                    struct sl_arena *arena,
                                    struct sl_tables *tables,
                                    struct sl_error *error);

/* Prepare every statement of the catalogue: for the tests. */
enum sl_status sl_store_prepare_all(struct sl_store *store,
                                    struct sl_error *error);

#endif
