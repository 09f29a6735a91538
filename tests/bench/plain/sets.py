"""One running set: all its flows at once, and one pump's head balance."""
import collections
import itertools

import numpy
from scipy.optimize import root

from inventory import Unbounded
from physics import (darcy, hazen_williams, operating_flow, standard_air,
                     velocity_head, water_at)

TERMS = ("atmosphere", "barometer", "gauge", "elevation", "velocity",
         "friction", "minor", "vapour", "gas")
LARGEST_SET_ALL_TRIED = 16

# The corner each group of unknowns is at; the temperature in K.
Setting = collections.namedtuple(
    "Setting", "air source own others discharge machine kelvin")


def setting(corner, kelvin):
    return Setting(corner, corner, corner, corner, corner, corner, kelvin)


def running_sets(station, pump, flow_alone):
    """Every set of 1 to m pumps that holds this one."""
    others = [one for one in station.pumps if one is not pump]
    most = station.most_running()
    if len(station.pumps) > LARGEST_SET_ALL_TRIED:
        others.sort(key=lambda one: -(flow_alone(one) or 0.0))
        return [(pump, *others[:count]) for count in range(most)]
    return [(pump, *some) for count in range(most)
            for some in itertools.combinations(others, count)]


class RunningSet:
    """The set at a setting; `own` is the pump it is looked at for, whose way
    from the source has the corner `own`."""

    def __init__(self, station, pumps, own, at, imposed=None):
        self.station, self.own, self.at = station, own, at
        self.water = water_at(at.kelvin, station.salinity())
        self.pumps = pumps
        self.static = None
        self.ways = {}
        imposed = imposed or {}
        self.flows, self.past = {}, None
        free = []
        for pump in pumps:
            if pump.key in imposed:
                self.flows[pump.key] = imposed[pump.key]
            elif pump.solved:
                free.append(pump)
            else:
                self.flows[pump.key] = self.given(pump)
        if free and not None in self.flows.values():
            self.solve(free)
        else:
            self.flows.update((pump.key, None) for pump in free)

    def given(self, pump):
        """Another's flow loads what it shares at its typical one."""
        try:
            return pump.given_flow(self.at.machine if pump is self.own
                                   else "typical")
        except Unbounded:
            return None

    # -- losses

    def corner_of(self, pump):
        def corner(pipe_key):
            mine = (pump is self.own if pipe_key is None
                    else pipe_key in self.own.pipe_keys)
            return self.at.own if mine else self.at.others
        return corner

    def way(self, pump):
        if pump.key not in self.ways:
            self.ways[pump.key] = pump.ways(self.corner_of(pump),
                                            self.pumps)
        return self.ways[pump.key]

    def through(self, pipe_key):
        return sum(self.flows[pump.key] for pump in self.pumps
                   if pipe_key in pump.pipe_keys)

    def suction(self, pump):
        """Friction and minor losses at the flows there are."""
        parts, friction, minor, bell = self.way(pump)
        for key, length, bore, rough, c, k in parts:
            flow = self.through(key)
            if rough is None:
                friction += hazen_williams(flow, length, bore, c)
            else:
                friction += darcy(flow, length, bore, rough, self.water)
            minor += k * velocity_head(flow, bore)
        if bell is not None:
            minor += bell[1] * velocity_head(self.flows[pump.key], bell[0])
        return friction, minor

    def velocity(self, pump):
        """Only a gauge on a pipe shows static pressure (F1)."""
        if self.station.source_kind()[0] != "main" or not pump.path:
            return 0.0
        first = pump.path[-1]
        if "bore" not in first:
            raise Unbounded
        return velocity_head(self.through(first["pipe_id"]), first["bore"])

    # -- flows

    def lost_in_discharge(self):
        flow = sum(self.flows.values())
        if self.discharge[0] == "measured":
            return self.discharge[2] * (flow / self.discharge[1]) ** 2
        _, length, bore, rough, k = self.discharge
        return (darcy(flow, length, bore, rough, self.water)
                + k * velocity_head(flow, bore))

    def head_asked(self, pump):
        """F12, of this pump with the flows of all."""
        return (self.static + self.lost_in_discharge()
                + sum(self.suction(pump)) - self.velocity(pump))

    def alone(self, pump):
        """Its flow, the others' as they are."""
        def system(flow):
            self.flows[pump.key] = flow
            return self.head_asked(pump)
        flow = operating_flow(pump.head, system)
        self.flows[pump.key] = flow
        return flow

    def solve(self, free):
        """Coordinate by coordinate until it is near, then all at once."""
        station, at = self.station, self.at
        self.static = (station.discharge_level(at.discharge)
                       - station.surface(at.source)
                       - self.water.head(station.pressure(at.source)))
        self.discharge = station.discharge(at.discharge)
        for pump in free:
            self.way(pump)
            self.flows[pump.key] = 0.0
        if len(free) == 1:
            self.alone(free[0])
        else:
            for _ in range(60):
                if self.sweeps(free, 4) or self.together(free):
                    break
            else:
                self.flows.update((pump.key, float("nan")) for pump in free)
        for pump in free:
            if self.flows[pump.key] != self.flows[pump.key]:
                self.past = pump.key
                self.flows.update((one.key, None) for one in free)
                return

    def sweeps(self, free, count):
        for _ in range(count):
            moved = 0.0
            for pump in free:
                before = self.flows[pump.key]
                moved = max(moved, abs(self.alone(pump) - before))
            if not moved > 1e-14:
                return True
        return False

    def together(self, free):
        runs = [pump for pump in free if self.flows[pump.key] > 0]
        start = [self.flows[pump.key] for pump in runs]
        if not runs:
            return False

        def residual(flows):
            for pump, flow in zip(runs, flows):
                self.flows[pump.key] = max(0.0, float(flow))
            return [pump.head.carried(float(flow)) - self.head_asked(pump)
                    for pump, flow in zip(runs, flows)]
        found = root(residual, start, method="hybr",
                     options={"xtol": 1e-15})
        good = (numpy.max(numpy.abs(residual(found.x))) < 1e-10
                and min(found.x) > 0
                and all(x <= 3 * pump.head.x[-1]
                        for pump, x in zip(runs, found.x)))
        if not good:
            for pump, flow in zip(runs, start):
                self.flows[pump.key] = flow
            return False
        return all(self.still_stands(pump) for pump in free
                   if pump not in runs)

    def still_stands(self, pump):
        kept = self.flows[pump.key]
        stands = self.alone(pump) == 0
        self.flows[pump.key] = kept
        return stands

    # -- the balance of the pump it is looked at for

    def terms(self):
        """Those that are not known are None."""
        station, own, at = self.station, self.own, self.at
        head = self.water.head
        losses = known(self.suction, own) or (None, None)
        values = (
            known(lambda: head(standard_air(station.altitude(at.air)))),
            known(lambda: -head(station.barometer_fall(at.air))),
            known(lambda: head(station.pressure(at.source))),
            known(lambda: station.surface(at.source) - own.datum(at.air)),
            known(self.velocity, own),
            None if losses[0] is None else -losses[0],
            None if losses[1] is None else -losses[1],
            -head(self.water.vapour),
            known(lambda: -station.gas(at.air)))
        return dict(zip(TERMS, values))


def known(function, *arguments):
    """None where a figure has no bound or rests on something unknown."""
    try:
        value = function(*arguments)
    except (Unbounded, KeyError, TypeError):
        return None
    unknown = isinstance(value, float) and value != value
    return None if unknown else value
