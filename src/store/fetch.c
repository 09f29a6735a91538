/* Reading a station back with all that hangs on it. */
#include <math.h>
#include <string.h>

#include "base/text.h"
#include "model/fields.h"
#include "store/missed.h"
#include "store/statement.h"
#include "store/vintage.h"

struct sl_fetching {
    struct sl_store *store;
    long long vintage;
    struct sl_arena *arena;
    struct sl_dossier *dossier;
    struct sl_error *error;
};

static enum sl_status fetch_word(const struct sl_fetching *fetching,
                                 const struct sl_field *field,
                                 struct sl_statement *statement, int *word)
{
    const char *text = sl_read_text(statement, field->name);

    if (!*text)
        return SL_OK;
    if (!fetching->store->vocabularies)
        return sl_error_set(fetching->error, SL_BUG,
                            "a record was read before the tables were");
    *word = sl_word_find(&fetching->store->vocabularies->of[field->vocabulary],
                         text, strlen(text));
    if (!*word)
        return sl_error_set(fetching->error, SL_STORE,
                            "the store \"%s\" has \"%s\" as %s, a word this "
                            "program does not know",
                            fetching->store->path, text, field->name);
    return SL_OK;
}

static enum sl_status fetch_field(const struct sl_fetching *fetching,
                                  const struct sl_field *field,
                                  struct sl_statement *statement, void *record)
{
    struct sl_number *number = NULL;

    switch (field->type) {
    case SL_FIELD_TEXT:
        *sl_field_text(field, record) =
            sl_read_copy(statement, field->name, fetching->arena);
        break;
    case SL_FIELD_NUMBER:
    case SL_FIELD_WHOLE:
        number = sl_field_number(field, record);
        number->value = sl_read_number(statement, field->name);
        number->known = !isnan(number->value);
        if (!number->known)
            number->value = 0;
        break;
    case SL_FIELD_WORD:
        return fetch_word(fetching, field, statement,
                          sl_field_word(field, record));
    }
    return SL_OK;
}

static enum sl_status fetch_grades(const struct sl_fetching *fetching,
                                   const struct sl_record_kind *kind,
                                   long long key, void *record)
{
    struct sl_statement *statement = NULL;
    bool row = false;
    enum sl_status status =
        sl_statement_use(fetching->store, SL_QUERY_GRADES_OF_RECORD, &statement,
                         fetching->error);

    if (status)
        return status;
    sl_bind_text(statement, "of_table", kind->table);
    sl_bind_whole(statement, "record", key);
    while (!(status = sl_statement_step(statement, &row, fetching->error)) &&
           row) {
        const char *name = sl_read_text(statement, "field");
        const struct sl_field *field =
            sl_field_by_name(kind, name, strlen(name));

        if (field &&
            (field->type == SL_FIELD_NUMBER || field->type == SL_FIELD_WHOLE))
            sl_field_number(field, record)->grade =
                sl_read_text(statement, "grade")[0];
    }
    return status;
}

/* The row a statement stands on, into a record of this kind; `key_column`
 * is its table's key. */
static enum sl_status fetch_record(const struct sl_fetching *fetching,
                                   enum sl_kind of, const char *key_column,
                                   struct sl_statement *statement, void *record)
{
    const struct sl_record_kind *kind = sl_record_kind(of);
    long *line = record; /* every kind's struct begins with it */
    long long key = sl_read_whole(statement, key_column);

    *line = (long)sl_read_whole(statement, "line");
    for (size_t i = 0; i < kind->field_count; i++) {
        enum sl_status status =
            fetch_field(fetching, &kind->fields[i], statement, record);

        if (status)
            return status;
    }
    return fetching->store->graded ? fetch_grades(fetching, kind, key, record)
                                   : SL_OK;
}

/* All rows of a bound statement as an array of items of `size` bytes, each
 * beginning with its record. */
static enum sl_status fetch_all(const struct sl_fetching *fetching,
                                enum sl_kind of, const char *key_column,
                                struct sl_statement *statement, size_t size,
                                void **items, size_t *count)
{
    size_t capacity = 0;
    char *grown = NULL;
    bool row = false;
    enum sl_status status = SL_OK;

    *items = NULL;
    *count = 0;
    while (!(status = sl_statement_step(statement, &row, fetching->error)) &&
           row) {
        if (*count == capacity) {
            capacity = capacity ? 2 * capacity : 4;
            grown = sl_arena_new(fetching->arena, capacity, size);
            if (*count)
                memcpy(grown, *items, *count * size);
            *items = grown;
        }
        status = fetch_record(fetching, of, key_column, statement,
                              grown + *count * size);
        if (status)
            return status;
        ++*count;
    }
    return status;
}

