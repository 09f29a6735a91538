/* Inside the store's room only: what was found over all running sets of a
 * pump, and by every margin rule, as columns. */
#ifndef SL_STORE_RUNNING_SETS_H
#define SL_STORE_RUNNING_SETS_H

#include "base/text.h"
#include "model/row.h"
#include "store/statement.h"

/* `room` holds the texts made for it until the statement was run. */
struct sl_sets_room {
    struct sl_text flags, rule_states;
};

void sl_bind_sets(struct sl_statement *statement,
                  const struct sl_pump_result *pump, struct sl_sets_room *room);
void sl_sets_room_release(struct sl_sets_room *room);
/* Texts live until the statement's next step. */
void sl_read_sets(struct sl_statement *row, struct sl_pump_row *pump);

/* Adds to the store's counts what every rule says of a pump by its worst
 * condition; they are written with the uses of defaults. */
void sl_count_rules(struct sl_store *store,
                    const struct sl_station_result *result, size_t pump);
enum sl_status sl_store_write_rule_counts(struct sl_store *store,
                                          struct sl_error *error);

#endif
