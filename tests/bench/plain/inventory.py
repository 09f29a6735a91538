"""Reads the inventory's CSV files and the store's published values."""
import collections
import csv
import os
import sqlite3

INCH = 0.0254
GALLON = 231 * INCH ** 3
POUND_FORCE = 0.45359237 * 9.80665

UNITS = {
    "m": 1.0, "ft": 0.3048, "cm": 0.01, "mm": 0.001, "in": INCH,
    "l_s": 1e-3, "gpm": GALLON / 60, "m3_s": 1.0, "m3_h": 1 / 3600,
    "mgd": 1e6 * GALLON / 86400, "cfs": 0.3048 ** 3,
    "pa": 1.0, "hpa": 100.0, "kpa": 1e3, "bar": 1e5,
    "psi": POUND_FORCE / INCH ** 2, "inhg": 3386.389,
    "delta_c": 1.0, "delta_f": 5 / 9,
    "rpm": 1.0, "w": 1.0, "kw": 1e3, "hp": 550 * 0.3048 * POUND_FORCE,
}
PURE = ("discharge_minor_k", "hazen_williams_c")  # no unit at the end
DIFFERENCES = ("temperature_addition",)  # a K of these is not a temperature
KELVIN = {"c": lambda t: t + 273.15, "k": lambda t: t,
          "f": lambda t: (t + 459.67) / 1.8}
CORNERS = ("typical", "adverse", "favourable")


class Unbounded(Exception):
    """A figure that has no honest value at this corner."""


def number(text):
    try:
        value = float(text)
    except ValueError:
        return None
    return value


def record(row, line):
    """Cells by column, dimensional ones in SI without their unit."""
    out = {"line": line}
    for name, text in row.items():
        if name is None:
            continue
        name, text = name.strip().lower(), (text or "").strip()
        if not text:
            continue
        for unit in list(UNITS) + list(KELVIN):
            if name not in PURE and name.endswith("_" + unit):
                value, field = number(text), name[:-len(unit) - 1]
                if value is not None:
                    out[field] = (
                        value if field in DIFFERENCES and unit == "k"
                        else KELVIN[unit](value) if unit in KELVIN
                        else value * UNITS[unit])
                break
        else:
            out[name] = text
    return out


def words(text):
    """Words without regard to case, hyphens and underscores."""
    return text.lower().replace("-", " ").replace("_", " ")


def read(folder, name):
    path = os.path.join(folder, name)
    if not os.path.exists(path):
        return []
    with open(path, newline="", encoding="utf-8-sig") as file:
        reader = csv.DictReader(file)
        return [record(row, reader.line_num) for row in reader]


def by_key(records, key):
    """The first record of a key counts; a later one is rejected."""
    out = {}
    for one in records:
        if key in one:
            out.setdefault(one[key], one)
    return out


def rejected_lines(folder):
    """(file, line) of each record with an error, by findings.csv."""
    with open(os.path.join(folder, "findings.csv"), newline="",
              encoding="utf-8") as file:
        return {(row["file"], int(row["line"]))
                for row in csv.DictReader(file) if row["severity"] == "error"}


class Inventory:
    """The records that were kept, and where others were rejected."""

    def __init__(self, folder, out):
        lost = rejected_lines(out)
        self.folder = folder
        records, rejected = {}, {}
        for name in ("stations", "pumps", "suction_pipes", "curves",
                     "suction_fittings", "conditions", "margin_rules"):
            every = read(folder, name + ".csv")
            gone = [r for r in every if (name + ".csv", r["line"]) in lost]
            records[name] = [r for r in every if r not in gone
                             and words(r.get("in_service", "yes")) != "no"]
            rejected[name] = gone
        self.stations = by_key(records["stations"], "station_id")
        self.pumps = {
            key: pump for key, pump in by_key(records["pumps"],
                                              "pump_id").items()
            if pump.get("station_id") in self.stations}
        self.pipes = by_key(records["suction_pipes"], "pipe_id")
        self.curves = collections.defaultdict(list)
        for point in records["curves"]:
            self.curves[point["curve_id"]].append(point)
        self.fittings = collections.defaultdict(list)
        for fitting in records["suction_fittings"]:
            self.fittings[fitting["pipe_id"]].append(fitting)
        self.conditions = records["conditions"]
        self.margin_rules = records["margin_rules"]
        self.short_fittings = {
            r.get("pipe_id") for r in rejected["suction_fittings"]}
        self.short_curves = {r.get("curve_id") for r in rejected["curves"]}
        self.short_stations = {r.get("station_id") for r in rejected["pumps"]}

    def of_station(self, key):
        return [self.pumps[name] for name in sorted(self.pumps)
                if self.pumps[name]["station_id"] == key]

    def path(self, pump):
        """The pipes from the pump up to the source."""
        pipes, key = [], pump.get("suction_pipe_id")
        while key in self.pipes:
            pipes.append(self.pipes[key])
            key = pipes[-1].get("draws_from")
        return pipes


