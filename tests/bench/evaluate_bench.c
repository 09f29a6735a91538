/* evaluate_bench STORE YEAR ROUNDS: the processor time of evaluating every
 * station of a store's newest vintage, without reading and storing.  Prints
 * "pumps-under-a-condition seconds" of one round. */
#define _POSIX_C_SOURCE 200809L /* clock_gettime, strtol on its argument */
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

#include "evaluator/station.h"
#include "store/store.h"
#include "store/vintage.h"

struct bench {
    struct sl_store *store;
    struct sl_arena arena;
    struct sl_tables tables;
    struct sl_vintage vintage;
    struct sl_dossier *dossiers;
    size_t count, room;
};

static enum sl_status read_dossiers(struct bench *bench,
                                    struct sl_error *error)
{
    const char *after = "";
    enum sl_status status = SL_OK;
    bool found = true;

    while (!status && found) {
        bench->dossiers =
            sl_grow(bench->dossiers, &bench->room, bench->count + 1,
                    sizeof *bench->dossiers);
        status = sl_store_next_dossier(
            bench->store, bench->vintage.vintage, after, &bench->arena,
            &bench->dossiers[bench->count], &found, error);
        if (!status && found)
            after = bench->dossiers[bench->count++].record.station_id;
    }
    return status;
}

static double seconds(void)
{
    struct timespec now;

    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &now);
    return (double)now.tv_sec + 1e-9 * (double)now.tv_nsec;
}

static size_t evaluate_all(const struct bench *bench, struct sl_arena *arena)
{
    struct sl_settings settings = {.rule = &bench->tables.rules[0]};
    size_t pumps = 0;

    for (size_t i = 0; i < bench->count; i++) {
        struct sl_station_result result;

        sl_arena_reset(arena);
        sl_evaluate_station(&bench->dossiers[i], &bench->tables, &settings,
                            arena, &result);
        for (size_t c = 0; c < result.condition_count; c++)
            pumps += result.conditions[c].pump_count;
    }
    return pumps;
}

static enum sl_status begin(struct bench *bench, const char *path, int year,
                            struct sl_error *error)
{
    bool found = false;
    enum sl_status status =
        sl_store_open(path, SL_STORE_READ, &bench->store, error);

    if (!status)
        status = sl_store_find_vintage(bench->store, NULL, &bench->arena,
                                       &bench->vintage, &found, error);
    if (!status && !found)
        status = sl_error_set(error, SL_REFUSED, "no inventory in %s", path);
    if (!status)
        status = sl_store_read_tables(bench->store, bench->vintage.vintage,
                                      &bench->arena, &bench->tables, error);
    bench->tables.year = year;
    return status ? status : read_dossiers(bench, error);
}

int main(int count, char **arguments)
{
    struct bench bench = {0};
    struct sl_arena arena = {0};
    struct sl_error error = {0};
    long rounds;
    size_t pumps = 0;
    double start;

    if (count != 4) {
        fputs("evaluate_bench STORE YEAR ROUNDS\n", stderr);
        return 2;
    }
    rounds = strtol(arguments[3], NULL, 10);
    if (begin(&bench, arguments[1], (int)strtol(arguments[2], NULL, 10),
              &error)) {
        fprintf(stderr, "evaluate_bench: %s\n", error.message);
        return 1;
    }
    start = seconds();
    for (long i = 0; i < rounds; i++)
        pumps = evaluate_all(&bench, &arena);
    printf("%zu %.9f\n", pumps, (seconds() - start) / (double)rounds);
    sl_arena_release(&arena);
    sl_arena_release(&bench.arena);
    free(bench.dossiers);
    sl_store_close(bench.store);
    return 0;
}
