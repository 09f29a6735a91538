/* A file's records, one at a time, by libcsv in strict mode.
 *
 * A physical line at a time goes into the parser, so that the line a record
 * begins on is known though a quoted cell may span lines.  Lines of nothing
 * but blanks are no records.
 *
 * After a record that cannot be taken apart, reading resumes at the line
 * after the one it began on: a quote never closed costs one line, not the
 * rest of the file.  As continuing lines hold an even number of quotes, this
 * cannot go back over the same bytes again and again. */
#ifndef SL_IMPORTER_CSV_READER_H
#define SL_IMPORTER_CSV_READER_H

#include <csv.h>

#include "importer/lines.h"

enum sl_csv_outcome {
    SL_CSV_RECORD,
    SL_CSV_END,
    /* A quote where none can stand. */
    SL_CSV_STRAY_QUOTE,
    /* A quote opened and not closed on its line, nor rightly on a later one
     * of the file within SL_RECORD_BYTES. */
    SL_CSV_OPEN_QUOTE,
    /* One line longer than SL_RECORD_BYTES; raw is its beginning. */
    SL_CSV_TOO_LONG,
    /* A carriage return with no line feed behind, outside quotes. */
    SL_CSV_RETURN,
    /* A NUL or bytes that are no UTF-8; `bad` is the first's offset. */
    SL_CSV_BYTES
};

struct sl_cell {
    size_t at; /* in the reader's text */
    size_t length;
};

struct sl_csv_reader {
    struct sl_lines lines;
    struct csv_parser parser;
    size_t limit;   /* cells to keep of a record; the others are counted */
    bool skip_line; /* the line that was too long is still to be passed */

    /* The record last read; it lives until the next is.  After an outcome
     * other than SL_CSV_RECORD the cells are those met before the fault. */
    long line;
    const char *raw; /* as in the file, end of line included */
    size_t raw_length;
    size_t bad;
    struct sl_cell *cells; /* trimmed; each followed by a NUL in text */
    size_t count;          /* cells met, more than kept perhaps */
    size_t surplus;        /* cells past the limit that are not empty */
    char *text;
    /* For the reader itself. */
    size_t text_length, text_capacity, cell_capacity;
    int rows;
};

enum sl_status sl_csv_reader_init(struct sl_csv_reader *reader,
                                  struct sl_input_file *file,
                                  struct sl_error *error);
void sl_csv_reader_release(struct sl_csv_reader *reader);

enum sl_status sl_csv_reader_next(struct sl_csv_reader *reader,
                                  enum sl_csv_outcome *outcome,
                                  struct sl_error *error);

/* The text of a cell that was kept. */
static inline const char *sl_csv_cell(const struct sl_csv_reader *reader,
                                      size_t index)
{
    return reader->text + reader->cells[index].at;
}

/* A cell as far as it is there and fit to be shown; "" where it is not. */
const char *sl_csv_shown_cell(const struct sl_csv_reader *reader, size_t i);

/* A line of nothing but separators, as a spreadsheet leaves below a table:
 * it is no more a record than an empty line. */
bool sl_csv_is_blank(const struct sl_csv_reader *reader);

#endif
