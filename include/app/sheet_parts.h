/* The parts of a calculation sheet; app/sheet.h puts them together. */
#ifndef SL_APP_SHEET_PARTS_H
#define SL_APP_SHEET_PARTS_H

#include "app/sheet.h"

#define SL_FIGURE_ROOM 48

/* A value in the sheet's units, or "unknown", written into `room`. */
const char *sl_sheet_figure(const struct sl_sheet *sheet,
                            enum sl_quantity quantity, double si, int decimals,
                            char room[SL_FIGURE_ROOM]);
/* How many a quantity is shown to. */
int sl_sheet_decimals(enum sl_quantity quantity);

/* The running sets tried, the worst first; of many only the worst. */
void sl_sheet_sets(const struct sl_sheet *sheet,
                   const struct sl_pump_result *pump);
/* The checks beside the margin. */
void sl_sheet_checks(const struct sl_sheet *sheet,
                     const struct sl_pump_result *pump);
/* How far level, temperature and flow may go. */
void sl_sheet_limits(const struct sl_sheet *sheet,
                     const struct sl_pump_result *pump);
/* What every margin rule says. */
void sl_sheet_rules(const struct sl_sheet *sheet,
                    const struct sl_pump_result *pump);

#endif
