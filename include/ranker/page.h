/* The parts a report page is made of.
 *
 * A list is a table whose columns each know their label and how to write
 * their cell, so that head and rows cannot differ.  A list opens with its
 * first row; one that had none says so in words.  On a narrow screen each
 * row is a card: every cell carries its label, and roles keep the table a
 * table for a screen reader whatever the style does. */
#ifndef SL_RANKER_PAGE_H
#define SL_RANKER_PAGE_H

#include <stdbool.h>
#include <stddef.h>

#include "base/text.h"
#include "ranker/markup.h"
#include "ranker/report.h"

struct sl_page_column {
    const char *label;
    const char *look; /* classes: "number", "long", "brief", ... */
    void (*write)(const struct sl_report *report, const void *row);
    bool names_row; /* the row's header cell */
};

struct sl_page_list {
    const char *caption; /* fixed markup */
    const char *look;
    const struct sl_page_column *columns;
    size_t column_count;
    const char *empty; /* the sentence of a list without rows */
};

void sl_page_list_row(struct sl_report *report, const struct sl_page_list *list,
                      const void *row);
/* A row across all columns that tells more about the row before it. */
void sl_page_list_more(const struct sl_report *report,
                       const struct sl_page_list *list,
                       void (*write)(const struct sl_report *report,
                                     const void *row),
                       const void *row);
/* Close the list, or say that it is empty; ready for the next. */
void sl_page_list_end(struct sl_report *report,
                      const struct sl_page_list *list);

/* A section with its heading; `lead` is fixed markup.  Close with the next
 * call. */
void sl_page_section(const struct sl_report *report, const char *id,
                     const char *title, const char *lead);
void sl_page_section_end(const struct sl_report *report);

/* A state as mark and word. */
void sl_page_state(const struct sl_report *report, enum sl_state state);
/* The shapes the marks refer to; once a page. */
void sl_page_marks(const struct sl_report *report);

/* Text of an inventory, set apart so that its direction stays its own. */
void sl_page_name(const struct sl_report *report, const char *text);
/* Text of an inventory or of words.c. */
void sl_page_text(const struct sl_report *report, const char *text);
/* A sentence of words.c, which is then emptied and released. */
void sl_page_say(const struct sl_report *report, struct sl_text *text);

/* A number in the units shown, with its unit; "unknown" stands alone. */
void sl_page_quantity(const struct sl_report *report, enum sl_quantity quantity,
                      double si, int decimals);
/* The same without its unit. */
void sl_page_number(const struct sl_report *report, enum sl_quantity quantity,
                    double si, int decimals);
/* "21.0 °C (15.0 … 24.0)": typical, then adverse to favourable. */
void sl_page_interval(const struct sl_report *report, enum sl_quantity quantity,
                      const struct sl_interval *value);
/* "1 station", "2 stations" */
void sl_page_counted(const struct sl_report *report, long long count,
                     const char *one, const char *many);
const char *sl_page_unit(const struct sl_report *report,
                         enum sl_quantity quantity);

/* The first screen and the closing parts. */
void sl_page_front(const struct sl_report *report);
void sl_page_files(struct sl_report *report);
/* The published rows used beside the defaults: how walls age, limits of the
 * checks, and where K and roughness come from. */
void sl_page_published(struct sl_report *report);
void sl_page_glossary(const struct sl_report *report);

/* What a pump's balance does not hold: its running sets, flags, what the
 * margin rules say, how far it may go.  `row` is a struct sl_pump_row. */
void sl_page_beside(const struct sl_report *report, const void *row);
/* The section of the margin rules. */
void sl_page_rules(struct sl_report *report);

/* End the lists of stations, those that had no row among them; the section
 * of what to find out is left open for the pumps. */
void sl_page_stations_end(struct sl_report *report);
/* End the list of facts to find out and its section. */
void sl_page_unknowns_end(struct sl_report *report);
/* End the list of what was set aside and its section. */
void sl_page_set_aside_end(struct sl_report *report);

/* A pump, with its station and condition below it. */
void sl_page_pump(const struct sl_report *report, const char *pump_id,
                  const char *station, const char *condition);

#endif