static enum sl_status fetch_of_station(const struct sl_fetching *fetching,
                                       enum sl_query query, enum sl_kind of,
                                       const char *key_column, size_t size,
                                       void **items, size_t *count)
{
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(fetching->store, query, &statement, fetching->error);

    if (status)
        return status;
    sl_bind_whole(statement, "station", fetching->dossier->station);
    return fetch_all(fetching, of, key_column, statement, size, items, count);
}

/* Pipes are in order of their key. */
static struct sl_dossier_pipe *find_pipe(const struct sl_dossier *dossier,
                                         const char *pipe_id)
{
    size_t low = 0, high = dossier->pipe_count;

    while (pipe_id && low < high) {
        size_t middle = low + (high - low) / 2;
        int order = strcmp(dossier->pipes[middle].record.pipe_id, pipe_id);

        if (order == 0)
            return &dossier->pipes[middle];
        if (order < 0)
            low = middle + 1;
        else
            high = middle;
    }
    return NULL;
}

/* Only a file changed by other means is so: an import takes back what leads
 * nowhere or round in a loop. */
static enum sl_status changed(const struct sl_fetching *fetching,
                              const char *what, const char *id)
{
    return sl_error_set(fetching->error, SL_STORE,
                        "the store \"%s\" was changed by other means: %s "
                        "\"%s\"; import the inventory into a new store",
                        fetching->store->path, what, id);
}

/* Each pipe is walked up once, so that a long chain costs no more: `walks`
 * says by which walk, and only the walk under way can meet itself. */
static enum sl_status check_no_loop(const struct sl_fetching *fetching)
{
    const struct sl_dossier *dossier = fetching->dossier;
    const struct sl_dossier_pipe *first = dossier->pipes;
    size_t *walks =
        sl_arena_new(fetching->arena, dossier->pipe_count, sizeof *walks);

    for (size_t walk = 1; walk <= dossier->pipe_count; walk++) {
        const struct sl_dossier_pipe *pipe = &first[walk - 1];

        for (; pipe && !walks[pipe - first]; pipe = pipe->draws_from)
            walks[pipe - first] = walk;
        if (pipe && walks[pipe - first] == walk)
            return changed(fetching, "a loop of pipes leads through",
                           pipe->record.pipe_id);
    }
    return SL_OK;
}

static enum sl_status link_pipes(const struct sl_fetching *fetching)
{
    struct sl_dossier *dossier = fetching->dossier;

    for (size_t i = 0; i < dossier->pipe_count; i++) {
        struct sl_dossier_pipe *pipe = &dossier->pipes[i];

        pipe->draws_from = find_pipe(dossier, pipe->record.draws_from);
        if (pipe->record.draws_from && !pipe->draws_from)
            return changed(fetching, "no pipe of the station is draws_from",
                           pipe->record.draws_from);
    }
    return check_no_loop(fetching);
}

static enum sl_status fetch_pipes(const struct sl_fetching *fetching)
{
    struct sl_dossier *dossier = fetching->dossier;
    void *items = NULL;
    struct sl_fitting *fittings = NULL;
    size_t count = 0;
    enum sl_status status = fetch_of_station(
        fetching, SL_QUERY_PIPES_OF_STATION, SL_KIND_PIPE, "pipe",
        sizeof *dossier->pipes, &items, &dossier->pipe_count);

    dossier->pipes = items;
    if (status || !dossier->pipe_count)
        return status;
    status = link_pipes(fetching);
    for (size_t i = 0; !status && i < dossier->pipe_count; i++) {
        struct sl_dossier_pipe *pipe = &dossier->pipes[i];

        status = sl_count_rejected(fetching->store, fetching->vintage,
                                   SL_KIND_FITTING, pipe->record.pipe_id,
                                   &pipe->rejected_fittings, fetching->error);
    }
    if (status)
        return status;
    status = fetch_of_station(fetching, SL_QUERY_FITTINGS_OF_STATION,
                              SL_KIND_FITTING, "suction_fitting",
                              sizeof *fittings, &items, &count);
    fittings = items;
    for (size_t i = 0; !status && i < count; i++) {
        struct sl_dossier_pipe *pipe = find_pipe(dossier, fittings[i].pipe_id);

        if (!pipe)
            return changed(fetching, "no pipe of the station is pipe_id",
                           fittings[i].pipe_id);
        if (!pipe->fitting_count)
            pipe->fittings = &fittings[i];
        pipe->fitting_count++;
    }
    return status;
}

