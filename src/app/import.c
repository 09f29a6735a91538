/* The import step: records from the importer into the store. */
#define _XOPEN_SOURCE 700 /* gmtime_r, realpath */

#include <stdlib.h>
#include <string.h>
#include <time.h>

#include "app/notes.h"
#include "app/run.h"
#include "app/terminal.h"
#include "importer/inventory.h"

/* Findings shown on the terminal; the rest are counted, and all of them are
 * in the store and in findings.csv. */
#define SHOWN_OF_A_CODE 3
#define SHOWN_IN_ALL 24
#define CODES 32

struct intake {
    struct sl_run *run;
    const char *codes[CODES]; /* seen, copied into the run's arena */
    int shown_of[CODES];
    long long shown;
    long long findings;
};

static enum sl_status keep_record(void *context, enum sl_kind kind,
                                  const void *record, struct sl_answer *answer,
                                  struct sl_error *error)
{
    struct intake *intake = context;

    return sl_store_add_record(intake->run->store, intake->run->vintage.vintage,
                               kind, record, answer, error);
}

static enum sl_status set_aside(void *context, const struct sl_aside *aside,
                                struct sl_error *error)
{
    struct intake *intake = context;

    return sl_store_add_set_aside(intake->run->store,
                                  intake->run->vintage.vintage, aside, error);
}

static enum sl_status recall(void *context, struct sl_recall *taken,
                             bool *found, struct sl_error *error)
{
    struct intake *intake = context;

    return sl_store_recall_pipe(
        intake->run->store, intake->run->vintage.vintage, taken, found, error);
}

static bool show_this_code(struct intake *intake, const char *code)
{
    int i = 0;

    if (intake->shown >= SHOWN_IN_ALL)
        return false;
    while (i < CODES - 1 && intake->codes[i] &&
           strcmp(intake->codes[i], code) != 0)
        i++;
    if (!intake->codes[i])
        intake->codes[i] =
            sl_arena_text(&intake->run->arena, code, strlen(code));
    return intake->shown_of[i]++ < SHOWN_OF_A_CODE;
}

/* The most bytes of a cell that are shown. */
#define SHOWN_OF_A_CELL 80

/* How much of a value is shown: whole characters of it. */
static int shown_length(const char *value)
{
    size_t length = strlen(value);

    if (length > SHOWN_OF_A_CELL)
        length = sl_utf8_valid_length(value, SHOWN_OF_A_CELL);
    return (int)length;
}

/* file:line: column "value": reason; remedy */
static void show(const struct sl_finding *finding)
{
    struct sl_text text = {0};

    sl_text_addf(&text, "%s: %s", sl_severity_name(finding->severity),
                 finding->file);
    if (finding->line)
        sl_text_addf(&text, ":%ld", finding->line);
    sl_text_add_string(&text, ": ");
    if (finding->column[0])
        sl_text_addf(&text, "%s%s", finding->column,
                     finding->value[0] ? " " : ": ");
    if (finding->value[0])
        sl_text_addf(&text, "\"%.*s\": ", shown_length(finding->value),
                     finding->value);
    sl_text_addf(&text, "%s", finding->reason);
    if (finding->remedy[0])
        sl_text_addf(&text, "; %s", finding->remedy);
    sl_print_safely(stderr, sl_text_string(&text));
    putc('\n', stderr);
    sl_text_release(&text);
}

static enum sl_status keep_finding(void *context,
                                   const struct sl_finding *finding,
                                   struct sl_error *error)
{
    struct intake *intake = context;

    intake->findings++;
    if (show_this_code(intake, finding->code)) {
        intake->shown++;
        sl_progress_end();
        show(finding);
    }
    return sl_store_add_finding(intake->run->store,
                                intake->run->vintage.vintage, finding, error);
}

static enum sl_status keep_column(void *context,
                                  const struct sl_column_use *use,
                                  struct sl_error *error)
{
    struct intake *intake = context;

    return sl_store_add_column(intake->run->store, intake->run->vintage.vintage,
                               use, error);
}

static bool progress(void *context, long long done, long long all)
{
    (void)context;
    sl_progress("reading", done, all);
    return !sl_stop_asked();
}

/* The time of import as ISO 8601; SOURCE_DATE_EPOCH sets it, so that a run
 * can be repeated to the byte. */
static const char *import_time(struct sl_arena *arena)
{
    const char *given = getenv("SOURCE_DATE_EPOCH");
    time_t when = given ? (time_t)strtoll(given, NULL, 10) : time(NULL);
    char text[32] = "";
    struct tm parts;

    if (gmtime_r(&when, &parts))
        strftime(text, sizeof text, "%Y-%m-%dT%H:%M:%SZ", &parts);
    return sl_arena_text(arena, text, strlen(text));
}

/* The folder's own name, whatever way to it was given: "." has one too. */
static const char *folder_name(struct sl_arena *arena, const char *folder)
{
    char *real = realpath(folder, NULL);
    const char *path = real ? real : folder;
    const char *slash = strrchr(path, '/');
    const char *name = slash && slash[1] ? slash + 1 : path;
    const char *copy = sl_arena_text(arena, name, strlen(name));

    free(real);
    return copy;
}

static enum sl_status keep_sums(struct sl_run *run,
                                const struct sl_inventory *inventory,
                                struct sl_error *error)
{
    enum sl_status status = SL_OK;

    for (int kind = 0; kind < SL_KIND_COUNT && !status; kind++)
        status = sl_store_add_file(
            run->store, run->vintage.vintage,
            sl_inventory_sum(inventory, (enum sl_kind)kind), error);
    return status;
}

static enum sl_status read_records(struct sl_run *run,
                                   struct sl_inventory *inventory,
                                   struct sl_error *error)
{
    struct intake intake = {.run = run};
    struct sl_sink sink = {&intake,      keep_record, set_aside, recall,
                           keep_finding, keep_column, progress};
    enum sl_status status;

    run->vintage.label = run->options->label
                             ? run->options->label
                             : folder_name(&run->arena, run->options->subject);
    run->vintage.imported_at = import_time(&run->arena);
    status = sl_store_add_vintage(run->store, &run->vintage, error);
    if (!status)
        status = sl_inventory_read(inventory, &run->tables.vocabularies,
                                   sl_run_import_year(run), &sink, error);
    if (!status)
        status = sl_notes_tell(run, inventory, &sink, error);
    if (!status)
        status = keep_sums(run, inventory, error);
    sl_progress_end();
    if (!status && intake.findings > intake.shown)
        fprintf(stderr,
                "%lld more findings are not shown; all are in the store, "
                "and in findings.csv once it is ranked\n",
                intake.findings - intake.shown);
    return status;
}

enum sl_status sl_run_import(struct sl_run *run, struct sl_inventory *inventory,
                             struct sl_error *error)
{
    const char *sha256 = sl_inventory_sha256(inventory);
    bool found = false;
    enum sl_status status = sl_store_find_vintage(
        run->store, sha256, &run->arena, &run->vintage, &found, error);

    if (status)
        return status;
    if (found) {
        fprintf(stderr,
                "this inventory is already in the store as vintage %lld; it "
                "is not stored twice\n",
                run->vintage.vintage);
        return SL_OK;
    }
    run->vintage = (struct sl_vintage){.inventory_sha256 = sha256};
    return read_records(run, inventory, error);
}
