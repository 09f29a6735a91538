/* Records: kept and read back, answered, taken back. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, unlink */
#include "store_fixture.h"

#include "base/text.h"

static void set_aside(struct fixture *f, enum sl_kind kind, enum sl_fate fate,
                      long line, const char *id)
{
    struct sl_aside aside = {kind, fate, line, id, "", "a reason", "raw", 3};

    must(f, sl_store_add_set_aside(f->store, f->vintage, &aside, &f->error));
}

static void assert_answer(struct sl_answer answer, enum sl_answer_kind kind,
                          const char *field, const char *file, long line)
{
    assert_int_equal(answer.kind, kind);
    assert_string_equal(answer.field, field);
    assert_string_equal(answer.file, file);
    assert_int_equal(answer.line, line);
}

/* A value for every member a field list names, different in each. */
static void fill(const struct sl_record_kind *kind,
                 const struct sl_tables *tables, void *record)
{
    static const char *const texts[] = {"T-0", "T-1", "T-2", "T-3", "T-4"};
    int text = 0;

    *(long *)record = 17;
    for (size_t i = 0; i < kind->field_count; i++) {
        const struct sl_field *field = &kind->fields[i];
        double value = (double)i + 2.385;

        switch (field->type) {
        case SL_FIELD_TEXT:
            *sl_field_text(field, record) = texts[text++ % 5];
            break;
        case SL_FIELD_WORD:
            *sl_field_word(field, record) =
                (int)tables->vocabularies.of[field->vocabulary].count;
            break;
        case SL_FIELD_WHOLE:
        case SL_FIELD_NUMBER:
            if (field->type == SL_FIELD_WHOLE)
                value = 1987 + (double)i;
            /* Every third is unknown, every fifth graded. */
            *sl_field_number(field, record) = (struct sl_number){
                i % 3 ? value : 0, i % 3 != 0, i % 5 ? 0 : (char)('A' + i % 4)};
            break;
        }
    }
}

static void assert_same_record(const struct sl_record_kind *kind, void *got,
                               void *want)
{
    assert_int_equal(*(long *)got, *(long *)want);
    for (size_t i = 0; i < kind->field_count; i++) {
        const struct sl_field *field = &kind->fields[i];
        struct sl_number *a = NULL, *b = NULL;

        switch (field->type) {
        case SL_FIELD_TEXT:
            assert_string_equal(*sl_field_text(field, got),
                                *sl_field_text(field, want));
            break;
        case SL_FIELD_WORD:
            assert_int_equal(*sl_field_word(field, got),
                             *sl_field_word(field, want));
            break;
        case SL_FIELD_WHOLE:
        case SL_FIELD_NUMBER:
            a = sl_field_number(field, got);
            b = sl_field_number(field, want);
            if (a->known != b->known || a->value != b->value ||
                a->grade != b->grade)
                fail_msg("%s: %.17g %d '%c', not %.17g %d '%c'", field->name,
                         a->value, a->known, a->grade, b->value, b->known,
                         b->grade);
            break;
        }
    }
}

/* One record of each kind with every field filled, and the ids made to
 * refer to each other. */
struct whole_station {
    struct sl_station station;
    struct sl_curve_point point;
    struct sl_pipe header, branch;
    struct sl_fitting fitting;
    struct sl_pump pump;
};

static struct whole_station whole_station(const struct sl_tables *tables)
{
    struct whole_station s = {.station = {.line = 0}};

    fill(sl_record_kind(SL_KIND_STATION), tables, &s.station);
    fill(sl_record_kind(SL_KIND_CURVE), tables, &s.point);
    fill(sl_record_kind(SL_KIND_PIPE), tables, &s.header);
    fill(sl_record_kind(SL_KIND_PIPE), tables, &s.branch);
    fill(sl_record_kind(SL_KIND_FITTING), tables, &s.fitting);
    fill(sl_record_kind(SL_KIND_PUMP), tables, &s.pump);
    s.station.station_id = "007";
    s.station.name = "Lower Ford \xC3\xA9";
    s.point.curve_id = "C-3";
    s.point.flow = known(0.212);
    s.header.pipe_id = "H";
    s.header.draws_from = NULL;
    s.branch.pipe_id = "B";
    s.branch.draws_from = "H";
    s.header.station_id = s.branch.station_id = "007";
    s.fitting.pipe_id = "H";
    s.pump.pump_id = "P-1";
    s.pump.station_id = "007";
    s.pump.curve_id = "C-3";
    s.pump.suction_pipe_id = "B";
    return s;
}

