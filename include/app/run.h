/* One run of the program: what its steps share. */
#ifndef SL_APP_RUN_H
#define SL_APP_RUN_H

#include "app/options.h"
#include "base/memory.h"
#include "base/status.h"
#include "model/finding.h"
#include "model/tables.h"
#include "store/evaluation.h"
#include "store/store.h"
#include "store/vintage.h"

struct sl_run {
    const struct sl_options *options;
    struct sl_store *store;
    struct sl_arena arena; /* lives as long as the run */
    struct sl_tables tables;
    struct sl_vintage vintage;
    struct sl_evaluation evaluation;
    bool rejected; /* some record was */
};

/* Open the store at `path` and read the published tables. */
enum sl_status sl_run_open(struct sl_run *run, const char *path,
                           enum sl_store_mode mode, struct sl_error *error);
/* The tables as they hold for the run's vintage, and the year of the audit:
 * the one asked for, else that of the import. */
enum sl_status sl_run_use_vintage(struct sl_run *run, struct sl_error *error);
/* The year of the import of the run's vintage. */
int sl_run_import_year(const struct sl_run *run);
/* The newest vintage with its tables, and (where `evaluated`) its newest
 * evaluation, by the rule and of the year asked for if any. */
enum sl_status sl_run_find_newest(struct sl_run *run, bool evaluated,
                                  struct sl_error *error);
/* The rule of that name, or, with NULL, the first of the table; SL_REFUSED
 * with the names there are when it is none of them. */
enum sl_status sl_run_find_rule(const struct sl_run *run, const char *name,
                                const struct sl_margin_rule **rule,
                                struct sl_error *error);
void sl_run_close(struct sl_run *run);

/* The steps. Import and evaluate work inside a transaction of the caller's
 * making; rank only reads the store. */
struct sl_inventory;
enum sl_status sl_run_import(struct sl_run *run, struct sl_inventory *inventory,
                             struct sl_error *error);
enum sl_status sl_run_evaluate(struct sl_run *run, struct sl_error *error);
enum sl_status sl_run_rank(struct sl_run *run, const char *folder,
                           struct sl_error *error);

/* What is printed on standard output after a step. */
enum sl_status sl_print_records(struct sl_run *run, struct sl_error *error);
enum sl_status sl_print_states(struct sl_run *run, struct sl_error *error);

/* The commands. */
enum sl_status sl_command_audit(struct sl_run *run, struct sl_error *error);
enum sl_status sl_command_import(struct sl_run *run, struct sl_error *error);
enum sl_status sl_command_evaluate(struct sl_run *run, struct sl_error *error);
enum sl_status sl_command_rank(struct sl_run *run, struct sl_error *error);
enum sl_status sl_command_explain(struct sl_run *run, struct sl_error *error);

#endif
