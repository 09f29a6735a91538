/* What looks wrong between the cells of one record that is kept. */
#ifndef SL_IMPORTER_DOUBTS_H
#define SL_IMPORTER_DOUBTS_H

#include <stddef.h>

#include "model/records.h"

struct sl_doubt {
    const char *code;
    const char *field; /* the one to look at first */
    const char *reason;
    const char *remedy;
};

#define SL_DOUBTS_MOST 5

/* The doubts about a record of a kind, read in `year`; how many there
 * are. */
size_t sl_doubts_find(enum sl_kind kind, const void *record, int year,
                      struct sl_doubt doubts[SL_DOUBTS_MOST]);

#endif
