/* Parameters and columns of a statement, by name. */
#include <math.h>
#include <stdio.h>
#include <string.h>

#include "base/text.h"
#include "store/statement.h"

static int find_parameter(sqlite3_stmt *prepared, const char *name)
{
    char spelled[80] = "";

    snprintf(spelled, sizeof spelled, ":%s", name);
    return sqlite3_bind_parameter_index(prepared, spelled);
}

static int find_column(sqlite3_stmt *prepared, const char *name)
{
    int count = sqlite3_column_count(prepared);

    for (int i = 0; i < count; i++)
        if (strcmp(sqlite3_column_name(prepared, i), name) == 0)
            return i + 1;
    return 0;
}

/* Where the statement has `name`, counted from 1. */
static int place_of(struct sl_statement *statement, struct sl_places *places,
                    int (*find)(sqlite3_stmt *, const char *), const char *name)
{
    struct sl_place *place = NULL;

    places->items = sl_grow(places->items, &places->capacity, places->next + 1,
                            sizeof *places->items);
    place = &places->items[places->next++];
    if (places->next > places->count) {
        places->count = places->next;
        place->name = NULL;
    }
    /* The same pointer, not only the same letters: names are literals. */
    if (place->name != name) {
        place->name = name;
        place->at = find(statement->prepared, name);
    }
    if (!place->at && !statement->wrong_name)
        statement->wrong_name = name;
    return place->at;
}

static int parameter(struct sl_statement *statement, const char *name)
{
    return place_of(statement, &statement->parameters, find_parameter, name);
}

static int column(struct sl_statement *statement, const char *name)
{
    return place_of(statement, &statement->columns, find_column, name) - 1;
}

void sl_bind_whole(struct sl_statement *statement, const char *name,
                   long long value)
{
    int at = parameter(statement, name);

    if (at)
        sqlite3_bind_int64(statement->prepared, at, value);
}

void sl_bind_number(struct sl_statement *statement, const char *name,
                    double value)
{
    int at = parameter(statement, name);

    if (at && !isnan(value))
        sqlite3_bind_double(statement->prepared, at, value);
}

void sl_bind_text(struct sl_statement *statement, const char *name,
                  const char *text)
{
    int at = parameter(statement, name);

    if (at && text)
        sqlite3_bind_text(statement->prepared, at, text, -1, SQLITE_STATIC);
}

void sl_bind_bytes(struct sl_statement *statement, const char *name,
                   const char *bytes, size_t length)
{
    int at = parameter(statement, name);

    if (!at || !bytes)
        return;
    if (sl_utf8_valid_length(bytes, length) == length &&
        !memchr(bytes, '\0', length))
        sqlite3_bind_text64(statement->prepared, at, bytes, length,
                            SQLITE_STATIC, SQLITE_UTF8);
    else
        sqlite3_bind_blob64(statement->prepared, at, bytes, length,
                            SQLITE_STATIC);
}

bool sl_read_null(struct sl_statement *statement, const char *name)
{
    int at = column(statement, name);

    return at < 0 ||
           sqlite3_column_type(statement->prepared, at) == SQLITE_NULL;
}

long long sl_read_whole(struct sl_statement *statement, const char *name)
{
    int at = column(statement, name);

    return at < 0 ? 0 : sqlite3_column_int64(statement->prepared, at);
}

double sl_read_number(struct sl_statement *statement, const char *name)
{
    int at = column(statement, name);

    if (at < 0 || sqlite3_column_type(statement->prepared, at) == SQLITE_NULL)
        return NAN;
    return sqlite3_column_double(statement->prepared, at);
}

const char *sl_read_text(struct sl_statement *statement, const char *name)
{
    int at = column(statement, name);
    const unsigned char *text = NULL;

    if (at >= 0)
        text = sqlite3_column_text(statement->prepared, at);
    return text ? (const char *)text : "";
}

const char *sl_read_copy(struct sl_statement *statement, const char *name,
                         struct sl_arena *arena)
{
    int at = column(statement, name);
    const unsigned char *text = NULL;

    if (at >= 0)
        text = sqlite3_column_text(statement->prepared, at);
    if (!text)
        return NULL;
    return sl_arena_text(arena, (const char *)text,
                         (size_t)sqlite3_column_bytes(statement->prepared, at));
}

const char *sl_read_filled(struct sl_statement *statement, const char *name,
                           struct sl_arena *arena)
{
    const char *copy = sl_read_copy(statement, name, arena);

    return copy ? copy : "";
}
