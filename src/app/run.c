#include "app/run.h"

enum sl_status sl_run_open(struct sl_run *run, const char *path,
                           enum sl_store_mode mode, struct sl_error *error)
{
    enum sl_status status = sl_store_open(path, mode, &run->store, error);

    if (status)
        return status;
    return sl_store_read_tables(run->store, 0, &run->arena, &run->tables,
                                error);
}

enum sl_status sl_run_find_newest(struct sl_run *run, bool evaluated,
                                  struct sl_error *error)
{
    bool found = false;
    enum sl_status status = sl_store_find_vintage(run->store, NULL, &run->arena,
                                                  &run->vintage, &found, error);

    if (status)
        return status;
    if (!found)
        return sl_error_set(error, SL_REFUSED,
                            "the store holds no inventory yet; run summerlow "
                            "import first");
    if (!evaluated)
        return SL_OK;
    run->evaluation = (struct sl_evaluation){.vintage = run->vintage.vintage};
    status =
        sl_store_find_evaluation(run->store, &run->evaluation, &found, error);
    if (status || found)
        return status;
    return sl_error_set(error, SL_REFUSED,
                        "the newest inventory in the store is not evaluated "
                        "yet; run summerlow evaluate first");
}

enum sl_status sl_run_find_rule(const struct sl_run *run,
                                const struct sl_margin_rule **rule,
                                struct sl_error *error)
{
    if (run->tables.rule_count == 0)
        return sl_error_set(error, SL_STORE,
                            "the store has no margin rule; restore the table "
                            "margin_rules");
    *rule = &run->tables.rules[0];
    return SL_OK;
}

void sl_run_close(struct sl_run *run)
{
    sl_store_close(run->store);
    run->store = NULL;
    sl_arena_release(&run->arena);
}
