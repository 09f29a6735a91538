/* How a call ended, and what to tell the person who asked.
 *
 * Every fallible function returns an enum sl_status and takes a
 * struct sl_error *.  On SL_OK the error object is untouched; on any other
 * status it holds one message: what failed first, the value in quotes, what
 * to do; no capital, no full stop. */
#ifndef SL_BASE_STATUS_H
#define SL_BASE_STATUS_H

#include <stddef.h>

#define SL_ERROR_LENGTH 1024

enum sl_status {
    /* The call did all it promises. */
    SL_OK = 0,
    /* The command line does not say something this program can do. */
    SL_USAGE,
    /* The user's inventory cannot be read as one; nothing was written. */
    SL_REFUSED,
    /* A file or folder could not be read or written. */
    SL_FILE,
    /* The store could not be opened, is not ours, is newer than this
     * program, is busy, or SQLite reported an error. */
    SL_STORE,
    /* The user asked to stop; the store is as it was. */
    SL_INTERRUPTED,
    /* A promise inside the program is broken: ours to mend. */
    SL_BUG
};

struct sl_error {
    enum sl_status status;
    char message[SL_ERROR_LENGTH];
};

/* Fill `error` (may be NULL) and return `status`, so that a caller can write
 * `return sl_error_set(error, SL_FILE, "...", ...)`.  A message longer than
 * the buffer is cut. */
enum sl_status sl_error_set(struct sl_error *error, enum sl_status status,
                            const char *format, ...)
    __attribute__((format(printf, 3, 4)));

/* The status as one word, for tests and bug reports: "ok", "usage", ... */
const char *sl_status_name(enum sl_status status);

#endif
