#include "model/fields.h"

#include <string.h>

/* Ranges are those no real station leaves: a value outside is a wrong unit
 * or a stand-in for "unknown", not a strange site.  Lowest land is -430 m;
 * no public water main passes 10 MPa or 15 m bore. */
/* clang-format off */
#define RANGE(low, high) low, high
#define ELEVATIONS RANGE(-450, 6000)
#define TEMPERATURES RANGE(271.15, 373.15)
#define YEARS RANGE(1800, 2200)
#define COUNTS RANGE(0, 1e9)

#define TEXT(record, member, required, meaning, left_out)                     \
    {#member, SL_FIELD_TEXT, SL_PURE, SL_WORDS_NONE, required, 0, 0,          \
     offsetof(struct record, member), meaning, left_out}
#define WORD(record, member, words, required, meaning, left_out)              \
    {#member, SL_FIELD_WORD, SL_PURE, words, required, 0, 0,                  \
     offsetof(struct record, member), meaning, left_out}
#define NUMBER(record, member, quantity, range, required, meaning, left_out)  \
    {#member, SL_FIELD_NUMBER, quantity, SL_WORDS_NONE, required, range,      \
     offsetof(struct record, member), meaning, left_out}
#define WHOLE(record, member, range, meaning, left_out)                       \
    {#member, SL_FIELD_WHOLE, SL_PURE, SL_WORDS_NONE, false, range,           \
     offsetof(struct record, member), meaning, left_out}
/* clang-format on */

static const struct sl_field station_fields[] = {
    TEXT(sl_station, station_id, true, "the owner's key of the station",
         "the record is rejected"),
    TEXT(sl_station, name, false, "what people call it",
         "the key is shown alone"),
    WORD(sl_station, service, SL_WORDS_SERVICE, false, "what it pumps",
         "temperature and gas allowance take the widest default"),
    WORD(sl_station, in_service, SL_WORDS_YES_NO, false,
         "no: out of scope, and its pumps and pipes with it",
         "taken to be in service"),
    WHOLE(sl_station, year_retired, YEARS,
          "the year it was taken out of service", "nothing"),
    NUMBER(sl_station, latitude, SL_PURE, RANGE(-90, 90), false,
           "degrees north, WGS 84", "the station is not on the map"),
    NUMBER(sl_station, longitude, SL_PURE, RANGE(-180, 180), false,
           "degrees east, WGS 84", "the station is not on the map"),
    NUMBER(sl_station, site_elevation, SL_LENGTH, ELEVATIONS, false,
           "ground above sea level; sets the air pressure",
           "a low barometer tells it, else a level stands in without a bound: "
           "no pump here can be called clear"),
    WORD(sl_station, installation, SL_WORDS_INSTALLATION, false,
         "where the pumps stand", "told from the pumps' make-up"),
    WORD(sl_station, source_kind, SL_WORDS_SOURCE_KIND, false,
         "open: a free surface; closed: a tank with gauge pressure; main: "
         "a pressurised pipe",
         "main for a station on a main, else open: an assumption"),
    NUMBER(sl_station, source_pressure_low, SL_PRESSURE, RANGE(-101325, 1e7),
           false, "lowest gauge pressure of the tank or main",
           "no pump here can be called clear"),
    NUMBER(sl_station, source_pressure_normal, SL_PRESSURE, RANGE(-101325, 1e7),
           false, "usual gauge pressure",
           "the normal condition uses the lowest"),
    NUMBER(sl_station, source_pressure_elevation, SL_LENGTH, ELEVATIONS, false,
           "where the main's gauge sits", "the head at the main is unknown"),
    NUMBER(sl_station, cut_out_level, SL_LENGTH, ELEVATIONS, false,
           "lowest source level the controls permit",
           "the lowest on record stands in; without that no pump is clear"),
    NUMBER(sl_station, record_low_level, SL_LENGTH, ELEVATIONS, false,
           "lowest source level ever recorded; audited for raw water, "
           "irrigation, seawater and where the service is not recorded",
           "the cut-out is used"),
    NUMBER(sl_station, normal_level, SL_LENGTH, ELEVATIONS, false,
           "usual source level", "the level that is audited as lowest is used"),
    NUMBER(sl_station, water_temp_summer, SL_TEMPERATURE, TEMPERATURES, false,
           "warmest water of the year",
           "a default by service, with its interval"),
    NUMBER(sl_station, water_temp_normal, SL_TEMPERATURE, TEMPERATURES, false,
           "usual water temperature",
           "a default by service, with its interval"),
    NUMBER(sl_station, barometer_low, SL_PRESSURE, RANGE(4e4, 1.1e5), false,
           "lowest air pressure at the site, absolute, not reduced to sea "
           "level",
           "a storm allowance off the standard atmosphere"),
    NUMBER(sl_station, discharge_low, SL_LENGTH, RANGE(-450, 8000), false,
           "lowest discharge level or hydraulic grade",
           "the usual one stands in, without a bound"),
    NUMBER(sl_station, discharge_normal, SL_LENGTH, RANGE(-450, 8000), false,
           "usual discharge level or hydraulic grade",
           "the normal condition uses the lowest"),
    NUMBER(sl_station, discharge_loss_flow, SL_FLOW, RANGE(1e-6, 500), false,
           "flow of a measured discharge loss",
           "the loss is worked out from the pipe"),
    NUMBER(sl_station, discharge_loss_head, SL_LENGTH, RANGE(0, 2000), false,
           "head lost in the discharge at that flow",
           "the loss is worked out from the pipe"),
    NUMBER(sl_station, discharge_length, SL_LENGTH, RANGE(0, 1e6), false,
           "length of the discharge main", "the flow is not solved"),
    NUMBER(sl_station, discharge_bore, SL_BORE, RANGE(0.01, 15), false,
           "inside diameter of the discharge main", "the flow is not solved"),
    WORD(sl_station, discharge_material, SL_WORDS_MATERIAL, false,
         "material of the discharge main", "the widest roughness interval"),
    WHOLE(sl_station, discharge_year, YEARS, "year the discharge main was laid",
          "its age is taken from none to 100 years"),
    NUMBER(sl_station, discharge_minor_k, SL_PURE, RANGE(0, 1e5), false,
           "sum of K of the discharge's fittings, on its bore",
           "a default with its interval"),
    WHOLE(sl_station, pumps_running_max, COUNTS,
          "most pumps the controls run at once", "all of them: worst case"),
    WHOLE(sl_station, pumps_running_firm, COUNTS,
          "pumps that meet firm capacity", "nothing yet"),
    WHOLE(sl_station, people_served, COUNTS, "people who depend on it",
          "ranked after those that say"),
    NUMBER(sl_station, flow_served, SL_FLOW, RANGE(0, 500), false,
           "flow that depends on it", "nothing yet"),
    NUMBER(sl_station, outage_cost_per_day, SL_PURE, RANGE(0, 1e12), false,
           "cost of a day's outage, the owner's currency", "nothing yet"),
    NUMBER(sl_station, days_to_restore, SL_PURE, RANGE(0, 10000), false,
           "days to bring it back", "nothing yet"),
    TEXT(sl_station, note, false, "anything else", "nothing"),
};

