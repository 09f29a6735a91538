#!/usr/bin/python3
"""Compares the hydraulics with general-purpose libraries over whole ranges.

    compare.py HYDRAULICS_SHARED_OBJECT

The argument is the program's own hydraulics, compiled as a shared object
(`make compare` does both).  Prints one table: for each quantity its range,
the number of points, the library, the largest absolute and relative
difference and the largest that is allowed.  Fails when one is exceeded, and
when a figure is missing where the library has one.
"""
import ctypes
import math
import sys

import fluids
import gsw
import iapws
import numpy
import scipy
from fluids.friction import Clamond, Colebrook
from iapws import IAPWS95, IAPWS97
from iapws._iapws import _Liquid
from iapws.iapws08 import _Tb
from iapws.iapws97 import _PSat_T
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq

# Where library and program solve the same equation, what is allowed is
# some hundreds or thousands of roundings.  Elsewhere two equations for one
# thing are compared, and little more than their known difference is allowed:
# IAPWS-95 and IF97 against shorter ones, TEOS-10 against EOS-80, geometric
# against geopotential height.
SEED = 20260
DOUBLE = ctypes.c_double
HEAD = ctypes.CFUNCTYPE(DOUBLE, ctypes.c_void_p, DOUBLE)
FOUND = 0
EARTH = 6356766.0  # m, the radius of the standard atmosphere


class View(ctypes.Structure):
    _fields_ = [("x", ctypes.POINTER(DOUBLE)),
                ("y", ctypes.POINTER(DOUBLE)), ("count", ctypes.c_size_t)]


class System(ctypes.Structure):
    _fields_ = [("head", HEAD), ("context", ctypes.c_void_p)]


class Point(ctypes.Structure):
    _fields_ = [("flow", DOUBLE), ("head", DOUBLE), ("residual", DOUBLE),
                ("iterations", ctypes.c_int)]


def load(path):
    ours = ctypes.CDLL(path)
    for name, count in (("vapour_pressure", 1), ("water_density", 1),
                        ("water_viscosity", 1), ("seawater_density", 2),
                        ("seawater_vapour_pressure", 2),
                        ("standard_atmosphere", 1), ("friction_factor", 2)):
        function = getattr(ours, "sl_" + name)
        function.restype = DOUBLE
        function.argtypes = [DOUBLE] * count
    for name in ("sl_curve_at", "sl_curve_slope_at"):
        function = getattr(ours, name)
        function.restype = DOUBLE
        function.argtypes = [ctypes.POINTER(View), DOUBLE]
    ours.sl_operating_point_find.restype = ctypes.c_int
    ours.sl_operating_point_find.argtypes = [
        ctypes.POINTER(View), ctypes.POINTER(System), DOUBLE,
        ctypes.POINTER(Point)]
    return ours


def view(x, y):
    numbers = DOUBLE * len(x)
    return View(numbers(*x), numbers(*y), len(x))


class Table:
    """The rows so far, and whether each keeps to its tolerance."""

    def __init__(self):
        self.rows = []
        self.failures = []

    def add(self, quantity, unit, over, library, pairs, allowed):
        """Pairs of ours and theirs, or triples whose last is what the
        difference is relative to (else theirs).  `allowed` is relative."""
        absolute = relative = 0.0
        count = 0
        for ours, theirs, *scale in pairs:
            count += 1
            apart = abs(ours - theirs)
            if not math.isfinite(apart):
                self.failures.append("%s: ours %r, theirs %r"
                                     % (quantity, ours, theirs))
                continue
            absolute = max(absolute, apart)
            against = abs(scale[0] if scale else theirs)
            relative = max(relative, apart / against if apart else 0.0)
        if count < 50:
            self.failures.append("%s: only %d points" % (quantity, count))
        if relative > allowed:
            self.failures.append("%s: %.3g is more than %.3g"
                                 % (quantity, relative, allowed))
        self.rows.append((quantity, over, "%d" % count, library,
                          ("%.2g %s" % (absolute, unit)).strip(),
                          "%.2g" % relative,
                          "%.2g" % allowed))

    def show(self):
        print("| quantity | range | points | library | largest difference "
              "| relative | allowed |")
        print("|---|---|---:|---|---:|---:|---:|")
        for row in self.rows:
            print("| " + " | ".join(row) + " |")


def between(random, low, high):
    return float(random.uniform(low, high))