static void keep_whole(struct fixture *f, const struct whole_station *s)
{
    struct sl_pump twin = s->pump;
    struct sl_curve_point start = s->point;

    twin.pump_id = "P-0";
    start.flow = known(0);
    keep(f, SL_KIND_STATION, &s->station);
    keep(f, SL_KIND_CURVE, &s->point);
    keep(f, SL_KIND_CURVE, &start);
    keep(f, SL_KIND_PIPE, &s->branch);
    keep(f, SL_KIND_PIPE, &s->header);
    keep(f, SL_KIND_FITTING, &s->fitting);
    keep(f, SL_KIND_FITTING, &s->fitting);
    keep(f, SL_KIND_PUMP, &s->pump);
    keep(f, SL_KIND_PUMP, &twin);
}

static void a_station_comes_back_whole(void **state)
{
    struct fixture *f = *state;
    struct whole_station s = whole_station(&f->tables);
    struct sl_dossier d = {.station = 0};
    bool found = false;

    keep_whole(f, &s);
    must(f, sl_store_next_dossier(f->store, f->vintage, "", &f->arena, &d,
                                  &found, &f->error));
    assert_true(found);
    assert_same_record(sl_record_kind(SL_KIND_STATION), &d.record, &s.station);
    assert_int_equal(d.pump_count, 2);
    assert_string_equal(d.pumps[0].record.pump_id, "P-0");
    assert_same_record(sl_record_kind(SL_KIND_PUMP), &d.pumps[1].record,
                       &s.pump);
    assert_ptr_equal(d.pumps[0].curve, d.pumps[1].curve);
    assert_int_equal(d.pumps[0].curve->point_count, 2);
    assert_true(d.pumps[0].curve->points[0].flow.value == 0);
    assert_true(d.pumps[0].curve->points[0].flow.known);
    assert_same_record(sl_record_kind(SL_KIND_CURVE),
                       (void *)&d.pumps[0].curve->points[1], &s.point);
    assert_int_equal(d.pipe_count, 2);
    assert_ptr_equal(d.pumps[1].suction, &d.pipes[0]);
    assert_ptr_equal(d.pipes[0].draws_from, &d.pipes[1]);
    assert_null(d.pipes[1].draws_from);
    assert_same_record(sl_record_kind(SL_KIND_PIPE), &d.pipes[0].record,
                       &s.branch);
    assert_int_equal(d.pipes[0].fitting_count, 0);
    assert_int_equal(d.pipes[1].fitting_count, 2);
    assert_same_record(sl_record_kind(SL_KIND_FITTING),
                       (void *)&d.pipes[1].fittings[1], &s.fitting);
}

static void what_is_not_recorded_stays_unknown(void **state)
{
    struct fixture *f = *state;
    struct sl_dossier d = {.station = 0};
    bool found = false;

    keep_station(f, 2, "S");
    keep_pump(f, 2, "P", "S");
    must(f, sl_store_dossier_of_pump(f->store, f->vintage, "P", &f->arena, &d,
                                     &found, &f->error));
    assert_true(found);
    assert_null(d.record.name);
    assert_int_equal(d.record.service, 0);
    assert_false(d.record.site_elevation.known);
    assert_null(d.pumps[0].curve);
    assert_null(d.pumps[0].suction);
    assert_int_equal(d.pipe_count, 0);
    must(f, sl_store_dossier_of_pump(f->store, f->vintage, "Q", &f->arena, &d,
                                     &found, &f->error));
    assert_false(found);
}

static void stations_come_in_order_of_their_key(void **state)
{
    struct fixture *f = *state;
    static const char *const order[] = {"007", "10", "9", "S", "a"};
    struct sl_dossier d = {.station = 0};
    const char *after = "";
    bool found = false;

    keep_station(f, 2, "S");
    keep_station(f, 3, "9");
    keep_station(f, 4, "10");
    keep_station(f, 5, "a");
    keep_station(f, 6, "007");
    for (size_t i = 0; i < 5; i++) {
        must(f, sl_store_next_dossier(f->store, f->vintage, after, &f->arena,
                                      &d, &found, &f->error));
        assert_true(found);
        assert_string_equal(d.record.station_id, order[i]);
        after = d.record.station_id;
    }
    must(f, sl_store_next_dossier(f->store, f->vintage, after, &f->arena, &d,
                                  &found, &f->error));
    assert_false(found);
    assert_int_equal(sl_store_count_stations(f->store, f->vintage), 5);
}

