/* Reading back what an import told: findings, and records set aside. */
#include "base/text.h"
#include "store/evaluation.h"
#include "store/statement.h"

/* The schema allows no other word. */
static enum sl_severity severity_named(const char *word)
{
    int severity = SL_ERROR;

    while (severity < SL_NOTE &&
           !sl_same(word, sl_severity_name((enum sl_severity)severity)))
        severity++;
    return (enum sl_severity)severity;
}

static struct sl_finding read_finding(struct sl_statement *row)
{
    return (struct sl_finding){
        .code = sl_read_text(row, "code"),
        .severity = severity_named(sl_read_text(row, "severity")),
        .file = sl_read_text(row, "file"),
        .line = (long)sl_read_whole(row, "line"),
        .column = sl_read_text(row, "header"),
        .record_id = sl_read_text(row, "record_id"),
        .value = sl_read_text(row, "value"),
        .reason = sl_read_text(row, "reason"),
        .remedy = sl_read_text(row, "remedy"),
    };
}

enum sl_status sl_store_each_finding(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_finding *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = sl_statement_use_for(
        store, SL_QUERY_FINDING_ROWS, "vintage", vintage, &statement, error);

    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        struct sl_finding finding = read_finding(statement);

        status = sl_statement_check(statement, error);
        if (!status)
            status = each(context, &finding, error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}

enum sl_status sl_store_each_set_aside(
    struct sl_store *store, long long vintage,
    enum sl_status (*each)(void *context, const struct sl_set_aside_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = sl_statement_use_for(
        store, SL_QUERY_SET_ASIDE_ROWS, "vintage", vintage, &statement, error);

    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        struct sl_set_aside_row aside = {
            .file = sl_read_text(statement, "file"),
            .line = (long)sl_read_whole(statement, "line"),
            .record_id = sl_read_text(statement, "record_id"),
            .fate = sl_same(sl_read_text(statement, "fate"),
                            sl_fate_name(SL_OUT_OF_SCOPE))
                        ? SL_OUT_OF_SCOPE
                        : SL_REJECTED,
            .reason = sl_read_text(statement, "reason"),
        };

        status = sl_statement_check(statement, error);
        if (!status)
            status = each(context, &aside, error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}
