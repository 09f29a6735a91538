#include "importer/columns.h"

#include <ctype.h>
#include <stdarg.h>
#include <stdio.h>
#include <string.h>

#include "importer/likeness.h"

#define GRADE "_grade"
#define GRADE_LENGTH (sizeof GRADE - 1)
/* A message is cut here: SL_ERROR_LENGTH less room for "and N more". */
#define REFUSAL_LENGTH 960

void sl_refusal_add(struct sl_refusal *refusal, const char *format, ...)
{
    char message[REFUSAL_LENGTH];
    va_list arguments;

    refusal->count++;
    if (refusal->problems.length > REFUSAL_LENGTH)
        return;
    refusal->told++;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    sl_text_addf(&refusal->problems, "%s%s",
                 refusal->problems.length ? "; also " : "", message);
}

static bool has_unit(const struct sl_field *field)
{
    return (field->type == SL_FIELD_NUMBER || field->type == SL_FIELD_WHOLE) &&
           field->quantity != SL_PURE;
}

static bool is_numeric(const struct sl_field *field)
{
    return field->type == SL_FIELD_NUMBER || field->type == SL_FIELD_WHOLE;
}

/* A field's name stands at the start of the header: what follows "_", or
 * NULL. */
static const char *rest_behind(const struct sl_field *field, const char *name)
{
    size_t length = strlen(field->name);

    if (strncmp(field->name, name, length) != 0 || name[length] != '_')
        return NULL;
    return name + length + 1;
}

/* Match "<field>" or "<field>_<unit>".  When only a field with a dimension
 * and no unit of its own fits, *unit is NULL and the field is given. */
static const struct sl_field *match(const struct sl_record_kind *kind,
                                    const char *name,
                                    const struct sl_unit **unit)
{
    const struct sl_field *without_unit =
        sl_field_by_name(kind, name, strlen(name));

    *unit = NULL;
    if (without_unit)
        return without_unit;
    for (size_t i = 0; i < kind->field_count; i++) {
        const struct sl_field *field = &kind->fields[i];
        const char *rest = has_unit(field) ? rest_behind(field, name) : NULL;

        if (!rest)
            continue;
        without_unit = field;
        *unit = sl_unit_by_suffix(field->quantity, rest);
        if (*unit)
            return field;
    }
    return without_unit;
}

/* "rated_flow_l_s, rated_flow_gpm, ..." */
static void add_choices(struct sl_text *text, const struct sl_field *field)
{
    const char *unit = sl_unit_choices(field->quantity);

    while (*unit) {
        size_t length = strcspn(unit, ",");

        sl_text_addf(text, "%s_%.*s", field->name, (int)length, unit);
        unit += length;
        if (*unit) {
            sl_text_add_string(text, ", ");
            unit += strspn(unit, ", ");
        }
    }
}

static void refuse_unit(const struct sl_columns *columns,
                        const struct sl_column *column, const char *name,
                        struct sl_refusal *refusal)
{
    const char *rest = rest_behind(column->field, name);
    struct sl_text choices = {0};

    add_choices(&choices, column->field);
    if (rest)
        sl_refusal_add(refusal,
                       "%s:%ld: column \"%s\": \"%s\" is no unit it can have; "
                       "name it %s, or otherwise if it is something else",
                       columns->kind->file, columns->line, column->header, rest,
                       sl_text_string(&choices));
    else
        sl_refusal_add(refusal, "%s:%ld: column \"%s\" has no unit; name it %s",
                       columns->kind->file, columns->line, column->header,
                       sl_text_string(&choices));
    sl_text_release(&choices);
}

static void refuse_twice(const struct sl_columns *columns,
                         const struct sl_column *column,
                         struct sl_refusal *refusal)
{
    for (const struct sl_column *other = columns->list; other < column; other++)
        if (other->field == column->field &&
            other->is_grade == column->is_grade) {
            sl_refusal_add(refusal,
                           "%s:%ld: columns \"%s\" and \"%s\" both give %s; "
                           "keep one of them",
                           columns->kind->file, columns->line, other->header,
                           column->header, column->use);
            return;
        }
}

static bool is_key(const struct sl_record_kind *kind,
                   const struct sl_field *field)
{
    size_t length = strlen(field->name);

    return field->type == SL_FIELD_TEXT &&
           (field == kind->fields || strcmp(field->name, "draws_from") == 0 ||
            (length > 3 && strcmp(field->name + length - 3, "_id") == 0));
}

/* Fill column->field and what goes with it from the folded name; cuts a
 * grade's ending off the name. */
static void understand(struct sl_columns *columns, struct sl_column *column,
                       char *name)
{
    size_t length = strlen(name);

    if (length > GRADE_LENGTH &&
        strcmp(name + length - GRADE_LENGTH, GRADE) == 0) {
        column->is_grade = true;
        name[length - GRADE_LENGTH] = '\0';
    }
    column->field = match(columns->kind, name, &column->unit);
    if (column->is_grade && column->field && !is_numeric(column->field))
        column->field = NULL;
    if (!column->field)
        return;
    column->is_key = is_key(columns->kind, column->field);
    column->use = column->field->name;
    if (column->is_grade) {
        size_t room = strlen(column->use) + GRADE_LENGTH + 1;
        char *use = sl_arena_new(&columns->arena, room, 1);

        snprintf(use, room, "%s" GRADE, column->field->name);
        column->use = use;
    }
}

