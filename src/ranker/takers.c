#include "ranker/takers.h"

/* From here on a term is worth naming, m.  Common practice, no source: each
 * is about the smallest that a person reading a balance would remark on. */
#define LOSSES_WORTH_NAMING 0.3
#define VAPOUR_WORTH_NAMING 0.5
#define BAROMETER_WORTH_NAMING 0.2
#define ALTITUDE_WORTH_NAMING 600.0
/* The standard atmosphere over water of 4 degC: 101325 Pa (ISO 2533:1975)
 * over 999.97 kg/m3 and 9.80665 m/s2.  Only ranks altitude among the terms
 * that take head; no figure shown rests on it. */
#define SEA_LEVEL_HEAD 10.33

bool sl_is_pressure_basis(enum sl_source_basis basis)
{
    return basis == SL_SOURCE_PRESSURE_LOW ||
           basis == SL_SOURCE_PRESSURE_NORMAL;
}

/* Every term that takes enough to be named, in no order. */
static size_t collect(const struct sl_pump_row *row,
                      const struct sl_terms *terms,
                      struct sl_taker takers[SL_TAKER_COUNT])
{
    const struct {
        enum sl_taker_id id;
        double head;
        bool worth_naming;
    } candidates[] = {
        {SL_TAKES_LOSSES, -(terms->friction + terms->minor),
         terms->friction + terms->minor < -LOSSES_WORTH_NAMING},
        {SL_TAKES_AIR, SEA_LEVEL_HEAD - terms->atmosphere,
         row->altitude > ALTITUDE_WORTH_NAMING},
        {SL_TAKES_VAPOUR, -terms->vapour, terms->vapour < -VAPOUR_WORTH_NAMING},
        {SL_TAKES_GAS, -terms->gas, terms->gas < -SL_LEAST_HEAD},
        {SL_TAKES_BAROMETER, -terms->barometer,
         terms->barometer < -BAROMETER_WORTH_NAMING},
        {SL_TAKES_VACUUM, -terms->gauge,
         terms->gauge < -SL_LEAST_HEAD &&
             !sl_is_pressure_basis(row->source_basis)},
    };
    size_t count = 0;

    for (size_t i = 0; i < SL_TAKER_COUNT; i++)
        if (candidates[i].worth_naming)
            takers[count++] =
                (struct sl_taker){candidates[i].id, candidates[i].head};
    return count;
}

/* Largest first; equals keep their order, so that the words do not depend
 * on the sort. */
static void order(struct sl_taker *takers, size_t count)
{
    for (size_t i = 1; i < count; i++)
        for (size_t j = i; j > 0 && takers[j].head > takers[j - 1].head; j--) {
            struct sl_taker larger = takers[j];

            takers[j] = takers[j - 1];
            takers[j - 1] = larger;
        }
}

size_t sl_takers_find(const struct sl_pump_row *row,
                      const struct sl_terms *terms,
                      struct sl_taker takers[SL_TAKER_COUNT])
{
    size_t count = collect(row, terms, takers);

    order(takers, count);
    return count;
}
