/* Reading conditions and margin rules, published and the owner's.  Within
 * the store room. */
#ifndef SL_STORE_RULES_H
#define SL_STORE_RULES_H

#include "base/memory.h"
#include "base/status.h"
#include "model/tables.h"
#include "store/store.h"

/* Sets tables->conditions: those the vintage is audited under. */
enum sl_status sl_read_conditions(struct sl_store *store, long long vintage,
                                  struct sl_arena *arena,
                                  struct sl_tables *tables,
                                  struct sl_error *error);

/* How many of the vintage's own conditions were rejected. */
enum sl_status sl_count_rejected_conditions(struct sl_store *store,
                                            long long vintage, long long *count,
                                            struct sl_error *error);

/* The rules of the vintage, or only the one named; none is no failure. */
enum sl_status sl_read_rules(struct sl_store *store, long long vintage,
                             const char *name, struct sl_arena *arena,
                             struct sl_margin_rule **rules, size_t *count,
                             struct sl_error *error);

#endif