static const struct sl_field pump_fields[] = {
    TEXT(sl_pump, pump_id, true, "the owner's key of the pump's place",
         "the record is rejected"),
    TEXT(sl_pump, station_id, true, "the station it stands in",
         "the record is rejected"),
    TEXT(sl_pump, position, false, "its place in the station", "nothing"),
    WORD(sl_pump, make_up, SL_WORDS_MAKE_UP, false, "its build",
         "the station's installation decides the suction side"),
    WORD(sl_pump, in_service, SL_WORDS_YES_NO, false, "no: out of scope",
         "taken to be in service"),
    NUMBER(sl_pump, datum_elevation, SL_LENGTH, ELEVATIONS, false,
           "the impeller eye: shaft axis of a horizontal pump, inlet edge "
           "of the first-stage blades of a vertical one",
           "no bound: it can be proven short by its inlet's lip alone"),
    TEXT(sl_pump, curve_id, false, "the maker's curve it runs on",
         "only the rated point is known: it cannot be called clear"),
    NUMBER(sl_pump, rated_flow, SL_FLOW, RANGE(1e-6, 200), false,
           "flow at the rated point", "the curve or recorded flow is needed"),
    NUMBER(sl_pump, rated_head, SL_LENGTH, RANGE(0.1, 3000), false,
           "head at the rated point", "nothing"),
    NUMBER(sl_pump, rated_npshr, SL_LENGTH, RANGE(0.01, 100), false,
           "NPSHR (NPSH3) at the rated point", "the curve is needed"),
    NUMBER(sl_pump, rated_speed, SL_SPEED, RANGE(10, 20000), false,
           "speed at the rated point", "the curve's test speed is used"),
    NUMBER(sl_pump, max_speed, SL_SPEED, RANGE(10, 20000), false,
           "highest speed the drive allows", "the rated speed is used"),
    NUMBER(sl_pump, bep_flow, SL_FLOW, RANGE(1e-6, 200), false,
           "flow at best efficiency",
           "its operating region, suction specific speed and suction energy "
           "cannot be told"),
    WHOLE(sl_pump, stages, RANGE(1, 500), "number of stages",
          "its specific speed, which sets the operating region, cannot be "
          "told"),
    WORD(sl_pump, double_suction, SL_WORDS_YES_NO, false, "two impeller eyes",
         "suction specific speed and energy cannot be told"),
    NUMBER(sl_pump, suction_nozzle_bore, SL_BORE, RANGE(0.005, 15), false,
           "bore of the suction flange",
           "without the eye's diameter too, suction energy cannot be told"),
    NUMBER(sl_pump, eye_diameter, SL_BORE, RANGE(0.005, 15), false,
           "diameter of the impeller eye",
           "estimated from the bore of the suction flange; without that too, "
           "suction energy cannot be told"),
    NUMBER(sl_pump, inlet_elevation, SL_LENGTH, ELEVATIONS, false,
           "lip of the bell or opening; bounds an impeller eye that is not "
           "recorded",
           "its submergence cannot be told"),
    NUMBER(sl_pump, inlet_diameter, SL_BORE, RANGE(0.005, 15), false,
           "diameter of the bell or opening",
           "a default inlet loss, with its interval; its submergence cannot "
           "be told"),
    TEXT(sl_pump, suction_pipe_id, false, "the suction pipe at its flange",
         "a dry-pit pump's suction losses have no bound"),
    NUMBER(sl_pump, largest_recorded_flow, SL_FLOW, RANGE(1e-6, 200), false,
           "largest flow ever recorded", "the rated flow is used"),
    NUMBER(sl_pump, motor_power, SL_POWER, RANGE(1, 1e8), false,
           "power of the motor", "nothing yet"),
    WHOLE(sl_pump, year_installed, YEARS, "year this machine was put in",
          "nothing yet"),
    NUMBER(sl_pump, straight_run, SL_LENGTH, RANGE(0, 10000), false,
           "straight pipe before its suction flange",
           "whether the flow comes to it even cannot be told"),
};