def random_curve(random, monotone):
    """3 to 12 points at uneven steps; heights from 1 up, so that a relative
    difference means something.  Others than monotone ones also stand still
    in places."""
    count = int(random.integers(3, 13))
    x = numpy.cumsum(random.uniform(0.003, 0.1, count))
    if monotone:
        y = 1 + numpy.cumsum(random.uniform(0.01, 9.0, count))
        if random.integers(2):
            y = y[::-1]
    else:
        y = random.uniform(1.0, 40.0, count)
        still = int(random.integers(1, count))
        if random.integers(3) == 0:
            y[still] = y[still - 1]
    return [float(a) for a in x], [float(a) for a in y]


def compare_curves(table, ours):
    random = numpy.random.default_rng(SEED)
    library = "scipy %s PchipInterpolator" % scipy.__version__
    for monotone in (True, False):
        kind = "monotone" if monotone else "any"
        values, ends = [], []
        for _ in range(1000):
            x, y = random_curve(random, monotone)
            curve, points = PchipInterpolator(x, y), view(x, y)
            steepest = float(max(abs(numpy.diff(y) / numpy.diff(x))))
            places = [between(random, x[0], x[-1]) for _ in range(20)]
            for place, theirs in zip(places, curve(places)):
                values.append((ours.sl_curve_at(points, place), theirs))
            for place, theirs in zip((x[0], x[-1]),
                                     curve([x[0], x[-1]], 1)):
                ends.append((ours.sl_curve_slope_at(points, place), theirs,
                             steepest))
        over = "1000 random curves of 3 to 12 points, " + kind
        table.add("F19 curve", "m", over, library, values, 1e-13)
        table.add("F19 end slopes, against the steepest secant",
                  "m/(m³/s)", over, library, ends, 1e-12)


def falling_pump(random):
    """Points of a falling head, and a system that crosses it between."""
    count = int(random.integers(3, 11))
    flow = numpy.concatenate(([0.0], numpy.cumsum(
        random.uniform(0.004, 0.05, count - 1))))
    head = 4 + numpy.cumsum(random.uniform(0.1, 8.0, count))[::-1]
    static = between(random, 0.0, head[0] - 0.1)
    least = max(0.0, head[-1] - static) / flow[-1] ** 2
    return ([float(a) for a in flow], [float(a) for a in head], static,
            least * between(random, 1.001, 6.0) + between(random, 1.0, 50.0))


def compare_roots(table, ours):
    random = numpy.random.default_rng(SEED + 1)
    pairs, heads = [], []
    for _ in range(2000):
        flow, head, static, coefficient = falling_pump(random)
        curve = PchipInterpolator(flow, head)
        theirs = brentq(lambda q: float(curve(q)) - static
                        - coefficient * q * q, flow[0], flow[-1],
                        xtol=1e-17, rtol=1e-15)
        callback = HEAD(lambda _, q: static + coefficient * q * q)
        point = Point()
        end = ours.sl_operating_point_find(
            view(flow, head), System(callback, None), 0.0, point)
        pairs.append((point.flow if end == FOUND else math.nan, theirs))
        heads.append((point.head if end == FOUND else math.nan,
                      float(curve(theirs))))
    over = "2000 random falling curves and square-law systems"
    library = "scipy %s brentq" % scipy.__version__
    table.add("F20 operating flow", "m³/s", over, library, pairs, 1e-12)
    table.add("F20 operating head", "m", over, library, heads, 1e-12)


def compare_friction(table, ours):
    numbers = [2300.0 * (1e8 / 2300.0) ** (i / 120) for i in range(121)]
    rough = [0.0] + [1e-7 * (0.05 / 1e-7) ** (i / 40) for i in range(41)]
    over = "Re 2300 to 1e8, ε/D 0 to 0.05"
    grid = [(re, eps) for re in numbers for eps in rough]
    factors = [ours.sl_friction_factor(re, eps) for re, eps in grid]
    for name, theirs in (("Clamond", lambda re, eps: Clamond(re, eps)),
                         ("Colebrook, solved numerically",
                          lambda re, eps: Colebrook(re, eps, tol=1e-15))):
        table.add("F8 friction factor", "", over,
                  "fluids %s %s" % (fluids.__version__, name),
                  [(f, theirs(*at)) for f, at in zip(factors, grid)], 1e-12)
    table.add("F8 friction factor", "", over,
              "scipy %s brentq on the equation itself" % scipy.__version__,
              [(f, 1 / colebrook_root(*at) ** 2)
               for f, at in zip(factors, grid)], 1e-12)


