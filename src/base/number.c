#include "base/number.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

/* Longer than any number a person writes; a longer one is not taken. */
#define LONGEST 63

static size_t digits(const char *text, size_t at, size_t length)
{
    while (at < length && text[at] >= '0' && text[at] <= '9')
        at++;
    return at;
}

static size_t sign(const char *text, size_t at, size_t length)
{
    return at < length && (text[at] == '+' || text[at] == '-') ? at + 1 : at;
}

/* The end of the mantissa that starts at `at`, or `at` when there is none. */
static size_t mantissa(const char *text, size_t at, size_t length)
{
    size_t whole = digits(text, at, length);
    size_t end = whole;

    if (end < length && text[end] == '.')
        end = digits(text, end + 1, length);
    if (end == whole)
        return end;
    return end - whole == 1 && whole == at ? at : end;
}

static size_t exponent(const char *text, size_t at, size_t length)
{
    size_t start, end;

    if (at == length || (text[at] != 'e' && text[at] != 'E'))
        return at;
    start = sign(text, at + 1, length);
    end = digits(text, start, length);
    return end == start ? at : end;
}

enum sl_number_outcome sl_number_parse(const char *text, size_t length,
                                       double *value)
{
    char copy[LONGEST + 1];
    size_t start, end;
    double parsed;

    if (length == 0)
        return SL_NUMBER_EMPTY;
    start = sign(text, 0, length);
    end = mantissa(text, start, length);
    if (end == start)
        return SL_NUMBER_NOT_ONE;
    end = exponent(text, end, length);
    if (end < length)
        return text[end] == ',' ? SL_NUMBER_COMMA : SL_NUMBER_TRAILING;
    if (length > LONGEST)
        return SL_NUMBER_NOT_ONE;
    memcpy(copy, text, length);
    copy[length] = '\0';
    parsed = strtod(copy, NULL);
    if (!isfinite(parsed))
        return SL_NUMBER_TOO_LARGE;
    *value = parsed;
    return SL_NUMBER_OK;
}

const char *sl_number_advice(enum sl_number_outcome outcome)
{
    switch (outcome) {
    case SL_NUMBER_OK:
        return "it is a number";
    case SL_NUMBER_EMPTY:
        return "the cell is empty; leave it so only where the value is "
               "unknown";
    case SL_NUMBER_COMMA:
        return "a comma can be a decimal or a grouping mark; write 1234.5";
    case SL_NUMBER_TRAILING:
        return "something follows the number; write the number alone, the "
               "unit belongs in the header";
    case SL_NUMBER_NOT_ONE:
        return "this is not a number; write digits with a decimal point";
    case SL_NUMBER_TOO_LARGE:
        return "the number is too large; check its unit and exponent";
    }
    return "unknown outcome";
}
