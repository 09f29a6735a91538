/* Every row of every CSV in the folder named by the first argument (without
 * one, tests/reference), each a test of its own name: id, function, inputs,
 * value, unit, rtol, atol, source.  See tests/reference/README.md. */
#define _POSIX_C_SOURCE 200809L /* scandir, strdup */

#include <dirent.h>
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include <cmocka.h>
#include <csv.h>

#include "check.h"
#include "reference_stations.h"
#include "reference_suction.h"
#include "reference_systems.h"

static const struct {
    const char *name;
    double (*run)(struct inputs *in);
} functions[] = {
    {"affinity_flow", affinity_flow},
    {"affinity_head", affinity_head},
    {"affinity_npshr", affinity_npshr},
    {"affinity_power", affinity_power},
    {"affinity_power_ratio", affinity_power_ratio},
    {"atmosphere_head", atmosphere_head},
    {"bore_area", bore_area},
    {"curve_at", curve_at},
    {"curve_slope_at", curve_slope_at},
    {"darcy_energy", darcy_energy},
    {"darcy_loss", darcy_loss},
    {"darcy_pressure", darcy_pressure},
    {"duty_flow", duty_flow},
    {"duty_head", duty_head},
    {"enlarged_pressure", enlarged_pressure},
    {"estimated_npshr", estimated_npshr},
    {"friction_factor", factor},
    {"gpm_from_cfs", gpm_from_cfs},
    {"hazen_over_darcy", hazen_over_darcy},
    {"hazen_williams_loss", hazen_williams_loss},
    {"lift_by_specific_speeds", lift_by_specific_speeds},
    {"lift_with_its_pipe", lift_with_its_pipe},
    {"looped_gain", looped_gain},
    {"lowest_level", lowest_level},
    {"minimum_submergence", minimum_submergence},
    {"minor_loss", minor_loss},
    {"minor_pressure", minor_pressure},
    {"npsha_by_gauge_at_eye", npsha_by_gauge_at_eye},
    {"npsha_from_heads", npsha_from_heads},
    {"npsha_from_surface", npsha_from_surface},
    {"npsha_of_water", npsha_of_water},
    {"pipe_and_minor_loss", pipe_and_minor_loss},
    {"pipe_velocity", pipe_velocity},
    {"pure_specific_speed", pure_specific_speed},
    {"required_npsha", required_npsha},
    {"reservoir_flow", reservoir_flow},
    {"seawater_density", seawater_density},
    {"seawater_vapour_pressure", seawater_vapour_pressure},
    {"specific_speed", specific_speed},
    {"specific_weight", specific_weight},
    {"speed_for_share", speed_for_share},
    {"standard_atmosphere", standard_atmosphere},
    {"suction_lift_limit", suction_lift_limit},
    {"suction_lift_limit_of_water", suction_lift_limit_of_water},
    {"suction_pressure", suction_pressure},
    {"supply_pressure", supply_pressure},
    {"system_head", system_head},
    {"thoma_number", thoma_number},
    {"throttle_k", throttle_k},
    {"together_flow", together_flow},
    {"us_factor", us_factor},
    {"us_specific_speed", us_specific_speed},
    {"vapour_pressure", vapour_pressure},
    {"volume_to_lowest_level", volume_to_lowest_level},
    {"water_density", water_density},
    {"water_viscosity", water_viscosity},
};

enum column { ID, FUNCTION, INPUTS, VALUE, UNIT, RTOL, ATOL, SOURCE, COLUMNS };

static const char *const header[COLUMNS] = {
    "id", "function", "inputs", "value", "unit", "rtol", "atol", "source"};

struct row {
    char *cells[COLUMNS];
    size_t cell_count; /* of the record as read, also those left over */
};

struct rows {
    struct row *list;
    size_t count;
    const char *file;
    bool heading; /* the next record is a header */
};

static double cell_number(const struct row *row, enum column column)
{
    char *end;
    double value = strtod(row->cells[column], &end);

    if (end == row->cells[column] || *end != '\0' || !isfinite(value))
        fail_msg("%s: %s is not a number: '%s'", row->cells[ID], header[column],
                 row->cells[column]);
    return value;
}

static void check_row(void **state)
{
    const struct row *row = *state;
    const struct unit *unit;
    struct inputs inputs;
    double got = NAN, rtol, atol;
    size_t i = 0, count = sizeof functions / sizeof *functions;

    if (row->cell_count != COLUMNS)
        fail_msg("%s: %zu cells, not %d", row->cells[ID], row->cell_count,
                 COLUMNS);
    while (i < count && strcmp(functions[i].name, row->cells[FUNCTION]) != 0)
        i++;
    if (i == count)
        fail_msg("%s: unknown function '%s'", row->cells[ID],
                 row->cells[FUNCTION]);
    unit = unit_named(row->cells[UNIT]);
    if (unit == NULL)
        fail_msg("%s: unknown unit '%s'", row->cells[ID], row->cells[UNIT]);
    if (row->cells[SOURCE][0] == '\0')
        fail_msg("%s: no source", row->cells[ID]);
    inputs_parse(&inputs, row->cells[INPUTS]);
    if (inputs.problem[0] == '\0')
        got = functions[i].run(&inputs);
    if (inputs_problem(&inputs) != NULL)
        fail_msg("%s: %s", row->cells[ID], inputs_problem(&inputs));
    rtol = cell_number(row, RTOL);
    atol = cell_number(row, ATOL);
    check_close(row->cells[ID], got / unit->factor - unit->offset,
                cell_number(row, VALUE), rtol, atol);
}