static void a_key_taken_is_a_duplicate(void **state)
{
    struct fixture *f = *state;
    struct whole_station s = whole_station(&f->tables);

    keep_whole(f, &s);
    s.station.line = s.point.line = s.header.line = s.pump.line = 99;
    assert_answer(add(f, SL_KIND_STATION, &s.station), SL_ANSWER_DUPLICATE,
                  "station_id", "stations.csv", 17);
    assert_answer(add(f, SL_KIND_CURVE, &s.point), SL_ANSWER_DUPLICATE,
                  "curve_id", "curves.csv", 17);
    assert_answer(add(f, SL_KIND_PIPE, &s.header), SL_ANSWER_DUPLICATE,
                  "pipe_id", "suction_pipes.csv", 17);
    assert_answer(add(f, SL_KIND_PUMP, &s.pump), SL_ANSWER_DUPLICATE, "pump_id",
                  "pumps.csv", 17);
    assert_int_equal(sl_store_count_stations(f->store, f->vintage), 1);
}

static void another_vintage_may_have_the_same_keys(void **state)
{
    struct fixture *f = *state;
    struct sl_vintage next = {0, "2027", "decaf", "2027-07-01T12:00:00Z"};

    keep_station(f, 2, "S");
    must(f, sl_store_add_vintage(f->store, &next, &f->error));
    f->vintage = next.vintage;
    keep_station(f, 3, "S");
    assert_int_equal(sl_store_count_stations(f->store, next.vintage), 1);
    assert_int_equal(sl_store_count_stations(f->store, next.vintage - 1), 1);
}

static void references_to_nothing_are_told(void **state)
{
    struct fixture *f = *state;
    struct sl_pump pump = {.line = 5, .pump_id = "P", .station_id = "S"};
    struct sl_pipe pipe = {.line = 6, .pipe_id = "H", .station_id = "S"};
    struct sl_fitting fitting = {.line = 7, .pipe_id = "H", .fitting = 1};

    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_NO_SUCH, "station_id",
                  "stations.csv", 0);
    assert_answer(add(f, SL_KIND_PIPE, &pipe), SL_ANSWER_NO_SUCH, "station_id",
                  "stations.csv", 0);
    assert_answer(add(f, SL_KIND_FITTING, &fitting), SL_ANSWER_NO_SUCH,
                  "pipe_id", "suction_pipes.csv", 0);
    keep_station(f, 2, "S");
    pump.curve_id = "C";
    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_NO_SUCH, "curve_id",
                  "curves.csv", 0);
    pump.curve_id = NULL;
    pump.suction_pipe_id = "H";
    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_NO_SUCH,
                  "suction_pipe_id", "suction_pipes.csv", 0);
}

static void references_to_what_was_set_aside_are_told(void **state)
{
    struct fixture *f = *state;
    struct sl_pump pump = {.line = 5, .pump_id = "P", .station_id = "S"};

    set_aside(f, SL_KIND_STATION, SL_REJECTED, 8, "S");
    set_aside(f, SL_KIND_STATION, SL_OUT_OF_SCOPE, 9, "S");
    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_REFERENCE_REJECTED,
                  "station_id", "stations.csv", 8);
    set_aside(f, SL_KIND_STATION, SL_OUT_OF_SCOPE, 3, "T");
    pump.station_id = "T";
    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_REFERENCE_OUT_OF_SCOPE,
                  "station_id", "stations.csv", 3);
    /* One that was kept counts, whatever else had its key. */
    keep_station(f, 12, "S");
    keep_pump(f, 2, "Q", "S");
}

static void another_stations_pipe_is_told(void **state)
{
    struct fixture *f = *state;
    struct sl_pump pump = {
        .line = 5, .pump_id = "P", .station_id = "S", .suction_pipe_id = "H"};

    keep_station(f, 2, "S");
    keep_station(f, 3, "T");
    keep_pipe(f, 44, "H", "T", NULL);
    assert_answer(add(f, SL_KIND_PUMP, &pump), SL_ANSWER_OTHER_STATION,
                  "suction_pipe_id", "suction_pipes.csv", 44);
}