class Published:
    """The published values, and nothing else, of the store; an inventory's
    own conditions stand in place of the shipped ones, its rules beside."""

    def __init__(self, path, inventory):
        db = sqlite3.connect("file:%s?mode=ro" % path, uri=True)
        self.fitting = {words(f): k for f, *k in db.execute(
            "SELECT fitting, typical, adverse, favourable FROM fitting_k")}
        self.roughness = {words(m): e for m, *e in db.execute(
            "SELECT material, good, fair, poor FROM roughness")}
        self.ageing = {(words(m), c): e for m, c, *e in db.execute(
            "SELECT material, condition, typical, adverse, favourable"
            " FROM ageing")}
        self.defaults = {(f, c): v for f, c, *v in db.execute(
            "SELECT field, circumstance, typical, adverse, favourable"
            " FROM defaults")}
        self.high_energy = {c: v for c, v in db.execute(
            "SELECT circumstance, highest FROM check_limits"
            " WHERE check_name = 'suction energy'")}
        self.rules = {r: Rule(r, *v) for r, *v in db.execute(
            "SELECT rule, make_up, measure, lift_limit FROM margin_rules"
            " ORDER BY place")}
        for rule, *tier in db.execute(
                "SELECT rule, over, ratio, floor FROM margin_tiers"
                " ORDER BY rule, tier"):
            self.rules[rule].tiers.append(tuple(tier))
        self.conditions = {
            c: dict(zip(CONDITION_FIELDS, v)) for c, *v in db.execute(
                "SELECT condition, level, level_addition, discharge,"
                " pressure, summer_temperature, temperature_addition,"
                " storm_barometer, suction_friction, discharge_friction"
                " FROM conditions ORDER BY place")}
        db.close()
        if inventory.conditions:
            self.conditions = {c["condition"]: owner_condition(c)
                               for c in inventory.conditions}
        for own in inventory.margin_rules:
            rule = Rule(own["rule"], None, "none", None)
            rule.tiers.append((None, float(own["ratio"]), own["floor"]))
            self.rules[own["rule"]] = rule

    def default(self, field, circumstance=""):
        found = self.defaults.get((field, circumstance))
        return found or self.defaults[(field, "")]

    def largest_ratio(self):
        return max(ratio for rule in self.rules.values()
                   for _, ratio, _ in rule.tiers)


class Rule:
    def __init__(self, name, make_up, measure, lift_limit):
        self.name = name
        self.make_up = None if make_up is None else words(make_up)
        self.measure, self.lift_limit = measure, lift_limit
        self.tiers = []


CONDITION_FIELDS = (
    "level", "level_addition", "discharge", "pressure", "summer",
    "temperature_addition", "storm", "suction_friction", "discharge_friction")


def owner_condition(own):
    """What is left out takes the choice that lessens the margin."""
    level = words(own["level_basis"])
    return {
        "level": {"lowest": "low", "cut out": "cut-out"}.get(level, level),
        "level_addition": own.get("level_addition", 0.0),
        "discharge": words(own.get("discharge_basis", "low")),
        "pressure": words(own.get("pressure_basis", "low")),
        "summer": words(own["temperature_basis"]) == "summer",
        "temperature_addition": own.get("temperature_addition", 0.0),
        "storm": words(own.get("barometer", "storm low")) == "storm low",
        "suction_friction": words(own.get("suction_friction", "aged")),
        "discharge_friction": words(own.get("discharge_friction", "new")),
    }


def pick(interval, corner):
    value = interval[CORNERS.index(corner)]
    if value is None:
        raise Unbounded
    return value


def between(figure, corner):
    """A figure at a corner, or a part of the way from the adverse to the
    favourable one."""
    if isinstance(corner, str):
        return figure(corner)
    worst, best = figure("adverse"), figure("favourable")
    return worst + (best - worst) * corner
