/* Writing the result of one station. */
#include <math.h>
#include <stdlib.h>

#include "base/text.h"
#include "store/cases.h"
#include "store/evaluation.h"
#include "store/running_sets.h"
#include "store/statement.h"

static void count_use(struct sl_store *store, const struct sl_default *row)
{
    size_t i = 0;

    while (i < store->use_count && store->uses[i].row != row)
        i++;
    if (i == store->use_count) {
        store->uses = sl_grow(store->uses, &store->use_capacity, i + 1,
                              sizeof *store->uses);
        store->uses[i] = (struct sl_default_uses){row, 0};
        store->use_count++;
    }
    store->uses[i].uses++;
}

/* Where a result goes, and the keys of the station's pumps in the order of
 * the dossier. */
struct sl_filing {
    struct sl_store *store;
    long long evaluation;
    const struct sl_station_result *result;
    long long *pumps;
    struct sl_error *error;
};

static enum sl_status learn_pump_keys(const struct sl_filing *filing)
{
    const struct sl_dossier *dossier = filing->result->dossier;
    struct sl_statement *statement = NULL;
    size_t at = 0;
    bool row = false;
    enum sl_status status =
        sl_statement_use(filing->store, SL_QUERY_PUMP_KEYS_OF_STATION,
                         &statement, filing->error);

    if (status)
        return status;
    sl_bind_whole(statement, "station", dossier->station);
    while (!(status = sl_statement_step(statement, &row, filing->error)) &&
           row && at < dossier->pump_count) {
        filing->pumps[at] = sl_read_whole(statement, "pump");
        if (!sl_same(sl_read_text(statement, "pump_id"),
                     dossier->pumps[at].record.pump_id))
            break;
        at++;
    }
    if (!status && row)
        status = sl_statement_end(statement, filing->error);
    if (!status && (row || at < dossier->pump_count))
        status = sl_error_set(filing->error, SL_BUG,
                              "the result of station \"%s\" is not of the "
                              "pumps the store has for it",
                              dossier->record.station_id);
    return status;
}

/* Which pump under which condition a row is about. */
static void bind_place(const struct sl_filing *filing, const char *condition,
                       long long key, struct sl_statement *statement)
{
    sl_bind_whole(statement, "evaluation", filing->evaluation);
    sl_bind_whole(statement, "station", filing->result->dossier->station);
    sl_bind_whole(statement, "pump", key);
    sl_bind_text(statement, "condition", condition);
}

static void bind_inputs(struct sl_statement *statement,
                        const struct sl_pump_result *pump)
{
    const struct sl_input *site = &pump->inputs[SL_IN_SITE_ELEVATION];
    const struct sl_input *water = &pump->inputs[SL_IN_TEMPERATURE];

    sl_bind_number(statement, "altitude",
                   site->provenance ? site->value.typical : NAN);
    sl_bind_number(statement, "temperature",
                   water->provenance ? water->value.typical : NAN);
    sl_bind_whole(statement, "recorded", pump->counts[SL_RECORDED]);
    sl_bind_whole(statement, "derived", pump->counts[SL_DERIVED]);
    sl_bind_whole(statement, "assumed", pump->counts[SL_ASSUMED]);
    sl_bind_whole(statement, "unknown", pump->counts[SL_UNKNOWN]);
    sl_bind_text(statement, "leading_unknown",
                 pump->leading_unknown
                     ? sl_input_column(pump->leading_unknown->id)
                     : NULL);
}

static enum sl_status add_pump(const struct sl_filing *filing,
                               const char *condition, long long key,
                               const struct sl_pump_result *pump)
{
    struct sl_statement *statement = NULL;
    struct sl_sets_room room = {0};
    enum sl_status status = sl_statement_use(
        filing->store, SL_QUERY_ADD_PUMP_RESULT, &statement, filing->error);

    if (status)
        return status;
    bind_place(filing, condition, key, statement);
    sl_bind_text(statement, "state", sl_state_name(pump->state));
    sl_bind_text(statement, "likely", sl_state_name(pump->likely));
    sl_bind_text(statement, "reason", pump->reason ? pump->reason : "");
    sl_bind_text(statement, "flow_basis", sl_flow_basis_name(pump->flow_basis));
    sl_bind_text(statement, "source_basis",
                 sl_source_basis_name(pump->source_basis));
    sl_bind_whole(statement, "off_curve", pump->off_curve);
    sl_bind_whole(statement, "stands", pump->stands);
    sl_bind_cases(statement, pump->cases);
    bind_inputs(statement, pump);
    sl_bind_sets(statement, pump, &room);
    for (int i = 0; i < SL_INPUT_COUNT; i++) {
        if (pump->inputs[i].row)
            count_use(filing->store, pump->inputs[i].row);
        if (pump->inputs[i].other)
            count_use(filing->store, pump->inputs[i].other);
    }
    status = sl_statement_run(statement, filing->error);
    sl_sets_room_release(&room);
    return status;
}

static const char *what_it_rests_on(const struct sl_input *input)
{
    if (input->rule && *input->rule)
        return input->rule;
    return input->row ? input->row->source : "";
}

