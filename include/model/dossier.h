/* All that the inventory says about one station, in one piece.
 *
 * Everything lives in the arena it was read into; what a pump or a pipe draws
 * from is one of `pipes`.  Pumps are in order of pump_id, pipes of pipe_id, a
 * pipe's fittings in order of line.  What was rejected on import is counted
 * where it is missed: a sum or a curve without it is not all there is. */
#ifndef SL_MODEL_DOSSIER_H
#define SL_MODEL_DOSSIER_H

#include <stddef.h>

#include "model/records.h"

/* A maker's curve, its points in order of flow. */
struct sl_curve {
    const char *curve_id;
    const struct sl_curve_point *points;
    size_t point_count;
    long long rejected_points; /* records of it that were not kept */
};

struct sl_dossier_pipe {
    struct sl_pipe record;
    const struct sl_dossier_pipe *draws_from; /* NULL: the source */
    const struct sl_fitting *fittings;
    size_t fitting_count;
    long long rejected_fittings; /* records of it that were not kept */
};

struct sl_dossier_pump {
    struct sl_pump record;
    const struct sl_dossier_pipe *suction; /* NULL: none recorded */
    const struct sl_curve *curve;          /* NULL: none recorded */
};

struct sl_dossier {
    long long station; /* the store's key */
    struct sl_station record;
    struct sl_dossier_pump *pumps;
    size_t pump_count;
    struct sl_dossier_pipe *pipes;
    size_t pipe_count;
    long long rejected_pumps; /* records of it that were not kept */
};

#endif
