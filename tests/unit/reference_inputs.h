/* The inputs of a reference row: "bore_in=12;flow=0.1;pump_head=40 38 30".
 *
 * A value is SI unless its name ends in a unit of the list below.  Asking
 * for a name that is not there, and a name nobody asks for, both make the
 * row fail: see inputs_problem. */
#ifndef SL_TESTS_REFERENCE_INPUTS_H
#define SL_TESTS_REFERENCE_INPUTS_H

#include <math.h>
#include <stdbool.h>
#include <stddef.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#define INPUTS_MOST 24
#define VALUES_MOST 16
#define NAME_MOST 40
#define TEXT_MOST 512

struct input {
    char name[NAME_MOST];
    double values[VALUES_MOST];
    size_t count;
    bool used;
};

struct inputs {
    struct input list[INPUTS_MOST];
    size_t count;
    char problem[160];
};

/* SI = (value + offset) * factor.  Written out here rather than taken from
 * the program, so that a slip there shows. */
static const struct unit {
    const char *name;
    double factor;
    double offset;
} units[] = {
    {"-", 1, 0},
    {"m", 1, 0},
    {"ft", 0.3048, 0},
    {"in", 0.0254, 0},
    {"cm", 0.01, 0},
    {"m3/s", 1, 0},
    {"m3", 1, 0},
    {"m3h", 1.0 / 3600, 0},
    {"gpm", 231 * 0.0254 * 0.0254 * 0.0254 / 60, 0},
    {"cfs", 0.3048 * 0.3048 * 0.3048, 0},
    {"L/min", 1.0 / 60000, 0},
    {"lpm", 1.0 / 60000, 0},
    {"m/s", 1, 0},
    {"fps", 0.3048, 0},
    {"fps2", 0.3048, 0},
    {"ft2", 0.3048 * 0.3048, 0},
    {"ft2s", 0.3048 * 0.3048, 0},
    {"Pa", 1, 0},
    {"kPa", 1e3, 0},
    {"MPa", 1e6, 0},
    {"psi", 0.45359237 * 9.80665 / (0.0254 * 0.0254), 0},
    {"K", 1, 0},
    {"C", 1, 273.15},
    {"F", 5.0 / 9, 459.67},
    {"kg/m3", 1, 0},
    {"g/cm3", 1e3, 0},
    {"lbft3", 0.45359237 / (0.3048 * 0.3048 * 0.3048), 0},
    {"slugft3", 0.45359237 * 9.80665 / 0.3048 / (0.3048 * 0.3048 * 0.3048), 0},
    {"N/m3", 1, 0},
    {"kN/m3", 1e3, 0},
    {"kNm3", 1e3, 0},
    {"Pa s", 1, 0},
    {"uPa s", 1e-6, 0},
    {"J/kg", 1, 0},
    {"rpm", 1, 0},
};

static inline const struct unit *unit_named(const char *name)
{
    for (size_t i = 0; i < sizeof units / sizeof *units; i++)
        if (strcmp(units[i].name, name) == 0)
            return &units[i];
    return NULL;
}

static inline void inputs_complain(struct inputs *inputs, const char *what,
                                   const char *name)
{
    if (inputs->problem[0] == '\0')
        snprintf(inputs->problem, sizeof inputs->problem, "%.50s '%.90s'", what,
                 name);
}

static inline void inputs_add(struct inputs *inputs, const char *item)
{
    const char *equals = strchr(item, '=');
    struct input *input = &inputs->list[inputs->count];
    const char *at;
    char *end;

    if (equals == NULL || equals - item >= NAME_MOST ||
        inputs->count == INPUTS_MOST) {
        inputs_complain(inputs, "cannot read the input", item);
        return;
    }
    inputs->count++;
    memcpy(input->name, item, (size_t)(equals - item));
    for (at = equals + 1; *at != '\0'; at = end) {
        double value = strtod(at, &end);

        if (end == at || input->count == VALUES_MOST) {
            inputs_complain(inputs, "cannot read the numbers of", item);
            return;
        }
        input->values[input->count++] = value;
    }
    if (input->count == 0)
        inputs_complain(inputs, "no number in", item);
}

static inline void inputs_parse(struct inputs *inputs, const char *text)
{
    char item[TEXT_MOST];

    memset(inputs, 0, sizeof *inputs);
    while (*text != '\0') {
        size_t length = strcspn(text, ";");

        if (length >= sizeof item) {
            inputs_complain(inputs, "too long an input", "");
            return;
        }
        memcpy(item, text, length);
        item[length] = '\0';
        inputs_add(inputs, item);
        text += length + (text[length] == ';');
    }
}

/* Copies the values of `name` in SI; their count, 0 when not there. */
static inline size_t find(struct inputs *inputs, const char *name,
                          double *values)
{
    size_t length = strlen(name);

    for (size_t i = 0; i < inputs->count; i++) {
        struct input *input = &inputs->list[i];
        const struct unit *unit = unit_named("-");

        if (strncmp(input->name, name, length) != 0)
            continue;
        if (input->name[length] == '_')
            unit = unit_named(input->name + length + 1);
        else if (input->name[length] != '\0')
            continue;
        if (unit == NULL)
            continue;
        for (size_t k = 0; k < input->count; k++)
            values[k] = (input->values[k] + unit->offset) * unit->factor;
        input->used = true;
        return input->count;
    }
    return 0;
}

static inline size_t numbers(struct inputs *inputs, const char *name,
                             double *values)
{
    size_t count = find(inputs, name, values);

    if (count == 0)
        inputs_complain(inputs, "the row lacks the input", name);
    return count;
}

static inline double number_or(struct inputs *inputs, const char *name,
                               double otherwise)
{
    double values[VALUES_MOST];
    size_t count = find(inputs, name, values);

    if (count > 1)
        inputs_complain(inputs, "more than one number in", name);
    return count == 0 ? otherwise : values[0];
}

static inline double number(struct inputs *inputs, const char *name)
{
    double value = number_or(inputs, name, NAN);

    if (isnan(value))
        inputs_complain(inputs, "the row lacks the input", name);
    return value;
}

/* NULL when all were understood and used. */
static inline const char *inputs_problem(struct inputs *inputs)
{
    for (size_t i = 0; i < inputs->count; i++)
        if (!inputs->list[i].used)
            inputs_complain(inputs, "the function does not know the input",
                            inputs->list[i].name);
    return inputs->problem[0] == '\0' ? NULL : inputs->problem;
}

#endif
