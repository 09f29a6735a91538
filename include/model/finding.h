/* What the importer has to say about an inventory.
 *
 * Severity decides the record's fate: an error rejects it, a doubt keeps it
 * and is told, a note is about a file or a column and costs no record. */
#ifndef SL_MODEL_FINDING_H
#define SL_MODEL_FINDING_H

#include <stdbool.h>
#include <stddef.h>

#include "base/units.h"
#include "model/records.h"

enum sl_severity { SL_ERROR, SL_DOUBT, SL_NOTE };
const char *sl_severity_name(enum sl_severity severity);

/* Texts belong to the teller and live for the call. */
struct sl_finding {
    const char *code; /* stable, e.g. "number-form" */
    enum sl_severity severity;
    const char *file;      /* "pumps.csv" */
    long line;             /* 0: about the file as a whole */
    const char *column;    /* the header as written; "" when about the record */
    const char *record_id; /* the record's key, "" when it has none */
    const char *value;     /* the cell as written */
    const char *reason;
    const char *remedy;
};

/* What became of a record.  Each record read has exactly one fate. */
enum sl_fate { SL_KEPT, SL_REJECTED, SL_OUT_OF_SCOPE };
const char *sl_fate_name(enum sl_fate fate);

/* A record that is not kept, told by its importer. */
struct sl_aside {
    enum sl_kind kind;
    enum sl_fate fate;
    long line;
    const char *record_id;  /* its key, "" when it has none */
    const char *station_id; /* of a pump or pipe, as written; else "" */
    const char *reason;
    const char *raw; /* its text as read; NULL of a pipe taken back */
    size_t raw_length;
};

/* One inventory file, counted.  read = kept + rejected + out_of_scope. */
struct sl_file_sum {
    const char *file;
    bool present;
    char sha256[65];
    long long bytes;
    long long read;
    long long kept;
    long long rejected;
    long long out_of_scope;
};

/* How one column was understood. */
struct sl_column_use {
    const char *file;
    int position; /* from 1 */
    const char *header;
    const char *field;          /* "" when unused */
    const struct sl_unit *unit; /* NULL when it has none */
};

/* What only the place where records are kept can know about a new one. */
enum sl_answer_kind {
    SL_ANSWER_KEPT,
    /* Its key is taken by the record at `line` of its own file. */
    SL_ANSWER_DUPLICATE,
    /* `field` names a record that no file has. */
    SL_ANSWER_NO_SUCH,
    /* `field` names a record that was rejected, at `line` of `file`. */
    SL_ANSWER_REFERENCE_REJECTED,
    /* `field` names a record that is out of scope, at `line` of `file`. */
    SL_ANSWER_REFERENCE_OUT_OF_SCOPE,
    /* `field` names a record of another station. */
    SL_ANSWER_OTHER_STATION,
    /* Following `field` leads back to the record itself. */
    SL_ANSWER_CYCLE
};

struct sl_answer {
    enum sl_answer_kind kind;
    const char *field; /* the referring field, e.g. "station_id" */
    const char *file;  /* of the record referred to */
    long line;
};

/* A record already kept that has to be taken back, because what it draws
 * from turned out not to be there: only pipes refer within their own file. */
struct sl_recall {
    char record_id[256];
    char value[256]; /* what it referred to */
    long line;
    struct sl_answer answer;
};

#endif
