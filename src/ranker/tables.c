#include "ranker/tables.h"

#include "ranker/cells.h"
#include "ranker/set_cells.h"
#include "ranker/words.h"

/* A row that gives each table's head its shape: no value of it is written. */
static const struct sl_station_row no_station;
static const struct sl_unknown_row no_unknown;
static const struct sl_finding no_finding;

static struct sl_cells cells_of(const struct sl_table_writer *writer,
                                bool naming)
{
    return (struct sl_cells){writer->stream, writer->units, naming, false};
}

/* A sentence as a cell; the text is emptied and released. */
static void sentence(struct sl_cells *cells, const char *name,
                     struct sl_text *text)
{
    sl_cell_text(cells, name, sl_text_string(text));
    sl_text_release(text);
}

static void word(struct sl_cells *cells, const struct sl_table_writer *writer,
                 const char *name, enum sl_vocabulary vocabulary, int kept)
{
    sl_cell_text(cells, name,
                 sl_word(&writer->vocabularies->of[vocabulary], kept));
}

static void why(struct sl_cells *cells, const struct sl_pump_row *row)
{
    struct sl_text text = {0};

    if (!cells->naming)
        sl_words_why(row, cells->units, &text);
    sentence(cells, "why", &text);
}

static void next_step(struct sl_cells *cells, const struct sl_pump_row *row)
{
    struct sl_text text = {0};

    if (!cells->naming)
        sl_words_next_step(row, &text);
    sentence(cells, "next_step", &text);
}

static const char *block_name(enum sl_state state)
{
    if (state == SL_CLEAR)
        return "clear";
    return state == SL_UNPROVEN ? "find out first" : "at risk";
}

static const char *likely_name(enum sl_state likely)
{
    return likely == SL_UNPROVEN ? "unknown" : sl_state_name(likely);
}

static void bases(struct sl_cells *cells, const struct sl_pump_row *row)
{
    sl_cell_text(cells, "condition", row->condition);
    sl_cell_text(cells, "running_set", row->running_set);
    sl_cell_text(cells, "flow_basis", sl_flow_basis_name(row->flow_basis));
    sl_cell_text(cells, "source_basis",
                 sl_source_basis_name(row->source_basis));
}

static void provenance_counts(struct sl_cells *cells,
                              const struct sl_pump_row *row)
{
    sl_cell_count(cells, "inputs_recorded", row->recorded);
    sl_cell_count(cells, "inputs_derived", row->derived);
    sl_cell_count(cells, "inputs_assumed", row->assumed);
    sl_cell_count(cells, "inputs_unknown", row->unknown);
}

static void vintage(struct sl_cells *cells,
                    const struct sl_table_writer *writer)
{
    sl_cell_text(cells, "vintage", writer->summary->label);
    sl_cell_text(cells, "inventory_sha256", writer->summary->inventory_sha256);
}

static void station_identity(struct sl_cells *cells,
                             const struct sl_table_writer *writer,
                             const struct sl_station_row *row)
{
    sl_cell_count(cells, "rank", row->rank);
    sl_cell_text(cells, "block", block_name(row->state));
    sl_cell_text(cells, "state", sl_state_name(row->state));
    sl_cell_text(cells, "station_id", row->worst.station_id);
    sl_cell_text(cells, "name", row->worst.station_name);
    word(cells, writer, "service", SL_WORDS_SERVICE, row->worst.service);
    word(cells, writer, "installation", SL_WORDS_INSTALLATION,
         row->worst.installation);
    sl_cell_text(cells, "likely", likely_name(row->worst.likely));
}

static void station_heads(struct sl_cells *cells, const struct sl_pump_row *row)
{
    const struct sl_case *typical = &row->cases[SL_TYPICAL];

    sl_cell_number(cells, "shortfall", SL_LENGTH, -typical->surplus);
    sl_cell_number(cells, "margin", SL_LENGTH, typical->margin);
    sl_cell_number(cells, "margin_adverse", SL_LENGTH,
                   row->cases[SL_ADVERSE].margin);
    sl_cell_number(cells, "margin_favourable", SL_LENGTH,
                   row->cases[SL_FAVOURABLE].margin);
    sl_cell_number(cells, "npsha", SL_LENGTH, typical->terms.npsha);
    sl_cell_number(cells, "npshr", SL_LENGTH, typical->npshr);
    sl_cell_number(cells, "required", SL_LENGTH, typical->required);
    sl_cell_number(cells, "flow", SL_FLOW, typical->flow);
    sl_cell_text(cells, "flags", row->flags);
}

