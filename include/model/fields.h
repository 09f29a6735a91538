/* The one list of the inventory's columns.
 *
 * Each kind of record has its fields: the column's name without unit, what
 * it holds, its valid range in SI, where it goes in the record's struct,
 * what it means and what follows from leaving it out.  The importer reads
 * by this list, the store binds and fetches by it, docs/inventory.md is
 * checked against it.  To add a column, add a row here, a member in
 * model/records.h and a migration. */
#ifndef SL_MODEL_FIELDS_H
#define SL_MODEL_FIELDS_H

#include <stdbool.h>
#include <stddef.h>

#include "base/units.h"
#include "model/records.h"
#include "model/vocabulary.h"

enum sl_field_type {
    SL_FIELD_TEXT,   /* const char * */
    SL_FIELD_NUMBER, /* struct sl_number */
    SL_FIELD_WHOLE,  /* struct sl_number with no fraction: counts, years */
    SL_FIELD_WORD    /* int, a place in a vocabulary */
};

struct sl_field {
    const char *name;
    enum sl_field_type type;
    enum sl_quantity quantity;     /* of numbers */
    enum sl_vocabulary vocabulary; /* of words */
    bool required;                 /* a record without it is rejected */
    double lowest;                 /* SI, inclusive */
    double highest;                /* SI, inclusive */
    size_t offset;
    const char *meaning;
    const char *left_out; /* what follows from not knowing it */
};

struct sl_record_kind {
    const char *name;  /* "station" */
    const char *file;  /* "stations.csv" */
    const char *table; /* "stations" */
    const struct sl_field *fields;
    size_t field_count;
    size_t size; /* of the record's struct */
};

const struct sl_record_kind *sl_record_kind(enum sl_kind kind);

/* The field of that name, or NULL. */
const struct sl_field *sl_field_by_name(const struct sl_record_kind *kind,
                                        const char *name, size_t length);

/* The member of a record that a field names. */
struct sl_number *sl_field_number(const struct sl_field *field, void *record);
const char **sl_field_text(const struct sl_field *field, void *record);
int *sl_field_word(const struct sl_field *field, void *record);

#endif
