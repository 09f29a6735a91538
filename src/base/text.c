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
