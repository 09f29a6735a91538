#include "ranker/markup.h"

#include <string.h>

#include "base/text.h"
#include "ranker/digits.h"

#define REPLACEMENT "\uFFFD"

void sl_markup(FILE *stream, const char *fixed)
{
    fputs(fixed, stream);
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
        unsigned long code;
        size_t length = sl_utf8_character(text, left, &code);

        if (length == 1)
            write_ascii(stream, (unsigned char)*text);
        else if (length == 0 || sl_utf8_hidden(code))
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
