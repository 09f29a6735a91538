#include "importer/file_pass.h"

#include <string.h>

#include "importer/answers.h"
#include "importer/broken.h"
#include "importer/csv_reader.h"
#include "importer/doubts.h"

/* How much is read between two calls of progress. */
#define PROGRESS_BYTES ((long long)1024 * 1024)
/* A value longer than this is not repeated in a record's reason. */
#define READABLE_BYTES 60

/* Every record begins with its line. */
_Static_assert(offsetof(struct sl_station, line) == 0, "stations");
_Static_assert(offsetof(struct sl_curve_point, line) == 0, "curves");
_Static_assert(offsetof(struct sl_pipe, line) == 0, "pipes");
_Static_assert(offsetof(struct sl_fitting, line) == 0, "fittings");
_Static_assert(offsetof(struct sl_pump, line) == 0, "pumps");
_Static_assert(offsetof(struct sl_owner_condition, line) == 0, "conditions");
_Static_assert(offsetof(struct sl_owner_rule, line) == 0, "margin rules");

struct pass {
    const struct sl_file_pass *as;
    const struct sl_record_kind *kind;
    struct sl_csv_reader reader;
    union sl_record record;
    struct sl_problem problem;
    struct sl_text first_reason; /* of the record under way */
    struct sl_text shown;
    long errors; /* told of it so far */
    long long next_progress;
};

static const char *record_id(const struct pass *pass)
{
    return sl_csv_shown_cell(&pass->reader, pass->as->columns->key);
}

/* The station that a pump or pipe says it belongs to, "" for other kinds. */
static const char *station_of(const struct pass *pass)
{
    return pass->as->columns->station == pass->as->columns->key
               ? ""
               : sl_csv_shown_cell(&pass->reader, pass->as->columns->station);
}

static enum sl_status tell(const struct pass *pass, enum sl_severity severity,
                           const char *column, const char *value,
                           struct sl_error *error)
{
    const struct sl_sink *sink = pass->as->sink;
    struct sl_finding finding = {
        .code = pass->problem.code,
        .severity = severity,
        .file = pass->kind->file,
        .line = pass->reader.line,
        .column = column,
        .record_id = record_id(pass),
        .value = value,
        .reason = sl_text_string(&pass->problem.reason),
        .remedy = sl_text_string(&pass->problem.remedy),
    };

    return sink->finding(sink->context, &finding, error);
}

/* Tell the problem at hand; the record's first is also why it is set
 * aside. */
static enum sl_status tell_error(struct pass *pass, const char *column,
                                 const char *value, struct sl_error *error)
{
    if (pass->errors++ == 0) {
        sl_text_clear(&pass->first_reason);
        sl_text_add(&pass->first_reason, pass->problem.reason.bytes,
                    pass->problem.reason.length);
    }
    return tell(pass, SL_ERROR, column, value, error);
}

/* Tell what is wrong with a cell; out of its finding the reason needs the
 * column and, where it is of readable length, the value. */
static enum sl_status tell_cell(struct pass *pass, const char *column,
                                const char *value, size_t length,
                                struct sl_error *error)
{
    enum sl_status status = tell_error(pass, column, value, error);

    if (pass->errors > 1)
        return status;
    sl_text_clear(&pass->first_reason);
    sl_text_add_string(&pass->first_reason, column);
    if (length > 0 && length <= READABLE_BYTES)
        sl_text_addf(&pass->first_reason, " \"%s\"", value);
    sl_text_addf(&pass->first_reason, ": %s",
                 sl_text_string(&pass->problem.reason));
    return status;
}

static enum sl_status set_aside(struct pass *pass, enum sl_fate fate,
                                const char *reason, struct sl_error *error)
{
    const struct sl_sink *sink = pass->as->sink;
    struct sl_aside aside = {.kind = pass->as->kind,
                             .fate = fate,
                             .line = pass->reader.line,
                             .record_id = record_id(pass),
                             .station_id = station_of(pass),
                             .reason = reason,
                             .raw = pass->reader.raw,
                             .raw_length = pass->reader.raw_length};

    if (fate == SL_REJECTED)
        pass->as->sum->rejected++;
    else
        pass->as->sum->out_of_scope++;
    return sink->set_aside(sink->context, &aside, error);
}

static enum sl_status reject(struct pass *pass, struct sl_error *error)
{
    return set_aside(pass, SL_REJECTED, sl_text_string(&pass->first_reason),
                     error);
}

static enum sl_status reject_whole(struct pass *pass, struct sl_error *error)
{
    enum sl_status status;

    sl_broken_beginning(&pass->reader, &pass->shown);
    status = tell_error(pass, "", sl_text_string(&pass->shown), error);
    return status ? status : reject(pass, error);
}

