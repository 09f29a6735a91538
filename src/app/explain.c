/* The explain command: the sheet of one pump, worked out anew from what the
 * store holds; the evaluator is pure, so it is what was ranked. */
#include "app/run.h"
#include "app/sheet.h"
#include "app/terminal.h"
#include "base/text.h"
#include "evaluator/station.h"

static void print_pump(struct sl_run *run, const struct sl_margin_rule *rule,
                       const struct sl_station_result *result, size_t pump)
{
    struct sl_sheet sheet = {.stream = stdout,
                             .units = run->options->units,
                             .rule = rule,
                             .vocabularies = &run->tables.vocabularies,
                             .dossier = result->dossier};

    for (size_t c = 0; c < result->condition_count; c++)
        sl_sheet_print(&sheet, &result->conditions[c],
                       &result->conditions[c].pumps[pump]);
    sl_sheet_rule_forms(&sheet, &run->tables);
    puts("Screening, not design: the maker's curve, local codes and a "
         "licensed\nengineer decide.");
}

/* By the rule and in the year of the newest evaluation, which is what was
 * ranked, unless the options say otherwise. */
static enum sl_status choose(struct sl_run *run,
                             const struct sl_margin_rule **rule,
                             struct sl_error *error)
{
    struct sl_evaluation newest = {.vintage = run->vintage.vintage,
                                   .rule = run->options->rule,
                                   .year = run->options->year};
    bool found = false;
    enum sl_status status =
        sl_store_find_evaluation(run->store, &newest, &found, error);

    if (status)
        return status;
    if (found)
        run->tables.year = newest.year;
    return sl_run_find_rule(run, newest.rule, rule, error);
}

enum sl_status sl_command_explain(struct sl_run *run, struct sl_error *error)
{
    const char *wanted = run->options->subject;
    const struct sl_margin_rule *rule;
    struct sl_dossier dossier;
    struct sl_station_result result;
    struct sl_settings settings;
    bool found = false;
    enum sl_status status =
        sl_run_open(run, run->options->store, SL_STORE_READ, error);

    if (!status)
        status = sl_run_find_newest(run, false, error);
    if (!status)
        status = choose(run, &rule, error);
    if (!status)
        status =
            sl_store_dossier_of_pump(run->store, run->vintage.vintage, wanted,
                                     &run->arena, &dossier, &found, error);
    if (status)
        return status;
    if (!found)
        return sl_error_set(error, SL_REFUSED,
                            "no pump \"%s\" is kept in vintage %lld; see "
                            "pumps.csv for the ids, findings.csv for "
                            "rejected records",
                            wanted, run->vintage.vintage);
    settings = (struct sl_settings){.rule = rule, .list_sets = true};
    sl_evaluate_station(&dossier, &run->tables, &settings, &run->arena,
                        &result);
    for (size_t i = 0; i < dossier.pump_count; i++)
        if (sl_same(dossier.pumps[i].record.pump_id, wanted))
            print_pump(run, rule, &result, i);
    return SL_OK;
}
