/* The calculation sheet of one pump under one condition, on a terminal. */
#ifndef SL_APP_SHEET_H
#define SL_APP_SHEET_H

#include <stdio.h>

#include "base/units.h"
#include "model/result.h"

struct sl_sheet {
    FILE *stream;
    enum sl_unit_system units;
    const struct sl_margin_rule *rule;
    const struct sl_vocabularies *vocabularies;
    const struct sl_dossier *dossier;
};

void sl_sheet_print(const struct sl_sheet *sheet,
                    const struct sl_condition_result *condition,
                    const struct sl_pump_result *pump);

/* What each margin rule asks for, once behind the sheets. */
void sl_sheet_rule_forms(const struct sl_sheet *sheet,
                         const struct sl_tables *tables);

#endif
