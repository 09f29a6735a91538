"""The typical, adverse and favourable figures of a row of pumps.csv."""
from balance import Case, value_of
from inventory import CORNERS


def judge(figures, rule):
    ratio, floor = rule
    npsha, npshr = figures["npsha_m"], figures["npshr_m"]
    figures["required_m"] = figures["margin_m"] = figures["surplus_m"] = None
    if npshr is not None:
        figures["required_m"] = max(ratio * npshr, npshr + floor)
        if npsha is not None:
            figures["margin_m"] = npsha - npshr
            figures["surplus_m"] = npsha - figures["required_m"]
    return figures


def corner_figures(case, corner, rule):
    """The temperature's three values are tried: the worst is the adverse,
    the best the favourable.  What is unknown at one of them is so at the
    corner; NPSHA is then judged alone."""
    if corner == "typical":
        return judge(case.at(corner).balance(), rule)
    found = [judge(case.at(corner, end).balance(), rule) for end in CORNERS]
    choose = min if corner == "adverse" else max
    out = {}
    for deciding in ("margin_m", "npsha_m", "npshr_m"):
        if all(figures[deciding] is not None for figures in found):
            out = choose(found, key=lambda figures: figures[deciding])
            break
    return {name: value for name, value in out.items()
            if all(figures[name] is not None for figures in found)}


def runs_beside_another(inventory, pump, in_its_water):
    """Its adverse end then holds other pumps' flow in the pipes it shares."""
    station = inventory.stations[pump["station_id"]]
    if station.get("pumps_running_max") == "1":
        return False
    mine = {p["pipe_id"] for p in inventory.path(pump)}
    if mine and pump["station_id"] in inventory.short_stations:
        return True  # beside a pump that was rejected
    if mine and any(other is not pump and not inventory.path(other)
                    and other["station_id"] == pump["station_id"]
                    and not in_its_water(other)
                    for other in inventory.pumps.values()
                    if "station_id" in other):
        return True  # beside one that may draw through the same pipe
    return any(other is not pump
               and mine & {p["pipe_id"] for p in inventory.path(other)}
               for other in inventory.pumps.values())


def state(figures, adverse_known):
    """By the corners; None where the adverse one is not recomputed."""
    favourable = figures["surplus_favourable_m"]
    if favourable is not None and figures["margin_favourable_m"] < 0:
        return "short"
    if favourable is not None and favourable < 0:
        return "thin"
    if not adverse_known:
        return None
    adverse = figures["surplus_adverse_m"]
    return "clear" if adverse is not None and adverse >= 0 else "unproven"


def recompute(inventory, published, row):
    """All figures of a row of pumps.csv by column, and those left out."""
    pump = inventory.pumps[row["pump_id"]]
    case = Case(inventory, published, pump, row["condition"], "typical")
    rule = published.rules[row["margin_rule"]]
    out = dict(corner_figures(case, "typical", rule))
    shared = runs_beside_another(
        inventory, pump,
        lambda other: Case(inventory, published, other, row["condition"],
                           "typical").wet())
    for corner in ("adverse", "favourable"):
        figures = corner_figures(case, corner, rule)
        for name in ("npsha", "npshr", "margin", "surplus"):
            out["%s_%s_m" % (name, corner)] = figures.get(name + "_m")
    out["flow_basis"] = case.basis()
    out["off_curve"] = "yes" if (
        out["flow_l_s"] is not None and case.npshr_curve() is not None
        and out["npshr_m"] is None) else "no"
    out["stands"] = "yes" if (
        case.basis() == "solved" and out["flow_l_s"] is None
        and value_of(case.surface) is not None) else "no"
    out["state"] = state(out, not shared)
    left_out = {name for name in out if shared and "_adverse_" in name}
    if out["state"] is None:
        left_out.add("state")
    return out, left_out