/* Expect the next recall, and set it aside as its caller must. */
static void assert_recalled(struct fixture *f, const char *pipe,
                            const char *from, long line,
                            enum sl_answer_kind kind, long answer_line)
{
    struct sl_recall recall = {.line = 0};
    bool found = false;

    must(f, sl_store_recall_pipe(f->store, f->vintage, &recall, &found,
                                 &f->error));
    assert_true(found);
    assert_string_equal(recall.record_id, pipe);
    assert_string_equal(recall.value, from);
    assert_int_equal(recall.line, line);
    assert_answer(recall.answer, kind, "draws_from", "suction_pipes.csv",
                  answer_line);
    set_aside(f, SL_KIND_PIPE, SL_REJECTED, line, pipe);
}

static void assert_all_sound(struct fixture *f)
{
    struct sl_recall recall = {.line = 0};
    bool found = true;

    must(f, sl_store_recall_pipe(f->store, f->vintage, &recall, &found,
                                 &f->error));
    assert_false(found);
}

static void sound_pipes_are_left(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S");
    keep_pipe(f, 2, "C", "S", "B");
    keep_pipe(f, 3, "B", "S", "A");
    keep_pipe(f, 4, "A", "S", NULL);
    keep_pipe(f, 5, "D", "S", "B");
    assert_all_sound(f);
    assert_all_sound(f);
}

static void a_broken_way_takes_its_followers_back(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S");
    keep_station(f, 3, "T");
    set_aside(f, SL_KIND_PIPE, SL_OUT_OF_SCOPE, 9, "gone");
    keep_pipe(f, 2, "C", "S", "B");
    keep_pipe(f, 3, "B", "S", "nowhere");
    keep_pipe(f, 4, "A", "S", NULL);
    keep_pipe(f, 5, "D", "T", "A");
    keep_pipe(f, 6, "E", "T", "gone");
    assert_recalled(f, "B", "nowhere", 3, SL_ANSWER_NO_SUCH, 0);
    assert_recalled(f, "C", "B", 2, SL_ANSWER_REFERENCE_REJECTED, 3);
    assert_recalled(f, "D", "A", 5, SL_ANSWER_OTHER_STATION, 4);
    assert_recalled(f, "E", "gone", 6, SL_ANSWER_REFERENCE_OUT_OF_SCOPE, 9);
    assert_all_sound(f);
    assert_false(
        add(f, SL_KIND_FITTING,
            &(struct sl_fitting){.line = 2, .pipe_id = "B", .fitting = 1})
            .kind == SL_ANSWER_KEPT);
}

static void a_pipe_draws_from_its_own_station(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S");
    keep_station(f, 3, "T");
    keep_pipe(f, 2, "A", "S", NULL);
    keep_pipe(f, 3, "D", "T", "A");
    assert_recalled(f, "D", "A", 3, SL_ANSWER_OTHER_STATION, 2);
    assert_all_sound(f);
}

/* What was found once is not believed for ever. */
static void what_was_taken_back_is_not_found_again(void **state)
{
    struct fixture *f = *state;
    struct sl_fitting fitting = {.line = 2, .pipe_id = "B", .fitting = 1};
    struct sl_pipe pipe = {
        .line = 3, .pipe_id = "B", .station_id = "S", .draws_from = "none"};

    keep_station(f, 2, "S");
    keep(f, SL_KIND_PIPE, &pipe);
    /* Asking for the line of the first finds it. */
    assert_answer(add(f, SL_KIND_PIPE, &pipe), SL_ANSWER_DUPLICATE, "pipe_id",
                  "suction_pipes.csv", 3);
    assert_recalled(f, "B", "none", 3, SL_ANSWER_NO_SUCH, 0);
    assert_answer(add(f, SL_KIND_FITTING, &fitting),
                  SL_ANSWER_REFERENCE_REJECTED, "pipe_id", "suction_pipes.csv",
                  3);
    sl_store_rollback(f->store);
    must(f, sl_store_begin(f->store, &f->error));
    assert_answer(add(f, SL_KIND_PIPE, &pipe), SL_ANSWER_NO_SUCH, "station_id",
                  "stations.csv", 0);
}

