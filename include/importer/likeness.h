/* How alike two words are, for telling what was probably meant. */
#ifndef SL_IMPORTER_LIKENESS_H
#define SL_IMPORTER_LIKENESS_H

#include <stdbool.h>
#include <stddef.h>

/* Words longer than this are like nothing. */
#define SL_LIKENESS_LONGEST 63

/* The number of letters to put in, take out or change to make one from the
 * other (Levenshtein distance), without regard to case; blank, hyphen and
 * underscore are the same.  SIZE_MAX for a word too long. */
size_t sl_distance(const char *a, size_t a_length, const char *b);

/* Whether `text` is more like `word` than like `other`.  What counts first
 * is the distance to the nearest part of a word, so that "cast iron" finds
 * "uncoated cast iron"; then the distance to the whole. */
bool sl_is_nearer(const char *text, size_t length, const char *word,
                  const char *other);

#endif
