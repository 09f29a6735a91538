/* Numbers of a calculation sheet. */
#include <math.h>

#include "app/sheet_parts.h"

const char *sl_sheet_figure(const struct sl_sheet *sheet,
                            enum sl_quantity quantity, double si, int decimals,
                            char room[SL_FIGURE_ROOM])
{
    double shown = sl_shown(quantity, sheet->units, si);

    if (isnan(si)) {
        snprintf(room, SL_FIGURE_ROOM, "unknown");
        return room;
    }
    if (fabs(shown) < 0.5 * pow(10, -decimals))
        shown = 0; /* no "-0.00" */
    snprintf(room, SL_FIGURE_ROOM, "%.*f%s%s", decimals, shown,
             quantity == SL_PURE ? "" : " ",
             sl_unit_shown(quantity, sheet->units)->label);
    return room;
}

int sl_sheet_decimals(enum sl_quantity quantity)
{
    switch (quantity) {
    case SL_PURE:
        return 3;
    case SL_TEMPERATURE:
    case SL_FLOW:
    case SL_PRESSURE:
        return 1;
    case SL_SPEED:
        return 0;
    default:
        return 2;
    }
}
