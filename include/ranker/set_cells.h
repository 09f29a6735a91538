/* Cells of pumps.csv: what was found over all running sets of a pump, and by
 * every margin rule. */
#ifndef SL_RANKER_SET_CELLS_H
#define SL_RANKER_SET_CELLS_H

#include "model/row.h"
#include "ranker/cells.h"

/* Empty where it was not kept. */
void sl_cells_sets(struct sl_cells *cells, const struct sl_pump_row *row);
/* What NPSHR comes from; likewise. */
void sl_cells_npshr_basis(struct sl_cells *cells,
                          const struct sl_pump_row *row);
/* What each rule says, in one cell. */
void sl_cells_rule_states(struct sl_cells *cells,
                          const struct sl_summary *summary,
                          const struct sl_pump_row *row);
/* Each limit, and in words how the search for it ended. */
void sl_cells_limits(struct sl_cells *cells, const struct sl_pump_row *row);

#endif
