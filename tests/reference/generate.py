#!/usr/bin/python3
"""Writes iapws.csv, fluids.csv and scipy.csv into this script's folder.

The values are those of general-purpose libraries, whose name and version
each row carries; the program and its tests never need them.  Run it again
only to renew the values, and read the difference.
"""
import csv
import itertools
import math
import os

import fluids
import iapws
import numpy
import scipy
from iapws._iapws import _Liquid
from iapws.iapws97 import _PSat_T
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq, fsolve

FOLDER = os.path.dirname(os.path.abspath(__file__))
COLUMNS = ["id", "function", "inputs", "value", "unit", "rtol", "atol",
           "source"]


def exact(value):
    return repr(float(value))


def listed(values):
    return " ".join(exact(value) for value in values)


def write(name, rows):
    with open(os.path.join(FOLDER, name), "w", newline="") as file:
        writer = csv.writer(file, lineterminator="\n")
        writer.writerow(COLUMNS)
        writer.writerows(rows)


def water():
    """0 to 60 °C: the range of stations and then some."""
    source = "iapws (Python) %s, " % iapws.__version__
    for celsius in range(0, 61, 5):
        kelvin = celsius + 273.15
        liquid = _Liquid(kelvin)
        at = "temperature=" + exact(kelvin)
        yield ["iapws-pressure-%d" % celsius, "vapour_pressure", at,
               exact(_PSat_T(kelvin)), "MPa", "1e-12", "0",
               source + "_PSat_T"]
        yield ["iapws-density-%d" % celsius, "water_density", at,
               exact(liquid["rho"]), "kg/m3", "1e-12", "0",
               source + "_Liquid"]
        yield ["iapws-viscosity-%d" % celsius, "water_viscosity", at,
               exact(liquid["mu"]), "Pa s", "1e-12", "0",
               source + "_Liquid"]


def friction():
    """From the end of laminar flow up; where flow may be either, Colebrook
    is the larger of the two."""
    source = "fluids (Python) %s, " % fluids.__version__
    for reynolds in (2300.0, 3127.0, 4001.0, 12345.0, 1e5, 1e6, 1e7, 1e8):
        for relative in (0.0, 1e-6, 1e-5, 2e-4, 1e-3, 0.0117, 0.05):
            yield ["colebrook-%g-%g" % (reynolds, relative),
                   "friction_factor",
                   "reynolds=%s;relative_roughness=%s"
                   % (exact(reynolds), exact(relative)),
                   exact(fluids.friction.Colebrook(reynolds, relative)), "-",
                   "1e-12", "0", source + "friction.Colebrook"]
    for reynolds in (37.0, 640.0, 2000.0):
        yield ["laminar-%g" % reynolds, "friction_factor",
               "reynolds=%s;relative_roughness=0.001" % exact(reynolds),
               exact(fluids.friction.friction_laminar(reynolds)), "-",
               "1e-12", "0", source + "friction.friction_laminar"]


def air():
    """The library takes geometric height, the formula geopotential."""
    source = ("fluids (Python) %s, ATMOSPHERE_1976 at the geometric height "
              "of this geopotential one" % fluids.__version__)
    radius = 6356766.0
    for altitude in (-1000, -500, 0, 100, 305, 610, 1000, 1524, 2000, 3048,
                     5000, 8000, 10999):
        geometric = radius * altitude / (radius - altitude)
        yield [("fluids-air-%d" % altitude).replace("--", "-minus-"),
               "standard_atmosphere",
               "altitude=%d" % altitude,
               exact(fluids.ATMOSPHERE_1976(geometric).P), "Pa", "1e-6", "0",
               source]


# Flow, head.  Uneven steps, a droop, a flat stretch, an end that turns.
CURVES = {
    "falling": ([0.0, 0.021, 0.047, 0.06, 0.0835, 0.11],
                [41.2, 40.3, 36.9, 33.4, 25.05, 11.7]),
    "droop": ([0.0, 0.011, 0.025, 0.04, 0.052, 0.066],
              [30.1, 31.6, 31.9, 28.8, 23.3, 13.9]),
    "flat": ([0.01, 0.02, 0.031, 0.045, 0.05], [22.5, 22.5, 20.2, 20.2, 9.3]),
    "npshr": ([0.013, 0.03, 0.049, 0.07], [2.13, 2.385, 3.71, 7.02]),
    "turning": ([0.0, 1.0, 1.3, 4.0], [5.0, 1.0, 4.9, 5.2]),
    "three": ([0.005, 0.05, 0.08], [33.3, 29.1, 17.9]),
    "two": ([0.0, 0.037], [19.9, 12.3]),
}


