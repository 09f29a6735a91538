"""The typical, adverse and favourable figures of a pump over its sets."""
from scipy.optimize import minimize_scalar

from inventory import Unbounded
from limits import limits
from rules import judge, state
from sets import TERMS, RunningSet, known, running_sets, setting
from values import Station

FIGURES = ("flow", "npsha", "npshr", "required", "margin", "surplus")
NOTHING = dict.fromkeys(FIGURES + TERMS)
SETS_FOR_LIMITS = 64  # beyond, they take too long here
PARTS = [i / 8 for i in range(9)]


class StationCase:
    """All pumps of a station under one condition, judged by one rule."""

    def __init__(self, station, rule, with_limits=False):
        self.with_limits = with_limits
        self.station, self.rule = station, rule
        self.typical_sets = {}
        self.ratio = station.published.largest_ratio()
        self.sets_tried = 0

    # -- one solved case

    def figures(self, pump, pumps, at, corner, imposed=None):
        """The pump's figures in a set; None where it stands in it."""
        try:
            solved = RunningSet(self.station, pumps, pump, at, imposed)
        except Unbounded:
            solved = None
        if solved is None:
            return self.unsolved(pump, pumps, at, corner)
        return self.of_solved(solved, pump, at, corner)

    def unsolved(self, pump, pumps, at, corner):
        """No flow, but what does not rest on it."""
        return self.of_solved(
            RunningSet(self.station, pumps, pump, at,
                       {one.key: None for one in pumps}), pump, at, corner)

    def of_solved(self, solved, pump, at, corner):
        flow = solved.flows[pump.key]
        if flow == 0 and pump.solved:
            return None
        found = dict(solved.terms(), flow=flow, kelvin=at.kelvin,
                     flows=solved.flows, past=solved.past == pump.key)
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
        return None if found is None else found["flow"]

    # -- the corners of a set

    def temperatures(self):
        """Coldest, typical, warmest; None where one has no figure."""
        return [known(self.station.temperature, corner)
                for corner in ("favourable", "typical", "adverse")]

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
        worse = min if corner == "adverse" else max
        if len(pumps) == 1:
            imposed = None
            if corner == "adverse":
                return [self.lone_adverse(pump, pumps, at)]
            return [self.figures(pump, pumps, at, corner)]
        there = tuple(one for one in pumps if one is pump
                      or self.has_adverse_suction(one, pump, pumps))
        ends = [self.figures(pump, there, at._replace(others="adverse"),
                             corner),
                self.figures(pump, pumps, at._replace(others="favourable"),
                             corner)]
        if any(end is None or end["surplus"] is None for end in ends):
            return ends
        a, b = ends[0]["flows"], ends[1]["flows"]
        if all((a.get(one.key) or 0.0) == b[one.key] for one in pumps):
            return ends

        def part_way(part):
            return self.figures(
                pump, pumps, at._replace(others="favourable"), corner,
                self.imposed(pump, pumps, a, b, part))
        half = part_way(0.5)
        if corner == "adverse":
            if half is None or half["surplus"] is None:
                return ends + [half]
            if half["surplus"] >= min(end["surplus"] for end in ends):
                return ends
        found = [part_way(part) for part in PARTS[1:-1]]
        return ends + found + [closest(part_way, ends[:1] + found + ends[1:],
                                       worse)]

    def lone_adverse(self, pump, pumps, at):
        """It runs at no less than its largest recorded flow."""
        found = self.figures(pump, pumps, at, "adverse")
        recorded = pump.record.get("largest_recorded_flow")
        if found is None or recorded is None or not pump.solved or (
                found["flow"] is None or found["flow"] >= recorded):
            return found
        return self.figures(pump, pumps, at, "adverse",
                            {pump.key: recorded})

    def temperatures_tried(self, pump, pumps, at, corner):
        def one(kelvin):
            return decide(self.others_tried(
                pump, pumps, at._replace(kelvin=kelvin), corner), corner)
        kelvins = self.temperatures()
        if None in kelvins:
            return [NOTHING]
        found = [one(kelvin) for kelvin in sorted(set(kelvins))]
        cold, _, warm = kelvins
        if corner == "adverse" or warm <= cold:
            return found
        first = found[0]
        if first is None or first["surplus"] is None:
            return found
        above = one(cold + 0.01)
        if above is None or above["surplus"] is None or (
                above["surplus"] <= first["surplus"]):
            return found

        def part_way(part):
            return one(cold + (warm - cold) * part)
        found += [part_way(part) for part in PARTS]
        return found + [closest(part_way, found[-9:], max)]

    def corner(self, pump, pumps, corner):
        """A corner of one set: NOTHING where it has none, None where the
        pump stands in it."""
        at = setting(corner, 0.0)

        def suction(at):
            def part_way(part):
                return decide(self.temperatures_tried(
                    pump, pumps, at._replace(source=part, own=part), corner),
                    corner)
            if not pump.solved or pump.ends_hold(self.ratio):
                return decide(self.temperatures_tried(pump, pumps, at,
                                                      corner), corner)
            return searched(part_way, corner)
        if not pump.solved or not pump.npshr_falls():
            return suction(at)
        return searched(lambda part: suction(at._replace(discharge=part)),
                        corner)

    def adverse(self, pump, pumps):
        """False where the set does not count."""
        for one in pumps[1:]:
            if not one.solved:
                if one.pipe_keys & pump.pipe_keys:
                    return NOTHING
                return False
        return self.corner(pump, pumps, "adverse")

    # -- all sets

    def pump(self, pump):
        """What is printed of a pump, over all its sets."""
        sets = running_sets(self.station, pump, self.flow_alone)
        self.sets_tried += len(sets)
        typical = [(one, self.typical(pump, one)) for one in sets]
        runs = [(one, found) for one, found in typical if found is not None]
        off_curve = any(found.get("past") or (
            found["flow"] is not None and pump.off_curve(found["flow"]))
                        for _, found in runs)
        judged = [pair for pair in runs if pair[1]["surplus"] is not None]
        governing, figures = (
            min(judged, key=lambda pair: pair[1]["surplus"]) if judged
            else runs[0] if runs
            else (sets[0], self.unsolved(pump, sets[0], setting(
                "typical", self.station.temperature("typical")), "typical")))
        may_go = (limits(self, pump, governing)
                  if self.with_limits and len(sets) <= SETS_FOR_LIMITS
                  else None)
        names = [one.key for one in governing]
        most = self.station.most_running()
        out = [found["surplus"] for one, found in judged
               if len(one) == most - 1]
        adverse = [found for found in (self.adverse(pump, one)
                                       for one in sets)
                   if found is not False]
        worst = decide(adverse, "adverse") or NOTHING
        if not ("pumps_running_max" in self.station.record
                and all(one.solved for one in governing)):
            governing = (pump,)
        best = self.corner(pump, governing, "favourable") or NOTHING
        proven, likely = state(figures, worst, best, off_curve)
        return {
            "typical": figures, "adverse": worst, "favourable": best,
            "state": proven, "likely": likely, "off_curve": off_curve,
            "stands": not runs, "flow_basis": pump.basis(),
            "governing": names,
            "one_out": min(out, default=None), "sets_tried": len(sets),
            "limits": may_go,
            "cases": len(sets) + (not pump.ends_hold(self.ratio))
            + pump.npshr_falls(),
        }


