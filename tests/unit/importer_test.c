/* The importer room: dirty inventories and what is said of them.
 *
 * Each folder of tests/importer is read into a sink that writes down all it
 * is told; what it must have heard is in the folder's heard.txt.  With
 * --write the files are written anew: read the difference. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, mkfifo, truncate */

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>
#include <stdlib.h>
#include <sys/stat.h>
#include <unistd.h>

#include "base/memory.h"
#include "importer/doubts.h"
#include "importer/lines.h"
#include "unit/importer_sink.h"

#define CASES "tests/importer/"

static bool rewrite;

/* A folder of its own for a test, with the files it is given. */
struct folder {
    char path[64];
};

static void folder_make(struct folder *folder)
{
    memcpy(folder->path, "/tmp/summerlow-importer-XXXXXX", 31);
    assert_non_null(mkdtemp(folder->path));
}

static const char *folder_file(const struct folder *folder, const char *name)
{
    static char path[128];

    snprintf(path, sizeof path, "%s/%s", folder->path, name);
    return path;
}

static void folder_write(const struct folder *folder, const char *name,
                         const char *bytes, size_t length)
{
    FILE *stream = fopen(folder_file(folder, name), "wb");

    assert_non_null(stream);
    assert_int_equal(fwrite(bytes, 1, length, stream), length);
    assert_int_equal(fclose(stream), 0);
}

static void folder_put(const struct folder *folder, const char *name,
                       const char *text)
{
    folder_write(folder, name, text, strlen(text));
}

static void folder_remove(const struct folder *folder)
{
    for (int i = 0; i < SL_KIND_COUNT; i++) {
        const char *file = sl_record_kind((enum sl_kind)i)->file;

        if (unlink(folder_file(folder, file)) != 0)
            rmdir(folder_file(folder, file));
    }
    assert_int_equal(rmdir(folder->path), 0);
}

/* Open, read headers, read; the first status that is not SL_OK. */
static enum sl_status import(const char *path, struct listener *listener,
                             struct sl_error *error)
{
    struct sl_vocabularies words = test_vocabularies();
    struct sl_sink sink = listener_sink(listener);
    struct sl_inventory *inventory = NULL;
    enum sl_status status = sl_inventory_open(path, &inventory, error);

    if (!status)
        status = sl_inventory_read_headers(inventory, error);
    if (status)
        assert_int_equal(listener->heard.length, 0);
    if (!status)
        status =
            sl_inventory_read(inventory, &words, IMPORT_YEAR, &sink, error);
    if (!status)
        listener_sums(listener, inventory);
    sl_inventory_close(inventory);
    return status;
}

static enum sl_status import_folder(const struct folder *folder,
                                    struct listener *listener,
                                    struct sl_error *error)
{
    return import(folder->path, listener, error);
}

static void read_whole(const char *path, struct sl_text *text)
{
    char piece[4096];
    size_t got;
    FILE *stream = fopen(path, "rb");

    if (!stream)
        fail_msg("%s is not there; write it with --write", path);
    while ((got = fread(piece, 1, sizeof piece, stream)) > 0)
        sl_text_add(text, piece, got);
    fclose(stream);
}

/* Where two texts part, by line. */
static void check_same(const char *path, const char *got, const char *want)
{
    long line = 1;

    while (*got && *got == *want) {
        line += *got == '\n';
        got++;
        want++;
    }
    if (*got || *want)
        fail_msg("%s:%ld: heard \"%.200s\", want \"%.200s\"", path, line, got,
                 want);
}

static void check_case(const char *name, struct listener *listener)
{
    struct sl_error error = {0};
    struct sl_text path = {0}, want = {0};
    FILE *stream;

    sl_text_addf(&path, CASES "%s", name);
    if (import(sl_text_string(&path), listener, &error))
        fail_msg("%s: %s", name, error.message);
    sl_text_add_string(&path, "/heard.txt");
    if (rewrite) {
        stream = fopen(sl_text_string(&path), "wb");
        assert_non_null(stream);
        fputs(sl_text_string(&listener->heard), stream);
        assert_int_equal(fclose(stream), 0);
    }
    read_whole(sl_text_string(&path), &want);
    check_same(sl_text_string(&path), sl_text_string(&listener->heard),
               sl_text_string(&want));
    sl_text_release(&path);
    sl_text_release(&want);
    listener_release(listener);
}

static void cells_are_taken_or_told(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("cells", &listener);
}

static void quotes_gone_wrong_cost_one_line(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("quotes", &listener);
}

