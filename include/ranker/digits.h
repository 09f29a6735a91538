/* Numbers as people read them.
 *
 * A number that is NaN or infinite is "unknown"; one that rounds to zero has
 * no sign. */
#ifndef SL_RANKER_DIGITS_H
#define SL_RANKER_DIGITS_H

#include "base/text.h"

/* How the digits are set: the marks between thousands and before a number
 * below zero. */
struct sl_digit_style {
    const char *group;
    const char *minus;
};

/* "1,830" and "-1,830": sentences that also go into CSV. */
extern const struct sl_digit_style sl_digits_plain;
/* U+202F between thousands, U+2212 before: for a page. */
extern const struct sl_digit_style sl_digits_page;
/* No grouping and a hyphen: for programs. */
extern const struct sl_digit_style sl_digits_machine;

void sl_digits_add(struct sl_text *text, const struct sl_digit_style *style,
                   double value, int decimals);

/* Decimals that leave about three significant digits: 0 from 100 up, 1 from
 * 10, and so on; at most 4. */
int sl_digits_decimals(double value);

#endif