static void read_column(struct sl_columns *columns, struct sl_column *column,
                        struct sl_refusal *refusal)
{
    char *name =
        sl_arena_text(&columns->arena, column->header, strlen(column->header));

    for (char *c = name; *c; c++)
        *c = (char)tolower((unsigned char)*c);
    understand(columns, column, name);
    if (!column->field)
        return;
    /* A grade needs no unit: it grades the value whatever its unit. */
    if (has_unit(column->field) && !column->unit &&
        !(column->is_grade && strcmp(name, column->field->name) == 0))
        refuse_unit(columns, column, name, refusal);
    refuse_twice(columns, column, refusal);
}

const struct sl_column *sl_columns_of(const struct sl_columns *columns,
                                      const struct sl_field *field)
{
    for (size_t i = 0; i < columns->count; i++)
        if (columns->list[i].field == field && !columns->list[i].is_grade)
            return &columns->list[i];
    return NULL;
}

/* The header that may be meant by a column that is not there. */
static const char *meant_by(const struct sl_columns *columns,
                            const struct sl_field *field)
{
    struct sl_text nearest = {0};
    const char *header = NULL;

    for (size_t i = 0; !header && i < columns->count; i++) {
        const char *tried = columns->list[i].header;

        if (!columns->list[i].field &&
            sl_columns_nearest(columns->kind, tried, &nearest) &&
            strncmp(sl_text_string(&nearest), field->name,
                    strlen(field->name)) == 0)
            header = tried;
    }
    sl_text_release(&nearest);
    return header;
}

static void refuse_missing(const struct sl_columns *columns,
                           const struct sl_field *field,
                           struct sl_refusal *refusal)
{
    const char *meant = meant_by(columns, field);

    sl_refusal_add(refusal,
                   "%s:%ld: column \"%s%s\" is missing; no %s can be read "
                   "without it%s%s%s",
                   columns->kind->file, columns->line, field->name,
                   has_unit(field) ? "_<unit>" : "", columns->kind->name,
                   meant ? "; if \"" : "", meant ? meant : "",
                   meant ? "\" is meant, name it so" : "");
}

static void require(struct sl_columns *columns, struct sl_refusal *refusal)
{
    const struct sl_record_kind *kind = columns->kind;

    for (size_t i = 0; i < kind->field_count; i++) {
        const struct sl_field *field = &kind->fields[i];
        const struct sl_column *column = sl_columns_of(columns, field);

        if (field->required && !column)
            refuse_missing(columns, field, refusal);
        if (i == 0 && column)
            columns->key = columns->station = (size_t)(column - columns->list);
        if (column && sl_same(field->name, "station_id"))
            columns->station = (size_t)(column - columns->list);
    }
}

/* A table saved with another mark between its columns. */
static bool parted_otherwise(const struct sl_columns *columns)
{
    return columns->count == 1 && strpbrk(columns->list[0].header, ";\t");
}

void sl_columns_init(struct sl_columns *columns,
                     const struct sl_record_kind *kind,
                     const struct sl_csv_reader *reader,
                     struct sl_refusal *refusal)
{
    *columns = (struct sl_columns){.kind = kind, .line = reader->line};
    columns->count = reader->count;
    while (columns->count > 0 && reader->cells[columns->count - 1].length == 0)
        columns->count--;
    columns->list = sl_arena_new(&columns->arena, columns->count + 1,
                                 sizeof *columns->list);
    for (size_t i = 0; i < columns->count; i++) {
        struct sl_column *column = &columns->list[i];

        column->use = "";
        column->header = sl_arena_text(&columns->arena, sl_csv_cell(reader, i),
                                       reader->cells[i].length);
        read_column(columns, column, refusal);
    }
    if (parted_otherwise(columns))
        sl_refusal_add(refusal,
                       "%s:%ld: the header is a single column; save the file "
                       "with commas between columns, not semicolons or tabs",
                       kind->file, columns->line);
    else
        require(columns, refusal);
}

void sl_columns_release(struct sl_columns *columns)
{
    sl_arena_release(&columns->arena);
    *columns = (struct sl_columns){0};
}

/* Keep `name` when it is nearer to the header than what was found before. */
static void consider(const char *header, const char *name, size_t *least,
                     struct sl_text *near)
{
    size_t distance = sl_distance(header, strlen(header), name);

    if (distance >= *least)
        return;
    *least = distance;
    sl_text_clear(near);
    sl_text_add_string(near, name);
}

bool sl_columns_nearest(const struct sl_record_kind *kind, const char *header,
                        struct sl_text *near)
{
    /* A third of the letters wrong is a slip; more is another word. */
    size_t least = strlen(header) / 3 + 1;
    struct sl_text names = {0};

    sl_text_clear(near);
    for (size_t i = 0; i < kind->field_count; i++) {
        const struct sl_field *field = &kind->fields[i];
        const char *name = field->name;

        sl_text_clear(&names);
        if (has_unit(field))
            add_choices(&names, field);
        else
            sl_text_add_string(&names, name);
        for (char *at = names.bytes, *end; *at; at = end) {
            size_t length = strcspn(at, ",");

            end = at + length + strspn(at + length, ", ");
            at[length] = '\0';
            consider(header, at, &least, near);
        }
    }
    sl_text_release(&names);
    return near->length > 0;
}
