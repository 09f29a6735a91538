#include "app/run.h"

#include <stdio.h>
#include <stdlib.h>

#include "base/text.h"

/* An audit further from its import than this is a slip, more likely. */
#define FAR_YEARS 100

enum sl_status sl_run_open(struct sl_run *run, const char *path,
                           enum sl_store_mode mode, struct sl_error *error)
{
    enum sl_status status = sl_store_open(path, mode, &run->store, error);

    if (status)
        return status;
    return sl_store_read_tables(run->store, 0, &run->arena, &run->tables,
                                error);
}

/* The year that an ISO 8601 time begins with. */
static int year_of(const char *time)
{
    int year = 0;

    for (int i = 0; i < 4 && time[i] >= '0' && time[i] <= '9'; i++)
        year = 10 * year + (time[i] - '0');
    return year;
}

int sl_run_import_year(const struct sl_run *run)
{
    return year_of(run->vintage.imported_at);
}

/* A slip in --year ages every pipe by it. */
static void note_far_year(int year, int import_year)
{
    if (abs(year - import_year) > FAR_YEARS)
        fprintf(stderr,
                "note: --year %d lies more than %d years from the import's, "
                "%d; is it meant?\n",
                year, FAR_YEARS, import_year);
}

enum sl_status sl_run_use_vintage(struct sl_run *run, struct sl_error *error)
{
    const struct sl_options *options = run->options;
    int import_year = sl_run_import_year(run);

    run->tables.year = options->year ? options->year : import_year;
    note_far_year(run->tables.year, import_year);
    return sl_store_read_tables(run->store, run->vintage.vintage, &run->arena,
                                &run->tables, error);
}

/* An unknown rule is told before a missing evaluation. */
static enum sl_status find_evaluation(struct sl_run *run,
                                      struct sl_error *error)
{
    const struct sl_options *options = run->options;
    const struct sl_margin_rule *rule;
    bool found = false;
    enum sl_status status = sl_run_find_rule(run, options->rule, &rule, error);

    if (status)
        return status;
    run->evaluation = (struct sl_evaluation){.vintage = run->vintage.vintage,
                                             .rule = options->rule,
                                             .year = options->year};
    status =
        sl_store_find_evaluation(run->store, &run->evaluation, &found, error);
    if (status || found)
        return status;
    return sl_error_set(error, SL_REFUSED,
                        "the newest inventory in the store is not evaluated "
                        "%syet; run summerlow evaluate %sfirst",
                        options->rule || options->year ? "so " : "",
                        options->rule || options->year ? "with these options "
                                                       : "");
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
    status = sl_run_use_vintage(run, error);
    return status || !evaluated ? status : find_evaluation(run, error);
}

static enum sl_status no_such_rule(const struct sl_run *run, const char *name,
                                   struct sl_error *error)
{
    struct sl_text names = {0};
    enum sl_status status = SL_OK;

    for (size_t i = 0; i < run->tables.rule_count; i++)
        sl_text_addf(&names, "%s\"%s\"%s", i ? ", " : "",
                     run->tables.rules[i].rule,
                     run->tables.rules[i].trust == 'M' ? " (from memory)" : "");
    status = sl_error_set(error, SL_REFUSED,
                          "there is no margin rule \"%s\"; use one of %s", name,
                          sl_text_string(&names));
    sl_text_release(&names);
    return status;
}

enum sl_status sl_run_find_rule(const struct sl_run *run, const char *name,
                                const struct sl_margin_rule **rule,
                                struct sl_error *error)
{
    if (run->tables.rule_count == 0)
        return sl_error_set(error, SL_STORE,
                            "the store has no margin rule; restore the table "
                            "margin_rules");
    *rule = &run->tables.rules[0];
    for (size_t i = 0; name && i < run->tables.rule_count; i++) {
        *rule = &run->tables.rules[i];
        if (sl_same((*rule)->rule, name))
            return SL_OK;
    }
    return name ? no_such_rule(run, name, error) : SL_OK;
}

void sl_run_close(struct sl_run *run)
{
    sl_store_close(run->store);
    run->store = NULL;
    sl_arena_release(&run->arena);
}
