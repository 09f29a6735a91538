/* The command line. */
#ifndef SL_APP_OPTIONS_H
#define SL_APP_OPTIONS_H

#include <stdbool.h>

#include "base/status.h"
#include "base/units.h"

#define SL_VERSION "0.2.0"

enum sl_command {
    SL_COMMAND_NONE,
    SL_COMMAND_AUDIT,
    SL_COMMAND_IMPORT,
    SL_COMMAND_EVALUATE,
    SL_COMMAND_RANK,
    SL_COMMAND_EXPLAIN
};

struct sl_options {
    enum sl_command command;
    bool help;
    bool version;
    const char *subject; /* the inventory folder, or the pump */
    const char *store;
    const char *out;
    const char *label;
    const char *rule; /* the margin rule to judge by; NULL: the first */
    int year;         /* of the audit; 0: that of the import */
    enum sl_unit_system units;
    bool dry_run;
};

/* SL_USAGE, with what to do, when the words make no command. */
enum sl_status sl_options_parse(int count, char **words,
                                struct sl_options *options,
                                struct sl_error *error);

/* The help of a command, or of the whole program. */
const char *sl_help(enum sl_command command);

#endif