static void bytes_that_are_no_text_are_told_by_place(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("bytes", &listener);
}

static void columns_are_understood_by_unit_and_grade(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("columns", &listener);
}

static void what_is_out_of_service_is_out_of_scope(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("scope", &listener);
}

static void a_year_ahead_of_the_import_is_doubted(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("years", &listener);
}

static void an_owners_conditions_and_rules_are_taken(void **state)
{
    struct listener listener = {0};

    (void)state;
    check_case("own", &listener);
}

static void an_owners_slips_are_told_by_line(void **state)
{
    static const struct script script[] = {
        {SL_KIND_CONDITION, 9, {SL_ANSWER_DUPLICATE, "condition", NULL, 8}},
        {SL_KIND_RULE, 9, {SL_ANSWER_DUPLICATE, "rule", NULL, 8}},
    };
    struct listener listener = {.script = script,
                                .script_count = COUNT(script)};

    (void)state;
    check_case("own-dirty", &listener);
}

static void the_sinks_answers_decide_fates(void **state)
{
    static const struct script script[] = {
        {SL_KIND_STATION,
         4,
         {SL_ANSWER_DUPLICATE, "station_id", "stations.csv", 2}},
        {SL_KIND_PIPE, 3, {SL_ANSWER_NO_SUCH, "draws_from", NULL, 0}},
        {SL_KIND_PIPE,
         7,
         {SL_ANSWER_REFERENCE_OUT_OF_SCOPE, "draws_from", "suction_pipes.csv",
          9}},
        {SL_KIND_PIPE,
         8,
         {SL_ANSWER_OTHER_STATION, "draws_from", "suction_pipes.csv", 2}},
        {SL_KIND_FITTING, 3, {SL_ANSWER_NO_SUCH, "pipe_id", NULL, 0}},
        {SL_KIND_PUMP, 3, {SL_ANSWER_NO_SUCH, "station_id", NULL, 0}},
        {SL_KIND_PUMP, 4, {SL_ANSWER_NO_SUCH, "curve_id", NULL, 0}},
        {SL_KIND_PUMP,
         5,
         {SL_ANSWER_REFERENCE_REJECTED, "curve_id", "curves.csv", 3}},
        {SL_KIND_PUMP,
         6,
         {SL_ANSWER_OTHER_STATION, "suction_pipe_id", "suction_pipes.csv", 2}},
        {SL_KIND_PUMP,
         7,
         {SL_ANSWER_REFERENCE_REJECTED, "suction_pipe_id", "suction_pipes.csv",
          3}},
        {SL_KIND_PUMP,
         8,
         {SL_ANSWER_REFERENCE_OUT_OF_SCOPE, "station_id", "stations.csv", 14}},
        {SL_KIND_PUMP, 9, {SL_ANSWER_DUPLICATE, NULL, NULL, 2}},
    };
    static const struct sl_recall recalls[] = {
        {"C", "D", 4, {SL_ANSWER_CYCLE, "draws_from", NULL, 0}},
        {"D", "C", 5, {SL_ANSWER_CYCLE, "draws_from", NULL, 0}},
        {"E",
         "B",
         6,
         {SL_ANSWER_REFERENCE_REJECTED, "draws_from", "suction_pipes.csv", 3}},
        {"A",
         "OUT",
         2,
         {SL_ANSWER_REFERENCE_OUT_OF_SCOPE, "draws_from", "suction_pipes.csv",
          9}},
    };
    struct listener listener = {
        .script = script,
        .script_count = sizeof script / sizeof script[0],
        .recalls = recalls,
        .recall_count = sizeof recalls / sizeof recalls[0]};

    (void)state;
    check_case("references", &listener);
}

#define PUMPS "pump_id,station_id\nP1,S1\n"

