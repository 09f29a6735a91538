/* One station in, one result out.
 *
 * Pure: the result depends on the dossier, the tables and the settings
 * alone; it lives in the arena, with the dossier.  Every set of pumps that
 * the controls may run together is solved, up to SL_EXHAUSTIVE_PUMPS pumps;
 * each pump is judged by the worst of the sets it runs in. */
#ifndef SL_EVALUATOR_STATION_H
#define SL_EVALUATOR_STATION_H

#include "base/memory.h"
#include "model/result.h"

struct sl_settings {
    const struct sl_margin_rule *rule; /* ranked on: one of the tables' */
    bool list_sets;                    /* keep every set tried of each pump */
    bool apart; /* solve equal pumps one by one: the same figures, slower */
};

void sl_evaluate_station(const struct sl_dossier *dossier,
                         const struct sl_tables *tables,
                         const struct sl_settings *settings,
                         struct sl_arena *arena,
                         struct sl_station_result *result);

#endif
