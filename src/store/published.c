/* The published tables, row by row, into the model's structs. */
#include <string.h>

#include "base/text.h"
#include "store/rules.h"
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
    return sl_read_filled(row, name, reader->arena);
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

static void read_ageing(const struct sl_table_reader *reader,
                        struct sl_statement *row, void *item)
{
    struct sl_ageing *ageing = item;
    const char *condition = sl_read_text(row, "condition");
    const struct sl_vocabularies fixed = sl_fixed_vocabularies();

    ageing->material = copied(reader, row, "material");
    ageing->condition = sl_word_find(&fixed.of[SL_WORDS_CONDITION], condition,
                                     strlen(condition));
    ageing->rate = interval_of(row);
    ageing->source = copied(reader, row, "source");
    ageing->trust = trust_of(row);
}

static void read_limit(const struct sl_table_reader *reader,
                       struct sl_statement *row, void *item)
{
    struct sl_check_limit *limit = item;

    limit->check = copied(reader, row, "check_name");
    limit->circumstance = copied(reader, row, "circumstance");
    limit->lowest = sl_read_number(row, "lowest");
    limit->highest = sl_read_number(row, "highest");
    limit->quantity = sl_quantity_named(sl_read_text(row, "quantity"));
    limit->source = copied(reader, row, "source");
    limit->trust = trust_of(row);
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

static enum sl_status read_published(const struct sl_table_reader *reader,
                                     struct sl_tables *tables)
{
    void *fittings = NULL, *roughness = NULL, *defaults = NULL;
    void *ageing = NULL, *limits = NULL;
    enum sl_status status =
        read_table(reader, SL_QUERY_READ_FITTINGS, read_fitting,
                   sizeof *tables->fittings, &fittings, &tables->fitting_count);

    if (!status)
        status = read_table(reader, SL_QUERY_READ_ROUGHNESS, read_roughness,
                            sizeof *tables->roughness, &roughness,
                            &tables->roughness_count);
    if (!status)
        status = read_table(reader, SL_QUERY_READ_DEFAULTS, read_default,
                            sizeof *tables->defaults, &defaults,
                            &tables->default_count);
    if (!status)
        status =
            read_table(reader, SL_QUERY_READ_AGEING, read_ageing,
                       sizeof *tables->ageing, &ageing, &tables->ageing_count);
    if (!status)
        status =
            read_table(reader, SL_QUERY_READ_CHECK_LIMITS, read_limit,
                       sizeof *tables->limits, &limits, &tables->limit_count);
    tables->fittings = fittings;
    tables->roughness = roughness;
    tables->defaults = defaults;
    tables->ageing = ageing;
    tables->limits = limits;
    return status;
}

/* Results have room for so many and no more. */
static enum sl_status refuse_too_many(const struct sl_tables *tables,
                                      struct sl_error *error)
{
    if (tables->rule_count <= SL_RULES_MOST)
        return SL_OK;
    return sl_error_set(error, SL_REFUSED,
                        "there are %zu margin rules, the published ones and "
                        "those of margin_rules.csv together, and at most %d "
                        "are judged at once; take some out of the file, or "
                        "give them the names of published ones, whose place "
                        "they then take",
                        tables->rule_count, SL_RULES_MOST);
}

enum sl_status sl_store_read_tables(struct sl_store *store, long long vintage,
                                    struct sl_arena *arena,
                                    struct sl_tables *tables,
                                    struct sl_error *error)
{
    struct sl_table_reader reader = {store, arena, error};
    struct sl_tables read = {.year = tables->year};
    enum sl_status status = read_published(&reader, &read);

    if (!status)
        status = sl_read_conditions(store, vintage, arena, &read, error);
    if (!status)
        status = sl_read_rules(store, vintage, NULL, arena, &read.rules,
                               &read.rule_count, error);
    if (!status)
        status = refuse_too_many(&read, error);
    if (status)
        return status;
    set_vocabularies(&read, arena);
    *tables = read;
    store->vocabularies = &tables->vocabularies;
    return SL_OK;
}
