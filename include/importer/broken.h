/* Records that cannot be taken apart: why, and what of them can be shown. */
#ifndef SL_IMPORTER_BROKEN_H
#define SL_IMPORTER_BROKEN_H

#include "importer/cell.h"

/* The problem behind an outcome other than SL_CSV_RECORD or SL_CSV_END. */
void sl_broken_problem(const struct sl_csv_reader *reader,
                       enum sl_csv_outcome outcome, struct sl_problem *problem);

/* The start of the record's first line, as far as it is text. */
void sl_broken_beginning(const struct sl_csv_reader *reader,
                         struct sl_text *shown);

#endif
