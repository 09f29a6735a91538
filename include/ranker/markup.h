/* Markup written to a stream so that an inventory's text cannot become it.
 *
 * Three kinds of thing reach a page, each by its own call: fixed markup of
 * ours (sl_markup, given a literal or a table of literals), text from
 * anywhere else (sl_markup_text, sl_markup_attribute), and numbers.  Writing
 * errors latch in the stream. */
#ifndef SL_RANKER_MARKUP_H
#define SL_RANKER_MARKUP_H

#include <stdio.h>

/* Markup as it stands.  Never give it text of an inventory. */
void sl_markup(FILE *stream, const char *fixed);

/* Text as content of an element; NULL writes nothing.  & < > " ' become
 * character references.  What a reader cannot see, or what would turn the
 * text around, is shown: controls U+0000-001F and U+007F as their pictures
 * (U+2400 on), all of these as U+FFFD: controls U+0080-009F, bidirectional
 * controls (U+061C, 200E, 200F, 202A-202E, 2066-2069), separators U+2028 and
 * U+2029, noncharacters, and each byte that is not UTF-8. */
void sl_markup_text(FILE *stream, const char *text);

/* The same between the quotes of an attribute. */
void sl_markup_attribute(FILE *stream, const char *text);

/* A number with U+2212 as its minus and thousands set off by U+202F; NaN and
 * infinity are "unknown". */
void sl_markup_number(FILE *stream, double value, int decimals);
void sl_markup_count(FILE *stream, long long count);

#endif
