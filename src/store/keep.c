/* Keeping a record: what it refers to is looked up, then its fields are
 * bound straight from the list of fields. */
#include <string.h>

#include "base/text.h"
#include "model/fields.h"
#include "store/lookup.h"
#include "store/statement.h"
#include "store/vintage.h"

struct sl_keeping {
    struct sl_store *store;
    long long vintage;
    const struct sl_record_kind *kind;
    void *record;
    struct sl_answer *answer;
    struct sl_error *error;
};

static const enum sl_query add_queries[SL_KIND_COUNT] = {
    [SL_KIND_STATION] = SL_QUERY_ADD_STATION,
    [SL_KIND_CURVE] = SL_QUERY_ADD_CURVE_POINT,
    [SL_KIND_PIPE] = SL_QUERY_ADD_PIPE,
    [SL_KIND_FITTING] = SL_QUERY_ADD_FITTING,
    [SL_KIND_PUMP] = SL_QUERY_ADD_PUMP,
    [SL_KIND_CONDITION] = SL_QUERY_ADD_CONDITION,
    [SL_KIND_RULE] = SL_QUERY_ADD_MARGIN_RULE,
};

static enum sl_status bind_word(const struct sl_keeping *keeping,
                                const struct sl_field *field,
                                struct sl_statement *statement)
{
    int kept = *sl_field_word(field, keeping->record);
    const char *word = NULL;

    if (!kept)
        return SL_OK;
    if (!keeping->store->vocabularies)
        return sl_error_set(keeping->error, SL_BUG,
                            "a record was added before the tables were read");
    word = sl_word(&keeping->store->vocabularies->of[field->vocabulary], kept);
    if (!*word)
        return sl_error_set(keeping->error, SL_BUG,
                            "%d is no word of the field \"%s\"", kept,
                            field->name);
    sl_bind_text(statement, field->name, word);
    return SL_OK;
}

static enum sl_status bind_fields(const struct sl_keeping *keeping,
                                  struct sl_statement *statement)
{
    for (size_t i = 0; i < keeping->kind->field_count; i++) {
        const struct sl_field *field = &keeping->kind->fields[i];
        const struct sl_number *number = NULL;
        enum sl_status status = SL_OK;

        switch (field->type) {
        case SL_FIELD_TEXT:
            sl_bind_text(statement, field->name,
                         *sl_field_text(field, keeping->record));
            break;
        case SL_FIELD_NUMBER:
        case SL_FIELD_WHOLE:
            number = sl_field_number(field, keeping->record);
            if (number->known)
                sl_bind_number(statement, field->name, number->value);
            break;
        case SL_FIELD_WORD:
            status = bind_word(keeping, field, statement);
            break;
        }
        if (status)
            return status;
    }
    return SL_OK;
}

static enum sl_status add_grade(const struct sl_keeping *keeping,
                                long long record, const char *field, char grade)
{
    const char letter[2] = {grade, '\0'};
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(keeping->store, SL_QUERY_ADD_GRADE,
                                             &statement, keeping->error);

    if (status)
        return status;
    sl_bind_text(statement, "of_table", keeping->kind->table);
    sl_bind_whole(statement, "record", record);
    sl_bind_text(statement, "field", field);
    sl_bind_whole(statement, "vintage", keeping->vintage);
    sl_bind_text(statement, "grade", letter);
    keeping->store->traits_vintage = 0;
    return sl_statement_run(statement, keeping->error);
}

static enum sl_status add_grades(const struct sl_keeping *keeping,
                                 long long record)
{
    for (size_t i = 0; i < keeping->kind->field_count; i++) {
        const struct sl_field *field = &keeping->kind->fields[i];
        const struct sl_number *number = NULL;
        enum sl_status status = SL_OK;

        if (field->type != SL_FIELD_NUMBER && field->type != SL_FIELD_WHOLE)
            continue;
        number = sl_field_number(field, keeping->record);
        if (number->grade)
            status = add_grade(keeping, record, field->name, number->grade);
        if (status)
            return status;
    }
    return SL_OK;
}

/* Look up what `field` names; on true the record may go on. */
static enum sl_status refer(const struct sl_keeping *keeping, const char *field,
                            enum sl_kind to, const char *id,
                            struct sl_found *found)
{
    enum sl_status status = sl_store_look_up(keeping->store, keeping->vintage,
                                             to, id, found, keeping->error);

    if (status || found->is_kept)
        return status;
    keeping->answer->field = field;
    return sl_store_why_not_kept(keeping->store, keeping->vintage, to, id,
                                 keeping->answer, keeping->error);
}

static enum sl_status refer_pipe(const struct sl_keeping *keeping,
                                 struct sl_statement *add)
{
    const struct sl_pipe *pipe = keeping->record;
    struct sl_found station = {.is_kept = false};
    enum sl_status status = refer(keeping, "station_id", SL_KIND_STATION,
                                  pipe->station_id, &station);

    sl_bind_whole(add, "station", station.key);
    return status;
}

