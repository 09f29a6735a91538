/* The published tables, row by row, into the model's structs. */
#include <string.h>

#include "base/text.h"
#include "store/statement.h"
#include "store/store.h"

struct sl_table_reader {
    struct sl_store *store;
    struct sl_arena *arena;
    struct sl_error *error;
};

static const char *copied(const struct sl_table_reader *reader,
                          struct sl_statement *row, const char *name)
{
    const char *copy = sl_read_copy(row, name, reader->arena);

    return copy ? copy : "";
}

static struct sl_interval interval_of(struct sl_statement *row)
{
    return (struct sl_interval){sl_read_number(row, "typical"),
                                sl_read_number(row, "adverse"),
                                sl_read_number(row, "favourable")};
}

static char trust_of(struct sl_statement *row)
{
    return sl_read_text(row, "trust")[0];
}

static void read_fitting(const struct sl_table_reader *reader,
                         struct sl_statement *row, void *item)
{
    struct sl_fitting_k *fitting = item;

    fitting->fitting = copied(reader, row, "fitting");
    fitting->k = interval_of(row);
    fitting->source = copied(reader, row, "source");
    fitting->trust = trust_of(row);
}

static void read_roughness(const struct sl_table_reader *reader,
                           struct sl_statement *row, void *item)
{
    struct sl_roughness *roughness = item;

    roughness->material = copied(reader, row, "material");
    roughness->good = sl_read_number(row, "good");
    roughness->fair = sl_read_number(row, "fair");
    roughness->poor = sl_read_number(row, "poor");
    roughness->source = copied(reader, row, "source");
    roughness->trust = trust_of(row);
}

/* In the order of enum sl_quantity; the schema allows no other word. */
enum sl_quantity sl_quantity_named(const char *word)
{
    static const char *const words[] = {
        "pure",        "length", "bore",  "flow",     "pressure",
        "temperature", "speed",  "power", "velocity",
    };
    size_t i = 0;

    while (i + 1 < sizeof words / sizeof words[0] && !sl_same(words[i], word))
        i++;
    return (enum sl_quantity)i;
}

static void read_default(const struct sl_table_reader *reader,
                         struct sl_statement *row, void *item)
{
    struct sl_default *value = item;

    value->field = copied(reader, row, "field");
    value->circumstance = copied(reader, row, "circumstance");
    value->value = interval_of(row);
    value->quantity = sl_quantity_named(sl_read_text(row, "quantity"));
    value->source = copied(reader, row, "source");
    value->trust = trust_of(row);
}

static void read_rule(const struct sl_table_reader *reader,
                      struct sl_statement *row, void *item)
{
    struct sl_margin_rule *rule = item;

    rule->rule = copied(reader, row, "rule");
    rule->ratio = sl_read_number(row, "ratio");
    rule->floor = sl_read_number(row, "floor");
    rule->edition = copied(reader, row, "edition");
    rule->source = copied(reader, row, "source");
    rule->trust = trust_of(row);
}

static enum sl_level_basis basis_of(struct sl_statement *row, const char *name)
{
    return sl_same(sl_read_text(row, name), "low") ? SL_LEVEL_LOW
                                                   : SL_LEVEL_NORMAL;
}

static void read_condition(const struct sl_table_reader *reader,
                           struct sl_statement *row, void *item)
{
    struct sl_condition *condition = item;

    condition->condition = copied(reader, row, "condition");
    condition->level = basis_of(row, "level");
    condition->discharge = basis_of(row, "discharge");
    condition->pressure = basis_of(row, "pressure");
    condition->summer_temperature =
        sl_read_whole(row, "summer_temperature") != 0;
    condition->storm_barometer = sl_read_whole(row, "storm_barometer") != 0;
}

static enum sl_status read_table(const struct sl_table_reader *reader,
                                 enum sl_query query,
                                 void (*read)(const struct sl_table_reader *,
                                              struct sl_statement *, void *),
                                 size_t size, void **items, size_t *count)
{
    struct sl_statement *statement = NULL;
    char *grown = NULL;
    size_t capacity = 0;
    bool row = false;
    enum sl_status status =
        sl_statement_use(reader->store, query, &statement, reader->error);

    *items = NULL;
    *count = 0;
    while (!status &&
           !(status = sl_statement_step(statement, &row, reader->error)) &&
           row) {
        if (*count == capacity) {
            capacity = capacity ? 2 * capacity : 32;
            grown = sl_arena_new(reader->arena, capacity, size);
            if (*count)
                memcpy(grown, *items, *count * size);
            *items = grown;
        }
        read(reader, statement, grown + *count * size);
        ++*count;
    }
    return status;
}

static void set_vocabularies(struct sl_tables *tables, struct sl_arena *arena)
{
    const char **fittings =
        sl_arena_new(arena, tables->fitting_count, sizeof *fittings);
    const char **materials =
        sl_arena_new(arena, tables->roughness_count, sizeof *materials);

    for (size_t i = 0; i < tables->fitting_count; i++)
        fittings[i] = tables->fittings[i].fitting;
    for (size_t i = 0; i < tables->roughness_count; i++)
        materials[i] = tables->roughness[i].material;
    tables->vocabularies = sl_fixed_vocabularies();
    tables->vocabularies.of[SL_WORDS_FITTING] =
        (struct sl_words){fittings, tables->fitting_count};
    tables->vocabularies.of[SL_WORDS_MATERIAL] =
        (struct sl_words){materials, tables->roughness_count};
}

enum sl_status sl_store_read_tables(struct sl_store *store,
                                    struct sl_arena *arena,
                                    struct sl_tables *tables,
                                    struct sl_error *error)
{
    struct sl_table_reader reader = {store, arena, error};
    void *fittings = NULL, *roughness = NULL, *defaults = NULL;
    void *rules = NULL, *conditions = NULL;
    enum sl_status status =
        read_table(&reader, SL_QUERY_READ_FITTINGS, read_fitting,
                   sizeof *tables->fittings, &fittings, &tables->fitting_count);

    if (!status)
        status = read_table(&reader, SL_QUERY_READ_ROUGHNESS, read_roughness,
                            sizeof *tables->roughness, &roughness,
                            &tables->roughness_count);
    if (!status)
        status = read_table(&reader, SL_QUERY_READ_DEFAULTS, read_default,
                            sizeof *tables->defaults, &defaults,
                            &tables->default_count);
    if (!status)
        status = read_table(&reader, SL_QUERY_READ_MARGIN_RULES, read_rule,
                            sizeof *tables->rules, &rules, &tables->rule_count);
    if (!status)
        status = read_table(&reader, SL_QUERY_READ_CONDITIONS, read_condition,
                            sizeof *tables->conditions, &conditions,
                            &tables->condition_count);
    if (status)
        return status;
    tables->fittings = fittings;
    tables->roughness = roughness;
    tables->defaults = defaults;
    tables->rules = rules;
    tables->conditions = conditions;
    set_vocabularies(tables, arena);
    store->vocabularies = &tables->vocabularies;
    return SL_OK;
}
