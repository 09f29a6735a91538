/* One station in, one result out.
 *
 * Pure: the result depends on the dossier, the tables and the rule alone;
 * it lives in the arena, with the dossier.  Each pump is judged running
 * alone, and with the other pumps it may run with as far as they load the
 * suction pipes it shares: there they are taken at their largest flow, an
 * upper bound on the loss, so that a pump called clear is clear in every
 * running set in which NPSHR is published and no larger at less flow.  The
 * sets themselves are not solved yet. */
#ifndef SL_EVALUATOR_STATION_H
#define SL_EVALUATOR_STATION_H

#include "base/memory.h"
#include "model/result.h"

void sl_evaluate_station(const struct sl_dossier *dossier,
                         const struct sl_tables *tables,
                         const struct sl_margin_rule *rule,
                         struct sl_arena *arena,
                         struct sl_station_result *result);

#endif
