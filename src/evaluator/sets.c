/* Which pumps run together: one set after another, and each in words. */
#include <math.h>
#include <string.h>

#include "base/text.h"
#include "evaluator/layout.h"

/* More names than this are counted, not listed. */
#define NAMES_LISTED 4

static const size_t *by_flow(const struct sl_layout *layout,
                             const double *flows, struct sl_arena *arena)
{
    size_t count = layout->class_count;
    size_t *order = sl_arena_new(arena, count, sizeof *order);

    for (size_t c = 0; c < count; c++) {
        size_t place = c;

        /* A flow that is not known goes last. */
        while (place > 0 && flows[c] > (isnan(flows[order[place - 1]])
                                            ? -INFINITY
                                            : flows[order[place - 1]])) {
            order[place] = order[place - 1];
            place--;
        }
        order[place] = c;
    }
    return order;
}

/* All of them where the pumps are few, or where only how many run tells one
 * set from another. */
static bool every_set(const struct sl_layout *layout)
{
    return layout->pump_count <= SL_EXHAUSTIVE_PUMPS ||
           layout->class_count == 1 || layout->at_once == 1;
}

void sl_sets_begin(struct sl_sets *sets, const struct sl_layout *layout,
                   const double *flows, struct sl_arena *arena)
{
    *sets = (struct sl_sets){
        .layout = layout,
        .counts =
            sl_arena_new(arena, layout->class_count, sizeof *sets->counts),
        .all = every_set(layout),
    };
    if (!sets->all)
        sets->order = by_flow(layout, flows, arena);
}

/* The next of all: counted up like the figures of a number, the first class
 * fastest, passing over sets of too many. */
static bool next_of_all(struct sl_sets *sets)
{
    const struct sl_layout *layout = sets->layout;

    for (size_t c = 0; c < layout->class_count; c++) {
        if (sets->counts[c] < layout->classes[c].count &&
            sets->running < layout->at_once) {
            sets->counts[c]++;
            sets->running++;
            return true;
        }
        sets->running -= sets->counts[c];
        sets->counts[c] = 0;
    }
    return false;
}

/* One more of the others beside the class the sets are about. */
static bool add_another(struct sl_sets *sets)
{
    const struct sl_layout *layout = sets->layout;

    for (size_t i = 0; i < layout->class_count; i++) {
        size_t c = sets->order[i];

        if (sets->counts[c] == layout->classes[c].count)
            continue;
        sets->counts[c]++;
        sets->running++;
        return true;
    }
    return false;
}

/* One more up to as many as are tried in full elsewhere, then the most at
 * once; then the next class alone. */
static bool next_of_some(struct sl_sets *sets)
{
    const struct sl_layout *layout = sets->layout;
    bool all = sets->running >= SL_EXHAUSTIVE_PUMPS;
    bool added = false;

    while (sets->running > 0 && sets->running < layout->at_once &&
           (all || !added) && add_another(sets))
        added = true;
    if (added)
        return true;
    if (sets->running > 0)
        sets->about++;
    if (sets->about >= layout->class_count)
        return false;
    memset(sets->counts, 0, layout->class_count * sizeof *sets->counts);
    sets->counts[sets->about] = 1;
    sets->running = 1;
    return true;
}

bool sl_sets_next(struct sl_sets *sets)
{
    return sets->all ? next_of_all(sets) : next_of_some(sets);
}

/* Others of one class in the set: all by name, or how many of which. */
static void add_class(struct sl_text *text, const struct sl_layout *layout,
                      const struct sl_class *class, int running, size_t self,
                      bool first)
{
    int listed = 0, others = 0;

    for (int i = 0; i < class->count; i++)
        others += class->pumps[i] != self;
    sl_text_add_string(text, first ? "with " : " and ");
    if (running < others)
        sl_text_addf(text, "any %d of ", running);
    for (int i = 0; i < class->count; i++) {
        size_t pump = class->pumps[i];

        if (pump == self)
            continue;
        if (listed == NAMES_LISTED && others > NAMES_LISTED) {
            sl_text_addf(text, " and %d more", others - listed);
            return;
        }
        sl_text_addf(text, "%s%s", listed ? ", " : "",
                     layout->plans[pump].pump->record.pump_id);
        listed++;
    }
}

/* How many of a class run beside one pump. */
static int others_of(const struct sl_class *class, int running, size_t self)
{
    for (int i = 0; i < class->count; i++)
        if (class->pumps[i] == self)
            return running - 1;
    return running;
}

static void add_classes(struct sl_text *text, const struct sl_layout *layout,
                        const int *counts, size_t self, int others)
{
    int told = 0;

    for (size_t c = 0; c < layout->class_count; c++) {
        int running =
            counts[c] > 0 ? others_of(&layout->classes[c], counts[c], self) : 0;

        if (running == 0)
            continue;
        if (told >= NAMES_LISTED && others - told > 1) {
            sl_text_addf(text, " and %d more", others - told);
            return;
        }
        add_class(text, layout, &layout->classes[c], running, self, told == 0);
        told += running;
    }
}

const char *sl_set_words(const struct sl_layout *layout, const int *counts,
                         size_t pump, struct sl_arena *arena)
{
    struct sl_text text = {0};
    const char *words;
    int others = -1; /* the pump itself */

    for (size_t c = 0; c < layout->class_count; c++)
        others += counts[c];
    if (others <= 0)
        sl_text_add_string(&text, "alone");
    else if (others > NAMES_LISTED && others + 1 == (int)layout->pump_count)
        sl_text_addf(&text, "with all %d others", others);
    else
        add_classes(&text, layout, counts, pump, others);
    words = sl_arena_text(arena, sl_text_string(&text), text.length);
    sl_text_release(&text);
    return words;
}