def colebrook_root(reynolds, relative):
    return brentq(lambda x: x + 2 * math.log10(relative / 3.7
                                               + 2.51 * x / reynolds),
                  0.1, 100.0, xtol=1e-16, rtol=1e-15)


def compare_water(table, ours):
    library = "iapws %s " % iapws.__version__
    kelvins = [273.15 + i / 4 for i in range(241)]
    coarse = kelvins[::4]
    liquid = {k: _Liquid(k) for k in kelvins}
    over = "0 to 60 °C"
    table.add("F2 vapour pressure", "Pa", over, library + "IAPWS-IF97",
              [(ours.sl_vapour_pressure(k), _PSat_T(k) * 1e6)
               for k in kelvins], 1e-12)
    # IAPWS-95 begins at the triple point.
    table.add("F2 vapour pressure", "Pa", "0.01 to 60 °C",
              library + "IAPWS-95",
              [(ours.sl_vapour_pressure(k), IAPWS95(T=k, x=0).P * 1e6)
               for k in [273.16] + coarse[1:]], 1e-4)
    for name, key, function, unit, full, allowed in (
            ("F3 density", "rho", ours.sl_water_density, "kg/m³",
             lambda k: IAPWS97(T=k, P=0.1).rho, 2e-5),
            ("F4 viscosity", "mu", ours.sl_water_viscosity, "Pa s",
             lambda k: IAPWS97(T=k, P=0.1).mu, 5e-5)):
        table.add(name, unit, over, library + "SR6-08",
                  [(function(k), liquid[k][key]) for k in kelvins], 1e-12)
        table.add(name, unit, "1 to 60 °C", library + "IAPWS-IF97, 0.1 MPa",
                  [(function(k), full(k)) for k in coarse[1:]], allowed)


def compare_air(table, ours):
    library = "fluids %s ATMOSPHERE_1976" % fluids.__version__
    heights = [-400.0 + 25 * i for i in range(217)]

    def geometric(height):
        return EARTH * height / (EARTH - height)

    def theirs(height):
        return float(fluids.ATMOSPHERE_1976(height).P)

    table.add("F6 air, geopotential heights", "Pa", "-400 to 5000 m", library,
              [(ours.sl_standard_atmosphere(h), theirs(geometric(h)))
               for h in heights], 1e-6)
    table.add("F6 air, an elevation put in as it is", "Pa", "-400 to 5000 m",
              library, [(ours.sl_standard_atmosphere(h), theirs(h))
                        for h in heights], 6e-4)


def compare_sea(table, ours):
    """TEOS-10's exact density at the sea's surface, of reference salinity,
    which is another and later equation of state than F17's."""
    pairs = []
    for degree in range(0, 41):
        for salinity in range(0, 43, 2):
            absolute = float(gsw.SR_from_SP(salinity))
            pairs.append((ours.sl_seawater_density(degree + 273.15, salinity),
                          float(gsw.rho_t_exact(absolute, degree, 0.0))))
    table.add("F17 density of seawater", "kg/m³", "0 to 40 °C, salinity 0 "
              "to 42", "gsw %s rho_t_exact" % gsw.__version__, pairs, 1.5e-5)


def boiling_sea(pressure, kelvin, absolute_salinity):
    """The vapour pressure at `kelvin` by the temperature at which seawater
    boils under a pressure near it; fresh water's curve, which is as steep,
    leads over the last hundredths of a kelvin."""
    boils = _Tb(pressure / 1e6, absolute_salinity / 1e3)
    return pressure * _PSat_T(kelvin) / _PSat_T(boils)


def compare_sea_vapour(table, ours):
    pairs = []
    for degree in range(1, 40, 2):
        for salinity in range(0, 41, 5):
            kelvin = degree + 273.15
            pressure = ours.sl_seawater_vapour_pressure(kelvin, salinity)
            absolute = float(gsw.SR_from_SP(salinity))
            pairs.append((pressure, boiling_sea(pressure, kelvin, absolute)))
    table.add("F5 vapour pressure of seawater", "Pa", "1 to 39 °C, salinity "
              "0 to 40", "iapws %s IAPWS-08" % iapws.__version__, pairs,
              1.8e-3)


def main(path):
    ours = load(path)
    table = Table()
    for compare in (compare_curves, compare_roots, compare_friction,
                    compare_water, compare_air, compare_sea,
                    compare_sea_vapour):
        compare(table, ours)
    table.show()
    for failure in table.failures[:20]:
        print("FAILED: " + failure, file=sys.stderr)
    return 1 if table.failures else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1]))
