/* The code words of the inventory.
 *
 * A word is kept as its place in its vocabulary, from 1; 0 is "not
 * recorded".  Most vocabularies are fixed here.  Materials and fittings are
 * rows of the published tables (model/tables.h), so an owner can add one:
 * their lists are set when the tables are read. */
#ifndef SL_MODEL_VOCABULARY_H
#define SL_MODEL_VOCABULARY_H

#include <stddef.h>

enum sl_vocabulary {
    SL_WORDS_NONE,
    SL_WORDS_YES_NO,
    SL_WORDS_SERVICE,
    SL_WORDS_INSTALLATION,
    SL_WORDS_SOURCE_KIND,
    SL_WORDS_MAKE_UP,
    SL_WORDS_CONDITION,
    SL_WORDS_MATERIAL,
    SL_WORDS_FITTING,
    SL_WORDS_LEVEL_BASIS,
    SL_WORDS_LOW_BASIS,
    SL_WORDS_TEMPERATURE_BASIS,
    SL_WORDS_BAROMETER,
    SL_WORDS_FRICTION,
    SL_WORDS_COUNT
};

enum { SL_YES = 1, SL_NO };
enum sl_service {
    SL_RAW_WATER = 1,
    SL_POTABLE,
    SL_WASTEWATER,
    SL_STORMWATER,
    SL_IRRIGATION,
    SL_INDUSTRIAL,
    SL_SEAWATER
};
enum sl_installation { SL_DRY_PIT = 1, SL_WET_PIT, SL_ON_MAIN };
enum sl_source_kind { SL_OPEN = 1, SL_CLOSED, SL_MAIN };
enum sl_make_up {
    SL_END_SUCTION = 1,
    SL_SPLIT_CASE,
    SL_VERTICAL_TURBINE,
    SL_SUBMERSIBLE,
    SL_SELF_PRIMING
};
enum sl_condition_word { SL_GOOD = 1, SL_FAIR, SL_POOR };

struct sl_words {
    const char *const *words; /* words[0] is the word kept as 1 */
    size_t count;
};

/* All vocabularies of a run. */
struct sl_vocabularies {
    struct sl_words of[SL_WORDS_COUNT];
};

/* The fixed vocabularies; materials and fittings still empty. */
struct sl_vocabularies sl_fixed_vocabularies(void);

/* The kept form of a word, or 0 when it is not in the vocabulary.  Case and
 * the choice between blank, hyphen and underscore do not matter. */
int sl_word_find(const struct sl_words *words, const char *text, size_t length);
/* The word as people read it; "" for 0 or out of range. */
const char *sl_word(const struct sl_words *words, int kept);

#endif
