/* The evaluation step: station by station from the store, and back. */
#include <string.h>

#include "app/run.h"
#include "app/terminal.h"
#include "evaluator/station.h"

static enum sl_status evaluate_one(struct sl_run *run,
                                   const struct sl_margin_rule *rule,
                                   const struct sl_dossier *dossier,
                                   struct sl_arena *arena,
                                   struct sl_error *error)
{
    struct sl_settings settings = {.rule = rule};
    struct sl_station_result result;

    sl_evaluate_station(dossier, &run->tables, &settings, arena, &result);
    return sl_store_add_result(run->store, run->evaluation.evaluation, &result,
                               error);
}

static enum sl_status evaluate_all(struct sl_run *run,
                                   const struct sl_margin_rule *rule,
                                   struct sl_error *error)
{
    long long all = sl_store_count_stations(run->store, run->vintage.vintage);
    struct sl_arena arena = {0};
    struct sl_dossier dossier;
    struct sl_text after = {0};
    enum sl_status status = SL_OK;
    bool found = true;

    for (long long done = 0; !status && found; done++) {
        sl_arena_reset(&arena);
        status = sl_store_next_dossier(run->store, run->vintage.vintage,
                                       sl_text_string(&after), &arena, &dossier,
                                       &found, error);
        if (status || !found)
            break;
        status = evaluate_one(run, rule, &dossier, &arena, error);
        sl_text_clear(&after);
        sl_text_add_string(&after, dossier.record.station_id);
        sl_progress("evaluating", done + 1, all);
        if (!status && sl_stop_asked())
            status = sl_error_set(error, SL_INTERRUPTED,
                                  "interrupted; the store is as it was");
    }
    sl_progress_end();
    sl_text_release(&after);
    sl_arena_release(&arena);
    return status;
}

enum sl_status sl_run_evaluate(struct sl_run *run, struct sl_error *error)
{
    const struct sl_margin_rule *rule;
    enum sl_status status =
        sl_run_find_rule(run, run->options->rule, &rule, error);
    bool found = false;

    if (status)
        return status;
    run->evaluation = (struct sl_evaluation){.vintage = run->vintage.vintage,
                                             .version = SL_VERSION,
                                             .rule = rule->rule,
                                             .year = run->tables.year};
    status =
        sl_store_find_evaluation(run->store, &run->evaluation, &found, error);
    if (status || found)
        return status;
    status = sl_store_add_evaluation(run->store, &run->evaluation, error);
    if (!status)
        status = sl_store_add_rules(run->store, run->evaluation.evaluation,
                                    &run->tables, error);
    return status ? status : evaluate_all(run, rule, error);
}
