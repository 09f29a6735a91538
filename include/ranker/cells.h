/* The cells of a CSV table, by RFC 4180.
 *
 * A table is one function that walks its columns, each call giving a
 * column's name and its value: once for the head, when only the names are
 * written, and once for each row.  So head and rows cannot differ. */
#ifndef SL_RANKER_CELLS_H
#define SL_RANKER_CELLS_H

#include <stdbool.h>
#include <stdio.h>

#include "base/units.h"

struct sl_cells {
    FILE *stream;
    enum sl_unit_system units;
    bool naming; /* write the names, not the values */
    bool begun;  /* a cell of this line is written */
};

/* Text; one that a spreadsheet would take for a formula (= + - @ tab or
 * carriage return first) gets an apostrophe before it.  NULL is empty. */
void sl_cell_text(struct sl_cells *cells, const char *name, const char *text);
/* A number of a quantity, SI, in the unit shown, whose suffix ends the
 * column's name: heads to 3 decimals, flows to 2, temperatures to 1, pure
 * numbers to 6 significant digits; never "-0"; empty where unknown. */
void sl_cell_number(struct sl_cells *cells, const char *name,
                    enum sl_quantity quantity, double si);
/* The same, when column and unit are not the table's but the row's. */
void sl_cell_value(struct sl_cells *cells, const char *name,
                   enum sl_quantity quantity, double si);
/* A number without unit to so many decimals; empty where unknown. */
void sl_cell_decimal(struct sl_cells *cells, const char *name, double value,
                     int decimals);
void sl_cell_count(struct sl_cells *cells, const char *name, long long count);
void sl_cell_yes_no(struct sl_cells *cells, const char *name, bool yes);
/* CRLF. */
void sl_cells_end(struct sl_cells *cells);

#endif