static void station_pumps(struct sl_cells *cells,
                          const struct sl_station_row *row)
{
    sl_cell_count(cells, "pumps", row->pumps);
    sl_cell_count(cells, "pumps_rejected", row->pumps_rejected);
    sl_cell_count(cells, "pumps_short", row->pumps_by_state[SL_SHORT]);
    sl_cell_count(cells, "pumps_thin", row->pumps_by_state[SL_THIN]);
    sl_cell_count(cells, "pumps_unproven", row->pumps_by_state[SL_UNPROVEN]);
    sl_cell_count(cells, "pumps_clear", row->pumps_by_state[SL_CLEAR]);
}

/* The name as it is given to --rule, its trust, the year pipes are aged to. */
static void judged_by(struct sl_cells *cells,
                      const struct sl_table_writer *writer)
{
    const struct sl_margin_rule *rule = &writer->summary->rule;

    sl_cell_text(cells, "margin_rule", rule->rule);
    sl_cell_text(cells, "margin_rule_trust", sl_words_trust(rule->trust));
    sl_cell_count(cells, "year", writer->summary->year);
}

static void station_line(const struct sl_table_writer *writer, bool naming,
                         const struct sl_station_row *row)
{
    struct sl_cells cells = cells_of(writer, naming);

    station_identity(&cells, writer, row);
    sl_cell_text(&cells, "pump_id", row->worst.pump_id);
    bases(&cells, &row->worst);
    station_heads(&cells, &row->worst);
    why(&cells, &row->worst);
    next_step(&cells, &row->worst);
    provenance_counts(&cells, &row->worst);
    sl_cell_decimal(&cells, "people_served", row->people_served, 0);
    station_pumps(&cells, row);
    sl_cell_decimal(&cells, "latitude", row->latitude, 6);
    sl_cell_decimal(&cells, "longitude", row->longitude, 6);
    sl_cell_count(&cells, "stations_csv_line", row->line);
    judged_by(&cells, writer);
    vintage(&cells, writer);
    sl_cells_end(&cells);
}

void sl_table_stations_head(const struct sl_table_writer *writer)
{
    station_line(writer, true, &no_station);
}

void sl_table_station(const struct sl_table_writer *writer,
                      const struct sl_station_row *row)
{
    station_line(writer, false, row);
}

static void pump_identity(struct sl_cells *cells,
                          const struct sl_table_writer *writer,
                          const struct sl_pump_row *row)
{
    sl_cell_text(cells, "station_id", row->station_id);
    sl_cell_text(cells, "station_name", row->station_name);
    sl_cell_text(cells, "pump_id", row->pump_id);
    word(cells, writer, "service", SL_WORDS_SERVICE, row->service);
    word(cells, writer, "installation", SL_WORDS_INSTALLATION,
         row->installation);
    word(cells, writer, "make_up", SL_WORDS_MAKE_UP, row->make_up);
    sl_cell_text(cells, "state", sl_state_name(row->state));
    sl_cell_text(cells, "likely", likely_name(row->likely));
    sl_cell_text(cells, "reason", row->reason);
    bases(cells, row);
    sl_cell_yes_no(cells, "off_curve", row->off_curve);
    sl_cell_yes_no(cells, "stands", row->stands);
}

static void pump_terms(struct sl_cells *cells, const struct sl_case *typical)
{
    const struct sl_terms *terms = &typical->terms;

    sl_cell_number(cells, "flow", SL_FLOW, typical->flow);
    sl_cell_number(cells, "atmosphere", SL_LENGTH, terms->atmosphere);
    sl_cell_number(cells, "barometer", SL_LENGTH, terms->barometer);
    sl_cell_number(cells, "gauge", SL_LENGTH, terms->gauge);
    sl_cell_number(cells, "elevation", SL_LENGTH, terms->elevation);
    sl_cell_number(cells, "velocity", SL_LENGTH, terms->velocity);
    sl_cell_number(cells, "friction", SL_LENGTH, terms->friction);
    sl_cell_number(cells, "minor", SL_LENGTH, terms->minor);
    sl_cell_number(cells, "vapour", SL_LENGTH, terms->vapour);
    sl_cell_number(cells, "gas", SL_LENGTH, terms->gas);
    sl_cell_number(cells, "npsha", SL_LENGTH, terms->npsha);
    sl_cell_number(cells, "npshr", SL_LENGTH, typical->npshr);
    sl_cell_number(cells, "required", SL_LENGTH, typical->required);
    sl_cell_number(cells, "margin", SL_LENGTH, typical->margin);
    sl_cell_number(cells, "surplus", SL_LENGTH, typical->surplus);
}

static void pump_adverse(struct sl_cells *cells, const struct sl_case *adverse)
{
    sl_cell_number(cells, "npsha_adverse", SL_LENGTH, adverse->terms.npsha);
    sl_cell_number(cells, "npshr_adverse", SL_LENGTH, adverse->npshr);
    sl_cell_number(cells, "margin_adverse", SL_LENGTH, adverse->margin);
    sl_cell_number(cells, "surplus_adverse", SL_LENGTH, adverse->surplus);
}