static enum sl_status add_unknown(const struct sl_filing *filing,
                                  const char *condition, long long key,
                                  const struct sl_input *input)
{
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(
        filing->store, SL_QUERY_ADD_UNKNOWN, &statement, filing->error);

    if (status)
        return status;
    bind_place(filing, condition, key, statement);
    sl_bind_text(statement, "input", sl_input_column(input->id));
    sl_bind_text(statement, "provenance",
                 sl_provenance_name(input->provenance));
    sl_bind_text(statement, "field", input->row ? input->row->field : NULL);
    sl_bind_text(statement, "circumstance",
                 input->row ? input->row->circumstance : NULL);
    sl_bind_number(statement, "typical", input->value.typical);
    sl_bind_number(statement, "adverse", input->value.adverse);
    sl_bind_number(statement, "favourable", input->value.favourable);
    sl_bind_number(statement, "swing", input->swing);
    sl_bind_whole(statement, "settles", input->settles);
    sl_bind_text(statement, "what", what_it_rests_on(input));
    return sl_statement_run(statement, filing->error);
}

/* A pump's state over all conditions: the worst of them. */
static enum sl_state state_over_all(const struct sl_station_result *result,
                                    size_t pump)
{
    enum sl_state worst = result->condition_count ? SL_CLEAR : SL_UNPROVEN;

    for (size_t i = 0; i < result->condition_count; i++)
        if (result->conditions[i].pumps[pump].state < worst)
            worst = result->conditions[i].pumps[pump].state;
    return worst;
}

/* What to find out about an unproven pump, under the last, harshest
 * condition it is unproven in. */
static enum sl_status add_unknowns(const struct sl_filing *filing, size_t pump)
{
    const struct sl_station_result *result = filing->result;
    const struct sl_condition_result *harshest = NULL;
    enum sl_status status = SL_OK;

    for (size_t i = 0; i < result->condition_count; i++)
        if (result->conditions[i].pumps[pump].state == SL_UNPROVEN)
            harshest = &result->conditions[i];
    for (int i = 0; harshest && !status && i < SL_INPUT_COUNT; i++) {
        const struct sl_input *input = &harshest->pumps[pump].inputs[i];

        if (input->open)
            status = add_unknown(filing, harshest->condition->condition,
                                 filing->pumps[pump], input);
    }
    return status;
}

static enum sl_status add_station(const struct sl_filing *filing,
                                  const long long counts[SL_STATE_COUNT])
{
    const struct sl_station_result *result = filing->result;
    struct sl_statement *statement = NULL;
    enum sl_status status = sl_statement_use(
        filing->store, SL_QUERY_ADD_STATION_RESULT, &statement, filing->error);

    if (status)
        return status;
    sl_bind_whole(statement, "evaluation", filing->evaluation);
    sl_bind_whole(statement, "station", result->dossier->station);
    sl_bind_text(statement, "state", sl_state_name(result->state));
    if (result->worst) {
        sl_bind_whole(
            statement, "worst_pump",
            filing->pumps[result->worst - result->worst_condition->pumps]);
        sl_bind_text(statement, "worst_condition",
                     result->worst_condition->condition->condition);
    }
    sl_bind_whole(statement, "pumps", (long long)result->dossier->pump_count);
    sl_bind_whole(statement, "pumps_rejected", result->dossier->rejected_pumps);
    sl_bind_whole(statement, "pumps_short", counts[SL_SHORT]);
    sl_bind_whole(statement, "pumps_thin", counts[SL_THIN]);
    sl_bind_whole(statement, "pumps_unproven", counts[SL_UNPROVEN]);
    sl_bind_whole(statement, "pumps_clear", counts[SL_CLEAR]);
    return sl_statement_run(statement, filing->error);
}

static enum sl_status add_pumps(const struct sl_filing *filing,
                                const struct sl_condition_result *condition)
{
    enum sl_status status = SL_OK;

    for (size_t i = 0; !status && i < condition->pump_count; i++)
        status = add_pump(filing, condition->condition->condition,
                          filing->pumps[i], &condition->pumps[i]);
    return status;
}

static enum sl_status add_all(const struct sl_filing *filing)
{
    const struct sl_station_result *result = filing->result;
    long long counts[SL_STATE_COUNT] = {0};
    enum sl_status status = learn_pump_keys(filing);

    for (size_t i = 0; !status && i < result->condition_count; i++)
        status = add_pumps(filing, &result->conditions[i]);
    for (size_t i = 0; !status && i < result->dossier->pump_count; i++) {
        enum sl_state state = state_over_all(result, i);

        counts[state]++;
        sl_count_rules(filing->store, result, i);
        if (state == SL_UNPROVEN)
            status = add_unknowns(filing, i);
    }
    return status ? status : add_station(filing, counts);
}

enum sl_status sl_store_add_result(struct sl_store *store, long long evaluation,
                                   const struct sl_station_result *result,
                                   struct sl_error *error)
{
    struct sl_filing filing = {store, evaluation, result, NULL, error};
    enum sl_status status = SL_OK;

    if (store->counted_evaluation != evaluation)
        status = sl_store_write_uses(store, error);
    store->counted_evaluation = evaluation;
    if (status)
        return status;
    filing.pumps = sl_new(result->dossier->pump_count, sizeof *filing.pumps);
    status = add_all(&filing);
    free(filing.pumps);
    return status;
}
