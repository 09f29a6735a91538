"""The typical, adverse and favourable figures of a pump over its sets."""
from scipy.optimize import minimize_scalar

from alike import set_form
from inventory import Unbounded
from limits import limits
from rules import judge, state
from sets import (TERMS, RunningSet, every_set, known, running_sets,
                  setting)
from values import Station

FIGURES = ("flow", "npsha", "npshr", "required", "margin", "surplus")
NOTHING = dict.fromkeys(FIGURES + TERMS)
PARTS = [i / 8 for i in range(9)]
A_LITTLE = 0.002  # of the way between the flows of others
A_LITTLE_WARMER = 0.02  # K
EQUAL = 1e-9  # m, between sets
STOOD = None  # in place of figures


class StationCase:
    """All pumps of a station under one condition, judged by one rule."""

    def __init__(self, station, rule, with_limits=False):
        self.with_limits = with_limits
        self.station, self.rule = station, rule
        self.typical_sets = {}
        self.ratio = station.published.largest_ratio()
        self.worth = "surplus"  # what the searches are made for
        self.kept = {}
        self.standings = set()  # of the cases of a corner
        self.found = {}

    # -- one solved case

    def figures(self, pump, pumps, at, corner, imposed=None, beside=()):
        """The pump's figures in a set; STOOD where it stands in it."""
        key = (pump.key, frozenset(one.key for one in pumps), at, corner,
               self.station.shift, frozenset(one.key for one in beside),
               imposed and tuple(sorted(imposed.items())))
        if key not in self.kept:
            try:
                solved = RunningSet(self.station, pumps, pump, at, imposed,
                                    beside)
            except Unbounded:
                solved = None
            self.kept[key] = (
                self.unsolved(pump, beside or pumps, at, corner) if solved is None
                else self.of_solved(solved, pump, at, corner, imposed))
        self.standings.add(self.kept[key] is STOOD)
        return self.kept[key]

    def unsolved(self, pump, pumps, at, corner):
        """No flow, but what does not rest on it."""
        return self.of_solved(
            RunningSet(self.station, pumps, pump, at,
                       {one.key: None for one in pumps}), pump, at, corner)

    def of_solved(self, solved, pump, at, corner, imposed=None):
        flow = solved.flows[pump.key]
        if flow == 0 and pump.solved and pump.key not in (imposed or {}):
            return STOOD
        found = dict(solved.terms(), flow=flow, kelvin=at.kelvin,
                     flows=solved.flows, past=solved.past is not None)
        terms = [found[name] for name in TERMS]
        found["npsha"] = None if None in terms else sum(terms)
        found["npshr"] = (None if flow is None
                          else known(pump.npshr_at, flow, at.machine))
        return judge(self.rule, pump, found, corner)

    # -- typical

    def typical(self, pump, pumps):
        """All pumps of the set share the solution."""
        at = setting("typical", self.station.temperature("typical"))
        key = frozenset(one.key for one in pumps)
        if key not in self.typical_sets:
            try:
                self.typical_sets[key] = RunningSet(
                    self.station, pumps, pump, at)
            except Unbounded:
                self.typical_sets[key] = None
        solved = self.typical_sets[key]
        if solved is None:
            return self.unsolved(pump, pumps, at, "typical")
        solved.own = pump
        return self.of_solved(solved, pump, at, "typical")

    def flow_alone(self, pump):
        found = self.typical(pump, (pump,))
        return None if found is STOOD else found["flow"]

    # -- the corners of a set

    def decide(self, found, corner):
        """The worst (best) of the cases in which the pump runs; the first
        one without a figure, where there is one."""
        found = [one for one in found if one is not STOOD]
        for one in found:
            if one[self.worth] is None:
                return one
        if not found:
            return STOOD
        choose = min if corner == "adverse" else max
        return choose(found, key=lambda one: one[self.worth])

    def imposed(self, pump, pumps, a, b, part):
        """The others' flows part of the way from those of one case to those
        of another; a pump that is not in a case has none there."""
        return {one.key: (a.get(one.key) or 0.0) * (1 - part)
                + (b.get(one.key) or 0.0) * part
                for one in pumps if one is not pump}

    def has_adverse_suction(self, pump, own, pumps):
        def corner(key):
            return "typical" if key in own.pipe_keys else "adverse"
        try:
            pump.ways(corner, pumps)
            return True
        except Unbounded:
            return False

    def others_tried(self, pump, pumps, at, corner):
        """The worst (best) over the others' suctions."""
        if len(pumps) == 1:
            return [self.figures(pump, pumps, at, corner)]
        there = tuple(one for one in pumps if one is pump
                      or self.has_adverse_suction(one, pump, pumps))
        falls, shared = pump.npshr_falls(), any(
            one.pipe_keys & pump.pipe_keys for one in pumps[1:])
        all_there = len(there) == len(pumps)
        least = at._replace(others="adverse")
        most = at._replace(others="favourable")
        if corner == "adverse":
            from_nought = not all_there and (
                falls or not pump.ends_hold(self.ratio))
            if not from_nought and not falls and not shared:
                return [self.figures(pump, there, least, corner, None, pumps)]
        elif not falls and not shared:
            return [self.figures(pump, pumps, most, corner)]
        ends = [self.figures(pump, there, least, corner, None, pumps),
                self.figures(pump, pumps, most, corner)]
        if any(end is STOOD or end[self.worth] is None for end in ends):
            return ends if corner == "adverse" else ends[::-1]
        if corner == "adverse" and not all_there and not from_nought:
            return ends
        return self.flows_between(pump, pumps, most, corner, ends, all_there)

    def flows_between(self, pump, pumps, at, corner, ends, all_there):
        a, b = ends[0]["flows"], ends[1]["flows"]
        if all((a.get(one.key) or 0.0) == b[one.key] for one in pumps):
            return ends

        def part_way(part):
            return self.figures(pump, pumps, at, corner,
                                self.imposed(pump, pumps, a, b, part))

        def better(found, than):
            sign = 1 if corner == "adverse" else -1
            return found is STOOD or found[self.worth] is None or (
                sign * found[self.worth] < sign * than[self.worth])
        first = self.decide(ends, corner)
        probe = 0.5 if corner == "adverse" else (
            A_LITTLE if first is ends[0] else 1 - A_LITTLE)
        if all_there or corner == "adverse":
            if not better(part_way(probe), first):
                return ends
        found = [part_way(part) for part in PARTS[1:-1]]
        return ends + found + [self.closest(
            part_way, ends[:1] + found + ends[1:], corner)]

    def at_temperature(self, pump, pumps, at, corner):
        found = self.decide(self.others_tried(pump, pumps, at, corner),
                            corner)
        recorded = pump.record.get("largest_recorded_flow")
        if corner == "adverse" and len(pumps) == 1 and pump.solved and (
                recorded is not None and at.own == "adverse"
                and at.discharge == "adverse" and (
                    found is STOOD or (found["flow"] or recorded) < recorded)):
            return self.decide([found, self.figures(
                pump, pumps, at, corner, {pump.key: recorded})], corner)
        return found

    def temperatures_tried(self, pump, pumps, at, corner):
        def one(kelvin):
            return self.at_temperature(pump, pumps,
                                       at._replace(kelvin=kelvin), corner)
        kelvins = [known(self.station.temperature, end)
                   for end in ("favourable", "typical", "adverse")]
        if None in kelvins:
            return [self.without_temperature(pump, pumps, at, corner)]
        cold, typical, warm = kelvins
        if corner == "adverse":
            ends = [warm] if warm == cold else [warm, cold]
            found = [one(kelvin) for kelvin in ends]
            if len(pumps) == 1 and "largest_recorded_flow" in pump.record:
                recorded = self.recorded_typical(pump, pumps, at, typical)
                found += recorded
            return found
        first = one(cold)
        if warm <= cold:
            return [first]
        found = [first, one(cold + A_LITTLE_WARMER), one(typical)]
        if first is STOOD or any(other is STOOD or other[self.worth] is None
                                 for other in found) or (
                max(other[self.worth] for other in found[1:])
                <= first[self.worth]):
            return found

        def part_way(part):
            return one(cold + (warm - cold) * part)
        grid = [part_way(part) for part in PARTS]
        return found + grid + [self.closest(part_way, grid, corner)]

    def without_temperature(self, pump, pumps, at, corner):
        """Only a given flow does not rest on it, and NPSHR there."""
        if pump.solved:
            return NOTHING
        found = self.figures(pump, pumps, at._replace(
            kelvin=self.station.temperature("typical")), corner)
        return dict(NOTHING, **{name: found[name] for name in (
            "flow", "npshr", "required")})

    def recorded_typical(self, pump, pumps, at, kelvin):
        """At the typical temperature only the recorded flow is tried."""
        at = at._replace(kelvin=kelvin)
        recorded = pump.record["largest_recorded_flow"]
        if not pump.solved or (at.own, at.discharge) != ("adverse",
                                                         "adverse"):
            return []
        found = self.figures(pump, pumps, at, "adverse")
        if found is not STOOD and (found["flow"] or recorded) >= recorded:
            return []
        return [self.figures(pump, pumps, at, "adverse",
                             {pump.key: recorded})]

    def corner(self, pump, pumps, corner):
        """A corner of one set: STOOD where the pump stands in all cases."""
        at = setting(corner, 0.0)
        self.standings = set()

        def suction(at):
            def part_way(part):
                return self.decide(self.temperatures_tried(
                    pump, pumps, at._replace(source=part, own=part), corner),
                    corner)
            if not pump.solved or pump.ends_hold(self.ratio):
                return self.decide(self.temperatures_tried(
                    pump, pumps, at, corner), corner)
            return self.searched(part_way, at.own, corner)
        if not pump.solved or not pump.npshr_falls():
            found = suction(at)
        else:
            found = self.searched(
                lambda part: suction(at._replace(discharge=part)), corner,
                corner)
        if self.standings == {True, False}:
            return self.decide([found] + self.least_flow_tried(
                pump, pumps, at, corner), corner)
        return found

    def least_flow_tried(self, pump, pumps, at, corner):
        """Between standing and running it passes the least flow."""
        found = []
        for end in ("favourable", "adverse"):
            kelvin = known(self.station.temperature, end)
            for others in ("favourable", "adverse"):
                found.append(self.figures(
                    pump, pumps, at._replace(kelvin=kelvin, others=others),
                    corner, {pump.key: pump.least_flow()}))
        return [one for one in found if one[self.worth] is not None]

    def adverse(self, pump, pumps):
        """False where the set does not count."""
        for one in pumps[1:]:
            if one.unsure():
                if one.pipe_keys & pump.pipe_keys or pump.npshr_falls():
                    return NOTHING
                return False
        return self.corner(pump, pumps, "adverse")

    def favourable(self, pump, governing):
        """Of the governing set, of the pump alone, or the better."""
        alone = (pump,)
        if not ("pumps_running_max" in self.station.record and pump.solved
                and not any(one.unsure() for one in governing)):
            governing = alone
        found = [self.corner(pump, governing, "favourable")]
        if len(governing) > 1 and self.may_stand(pump, governing):
            found.append(self.corner(pump, alone, "favourable"))
        return self.decide(found, "favourable")

    def may_stand(self, pump, pumps):
        at = setting("favourable", self.station.temperature("typical"))
        found = self.figures(pump, pumps, at._replace(
            source="adverse", own="adverse"), "favourable")
        return found is STOOD or found["surplus"] is None

    # -- searches

    def closest(self, part_way, grid, corner):
        """The best of a function of a part, near the best of its nine
        steps."""
        worth = [None if one is STOOD else one[self.worth] for one in grid]
        if None in worth:
            return next((one for one in grid if one is not STOOD
                         and one[self.worth] is None), STOOD)
        sign = 1 if corner == "adverse" else -1
        i = worth.index((min if corner == "adverse" else max)(worth))

        def objective(part):
            found = part_way(part)
            if found is STOOD or found[self.worth] is None:
                return float("inf")
            return sign * found[self.worth]
        result = minimize_scalar(
            objective, bounds=(PARTS[max(i - 1, 0)], PARTS[min(i + 1, 8)]),
            method="bounded", options={"xatol": 1e-7})
        found = part_way(result.x)
        return found and dict(found, searched=True)

    def searched(self, part_way, end, corner):
        """All of the way between the ends."""
        try:
            # The ends by their names, at which the recorded flow is tried.
            grid = [part_way(part) for part in PARTS]
            grid[0 if corner == "adverse" else 8] = part_way(corner)
        except Unbounded:
            return NOTHING
        bare = [one for one in grid if one is not STOOD]
        if len(bare) < 9 or any(one[self.worth] is None for one in bare):
            return self.decide(
                bare if corner == "adverse" else bare[::-1], corner)
        found = self.decide(
            grid + [self.closest(part_way, grid, corner)], corner)
        return found and dict(found, searched=True)

    # -- all sets

    def governs(self, typical):
        """The pair of set and figures that is the typical corner."""
        for name in ("surplus", "npsha"):
            known_ones = [pair for pair in typical
                          if pair[1] is not STOOD
                          and pair[1][name] is not None]
            if known_ones:
                least = min(found[name] for _, found in known_ones)
                return min((pair for pair in known_ones
                            if pair[1][name] <= least + EQUAL),
                           key=lambda pair: (len(pair[0]),
                                             pair[1]["flow"] or 0.0))
        return next((pair for pair in typical if pair[1] is not STOOD), None)

    def over_sets(self, found):
        """The least; a set that has no case at all, since there is no adverse
        end, leaves the figures of the others, but neither margin nor
        surplus."""
        bare = [one for one in found if one is not STOOD
                and one["flow"] is not None]
        chosen = self.decide(bare, "adverse")
        if chosen is not STOOD and len(bare) < sum(
                one is not STOOD for one in found):
            return dict(chosen, margin=None, surplus=None)
        return chosen or next((one for one in found if one is not STOOD),
                              NOTHING)

    def corners(self, pump, sets, governing):
        """Worst and best; the margin is of a search of its own."""
        out = []
        for self.worth in ("margin", "surplus"):
            adverse = [found for found in (self.adverse(pump, one)
                                           for one in sets)
                       if found is not False]
            out.append((self.over_sets(adverse),
                        self.favourable(pump, governing) or NOTHING))
        return tuple(dict(by_surplus, own_margin=by_margin["margin"])
                     for by_margin, by_surplus in zip(*out))

    def pump(self, pump):
        """What is printed of a pump, over all its sets."""
        sets = running_sets(self.station, pump, self.flow_alone)
        typical = [(one, self.typical(pump, one)) for one in sets]
        runs = [found for _, found in typical if found is not STOOD]
        off_curve = any(found["past"] or (
            found["flow"] is not None and pump.off_curve(found["flow"]))
                        for found in runs)
        governing, figures = self.governs(typical) or (
            sets[0], self.unsolved(pump, sets[0], setting(
                "typical", self.station.temperature("typical")), "typical"))
        most = self.station.most_running()
        out = [found["surplus"] for one, found in typical
               if found is not STOOD and found["surplus"] is not None
               and len(one) == most - 1]
        worst, best = self.corners(pump, sets, governing)
        may_go = (limits(self, pump, governing, typical)
                  if self.with_limits else None)
        proven, likely = state(
            figures, worst, best, off_curve or not every_set(self.station))
        self.kept.clear()
        return {
            "typical": figures, "adverse": worst, "favourable": best,
            "state": proven, "likely": likely, "off_curve": off_curve,
            "stands": not runs, "flow_basis": pump.basis(),
            "governing": [one.key for one in governing],
            "one_out": min(out, default=None), "sets_tried": len(sets),
            "limits": may_go,
        }

    def of_every_pump(self):
        """Once for those that are alike."""
        out = {}
        for pump in self.station.pumps:
            form = set_form(self.station, self.station.pumps, pump)
            if form not in self.found:
                self.found[form] = self.pump(pump)
            out[pump.key] = self.found[form]
        return out


def recompute(inventory, published, station_key, condition, rule, year,
              with_limits=False):
    """Every pump of the station, by key."""
    station = Station(inventory, published, station_key, condition, year)
    case = StationCase(station, published.rules[rule], with_limits)
    return {key: dict(found, altitude=known(station.altitude, "typical"),
                      temperature=station.temperature("typical"))
            for key, found in case.of_every_pump().items()}
