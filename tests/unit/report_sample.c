/* report_sample PATH [us]: a report of invented stations, to look at. */
#include <stdio.h>
#include <string.h>

#include "ranker/report.h"
#include "ranker_rows.h"

static const struct sl_condition summer_low = {
    .condition = "summer low",
    .level = SL_LEVEL_LOW,
    .discharge = SL_LEVEL_LOW,
    .pressure = SL_LEVEL_LOW,
    .summer_temperature = 1,
    .storm_barometer = 1,
    .suction_friction = SL_FRICTION_AGED,
    .discharge_friction = SL_FRICTION_NEW,
};

#define MOST_ROWS 16
static struct sl_station_row rows[MOST_ROWS];
static size_t row_count;

static struct sl_pump_row *add(struct sl_station_row row)
{
    rows[row_count] = row;
    return &rows[row_count++].worst;
}

static void add_at_risk(void)
{
    struct sl_pump_row *pump;

    add(high_lift_station());
    add(needy_station());
    pump = add(station_of(3, SL_THIN, "0220", "Harrow Bend Lift", SL_WASTEWATER,
                          SL_DRY_PIT, 41800));
    pump->assumed = 5;
    fill_sets(pump);
    pump->temperature = 303.65;
    fill_cases(pump, 0.1277,
               (struct sl_terms){.atmosphere = 10.21,
                                 .barometer = -0.31,
                                 .elevation = -1.24,
                                 .friction = -0.21,
                                 .minor = -0.62,
                                 .vapour = -0.45,
                                 .gas = -0.61},
               5.93, 0.35);
    pump = add(station_of(4, SL_THIN, "0098", "Cinder Hill Booster", SL_POTABLE,
                          SL_ON_MAIN, 12650));
    pump->source_basis = SL_SOURCE_PRESSURE_LOW;
    pump->flow_basis = SL_FLOW_RECORDED;
    pump->altitude = 1204;
    fill_cases(pump, 0.0081,
               (struct sl_terms){.atmosphere = 8.95,
                                 .gauge = 2.04,
                                 .elevation = 0.42,
                                 .velocity = 0.09,
                                 .friction = -0.08,
                                 .minor = -0.17,
                                 .vapour = -0.24},
               9.84, 0);
    pump = add(station_of(5, SL_THIN, "0415", "Old Ferry <Number 2> & Annex",
                          SL_IRRIGATION, SL_DRY_PIT, NO_FIGURE));
    pump->off_curve = true;
    pump->unknown = 1;
    fill_cases(pump, 0.31,
               (struct sl_terms){.atmosphere = 10.1,
                                 .elevation = -2.2,
                                 .friction = -0.4,
                                 .minor = -0.3,
                                 .vapour = -0.3},
               NO_FIGURE, 0);
    pump->cases[SL_FAVOURABLE] = pump->cases[SL_TYPICAL];
    pump->cases[SL_FAVOURABLE].npshr = 5.9;
    pump->cases[SL_FAVOURABLE].margin = 1.0;
    pump->cases[SL_FAVOURABLE].surplus = -0.5;
}

static void add_clear(void)
{
    static const char *const names[] = {"Alder Brook",   "Two Larches",
                                        "Kestrel Point", "Millrace North",
                                        "Gravel Island", "West Tarn"};

    for (size_t i = 0; i < 6; i++) {
        struct sl_pump_row *pump = add(
            station_of((long)i + 1, SL_CLEAR, "0500", names[i],
                       i % 2 ? SL_WASTEWATER : SL_POTABLE,
                       i % 2 ? SL_WET_PIT : SL_DRY_PIT, 1200.0 * (double)i));

        fill_cases(pump, 0.04 + 0.03 * (double)i,
                   (struct sl_terms){.atmosphere = 10.2,
                                     .elevation = 0.8 + 0.4 * (double)i,
                                     .friction = -0.1,
                                     .minor = -0.15,
                                     .vapour = -0.28},
                   3.4, 0.1 * (double)i);
    }
}

