/* What an import has to say once all records are read: what no single record
 * shows. */
#ifndef SL_APP_NOTES_H
#define SL_APP_NOTES_H

#include "app/run.h"
#include "importer/inventory.h"

/* Tells the sink, after the inventory was read into the run's vintage. */
enum sl_status sl_notes_tell(struct sl_run *run,
                             const struct sl_inventory *inventory,
                             struct sl_sink *sink, struct sl_error *error);

#endif
