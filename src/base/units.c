#include "base/units.h"

#include <string.h>

#define FOOT 0.3048
#define INCH 0.0254
#define GALLON 3.785411784e-3
#define PSI 6894.757293168362
#define MILLION_GALLONS_A_DAY (1e6 * GALLON / 86400)

/* The first unit of a quantity is the one shown in SI, the second in US. */
static const struct sl_unit units[] = {
    {"", "", SL_PURE, 1, 0},
    {"m", "m", SL_LENGTH, 1, 0},
    {"ft", "ft", SL_LENGTH, FOOT, 0},
    {"cm", "cm", SL_LENGTH, 0.01, 0},
    {"mm", "mm", SL_LENGTH, 0.001, 0},
    {"in", "in", SL_LENGTH, INCH, 0},
    {"mm", "mm", SL_BORE, 0.001, 0},
    {"in", "in", SL_BORE, INCH, 0},
    {"cm", "cm", SL_BORE, 0.01, 0},
    {"m", "m", SL_BORE, 1, 0},
    {"ft", "ft", SL_BORE, FOOT, 0},
    {"l_s", "L/s", SL_FLOW, 0.001, 0},
    {"gpm", "gpm", SL_FLOW, GALLON / 60, 0},
    {"m3_s", "m³/s", SL_FLOW, 1, 0},
    {"m3_h", "m³/h", SL_FLOW, 1.0 / 3600, 0},
    {"mgd", "MGD", SL_FLOW, MILLION_GALLONS_A_DAY, 0},
    {"cfs", "ft³/s", SL_FLOW, FOOT *FOOT *FOOT, 0},
    {"kpa", "kPa", SL_PRESSURE, 1000, 0},
    {"psi", "psi", SL_PRESSURE, PSI, 0},
    {"pa", "Pa", SL_PRESSURE, 1, 0},
    {"hpa", "hPa", SL_PRESSURE, 100, 0},
    {"bar", "bar", SL_PRESSURE, 1e5, 0},
    {"inhg", "inHg", SL_PRESSURE, 3386.389, 0},
    {"c", "°C", SL_TEMPERATURE, 1, 273.15},
    {"f", "°F", SL_TEMPERATURE, 5.0 / 9, 459.67},
    {"k", "K", SL_TEMPERATURE, 1, 0},
    {"rpm", "rpm", SL_SPEED, 1, 0},
    {"rpm", "rpm", SL_SPEED, 1, 0},
    {"kw", "kW", SL_POWER, 1000, 0},
    {"hp", "hp", SL_POWER, 550 * FOOT * 0.45359237 * 9.80665, 0},
    {"w", "W", SL_POWER, 1, 0},
    {"m_s", "m/s", SL_VELOCITY, 1, 0},
    {"ft_s", "ft/s", SL_VELOCITY, FOOT, 0},
    {"k", "K", SL_TEMPERATURE_DIFFERENCE, 1, 0},
    {"delta_f", "°F", SL_TEMPERATURE_DIFFERENCE, 5.0 / 9, 0},
    {"delta_c", "°C", SL_TEMPERATURE_DIFFERENCE, 1, 0},
};

#define UNIT_COUNT (sizeof units / sizeof units[0])

const struct sl_unit *sl_unit_by_suffix(enum sl_quantity quantity,
                                        const char *suffix)
{
    for (size_t i = 0; i < UNIT_COUNT; i++)
        if (units[i].quantity == quantity &&
            strcmp(units[i].suffix, suffix) == 0)
            return &units[i];
    return NULL;
}

const struct sl_unit *sl_unit_shown(enum sl_quantity quantity,
                                    enum sl_unit_system system)
{
    for (size_t i = 0; i < UNIT_COUNT; i++)
        if (units[i].quantity == quantity)
            return quantity != SL_PURE && system == SL_US ? &units[i + 1]
                                                          : &units[i];
    return &units[0];
}

const char *sl_unit_choices(enum sl_quantity quantity)
{
    switch (quantity) {
    case SL_PURE:
        return "";
    case SL_LENGTH:
        return "m, ft, cm, mm, in";
    case SL_BORE:
        return "mm, in, cm, m, ft";
    case SL_FLOW:
        return "l_s, gpm, m3_s, m3_h, mgd, cfs";
    case SL_PRESSURE:
        return "kpa, psi, pa, hpa, bar, inhg";
    case SL_TEMPERATURE:
        return "c, f, k";
    case SL_SPEED:
        return "rpm";
    case SL_POWER:
        return "kw, hp, w";
    case SL_VELOCITY:
        return "m_s, ft_s";
    case SL_TEMPERATURE_DIFFERENCE:
        return "k, delta_f, delta_c";
    }
    return "";
}

double sl_to_si(const struct sl_unit *unit, double value)
{
    return (value + unit->offset) * unit->factor;
}

double sl_from_si(const struct sl_unit *unit, double si)
{
    return si / unit->factor - unit->offset;
}

double sl_shown(enum sl_quantity quantity, enum sl_unit_system system,
                double si)
{
    return sl_from_si(sl_unit_shown(quantity, system), si);
}