static void what_is_no_inventory_is_refused(void **state)
{
    static const struct {
        const char *stations;
        const char *pumps;
        const char *message;
    } rows[] = {
        {NULL, PUMPS,
         "holds no stations.csv; an inventory has at least stations.csv and "
         "pumps.csv"},
        {"station_id\n", NULL, "holds no pumps.csv; an inventory has at"},
        {"", PUMPS,
         "stations.csv:1: the file is empty; its first line names the "
         "columns"},
        {"\n\n", PUMPS, "stations.csv:1: the file is empty"},
        {"station_id,site_elevation\n", PUMPS,
         "stations.csv:1: column \"site_elevation\" has no unit; name it "
         "site_elevation_m, site_elevation_ft, site_elevation_cm, "
         "site_elevation_mm, site_elevation_in"},
        {"station_id,discharge_bore_fathom\n", PUMPS,
         "stations.csv:1: column \"discharge_bore_fathom\": \"fathom\" is no "
         "unit it can have; name it discharge_bore_mm, discharge_bore_in, "
         "discharge_bore_cm, discharge_bore_m, discharge_bore_ft, or "
         "otherwise if it is something else"},
        {"\n\nstation_id,normal_level_m,Normal_Level_ft\n", PUMPS,
         "stations.csv:3: columns \"normal_level_m\" and \"Normal_Level_ft\" "
         "both give normal_level; keep one of them"},
        {"station_id,latitude_grade,LATITUDE_GRADE\n", PUMPS,
         "both give latitude_grade; keep one of them"},
        {"station,name\n", PUMPS,
         "stations.csv:1: column \"station_id\" is missing; no station can "
         "be read without it"},
        {"station_id;name\n", PUMPS,
         "stations.csv:1: the header is a single column; save the file with "
         "commas between columns, not semicolons or tabs"},
        {"station_id\n", "pump_id,rated_flow,rated_head\n",
         "pumps.csv:1: column \"rated_flow\" has no unit; name it "
         "rated_flow_l_s, rated_flow_gpm, rated_flow_m3_s, rated_flow_m3_h, "
         "rated_flow_mgd, rated_flow_cfs; also pumps.csv:1: column "
         "\"rated_head\" has no unit; name it rated_head_m, rated_head_ft, "
         "rated_head_cm, rated_head_mm, rated_head_in; also pumps.csv:1: "
         "column \"station_id\" is missing; no pump can be read without it"},
        {"Station ID,name\n", PUMPS,
         "column \"station_id\" is missing; no station can be read without "
         "it; if \"Station ID\" is meant, name it so"},
        {"station_id,\"name\n", PUMPS,
         "stations.csv:1: the header cannot be read: a quote opens here and "
         "is not rightly closed; close the quote or take it out"},
        {"station_id,na\"me\n", PUMPS,
         "the header cannot be read: a quote stands where none can"},
        {"station_id,\xE9tat\n", PUMPS,
         "stations.csv:1: the header cannot be read: byte 12 of line 1 is "
         "0xE9, which is no UTF-8 text; save the file as UTF-8 text"},
        {"station_id,name\rS1,One\r", PUMPS,
         "the header cannot be read: a carriage return stands within the "
         "line"},
    };

    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        struct folder folder;
        struct listener listener = {0};
        struct sl_error error = {0};

        folder_make(&folder);
        if (rows[i].stations)
            folder_put(&folder, "stations.csv", rows[i].stations);
        if (rows[i].pumps)
            folder_put(&folder, "pumps.csv", rows[i].pumps);
        assert_int_equal(import_folder(&folder, &listener, &error), SL_REFUSED);
        if (!strstr(error.message, rows[i].message))
            fail_msg("row %zu: \"%s\", want \"%s\"", i, error.message,
                     rows[i].message);
        folder_remove(&folder);
    }
}

static void a_header_of_too_many_columns_is_refused(void **state)
{
    struct folder folder;
    struct listener listener = {0};
    struct sl_error error = {0};
    struct sl_text header = {0};

    (void)state;
    sl_text_add_string(&header, "station_id");
    for (int i = 0; i < 1000; i++)
        sl_text_addf(&header, ",u%d", i);
    folder_make(&folder);
    folder_put(&folder, "stations.csv", sl_text_string(&header));
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_REFUSED);
    assert_string_equal(error.message,
                        "stations.csv:1: the header has 1001 columns; 1000 "
                        "are the most");
    folder_remove(&folder);
    sl_text_release(&header);
}

static void a_folder_that_is_none_is_a_file_error(void **state)
{
    struct listener listener = {0};
    struct sl_error error = {0};

    (void)state;
    assert_int_equal(import("/tmp/no such folder", &listener, &error), SL_FILE);
    assert_string_equal(error.message,
                        "cannot open the inventory \"/tmp/no such folder\": "
                        "No such file or directory");
    assert_int_equal(import(CASES "cells/pumps.csv", &listener, &error),
                     SL_FILE);
    assert_non_null(strstr(error.message, "is not a folder; name the folder"));
}

