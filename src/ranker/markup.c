#include "ranker/markup.h"

#include <stdbool.h>
#include <string.h>

#include "base/text.h"
#include "ranker/digits.h"

#define REPLACEMENT "\uFFFD"

void sl_markup(FILE *stream, const char *fixed)
{
    fputs(fixed, stream);
}

/* Bytes of the character that begins at `text`, 0 if it is not UTF-8. */
static size_t character_length(const char *text, size_t left)
{
    for (size_t length = 1; length <= 4 && length <= left; length++)
        if (sl_utf8_valid_length(text, length) == length)
            return length;
    return 0;
}

static unsigned long character_code(const char *text, size_t length)
{
    static const unsigned char lead_bits[] = {0, 0x7F, 0x1F, 0x0F, 0x07};
    unsigned long code = (unsigned char)text[0] & lead_bits[length];

    for (size_t i = 1; i < length; i++)
        code = code << 6 | ((unsigned char)text[i] & 0x3FU);
    return code;
}

/* Not to be sent: see the header for the list. */
static bool is_hidden(unsigned long code)
{
    static const unsigned long ranges[][2] = {
        {0x80, 0x9F},     {0x061C, 0x061C}, {0x200E, 0x200F},
        {0x2028, 0x202E}, {0x2066, 0x2069}, {0xFDD0, 0xFDEF},
    };

    for (size_t i = 0; i < sizeof ranges / sizeof ranges[0]; i++)
        if (code >= ranges[i][0] && code <= ranges[i][1])
            return true;
    return (code & 0xFFFE) == 0xFFFE;
}

/* U+2400 + code is the picture of a control; U+2421 that of delete. */
static void write_control(FILE *stream, unsigned char code)
{
    fputs("\xE2\x90", stream);
    fputc(code == 0x7F ? 0xA1 : 0x80 + code, stream);
}

static void write_ascii(FILE *stream, unsigned char byte)
{
    switch (byte) {
    case '&':
        fputs("&amp;", stream);
        return;
    case '<':
        fputs("&lt;", stream);
        return;
    case '>':
        fputs("&gt;", stream);
        return;
    case '"':
        fputs("&quot;", stream);
        return;
    case '\'':
        fputs("&#39;", stream);
        return;
    default:
        if (byte < 0x20 || byte == 0x7F)
            write_control(stream, byte);
        else
            fputc(byte, stream);
    }
}

void sl_markup_text(FILE *stream, const char *text)
{
    size_t left = text ? strlen(text) : 0;

    while (left > 0) {
        size_t length = character_length(text, left);

        if (length == 1)
            write_ascii(stream, (unsigned char)*text);
        else if (length == 0 || is_hidden(character_code(text, length)))
            fputs(REPLACEMENT, stream);
        else
            fwrite(text, 1, length, stream);
        length = length ? length : 1;
        text += length;
        left -= length;
    }
}

void sl_markup_attribute(FILE *stream, const char *text)
{
    sl_markup_text(stream, text);
}

void sl_markup_number(FILE *stream, double value, int decimals)
{
    struct sl_text digits = {0};

    sl_digits_add(&digits, &sl_digits_page, value, decimals);
    fwrite(digits.bytes, 1, digits.length, stream);
    sl_text_release(&digits);
}

void sl_markup_count(FILE *stream, long long count)
{
    sl_markup_number(stream, (double)count, 0);
}
