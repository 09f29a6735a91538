"""Which pumps and running sets differ in nothing but their names."""
import itertools

from inventory import CORNERS, Unbounded

# What no figure rests on.
NAMES = ("line", "station_id", "pump_id", "suction_pipe_id", "curve_id",
         "position", "note", "in_service", "year_installed", "motor_power",
         "straight_run", "stages", "rated_head", "rated_speed", "max_speed")


def known(figure, *arguments):
    try:
        return figure(*arguments)
    except Unbounded:
        return None


def figures_of(record):
    return tuple(sorted((name, value) for name, value in record.items()
                        if name not in NAMES
                        and not name.endswith("_grade")))


def pump_form(pump):
    """All that tells it from another on the same pipe."""
    if pump.form is None:
        inventory = pump.station.inventory
        pump.form = repr((
            figures_of(pump.record), pump.path[:1] != [] and pump.lift(),
            pump.speeds(), pump.rated_ratio(),
            [curve and (curve.x, curve.y)
             for curve in (pump.head, pump.npshr)], pump.unsure(),
            pump.record.get("curve_id") in inventory.short_curves))
    return pump.form


def pipe_form(station, pipe):
    key = pipe["pipe_id"]
    if key not in station.pipe_forms:
        inventory = station.inventory
        rough = [known(station.pipe_roughness, pipe, end) if "bore" in pipe
                 else None for end in CORNERS]
        station.pipe_forms[key] = repr((
            pipe.get("length"), pipe.get("bore"), rough,
            pipe.get("hazen_williams_c") if rough == [None] * 3 else None,
            [known(station.pipe_k, pipe, end) for end in CORNERS],
            key in inventory.short_fittings,
            bool(inventory.fittings[key])))
    return station.pipe_forms[key]


def set_form(station, pumps, marked):
    """Equal for sets that are the same tree of pipes and pumps."""
    leaves, below, tops = {}, {}, set()
    for pump in pumps:
        form = ("marked " if pump is marked else "pump ") + pump_form(pump)
        keys = [pipe["pipe_id"] for pipe in pump.path]
        leaves.setdefault(keys[0] if keys else None, []).append(form)
        for pipe, above in zip(pump.path, pump.path[1:] + [None]):
            if above is None:
                tops.add(pipe["pipe_id"])
            else:
                below.setdefault(above["pipe_id"], set()).add(pipe["pipe_id"])

    def of_pipe(key):
        inner = [of_pipe(one) for one in below.get(key, ())]
        return "(%s %s)" % (
            pipe_form(station, station.inventory.pipes[key]),
            " ".join(sorted(inner + leaves.get(key, []))))
    return " ".join(sorted([of_pipe(key) for key in tops]
                           + leaves.get(None, [])))


def twins(station, pumps):
    """Groups of pumps that can take each other's place, each on a pipe of
    its own from the same place."""
    groups = {}
    for pump in pumps:
        own = pump.path[0] if pump.path else None
        alone = own is None or sum(
            own["pipe_id"] in other.pipe_keys for other in station.pumps) == 1
        groups.setdefault(
            (pump_form(pump), own and pipe_form(station, own),
             own.get("draws_from") if own else None,
             None if alone else own["pipe_id"]), []).append(pump)
    return list(groups.values())


def unlike_sets(station, pump, most):
    """Every set of 1 to so many pumps with this one that is unlike those
    before it, the smaller first."""
    groups = twins(station, [one for one in station.pumps
                             if one is not pump])
    counts = [count for count in itertools.product(
        *(range(len(group) + 1) for group in groups)) if sum(count) < most]
    out = {}
    for count in sorted(counts, key=sum):
        pumps = (pump, *(one for group, n in zip(groups, count)
                         for one in group[:n]))
        out.setdefault(set_form(station, pumps, pump), pumps)
    return list(out.values())
