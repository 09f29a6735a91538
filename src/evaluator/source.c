/* The source side of a plan: the air, the liquid's surface or the main's
 * gauge, the datum, the water. */
#include <math.h>

#include "evaluator/plan.h"
#include "hydraulics/atmosphere.h"

/* Lowest dry land on Earth, m: no site's air is heavier (common geographic
 * fact, the Dead Sea shore). */
#define LOWEST_LAND (-430.0)

static const char *service_word(const struct sl_plan *plan)
{
    return sl_word(&plan->tables->vocabularies.of[SL_WORDS_SERVICE],
                   plan->dossier->record.service);
}

/* A level but no gauge pressure on record speaks of a free surface, where
 * closed tanks are not met: pits, intakes and vented clear wells. */
static bool open_by_records(const struct sl_station *station)
{
    bool level = station->cut_out_level.known ||
                 station->record_low_level.known || station->normal_level.known;
    bool gauge = station->source_pressure_low.known ||
                 station->source_pressure_normal.known;

    return level && !gauge && station->service != 0 &&
           station->service != SL_INDUSTRIAL;
}

static void source_kind(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    struct sl_input *input;

    if (station->source_kind) {
        plan->source_kind = (enum sl_source_kind)station->source_kind;
        input = sl_plan_set(plan, SL_IN_SOURCE_KIND, SL_RECORDED,
                            sl_exactly(station->source_kind), "");
        input->line = station->line;
    } else if (station->installation == SL_ON_MAIN) {
        plan->source_kind = SL_MAIN;
        sl_plan_set(plan, SL_IN_SOURCE_KIND, SL_DERIVED, sl_exactly(SL_MAIN),
                    "the station stands on a main");
    } else if (station->installation == SL_WET_PIT) {
        plan->source_kind = SL_OPEN;
        sl_plan_set(plan, SL_IN_SOURCE_KIND, SL_DERIVED, sl_exactly(SL_OPEN),
                    "a wet pit is open to the air");
    } else if (open_by_records(station)) {
        plan->source_kind = SL_OPEN;
        sl_plan_set(plan, SL_IN_SOURCE_KIND, SL_DERIVED, sl_exactly(SL_OPEN),
                    "a level and no gauge pressure are recorded: open to "
                    "the air");
    } else {
        plan->source_kind = SL_OPEN;
        sl_plan_set(plan, SL_IN_SOURCE_KIND, SL_UNKNOWN,
                    (struct sl_interval){SL_OPEN, NAN, NAN},
                    "not recorded; an open surface is likely");
    }
}

/* Gauge pressure of a tank or main; the other one recorded bounds it. */
static void pressure(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_number *low = &station->source_pressure_low;
    const struct sl_number *normal = &station->source_pressure_normal;
    bool want_low = plan->condition->pressure == SL_LEVEL_LOW;

    sl_plan_low_or_normal(plan, SL_IN_SOURCE_PRESSURE, low, normal,
                          plan->condition->pressure,
                          "no source pressure is recorded");
    if (!low->known && !normal->known)
        plan->source_basis = SL_SOURCE_UNKNOWN;
    else if (low->known && (want_low || !normal->known))
        plan->source_basis = SL_SOURCE_PRESSURE_LOW;
    else
        plan->source_basis = SL_SOURCE_PRESSURE_NORMAL;
}

static void surface(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    enum sl_source_basis basis;

    if (plan->source_kind == SL_MAIN) {
        pressure(plan);
        sl_plan_record(plan, SL_IN_SOURCE_PRESSURE_ELEVATION,
                       &station->source_pressure_elevation, SL_KIND_STATION,
                       station->line, "not recorded");
        return;
    }
    sl_plan_source_level(plan);
    basis = plan->source_basis;
    if (plan->source_kind == SL_CLOSED)
        pressure(plan);
    plan->source_basis = basis;
}

/* Elevations share one datum, so a recorded level tells about where the
 * site lies; but an owner may keep levels on a local datum, so it bounds
 * nothing. */
static const struct sl_number *level_hint(const struct sl_station *station)
{
    const struct sl_number *hint = &station->normal_level;

    if (!hint->known)
        hint =
            sl_lower_level(&station->cut_out_level, &station->record_low_level);
    return hint->known ? hint : &station->source_pressure_elevation;
}

/* A low barometer read on the spot needs no elevation: the air is that of
 * the altitude where standard air is as thin. In a storm it is just that,
 * at other times no thinner. */
