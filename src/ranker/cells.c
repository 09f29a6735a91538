#include "ranker/cells.h"

#include <math.h>
#include <string.h>

#include "base/text.h"
#include "ranker/digits.h"

/* A control character that a terminal would obey is shown as its picture
 * (U+2400 on); line ends and tabs are text. */
static void write_character(FILE *stream, char character)
{
    unsigned char code = (unsigned char)character;

    if ((code >= 0x20 && code != 0x7F) || strchr("\t\r\n", character)) {
        fputc(character, stream);
        return;
    }
    fputs("\xE2\x90", stream);
    fputc(code == 0x7F ? 0xA1 : 0x80 + code, stream);
}

/* U+0080 to U+009F: controls too, and without a picture. */
static bool is_late_control(const char *text)
{
    return (unsigned char)text[0] == 0xC2 && (unsigned char)text[1] >= 0x80 &&
           (unsigned char)text[1] <= 0x9F;
}

static void write_characters(FILE *stream, const char *text)
{
    for (; *text != '\0'; text++) {
        if (is_late_control(text)) {
            fputs("\uFFFD", stream);
            text++;
            continue;
        }
        if (*text == '"')
            fputc('"', stream);
        write_character(stream, *text);
    }
}

/* A quote is doubled within quotes, and is not met outside them. */
static void write_plain_or_quoted(FILE *stream, const char *text)
{
    const char *quote = strpbrk(text, ",\"\r\n") ? "\"" : "";

    fputs(quote, stream);
    write_characters(stream, text);
    fputs(quote, stream);
}

static void begin_cell(struct sl_cells *cells)
{
    if (cells->begun)
        fputc(',', cells->stream);
    cells->begun = true;
}

/* Begin the cell; true when its name was all there is to write. */
static bool named(struct sl_cells *cells, const char *name, const char *suffix)
{
    begin_cell(cells);
    if (!cells->naming)
        return false;
    fputs(name, cells->stream);
    if (suffix[0] != '\0') {
        fputc('_', cells->stream);
        fputs(suffix, cells->stream);
    }
    return true;
}

static bool reads_as_formula(const char *text)
{
    return text[0] != '\0' && strchr("=+-@\t\r", text[0]) != NULL;
}

void sl_cell_text(struct sl_cells *cells, const char *name, const char *text)
{
    struct sl_text safe = {0};

    if (named(cells, name, "") || !text)
        return;
    if (reads_as_formula(text))
        sl_text_add_string(&safe, "'");
    sl_text_add_string(&safe, text);
    write_plain_or_quoted(cells->stream, sl_text_string(&safe));
    sl_text_release(&safe);
}

static void write_decimal(FILE *stream, double value, int decimals)
{
    struct sl_text digits = {0};

    if (!isfinite(value))
        return;
    sl_digits_add(&digits, &sl_digits_machine, value, decimals);
    fputs(digits.bytes, stream);
    sl_text_release(&digits);
}

/* What a pump can tell apart, and no digit that only looks like knowledge:
 * millimetres of head, hundredths of a litre, tenths of a degree. */
static void write_quantity(FILE *stream, enum sl_quantity quantity,
                           double value)
{
    static const int decimals[] = {
        [SL_LENGTH] = 3,
        [SL_BORE] = 3,
        [SL_FLOW] = 2,
        [SL_PRESSURE] = 2,
        [SL_TEMPERATURE] = 1,
        [SL_SPEED] = 1,
        [SL_POWER] = 2,
        [SL_VELOCITY] = 3,
        [SL_TEMPERATURE_DIFFERENCE] = 1,
    };

    if (quantity != SL_PURE)
        write_decimal(stream, value, decimals[quantity]);
    else if (isfinite(value))
        fprintf(stream, "%.6g", value == 0 ? 0.0 : value);
}

void sl_cell_number(struct sl_cells *cells, const char *name,
                    enum sl_quantity quantity, double si)
{
    const struct sl_unit *unit = sl_unit_shown(quantity, cells->units);

    if (!named(cells, name, unit->suffix))
        write_quantity(cells->stream, quantity, sl_from_si(unit, si));
}

void sl_cell_value(struct sl_cells *cells, const char *name,
                   enum sl_quantity quantity, double si)
{
    if (!named(cells, name, ""))
        write_quantity(cells->stream, quantity,
                       sl_shown(quantity, cells->units, si));
}

void sl_cell_decimal(struct sl_cells *cells, const char *name, double value,
                     int decimals)
{
    if (!named(cells, name, ""))
        write_decimal(cells->stream, value, decimals);
}

void sl_cell_count(struct sl_cells *cells, const char *name, long long count)
{
    if (!named(cells, name, ""))
        fprintf(cells->stream, "%lld", count);
}

void sl_cell_yes_no(struct sl_cells *cells, const char *name, bool yes)
{
    sl_cell_text(cells, name, yes ? "yes" : "no");
}

void sl_cells_end(struct sl_cells *cells)
{
    fputs("\r\n", cells->stream);
    cells->begun = false;
}
