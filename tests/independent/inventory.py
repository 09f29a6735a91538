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
    "rpm": 1.0, "w": 1.0, "kw": 1e3, "hp": 550 * 0.3048 * POUND_FORCE,
}
PURE = ("discharge_minor_k", "hazen_williams_c")  # no unit at the end
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
                value = number(text)
                if value is not None:
                    out[name[:-len(unit) - 1]] = (
                        KELVIN[unit](value) if unit in KELVIN
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


def rejected_keys(folder, name):
    """The keys of a file's rejected records, by findings.csv."""
    with open(os.path.join(folder, "findings.csv"), newline="",
              encoding="utf-8") as file:
        return {row["record_id"] for row in csv.DictReader(file)
                if row["file"] == name and row["severity"] == "error"}


class Inventory:
    def __init__(self, folder, out):
        self.stations = by_key(read(folder, "stations.csv"), "station_id")
        self.pumps = by_key(read(folder, "pumps.csv"), "pump_id")
        self.pipes = by_key(read(folder, "suction_pipes.csv"), "pipe_id")
        self.curves = collections.defaultdict(list)
        for point in read(folder, "curves.csv"):
            if "curve_id" in point and "flow" in point:
                self.curves[point["curve_id"]].append(point)
        self.fittings = collections.defaultdict(list)
        for fitting in read(folder, "suction_fittings.csv"):
            self.fittings[fitting.get("pipe_id")].append(fitting)
        self.short_fittings = rejected_keys(out, "suction_fittings.csv")
        self.short_curves = rejected_keys(out, "curves.csv")
        lost = rejected_keys(out, "pumps.csv")
        self.short_stations = {
            row.get("station_id") for row in read(folder, "pumps.csv")
            if row.get("pump_id", "") in lost}

    def path(self, pump):
        """The pipes from the pump up to the source."""
        pipes, key = [], pump.get("suction_pipe_id")
        while key in self.pipes:
            pipes.append(self.pipes[key])
            key = pipes[-1].get("draws_from")
        return pipes


class Published:
    """The published values, and nothing else, of the store."""

    def __init__(self, path):
        db = sqlite3.connect("file:%s?mode=ro" % path, uri=True)
        self.fitting = {words(f): k for f, *k in db.execute(
            "SELECT fitting, typical, adverse, favourable FROM fitting_k")}
        self.roughness = {words(m): e for m, *e in db.execute(
            "SELECT material, good, fair, poor FROM roughness")}
        self.defaults = {(f, c): v for f, c, *v in db.execute(
            "SELECT field, circumstance, typical, adverse, favourable"
            " FROM defaults")}
        self.rules = {r: v for r, *v in db.execute(
            "SELECT rule, ratio, floor FROM margin_rules")}
        self.conditions = {c: dict(zip(
            ("level", "discharge", "pressure", "summer", "storm"), v))
            for c, *v in db.execute(
                "SELECT condition, level, discharge, pressure,"
                " summer_temperature, storm_barometer FROM conditions")}
        db.close()

    def default(self, field, circumstance=""):
        found = self.defaults.get((field, circumstance))
        return found or self.defaults[(field, "")]


def pick(interval, corner):
    value = interval[CORNERS.index(corner)]
    if value is None:
        raise Unbounded
    return value
