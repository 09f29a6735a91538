#!/usr/bin/python3
"""Recomputes what an audit printed, by other means, and compares.

    recompute.py INVENTORY OUTPUT_DIR
    recompute.py INVENTORY OUTPUT_DIR --sheet STATION

A second implementation of the head balance from docs/formulas.md and
docs/inventory.md.  It shares no code with the program: it reads the
inventory's CSV files, and from the store only the published values
(fitting_k, roughness, defaults, margin_rules, conditions).  Properties of
water, friction factors, curves and roots are those of iapws, fluids and
scipy.  What OUTPUT_DIR/pumps.csv says is only compared with.

Exit status: 0 all figures agree; 1 some do not, or fewer than three stations
could be compared; 2 usage.
"""
import collections
import csv
import os
import sys

sys.dont_write_bytecode = True

import fluids  # noqa: E402
import iapws  # noqa: E402
import scipy  # noqa: E402

from corners import recompute  # noqa: E402
from inventory import Inventory, Published  # noqa: E402

# What is printed is rounded to 0.001 m, 0.01 L/s and 0.1 °C: half of that,
# and a little for the two computations.
TOLERANCE = collections.OrderedDict(
    [("flow_l_s", 0.0051), ("temperature_c", 0.0501)]
    + [(name, 0.00051) for name in (
        "altitude_m",
        "atmosphere_m", "barometer_m", "gauge_m", "elevation_m",
        "velocity_m", "friction_m", "minor_m", "vapour_m", "gas_m",
        "npsha_m", "npshr_m", "required_m", "margin_m", "surplus_m",
        "npsha_adverse_m", "npshr_adverse_m", "margin_adverse_m",
        "surplus_adverse_m", "npsha_favourable_m", "npshr_favourable_m",
        "margin_favourable_m", "surplus_favourable_m")])
WORDS = ("flow_basis", "off_curve", "stands", "state")


class Comparison:
    def __init__(self):
        self.largest = {name: (0.0, "") for name in TOLERANCE}
        self.compared = collections.Counter()
        self.bad, self.shared = [], set()
        self.pumps, self.stations = set(), set()

    def column(self, row, name, ours):
        where = "%s %s, %s" % (row["pump_id"], row["condition"], name)
        printed = row[name]
        if name not in TOLERANCE:
            if ours != printed:
                self.bad.append("%s: printed %s, here %s"
                                % (where, printed, ours))
        elif (ours is None) != (printed == ""):
            self.bad.append("%s: printed %s, here %s" % (
                where, printed or "unknown",
                "unknown" if ours is None else "%.4f" % ours))
        elif ours is not None:
            difference = abs(ours - float(printed))
            self.largest[name] = max(self.largest[name], (difference, where))
            if not difference <= TOLERANCE[name]:
                self.bad.append("%s: printed %s, here %.4f"
                                % (where, printed, ours))
        self.compared[name] += 1

    def row(self, inventory, published, row):
        figures, left_out = recompute(inventory, published, row)
        for name in WORDS + tuple(TOLERANCE):
            if name not in left_out:
                self.column(row, name, figures[name])
        if left_out:
            self.shared.add(row["pump_id"])
        self.pumps.add(row["pump_id"])
        self.stations.add(row["station_id"])

    def report(self, inventory):
        print("%-22s %9s %12s %12s" % ("column", "compared", "tolerance",
                                       "largest"))
        for name in WORDS:
            print("%-22s %9d %12s" % (name, self.compared[name], "equal"))
        for name, tolerance in TOLERANCE.items():
            print("%-22s %9d %12.4f %12.6f" % (
                name, self.compared[name], tolerance, self.largest[name][0]))
        missing = sorted(set(inventory.pumps) - self.pumps)
        print("\n%d stations, %d pumps compared." % (
            len(self.stations), len(self.pumps)))
        print("%d pumps without their adverse end: others run beside them in "
              "pipes they share, which is not recomputed." % len(self.shared))
        print("%d pumps of the inventory are not in the output (rejected, or "
              "out of scope): %s" % (len(missing), " ".join(missing) or "-"))
        for line in self.bad:
            print("DISAGREES " + line)
        print("%d figures disagree." % len(self.bad))


def sheet(inventory, published, rows, station):
    """The recomputed terms of one station, a table a pump."""
    for row in rows:
        if row["station_id"] != station:
            continue
        figures, left_out = recompute(inventory, published, row)
        print("%s, %s (%s)\n" % (row["pump_id"], row["condition"],
                                 figures["flow_basis"]))
        print("| figure | printed | recomputed |\n|---|---:|---:|")
        for name in TOLERANCE:
            if name in left_out:
                continue
            ours = figures[name]
            print("| %s | %s | %s |" % (
                name, row[name] or "unknown",
                "unknown" if ours is None else "%.6f" % ours))
        print()


def main(arguments):
    if len(arguments) not in (2, 4) or (
            len(arguments) == 4 and arguments[2] != "--sheet"):
        print(__doc__, file=sys.stderr)
        return 2
    inventory = Inventory(arguments[0], arguments[1])
    published = Published(os.path.join(arguments[1], "summerlow.db"))
    with open(os.path.join(arguments[1], "pumps.csv"), newline="",
              encoding="utf-8") as file:
        rows = list(csv.DictReader(file))
    if len(arguments) == 4:
        sheet(inventory, published, rows, arguments[3])
        return 0
    print("iapws %s, fluids %s, scipy %s\n" % (
        iapws.__version__, fluids.__version__, scipy.__version__))
    comparison = Comparison()
    for row in rows:
        comparison.row(inventory, published, row)
    comparison.report(inventory)
    if len(comparison.stations) < 3:
        print("Fewer than 3 stations: nothing is shown by this.")
        return 1
    return 1 if comparison.bad else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
