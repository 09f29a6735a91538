/* report.html: one file that needs nothing else, readable without script.
 *
 * Sections come in the order of the functions below; each list is a begin,
 * any number of rows, and the next section's begin or the end.  Memory does
 * not grow with the rows.  Text from an inventory reaches the page only
 * through the escaping call of src/ranker/markup. */
#ifndef SL_RANKER_REPORT_H
#define SL_RANKER_REPORT_H

#include <stdio.h>

#include "base/units.h"
#include "model/row.h"

struct sl_report {
    FILE *stream;
    enum sl_unit_system units;
    const struct sl_summary *summary;
    const struct sl_vocabularies *vocabularies;
    const struct sl_tables *tables; /* that it was judged by */
    long long rows;                 /* of the open list */
    int list;                       /* which list is open; the report's own */
};

/* Title, first screen: counts by state in words and what each state means,
 * what to do next, rule, conditions, vintage with hash and version, records
 * read, cautions. */
void sl_report_begin(struct sl_report *report);
/* Stations at risk, then clear ones, then those to find out about first:
 * rows in the order short, thin, clear, unproven. */
void sl_report_begin_ranked(struct sl_report *report);
void sl_report_station(struct sl_report *report,
                       const struct sl_station_row *row);
/* Find out first, pump by pump. */
void sl_report_begin_unknowns(struct sl_report *report);
void sl_report_unknown(struct sl_report *report,
                       const struct sl_unknown_row *row);
/* The terms: the head balance of every pump of a station at risk. */
void sl_report_begin_terms(struct sl_report *report);
void sl_report_pump(struct sl_report *report, const struct sl_pump_row *row);
/* What each margin rule says; records read, file by file; those rejected and
 * those out of scope. */
void sl_report_begin_set_aside(struct sl_report *report);
void sl_report_set_aside(struct sl_report *report,
                         const struct sl_set_aside_row *row);
/* Every default, its interval, its source, how often it was used; behind
 * them the other published rows, which are the tables'. */
void sl_report_begin_defaults(struct sl_report *report);
void sl_report_default(struct sl_report *report,
                       const struct sl_default_row *row);
/* What the words mean, and the foot. */
void sl_report_end(struct sl_report *report);

#endif