/* A curve that another pump of the station runs on is the same one. */
static const struct sl_curve *
curve_read_before(const struct sl_dossier *dossier, size_t before,
                  const char *curve_id)
{
    for (size_t i = 0; i < before; i++)
        if (dossier->pumps[i].curve &&
            sl_same(dossier->pumps[i].curve->curve_id, curve_id))
            return dossier->pumps[i].curve;
    return NULL;
}

static enum sl_status fetch_curve(const struct sl_fetching *fetching,
                                  struct sl_dossier_pump *pump)
{
    struct sl_statement *statement = NULL;
    struct sl_curve *curve = NULL;
    void *items = NULL;
    enum sl_status status = sl_statement_use(
        fetching->store, SL_QUERY_POINTS_OF_CURVE, &statement, fetching->error);

    if (status)
        return status;
    curve = sl_arena_new(fetching->arena, 1, sizeof *curve);
    curve->curve_id = pump->record.curve_id;
    sl_bind_whole(statement, "vintage", fetching->vintage);
    sl_bind_text(statement, "curve_id", curve->curve_id);
    status = fetch_all(fetching, SL_KIND_CURVE, "point", statement,
                       sizeof *curve->points, &items, &curve->point_count);
    curve->points = items;
    pump->curve = curve;
    if (!status)
        status = sl_count_rejected(fetching->store, fetching->vintage,
                                   SL_KIND_CURVE, curve->curve_id,
                                   &curve->rejected_points, fetching->error);
    return status;
}

static enum sl_status fetch_pumps(const struct sl_fetching *fetching)
{
    struct sl_dossier *dossier = fetching->dossier;
    void *items = NULL;
    enum sl_status status = fetch_of_station(
        fetching, SL_QUERY_PUMPS_OF_STATION, SL_KIND_PUMP, "pump",
        sizeof *dossier->pumps, &items, &dossier->pump_count);

    dossier->pumps = items;
    for (size_t i = 0; !status && i < dossier->pump_count; i++) {
        struct sl_dossier_pump *pump = &dossier->pumps[i];

        pump->suction = find_pipe(dossier, pump->record.suction_pipe_id);
        if (pump->record.suction_pipe_id && !pump->suction)
            return changed(fetching,
                           "no pipe of the station is suction_pipe_id",
                           pump->record.suction_pipe_id);
        if (!pump->record.curve_id)
            continue;
        pump->curve = curve_read_before(dossier, i, pump->record.curve_id);
        if (!pump->curve)
            status = fetch_curve(fetching, pump);
    }
    return status;
}

/* The station a bound statement gives, and the rest of its dossier. */
static enum sl_status fetch_dossier(const struct sl_fetching *fetching,
                                    struct sl_statement *statement, bool *found)
{
    struct sl_dossier *dossier = fetching->dossier;
    enum sl_status status =
        sl_learn_traits(fetching->store, fetching->vintage, fetching->error);

    *dossier = (struct sl_dossier){.station = 0};
    if (!status)
        status = sl_statement_step(statement, found, fetching->error);
    if (status || !*found)
        return status;
    dossier->station = sl_read_whole(statement, "station");
    status = fetch_record(fetching, SL_KIND_STATION, "station", statement,
                          &dossier->record);
    if (!status)
        status = sl_statement_end(statement, fetching->error);
    if (!status)
        status = sl_count_rejected_pumps(
            fetching->store, fetching->vintage, dossier->record.station_id,
            &dossier->rejected_pumps, fetching->error);
    if (!status)
        status = fetch_pipes(fetching);
    if (!status)
        status = fetch_pumps(fetching);
    return status;
}

enum sl_status sl_store_next_dossier(struct sl_store *store, long long vintage,
                                     const char *after, struct sl_arena *arena,
                                     struct sl_dossier *dossier, bool *found,
                                     struct sl_error *error)
{
    struct sl_fetching fetching = {store, vintage, arena, dossier, error};
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_NEXT_STATION, &statement, error);

    *found = false;
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "after", after);
    return fetch_dossier(&fetching, statement, found);
}

enum sl_status sl_store_dossier_of_pump(struct sl_store *store,
                                        long long vintage, const char *pump_id,
                                        struct sl_arena *arena,
                                        struct sl_dossier *dossier, bool *found,
                                        struct sl_error *error)
{
    struct sl_fetching fetching = {store, vintage, arena, dossier, error};
    struct sl_statement *statement = NULL;
    enum sl_status status =
        sl_statement_use(store, SL_QUERY_STATION_OF_PUMP, &statement, error);

    *found = false;
    if (status)
        return status;
    sl_bind_whole(statement, "vintage", vintage);
    sl_bind_text(statement, "pump_id", pump_id);
    return fetch_dossier(&fetching, statement, found);
}
