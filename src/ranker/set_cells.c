#include "ranker/set_cells.h"

#include "ranker/words.h"

/* Empty where it was not kept: none of these counts can be 0. */
static void known_count(struct sl_cells *cells, const char *name,
                        long long count)
{
    if (cells->naming || count > 0)
        sl_cell_count(cells, name, count);
    else
        sl_cell_text(cells, name, NULL);
}

/* What was found over all running sets. */
void sl_cells_sets(struct sl_cells *cells, const struct sl_pump_row *row)
{
    bool kept = cells->naming || row->sets_tried > 0;
    const char *position = sl_curve_position_name(row->curve_position);

    known_count(cells, "running", row->running);
    known_count(cells, "sets_tried", row->sets_tried);
    sl_cell_text(cells, "sets_all", kept ? row->sets_all ? "yes" : "no" : NULL);
    sl_cell_text(cells, "adverse_set", row->adverse_set);
    sl_cell_text(cells, "one_out_set", row->one_out_set);
    sl_cell_number(cells, "one_out_margin", SL_LENGTH, row->one_out_margin);
    sl_cell_number(cells, "one_out_surplus", SL_LENGTH, row->one_out_surplus);
    sl_cell_text(cells, "curve_position", kept ? position : NULL);
    sl_cell_text(cells, "off_curve_set", row->off_curve_set);
    sl_cell_text(cells, "stands_set", row->stands_set);
    sl_cell_text(cells, "flags", row->flags);
}

void sl_cells_npshr_basis(struct sl_cells *cells, const struct sl_pump_row *row)
{
    bool kept = cells->naming || row->sets_tried > 0;

    sl_cell_text(cells, "npshr_basis",
                 kept ? sl_npshr_basis_name(row->npshr_basis) : NULL);
}

void sl_cells_rule_states(struct sl_cells *cells,
                          const struct sl_summary *summary,
                          const struct sl_pump_row *row)
{
    struct sl_text text = {0};

    if (!cells->naming)
        sl_words_rule_states(row, summary, &text);
    sl_cell_text(cells, "rule_states", sl_text_string(&text));
    sl_text_release(&text);
}

/* A limit, and in words how the search for it ended. */
void sl_cells_limits(struct sl_cells *cells, const struct sl_pump_row *row)
{
    static const struct {
        const char *name, *end;
        enum sl_quantity quantity;
    } limits[SL_LIMIT_COUNT] = {
        [SL_LIMIT_LEVEL] = {"limit_lowest_level", "limit_lowest_level_end",
                            SL_LENGTH},
        [SL_LIMIT_TEMPERATURE] = {"limit_warmest_water",
                                  "limit_warmest_water_end", SL_TEMPERATURE},
        [SL_LIMIT_FLOW] = {"limit_largest_flow", "limit_largest_flow_end",
                           SL_FLOW},
    };

    for (int id = 0; id < SL_LIMIT_COUNT; id++) {
        const struct sl_limit *limit = &row->limits[id];

        sl_cell_number(cells, limits[id].name, limits[id].quantity,
                       sl_limit_value(limit));
        sl_cell_text(cells, limits[id].end, sl_words_limit_end(limit->end));
    }
}