static const struct sl_field point_fields[] = {
    TEXT(sl_curve_point, curve_id, true, "the curve it belongs to",
         "the record is rejected"),
    NUMBER(sl_curve_point, flow, SL_FLOW, RANGE(0, 200), true,
           "flow of the point", "the record is rejected"),
    NUMBER(sl_curve_point, head, SL_LENGTH, RANGE(0, 3000), false,
           "head at that flow", "the point does not shape the head curve"),
    NUMBER(sl_curve_point, npshr, SL_LENGTH, RANGE(0.01, 100), false,
           "NPSHR (NPSH3) at that flow",
           "the point does not shape the NPSHR curve"),
    NUMBER(sl_curve_point, efficiency, SL_PURE, RANGE(0, 100), false,
           "per cent", "nothing yet"),
    NUMBER(sl_curve_point, speed, SL_SPEED, RANGE(10, 20000), false,
           "speed of the test", "taken as the pump's rated speed"),
};

static const struct sl_field pipe_fields[] = {
    TEXT(sl_pipe, pipe_id, true, "the owner's key of the pipe",
         "the record is rejected"),
    TEXT(sl_pipe, station_id, true, "the station it belongs to",
         "the record is rejected"),
    TEXT(sl_pipe, draws_from, false, "the pipe it draws from",
         "it draws from the source"),
    NUMBER(sl_pipe, length, SL_LENGTH, RANGE(0, 100000), false, "its length",
           "its friction has no bound"),
    NUMBER(sl_pipe, bore, SL_BORE, RANGE(0.01, 15), false,
           "its inside diameter", "its losses have no bound"),
    WORD(sl_pipe, material, SL_WORDS_MATERIAL, false, "its material",
         "the widest roughness interval"),
    TEXT(sl_pipe, lining, false, "its lining", "nothing yet"),
    WORD(sl_pipe, condition, SL_WORDS_CONDITION, false, "good, fair or poor",
         "roughness from good to poor"),
    WHOLE(sl_pipe, year_installed, YEARS, "year it was laid",
          "its age is taken from none to 100 years"),
    NUMBER(sl_pipe, roughness, SL_BORE, RANGE(0, 0.1), false,
           "absolute roughness",
           "taken from the material, its condition and its age"),
    NUMBER(sl_pipe, hazen_williams_c, SL_PURE, RANGE(20, 200), false,
           "Hazen-Williams C; used where the roughness is not recorded",
           "friction by Darcy and Colebrook"),
};

static const struct sl_field fitting_fields[] = {
    TEXT(sl_fitting, pipe_id, true, "the pipe it is in",
         "the record is rejected"),
    WORD(sl_fitting, fitting, SL_WORDS_FITTING, true, "a row of the K table",
         "the record is rejected"),
    WHOLE(sl_fitting, count, RANGE(1, 1000), "how many", "one"),
    NUMBER(sl_fitting, k, SL_PURE, RANGE(0, 1000), false,
           "K of V²/2g in the pipe's bore", "the K table's interval"),
};