static void a_loop_is_opened_at_its_first_line(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S");
    keep_pipe(f, 2, "tail", "S", "Y");
    keep_pipe(f, 3, "X", "S", "Z");
    keep_pipe(f, 4, "Y", "S", "X");
    keep_pipe(f, 5, "Z", "S", "Y");
    keep_pipe(f, 6, "self", "S", "self");
    keep_pipe(f, 7, "A", "S", NULL);
    assert_recalled(f, "X", "Z", 3, SL_ANSWER_CYCLE, 3);
    assert_recalled(f, "Y", "X", 4, SL_ANSWER_REFERENCE_REJECTED, 3);
    assert_recalled(f, "tail", "Y", 2, SL_ANSWER_REFERENCE_REJECTED, 4);
    assert_recalled(f, "Z", "Y", 5, SL_ANSWER_REFERENCE_REJECTED, 4);
    assert_recalled(f, "self", "self", 6, SL_ANSWER_CYCLE, 6);
    assert_all_sound(f);
}

/* An import leaves none of these; a file changed by other means may. */
static void assert_not_fetched(struct fixture *f, const char *change,
                               const char *why)
{
    struct sl_dossier dossier;
    bool found = false;

    file_does(f, change);
    if (sl_store_next_dossier(f->store, f->vintage, "", &f->arena, &dossier,
                              &found, &f->error) != SL_STORE)
        fail_msg("not noticed: %s", change);
    if (!strstr(f->error.message, why))
        fail_msg("%s: %s", change, f->error.message);
}

static void pipes_changed_by_other_means_are_noticed(void **state)
{
    struct fixture *f = *state;
    struct sl_pump pump = {
        .line = 2, .pump_id = "P", .station_id = "S", .suction_pipe_id = "A"};
    struct sl_fitting fitting = {.line = 2, .pipe_id = "A", .fitting = 1};

    keep_station(f, 2, "S");
    keep_pipe(f, 2, "A", "S", NULL);
    keep_pipe(f, 3, "B", "S", "A");
    keep_pipe(f, 4, "C", "S", "B");
    keep(f, SL_KIND_FITTING, &fitting);
    keep(f, SL_KIND_PUMP, &pump);
    must(f, sl_store_commit(f->store, &f->error));
    assert_not_fetched(f, "UPDATE suction_pipes SET draws_from = 'C'",
                       "a loop of pipes leads through");
    assert_not_fetched(f, "UPDATE suction_pipes SET draws_from = 'X'",
                       "draws_from \"X\"");
    assert_not_fetched(f,
                       "UPDATE suction_pipes SET draws_from = NULL;"
                       "UPDATE suction_fittings SET pipe_id = 'Y'",
                       "pipe_id \"Y\"");
    assert_not_fetched(f,
                       "UPDATE suction_fittings SET pipe_id = 'A';"
                       "UPDATE pumps SET suction_pipe_id = 'Z'",
                       "suction_pipe_id \"Z\"");
}

static void a_recalled_pipe_leaves_no_grade(void **state)
{
    struct fixture *f = *state;
    struct sl_pipe pipe = {.line = 2,
                           .pipe_id = "B",
                           .station_id = "S",
                           .draws_from = "nowhere",
                           .length = {12.5, true, 'C'}};

    keep_station(f, 2, "S");
    keep(f, SL_KIND_PIPE, &pipe);
    assert_recalled(f, "B", "nowhere", 2, SL_ANSWER_NO_SUCH, 0);
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT count(*) FROM grades"), 0);
    assert_int_equal(file_says(f, "SELECT count(*) FROM suction_pipes"), 0);
}

static void a_word_that_is_none_is_our_bug(void **state)
{
    struct fixture *f = *state;
    struct sl_station station = {.line = 2, .station_id = "S", .service = 8};
    struct sl_answer answer = {SL_ANSWER_KEPT, "", "", 0};

    assert_int_equal(sl_store_add_record(f->store, f->vintage, SL_KIND_STATION,
                                         &station, &answer, &f->error),
                     SL_BUG);
    assert_non_null(strstr(f->error.message, "service"));
}

static enum sl_status note_aside(void *context,
                                 const struct sl_set_aside_row *row,
                                 struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%s:%ld %s %s;", row->file, row->line, row->record_id,
                 sl_fate_name(row->fate));
    return SL_OK;
}

