/* Writing and reading vintages: the facts. */
#ifndef SL_STORE_VINTAGE_H
#define SL_STORE_VINTAGE_H

#include <stdbool.h>
#include <stddef.h>

#include "base/memory.h"
#include "base/status.h"
#include "model/dossier.h"
#include "model/finding.h"
#include "model/records.h"
#include "store/store.h"

struct sl_vintage {
    long long vintage; /* the store's key, from 1 */
    const char *label;
    const char *inventory_sha256;
    const char *imported_at; /* ISO 8601, UTC */
};

/* The vintage with this content, or the newest when `sha256` is NULL;
 * *found false when there is none.  Texts go into the arena. */
enum sl_status sl_store_find_vintage(struct sl_store *store, const char *sha256,
                                     struct sl_arena *arena,
                                     struct sl_vintage *vintage, bool *found,
                                     struct sl_error *error);
/* Begin a new one; sets vintage->vintage. */
enum sl_status sl_store_add_vintage(struct sl_store *store,
                                    struct sl_vintage *vintage,
                                    struct sl_error *error);

/* Keep one record, or say why it cannot be kept. */
enum sl_status sl_store_add_record(struct sl_store *store, long long vintage,
                                   enum sl_kind kind, const void *record,
                                   struct sl_answer *answer,
                                   struct sl_error *error);
enum sl_status sl_store_add_set_aside(struct sl_store *store, long long vintage,
                                      const struct sl_aside *aside,
                                      struct sl_error *error);
/* Take back one pipe whose draws_from is not kept, is another station's or
 * leads back to itself: station by station in the order they were kept,
 * within one by line.  A pipe that draws from one taken back follows in a
 * later call, so set each aside before asking for the next.  *found false
 * when all are sound.  To be called when all pipes are read and before
 * anything refers to them. */
enum sl_status sl_store_recall_pipe(struct sl_store *store, long long vintage,
                                    struct sl_recall *recall, bool *found,
                                    struct sl_error *error);
enum sl_status sl_store_add_finding(struct sl_store *store, long long vintage,
                                    const struct sl_finding *finding,
                                    struct sl_error *error);
enum sl_status sl_store_add_column(struct sl_store *store, long long vintage,
                                   const struct sl_column_use *use,
                                   struct sl_error *error);
enum sl_status sl_store_add_file(struct sl_store *store, long long vintage,
                                 const struct sl_file_sum *sum,
                                 struct sl_error *error);
/* Calls `each` with every curve and suction pipe that nothing kept refers
 * to, by file and line; texts live for the call. */
enum sl_status sl_store_each_unused(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const char *file, long line,
                           const char *id, struct sl_error *error),
    void *context, struct sl_error *error);
/* An owner's margin rule beside those it may be taken for. */
struct sl_rule_name {
    const char *rule;
    long line;
    const char *shipped; /* the shipped one of its name, letter case aside */
    long first_line;     /* of the owner's of its name, letter case aside */
};
/* Calls `each` with every margin rule of the owner's, by line; `shipped` is
 * "" where there is none.  Letters are those of ASCII.  Texts live for the
 * call. */
enum sl_status sl_store_each_rule_name(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_rule_name *name,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_read_files(struct sl_store *store, long long vintage,
                                   struct sl_file_sum sums[SL_KIND_COUNT],
                                   struct sl_error *error);

/* The dossiers of a vintage in order of station_id: reset the arena between
 * calls.  *found false after the last.  `after` is "" at first, then the
 * last station_id given. */
enum sl_status sl_store_next_dossier(struct sl_store *store, long long vintage,
                                     const char *after, struct sl_arena *arena,
                                     struct sl_dossier *dossier, bool *found,
                                     struct sl_error *error);
/* The dossier of the station that has this pump. */
enum sl_status sl_store_dossier_of_pump(struct sl_store *store,
                                        long long vintage, const char *pump_id,
                                        struct sl_arena *arena,
                                        struct sl_dossier *dossier, bool *found,
                                        struct sl_error *error);
/* -1 when it cannot be read. */
long long sl_store_count_stations(struct sl_store *store, long long vintage);

#endif
