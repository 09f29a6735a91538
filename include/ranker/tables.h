/* The ranked results as CSV: RFC 4180 with CRLF, UTF-8, one head row with
 * units in the names, numbers with a point and no grouping, empty where
 * unknown.  A text cell that a spreadsheet would take for a formula gets an
 * apostrophe before it; numbers never do.  Control characters but line ends
 * and tabs are shown as their pictures (U+0080-009F, which have none, as
 * U+FFFD), not sent.
 *
 * Each table is a head, then rows in the order given.  Writing errors latch
 * in the stream and are reported when the file is committed. */
#ifndef SL_RANKER_TABLES_H
#define SL_RANKER_TABLES_H

#include <stdio.h>

#include "base/units.h"
#include "model/row.h"

struct sl_table_writer {
    FILE *stream;
    enum sl_unit_system units;
    const struct sl_summary *summary; /* rule, vintage */
    const struct sl_vocabularies *vocabularies;
};

/* ranked-stations.csv: one row a station. */
void sl_table_stations_head(const struct sl_table_writer *writer);
void sl_table_station(const struct sl_table_writer *writer,
                      const struct sl_station_row *row);
/* pumps.csv: one row a pump and condition, all terms of the typical corner
 * and the margins at all three. */
void sl_table_pumps_head(const struct sl_table_writer *writer);
void sl_table_pump(const struct sl_table_writer *writer,
                   const struct sl_pump_row *row);
/* find-out-first.csv */
void sl_table_unknowns_head(const struct sl_table_writer *writer);
void sl_table_unknown(const struct sl_table_writer *writer,
                      const struct sl_unknown_row *row);
/* findings.csv */
void sl_table_findings_head(const struct sl_table_writer *writer);
void sl_table_finding(const struct sl_table_writer *writer,
                      const struct sl_finding *finding);

#endif