static void a_pipe_or_a_folder_is_no_file(void **state)
{
    struct folder folder;
    struct listener listener = {0};
    struct sl_error error = {0};

    (void)state;
    folder_make(&folder);
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(mkfifo(folder_file(&folder, "stations.csv"), 0600), 0);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_FILE);
    assert_string_equal(error.message,
                        "\"stations.csv\" is not a regular file; put a CSV "
                        "file of that name in its place");
    unlink(folder_file(&folder, "stations.csv"));
    assert_int_equal(mkdir(folder_file(&folder, "stations.csv"), 0700), 0);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_FILE);
    folder_remove(&folder);
}

static void a_file_that_changes_is_told(void **state)
{
    struct folder folder;
    struct listener listener = {0};
    struct sl_error error = {0};

    (void)state;
    folder_make(&folder);
    folder_put(&folder, "stations.csv", "station_id,name\nS1,One\n");
    folder_put(&folder, "pumps.csv", PUMPS);
    listener.change = folder_file(&folder, "pumps.csv");
    assert_int_equal(import_folder(&folder, &listener, &error), SL_FILE);
    assert_string_equal(error.message,
                        "\"pumps.csv\" changed while it was read; try again "
                        "when nobody writes to it");
    folder_remove(&folder);
    listener_release(&listener);
}

/* Of the same size: only the bytes tell. */
static void a_file_overwritten_in_place_is_told(void **state)
{
    struct sl_vocabularies words = test_vocabularies();
    struct folder folder;
    struct listener listener = {0};
    struct sl_sink sink = listener_sink(&listener);
    struct sl_inventory *inventory = NULL;
    struct sl_error error = {0};
    FILE *stream;

    (void)state;
    folder_make(&folder);
    folder_put(&folder, "stations.csv", "station_id,name\nS1,One\n");
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(sl_inventory_open(folder.path, &inventory, &error), SL_OK);
    assert_int_equal(sl_inventory_read_headers(inventory, &error), SL_OK);
    stream = fopen(folder_file(&folder, "stations.csv"), "r+b");
    assert_non_null(stream);
    fseek(stream, 17, SEEK_SET);
    fputc('9', stream);
    fclose(stream);
    assert_int_equal(
        sl_inventory_read(inventory, &words, IMPORT_YEAR, &sink, &error),
        SL_FILE);
    assert_non_null(strstr(error.message, "changed while it was read"));
    sl_inventory_close(inventory);
    folder_remove(&folder);
    listener_release(&listener);
}

static void a_sink_that_fails_stops_the_reading(void **state)
{
    struct listener listener = {.fail_record = 2};
    struct sl_error error = {0};

    (void)state;
    assert_int_equal(import(CASES "columns", &listener, &error), SL_STORE);
    assert_string_equal(error.message, "the store is full");
    assert_int_equal(listener.records, 2);
    listener_release(&listener);
}

static void an_answer_about_no_column_is_our_bug(void **state)
{
    static const struct script script[] = {
        {SL_KIND_PUMP, 2, {SL_ANSWER_NO_SUCH, "curve_id", NULL, 0}}};
    struct listener listener = {.script = script, .script_count = 1};
    struct sl_error error = {0};

    (void)state;
    assert_int_equal(import(CASES "cells", &listener, &error), SL_BUG);
    listener_release(&listener);
}

/* Three MiB of stations. */
static void fill_large(struct sl_text *text)
{
    sl_text_add_string(text, "station_id,name\n");
    for (int i = 0; text->length < (size_t)3 << 20; i++)
        sl_text_addf(text, "S%06d,\"Station\nnumber %d\"\n", i, i);
}

/* Taking back may be long where a station has very many pipes. */
static void taking_back_can_be_stopped(void **state)
{
    static const struct sl_recall recalls[] = {
        {"B", "X", 3, {SL_ANSWER_NO_SUCH, "draws_from", NULL, 0}}};
    struct listener none = {0};
    struct listener one = {.recalls = recalls, .recall_count = 1};
    struct folder folder;
    struct sl_error error = {0};
    int stopped_in_pipes = 0;

    (void)state;
    folder_make(&folder);
    folder_put(&folder, "stations.csv", "station_id\nS\n");
    folder_put(&folder, "pumps.csv", PUMPS);
    folder_put(&folder, "suction_pipes.csv",
               "pipe_id,station_id,draws_from\nA,S,\nB,S,X\n");
    assert_int_equal(import_folder(&folder, &none, &error), SL_OK);
    assert_int_equal(import_folder(&folder, &one, &error), SL_OK);
    assert_int_equal(one.progress, none.progress + 1);
    for (long at = 1; at <= one.progress; at++) {
        struct listener stopping = {
            .recalls = recalls, .recall_count = 1, .stop_at = at};

        assert_int_equal(import_folder(&folder, &stopping, &error),
                         SL_INTERRUPTED);
        stopped_in_pipes += strstr(error.message, "suction_pipes") != NULL;
        listener_release(&stopping);
    }
    /* At its first record, and before each of two recalls. */
    assert_int_equal(stopped_in_pipes, 3);
    folder_remove(&folder);
    listener_release(&none);
    listener_release(&one);
}

