#include "app/notes.h"

#include "base/text.h"
#include "model/fields.h"

/* A key with a slip in it makes two: one that is missing somewhere, and one
 * that nothing refers to. */
static enum sl_status note_unused(void *context, const char *file, long line,
                                  const char *id, struct sl_error *error)
{
    const struct sl_sink *sink = context;
    bool curve = sl_same(file, sl_record_kind(SL_KIND_CURVE)->file);
    struct sl_finding finding = {
        .code = "nothing-refers",
        .severity = SL_NOTE,
        .file = file,
        .line = line,
        .column = curve ? "curve_id" : "pipe_id",
        .record_id = id,
        .value = id,
        .reason = curve ? "no pump that was kept runs on this curve"
                        : "no pump and no pipe that was kept draws from it",
        .remedy = "if one does, make the two keys the same",
    };

    return sink->finding(sink->context, &finding, error);
}

/* An owner who wrote conditions is told when none of them is audited. */
static enum sl_status note_shipped_conditions(const struct sl_sink *sink,
                                              const struct sl_file_sum *sum,
                                              struct sl_error *error)
{
    struct sl_finding finding = {
        .code = "shipped-conditions",
        .severity = SL_NOTE,
        .file = sum->file,
        .column = "",
        .record_id = "",
        .value = "",
        .reason = "no condition of it is kept; the shipped ones are audited",
        .remedy = "mend it, or take the file out",
    };

    return sum->present && sum->kept == 0
               ? sink->finding(sink->context, &finding, error)
               : SL_OK;
}

static struct sl_finding about_rule(const struct sl_rule_name *name)
{
    return (struct sl_finding){
        .code = "rule-name-case",
        .severity = SL_DOUBT,
        .file = sl_record_kind(SL_KIND_RULE)->file,
        .line = name->line,
        .column = sl_record_kind(SL_KIND_RULE)->fields[0].name,
        .record_id = name->rule,
        .value = name->rule,
    };
}

static enum sl_status note_shipped_rule(const struct sl_sink *sink,
                                        const struct sl_rule_name *name,
                                        struct sl_error *error)
{
    struct sl_finding finding = about_rule(name);
    struct sl_text reason = {0};
    enum sl_status status;

    if (sl_same(name->rule, name->shipped)) {
        finding.code = "replaces-shipped-rule";
        finding.severity = SL_NOTE;
        finding.reason = "it stands in place of the shipped rule of that name";
        finding.remedy = "give it another name to be judged by both";
        return sink->finding(sink->context, &finding, error);
    }
    sl_text_addf(&reason,
                 "only letter case parts it from the shipped rule \"%s\"; "
                 "both are judged by",
                 name->shipped);
    finding.reason = sl_text_string(&reason);
    finding.remedy = "write that name to put it in its place, or give it "
                     "another";
    status = sink->finding(sink->context, &finding, error);
    sl_text_release(&reason);
    return status;
}

static enum sl_status note_twin_rule(const struct sl_sink *sink,
                                     const struct sl_rule_name *name,
                                     struct sl_error *error)
{
    struct sl_finding finding = about_rule(name);
    struct sl_text reason = {0};
    enum sl_status status;

    sl_text_addf(&reason,
                 "only letter case parts it from the rule at %s:%ld; both are "
                 "judged by",
                 finding.file, name->first_line);
    finding.reason = sl_text_string(&reason);
    finding.remedy = "keep one of the two, or give one another name";
    status = sink->finding(sink->context, &finding, error);
    sl_text_release(&reason);
    return status;
}

static enum sl_status note_rule_name(void *context,
                                     const struct sl_rule_name *name,
                                     struct sl_error *error)
{
    const struct sl_sink *sink = context;
    enum sl_status status = SL_OK;

    if (name->shipped[0])
        status = note_shipped_rule(sink, name, error);
    if (!status && name->first_line < name->line)
        status = note_twin_rule(sink, name, error);
    return status;
}

enum sl_status sl_notes_tell(struct sl_run *run,
                             const struct sl_inventory *inventory,
                             struct sl_sink *sink, struct sl_error *error)
{
    long long vintage = run->vintage.vintage;
    enum sl_status status =
        sl_store_each_unused(run->store, vintage, note_unused, sink, error);

    if (!status)
        status = note_shipped_conditions(
            sink, sl_inventory_sum(inventory, SL_KIND_CONDITION), error);
    if (!status)
        status = sl_store_each_rule_name(run->store, vintage, note_rule_name,
                                         sink, error);
    return status;
}