def curves():
    """Between the points, and the slopes at both ends."""
    source = "scipy %s, PchipInterpolator" % scipy.__version__
    for name, (x, y) in CURVES.items():
        curve = PchipInterpolator(x, y)
        points = "x=%s;y=%s;at=" % (listed(x), listed(y))
        places = [a + share * (b - a) for a, b in zip(x, x[1:])
                  for share in (0.271, 0.83)]
        for number, place in enumerate(places):
            yield ["pchip-%s-%d" % (name, number), "curve_at",
                   points + exact(place), exact(curve(place)), "-", "1e-12",
                   "1e-12", source]
        for end, place in (("start", x[0]), ("middle", places[1]),
                           ("end", x[-1])):
            yield ["pchip-%s-slope-%s" % (name, end), "curve_slope_at",
                   points + exact(place), exact(curve(place, 1)), "-",
                   "1e-11", "1e-11", source]


def duties():
    """The crossing at the larger flow, right of the curve's summit."""
    source = "scipy %s, brentq on PchipInterpolator" % scipy.__version__
    cases = (("falling", 12.7, 1830.0), ("falling", 29.6, 640.0),
             ("falling", 3.1, 2900.0), ("droop", 30.5, 310.0),
             ("droop", 14.2, 4100.0), ("droop", 31.0, 120.0),
             ("flat", 11.3, 2200.0), ("two", 9.4, 5300.0))
    for number, (name, static, coefficient) in enumerate(cases):
        x, y = CURVES[name]
        curve = PchipInterpolator(x, y)
        summit = x[int(numpy.argmax(y))]
        flow = brentq(lambda q: float(curve(q)) - static
                      - coefficient * q * q, summit, x[-1], xtol=1e-16,
                      rtol=1e-15)
        inputs = ("pump_flow=%s;pump_head=%s;static_head=%s;coefficient=%s"
                  % (listed(x), listed(y), exact(static),
                     exact(coefficient)))
        yield ["duty-%d-flow" % number, "duty_flow", inputs, exact(flow),
               "m3/s", "1e-12", "0", source]
        yield ["duty-%d-head" % number, "duty_head", inputs,
               exact(curve(flow)), "m", "1e-12", "0", source]


# Pumps together.  A pipe: from, own, length, bore, roughness, K; a pump: its
# pipe, how many there are, flows, heads; the delivery: length, bore,
# roughness, K.
STRONG = ([0.0, 0.021, 0.047, 0.0835], [41.2, 40.3, 36.9, 25.05])
MIDDLE = ([0.0, 0.025, 0.04, 0.066], [38.3, 36.1, 32.8, 23.9])
WEAK = ([0.0, 0.02, 0.031, 0.05], [24.1, 22.5, 20.2, 13.3])
LATE = ([0.013, 0.03, 0.049, 0.07], [39.7, 38.2, 33.9, 25.1])
HEADER = [(-1, 0, 23.7, 0.41, 1.3e-4, 0.83), (0, 0, 12.3, 0.31, 2.1e-4, 0.37)]
BRANCH = (1, 1, 3.17, 0.207, 0.9e-4, 1.31)
STATIONS = (
    ("two-unlike", HEADER + [BRANCH, BRANCH], [(2, 1, STRONG), (3, 1, MIDDLE)],
     24.3, 0, (1234.0, 0.303, 1.7e-4, 3.29), 1.13e-6),
    ("three-and-two", HEADER + [BRANCH, (0, 1, 7.9, 0.253, 4.1e-4, 2.07)],
     [(2, 3, MIDDLE), (3, 2, LATE)],
     21.9, 0, (871.0, 0.517, 0.6e-4, 5.1), 1.31e-6),
    ("one-stands", HEADER + [BRANCH, BRANCH], [(2, 2, STRONG), (3, 1, WEAK)],
     19.7, 0, (640.0, 0.351, 2.3e-4, 1.9), 0.9e-6),
    ("gauge-on-main", HEADER + [BRANCH, BRANCH, (0, 1, 2.3, 0.197, 1e-5, 0.9)],
     [(2, 1, STRONG), (3, 1, MIDDLE), (4, 2, LATE)],
     13.1, 1, (2130.0, 0.413, 3.3e-4, 7.7), 1.004e-6),
)
GRAVITY = 9.80665