static void progress_is_told_and_can_stop(void **state)
{
    struct folder folder;
    struct listener listener = {0};
    struct listener stopping = {.stop_at = 2};
    struct sl_error error = {0};
    struct sl_text large = {0};

    (void)state;
    fill_large(&large);
    folder_make(&folder);
    folder_put(&folder, "stations.csv", sl_text_string(&large));
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_OK);
    assert_in_range(listener.progress, 3, 6);
    assert_int_equal(listener.findings, 0);
    assert_int_equal(import_folder(&folder, &stopping, &error), SL_INTERRUPTED);
    assert_string_equal(error.message,
                        "stopped while reading stations.csv; nothing was "
                        "changed");
    assert_true(stopping.records < listener.records);
    folder_remove(&folder);
    sl_text_release(&large);
    listener_release(&listener);
    listener_release(&stopping);
}

/* Two pieces are seamed within a record somewhere: its line must be right
 * and its text whole. */
static void records_over_the_seam_of_pieces_are_whole(void **state)
{
    struct folder folder;
    struct listener listener = {0};
    struct sl_error error = {0};
    struct sl_text large = {0}, want = {0};

    (void)state;
    fill_large(&large);
    folder_make(&folder);
    folder_put(&folder, "stations.csv", sl_text_string(&large));
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_OK);
    for (int i = 0; i < (int)listener.records - 1; i++) {
        sl_text_clear(&want);
        sl_text_addf(&want,
                     "record stations.csv:%d station_id=\"S%06d\" "
                     "name=\"Station\nnumber %d\"\n",
                     2 + 2 * i, i, i);
        if (i % 5000 == 0)
            assert_non_null(strstr(listener.heard.bytes, want.bytes));
    }
    assert_non_null(strstr(listener.heard.bytes, want.bytes));
    folder_remove(&folder);
    sl_text_release(&large);
    sl_text_release(&want);
    listener_release(&listener);
}

/* `before`, then so many bytes 'x', then `after`. */
static void check_long(const char *before, size_t count, const char *after,
                       const char *const *wanted)
{
    struct folder folder;
    struct listener listener = {0};
    struct sl_error error = {0};
    struct sl_text text = {0};

    sl_text_add_string(&text, "station_id,name\n");
    sl_text_add_string(&text, before);
    for (size_t i = 0; i < count; i++)
        sl_text_add(&text, i % 64 == 63 && strchr(before, '"') ? "\n" : "x", 1);
    sl_text_add_string(&text, after);
    folder_make(&folder);
    folder_write(&folder, "stations.csv", text.bytes, text.length);
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(import_folder(&folder, &listener, &error), SL_OK);
    for (; *wanted; wanted++)
        if (!strstr(sl_text_string(&listener.heard), *wanted))
            fail_msg("\"%s\" was not heard", *wanted);
    folder_remove(&folder);
    sl_text_release(&text);
    listener_release(&listener);
}

static void a_line_without_end_is_passed_over(void **state)
{
    static const char *const wanted[] = {
        "error stations.csv:2 line-length",
        "the line is longer than 1 MiB",
        "... 1048576 bytes",
        "record stations.csv:3 station_id=\"S2\" name=\"after\"",
        "sum stations.csv: 2 read, 1 kept, 1 rejected, 0 out of scope",
        NULL};

    (void)state;
    check_long("S1,", 3 * SL_RECORD_BYTES + 17, "\nS2,after\n", wanted);
    check_long("S1,", SL_RECORD_BYTES - 3, "\nS2,after\n", wanted);
}

static void a_line_of_just_the_limit_is_read(void **state)
{
    static const char *const wanted[] = {
        "record stations.csv:2 station_id=\"S1\" name=\"xxx",
        "record stations.csv:3 station_id=\"S2\" name=\"after\"",
        "sum stations.csv: 2 read, 2 kept, 0 rejected, 0 out of scope", NULL};

    (void)state;
    check_long("S1,", SL_RECORD_BYTES - 4, "\nS2,after\n", wanted);
}