static void pump_favourable(struct sl_cells *cells, const struct sl_case *best)
{
    sl_cell_number(cells, "npsha_favourable", SL_LENGTH, best->terms.npsha);
    sl_cell_number(cells, "npshr_favourable", SL_LENGTH, best->npshr);
    sl_cell_number(cells, "margin_favourable", SL_LENGTH, best->margin);
    sl_cell_number(cells, "surplus_favourable", SL_LENGTH, best->surplus);
}

static void pump_line(const struct sl_table_writer *writer, bool naming,
                      const struct sl_pump_row *row)
{
    struct sl_cells cells = cells_of(writer, naming);

    pump_identity(&cells, writer, row);
    pump_terms(&cells, &row->cases[SL_TYPICAL]);
    pump_adverse(&cells, &row->cases[SL_ADVERSE]);
    pump_favourable(&cells, &row->cases[SL_FAVOURABLE]);
    sl_cells_npshr_basis(&cells, row);
    sl_cells_sets(&cells, row);
    sl_cells_rule_states(&cells, writer->summary, row);
    sl_cells_limits(&cells, row);
    sl_cell_number(&cells, "altitude", SL_LENGTH, row->altitude);
    sl_cell_number(&cells, "temperature", SL_TEMPERATURE, row->temperature);
    provenance_counts(&cells, row);
    sl_cell_text(&cells, "leading_unknown", row->leading_unknown);
    judged_by(&cells, writer);
    vintage(&cells, writer);
    sl_cells_end(&cells);
}

void sl_table_pumps_head(const struct sl_table_writer *writer)
{
    pump_line(writer, true, &no_station.worst);
}

void sl_table_pump(const struct sl_table_writer *writer,
                   const struct sl_pump_row *row)
{
    pump_line(writer, false, row);
}

/* The value's unit is the input's, so it has a column of its own. */
static void unknown_value(struct sl_cells *cells,
                          const struct sl_unknown_row *row)
{
    enum sl_quantity quantity = sl_input_quantity(row->input);

    sl_cell_text(cells, "unit", sl_unit_shown(quantity, cells->units)->label);
    sl_cell_value(cells, "typical", quantity, row->value.typical);
    sl_cell_value(cells, "adverse", quantity, row->value.adverse);
    sl_cell_value(cells, "favourable", quantity, row->value.favourable);
}

static void unknown_line(const struct sl_table_writer *writer, bool naming,
                         const struct sl_unknown_row *row)
{
    struct sl_cells cells = cells_of(writer, naming);

    sl_cell_count(&cells, "rank", row->rank);
    sl_cell_text(&cells, "station_id", row->station_id);
    sl_cell_text(&cells, "station_name", row->station_name);
    sl_cell_text(&cells, "pump_id", row->pump_id);
    sl_cell_text(&cells, "condition", row->condition);
    sl_cell_text(&cells, "likely", likely_name(row->likely));
    sl_cell_text(&cells, "find_out", sl_input_words(row->input));
    sl_cell_text(&cells, "column", sl_input_column(row->input));
    sl_cell_text(&cells, "provenance", sl_provenance_name(row->provenance));
    unknown_value(&cells, row);
    sl_cell_number(&cells, "swing", SL_LENGTH, row->swing);
    sl_cell_yes_no(&cells, "settles", row->settles);
    sl_cell_decimal(&cells, "people_served", row->people_served, 0);
    sl_cell_text(&cells, "rests_on", row->what);
    vintage(&cells, writer);
    sl_cells_end(&cells);
}

void sl_table_unknowns_head(const struct sl_table_writer *writer)
{
    unknown_line(writer, true, &no_unknown);
}

void sl_table_unknown(const struct sl_table_writer *writer,
                      const struct sl_unknown_row *row)
{
    unknown_line(writer, false, row);
}

static void finding_line(const struct sl_table_writer *writer, bool naming,
                         const struct sl_finding *finding)
{
    struct sl_cells cells = cells_of(writer, naming);

    sl_cell_text(&cells, "severity", sl_severity_name(finding->severity));
    sl_cell_text(&cells, "code", finding->code);
    sl_cell_text(&cells, "file", finding->file);
    if (naming || finding->line > 0)
        sl_cell_count(&cells, "line", finding->line);
    else
        sl_cell_text(&cells, "line", NULL);
    sl_cell_text(&cells, "column", finding->column);
    sl_cell_text(&cells, "record_id", finding->record_id);
    sl_cell_text(&cells, "value", finding->value);
    sl_cell_text(&cells, "reason", finding->reason);
    sl_cell_text(&cells, "remedy", finding->remedy);
    sl_cells_end(&cells);
}

void sl_table_findings_head(const struct sl_table_writer *writer)
{
    finding_line(writer, true, &no_finding);
}

void sl_table_finding(const struct sl_table_writer *writer,
                      const struct sl_finding *finding)
{
    finding_line(writer, false, finding);
}