static const struct sl_field condition_fields[] = {
    TEXT(sl_owner_condition, condition, true, "its name",
         "the record is rejected"),
    WORD(sl_owner_condition, level_basis, SL_WORDS_LEVEL_BASIS, true,
         "source level; lowest: the lowest the audit knows of",
         "the record is rejected"),
    NUMBER(sl_owner_condition, level_addition, SL_LENGTH, RANGE(-50, 50), false,
           "added to that level; less than 0 is lower", "none"),
    WORD(sl_owner_condition, discharge_basis, SL_WORDS_LOW_BASIS, false,
         "discharge level", "low: less head, so more flow"),
    WORD(sl_owner_condition, pressure_basis, SL_WORDS_LOW_BASIS, false,
         "gauge pressure of a tank or main", "low"),
    WORD(sl_owner_condition, temperature_basis, SL_WORDS_TEMPERATURE_BASIS,
         true, "water temperature", "the record is rejected"),
    NUMBER(sl_owner_condition, temperature_addition, SL_TEMPERATURE_DIFFERENCE,
           RANGE(-30, 30), false,
           "added to that temperature, a difference: a warmer decade", "none"),
    WORD(sl_owner_condition, barometer, SL_WORDS_BAROMETER, false,
         "air pressure: the standard one, or its fall in a storm", "storm low"),
    WORD(sl_owner_condition, suction_friction, SL_WORDS_FRICTION, false,
         "walls of the suction pipes: as laid, or rougher by their years",
         "aged: the most loss"),
    WORD(sl_owner_condition, discharge_friction, SL_WORDS_FRICTION, false,
         "likewise of the discharge main", "new: the least loss, so more flow"),
};

static const struct sl_field rule_fields[] = {
    TEXT(sl_owner_rule, rule, true, "its name", "the record is rejected"),
    NUMBER(sl_owner_rule, ratio, SL_PURE, RANGE(1, 10), true,
           "NPSHA is to be at least this many times NPSHR; 1 asks nothing",
           "the record is rejected"),
    NUMBER(sl_owner_rule, floor, SL_LENGTH, RANGE(0, 50), true,
           "and at least this much over NPSHR; 0 asks nothing",
           "the record is rejected"),
    TEXT(sl_owner_rule, edition, false, "edition of the standard it is from",
         "none is shown"),
    TEXT(sl_owner_rule, source, false, "where it comes from",
         "shown as the owner's own"),
};

/* clang-format off */
#define KIND(name, file, table, list, record)                                 \
    {name, file, table, list, sizeof(list) / sizeof((list)[0]),               \
     sizeof(struct record)}
/* clang-format on */

static const struct sl_record_kind kinds[SL_KIND_COUNT] = {
    [SL_KIND_STATION] =
        KIND("station", "stations.csv", "stations", station_fields, sl_station),
    [SL_KIND_CURVE] = KIND("curve point", "curves.csv", "curve_points",
                           point_fields, sl_curve_point),
    [SL_KIND_PIPE] = KIND("suction pipe", "suction_pipes.csv", "suction_pipes",
                          pipe_fields, sl_pipe),
    [SL_KIND_FITTING] = KIND("suction fitting", "suction_fittings.csv",
                             "suction_fittings", fitting_fields, sl_fitting),
    [SL_KIND_PUMP] = KIND("pump", "pumps.csv", "pumps", pump_fields, sl_pump),
    [SL_KIND_CONDITION] =
        KIND("condition", "conditions.csv", "owner_conditions",
             condition_fields, sl_owner_condition),
    [SL_KIND_RULE] = KIND("margin rule", "margin_rules.csv",
                          "owner_margin_rules", rule_fields, sl_owner_rule),
};

const struct sl_record_kind *sl_record_kind(enum sl_kind kind)
{
    return &kinds[kind];
}

const struct sl_field *sl_field_by_name(const struct sl_record_kind *kind,
                                        const char *name, size_t length)
{
    for (size_t i = 0; i < kind->field_count; i++)
        if (strncmp(kind->fields[i].name, name, length) == 0 &&
            kind->fields[i].name[length] == '\0')
            return &kind->fields[i];
    return NULL;
}

static void *member(const struct sl_field *field, void *record)
{
    return (char *)record + field->offset;
}

struct sl_number *sl_field_number(const struct sl_field *field, void *record)
{
    return member(field, record);
}

const char **sl_field_text(const struct sl_field *field, void *record)
{
    return member(field, record);
}

int *sl_field_word(const struct sl_field *field, void *record)
{
    return member(field, record);
}