static void a_quote_open_for_a_mebibyte_costs_one_line(void **state)
{
    static const char *const wanted[] = {
        "error stations.csv:2 quote column \"\" of \"S1\" value \"S1,\"xxx",
        "    a quote opens here and is not rightly closed",
        "rejected stations.csv:3",
        "record stations.csv:16386 station_id=\"S2\" name=\"after\"", NULL};

    (void)state;
    /* 16384 lines of 64 bytes are 1 MiB: the last begins the line of S2. */
    check_long("S1,\"", SL_RECORD_BYTES, "S2,after\n", wanted);
}

static void hashes_are_those_of_sha256sum(void **state)
{
    struct folder folder;
    struct sl_inventory *inventory = NULL;
    struct sl_error error = {0};

    (void)state;
    folder_make(&folder);
    folder_put(&folder, "stations.csv", "station_id\nS1\n");
    folder_put(&folder, "pumps.csv", PUMPS);
    assert_int_equal(sl_inventory_open(folder.path, &inventory, &error), SL_OK);
    assert_int_equal(sl_inventory_read_headers(inventory, &error), SL_OK);
    assert_string_equal(
        sl_inventory_sum(inventory, SL_KIND_STATION)->sha256,
        "7d5735505eac5bbdb4a95c3ae37bedac9ce804dab168c177d499fd1dcee5c310");
    assert_int_equal(sl_inventory_sum(inventory, SL_KIND_STATION)->bytes, 14);
    assert_false(sl_inventory_sum(inventory, SL_KIND_CURVE)->present);
    assert_string_equal(
        sl_inventory_sha256(inventory),
        "4c6de6bc143f4997c5c3cc28561846031483f87b9f3bf79732275e548a78753f");
    sl_inventory_close(inventory);
    folder_remove(&folder);
}

/* Doubts that need no file: none of a record in order. */
static void levels_in_order_raise_no_doubt(void **state)
{
    struct sl_doubt doubts[SL_DOUBTS_MOST];
    struct sl_station station = {
        .record_low_level = {2.5, true, 0},
        .cut_out_level = {2.5, true, 0},
        .normal_level = {3.75, true, 0},
    };

    (void)state;
    assert_int_equal(
        sl_doubts_find(SL_KIND_STATION, &station, IMPORT_YEAR, doubts), 0);
    station.cut_out_level.value = 2.375;
    assert_int_equal(
        sl_doubts_find(SL_KIND_STATION, &station, IMPORT_YEAR, doubts), 1);
    assert_string_equal(doubts[0].code, "level-order");
}

int main(int argc, char **argv)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(cells_are_taken_or_told),
        cmocka_unit_test(quotes_gone_wrong_cost_one_line),
        cmocka_unit_test(bytes_that_are_no_text_are_told_by_place),
        cmocka_unit_test(columns_are_understood_by_unit_and_grade),
        cmocka_unit_test(what_is_out_of_service_is_out_of_scope),
        cmocka_unit_test(a_year_ahead_of_the_import_is_doubted),
        cmocka_unit_test(an_owners_conditions_and_rules_are_taken),
        cmocka_unit_test(an_owners_slips_are_told_by_line),
        cmocka_unit_test(the_sinks_answers_decide_fates),
        cmocka_unit_test(what_is_no_inventory_is_refused),
        cmocka_unit_test(a_header_of_too_many_columns_is_refused),
        cmocka_unit_test(a_folder_that_is_none_is_a_file_error),
        cmocka_unit_test(a_pipe_or_a_folder_is_no_file),
        cmocka_unit_test(a_file_that_changes_is_told),
        cmocka_unit_test(a_file_overwritten_in_place_is_told),
        cmocka_unit_test(a_sink_that_fails_stops_the_reading),
        cmocka_unit_test(an_answer_about_no_column_is_our_bug),
        cmocka_unit_test(taking_back_can_be_stopped),
        cmocka_unit_test(progress_is_told_and_can_stop),
        cmocka_unit_test(records_over_the_seam_of_pieces_are_whole),
        cmocka_unit_test(a_line_without_end_is_passed_over),
        cmocka_unit_test(a_line_of_just_the_limit_is_read),
        cmocka_unit_test(a_quote_open_for_a_mebibyte_costs_one_line),
        cmocka_unit_test(hashes_are_those_of_sha256sum),
        cmocka_unit_test(levels_in_order_raise_no_doubt),
    };

    rewrite = argc > 1 && strcmp(argv[1], "--write") == 0;
    return cmocka_run_group_tests_name("importer", tests, NULL, NULL);
}
