/* The second pass over one file: each record to its fate. */
#ifndef SL_IMPORTER_FILE_PASS_H
#define SL_IMPORTER_FILE_PASS_H

#include "importer/columns.h"
#include "importer/inventory.h"

struct sl_file_pass {
    enum sl_kind kind;
    const struct sl_columns *columns;
    const struct sl_vocabularies *vocabularies;
    int year; /* of the import; later ones are doubted */
    struct sl_input_file *file;
    const struct sl_sink *sink;
    struct sl_file_sum *sum;
    /* For progress: bytes of files read before, and of all files. */
    long long bytes_before;
    long long bytes_all;
};

/* Tell the sink how the columns were understood, then read every record.
 * SL_FILE when the file is not what its first pass saw. */
enum sl_status sl_file_pass_run(const struct sl_file_pass *pass,
                                struct sl_error *error);

/* Take back what the sink recalls once this kind is read. */
enum sl_status sl_file_pass_recall(const struct sl_file_pass *pass,
                                   struct sl_error *error);

#endif