static enum sl_status refer_fitting(const struct sl_keeping *keeping,
                                    struct sl_statement *add)
{
    const struct sl_fitting *fitting = keeping->record;
    struct sl_found pipe = {.is_kept = false};
    enum sl_status status =
        refer(keeping, "pipe_id", SL_KIND_PIPE, fitting->pipe_id, &pipe);

    sl_bind_whole(add, "pipe", pipe.key);
    return status;
}

static enum sl_status refer_suction(const struct sl_keeping *keeping,
                                    long long station, struct sl_statement *add)
{
    const struct sl_pump *pump = keeping->record;
    struct sl_found pipe = {.is_kept = false};
    enum sl_status status = refer(keeping, "suction_pipe_id", SL_KIND_PIPE,
                                  pump->suction_pipe_id, &pipe);

    if (status || !pipe.is_kept)
        return status;
    if (pipe.station != station)
        *keeping->answer =
            (struct sl_answer){SL_ANSWER_OTHER_STATION, "suction_pipe_id",
                               sl_record_kind(SL_KIND_PIPE)->file, pipe.line};
    sl_bind_whole(add, "suction_pipe", pipe.key);
    return SL_OK;
}

static enum sl_status refer_pump(const struct sl_keeping *keeping,
                                 struct sl_statement *add)
{
    const struct sl_pump *pump = keeping->record;
    struct sl_found station = {.is_kept = false};
    struct sl_found curve = {.is_kept = false};
    enum sl_status status = refer(keeping, "station_id", SL_KIND_STATION,
                                  pump->station_id, &station);

    if (status || !station.is_kept)
        return status;
    sl_bind_whole(add, "station", station.key);
    if (pump->curve_id)
        status =
            refer(keeping, "curve_id", SL_KIND_CURVE, pump->curve_id, &curve);
    if (status || keeping->answer->kind != SL_ANSWER_KEPT)
        return status;
    return pump->suction_pipe_id ? refer_suction(keeping, station.key, add)
                                 : SL_OK;
}

/* The place where each kind's references are named; NULL: it has none. */
static enum sl_status (*const refer_by_kind[SL_KIND_COUNT])(
    const struct sl_keeping *, struct sl_statement *) = {
    [SL_KIND_PIPE] = refer_pipe,
    [SL_KIND_FITTING] = refer_fitting,
    [SL_KIND_PUMP] = refer_pump,
};

/* The line of the record that has this one's key. */
static enum sl_status line_of_first(const struct sl_keeping *keeping,
                                    enum sl_kind kind)
{
    struct sl_found found = {.is_kept = false};
    const struct sl_curve_point *point = keeping->record;
    /* The key is the first field of every kind that has one. */
    const char *id = *sl_field_text(keeping->kind->fields, keeping->record);
    enum sl_status status =
        kind == SL_KIND_CURVE
            ? sl_store_look_up_point(keeping->store, keeping->vintage, id,
                                     point->flow.value, &found, keeping->error)
            : sl_store_look_up(keeping->store, keeping->vintage, kind, id,
                               &found, keeping->error);

    if (status)
        return status;
    *keeping->answer =
        (struct sl_answer){SL_ANSWER_DUPLICATE, keeping->kind->fields[0].name,
                           keeping->kind->file, found.line};
    return SL_OK;
}

static enum sl_status insert(const struct sl_keeping *keeping,
                             enum sl_kind kind, struct sl_statement *add)
{
    /* Every kind's struct begins with its line. */
    const long *line = keeping->record;
    enum sl_status status = SL_OK;

    sl_bind_whole(add, "vintage", keeping->vintage);
    sl_bind_whole(add, "line", *line);
    status = bind_fields(keeping, add);
    if (!status)
        status = sl_statement_run(add, keeping->error);
    if (status)
        return status;
    if (sqlite3_changes(keeping->store->database) == 0)
        return line_of_first(keeping, kind);
    return add_grades(keeping,
                      sqlite3_last_insert_rowid(keeping->store->database));
}

enum sl_status sl_store_add_record(struct sl_store *store, long long vintage,
                                   enum sl_kind kind, const void *record,
                                   struct sl_answer *answer,
                                   struct sl_error *error)
{
    /* Fields are read through the accessors that also fill a record. */
    union sl_record copy;
    struct sl_keeping keeping = {
        .store = store,
        .vintage = vintage,
        .kind = sl_record_kind(kind),
        .record = &copy,
        .answer = answer,
        .error = error,
    };
    struct sl_statement *add = NULL;
    enum sl_status status =
        sl_statement_use(store, add_queries[kind], &add, error);

    memcpy(&copy, record, keeping.kind->size);
    *answer = (struct sl_answer){SL_ANSWER_KEPT, "", "", 0};
    if (!status && refer_by_kind[kind])
        status = refer_by_kind[kind](&keeping, add);
    if (status || answer->kind != SL_ANSWER_KEPT)
        return status;
    return insert(&keeping, kind, add);
}
