/* A growing piece of text.
 *
 * Invariant: bytes[length] is NUL once anything was added; before that
 * `bytes` may be NULL, and sl_text_string() gives "". */
#ifndef SL_BASE_TEXT_H
#define SL_BASE_TEXT_H

#include <stdbool.h>
#include <stddef.h>

struct sl_text {
    char *bytes;
    size_t length;
    size_t capacity;
};

/* A zeroed struct sl_text is ready for use. */
void sl_text_release(struct sl_text *text);
void sl_text_clear(struct sl_text *text);
void sl_text_add(struct sl_text *text, const char *bytes, size_t length);
void sl_text_add_string(struct sl_text *text, const char *string);
void sl_text_addf(struct sl_text *text, const char *format, ...)
    __attribute__((format(printf, 2, 3)));
const char *sl_text_string(const struct sl_text *text);

/* Both strings the same, NULL equal to nothing. */
bool sl_same(const char *a, const char *b);

/* The offset of the first byte that is not part of well-formed UTF-8
 * (RFC 3629: no surrogates, no overlong forms, nothing above U+10FFFF), or
 * `length` when all of it is. */
size_t sl_utf8_valid_length(const char *bytes, size_t length);

/* The bytes of the character that `text` begins with, and its code; 0 and 0
 * where the `left` bytes do not begin with well-formed UTF-8. */
size_t sl_utf8_character(const char *text, size_t left, unsigned long *code);

/* A character a reader cannot see, or that would turn the text around:
 * controls U+0080-009F, bidirectional controls (U+061C, 200E, 200F,
 * 202A-202E, 2066-2069), separators U+2028 and U+2029, noncharacters.
 * Controls below U+0080 are for the caller to judge. */
bool sl_utf8_hidden(unsigned long code);

#endif
