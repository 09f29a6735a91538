#include "importer/doubts.h"

#include "model/vocabulary.h"

static const struct sl_doubt record_low_over_cut_out = {
    "level-order", "record_low_level",
    "the lowest source level on record is above the cut-out level",
    "check both levels and their units"};
static const struct sl_doubt cut_out_over_normal = {
    "level-order", "cut_out_level",
    "the cut-out level is above the usual source level",
    "check both levels and their units"};
static const struct sl_doubt record_low_over_normal = {
    "level-order", "record_low_level",
    "the lowest source level on record is above the usual one",
    "check both levels and their units"};
static const struct sl_doubt retired_in_service = {
    "retired-in-service", "year_retired",
    "a year of retirement is given, but the station is in service",
    "write no in in_service, or leave the year empty"};
static const struct sl_doubt head_without_flow = {
    "head-without-flow", "rated_head",
    "a rated head is given without the rated flow it belongs to",
    "fill in the rated flow"};

#define AHEAD "the year is later than that of the import"
#define NO_AGE "check the year; until then its age is taken as not recorded"

static const struct sl_doubt retired_ahead = {"year-ahead", "year_retired",
                                              AHEAD, "check the year"};
static const struct sl_doubt discharge_ahead = {"year-ahead", "discharge_year",
                                                AHEAD, NO_AGE};
/* No age of a machine is used. */
static const struct sl_doubt machine_ahead = {"year-ahead", "year_installed",
                                              AHEAD, "check the year"};
static const struct sl_doubt laid_ahead = {"year-ahead", "year_installed",
                                           AHEAD, NO_AGE};

static bool is_ahead(struct sl_number of, int year)
{
    return of.known && of.value > year;
}

static bool above(struct sl_number a, struct sl_number b)
{
    return a.known && b.known && a.value > b.value;
}

static size_t station_doubts(const struct sl_station *station, int year,
                             struct sl_doubt *doubts)
{
    size_t count = 0;

    if (above(station->record_low_level, station->cut_out_level))
        doubts[count++] = record_low_over_cut_out;
    if (above(station->cut_out_level, station->normal_level))
        doubts[count++] = cut_out_over_normal;
    if (!station->cut_out_level.known &&
        above(station->record_low_level, station->normal_level))
        doubts[count++] = record_low_over_normal;
    if (station->year_retired.known && station->in_service != SL_NO)
        doubts[count++] = retired_in_service;
    if (is_ahead(station->year_retired, year))
        doubts[count++] = retired_ahead;
    if (is_ahead(station->discharge_year, year))
        doubts[count++] = discharge_ahead;
    return count;
}

static size_t pump_doubts(const struct sl_pump *pump, int year,
                          struct sl_doubt *doubts)
{
    size_t count = 0;

    if (pump->rated_head.known && !pump->rated_flow.known)
        doubts[count++] = head_without_flow;
    if (is_ahead(pump->year_installed, year))
        doubts[count++] = machine_ahead;
    return count;
}

static size_t pipe_doubts(const struct sl_pipe *pipe, int year,
                          struct sl_doubt *doubts)
{
    if (!is_ahead(pipe->year_installed, year))
        return 0;
    doubts[0] = laid_ahead;
    return 1;
}

size_t sl_doubts_find(enum sl_kind kind, const void *record, int year,
                      struct sl_doubt doubts[SL_DOUBTS_MOST])
{
    if (kind == SL_KIND_STATION)
        return station_doubts(record, year, doubts);
    if (kind == SL_KIND_PUMP)
        return pump_doubts(record, year, doubts);
    return kind == SL_KIND_PIPE ? pipe_doubts(record, year, doubts) : 0;
}
