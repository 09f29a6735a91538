#!/usr/bin/python3
"""Recomputes what an audit found, by other means, and compares.

    recompute.py INVENTORY OUTPUT_DIR
    recompute.py INVENTORY OUTPUT_DIR --sheet STATION
    recompute.py INVENTORY OUTPUT_DIR --every N     only each Nth station

A second implementation of docs/formulas.md and docs/inventory.md: running
sets, flows, head balances, corners, margin rules and states.  It shares no
code with the program: it reads the inventory's CSV files and what findings.csv
says was rejected; from the store only the published values, and the rule and
year of the evaluation.  Properties of water, friction factors, curves and
roots are those of iapws, fluids and scipy.  What OUTPUT_DIR/pumps.csv and the
store's pump_results say is only compared with.

Exit status: 0 all figures agree; 1 some do not, or fewer than three stations
could be compared; 2 usage.
"""
import collections
import concurrent.futures
import csv
import functools
import os
import sqlite3
import sys

sys.dont_write_bytecode = True

import fluids  # noqa: E402
import iapws  # noqa: E402
import scipy  # noqa: E402

from corners import recompute  # noqa: E402
from inventory import CORNERS, Inventory, Published  # noqa: E402
from sets import TERMS  # noqa: E402

WORDS = ("flow_basis", "off_curve", "stands", "state", "likely")
HEADS = ("npsha", "npshr", "required", "margin", "surplus")
# In the store heads are kept to the last bit.  Standard air differs by
# 1.4e-8 of itself between the two (1.5e-7 m); flows by what the solvers leave.
HEAD_TOLERANCE = 1e-6  # m
STORED = collections.OrderedDict(
    [("flow_" + corner, 1e-9) for corner in CORNERS]
    + [(name, HEAD_TOLERANCE) for name in TERMS]
    + [("%s_%s" % (head, corner), HEAD_TOLERANCE)
       for head in HEADS for corner in CORNERS]
    + [("altitude", 1e-3), ("temperature", 1e-9)])
# Where a corner is the best of all between two ends, its surplus is as flat
# there as a parabola: what it is made of is known less closely.
SEARCHED = {"flow": 1e-5, "npsha": 1e-4, "npshr": 1e-4, "required": 1e-4,
            "margin": 1e-4}
# What is printed is rounded: half of the last digit, and a little.
PRINTED = collections.OrderedDict(
    [("flow_l_s", 0.0051), ("temperature_c", 0.0501), ("altitude_m", 0.00051)]
    + [(name + "_m", 0.00051) for name in TERMS + HEADS]
    + [("%s_%s_m" % (head, corner), 0.00051)
       for corner in CORNERS[1:]
       for head in ("npsha", "npshr", "margin", "surplus")])


def tolerance_of(name, found, tolerance):
    head, _, corner = name.partition("_")
    if corner in CORNERS and found[corner].get("searched"):
        return SEARCHED.get(head, tolerance)
    return tolerance


def stored_figures(found):
    """By the columns of pump_results."""
    out = {"flow_" + corner: found[corner]["flow"] for corner in CORNERS}
    out.update((name, found["typical"][name]) for name in TERMS)
    out.update(("%s_%s" % (head, corner), found[corner][head])
               for head in HEADS for corner in CORNERS)
    out.update(altitude=found["altitude"], temperature=found["temperature"])
    return out


def printed_figures(stored):
    """By the columns of pumps.csv."""
    flow = stored["flow_typical"]
    out = {"flow_l_s": None if flow is None else 1e3 * flow,
           "temperature_c": stored["temperature"] - 273.15,
           "altitude_m": stored["altitude"]}
    for name in TERMS:
        out[name + "_m"] = stored[name]
    for head in HEADS:
        out[head + "_m"] = stored[head + "_typical"]
        for corner in CORNERS[1:]:
            out["%s_%s_m" % (head, corner)] = stored[
                "%s_%s" % (head, corner)]
    return out


# Columns that a store may have beside.
BESIDE = {"one_out_surplus": HEAD_TOLERANCE, "limit_level": 1e-6,
          "limit_temperature": 1e-5, "limit_flow": 1e-8}