static void elevation_by_barometer(struct sl_plan *plan, double altitude)
{
    struct sl_interval value = {altitude, altitude, LOWEST_LAND};

    if (plan->condition->storm_barometer)
        value = sl_exactly(altitude);
    sl_plan_set(plan, SL_IN_SITE_ELEVATION, SL_DERIVED, value,
                "not recorded; standard air there is as thin as the recorded "
                "low barometer")
        ->line = plan->dossier->record.line;
}

static void site_elevation(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_number *hint = level_hint(station);
    double by_barometer =
        sl_standard_altitude(sl_recorded(&station->barometer_low));

    if (station->site_elevation.known)
        sl_plan_record(plan, SL_IN_SITE_ELEVATION, &station->site_elevation,
                       SL_KIND_STATION, station->line, "");
    else if (!isnan(by_barometer))
        elevation_by_barometer(plan, by_barometer);
    else
        sl_plan_set(plan, SL_IN_SITE_ELEVATION,
                    hint->known ? SL_DERIVED : SL_UNKNOWN,
                    (struct sl_interval){sl_recorded(hint), NAN, LOWEST_LAND},
                    hint->known ? "not recorded; a level stands in, if levels "
                                  "are heights above sea level"
                                : "not recorded");
}

/* How far the air pressure may lie below the standard one, as a part of it,
 * so that an unknown elevation needs no second allowance. */
static void barometer(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    const struct sl_number *low = &station->barometer_low;
    double standard;

    if (!plan->condition->storm_barometer)
        return;
    if (!low->known) {
        sl_plan_default(plan, SL_IN_BAROMETER, "barometer_fall", "");
        return;
    }
    if (!station->site_elevation.known)
        return; /* it is the air pressure itself: see site_elevation() */
    standard = sl_standard_atmosphere(station->site_elevation.value);
    sl_plan_set(plan, SL_IN_BAROMETER, SL_RECORDED,
                sl_exactly(1 - low->value / standard),
                "its fall, as a part of the standard pressure")
        ->line = station->line;
}

static void hold_within(struct sl_interval *value, double low, double high)
{
    double *ends[] = {&value->typical, &value->adverse, &value->favourable};

    for (size_t i = 0; i < sizeof ends / sizeof *ends; i++)
        if (!isnan(*ends[i]))
            *ends[i] = fmin(fmax(*ends[i], low), high);
}

static void recorded_temperature(struct sl_plan *plan)
{
    const struct sl_station *station = &plan->dossier->record;
    bool summer = plan->condition->summer_temperature;
    const struct sl_number *number =
        summer ? &station->water_temp_summer : &station->water_temp_normal;
    struct sl_input *input;

    if (number->known) {
        sl_plan_record(plan, SL_IN_TEMPERATURE, number, SL_KIND_STATION,
                       station->line, "");
        return;
    }
    input = sl_plan_default(plan, SL_IN_TEMPERATURE,
                            summer ? "water_temp_summer" : "water_temp_normal",
                            service_word(plan));
    /* The usual water is no warmer than the warmest of the year, and that
     * no colder than the usual. */
    if (!summer && station->water_temp_summer.known)
        hold_within(&input->value, -INFINITY, station->water_temp_summer.value);
    if (summer && station->water_temp_normal.known)
        hold_within(&input->value, station->water_temp_normal.value, INFINITY);
}

static void temperature(struct sl_plan *plan)
{
    recorded_temperature(plan);
    sl_plan_add(plan, SL_IN_TEMPERATURE, plan->condition->temperature_addition);
}

static void gas(struct sl_plan *plan)
{
    int service = plan->dossier->record.service;

    if (service == SL_WASTEWATER || service == 0)
        sl_plan_default(plan, SL_IN_GAS, "gas_allowance", service_word(plan));
}

void sl_plan_source(struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;
    struct sl_input *datum;

    source_kind(plan);
    surface(plan);
    site_elevation(plan);
    barometer(plan);
    temperature(plan);
    gas(plan);
    datum = sl_plan_record(plan, SL_IN_DATUM, &pump->datum_elevation,
                           SL_KIND_PUMP, pump->line, "not recorded");
    /* The eye of a wet-pit pump lies above the lip of its inlet. */
    if (!pump->datum_elevation.known && pump->inlet_elevation.known &&
        (pump->make_up == SL_VERTICAL_TURBINE ||
         pump->make_up == SL_SUBMERSIBLE)) {
        datum->value.favourable = pump->inlet_elevation.value;
        datum->rule = "not recorded; no lower than the inlet's lip";
    }
    if (plan->dossier->record.service == SL_SEAWATER) {
        const struct sl_default *row =
            sl_default_find(plan->tables, "salinity", "seawater");

        plan->salinity = row ? row->value.typical : NAN;
        plan->inputs[SL_IN_TEMPERATURE].other = row;
    }
}
