#include "importer/likeness.h"

#include <ctype.h>
#include <stdint.h>
#include <string.h>

static char folded(char c)
{
    if (c == '-' || c == '_')
        return ' ';
    return (char)tolower((unsigned char)c);
}

static size_t smaller(size_t a, size_t b)
{
    return a < b ? a : b;
}

/* Fill row[j] with the distance of `a` to the j first letters of `b`, or,
 * where b may begin anywhere, to the nearest part of it that ends there. */
static bool distances(const char *a, size_t a_length, const char *b,
                      size_t b_length, bool anywhere, size_t *row)
{
    if (a_length > SL_LIKENESS_LONGEST || b_length > SL_LIKENESS_LONGEST)
        return false;
    for (size_t j = 0; j <= b_length; j++)
        row[j] = anywhere ? 0 : j;
    for (size_t i = 1; i <= a_length; i++) {
        size_t diagonal = row[0];

        row[0] = i;
        for (size_t j = 1; j <= b_length; j++) {
            size_t changed = diagonal + (folded(a[i - 1]) != folded(b[j - 1]));

            diagonal = row[j];
            row[j] = smaller(changed, smaller(row[j], row[j - 1]) + 1);
        }
    }
    return true;
}

size_t sl_distance(const char *a, size_t a_length, const char *b)
{
    size_t row[SL_LIKENESS_LONGEST + 1];
    size_t b_length = strlen(b);

    if (!distances(a, a_length, b, b_length, false, row))
        return SIZE_MAX;
    return row[b_length];
}

static size_t distance_to_part(const char *a, size_t a_length, const char *b)
{
    size_t row[SL_LIKENESS_LONGEST + 1];
    size_t b_length = strlen(b);
    size_t least = SIZE_MAX;

    if (distances(a, a_length, b, b_length, true, row))
        for (size_t j = 0; j <= b_length; j++)
            least = smaller(least, row[j]);
    return least;
}

bool sl_is_nearer(const char *text, size_t length, const char *word,
                  const char *other)
{
    size_t part = distance_to_part(text, length, word);
    size_t other_part = distance_to_part(text, length, other);

    if (part != other_part)
        return part < other_part;
    return sl_distance(text, length, word) < sl_distance(text, length, other);
}
