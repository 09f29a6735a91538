/* The ranking step: rows from the store to the writers of the ranker. */
#include "app/run.h"
#include "app/terminal.h"
#include "base/output.h"
#include "ranker/report.h"
#include "ranker/tables.h"

struct lists {
    struct sl_table_writer table;
    struct sl_report report;
};

static enum sl_status go_on(struct sl_error *error)
{
    if (!sl_stop_asked())
        return SL_OK;
    return sl_error_set(error, SL_INTERRUPTED,
                        "interrupted; earlier results are as they were");
}

static enum sl_status station_row(void *context,
                                  const struct sl_station_row *row,
                                  struct sl_error *error)
{
    struct lists *lists = context;

    sl_table_station(&lists->table, row);
    return go_on(error);
}

static enum sl_status pump_row(void *context, const struct sl_pump_row *row,
                               struct sl_error *error)
{
    struct lists *lists = context;

    sl_table_pump(&lists->table, row);
    return go_on(error);
}

static enum sl_status unknown_row(void *context,
                                  const struct sl_unknown_row *row,
                                  struct sl_error *error)
{
    struct lists *lists = context;

    sl_table_unknown(&lists->table, row);
    return go_on(error);
}

static enum sl_status finding_row(void *context,
                                  const struct sl_finding *finding,
                                  struct sl_error *error)
{
    struct lists *lists = context;

    sl_table_finding(&lists->table, finding);
    return go_on(error);
}

static enum sl_status write_stations(struct sl_run *run, struct lists *lists,
                                     struct sl_error *error)
{
    sl_table_stations_head(&lists->table);
    return sl_store_each_station(run->store, run->evaluation.evaluation,
                                 station_row, lists, error);
}

static enum sl_status write_pumps(struct sl_run *run, struct lists *lists,
                                  struct sl_error *error)
{
    sl_table_pumps_head(&lists->table);
    return sl_store_each_pump(run->store, run->evaluation.evaluation, pump_row,
                              lists, error);
}

static enum sl_status write_unknowns(struct sl_run *run, struct lists *lists,
                                     struct sl_error *error)
{
    sl_table_unknowns_head(&lists->table);
    return sl_store_each_unknown(run->store, run->evaluation.evaluation,
                                 unknown_row, lists, error);
}

static enum sl_status write_findings(struct sl_run *run, struct lists *lists,
                                     struct sl_error *error)
{
    sl_table_findings_head(&lists->table);
    return sl_store_each_finding(run->store, run->vintage.vintage, finding_row,
                                 lists, error);
}

static enum sl_status report_station(void *context,
                                     const struct sl_station_row *row,
                                     struct sl_error *error)
{
    struct lists *lists = context;

    sl_report_station(&lists->report, row);
    return go_on(error);
}

static enum sl_status report_unknown(void *context,
                                     const struct sl_unknown_row *row,
                                     struct sl_error *error)
{
    struct lists *lists = context;

    sl_report_unknown(&lists->report, row);
    return go_on(error);
}

/* The terms are for the pumps at risk; pumps.csv has them all. */
static enum sl_status report_pump(void *context, const struct sl_pump_row *row,
                                  struct sl_error *error)
{
    struct lists *lists = context;

    if (row->state == SL_SHORT || row->state == SL_THIN)
        sl_report_pump(&lists->report, row);
    return go_on(error);
}

static enum sl_status report_set_aside(void *context,
                                       const struct sl_set_aside_row *row,
                                       struct sl_error *error)
{
    struct lists *lists = context;

    sl_report_set_aside(&lists->report, row);
    return go_on(error);
}

static enum sl_status report_default(void *context,
                                     const struct sl_default_row *row,
                                     struct sl_error *error)
{
    struct lists *lists = context;

    sl_report_default(&lists->report, row);
    return go_on(error);
}

static enum sl_status write_report(struct sl_run *run, struct lists *lists,
                                   struct sl_error *error)
{
    struct sl_report *report = &lists->report;
    long long evaluation = run->evaluation.evaluation;
    enum sl_status status;