static void add_unproven(void)
{
    struct sl_pump_row *pump;

    add(unknown_station());
    pump = add(station_of(2, SL_UNPROVEN, "0177", "Bramble Reach",
                          SL_WASTEWATER, SL_DRY_PIT, 22100));
    pump->likely = SL_CLEAR;
    pump->reason = "the margin rule is met or not depending on the suction "
                   "pipe's roughness";
    pump->leading_unknown = "material";
    pump->assumed = 3;
    fill_cases(pump, 0.14,
               (struct sl_terms){.atmosphere = 10.2,
                                 .elevation = 0.9,
                                 .friction = -1.1,
                                 .minor = -0.7,
                                 .vapour = -0.35,
                                 .gas = -0.61},
               6.5, 0.6);
    pump = add(station_of(3, SL_UNPROVEN, "0290", "Pumphouse Nine",
                          SL_RAW_WATER, SL_DRY_PIT, 8030));
    pump->likely = SL_THIN;
    pump->flow_basis = SL_FLOW_RATED;
    pump->reason = "the rated flow cannot show how far out the pump runs";
    pump->leading_unknown = "curve_id";
    fill_cases(pump, 0.06,
               (struct sl_terms){.atmosphere = 10.0,
                                 .elevation = -3.1,
                                 .friction = -0.2,
                                 .minor = -0.3,
                                 .vapour = -0.3},
               4.9, 0.1);
    pump = add(station_of(4, SL_UNPROVEN, "0333", "Empty Quarter", 0, 0, 410));
    pump->pump_id = "";
    pump->likely = SL_UNPROVEN;
    rows[row_count - 1].pumps = 0;
    fill_cases(pump, NO_FIGURE, (struct sl_terms){.atmosphere = NO_FIGURE},
               NO_FIGURE, 0);
}

static void write_unknowns(struct sl_report *report)
{
    struct sl_unknown_row row = {
        .rank = 1,
        .station_id = "0311",
        .station_name = "Saltmarsh Gate",
        .pump_id = "P-2",
        .condition = "summer low",
        .likely = SL_UNPROVEN,
        .input = SL_IN_DATUM,
        .provenance = SL_UNKNOWN,
        .value = {NO_FIGURE, NO_FIGURE, NO_FIGURE},
        .swing = NO_FIGURE,
        .settles = true,
        .people_served = NO_FIGURE,
        .what = "no honest figure exists without a survey",
    };

    sl_report_unknown(report, &row);
    row.rank = 2;
    row.station_name = "Bramble Reach";
    row.station_id = "0177";
    row.likely = SL_CLEAR;
    row.input = SL_IN_SUCTION_ROUGHNESS;
    row.provenance = SL_ASSUMED;
    row.value = (struct sl_interval){0.0003, 0.0015, 0.00015};
    row.swing = 1.3;
    row.people_served = 22100;
    row.what = "rusty steel, HR Wallingford tables";
    sl_report_unknown(report, &row);
    row.rank = 3;
    row.input = SL_IN_TEMPERATURE;
    row.value = (struct sl_interval){297.15, 300.15, 291.15};
    row.swing = 0.1;
    row.settles = false;
    row.what = "default for wastewater";
    sl_report_unknown(report, &row);
}

static void write_set_aside(struct sl_report *report)
{
    struct sl_set_aside_row row = {
        "pumps.csv", 1418, "P-77", SL_REJECTED,
        "rated_flow_gpm is '1,500': a comma where a digit was expected"};

    sl_report_set_aside(report, &row);
    row = (struct sl_set_aside_row){"stations.csv", 12, "0009", SL_OUT_OF_SCOPE,
                                    "retired in 2019"};
    sl_report_set_aside(report, &row);
}

static void write_defaults(struct sl_report *report)
{
    struct sl_default_row row = {
        .row = {.field = "water_temp_summer",
                .circumstance = "wastewater",
                .value = {297.15, 300.15, 291.15},
                .quantity = SL_TEMPERATURE,
                .source = "Metcalf & Eddy, Wastewater Engineering",
                .trust = 'M'},
        .uses = 1318};

    sl_report_default(report, &row);
    row.row = (struct sl_default){
        .field = "barometer_low",
        .circumstance = "",
        .value = {2500, 3000, 2000},
        .quantity = SL_PRESSURE,
        .source = "2-3 % of the standard pressure for a storm low",
        .trust = 'P'};
    row.uses = 12;
    sl_report_default(report, &row);
}

static void write_sample(struct sl_report *report)
{
    sl_report_begin(report);
    sl_report_begin_ranked(report);
    for (size_t i = 0; i < row_count; i++)
        sl_report_station(report, &rows[i]);
    sl_report_begin_unknowns(report);
    write_unknowns(report);
    sl_report_begin_terms(report);
    for (size_t i = 0; i < 5; i++)
        sl_report_pump(report, &rows[i].worst);
    sl_report_begin_set_aside(report);
    write_set_aside(report);
    sl_report_begin_defaults(report);
    write_defaults(report);
    sl_report_end(report);
}

int main(int count, char **arguments)
{
    struct sl_vocabularies vocabularies = sl_fixed_vocabularies();
    struct sl_summary summary = summary_of(&summer_low);
    struct sl_report report = {.summary = &summary,
                               .vocabularies = &vocabularies,
                               .tables = &sample_tables};

    if (count < 2)
        return 2;
    report.units = count > 2 && strcmp(arguments[2], "us") == 0 ? SL_US : SL_SI;
    report.stream = fopen(arguments[1], "w");
    if (!report.stream)
        return 1;
    add_at_risk();
    add_clear();
    add_unproven();
    write_sample(&report);
    return fclose(report.stream) == 0 ? 0 : 1;
}
