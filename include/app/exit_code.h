/* What the program's exit status says; documented in --help and docs. */
#ifndef SL_APP_EXIT_CODE_H
#define SL_APP_EXIT_CODE_H

#include "base/status.h"

enum sl_exit {
    SL_EXIT_DONE = 0,
    SL_EXIT_DONE_WITH_REJECTED = 1,
    SL_EXIT_USAGE = 2,
    SL_EXIT_REFUSED = 3, /* input refused, nothing written */
    SL_EXIT_FAILED = 4,  /* a file or the store */
    SL_EXIT_BUG = 70,    /* also out of memory */
    SL_EXIT_INTERRUPTED = 130
};

enum sl_exit sl_exit_code(enum sl_status status);

#endif
