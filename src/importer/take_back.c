#include "importer/answers.h"
#include "importer/file_pass.h"

static enum sl_status take_back(const struct sl_file_pass *pass,
                                const struct sl_recall *recall,
                                struct sl_problem *problem,
                                struct sl_error *error)
{
    const struct sl_record_kind *kind = sl_record_kind(pass->kind);
    const struct sl_sink *sink = pass->sink;
    enum sl_fate fate =
        sl_answer_fate(kind, &recall->answer, recall->value, problem);
    struct sl_finding finding = {
        .code = problem->code,
        .severity = SL_ERROR,
        .file = kind->file,
        .line = recall->line,
        .column = recall->answer.field,
        .record_id = recall->record_id,
        .value = recall->value,
        .reason = sl_text_string(&problem->reason),
        .remedy = sl_text_string(&problem->remedy),
    };
    struct sl_aside aside = {.kind = pass->kind,
                             .line = recall->line,
                             .record_id = recall->record_id,
                             .station_id = "",
                             .reason = finding.reason,
                             .raw = NULL};
    enum sl_status status = SL_OK;

    if (fate == SL_KEPT)
        return sl_error_set(error, SL_BUG,
                            "%s:%ld: a record that was kept is recalled",
                            kind->file, recall->line);
    pass->sum->kept--;
    if (fate == SL_REJECTED) {
        pass->sum->rejected++;
        status = sink->finding(sink->context, &finding, error);
    } else {
        pass->sum->out_of_scope++;
    }
    /* Its text went by long ago. */
    aside.fate = fate;
    if (!status)
        status = sink->set_aside(sink->context, &aside, error);
    return status;
}

enum sl_status sl_file_pass_recall(const struct sl_file_pass *pass,
                                   struct sl_error *error)
{
    const struct sl_sink *sink = pass->sink;
    struct sl_problem problem = {0};
    struct sl_recall recall = {0};
    enum sl_status status;
    bool found = false;

    for (;;) {
        if (sink->progress &&
            !sink->progress(sink->context,
                            pass->bytes_before + pass->file->position,
                            pass->bytes_all)) {
            status = sl_error_set(error, SL_INTERRUPTED,
                                  "stopped while reading %s; nothing was "
                                  "changed",
                                  sl_record_kind(pass->kind)->file);
            break;
        }
        status = sink->recall(sink->context, &recall, &found, error);
        if (status || !found)
            break;
        status = take_back(pass, &recall, &problem, error);
        if (status)
            break;
    }
    sl_problem_release(&problem);
    return status;
}