static void set_aside_records_keep_their_bytes(void **state)
{
    static const struct sl_aside latin = {
        SL_KIND_PUMP, SL_REJECTED, 12, "P", "S", "why", "P,\xE9", 3};
    static const struct sl_aside utf8 = {
        SL_KIND_PUMP, SL_OUT_OF_SCOPE, 3, "", "S", "why", "P,\xC3\xA9", 4};
    struct fixture *f = *state;
    struct sl_text text = {NULL, 0, 0};

    must(f, sl_store_add_set_aside(f->store, f->vintage, &latin, &f->error));
    must(f, sl_store_add_set_aside(f->store, f->vintage, &utf8, &f->error));
    set_aside(f, SL_KIND_CURVE, SL_REJECTED, 4, "C");
    must(f, sl_store_each_set_aside(f->store, f->vintage, note_aside, &text,
                                    &f->error));
    assert_string_equal(sl_text_string(&text),
                        "curves.csv:4 C rejected;pumps.csv:3  out of scope;"
                        "pumps.csv:12 P rejected;");
    sl_text_release(&text);
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT count(*) FROM set_aside WHERE "
                                  "raw = x'502CE9' AND typeof(raw) = 'blob'"),
                     1);
    assert_int_equal(file_says(f, "SELECT count(*) FROM set_aside WHERE "
                                  "raw = 'P,\xC3\xA9'"),
                     1);
}

static enum sl_status note_finding(void *context, const struct sl_finding *row,
                                   struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%s %s %s:%ld:%s \"%s\" %s, %s (%s);", row->code,
                 sl_severity_name(row->severity), row->file, row->line,
                 row->column, row->value, row->reason, row->remedy,
                 row->record_id);
    return SL_OK;
}

static void findings_come_as_told(void **state)
{
    struct fixture *f = *state;
    struct sl_text text = {NULL, 0, 0};
    struct sl_finding told = {"number-form",  SL_DOUBT, "pumps.csv", 7,
                              "flow_l_s",     "P",      "1,2",       "a comma",
                              "write a point"};

    must(f, sl_store_add_finding(f->store, f->vintage, &told, &f->error));
    told = (struct sl_finding){"no-file", SL_NOTE, "curves.csv", 0,        "",
                               "",        "",      "none",       "add one"};
    must(f, sl_store_add_finding(f->store, f->vintage, &told, &f->error));
    must(f, sl_store_each_finding(f->store, f->vintage, note_finding, &text,
                                  &f->error));
    assert_string_equal(
        sl_text_string(&text),
        "number-form doubt pumps.csv:7:flow_l_s \"1,2\" a comma, write a point "
        "(P);no-file note curves.csv:0: \"\" none, add one ();");
    sl_text_release(&text);
}

static void vintages_are_found_by_content(void **state)
{
    struct fixture *f = *state;
    struct sl_vintage next = {0, "2027", "decaf", "2027-07-01T12:00:00Z"};
    struct sl_vintage got = {0, NULL, NULL, NULL};
    bool found = false;

    must(f, sl_store_add_vintage(f->store, &next, &f->error));
    must(f, sl_store_find_vintage(f->store, "c0ffee", &f->arena, &got, &found,
                                  &f->error));
    assert_true(found);
    assert_int_equal(got.vintage, f->vintage);
    assert_string_equal(got.label, "2026");
    must(f, sl_store_find_vintage(f->store, NULL, &f->arena, &got, &found,
                                  &f->error));
    assert_string_equal(got.inventory_sha256, "decaf");
    assert_string_equal(got.imported_at, "2027-07-01T12:00:00Z");
    must(f, sl_store_find_vintage(f->store, "beef", &f->arena, &got, &found,
                                  &f->error));
    assert_false(found);
}

static void sums_come_back_by_kind(void **state)
{
    struct fixture *f = *state;
    struct sl_file_sum sums[SL_KIND_COUNT];
    struct sl_file_sum sum = {"pumps.csv", true, "ab", 512, 17, 11, 4, 2};

    must(f, sl_store_add_file(f->store, f->vintage, &sum, &f->error));
    must(f, sl_store_read_files(f->store, f->vintage, sums, &f->error));
    assert_true(sums[SL_KIND_PUMP].present);
    assert_string_equal(sums[SL_KIND_PUMP].sha256, "ab");
    assert_int_equal(sums[SL_KIND_PUMP].bytes, 512);
    assert_int_equal(sums[SL_KIND_PUMP].read, 17);
    assert_int_equal(sums[SL_KIND_PUMP].kept, 11);
    assert_int_equal(sums[SL_KIND_PUMP].rejected, 4);
    assert_int_equal(sums[SL_KIND_PUMP].out_of_scope, 2);
    assert_false(sums[SL_KIND_CURVE].present);
    assert_string_equal(sums[SL_KIND_CURVE].file, "curves.csv");
    /* Sums that do not add up are refused. */
    sum.file = "curves.csv";
    sum.kept = 12;
    assert_int_equal(sl_store_add_file(f->store, f->vintage, &sum, &f->error),
                     SL_BUG);
}

