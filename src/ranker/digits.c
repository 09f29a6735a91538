#include "ranker/digits.h"

#include <math.h>
#include <stdbool.h>
#include <string.h>

const struct sl_digit_style sl_digits_plain = {",", "-"};
const struct sl_digit_style sl_digits_page = {"\u202F", "\u2212"};
const struct sl_digit_style sl_digits_machine = {"", "-"};

/* Nothing but zeros and a point: printing rounded the value away. */
static bool is_zero(const char *digits)
{
    return digits[strspn(digits, "0.")] == '\0';
}

static void add_grouped(struct sl_text *text, const char *group,
                        const char *digits)
{
    size_t whole = strcspn(digits, ".");

    for (size_t i = 0; i < whole; i++) {
        if (i > 0 && (whole - i) % 3 == 0)
            sl_text_add_string(text, group);
        sl_text_add(text, digits + i, 1);
    }
    sl_text_add_string(text, digits + whole);
}

void sl_digits_add(struct sl_text *text, const struct sl_digit_style *style,
                   double value, int decimals)
{
    struct sl_text digits = {0};

    if (!isfinite(value)) {
        sl_text_add_string(text, "unknown");
        return;
    }
    sl_text_addf(&digits, "%.*f", decimals, fabs(value));
    if (value < 0 && !is_zero(digits.bytes))
        sl_text_add_string(text, style->minus);
    add_grouped(text, style->group, digits.bytes);
    sl_text_release(&digits);
}

int sl_digits_decimals(double value)
{
    int decimals = 0;

    if (!isfinite(value) || value == 0)
        return 0;
    for (double size = fabs(value); size < 100 && decimals < 4; size *= 10)
        decimals++;
    return decimals;
}