def decide(found, corner):
    """The worst (best) of the cases in which the pump runs; what one of
    them has no figure for, it has none for."""
    found = [one for one in found if one is not None]
    if not found:
        return None
    choose = min if corner == "adverse" else max
    for name in ("surplus", "npsha"):
        if all(one[name] is not None for one in found):
            chosen = choose(found, key=lambda one: one[name])
            break
    else:
        name = "npshr"
        if any(one[name] is None for one in found):
            chosen = found[0]
        else:
            chosen = (max if corner == "adverse" else min)(
                found, key=lambda one: one[name])
    return {name: value if not isinstance(value, float)
            or all(one.get(name) is not None for one in found) else None
            for name, value in chosen.items()}


def closest(part_way, grid, choose):
    """The best of a function of a part, near the best of its nine steps."""
    sign = 1 if choose is min else -1
    worth = [None if one is None else one["surplus"] for one in grid]
    if any(value is None for value in worth):
        return next((one for one in grid
                     if one is not None and one["surplus"] is None), None)
    i = worth.index(choose(worth))

    def objective(part):
        found = part_way(part)
        if found is None or found["surplus"] is None:
            return float("inf")
        return sign * found["surplus"]
    result = minimize_scalar(
        objective, bounds=(PARTS[max(i - 1, 0)], PARTS[min(i + 1, 8)]),
        method="bounded", options={"xatol": 1e-7})
    found = part_way(result.x)
    return found and dict(found, searched=True)


def searched(part_way, corner):
    """All of the way between the ends."""
    choose = min if corner == "adverse" else max
    try:
        grid = [part_way(part) for part in PARTS]
    except Unbounded:
        return NOTHING
    bare = [one for one in grid if one is not None]
    if any(one["surplus"] is None for one in bare):
        return decide(bare, corner)
    if len(bare) < len(grid):
        return decide(bare, corner)
    return decide(grid + [closest(part_way, grid, choose)], corner)


def recompute(inventory, published, station_key, condition, rule, year,
              with_limits=False):
    """Every pump of the station, by key."""
    station = Station(inventory, published, station_key, condition, year)
    case = StationCase(station, published.rules[rule], with_limits)
    return {pump.key: dict(
        case.pump(pump), altitude=known(station.altitude, "typical"),
        temperature=station.temperature("typical"))
        for pump in station.pumps}