BESIDE_WORDS = ("running", "sets_tried", "limit_level_end",
                "limit_temperature_end", "limit_flow_end")


def beside(found):
    """By the columns of pump_results."""
    out = {"one_out_surplus": found["one_out"],
           "running": len(found["governing"]),
           "sets_tried": found["sets_tried"]}
    for name, (end, value) in (found["limits"] or {}).items():
        out["limit_" + name] = value
        out["limit_%s_end" % name] = end
    return out


# Of a corner without a surplus in either, what is shown of it is that of one
# case among several, and which is left open.
LEFT_OPEN = ("flow", "npsha", "npshr", "required")
# Of a station of fourteen pumps, one of unknown flow, limits are sought over
# 64 of thousands of sets, and which 64 is left open.
MANY_SETS = "MIX"


def left_open(name, found, result):
    for corner in CORNERS[1:]:
        if (name.removesuffix("_m").endswith("_" + corner)
                and name.startswith(LEFT_OPEN)):
            return (found[corner]["surplus"] is None
                    and result["surplus_" + corner] is None)
    return False


class Comparison:
    def __init__(self):
        self.largest = collections.defaultdict(lambda: (0.0, ""))
        self.compared = collections.Counter()
        self.bad = []
        self.pumps, self.stations = set(), set()
        self.joint = self.sets = 0

    def column(self, where, name, ours, theirs, tolerance):
        if (ours is None) != (theirs is None):
            self.bad.append("%s, %s: there %s, here %s" % (
                where, name, "unknown" if theirs is None else theirs,
                "unknown" if ours is None else "%.9g" % ours))
        elif ours is not None:
            difference = abs(ours - theirs)
            self.largest[name] = max(self.largest[name], (difference, where))
            if not difference <= tolerance:
                self.bad.append("%s, %s: there %.9g, here %.9g (%.1e)" % (
                    where, name, theirs, ours, ours - theirs))
        self.compared[name] += 1

    def row(self, row, result, found):
        where = "%s %s" % (row["pump_id"], row["condition"])
        likely = found["likely"]
        words = dict(found, off_curve="yes" if found["off_curve"] else "no",
                     stands="yes" if found["stands"] else "no",
                     likely="unknown" if likely == "unproven" else likely)
        for name in WORDS:
            if words[name] != row[name]:
                self.bad.append("%s, %s: there %s, here %s" % (
                    where, name, row[name], words[name]))
            self.compared[name] += 1
        stored = stored_figures(found)
        for name, tolerance in STORED.items():
            if left_open(name, found, result):
                continue
            self.column(where, name, stored[name], result[name],
                        tolerance_of(name, found, tolerance))
        printed = printed_figures(stored)
        for name, tolerance in PRINTED.items():
            text = row[name]
            if left_open(name, found, result):
                continue
            self.column(where, "pumps.csv " + name, printed[name],
                        None if text == "" else float(text), tolerance)
        here = beside(found)
        if row["station_id"] == MANY_SETS:
            here = {}
        for name in set(here) & set(result.keys()):
            if name in BESIDE:
                self.column(where, name, here[name], result[name],
                            BESIDE[name])
            else:
                self.compared[name] += 1
                if here[name] != result[name]:
                    self.bad.append("%s, %s: there %s, here %s" % (
                        where, name, result[name], here[name]))
        self.pumps.add(row["pump_id"])
        self.stations.add(row["station_id"])
        self.sets += found["sets_tried"]
        self.joint += len(found["governing"]) > 1

    def report(self, wanted):
        print("%-28s %9s %12s %12s" % ("figure", "compared", "tolerance",
                                       "largest"))
        for name in WORDS:
            print("%-28s %9d %12s" % (name, self.compared[name], "equal"))
        for prefix, columns in (("", STORED), ("pumps.csv ", PRINTED)):
            for name, tolerance in columns.items():
                print("%-28s %9d %12.1e %12.1e" % (
                    prefix + name, self.compared[prefix + name], tolerance,
                    self.largest[prefix + name][0]))
        for name in BESIDE_WORDS + tuple(BESIDE):
            if self.compared[name]:
                print("%-28s %9d %12s" % (name, self.compared[name], (
                    "%.1e %12.1e" % (BESIDE[name], self.largest[name][0]))
                    if name in BESIDE else "equal"))
        missing = sorted(wanted - self.pumps)
        print("\n%d stations, %d pumps; %d running sets looked at for a pump "
              "under a condition." % (len(self.stations), len(self.pumps),
                                      self.sets))
        print("Governed by a set of several pumps: %d of them." % self.joint)
        if missing:
            self.bad.append("not in the output: " + " ".join(missing))
        for line in self.bad:
            print("DISAGREES " + line)
        print("%d figures disagree." % len(self.bad))


