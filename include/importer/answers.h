/* What a sink's answer means for a record, in words. */
#ifndef SL_IMPORTER_ANSWERS_H
#define SL_IMPORTER_ANSWERS_H

#include "importer/cell.h"
#include "model/finding.h"

/* The fate that an answer gives a record of a kind, and why.  `value` is
 * what the record's answer->field holds (its key for a duplicate). */
enum sl_fate sl_answer_fate(const struct sl_record_kind *kind,
                            const struct sl_answer *answer, const char *value,
                            struct sl_problem *problem);

#endif
