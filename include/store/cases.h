/* Inside the store's room only: the head balance of a pump as columns. */
#ifndef SL_STORE_CASES_H
#define SL_STORE_CASES_H

#include "model/result.h"
#include "store/statement.h"

/* The figures of each corner, and the terms of the typical one. */
void sl_bind_cases(struct sl_statement *statement,
                   const struct sl_case cases[SL_CORNER_COUNT]);
/* Terms that are not kept are NaN: those of the other corners, but npsha. */
void sl_read_cases(struct sl_statement *statement,
                   struct sl_case cases[SL_CORNER_COUNT]);

#endif
