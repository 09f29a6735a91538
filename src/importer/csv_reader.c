#include "importer/csv_reader.h"

#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#include "base/memory.h"
#include "base/text.h"

#define OPTIONS                                                                \
    (CSV_STRICT | CSV_STRICT_FINI | CSV_APPEND_NULL | CSV_EMPTY_IS_NULL)

static bool is_blank(char c)
{
    return c == ' ' || c == '\t' || c == '\r' || c == '\n';
}

/* libcsv's callback at the end of a cell.  There is room: see feed(). */
static void take_cell(void *bytes, size_t length, void *context)
{
    struct sl_csv_reader *reader = context;
    const char *cell = bytes;

    while (length > 0 && is_blank(cell[0])) {
        cell++;
        length--;
    }
    while (length > 0 && is_blank(cell[length - 1]))
        length--;
    if (reader->count++ >= reader->limit) {
        reader->surplus += length > 0;
        return;
    }
    reader->cells = sl_grow(reader->cells, &reader->cell_capacity,
                            reader->count, sizeof *reader->cells);
    reader->cells[reader->count - 1] =
        (struct sl_cell){reader->text_length, length};
    if (length > 0)
        memcpy(reader->text + reader->text_length, cell, length);
    reader->text[reader->text_length + length] = '\0';
    reader->text_length += length + 1;
}

/* libcsv's callback at the end of a record. */
static void take_row(int terminator, void *context)
{
    struct sl_csv_reader *reader = context;

    (void)terminator;
    reader->rows++;
}

static void parser_init(struct sl_csv_reader *reader)
{
    csv_init(&reader->parser, OPTIONS);
    csv_set_blk_size(&reader->parser, SL_PIECE_BYTES);
}

enum sl_status sl_csv_reader_init(struct sl_csv_reader *reader,
                                  struct sl_input_file *file,
                                  struct sl_error *error)
{
    *reader = (struct sl_csv_reader){.limit = SIZE_MAX};
    parser_init(reader);
    return sl_lines_init(&reader->lines, file, error);
}

void sl_csv_reader_release(struct sl_csv_reader *reader)
{
    sl_lines_release(&reader->lines);
    csv_free(&reader->parser);
    free(reader->cells);
    free(reader->text);
    *reader = (struct sl_csv_reader){0};
}

/* Parse some bytes of the record; false on a stray quote. */
static bool parse(struct sl_csv_reader *reader, const char *bytes,
                  size_t length)
{
    return csv_parse(&reader->parser, bytes, length, take_cell, take_row,
                     reader) == length;
}

/* Parse one line.  Its end goes in on its own: a record that ended before
 * it did so at a bare carriage return. */
static enum sl_csv_outcome feed(struct sl_csv_reader *reader, const char *line,
                                size_t length)
{
    size_t body = length;

    /* A cell's bytes and its NUL never take more than its bytes in the file
     * and the comma or line end behind; one more for a file's last cell. */
    reader->text = sl_grow(reader->text, &reader->text_capacity,
                           sl_lines_marked_length(&reader->lines) + 1, 1);
    while (body > 0 && (line[body - 1] == '\n' || line[body - 1] == '\r'))
        body--;
    if (!parse(reader, line, body))
        return SL_CSV_STRAY_QUOTE;
    if (reader->rows > 0)
        return SL_CSV_RETURN;
    if (!parse(reader, line + body, length - body))
        return SL_CSV_STRAY_QUOTE;
    return SL_CSV_RECORD;
}

/* The offset of the first NUL or byte that is not UTF-8, or the length.
 * Most records are ASCII throughout: those are seen off eight bytes at a
 * time, (w - 1s) & ~w & 80s being how a word tells it holds a zero byte. */
static size_t sound_length(const char *bytes, size_t length)
{
    const uint64_t ones = UINT64_C(0x0101010101010101);
    const uint64_t highs = UINT64_C(0x8080808080808080);
    size_t at = 0;
    const char *nul;
    uint64_t word;

    for (; at + sizeof word <= length; at += sizeof word) {
        memcpy(&word, bytes + at, sizeof word);
        if (((word - ones) | word) & highs)
            break;
    }
    nul = memchr(bytes + at, '\0', length - at);
    if (nul)
        length = (size_t)(nul - bytes);
    return at + sl_utf8_valid_length(bytes + at, length - at);
}

