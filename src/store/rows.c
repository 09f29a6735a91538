/* Reading an evaluation back as rows of the ranked outputs.
 *
 * The order is that of the queries.  Stations and pumps are wide: the order
 * of the stations is read narrow, and each is then read by its key, so that
 * nothing wide is ever sorted. */
#include <math.h>
#include <string.h>

#include "base/text.h"
#include "store/cases.h"
#include "store/evaluation.h"
#include "store/running_sets.h"
#include "store/statement.h"

/* The value whose name is `word`; the last value when there is no word, as
 * for a station without a pump. */
static int named(const char *word, const char *(*name)(int), int last)
{
    int value = 0;

    while (value < last && !sl_same(word, name(value)))
        value++;
    return value;
}

static const char *state_word(int value)
{
    return sl_state_name((enum sl_state)value);
}

static const char *flow_basis_word(int value)
{
    return sl_flow_basis_name((enum sl_flow_basis)value);
}

static const char *source_basis_word(int value)
{
    return sl_source_basis_name((enum sl_source_basis)value);
}

static const char *input_word(int value)
{
    return sl_input_column((enum sl_input_id)value);
}

static const char *provenance_word(int value)
{
    return sl_provenance_name((enum sl_provenance)value);
}

static enum sl_state read_state(struct sl_statement *row, const char *name)
{
    const char *word = sl_read_text(row, name);

    return *word ? (enum sl_state)named(word, state_word, SL_CLEAR)
                 : SL_UNPROVEN;
}

static int read_word(struct sl_statement *row, const char *name,
                     enum sl_vocabulary vocabulary)
{
    struct sl_vocabularies fixed = sl_fixed_vocabularies();
    const char *word = sl_read_text(row, name);

    return sl_word_find(&fixed.of[vocabulary], word, strlen(word));
}

/* What the rows of a pump and of a station's worst pump have in common. */
static void read_pump(struct sl_statement *row, struct sl_pump_row *pump)
{
    pump->station_id = sl_read_text(row, "station_id");
    pump->station_name = sl_read_text(row, "station_name");
    pump->pump_id = sl_read_text(row, "pump_id");
    pump->condition = sl_read_text(row, "condition");
    pump->service = read_word(row, "service", SL_WORDS_SERVICE);
    pump->installation = read_word(row, "installation", SL_WORDS_INSTALLATION);
    pump->make_up = read_word(row, "make_up", SL_WORDS_MAKE_UP);
    pump->state = read_state(row, "state");
    pump->likely = read_state(row, "likely");
    pump->reason = sl_read_text(row, "reason");
    pump->flow_basis = (enum sl_flow_basis)named(
        sl_read_text(row, "flow_basis"), flow_basis_word, SL_FLOW_NONE);
    pump->source_basis =
        (enum sl_source_basis)named(sl_read_text(row, "source_basis"),
                                    source_basis_word, SL_SOURCE_UNKNOWN);
    pump->off_curve = sl_read_whole(row, "off_curve") != 0;
    pump->stands = sl_read_whole(row, "stands") != 0;
    sl_read_sets(row, pump);
    sl_read_cases(row, pump->cases);
    pump->altitude = sl_read_number(row, "altitude");
    pump->temperature = sl_read_number(row, "temperature");
    pump->recorded = (int)sl_read_whole(row, "recorded");
    pump->derived = (int)sl_read_whole(row, "derived");
    pump->assumed = (int)sl_read_whole(row, "assumed");
    pump->unknown = (int)sl_read_whole(row, "unknown");
    pump->leading_unknown = sl_read_null(row, "leading_unknown")
                                ? NULL
                                : sl_read_text(row, "leading_unknown");
}

static void read_station(struct sl_statement *row,
                         struct sl_station_row *station)
{
    read_pump(row, &station->worst);
    if (!*station->worst.pump_id)
        station->worst.reason = "no pump of it was kept";
    station->state = read_state(row, "station_state");
    if (station->state == SL_UNPROVEN && station->worst.state == SL_CLEAR) {
        station->worst.state = SL_UNPROVEN;
        station->worst.reason = "a pump of it was rejected and could not be "
                                "judged";
    }
    station->people_served = sl_read_number(row, "people_served");
    station->latitude = sl_read_number(row, "latitude");
    station->longitude = sl_read_number(row, "longitude");
    station->pumps = (int)sl_read_whole(row, "pumps");
    station->pumps_rejected = (int)sl_read_whole(row, "pumps_rejected");
    station->pumps_by_state[SL_SHORT] = (int)sl_read_whole(row, "pumps_short");
    station->pumps_by_state[SL_THIN] = (int)sl_read_whole(row, "pumps_thin");
    station->pumps_by_state[SL_UNPROVEN] =
        (int)sl_read_whole(row, "pumps_unproven");
    station->pumps_by_state[SL_CLEAR] = (int)sl_read_whole(row, "pumps_clear");
    station->any_beside = sl_read_whole(row, "any_beside") != 0;
    station->line = (long)sl_read_whole(row, "line");
}

