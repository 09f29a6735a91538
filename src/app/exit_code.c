#include "app/exit_code.h"

enum sl_exit sl_exit_code(enum sl_status status)
{
    switch (status) {
    case SL_OK:
        return SL_EXIT_DONE;
    case SL_USAGE:
        return SL_EXIT_USAGE;
    case SL_REFUSED:
        return SL_EXIT_REFUSED;
    case SL_FILE:
    case SL_STORE:
        return SL_EXIT_FAILED;
    case SL_INTERRUPTED:
        return SL_EXIT_INTERRUPTED;
    case SL_BUG:
        break;
    }
    return SL_EXIT_BUG;
}
