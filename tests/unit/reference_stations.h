/* The reference rows of pumps that run together. */
#ifndef SL_TESTS_REFERENCE_STATIONS_H
#define SL_TESTS_REFERENCE_STATIONS_H

#include "hydraulics/network.h"
#include "reference_functions.h"

/* Points of each pump's curve in a row, which lists them pump after pump. */
#define ROW_POINTS 4

struct station_row {
    struct sl_network network;
    struct sl_network_pipe pipes[VALUES_MOST];
    struct sl_network_unit pumps[VALUES_MOST];
    double flow[VALUES_MOST], head[VALUES_MOST];
};

static void read_pipes(struct inputs *in, struct station_row *row)
{
    double from[VALUES_MOST], own[VALUES_MOST], length[VALUES_MOST],
        bore[VALUES_MOST], roughness[VALUES_MOST], k[VALUES_MOST];
    size_t count = numbers(in, "pipe_from", from);

    row->network.pipe_count = count;
    if (numbers(in, "pipe_own", own) != count ||
        numbers(in, "pipe_length", length) != count ||
        numbers(in, "pipe_bore", bore) != count ||
        numbers(in, "pipe_roughness", roughness) != count ||
        numbers(in, "pipe_k", k) != count)
        inputs_complain(in, "not one for each pipe:", "pipe_from");
    for (size_t i = 0; i < count; i++)
        row->pipes[i] = (struct sl_network_pipe){
            (int)from[i], own[i] != 0, length[i], bore[i],
            roughness[i], NAN,         k[i]};
}

static void read_pumps(struct inputs *in, struct station_row *row)
{
    double pipe[VALUES_MOST], equal[VALUES_MOST];
    size_t count = numbers(in, "pump_pipe", pipe);

    row->network.unit_count = count;
    if (numbers(in, "pump_count", equal) != count ||
        numbers(in, "pump_flow", row->flow) != ROW_POINTS * count ||
        numbers(in, "pump_head", row->head) != ROW_POINTS * count)
        inputs_complain(in, "not one for each pump:", "pump_pipe");
    for (size_t i = 0; i < count; i++)
        row->pumps[i] =
            (struct sl_network_unit){{row->flow + ROW_POINTS * i,
                                      row->head + ROW_POINTS * i, ROW_POINTS},
                                     NAN,
                                     (int)equal[i],
                                     (int)pipe[i],
                                     0.0};
}

static double together_flow(struct inputs *in)
{
    struct station_row row = {0};
    struct sl_unit_flow out[VALUES_MOST];
    size_t pump = (size_t)number(in, "of_pump");

    read_pipes(in, &row);
    read_pumps(in, &row);
    row.network.pipes = row.pipes;
    row.network.units = row.pumps;
    row.network.static_head = number(in, "static_head");
    row.network.gauge_on_pipe = number(in, "gauge") != 0;
    row.network.loss_flow = row.network.loss_head = NAN;
    row.network.length = number(in, "delivery_length");
    row.network.bore = number(in, "delivery_bore");
    row.network.roughness = number(in, "delivery_roughness");
    row.network.minor_k = number(in, "delivery_k");
    row.network.viscosity = number(in, "viscosity");
    if (in->problem[0] != '\0' || pump >= row.network.unit_count)
        return NAN;
    return sl_network_solve(&row.network, NULL, out) == SL_NETWORK_SOLVED
               ? out[pump].flow
               : NAN;
}

#endif
