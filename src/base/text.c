#include "base/text.h"

#include <stdarg.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/memory.h"

void sl_text_release(struct sl_text *text)
{
    free(text->bytes);
    *text = (struct sl_text){0};
}

void sl_text_clear(struct sl_text *text)
{
    text->length = 0;
    if (text->bytes)
        text->bytes[0] = '\0';
}

static void reserve(struct sl_text *text, size_t more)
{
    text->bytes =
        sl_grow(text->bytes, &text->capacity, text->length + more + 1, 1);
}

void sl_text_add(struct sl_text *text, const char *bytes, size_t length)
{
    reserve(text, length);
    if (length)
        memcpy(text->bytes + text->length, bytes, length);
    text->length += length;
    text->bytes[text->length] = '\0';
}

void sl_text_add_string(struct sl_text *text, const char *string)
{
    sl_text_add(text, string, strlen(string));
}

void sl_text_addf(struct sl_text *text, const char *format, ...)
{
    va_list arguments;
    int wanted;

    va_start(arguments, format);
    wanted = vsnprintf(NULL, 0, format, arguments);
    va_end(arguments);
    if (wanted <= 0)
        return;
    reserve(text, (size_t)wanted);
    va_start(arguments, format);
    vsnprintf(text->bytes + text->length, (size_t)wanted + 1, format,
              arguments);
    va_end(arguments);
    text->length += (size_t)wanted;
}

const char *sl_text_string(const struct sl_text *text)
{
    return text->bytes ? text->bytes : "";
}

bool sl_same(const char *a, const char *b)
{
    return a && b && strcmp(a, b) == 0;
}

/* How many bytes follow a lead byte, and the range the first of them must
 * lie in (RFC 3629, section 4, the UTF8-octets grammar). */
static int followers(unsigned char lead, unsigned char *low,
                     unsigned char *high)
{
    *low = 0x80;
    *high = 0xBF;
    if (lead < 0x80)
        return 0;
    if (lead >= 0xC2 && lead <= 0xDF)
        return 1;
    if (lead >= 0xE0 && lead <= 0xEF) {
        if (lead == 0xE0)
            *low = 0xA0;
        if (lead == 0xED)
            *high = 0x9F;
        return 2;
    }
    if (lead >= 0xF0 && lead <= 0xF4) {
        if (lead == 0xF0)
            *low = 0x90;
        if (lead == 0xF4)
            *high = 0x8F;
        return 3;
    }
    return -1;
}

size_t sl_utf8_valid_length(const char *bytes, size_t length)
{
    size_t at = 0;

    while (at < length) {
        unsigned char low, high;
        int more = followers((unsigned char)bytes[at], &low, &high);

        if (more < 0 || (size_t)more >= length - at)
            return at;
        for (int i = 1; i <= more; i++) {
            unsigned char byte = (unsigned char)bytes[at + (size_t)i];

            if (byte < low || byte > high)
                return at;
            low = 0x80;
            high = 0xBF;
        }
        at += (size_t)more + 1;
    }
    return at;
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

bool sl_utf8_hidden(unsigned long code)
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

size_t sl_utf8_character(const char *text, size_t left, unsigned long *code)
{
    size_t length = character_length(text, left);

    *code = length ? character_code(text, length) : 0;
    return length;
}
