/* summerlow: the command line. */
#include <stdio.h>

#include "app/exit_code.h"
#include "app/options.h"
#include "app/run.h"
#include "app/terminal.h"

static enum sl_status do_command(struct sl_run *run, struct sl_error *error)
{
    switch (run->options->command) {
    case SL_COMMAND_AUDIT:
        return sl_command_audit(run, error);
    case SL_COMMAND_IMPORT:
        return sl_command_import(run, error);
    case SL_COMMAND_EVALUATE:
        return sl_command_evaluate(run, error);
    case SL_COMMAND_RANK:
        return sl_command_rank(run, error);
    case SL_COMMAND_EXPLAIN:
        return sl_command_explain(run, error);
    case SL_COMMAND_NONE:
        break;
    }
    return sl_error_set(error, SL_BUG, "a command without a step");
}

/* Say what went wrong; the text may hold an inventory's own. */
static enum sl_exit fail(const struct sl_error *error)
{
    sl_progress_end();
    fputs("summerlow: ", stderr);
    sl_print_safely(stderr, error->message);
    if (error->status == SL_BUG)
        fputs(" (a bug of ours; please report it)", stderr);
    putc('\n', stderr);
    return sl_exit_code(error->status);
}

static enum sl_status flush_results(struct sl_error *error)
{
    if (fflush(stdout) == 0 && !ferror(stdout))
        return SL_OK;
    return sl_error_set(error, SL_FILE,
                        "cannot write to standard output; free some space "
                        "or name another place");
}

int main(int count, char **words)
{
    struct sl_options options;
    struct sl_error error = {0};
    struct sl_run run = {.options = &options};
    enum sl_status status;

    status = sl_options_parse(count, words, &options, &error);
    if (status)
        return fail(&error);
    if (options.version)
        puts("summerlow " SL_VERSION);
    else if (options.help)
        fputs(sl_help(options.command), stdout);
    if (!options.version && !options.help) {
        sl_watch_for_stop();
        status = do_command(&run, &error);
    }
    if (!status)
        status = flush_results(&error);
    sl_run_close(&run);
    if (status)
        return fail(&error);
    return run.rejected ? SL_EXIT_DONE_WITH_REJECTED : SL_EXIT_DONE;
}
