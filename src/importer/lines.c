#include "importer/lines.h"

#include <stdlib.h>
#include <string.h>

#include "base/memory.h"

#define BYTE_ORDER_MARK "\xEF\xBB\xBF"
#define BYTE_ORDER_MARK_LENGTH 3

/* Move the record to the front and read one piece behind it. */
static enum sl_status fill(struct sl_lines *lines, struct sl_error *error)
{
    size_t kept = lines->filled - lines->mark;
    size_t length = 0;
    enum sl_status status;

    memmove(lines->buffer, lines->buffer + lines->mark, kept);
    lines->next -= lines->mark;
    lines->mark = 0;
    lines->filled = kept;
    status =
        sl_input_file_read(lines->file, lines->buffer + kept, &length, error);
    lines->filled += length;
    lines->ended = length == 0;
    return status;
}

enum sl_status sl_lines_init(struct sl_lines *lines, struct sl_input_file *file,
                             struct sl_error *error)
{
    enum sl_status status;

    *lines = (struct sl_lines){.file = file, .line = 1};
    /* A record just within the limit, and a piece read behind it. */
    lines->buffer = sl_new(SL_RECORD_BYTES + SL_PIECE_BYTES, 1);
    status = sl_input_file_rewind(file, error);
    if (!status)
        status = fill(lines, error);
    if (!status && lines->filled >= BYTE_ORDER_MARK_LENGTH &&
        memcmp(lines->buffer, BYTE_ORDER_MARK, BYTE_ORDER_MARK_LENGTH) == 0)
        lines->mark = lines->next = BYTE_ORDER_MARK_LENGTH;
    return status;
}

void sl_lines_release(struct sl_lines *lines)
{
    free(lines->buffer);
    *lines = (struct sl_lines){0};
}

void sl_lines_mark(struct sl_lines *lines)
{
    lines->mark = lines->next;
}

const char *sl_lines_marked(const struct sl_lines *lines)
{
    return lines->buffer + lines->mark;
}

size_t sl_lines_marked_length(const struct sl_lines *lines)
{
    return lines->next - lines->mark;
}

/* Where the line at `next` ends within the buffer, its line feed included;
 * `next` itself when no line feed is there yet. */
static size_t line_end(const struct sl_lines *lines, size_t searched)
{
    const char *from = lines->buffer + lines->next + searched;
    const char *feed =
        memchr(from, '\n', lines->filled - lines->next - searched);

    return feed ? (size_t)(feed - lines->buffer) + 1 : lines->next;
}

enum sl_status sl_lines_next(struct sl_lines *lines, const char **line,
                             size_t *length, enum sl_line_outcome *outcome,
                             struct sl_error *error)
{
    size_t searched = 0;
    size_t end;

    while ((end = line_end(lines, searched)) == lines->next) {
        enum sl_status status;

        if (lines->ended || lines->filled - lines->mark > SL_RECORD_BYTES) {
            end = lines->filled;
            break;
        }
        searched = lines->filled - lines->next;
        status = fill(lines, error);
        if (status)
            return status;
    }
    *line = lines->buffer + lines->next;
    *length = end - lines->next;
    *outcome = SL_LINE;
    if (end - lines->mark > SL_RECORD_BYTES) {
        *outcome = SL_LINE_TOO_LONG;
    } else if (*length == 0) {
        *outcome = SL_LINE_END;
    } else {
        lines->next = end;
        lines->line++;
    }
    return SL_OK;
}

void sl_lines_return(struct sl_lines *lines, size_t length, long line)
{
    lines->next = lines->mark + length;
    lines->line = line;
}

enum sl_status sl_lines_skip(struct sl_lines *lines, struct sl_error *error)
{
    for (;;) {
        enum sl_status status;
        size_t end = line_end(lines, 0);

        if (end != lines->next || lines->ended) {
            lines->next = end != lines->next ? end : lines->filled;
            lines->mark = lines->next;
            lines->line++;
            return SL_OK;
        }
        lines->next = lines->mark = lines->filled;
        status = fill(lines, error);
        if (status)
            return status;
    }
}
