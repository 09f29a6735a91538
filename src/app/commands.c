/* The commands, each a few steps in a row. */
#define _POSIX_C_SOURCE 200809L /* access, unlink */

#include <unistd.h>

#include "app/run.h"
#include "base/output.h"
#include "base/text.h"
#include "importer/inventory.h"

/* The inventory with its headers understood: nothing is written before. */
static enum sl_status open_inventory(struct sl_run *run,
                                     struct sl_inventory **inventory,
                                     struct sl_error *error)
{
    enum sl_status status =
        sl_inventory_open(run->options->subject, inventory, error);

    if (status)
        return status;
    return sl_inventory_read_headers(*inventory, error);
}

static enum sl_status import_and_maybe_evaluate(struct sl_run *run,
                                                struct sl_inventory *inventory,
                                                bool evaluate,
                                                struct sl_error *error)
{
    enum sl_status status = sl_store_begin(run->store, error);

    if (!status)
        status = sl_run_import(run, inventory, error);
    /* Also where nothing is evaluated yet: what never can be is refused. */
    if (!status)
        status = sl_run_use_vintage(run, error);
    if (!status && evaluate)
        status = sl_run_evaluate(run, error);
    if (!status)
        return sl_store_commit(run->store, error);
    sl_store_rollback(run->store);
    return status;
}

/* The same into the store at `path`; where it was not there before, a
 * failure leaves none behind. */
static enum sl_status import_into(struct sl_run *run, const char *path,
                                  struct sl_inventory *inventory, bool evaluate,
                                  struct sl_error *error)
{
    bool was_there = access(path, F_OK) == 0;
    enum sl_status status = sl_run_open(run, path, SL_STORE_CREATE, error);

    if (!status)
        status = import_and_maybe_evaluate(run, inventory, evaluate, error);
    if (status && !was_there) {
        sl_store_close(run->store);
        run->store = NULL;
        unlink(path);
    }
    return status;
}

/* Results would overwrite an inventory's pumps.csv with their own. */
static enum sl_status check_out(const char *out, struct sl_error *error)
{
    struct sl_text path = {0};
    bool inventory;

    sl_text_addf(&path, "%s/stations.csv", out);
    inventory = access(path.bytes, F_OK) == 0;
    sl_text_release(&path);
    if (!inventory)
        return SL_OK;
    return sl_error_set(error, SL_REFUSED,
                        "the folder \"%s\" holds an inventory (stations.csv), "
                        "whose pumps.csv the results would overwrite; name "
                        "another folder with --out",
                        out);
}

enum sl_status sl_command_import(struct sl_run *run, struct sl_error *error)
{
    const struct sl_options *options = run->options;
    struct sl_inventory *inventory = NULL;
    enum sl_status status = open_inventory(run, &inventory, error);

    if (!status)
        status =
            import_into(run, options->dry_run ? ":memory:" : options->store,
                        inventory, false, error);
    if (!status)
        status = sl_print_records(run, error);
    if (!status && options->dry_run)
        puts("A dry run: nothing was written.");
    sl_inventory_close(inventory);
    return status;
}

enum sl_status sl_command_evaluate(struct sl_run *run, struct sl_error *error)
{
    enum sl_status status =
        sl_run_open(run, run->options->store, SL_STORE_WRITE, error);

    if (!status)
        status = sl_run_find_newest(run, false, error);
    if (!status)
        status = sl_store_begin(run->store, error);
    if (!status)
        status = sl_run_evaluate(run, error);
    if (!status)
        status = sl_store_commit(run->store, error);
    return status ? status : sl_print_states(run, error);
}

enum sl_status sl_command_rank(struct sl_run *run, struct sl_error *error)
{
    enum sl_status status = check_out(run->options->out, error);

    if (!status)
        status = sl_run_open(run, run->options->store, SL_STORE_READ, error);
    if (!status)
        status = sl_run_find_newest(run, true, error);
    return status ? status : sl_run_rank(run, run->options->out, error);
}

/* All that is printed comes before the files are written, so that a full
 * disk there still leaves the answer on the screen. */
static enum sl_status print_and_rank(struct sl_run *run, struct sl_error *error)
{
    enum sl_status status = sl_print_records(run, error);

    if (!status)
        status = sl_print_states(run, error);
    return status ? status : sl_run_rank(run, run->options->out, error);
}

enum sl_status sl_command_audit(struct sl_run *run, struct sl_error *error)
{
    const struct sl_options *options = run->options;
    struct sl_inventory *inventory = NULL;
    struct sl_text path = {0};
    enum sl_status status = check_out(options->out, error);

    if (!status)
        status = open_inventory(run, &inventory, error);
    if (!status)
        status = sl_make_folder(options->out, error);
    if (status)
        goto done;
    if (options->store)
        sl_text_add_string(&path, options->store);
    else
        sl_text_addf(&path, "%s/summerlow.db", options->out);
    status = import_into(run, path.bytes, inventory, true, error);
    if (!status)
        status = print_and_rank(run, error);
    if (!status)
        printf("  %s: the store, for summerlow explain\n", path.bytes);
done:
    sl_text_release(&path);
    sl_inventory_close(inventory);
    return status;
}
