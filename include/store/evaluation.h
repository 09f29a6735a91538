/* Writing and reading evaluations: the derived part, and the rows of the
 * ranked outputs.
 *
 * The order of the ranked outputs is said once, in sql/views and the
 * queries that read them. */
#ifndef SL_STORE_EVALUATION_H
#define SL_STORE_EVALUATION_H

#include <stdbool.h>

#include "base/status.h"
#include "model/result.h"
#include "model/row.h"
#include "store/store.h"

struct sl_evaluation {
    long long evaluation;
    long long vintage;
    const char *version; /* of the program */
    const char *rule;    /* the margin rule ranked on */
    int year;            /* of the audit */
};

/* The newest evaluation of this vintage by this version and rule, of this
 * year; a version or rule of NULL and a year of 0 are any.  Texts it sets
 * live as long as the store is open. */
enum sl_status sl_store_find_evaluation(struct sl_store *store,
                                        struct sl_evaluation *evaluation,
                                        bool *found, struct sl_error *error);
enum sl_status sl_store_add_evaluation(struct sl_store *store,
                                       struct sl_evaluation *evaluation,
                                       struct sl_error *error);
/* The margin rules the evaluation judges by; before any result. */
enum sl_status sl_store_add_rules(struct sl_store *store, long long evaluation,
                                  const struct sl_tables *tables,
                                  struct sl_error *error);
/* One station's results: its pumps' cases, unknowns, defaults used. */
enum sl_status sl_store_add_result(struct sl_store *store, long long evaluation,
                                   const struct sl_station_result *result,
                                   struct sl_error *error);

/* Everything of the summary but `version` and `conditions`, which are the
 * caller's; texts go into the arena. */
enum sl_status sl_store_read_summary(struct sl_store *store,
                                     long long evaluation,
                                     struct sl_arena *arena,
                                     struct sl_summary *summary,
                                     struct sl_error *error);

/* Calls `each` with every row in order; a status from it ends the reading
 * and is returned.  Texts in a row live for the call.  Stations come as
 * ranked: short, thin, clear, unproven; pumps in the order of their
 * stations, then by pump_id, then the mildest condition first; defaults come
 * all, used or not. */
enum sl_status sl_store_each_station(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_station_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_each_pump(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_pump_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_each_unknown(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_unknown_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_each_default(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_default_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_each_finding(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_finding *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);
enum sl_status sl_store_each_set_aside(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_set_aside_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error);

#endif
