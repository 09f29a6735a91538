/* Random stations for the tests of hydraulics/network.h. */
#ifndef SL_TESTS_NETWORK_STATIONS_H
#define SL_TESTS_NETWORK_STATIONS_H

#include <stdint.h>

#include "hydraulics/network.h"

#define STATION_UNITS 24
#define STATION_PIPES 64
#define STATION_POINTS 7

struct station {
    struct sl_network network;
    struct sl_network_pipe pipes[STATION_PIPES];
    struct sl_network_unit units[STATION_UNITS];
    double x[STATION_UNITS][STATION_POINTS];
    double y[STATION_UNITS][STATION_POINTS];
    bool rises; /* some curve does */
};

/* Steele, Lea and Flood 2014, OOPSLA: SplitMix64. */
static inline double draw(uint64_t *seed, double low, double high)
{
    uint64_t z = (*seed += 0x9e3779b97f4a7c15u);

    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9u;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebu;
    z ^= z >> 31;
    return low + (high - low) * ((double)(z >> 11) * 0x1p-53);
}

static inline int draw_int(uint64_t *seed, int low, int high)
{
    return low + (int)draw(seed, 0.0, high - low + 1);
}

/* A power of 2 or more would begin flat (F19), and flat curves carried on to
 * flow nought leave open which of two pumps runs. */
static inline void draw_curve(uint64_t *seed, struct station *s, size_t unit)
{
    double last = draw(seed, 0.02, 0.17), shut_off = draw(seed, 22.0, 61.0);
    double fall = draw(seed, 0.45, 0.9), power = draw(seed, 1.3, 1.95);
    bool droops = draw(seed, 0.0, 1.0) < 0.03;
    size_t points = (size_t)draw_int(seed, 3, STATION_POINTS), i;
    double first = draw(seed, 0.0, 1.0) < 0.3 ? draw(seed, 0.1, 0.4) : 0.0;

    for (i = 0; i < points; i++) {
        double part = first + (1.0 - first) * (double)i / (double)(points - 1);

        s->x[unit][i] = part * last;
        s->y[unit][i] = shut_off * (1.0 - fall * pow(part, power));
    }
    if (droops) {
        s->y[unit][0] = s->y[unit][1] * draw(seed, 0.8, 0.98);
        s->rises = true;
    }
    s->units[unit].head =
        (struct sl_curve_view){s->x[unit], s->y[unit], points};
}

static inline int draw_pipe(uint64_t *seed, struct station *s, int from,
                            bool own)
{
    int at = (int)s->network.pipe_count++;

    s->pipes[at] = (struct sl_network_pipe){
        .draws_from = from,
        .own = own,
        .length = draw(seed, 0.0, 1.0) < 0.2 ? 0.0 : draw(seed, 1.0, 40.0),
        .bore = own ? draw(seed, 0.15, 0.4) : draw(seed, 0.3, 0.8),
        .roughness = draw(seed, 1e-6, 2e-3),
        .hazen_williams_c =
            draw(seed, 0.0, 1.0) < 0.2 ? draw(seed, 90.0, 150.0) : NAN,
        .minor_k = draw(seed, 1.1, 4.0)};
    return at;
}

/* Some shared pipes that draw from one another, and on each unit's way up
 * to two of its own. */
static inline void draw_ways(uint64_t *seed, struct station *s)
{
    int shared = draw_int(seed, 0, 5), i, own;
    size_t unit;

    s->network.pipe_count = 0;
    for (i = 0; i < shared; i++)
        draw_pipe(seed, s, draw_int(seed, -1, i - 1), false);
    for (unit = 0; unit < s->network.unit_count; unit++) {
        int way = draw_int(seed, -1, shared - 1);

        for (own = draw_int(seed, 0, 2); own > 0; own--)
            way = draw_pipe(seed, s, way, true);
        s->units[unit].pipe = way;
    }
}

static inline void draw_station(uint64_t *seed, struct station *s)
{
    bool measured = draw(seed, 0.0, 1.0) < 0.4;
    size_t i;

    memset(s, 0, sizeof *s);
    s->network.pipes = s->pipes;
    s->network.units = s->units;
    s->network.unit_count = (size_t)draw_int(seed, 1, 8);
    draw_ways(seed, s);
    for (i = 0; i < s->network.unit_count; i++) {
        draw_curve(seed, s, i);
        s->units[i].given_flow =
            draw(seed, 0.0, 1.0) < 0.1 ? draw(seed, 0.0, 0.1) : NAN;
        s->units[i].count = draw_int(seed, 1, 3);
        s->units[i].fixed_loss =
            draw(seed, 0.0, 1.0) < 0.3 ? draw(seed, 0.0, 1.5) : 0.0;
    }
    s->network.static_head = draw(seed, -2.0, 35.0);
    s->network.gauge_on_pipe = draw(seed, 0.0, 1.0) < 0.2;
    s->network.loss_flow = measured ? draw(seed, 0.05, 0.6) : NAN;
    s->network.loss_head = draw(seed, 0.5, 25.0);
    s->network.length = draw(seed, 20.0, 3000.0);
    s->network.bore = draw(seed, 0.25, 0.8);
    s->network.roughness = draw(seed, 1e-6, 1e-3);
    s->network.minor_k = draw(seed, 0.0, 9.0);
    s->network.viscosity = draw(seed, 0.6e-6, 1.7e-6);
}

#endif
