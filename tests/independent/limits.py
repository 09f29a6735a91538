"""How far level, temperature and flow may go until the rule is just met."""
from scipy.optimize import brentq

from inventory import Unbounded
from sets import setting

REACH = 20.0  # m about the source level
WAYS = [1 / 32, 1 / 16, 1 / 8, 1 / 4, 1 / 2, 1]
COLDEST, WARMEST, WARMEST_SEA = 273.15, 333.15, 313.15
SETS = 64


def least_surplus(case, pump, sets, kelvin, imposed=None):
    """Over the sets in which it runs, all at their typical values; None
    where one has no figure."""
    least = None
    for pumps in sets:
        found = case.figures(pump, pumps, setting("typical", kelvin),
                             "typical", imposed)
        if found is not None:
            if found["surplus"] is None:
                return None
            least = (found["surplus"] if least is None
                     else min(least, found["surplus"]))
    return least


def met(value):
    return value is not None and value >= 0


def farthest(surplus, now, better, worse):
    """(end, value): where the rule is just met."""
    first = surplus(now)
    end = worse if met(first) else better
    there = surplus(end)
    if there is not None:
        if met(there) == met(first):
            return ("always" if met(first) else "none"), None
        return between(surplus, (now, first), (end, there))
    before = now, first
    for part in WAYS:
        here = now + (end - now) * part
        value = surplus(here)
        if met(value) != met(first):
            return between(surplus, before, (here, value))
        before = here, value
    return "unknown", None


def between(surplus, one, other):
    """Halved until both sides have figures, or until they are one."""
    while one[1] is None or other[1] is None:
        if abs(other[0] - one[0]) <= 1e-12 * max(1e-3, abs(one[0])):
            return "figures end", (one if met(one[1]) else other)[0]
        middle = (one[0] + other[0]) / 2
        value = surplus(middle)
        if met(value) == met(one[1]):
            one = middle, value
        else:
            other = middle, value

    def worth(x):
        value = surplus(x)
        return -1000.0 if value is None else value
    return "found", brentq(worth, one[0], other[0], xtol=1e-11, rtol=1e-14)


def limits(case, pump, governing, typical):
    """By what is looked for, from the typical figures of every set."""
    station = case.station
    kelvin = station.temperature("typical")
    unknown = ("unknown", None)
    now = next(found for one, found in typical if one is governing)
    if now is None or now["surplus"] is None:
        return {"level": unknown, "temperature": unknown, "flow": unknown}

    def order(pair):
        found = pair[1]
        if found is None:
            return 1e9
        return -1e9 if found["surplus"] is None else found["surplus"]
    typical = [pair for pair in typical if pair[1] is not None]
    sets = [one for one, _ in (
        sorted(typical, key=order)[:SETS] if len(typical) > SETS
        else typical)]

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
        at_flow, min(max(now["flow"], pump.npshr.x[0]), pump.npshr.x[-1]),
        pump.npshr.x[0], pump.npshr.x[-1])
    return out
