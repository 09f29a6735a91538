/* The terms that take head from a pump, and which are worth a word. */
#ifndef SL_RANKER_TAKERS_H
#define SL_RANKER_TAKERS_H

#include <stdbool.h>
#include <stddef.h>

#include "model/row.h"

/* A head below this does not show at one decimal, m. */
#define SL_LEAST_HEAD 0.05

enum sl_taker_id {
    SL_TAKES_LOSSES,
    SL_TAKES_AIR,
    SL_TAKES_VAPOUR,
    SL_TAKES_GAS,
    SL_TAKES_BAROMETER,
    SL_TAKES_VACUUM,
    SL_TAKER_COUNT
};

/* A term that takes head from the pump, m, above zero. */
struct sl_taker {
    enum sl_taker_id id;
    double head;
};

/* Those worth naming, largest first; how many there are. */
size_t sl_takers_find(const struct sl_pump_row *row,
                      const struct sl_terms *terms,
                      struct sl_taker takers[SL_TAKER_COUNT]);

/* Whether the source is given as the pressure of a main. */
bool sl_is_pressure_basis(enum sl_source_basis basis);

#endif
