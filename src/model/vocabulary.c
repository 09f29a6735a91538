#include "model/vocabulary.h"

#include <ctype.h>
#include <string.h>

static const char *const yes_no[] = {"yes", "no"};
static const char *const services[] = {
    "raw water",  "potable",    "wastewater", "stormwater",
    "irrigation", "industrial", "seawater",
};
static const char *const installations[] = {"dry pit", "wet pit", "on main"};
static const char *const source_kinds[] = {"open", "closed", "main"};
static const char *const make_ups[] = {
    "end suction", "split case",   "vertical turbine",
    "submersible", "self-priming",
};
static const char *const conditions[] = {"good", "fair", "poor"};
static const char *const level_bases[] = {
    "normal",
    "lowest",
    "cut-out",
    "record low",
};
static const char *const low_bases[] = {"normal", "low"};
static const char *const temperature_bases[] = {"normal", "summer"};
static const char *const barometers[] = {"standard", "storm low"};
static const char *const frictions[] = {"new", "aged"};

#define FIXED(list)                                                            \
    {                                                                          \
        list, sizeof(list) / sizeof((list)[0])                                 \
    }

struct sl_vocabularies sl_fixed_vocabularies(void)
{
    return (struct sl_vocabularies){{
        [SL_WORDS_YES_NO] = FIXED(yes_no),
        [SL_WORDS_SERVICE] = FIXED(services),
        [SL_WORDS_INSTALLATION] = FIXED(installations),
        [SL_WORDS_SOURCE_KIND] = FIXED(source_kinds),
        [SL_WORDS_MAKE_UP] = FIXED(make_ups),
        [SL_WORDS_CONDITION] = FIXED(conditions),
        [SL_WORDS_LEVEL_BASIS] = FIXED(level_bases),
        [SL_WORDS_LOW_BASIS] = FIXED(low_bases),
        [SL_WORDS_TEMPERATURE_BASIS] = FIXED(temperature_bases),
        [SL_WORDS_BAROMETER] = FIXED(barometers),
        [SL_WORDS_FRICTION] = FIXED(frictions),
    }};
}

static char folded(char c)
{
    if (c == '-' || c == '_')
        return ' ';
    return (char)tolower((unsigned char)c);
}

static int matches(const char *word, const char *text, size_t length)
{
    if (strlen(word) != length)
        return 0;
    for (size_t i = 0; i < length; i++)
        if (folded(word[i]) != folded(text[i]))
            return 0;
    return 1;
}

int sl_word_find(const struct sl_words *words, const char *text, size_t length)
{
    for (size_t i = 0; i < words->count; i++)
        if (matches(words->words[i], text, length))
            return (int)i + 1;
    return 0;
}

const char *sl_word(const struct sl_words *words, int kept)
{
    if (kept < 1 || (size_t)kept > words->count)
        return "";
    return words->words[kept - 1];
}
