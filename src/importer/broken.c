#include "importer/broken.h"

/* How much of a record a finding shows: about what people see of a line. */
#define SHOWN_BYTES 60

/* Where the byte at `offset` of the record is, for people. */
static void locate(const struct sl_csv_reader *reader, size_t offset,
                   long *line, size_t *byte)
{
    *line = reader->line;
    *byte = 1;
    for (size_t i = 0; i < offset; i++) {
        ++*byte;
        if (reader->raw[i] == '\n') {
            ++*line;
            *byte = 1;
        }
    }
}

static void bytes_problem(const struct sl_csv_reader *reader,
                          struct sl_problem *problem)
{
    unsigned bad = (unsigned char)reader->raw[reader->bad];
    long line = 0;
    size_t byte = 0;

    locate(reader, reader->bad, &line, &byte);
    sl_problem_set(problem, "bytes", "save the file as UTF-8 text",
                   "byte %zu of line %ld is 0x%02X, which is no UTF-8 text",
                   byte, line, bad);
}

void sl_broken_problem(const struct sl_csv_reader *reader,
                       enum sl_csv_outcome outcome, struct sl_problem *problem)
{
    switch (outcome) {
    case SL_CSV_RECORD:
    case SL_CSV_END:
        break;
    case SL_CSV_STRAY_QUOTE:
        sl_problem_set(problem, "quote",
                       "put the whole cell in quotes and double each quote "
                       "within it",
                       "a quote stands where none can");
        break;
    case SL_CSV_OPEN_QUOTE:
        sl_problem_set(problem, "quote", "close the quote or take it out",
                       "a quote opens here and is not rightly closed");
        break;
    case SL_CSV_TOO_LONG:
        sl_problem_set(problem, "line-length", "check how the file was made",
                       "the line is longer than 1 MiB");
        break;
    case SL_CSV_RETURN:
        sl_problem_set(problem, "line-end",
                       "end lines with a line feed, or with a carriage "
                       "return and a line feed",
                       "a carriage return stands within the line");
        break;
    case SL_CSV_BYTES:
        bytes_problem(reader, problem);
        break;
    }
}

void sl_broken_beginning(const struct sl_csv_reader *reader,
                         struct sl_text *shown)
{
    const char *raw = reader->raw;
    size_t length = 0;

    while (length < reader->raw_length && length < SHOWN_BYTES &&
           raw[length] != '\0' && raw[length] != '\r' && raw[length] != '\n')
        length++;
    sl_text_clear(shown);
    sl_text_add(shown, raw, sl_utf8_valid_length(raw, length));
}