struct sl_visit {
    struct sl_store *store;
    long long evaluation;
    enum sl_status (*station)(void *, const struct sl_station_row *,
                              struct sl_error *);
    enum sl_status (*pump)(void *, const struct sl_pump_row *,
                           struct sl_error *);
    void *context;
    struct sl_error *error;
};

static enum sl_status visit_station(const struct sl_visit *visit, long long key,
                                    long rank)
{
    struct sl_statement *statement = NULL;
    struct sl_station_row station = {.rank = rank};
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(visit->store, SL_QUERY_STATION_ROW, "evaluation",
                             visit->evaluation, &statement, visit->error);

    if (status)
        return status;
    sl_bind_whole(statement, "station", key);
    status = sl_statement_step(statement, &row, visit->error);
    if (status || !row)
        return status;
    read_station(statement, &station);
    status = sl_statement_check(statement, visit->error);
    if (!status)
        status = visit->station(visit->context, &station, visit->error);
    return sl_statement_leave(statement, status);
}

static enum sl_status visit_pumps(const struct sl_visit *visit, long long key,
                                  long rank)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(visit->store, SL_QUERY_PUMP_ROWS, "evaluation",
                             visit->evaluation, &statement, visit->error);

    (void)rank;
    if (status)
        return status;
    sl_bind_whole(statement, "station", key);
    while (!(status = sl_statement_step(statement, &row, visit->error)) &&
           row) {
        struct sl_pump_row pump = {.station_id = NULL};

        read_pump(statement, &pump);
        status = sl_statement_check(statement, visit->error);
        if (!status)
            status = visit->pump(visit->context, &pump, visit->error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}

static enum sl_status in_station_order(
    const struct sl_visit *visit,
    enum sl_status (*act)(const struct sl_visit *, long long, long))
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(visit->store, SL_QUERY_STATION_ORDER, "evaluation",
                             visit->evaluation, &statement, visit->error);

    if (status)
        return status;
    while (!(status = sl_statement_step(statement, &row, visit->error)) &&
           row) {
        long long key = sl_read_whole(statement, "station");
        long rank = (long)sl_read_whole(statement, "rank");

        status = act(visit, key, rank);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}

enum sl_status sl_store_each_station(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_station_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_visit visit = {store, evaluation, each, NULL, context, error};

    return in_station_order(&visit, visit_station);
}

enum sl_status sl_store_each_pump(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_pump_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_visit visit = {store, evaluation, NULL, each, context, error};

    return in_station_order(&visit, visit_pumps);
}

static struct sl_interval read_interval(struct sl_statement *row)
{
    return (struct sl_interval){sl_read_number(row, "typical"),
                                sl_read_number(row, "adverse"),
                                sl_read_number(row, "favourable")};
}

static void read_unknown(struct sl_statement *row,
                         struct sl_unknown_row *unknown)
{
    unknown->rank++;
    unknown->station_id = sl_read_text(row, "station_id");
    unknown->station_name = sl_read_text(row, "station_name");
    unknown->pump_id = sl_read_text(row, "pump_id");
    unknown->condition = sl_read_text(row, "condition");
    unknown->likely = read_state(row, "likely");
    unknown->input = (enum sl_input_id)named(sl_read_text(row, "input"),
                                             input_word, SL_INPUT_COUNT - 1);
    unknown->provenance = (enum sl_provenance)named(
        sl_read_text(row, "provenance"), provenance_word, SL_ASSUMED);
    unknown->value = read_interval(row);
    unknown->swing = sl_read_number(row, "swing");
    unknown->settles = sl_read_whole(row, "settles") != 0;
    unknown->people_served = sl_read_number(row, "people_served");
    unknown->what = sl_read_text(row, "what");
}

enum sl_status sl_store_each_unknown(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_unknown_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    struct sl_unknown_row unknown = {.rank = 0};
    bool row = false;
    enum sl_status status =
        sl_statement_use_for(store, SL_QUERY_UNKNOWN_ROWS, "evaluation",
                             evaluation, &statement, error);

    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        read_unknown(statement, &unknown);
        status = sl_statement_check(statement, error);
        if (!status)
            status = each(context, &unknown, error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}

enum sl_status sl_store_each_default(
    struct sl_store *store, long long evaluation,
    enum sl_status (*each)(void *context, const struct sl_default_row *row,
                           struct sl_error *error),
    void *context, struct sl_error *error)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status = sl_store_write_uses(store, error);

    if (!status)
        status =
            sl_statement_use_for(store, SL_QUERY_DEFAULT_ROWS, "evaluation",
                                 evaluation, &statement, error);
    while (!status && !(status = sl_statement_step(statement, &row, error)) &&
           row) {
        struct sl_default_row value = {.uses = 0};

        value.row.field = sl_read_text(statement, "field");
        value.row.circumstance = sl_read_text(statement, "circumstance");
        value.row.value = read_interval(statement);
        value.row.quantity =
            sl_quantity_named(sl_read_text(statement, "quantity"));
        value.row.source = sl_read_text(statement, "source");
        value.row.trust = sl_read_text(statement, "trust")[0];
        value.uses = sl_read_whole(statement, "uses");
        status = sl_statement_check(statement, error);
        if (!status)
            status = each(context, &value, error);
        if (status)
            return sl_statement_leave(statement, status);
    }
    return status;
}
