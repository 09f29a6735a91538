/* What a vintage lacks: records that were rejected on import, which others
 * rest on.  Within the store room. */
#ifndef SL_STORE_MISSED_H
#define SL_STORE_MISSED_H

#include "base/status.h"
#include "model/records.h"
#include "store/store.h"

/* Learn once per vintage whether it has any grade, and any rejected record,
 * so that most dossiers cost no look-up for them. */
enum sl_status sl_learn_traits(struct sl_store *store, long long vintage,
                               struct sl_error *error);

/* How many rejected records of a kind had this key; of the station's pumps.
 * Only after sl_learn_traits(). */
enum sl_status sl_count_rejected(struct sl_store *store, long long vintage,
                                 enum sl_kind kind, const char *record_id,
                                 long long *rejected, struct sl_error *error);
enum sl_status sl_count_rejected_pumps(struct sl_store *store,
                                       long long vintage,
                                       const char *station_id,
                                       long long *rejected,
                                       struct sl_error *error);

#endif
