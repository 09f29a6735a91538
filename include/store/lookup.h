/* Inside the store's room only: records by the owner's key. */
#ifndef SL_STORE_LOOKUP_H
#define SL_STORE_LOOKUP_H

#include <stdbool.h>

#include "base/status.h"
#include "model/finding.h"
#include "model/records.h"
#include "store/store.h"

struct sl_found {
    bool is_kept;
    long long key;     /* the store's */
    long long station; /* of a pipe: its station's key */
    long line;
};

/* A kept station, pipe or pump by its key; a curve by any of its points. */
enum sl_status sl_store_look_up(struct sl_store *store, long long vintage,
                                enum sl_kind kind, const char *id,
                                struct sl_found *found, struct sl_error *error);
enum sl_status sl_store_look_up_point(struct sl_store *store, long long vintage,
                                      const char *curve_id, double flow,
                                      struct sl_found *found,
                                      struct sl_error *error);

/* Set kind, file and line of an answer about a record that is not kept. */
enum sl_status sl_store_why_not_kept(struct sl_store *store, long long vintage,
                                     enum sl_kind kind, const char *id,
                                     struct sl_answer *answer,
                                     struct sl_error *error);

#endif
