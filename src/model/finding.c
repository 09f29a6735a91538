#include "model/finding.h"

const char *sl_severity_name(enum sl_severity severity)
{
    switch (severity) {
    case SL_ERROR:
        return "error";
    case SL_DOUBT:
        return "doubt";
    case SL_NOTE:
        return "note";
    }
    return "unknown severity";
}

const char *sl_fate_name(enum sl_fate fate)
{
    switch (fate) {
    case SL_KEPT:
        return "kept";
    case SL_REJECTED:
        return "rejected";
    case SL_OUT_OF_SCOPE:
        return "out of scope";
    }
    return "unknown fate";
}
