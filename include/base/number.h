/* Numbers as people write them in an inventory.
 *
 * Grammar: [+-] digits [. [digits]] [e [+-] digits], or . digits; a point is
 * the decimal mark; nothing before or after, 63 characters at most.  Not
 * taken: grouping marks, decimal commas, units, "nan", "inf", hexadecimal. */
#ifndef SL_BASE_NUMBER_H
#define SL_BASE_NUMBER_H

#include <stddef.h>

enum sl_number_outcome {
    SL_NUMBER_OK = 0,
    /* No character at all. */
    SL_NUMBER_EMPTY,
    /* A comma where a digit or the end was expected: "1,234" or "12,5". */
    SL_NUMBER_COMMA,
    /* A number with something behind it: "3.5 m", "12 in". */
    SL_NUMBER_TRAILING,
    /* Not a number by the grammar above. */
    SL_NUMBER_NOT_ONE,
    /* Too large for a double. */
    SL_NUMBER_TOO_LARGE
};

/* *value is set only on SL_NUMBER_OK.  `text` need not end in NUL. */
enum sl_number_outcome sl_number_parse(const char *text, size_t length,
                                       double *value);

/* Why it was not taken, and what to do, as one clause. */
const char *sl_number_advice(enum sl_number_outcome outcome);

#endif
