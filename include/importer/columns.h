/* A file's header, understood once so that no record has to search names.
 *
 * A header is a field's name, with "_" and a unit where the field has a
 * dimension, or either of them with "_grade".  Case and surrounding blanks
 * do not matter.  What cannot be understood safely is told to a refusal;
 * what is merely not known is an unused column. */
#ifndef SL_IMPORTER_COLUMNS_H
#define SL_IMPORTER_COLUMNS_H

#include "base/memory.h"
#include "base/text.h"
#include "importer/csv_reader.h"
#include "model/fields.h"

/* More columns than this are no inventory: every kind together has some
 * eighty, and their grades. */
#define SL_COLUMNS_MOST 1000

struct sl_column {
    const char *header;           /* as written */
    const struct sl_field *field; /* NULL: unused */
    const struct sl_unit *unit;   /* NULL: none */
    bool is_grade;                /* of the field's value, not the value */
    bool is_key;                  /* names a record: its own or another */
    const char *use;              /* the field's name, "_grade" behind it */
};

struct sl_columns {
    const struct sl_record_kind *kind;
    struct sl_column *list; /* in the file's order */
    size_t count;           /* without unnamed ones at the end */
    size_t key;             /* the place of the kind's first field */
    size_t station;         /* the place of its station_id, else of the key */
    long line;              /* of the header */
    struct sl_arena arena;
};

/* Why an inventory is refused: as many problems as a message holds, of how
 * many there are. */
struct sl_refusal {
    struct sl_text problems;
    int told;
    int count;
};
void sl_refusal_add(struct sl_refusal *refusal, const char *format, ...)
    __attribute__((format(printf, 2, 3)));

/* Understand the record that `reader` holds as the header of a kind. */
void sl_columns_init(struct sl_columns *columns,
                     const struct sl_record_kind *kind,
                     const struct sl_csv_reader *reader,
                     struct sl_refusal *refusal);
void sl_columns_release(struct sl_columns *columns);

/* The column that holds a field's values, or NULL. */
const struct sl_column *sl_columns_of(const struct sl_columns *columns,
                                      const struct sl_field *field);

/* Put into `near` the column name of the kind that looks most like
 * `header`; false when none does. */
bool sl_columns_nearest(const struct sl_record_kind *kind, const char *header,
                        struct sl_text *near);

#endif