/* Every cell into the record; every problem is told. */
static enum sl_status take_cells(struct pass *pass, struct sl_error *error)
{
    const struct sl_columns *columns = pass->as->columns;
    const struct sl_csv_reader *reader = &pass->reader;

    memset(&pass->record, 0, pass->kind->size);
    for (size_t i = 0; i < columns->count; i++) {
        const struct sl_column *column = &columns->list[i];
        const char *text = sl_csv_cell(reader, i);
        enum sl_status status;

        if (!column->field || sl_cell_take(column, pass->as->vocabularies, text,
                                           reader->cells[i].length,
                                           &pass->record, &pass->problem))
            continue;
        status = tell_cell(pass, column->header, text, reader->cells[i].length,
                           error);
        if (status)
            return status;
    }
    return SL_OK;
}

static void number_line(struct pass *pass)
{
    memcpy(&pass->record, &pass->reader.line, sizeof pass->reader.line);
}

/* Why the record is out of scope by its own word, or NULL. */
static const char *out_of_service(struct pass *pass)
{
    const struct sl_station *station = &pass->record.station;

    if (pass->as->kind == SL_KIND_PUMP)
        return pass->record.pump.in_service == SL_NO ? "out of service" : NULL;
    if (pass->as->kind != SL_KIND_STATION || station->in_service != SL_NO)
        return NULL;
    sl_text_clear(&pass->first_reason);
    sl_text_add_string(&pass->first_reason, "out of service");
    if (station->year_retired.known)
        sl_text_addf(&pass->first_reason, " since %.0f",
                     station->year_retired.value);
    return sl_text_string(&pass->first_reason);
}

static enum sl_status tell_doubts(struct pass *pass, struct sl_error *error)
{
    const struct sl_columns *columns = pass->as->columns;
    struct sl_doubt doubts[SL_DOUBTS_MOST];
    size_t count =
        sl_doubts_find(pass->as->kind, &pass->record, pass->as->year, doubts);

    for (size_t i = 0; i < count; i++) {
        const struct sl_field *field = sl_field_by_name(
            pass->kind, doubts[i].field, strlen(doubts[i].field));
        const struct sl_column *column = sl_columns_of(columns, field);
        enum sl_status status;

        if (!column)
            return sl_error_set(error, SL_BUG,
                                "a doubt about \"%s\", which "
                                "was not read",
                                doubts[i].field);
        sl_problem_set(&pass->problem, doubts[i].code, doubts[i].remedy, "%s",
                       doubts[i].reason);
        status =
            tell(pass, SL_DOUBT, column->header,
                 sl_csv_cell(&pass->reader, (size_t)(column - columns->list)),
                 error);
        if (status)
            return status;
    }
    return SL_OK;
}

/* The sink did not keep the record. */
static enum sl_status refused_by_sink(struct pass *pass,
                                      const struct sl_answer *answer,
                                      struct sl_error *error)
{
    const struct sl_field *field = &pass->kind->fields[0];
    const struct sl_column *column;
    const char *value;
    enum sl_status status;

    if (answer->field && answer->kind != SL_ANSWER_DUPLICATE)
        field =
            sl_field_by_name(pass->kind, answer->field, strlen(answer->field));
    column = field ? sl_columns_of(pass->as->columns, field) : NULL;
    if (!column || field->type != SL_FIELD_TEXT)
        return sl_error_set(error, SL_BUG,
                            "%s:%ld: an answer about a field that was not "
                            "read",
                            pass->kind->file, pass->reader.line);
    value = *sl_field_text(field, &pass->record);
    if (sl_answer_fate(pass->kind, answer, value ? value : "",
                       &pass->problem) == SL_OUT_OF_SCOPE)
        return set_aside(pass, SL_OUT_OF_SCOPE,
                         sl_text_string(&pass->problem.reason), error);
    status = tell_error(pass, column->header, value ? value : "", error);
    return status ? status : reject(pass, error);
}

/* Hand over a record in order. */
static enum sl_status offer(struct pass *pass, struct sl_error *error)
{
    const struct sl_sink *sink = pass->as->sink;
    struct sl_answer answer = {0};
    const char *out = out_of_service(pass);
    enum sl_status status;

    if (out)
        return set_aside(pass, SL_OUT_OF_SCOPE, out, error);
    status = sink->record(sink->context, pass->as->kind, &pass->record, &answer,
                          error);
    if (status)
        return status;
    if (answer.kind != SL_ANSWER_KEPT)
        return refused_by_sink(pass, &answer, error);
    pass->as->sum->kept++;
    return tell_doubts(pass, error);
}

