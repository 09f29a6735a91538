#include "base/status.h"

#include <stdarg.h>
#include <stdio.h>

enum sl_status sl_error_set(struct sl_error *error, enum sl_status status,
                            const char *format, ...)
{
    va_list arguments;

    if (!error)
        return status;
    error->status = status;
    va_start(arguments, format);
    vsnprintf(error->message, sizeof error->message, format, arguments);
    va_end(arguments);
    return status;
}

const char *sl_status_name(enum sl_status status)
{
    switch (status) {
    case SL_OK:
        return "ok";
    case SL_USAGE:
        return "usage";
    case SL_REFUSED:
        return "refused";
    case SL_FILE:
        return "file";
    case SL_STORE:
        return "store";
    case SL_INTERRUPTED:
        return "interrupted";
    case SL_BUG:
        return "bug";
    }
    return "unknown status";
}