static void columns_keep_how_they_were_understood(void **state)
{
    struct fixture *f = *state;
    struct sl_column_use use = {"pumps.csv", 3, "Q max gpm", "rated_flow",
                                sl_unit_by_suffix(SL_FLOW, "gpm")};

    assert_non_null(use.unit);
    must(f, sl_store_add_column(f->store, f->vintage, &use, &f->error));
    use = (struct sl_column_use){"pumps.csv", 4, "colour", "", NULL};
    must(f, sl_store_add_column(f->store, f->vintage, &use, &f->error));
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT position FROM columns WHERE field = "
                                  "'rated_flow' AND unit = 'gpm'"),
                     3);
    assert_int_equal(file_says(f, "SELECT position FROM columns WHERE header = "
                                  "'colour' AND field IS NULL"),
                     4);
}

#define IN_VINTAGE(test)                                                       \
    cmocka_unit_test_setup_teardown(test, fixture_vintage, fixture_end)

/* What was rejected is missed where it belongs. */
static void rejected_records_are_counted_in_the_dossier(void **state)
{
    struct fixture *f = *state;
    struct sl_aside pump = {SL_KIND_PUMP, SL_REJECTED, 7,    "P9",
                            "S",          "why",       "P9", 2};
    struct sl_dossier dossier = {.station = 0};
    struct sl_arena arena = {0};
    bool found = false;

    keep_station(f, 2, "S");
    keep_pipe(f, 3, "A", "S", NULL);
    must(f, sl_store_add_set_aside(f->store, f->vintage, &pump, &f->error));
    pump.station_id = "T";
    must(f, sl_store_add_set_aside(f->store, f->vintage, &pump, &f->error));
    pump.station_id = "S";
    pump.fate = SL_OUT_OF_SCOPE;
    must(f, sl_store_add_set_aside(f->store, f->vintage, &pump, &f->error));
    set_aside(f, SL_KIND_FITTING, SL_REJECTED, 4, "A");
    set_aside(f, SL_KIND_FITTING, SL_REJECTED, 5, "A");
    set_aside(f, SL_KIND_FITTING, SL_REJECTED, 6, "B");
    must(f, sl_store_next_dossier(f->store, f->vintage, "", &arena, &dossier,
                                  &found, &f->error));
    assert_true(found);
    assert_int_equal(dossier.rejected_pumps, 1);
    assert_int_equal(dossier.pipes[0].rejected_fittings, 2);
    sl_arena_release(&arena);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        IN_VINTAGE(a_station_comes_back_whole),
        IN_VINTAGE(what_is_not_recorded_stays_unknown),
        IN_VINTAGE(stations_come_in_order_of_their_key),
        IN_VINTAGE(a_key_taken_is_a_duplicate),
        IN_VINTAGE(another_vintage_may_have_the_same_keys),
        IN_VINTAGE(references_to_nothing_are_told),
        IN_VINTAGE(references_to_what_was_set_aside_are_told),
        IN_VINTAGE(another_stations_pipe_is_told),
        IN_VINTAGE(sound_pipes_are_left),
        IN_VINTAGE(a_broken_way_takes_its_followers_back),
        IN_VINTAGE(a_pipe_draws_from_its_own_station),
        IN_VINTAGE(what_was_taken_back_is_not_found_again),
        IN_VINTAGE(a_loop_is_opened_at_its_first_line),
        IN_VINTAGE(pipes_changed_by_other_means_are_noticed),
        IN_VINTAGE(a_recalled_pipe_leaves_no_grade),
        IN_VINTAGE(a_word_that_is_none_is_our_bug),
        IN_VINTAGE(set_aside_records_keep_their_bytes),
        IN_VINTAGE(rejected_records_are_counted_in_the_dossier),
        IN_VINTAGE(findings_come_as_told),
        IN_VINTAGE(vintages_are_found_by_content),
        IN_VINTAGE(sums_come_back_by_kind),
        IN_VINTAGE(columns_keep_how_they_were_understood),
    };

    return cmocka_run_group_tests_name("store records", tests, NULL, NULL);
}