static enum sl_status take_record(struct pass *pass,
                                  enum sl_csv_outcome outcome,
                                  struct sl_error *error)
{
    const struct sl_csv_reader *reader = &pass->reader;
    size_t wanted = pass->as->columns->count;
    enum sl_status status;

    if (outcome == SL_CSV_RECORD && sl_csv_is_blank(reader))
        return SL_OK;
    pass->errors = 0;
    pass->as->sum->read++;
    if (outcome != SL_CSV_RECORD) {
        sl_broken_problem(&pass->reader, outcome, &pass->problem);
        return reject_whole(pass, error);
    }
    if (reader->count < wanted || reader->surplus > 0) {
        sl_problem_set(&pass->problem, "cell-count",
                       "give every column its cell, empty where the value is "
                       "unknown; quote a cell that has a comma in it",
                       "the record has %zu cells, the header %zu",
                       reader->count, wanted);
        return reject_whole(pass, error);
    }
    status = take_cells(pass, error);
    if (status)
        return status;
    if (pass->errors > 0)
        return reject(pass, error);
    number_line(pass);
    return offer(pass, error);
}

static enum sl_status progress(struct pass *pass, struct sl_error *error)
{
    const struct sl_sink *sink = pass->as->sink;
    long long done = pass->as->file->position;

    if (!sink->progress || done < pass->next_progress)
        return SL_OK;
    pass->next_progress = done + PROGRESS_BYTES;
    if (sink->progress(sink->context, pass->as->bytes_before + done,
                       pass->as->bytes_all))
        return SL_OK;
    return sl_error_set(error, SL_INTERRUPTED,
                        "stopped while reading %s; nothing was changed",
                        pass->kind->file);
}

static enum sl_status read_records(struct pass *pass, struct sl_error *error)
{
    enum sl_csv_outcome outcome = SL_CSV_RECORD;
    /* The header, understood before. */
    enum sl_status status = sl_csv_reader_next(&pass->reader, &outcome, error);

    pass->reader.limit = pass->as->columns->count;
    while (!status) {
        status = progress(pass, error);
        if (!status)
            status = sl_csv_reader_next(&pass->reader, &outcome, error);
        if (status || outcome == SL_CSV_END)
            break;
        status = take_record(pass, outcome, error);
    }
    return status;
}

static enum sl_status note_unused(struct pass *pass, const char *header,
                                  struct sl_error *error)
{
    bool near = sl_columns_nearest(pass->kind, header, &pass->shown);

    sl_problem_set(&pass->problem, "unused-column", "", "%s",
                   *header ? "no column of this name is known; it is not read"
                           : "the column has no name; it is not read");
    if (near)
        sl_text_addf(&pass->problem.remedy,
                     "if \"%s\" is meant, name it so; else nothing is to be "
                     "done",
                     sl_text_string(&pass->shown));
    else
        sl_text_add_string(&pass->problem.remedy, "nothing is to be done");
    return tell(pass, SL_NOTE, header, "", error);
}

static enum sl_status tell_columns(struct pass *pass, struct sl_error *error)
{
    const struct sl_columns *columns = pass->as->columns;
    const struct sl_sink *sink = pass->as->sink;
    enum sl_status status = SL_OK;

    pass->reader.line = columns->line;
    for (size_t i = 0; i < columns->count && !status; i++) {
        const struct sl_column *column = &columns->list[i];
        struct sl_column_use use = {
            .file = pass->kind->file,
            .position = (int)i + 1,
            .header = column->header,
            .field = column->field ? column->use : "",
            .unit = column->is_grade ? NULL : column->unit,
        };

        status = sink->column(sink->context, &use, error);
        if (!status && !column->field)
            status = note_unused(pass, column->header, error);
    }
    return status;
}

enum sl_status sl_file_pass_run(const struct sl_file_pass *as,
                                struct sl_error *error)
{
    struct pass pass = {.as = as, .kind = as->columns->kind};
    const struct sl_file_sum *sum = as->sum;
    enum sl_status status = sl_csv_reader_init(&pass.reader, as->file, error);

    if (!status)
        status = tell_columns(&pass, error);
    if (!status)
        status = read_records(&pass, error);
    if (!status)
        status = sl_input_file_unchanged(as->file, error);
    if (!status && sum->read != sum->kept + sum->rejected + sum->out_of_scope)
        status = sl_error_set(error, SL_BUG, "%s: the records do not add up",
                              pass.kind->file);
    sl_csv_reader_release(&pass.reader);
    sl_problem_release(&pass.problem);
    sl_text_release(&pass.first_reason);
    sl_text_release(&pass.shown);
    return status;
}
