/* What a person sees while the program runs: progress and messages on
 * standard error, progress only when that is a terminal. */
#ifndef SL_APP_TERMINAL_H
#define SL_APP_TERMINAL_H

#include <stdbool.h>
#include <stdio.h>

#include "base/text.h"

/* Catch Ctrl-C and SIGTERM: from then on sl_stop_asked() tells. */
void sl_watch_for_stop(void);
bool sl_stop_asked(void);

/* "reading 42 %"; wiped by sl_progress_end. */
void sl_progress(const char *what, long long done, long long all);
void sl_progress_end(void);

/* Text from an inventory; control characters, and the marks that would turn
 * a line around, are shown by their code ("<1B>", "<202E>") and not sent; so is
 * each byte that is not UTF-8. */
void sl_print_safely(FILE *stream, const char *text);

#endif