def pipe_head(flow, length, bore, roughness, k, viscosity):
    velocity = 4 * flow / (math.pi * bore ** 2)
    reynolds = velocity * bore / viscosity
    if flow <= 0:
        return 0.0
    factor = (64 / reynolds if reynolds < 2300 else
              fluids.friction.Colebrook(reynolds, roughness / bore))
    return (factor * length / bore + k) * velocity ** 2 / (2 * GRAVITY)


def excess_heads(flows, pipes, pumps, curves, static, gauge, delivery,
                 viscosity):
    """Each pump's head less what is asked of it."""
    ways = []
    for pump in pumps:
        way = [pump[0]]
        while pipes[way[-1]][0] >= 0:
            way.append(pipes[way[-1]][0])
        ways.append(way)
    through = [sum((1 if pipe[1] else pump[1]) * flow
                   for flow, pump, way in zip(flows, pumps, ways) if at in way)
               for at, pipe in enumerate(pipes)]
    total = sum(flow * pump[1] for flow, pump in zip(flows, pumps))
    common = static + pipe_head(total, *delivery, viscosity)
    result = []
    for flow, curve, way in zip(flows, curves, ways):
        asked = common + sum(pipe_head(through[at], *pipes[at][2:], viscosity)
                             for at in way)
        if gauge:
            bore = pipes[way[-1]][3]
            velocity = 4 * through[way[-1]] / (math.pi * bore ** 2)
            asked -= velocity ** 2 / (2 * GRAVITY)
        result.append(float(curve(flow)) - asked)
    return result


def flows_together(pipes, pumps, static, gauge, delivery, viscosity):
    """Of all sets of pumps that may run, the one whose others cannot open
    their check valves."""
    curves = [PchipInterpolator(*pump[2]) for pump in pumps]
    found = []
    for runs in itertools.product((True, False), repeat=len(pumps)):
        at = [i for i, running in enumerate(runs) if running]

        def excess(free):
            flows = numpy.zeros(len(pumps))
            flows[at] = free
            return excess_heads(flows, pipes, pumps, curves, static, gauge,
                                delivery, viscosity)
        free = [0.6 * pumps[i][2][0][-1] for i in at]
        if at:
            free, _, success, _ = fsolve(
                lambda free: [excess(free)[i] for i in at], free, xtol=1e-15,
                full_output=True)
        left = excess(free)
        if (all(abs(left[i]) < 1e-12 and flow > 0
                for i, flow in zip(at, free)) and
                all(left[i] <= 0 for i in range(len(pumps)) if i not in at)):
            flows = numpy.zeros(len(pumps))
            flows[at] = free
            found.append(flows)
    assert len(found) == 1, found
    for flow, pump in zip(found[0], pumps):
        assert flow == 0 or pump[2][0][0] <= flow <= pump[2][0][-1], flow
    return found[0]


def together():
    source = ("scipy %s, fsolve on PchipInterpolator, with fluids (Python) %s,"
              " friction.Colebrook" % (scipy.__version__, fluids.__version__))
    for name, pipes, pumps, static, gauge, delivery, viscosity in STATIONS:
        inputs = ";".join(
            ["pipe_%s=%s" % (column, listed(values)) for column, values in
             zip(("from", "own", "length", "bore", "roughness", "k"),
                 zip(*pipes))] +
            ["pump_pipe=" + listed(pump[0] for pump in pumps),
             "pump_count=" + listed(pump[1] for pump in pumps),
             "pump_flow=" + " ".join(listed(pump[2][0]) for pump in pumps),
             "pump_head=" + " ".join(listed(pump[2][1]) for pump in pumps),
             "static_head=" + exact(static), "gauge=%d" % gauge] +
            ["delivery_%s=%s" % (column, exact(value)) for column, value in
             zip(("length", "bore", "roughness", "k"), delivery)] +
            ["viscosity=" + exact(viscosity)])
        flows = flows_together(pipes, pumps, static, gauge, delivery,
                               viscosity)
        for number, flow in enumerate(flows):
            yield ["together-%s-%d" % (name, number), "together_flow",
                   inputs + ";of_pump=%d" % number, exact(flow), "m3/s",
                   "1e-12", "0", source]


if __name__ == "__main__":
    write("iapws.csv", water())
    write("fluids.csv", list(friction()) + list(air()))
    write("scipy.csv", list(curves()) + list(duties()) + list(together()))
