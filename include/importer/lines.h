/* The physical lines of a file, and the way back.
 *
 * A record begins where sl_lines_mark() is called; until the next mark all
 * its bytes stay together at sl_lines_marked(), so its text as read is at
 * hand without a copy, and sl_lines_return() goes back into it without
 * reading again.  At most SL_RECORD_BYTES are kept: what is longer is no
 * record of a station but a quote that was never closed. */
#ifndef SL_IMPORTER_LINES_H
#define SL_IMPORTER_LINES_H

#include "importer/input_file.h"

/* The longest record, 1 MiB: a thousand times a full station with a page of
 * notes, and small enough to keep. */
#define SL_RECORD_BYTES ((size_t)1024 * 1024)

struct sl_lines {
    struct sl_input_file *file; /* the caller's */
    char *buffer;
    size_t mark;   /* where the record begins */
    size_t next;   /* where the next line begins */
    size_t filled; /* end of what was read */
    long line;     /* number of the line at `next`, from 1 */
    bool ended;    /* the file has no more to give */
};

enum sl_line_outcome {
    SL_LINE,
    SL_LINE_END, /* no line is left */
    /* The record would pass SL_RECORD_BYTES; nothing was taken. */
    SL_LINE_TOO_LONG
};

/* From the file's start; a byte order mark there is passed over. */
enum sl_status sl_lines_init(struct sl_lines *lines, struct sl_input_file *file,
                             struct sl_error *error);
void sl_lines_release(struct sl_lines *lines);

void sl_lines_mark(struct sl_lines *lines);
/* Where the marked record's bytes begin; moves when a line is read. */
const char *sl_lines_marked(const struct sl_lines *lines);
/* How many of them are taken. */
size_t sl_lines_marked_length(const struct sl_lines *lines);

/* Take the next line, its line feed with it; *line lives until the next
 * call. */
enum sl_status sl_lines_next(struct sl_lines *lines, const char **line,
                             size_t *length, enum sl_line_outcome *outcome,
                             struct sl_error *error);

/* Go back to `length` bytes after the mark, where line `line` begins. */
void sl_lines_return(struct sl_lines *lines, size_t length, long line);
/* Drop the record and everything to the end of the line at `next`. */
enum sl_status sl_lines_skip(struct sl_lines *lines, struct sl_error *error);

#endif
