#include "store/rules.h"

#include <string.h>

#include "base/text.h"
#include "model/fields.h"
#include "store/statement.h"

/* The place of the row's word among `words`; the first when it is none of
 * them, which the schema does not allow. */
static int place_of(struct sl_statement *row, const char *name,
                    const char *const *words, int count)
{
    const char *word = sl_read_text(row, name);
    int i = count - 1;

    while (i > 0 && !sl_same(words[i], word))
        i--;
    return i;
}

/* In the order of enum sl_level_basis. */
static enum sl_level_basis basis_of(struct sl_statement *row, const char *name)
{
    static const char *const words[] = {"normal", "low", "cut-out",
                                        "record low"};

    return (enum sl_level_basis)place_of(row, name, words, 4);
}

static enum sl_friction_state friction_of(struct sl_statement *row,
                                          const char *name)
{
    static const char *const words[] = {"new", "aged"};

    return (enum sl_friction_state)place_of(row, name, words, 2);
}

static enum sl_rule_measure measure_of(struct sl_statement *row)
{
    static const char *const words[] = {
        "none", "suction energy", "suction specific speed", "suction lift"};

    return (enum sl_rule_measure)place_of(row, "measure", words, 4);
}

static void read_condition(struct sl_statement *row, struct sl_arena *arena,
                           struct sl_condition *condition)
{
    condition->condition = sl_read_filled(row, "condition", arena);
    condition->level = basis_of(row, "level");
    condition->level_addition = sl_read_number(row, "level_addition");
    condition->discharge = basis_of(row, "discharge");
    condition->pressure = basis_of(row, "pressure");
    condition->summer_temperature =
        sl_read_whole(row, "summer_temperature") != 0;
    condition->temperature_addition =
        sl_read_number(row, "temperature_addition");
    condition->storm_barometer = sl_read_whole(row, "storm_barometer") != 0;
    condition->suction_friction = friction_of(row, "suction_friction");
    condition->discharge_friction = friction_of(row, "discharge_friction");
}

/* Room for one more item behind `count`; what was there is copied. */
static void *room_for_one(void *items, size_t count, size_t *capacity,
                          size_t size, struct sl_arena *arena)
{
    void *grown = items;

    if (count < *capacity)
        return items;
    *capacity = *capacity ? 2 * *capacity : 8;
    grown = sl_arena_new(arena, *capacity, size);
    if (count)
        memcpy(grown, items, count * size);
    return grown;
}

enum sl_status sl_read_conditions(struct sl_store *store, long long vintage,
                                  struct sl_arena *arena,
                                  struct sl_tables *tables,
                                  struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    size_t capacity = 0;
    bool row = false;
    enum sl_status status = sl_statement_use_for(
        store, SL_QUERY_READ_CONDITIONS, "vintage", vintage, &statement, error);

    tables->condition_count = 0;
    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        tables->conditions =
            room_for_one(tables->conditions, tables->condition_count, &capacity,
                         sizeof *tables->conditions, arena);
        read_condition(statement, arena,
                       &tables->conditions[tables->condition_count++]);
    }
    return status;
}

enum sl_status sl_count_rejected_conditions(struct sl_store *store,
                                            long long vintage, long long *count,
                                            struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = sl_statement_use_for(
        store, SL_QUERY_COUNT_REJECTED, "vintage", vintage, &statement, error);

    if (status)
        return status;
    sl_bind_text(statement, "file", sl_record_kind(SL_KIND_CONDITION)->file);
    status = sl_statement_step(statement, &row, error);
    if (status || !row)
        return status;
    *count = sl_read_whole(statement, "records");
    return sl_statement_end(statement, error);
}

static int make_up_of(struct sl_statement *row)
{
    const struct sl_vocabularies fixed = sl_fixed_vocabularies();
    const char *word = sl_read_text(row, "make_up");

    return sl_word_find(&fixed.of[SL_WORDS_MAKE_UP], word, strlen(word));
}

static void read_rule(struct sl_statement *row, struct sl_arena *arena,
                      struct sl_margin_rule *rule)
{
    rule->rule = sl_read_filled(row, "rule", arena);
    rule->make_up = make_up_of(row);
    rule->measure = measure_of(row);
    rule->tier_count = 0;
    rule->lift_limit = sl_read_number(row, "lift_limit");
    rule->edition = sl_read_filled(row, "edition", arena);
    rule->source = sl_read_filled(row, "source", arena);
    rule->trust = sl_read_text(row, "trust")[0];
}

static void read_tier(struct sl_statement *row, struct sl_margin_rule *rule)
{
    /* The schema allows no more. */
    if (rule->tier_count < SL_RULE_TIERS)
        rule->tiers[rule->tier_count++] = (struct sl_margin_tier){
            sl_read_number(row, "over"), sl_read_number(row, "ratio"),
            sl_read_number(row, "floor")};
}

enum sl_status sl_read_rules(struct sl_store *store, long long vintage,
                             const char *name, struct sl_arena *arena,
                             struct sl_margin_rule **rules, size_t *count,
                             struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    struct sl_margin_rule *list = NULL;
    size_t capacity = 0;
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(store, SL_QUERY_READ_MARGIN_RULES, "vintage",
                             vintage, &statement, error);

    *count = 0;
    if (!status)
        sl_bind_text(statement, "rule", name);
    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        if (*count == 0 ||
            !sl_same(list[*count - 1].rule, sl_read_text(statement, "rule"))) {
            list = room_for_one(list, *count, &capacity, sizeof *list, arena);
            read_rule(statement, arena, &list[(*count)++]);
        }
        read_tier(statement, &list[*count - 1]);
    }
    *rules = list;
    return status;
}