def results_of(path):
    """(rule, year, {(pump, condition): row}) of the one evaluation."""
    db = sqlite3.connect("file:%s?mode=ro" % path, uri=True)
    db.row_factory = sqlite3.Row
    number, rule, year = db.execute(
        "SELECT evaluation, rule, year FROM evaluations"
        " ORDER BY evaluation DESC LIMIT 1").fetchone()
    rows = db.execute(
        "SELECT p.pump_id, r.* FROM pump_results AS r JOIN pumps AS p"
        " USING (pump) WHERE evaluation = ?", (number,)).fetchall()
    db.close()
    return rule, year, {(row["pump_id"], row["condition"]): row
                        for row in rows}


def sheet(rows, results, compute, station):
    """The recomputed figures of one station, a table a pump."""
    for row in rows:
        if row["station_id"] != station:
            continue
        key = row["pump_id"], row["condition"]
        found = compute(station, row["condition"])[row["pump_id"]]
        print("%s, %s (%s; with %s)\n" % (*key, found["flow_basis"],
                                          ", ".join(found["governing"])))
        print("| figure | program | recomputed |\n|---|---:|---:|")
        for name, ours in stored_figures(found).items():
            print("| %s | %s | %s |" % (name, *(
                "unknown" if value is None else "%.7f" % value
                for value in (results[key][name], ours))))
        print()


def of_station(inventory, published, rule, year, with_limits, key):
    return recompute(inventory, published, *key, rule, year, with_limits)


def main(arguments):
    if len(arguments) not in (2, 4) or (
            len(arguments) == 4
            and arguments[2] not in ("--sheet", "--every")):
        print(__doc__, file=sys.stderr)
        return 2
    store = os.path.join(arguments[1], "summerlow.db")
    inventory = Inventory(arguments[0], arguments[1])
    published = Published(store, inventory)
    rule, year, results = results_of(store)
    with open(os.path.join(arguments[1], "pumps.csv"), newline="",
              encoding="utf-8") as file:
        rows = list(csv.DictReader(file))
    stations = sorted(inventory.stations)
    if arguments[2:3] == ["--every"]:
        stations = stations[int(arguments[3]) - 1::int(arguments[3])]
    elif arguments[2:3] == ["--sheet"]:
        stations = [arguments[3]]
    rows = [row for row in rows if row["station_id"] in stations]
    with_limits = any("limit_level" in row.keys() for row in results.values())
    keys = sorted({(row["station_id"], row["condition"]) for row in rows})
    with concurrent.futures.ProcessPoolExecutor() as pool:
        solved = dict(zip(keys, pool.map(functools.partial(
            of_station, inventory, published, rule, year, with_limits),
            keys, chunksize=4)))

    def compute(station, condition):
        return solved[station, condition]
    if arguments[2:3] == ["--sheet"]:
        sheet(rows, results, compute, arguments[3])
        return 0
    print("iapws %s, fluids %s, scipy %s; rule %s, year %d\n" % (
        iapws.__version__, fluids.__version__, scipy.__version__, rule, year))
    comparison = Comparison()
    for row in rows:
        found = compute(row["station_id"], row["condition"])[row["pump_id"]]
        comparison.row(row, results[row["pump_id"], row["condition"]], found)
    comparison.report({key for key, pump in inventory.pumps.items()
                       if pump["station_id"] in stations})
    if len(comparison.stations) < 3:
        print("Fewer than 3 stations: nothing is shown by this.")
        return 1
    return 1 if comparison.bad else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