static bool blank_line(const char *line, size_t length)
{
    while (length > 0 && is_blank(*line)) {
        line++;
        length--;
    }
    return length == 0;
}

static void begin(struct sl_csv_reader *reader)
{
    sl_lines_mark(&reader->lines);
    reader->line = reader->lines.line;
    reader->count = reader->surplus = reader->text_length = 0;
    reader->rows = 0;
    reader->raw_length = 0;
}

/* Drop the record under way and resume behind its first line. */
static void recover(struct sl_csv_reader *reader, size_t first_length)
{
    sl_lines_return(&reader->lines, first_length, reader->line + 1);
    csv_free(&reader->parser);
    parser_init(reader);
}

/* The end of the file, or more bytes than a record may have, was met while
 * a record is under way. */
static enum sl_csv_outcome finish(struct sl_csv_reader *reader,
                                  enum sl_line_outcome met)
{
    if (met == SL_LINE_TOO_LONG &&
        sl_lines_marked_length(&reader->lines) == 0) {
        reader->skip_line = true;
        return SL_CSV_TOO_LONG;
    }
    if (met == SL_LINE_TOO_LONG ||
        csv_fini(&reader->parser, take_cell, take_row, reader) != 0)
        return SL_CSV_OPEN_QUOTE;
    return SL_CSV_RECORD;
}

/* Read lines until a record is complete or cannot become one. */
static enum sl_status gather(struct sl_csv_reader *reader, size_t *first_length,
                             enum sl_csv_outcome *outcome,
                             struct sl_error *error)
{
    enum sl_line_outcome met = SL_LINE;
    const char *line = NULL;
    size_t length = 0;

    *first_length = 0;
    *outcome = SL_CSV_RECORD;
    while (*outcome == SL_CSV_RECORD && reader->rows == 0) {
        enum sl_status status =
            sl_lines_next(&reader->lines, &line, &length, &met, error);

        if (status)
            return status;
        if (met == SL_LINE_END && *first_length == 0) {
            *outcome = SL_CSV_END;
        } else if (met != SL_LINE) {
            *outcome = finish(reader, met);
            return SL_OK;
        } else if (*first_length == 0 && blank_line(line, length)) {
            begin(reader);
        } else {
            bool continued = *first_length > 0;

            if (!continued)
                *first_length = length;
            *outcome = feed(reader, line, length);
            /* The quote to blame is the one that made it go on. */
            if (continued && *outcome == SL_CSV_STRAY_QUOTE)
                *outcome = SL_CSV_OPEN_QUOTE;
        }
    }
    return SL_OK;
}

enum sl_status sl_csv_reader_next(struct sl_csv_reader *reader,
                                  enum sl_csv_outcome *outcome,
                                  struct sl_error *error)
{
    size_t first_length = 0;
    enum sl_status status = SL_OK;

    if (reader->skip_line)
        status = sl_lines_skip(&reader->lines, error);
    reader->skip_line = false;
    if (status)
        return status;
    begin(reader);
    status = gather(reader, &first_length, outcome, error);
    if (status)
        return status;
    if (*outcome != SL_CSV_RECORD && first_length > 0)
        recover(reader, first_length);
    reader->raw = sl_lines_marked(&reader->lines);
    reader->raw_length = *outcome == SL_CSV_TOO_LONG
                             ? SL_RECORD_BYTES
                             : sl_lines_marked_length(&reader->lines);
    if (*outcome == SL_CSV_RECORD) {
        reader->bad = sound_length(reader->raw, reader->raw_length);
        if (reader->bad < reader->raw_length)
            *outcome = SL_CSV_BYTES;
    }
    return SL_OK;
}

const char *sl_csv_shown_cell(const struct sl_csv_reader *reader, size_t i)
{
    const char *text;

    if (i >= reader->count)
        return "";
    text = sl_csv_cell(reader, i);
    if (strlen(text) < reader->cells[i].length ||
        sl_utf8_valid_length(text, reader->cells[i].length) <
            reader->cells[i].length)
        return "";
    return text;
}

bool sl_csv_is_blank(const struct sl_csv_reader *reader)
{
    for (size_t i = 0; i < reader->count; i++)
        if (reader->cells[i].length > 0)
            return false;
    return reader->surplus == 0;
}