/* --- reading --- */

/* A test program that cannot read its rows must not pass. */
static void stop(const char *what, const char *which)
{
    fprintf(stderr, "reference rows: %s: %s\n", what, which);
    exit(EXIT_FAILURE);
}

static void *must(void *allocated)
{
    if (allocated == NULL)
        stop("out of memory", "reading");
    return allocated;
}

static void take_cell(void *text, size_t length, void *context)
{
    struct rows *rows = context;
    struct row *row = &rows->list[rows->count];

    if (row->cell_count < COLUMNS)
        row->cells[row->cell_count] =
            must(strndup(text == NULL ? "" : text, length));
    row->cell_count++;
}

static void take_record(int end, void *context)
{
    struct rows *rows = context;
    struct row *row = &rows->list[rows->count];

    (void)end;
    for (size_t i = row->cell_count; i < COLUMNS; i++)
        row->cells[i] = must(strdup(""));
    if (rows->heading) {
        for (size_t i = 0; i < COLUMNS; i++) {
            if (strcmp(row->cells[i], header[i]) != 0)
                stop("not the columns of a reference file", rows->file);
            free(row->cells[i]);
        }
        rows->heading = false;
    } else {
        rows->count++;
        rows->list =
            must(realloc(rows->list, (rows->count + 1) * sizeof *rows->list));
    }
    memset(&rows->list[rows->count], 0, sizeof *rows->list);
}

static void read_file(struct rows *rows, const char *path)
{
    FILE *file = fopen(path, "rb");
    struct csv_parser parser;
    char buffer[4096];
    size_t length;

    rows->file = path;
    rows->heading = true;
    if (file == NULL)
        stop("cannot open", path);
    if (csv_init(&parser, CSV_STRICT | CSV_STRICT_FINI) != 0)
        stop("cannot start reading", path);
    while ((length = fread(buffer, 1, sizeof buffer, file)) > 0)
        if (csv_parse(&parser, buffer, length, take_cell, take_record, rows) !=
            length)
            stop(csv_strerror(csv_error(&parser)), path);
    if (ferror(file))
        stop("cannot read", path);
    if (csv_fini(&parser, take_cell, take_record, rows) != 0)
        stop("ends inside quotes", path);
    csv_free(&parser);
    fclose(file);
}

static int is_csv(const struct dirent *entry)
{
    size_t length = strlen(entry->d_name);

    return length > 4 && strcmp(entry->d_name + length - 4, ".csv") == 0;
}

static void read_folder(struct rows *rows, const char *folder)
{
    struct dirent **entries;
    char path[1024];
    int count = scandir(folder, &entries, is_csv, alphasort);

    if (count <= 0)
        stop("no CSV file in", folder);
    rows->list = must(calloc(1, sizeof *rows->list));
    for (int i = 0; i < count; i++) {
        snprintf(path, sizeof path, "%s/%s", folder, entries[i]->d_name);
        read_file(rows, path);
        free(entries[i]);
    }
    free(entries);
    if (rows->count == 0)
        stop("no row in", folder);
}

static void stop_at_double(const struct rows *rows)
{
    for (size_t i = 0; i < rows->count; i++)
        for (size_t k = 0; k < i; k++)
            if (strcmp(rows->list[i].cells[ID], rows->list[k].cells[ID]) == 0)
                stop("two rows have the id", rows->list[i].cells[ID]);
}

int main(int argc, char **argv)
{
    struct rows rows = {0};
    struct CMUnitTest *tests;
    int failed;

    if (argc > 2)
        stop("the folder of CSV files is the one argument", argv[0]);
    read_folder(&rows, argc == 2 ? argv[1] : "tests/reference");
    stop_at_double(&rows);
    tests = must(calloc(rows.count, sizeof *tests));
    for (size_t i = 0; i < rows.count; i++)
        tests[i] = (struct CMUnitTest){.name = rows.list[i].cells[ID],
                                       .test_func = check_row,
                                       .initial_state = &rows.list[i]};
    failed = _cmocka_run_group_tests("reference rows", tests, rows.count, NULL,
                                     NULL);
    free(tests);
    for (size_t i = 0; i < rows.count; i++)
        for (size_t k = 0; k < COLUMNS; k++)
            free(rows.list[i].cells[k]);
    free(rows.list);
    return failed == 0 ? EXIT_SUCCESS : EXIT_FAILURE;
}
