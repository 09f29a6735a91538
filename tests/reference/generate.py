#!/usr/bin/python3
"""Writes iapws.csv, fluids.csv and scipy.csv into this script's folder.

The values are those of general-purpose libraries, whose name and version
each row carries; the program and its tests never need them.  Run it again
only to renew the values, and read the difference.
"""
import csv
import os

import fluids
import iapws
import numpy
import scipy
from iapws._iapws import _Liquid
from iapws.iapws97 import _PSat_T
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq

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


if __name__ == "__main__":
    write("iapws.csv", water())
    write("fluids.csv", list(friction()) + list(air()))
    write("scipy.csv", list(curves()) + list(duties()))