    sl_report_begin(report);
    sl_report_begin_ranked(report);
    status = sl_store_each_station(run->store, evaluation, report_station,
                                   lists, error);
    if (status)
        return status;
    sl_report_begin_unknowns(report);
    status = sl_store_each_unknown(run->store, evaluation, report_unknown,
                                   lists, error);
    if (status)
        return status;
    sl_report_begin_terms(report);
    status =
        sl_store_each_pump(run->store, evaluation, report_pump, lists, error);
    if (status)
        return status;
    sl_report_begin_set_aside(report);
    status = sl_store_each_set_aside(run->store, run->vintage.vintage,
                                     report_set_aside, lists, error);
    if (status)
        return status;
    sl_report_begin_defaults(report);
    status = sl_store_each_default(run->store, evaluation, report_default,
                                   lists, error);
    if (status)
        return status;
    sl_report_end(report);
    return SL_OK;
}

static const struct {
    const char *name;
    const char *holds;
    enum sl_status (*write)(struct sl_run *run, struct lists *lists,
                            struct sl_error *error);
} outputs[] = {
    {"report.html", "the report, for a browser", write_report},
    {"ranked-stations.csv", "every station, ranked", write_stations},
    {"pumps.csv", "every pump and condition, with all terms", write_pumps},
    {"find-out-first.csv", "what a survey should find out", write_unknowns},
    {"findings.csv", "what the import had to say", write_findings},
};

#define OUTPUT_COUNT (sizeof outputs / sizeof outputs[0])

/* Written to the last byte, and not yet in its place. */
static enum sl_status write_one(struct sl_run *run, const char *folder,
                                size_t which, const struct sl_summary *summary,
                                struct sl_output *output,
                                struct sl_error *error)
{
    struct lists lists = {0};
    enum sl_status status =
        sl_output_open(output, folder, outputs[which].name, error);

    if (status)
        return status;
    lists.table =
        (struct sl_table_writer){.stream = output->stream,
                                 .units = run->options->units,
                                 .summary = summary,
                                 .vocabularies = &run->tables.vocabularies};
    lists.report = (struct sl_report){.stream = output->stream,
                                      .units = run->options->units,
                                      .summary = summary,
                                      .vocabularies = &run->tables.vocabularies,
                                      .tables = &run->tables};
    status = outputs[which].write(run, &lists, error);
    /* What cannot be written out fails here, before any file is replaced. */
    if (!status && (fflush(output->stream) != 0 || ferror(output->stream)))
        status = sl_output_commit(output, error);
    return status;
}

/* All files are written before the first is replaced, so that a full disk or
 * Ctrl-C does not leave lists of two audits in one folder. */
static enum sl_status write_all(struct sl_run *run, const char *folder,
                                const struct sl_summary *summary,
                                struct sl_error *error)
{
    struct sl_output files[OUTPUT_COUNT] = {0};
    enum sl_status status = SL_OK;

    for (size_t i = 0; i < OUTPUT_COUNT && !status; i++)
        status = write_one(run, folder, i, summary, &files[i], error);
    for (size_t i = 0; i < OUTPUT_COUNT && !status; i++)
        status = sl_output_commit(&files[i], error);
    for (size_t i = 0; i < OUTPUT_COUNT; i++)
        sl_output_abandon(&files[i]);
    return status;
}

enum sl_status sl_run_rank(struct sl_run *run, const char *folder,
                           struct sl_error *error)
{
    struct sl_summary summary = {0};
    enum sl_status status = sl_store_read_summary(
        run->store, run->evaluation.evaluation, &run->arena, &summary, error);

    if (!status)
        status = sl_make_folder(folder, error);
    if (status)
        return status;
    summary.version = SL_VERSION;
    summary.conditions = run->tables.conditions;
    summary.condition_count = run->tables.condition_count;
    status = write_all(run, folder, &summary, error);
    if (status)
        return status;
    puts("Files written:");
    for (size_t i = 0; i < OUTPUT_COUNT; i++)
        printf("  %s/%s: %s\n", folder, outputs[i].name, outputs[i].holds);
    return SL_OK;
}
