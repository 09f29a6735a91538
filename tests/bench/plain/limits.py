"""How far level, temperature and flow may go until the rule is just met."""
from scipy.optimize import brentq

from inventory import Unbounded
from sets import running_sets, setting

NOT_MET = -1000.0  # m, for a set without a figure
REACH = 20.0  # m about the source level
STEPS = 16
COLDEST, WARMEST, WARMEST_SEA = 273.15, 333.15, 313.15


def least_surplus(case, pump, sets, kelvin, imposed=None):
    """Over the sets in which it runs, all at their typical values."""
    least = None
    for pumps in sets:
        found = case.figures(pump, pumps, setting("typical", kelvin),
                             "typical", imposed)
        if found is not None:
            surplus = found["surplus"]
            surplus = NOT_MET if surplus is None else surplus
            least = surplus if least is None else min(least, surplus)
    return NOT_MET if least is None else least


def farthest(surplus, now, good, bad):
    """(end, value): where it is just met, on the way from where it is to bad
    where it is met, to good where it is not (there in steps, since past the
    ends of a curve it is not met either)."""
    if surplus(now) >= 0:
        if surplus(bad) >= 0:
            return "always", None
        return "found", brentq(surplus, now, bad, xtol=1e-11, rtol=1e-14)
    before = now
    for step in range(1, STEPS + 1):
        here = now + (good - now) * step / STEPS
        if surplus(here) >= 0:
            return "found", brentq(surplus, before, here, xtol=1e-11,
                                   rtol=1e-14)
        before = here
    return "none", None


def limits(case, pump, governing):
    station = case.station
    kelvin = station.temperature("typical")
    sets = running_sets(station, pump, case.flow_alone)
    unknown = ("unknown", None)
    found = case.figures(pump, governing, setting("typical", kelvin),
                         "typical")
    if found is None or found["surplus"] is None:
        return {"level": unknown, "temperature": unknown, "flow": unknown}

    def at_level(level):
        station.shift = 0.0
        station.shift = level - station.surface("typical")
        try:
            return least_surplus(case, pump, sets, kelvin)
        finally:
            station.shift = 0.0

    def at_temperature(warm):
        return least_surplus(case, pump, sets, warm)

    def at_flow(flow):
        return least_surplus(case, pump, [governing], kelvin,
                             {pump.key: flow})
    out = {}
    try:
        surface = station.surface("typical")
        out["level"] = farthest(at_level, surface, surface + REACH,
                                surface - REACH)
    except Unbounded:
        out["level"] = unknown
    sea = station.salinity() is not None
    out["temperature"] = farthest(at_temperature, kelvin, COLDEST,
                                  WARMEST_SEA if sea else WARMEST)
    out["flow"] = unknown if pump.npshr is None else farthest(
        at_flow, min(max(found["flow"], pump.npshr.x[0]), pump.npshr.x[-1]),
        pump.npshr.x[0], pump.npshr.x[-1])
    return out
