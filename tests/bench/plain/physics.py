"""Water, air, friction and curves, by iapws, fluids and scipy."""
import bisect
import functools
import math

import fluids
from iapws._iapws import _Liquid
from iapws.iapws97 import _PSat_T
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq

G = 9.80665
INCH = 0.0254
EARTH_RADIUS = 6356766.0  # m, of the US Standard Atmosphere 1976


@functools.lru_cache(maxsize=None)
def water_at(kelvin, salinity):
    return Water(kelvin, salinity)


class Water:
    """F2, F3, F4; F5 and F17 for seawater."""

    def __init__(self, kelvin, salinity):
        liquid = _Liquid(kelvin)
        self.kelvin = kelvin
        self.rho, self.nu = liquid["rho"], liquid["mu"] / liquid["rho"]
        self.vapour = _PSat_T(kelvin) * 1e6
        if salinity is not None:
            self.vapour = 101325 * math.exp(
                24.4543 - 67.4509 * 100 / kelvin
                - 4.8489 * math.log(kelvin / 100) - 0.000544 * salinity)
            self.rho = sea_density(kelvin - 273.15, salinity)
            self.nu = liquid["mu"] / self.rho

    def head(self, pressure):
        return pressure / (self.rho * G)


def sea_density(t, s):
    def poly(*c):
        return sum(x * t ** i for i, x in enumerate(c))
    fresh = poly(999.842594, 6.793952e-2, -9.095290e-3, 1.001685e-4,
                 -1.120083e-6, 6.536332e-9)
    a = poly(8.24493e-1, -4.0899e-3, 7.6438e-5, -8.2467e-7, 5.3875e-9)
    b = poly(-5.72466e-3, 1.0227e-4, -1.6546e-6)
    return fresh + s * (a + b * math.sqrt(s) + 4.8314e-4 * s)


def standard_air(height):
    geometric = EARTH_RADIUS * height / (EARTH_RADIUS - height)
    return fluids.ATMOSPHERE_1976(geometric).P


def altitude_of(pressure):
    """Where standard air is as thin: F6 turned round."""
    return brentq(lambda height: standard_air(height) - pressure,
                  -1000, 11000, xtol=1e-9)


def velocity_head(flow, bore):
    return (4 * flow / (math.pi * bore ** 2)) ** 2 / (2 * G)


def factor(reynolds, relative):
    if relative > 0.1:  # beyond Colebrook (F8)
        return math.nan
    laminar = 64 / reynolds
    if reynolds < 2300:
        return laminar
    turbulent = fluids.friction.Clamond(reynolds, relative)
    return turbulent if reynolds > 4000 else max(laminar, turbulent)


def darcy(flow, length, bore, roughness, water):
    if flow <= 0:
        return 0.0
    reynolds = 4 * flow / (math.pi * bore * water.nu)
    return (factor(reynolds, roughness / bore) * length / bore
            * velocity_head(flow, bore))


def hazen_williams(flow, length, bore, c):
    return 10.67 * length * flow ** 1.852 / (c ** 1.852 * bore ** 4.87)


def small_bore(k, bore):
    return k * (1 + 0.05 * max(0.0, 12 - bore / INCH))


class Curve:
    """Points of one quantity over flow, scaled to the pump's speed."""

    def __init__(self, flows, values):
        order = sorted(range(len(flows)), key=lambda i: flows[i])
        self.x = [flows[i] for i in order]
        self.y = [values[i] for i in order]
        shape = PchipInterpolator(self.x, self.y)
        self.pieces = [tuple(float(c) for c in shape.c[:, k])
                       for k in range(len(self.x) - 1)]

    def holds(self, flow):
        return self.x[0] <= flow <= self.x[-1]

    def _piece(self, flow):
        k = min(max(bisect.bisect_right(self.x, flow) - 1, 0),
                len(self.pieces) - 1)
        return self.pieces[k], flow - self.x[k]

    def slope(self, flow):
        (a, b, c, _), s = self._piece(min(max(flow, self.x[0]), self.x[-1]))
        return (3 * a * s + 2 * b) * s + c

    def at(self, flow):
        """NaN off the points."""
        return self.carried(flow) if self.holds(flow) else math.nan

    def carried(self, flow):
        """Carried on straight at the end slopes."""
        inside = min(max(flow, self.x[0]), self.x[-1])
        (a, b, c, d), s = self._piece(inside)
        value = ((a * s + b) * s + c) * s + d
        if inside != flow:
            value += self.slope(inside) * (flow - inside)
        return value


def operating_flow(curve, system):
    """The crossing at the largest flow where pump and system are equal
    (F20): 0 where the pump stands, NaN past the curve as it is carried on."""
    def excess(flow):
        return curve.carried(flow) - system(flow)

    def root(low, high):
        return brentq(excess, low, high, xtol=1e-16, rtol=1e-15)
    last = curve.x[-1]
    if excess(last) >= 0:
        return math.nan if excess(3 * last) > 0 else root(last, 3 * last)
    high = last
    for start, end in reversed(list(zip([0.0] + curve.x, curve.x))):
        if end <= start:
            continue
        rises = curve.carried(start) < curve.carried(end)
        steps = 16 if rises else 1
        for i in reversed(range(steps)):
            low = start + (end - start) * i / steps
            if excess(low) > 0:
                return root(low, high)
            high = low
    return 0.0
