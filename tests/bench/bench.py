#!/usr/bin/python3
"""How much work an evaluation is: ratios, not times, so that machines differ
less.

    bench.py SUMMERLOW EVALUATE_BENCH WORK_DIR

1. The program's evaluation of the sample inventory, many rounds of it, and
   the plain script's (tests/bench/plain) of some of its stations, both
   without reading and storing: processor time a pump under a condition, the
   ratio, and whether both found the same. Beside it the whole of `summerlow
   evaluate` on the sample many times over.
2. Instructions of the program's evaluation a running set, counted by
   callgrind on tests/bench/fixed-case.

Exit status: 0, or 1 when the two implementations do not agree.
"""
import csv
import os
import re
import resource
import shutil
import sqlite3
import subprocess
import sys
import time

sys.dont_write_bytecode = True
HERE = os.path.dirname(__file__)
# Reading and the formulas are the second implementation's; the search is not.
sys.path.insert(0, os.path.join(HERE, os.pardir, "independent"))
sys.path.insert(0, os.path.join(HERE, "plain"))

import physics  # noqa: E402
# A plain script works the water out where it needs it.
physics.water_at = getattr(physics.water_at, "__wrapped__", physics.water_at)
from corners import recompute  # noqa: E402
from inventory import CORNERS, Inventory, Published  # noqa: E402

YEAR = 2026
COPIES = 20
ROUNDS = 20
EVERY = 6  # of the sample's stations, for the slow implementation
TOLERANCE = 1e-6  # m
KEYS = ("station_id", "pump_id", "pipe_id", "draws_from", "suction_pipe_id")
FIXED = os.path.join(os.path.dirname(__file__), "fixed-case")


def run(*command):
    """Its processor time, s; a rejected record (1) is no failure."""
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    done = subprocess.run(command, stdout=subprocess.DEVNULL,
                          stderr=subprocess.PIPE, text=True, check=False)
    if done.returncode > 1:
        sys.exit("%s: %s" % (" ".join(command), done.stderr))
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    return (after.ru_utime + after.ru_stime
            - before.ru_utime - before.ru_stime)


def multiply(source, target, copies):
    """Each station, pump and pipe again under other keys."""
    os.makedirs(target)
    for name in os.listdir(source):
        if not name.endswith(".csv"):
            continue
        with open(os.path.join(source, name), newline="",
                  encoding="utf-8") as file:
            rows = list(csv.reader(file))
        keys = [i for i, column in enumerate(rows[0]) if column in KEYS]
        with open(os.path.join(target, name), "w", newline="",
                  encoding="utf-8") as file:
            out = csv.writer(file, lineterminator="\n")
            out.writerow(rows[0])
            for copy in range(copies if keys else 1):
                for row in rows[1:]:
                    out.writerow([
                        cell + "/%d" % copy if i in keys and cell else cell
                        for i, cell in enumerate(row)])


def evaluated(program, inventory, work, name):
    """(store, processor time of its evaluation)."""
    store = os.path.join(work, name + ".db")
    run(program, "import", inventory, "--store", store)
    return store, run(program, "evaluate", "--store", store,
                      "--year", str(YEAR))


def count_results(store):
    db = sqlite3.connect(store)
    count = db.execute("SELECT count(*) FROM pump_results").fetchone()[0]
    db.close()
    return count


def largest_difference(store, found):
    """Of margins and surpluses at the three corners; how many."""
    db = sqlite3.connect(store)
    db.row_factory = sqlite3.Row
    largest, count = 0.0, 0
    for row in db.execute("SELECT p.pump_id, r.* FROM pump_results AS r"
                          " JOIN pumps AS p USING (pump)"):
        ours = found.get((row["pump_id"], row["condition"]))
        if ours is None:
            continue
        for corner in CORNERS:
            for name in ("margin", "surplus"):
                a, b = ours[corner][name], row["%s_%s" % (name, corner)]
                count += 1
                if (a is None) != (b is None):
                    largest = float("inf")
                elif a is not None:
                    largest = max(largest, abs(a - b))
    db.close()
    return largest, count


def second_implementation(inventory, published, stations):
    """({(pump, condition): figures}, processor time)."""
    found, rule = {}, next(iter(published.rules))
    start = time.process_time()
    for station in stations:
        for condition in published.conditions:
            pumps = recompute(inventory, published, station, condition, rule,
                              YEAR, with_limits=True)
            found.update(((key, condition), figures)
                         for key, figures in pumps.items())
    seconds = time.process_time() - start
    return found, seconds


def ready(program, folder, work, name):
    """Inventory and published values, by the store and what it rejected."""
    out = os.path.join(work, name)
    run(program, "audit", folder, "--out", out, "--year", str(YEAR))
    inventory = Inventory(folder, out)
    return inventory, Published(os.path.join(out, "summerlow.db"), inventory)


def evaluation_alone(evaluate_bench, store):
    """Processor time a pump under a condition, s."""
    done = subprocess.run([evaluate_bench, store, str(YEAR), str(ROUNDS)],
                          stdout=subprocess.PIPE, text=True, check=True)
    count, seconds = done.stdout.split()
    return float(seconds) / int(count)


def against_the_other(program, evaluate_bench, work):
    many = os.path.join(work, "inventory")
    multiply("sample-inventory", many, COPIES)
    store, seconds = evaluated(program, many, work, "many")
    results = count_results(store)
    small, _ = evaluated(program, "sample-inventory", work, "sample")
    inventory, published = ready(program, "sample-inventory", work, "audit")
    stations = sorted(inventory.stations)[::EVERY]
    found, slow = second_implementation(inventory, published, stations)
    difference, count = largest_difference(small, found)
    fast, slow = evaluation_alone(evaluate_bench, small), slow / len(found)
    print("program: %.1f µs a pump under a condition; %.1f with reading and "
          "storing" % (1e6 * fast, 1e6 * seconds / results))
    print("plain script: %.1f ms, of %d of them"
          % (1e3 * slow, len(found)))
    print("ratio: %.0f" % (slow / fast))
    print("largest difference of %d margins and surpluses: %.1e m"
          % (count, difference))
    return count > 0 and difference <= TOLERANCE


def instructions(program, work):
    store = os.path.join(work, "fixed.db")
    run(program, "import", FIXED, "--store", store)
    profile = os.path.join(work, "callgrind.out")
    run("valgrind", "--tool=callgrind", "--callgrind-out-file=" + profile,
        program, "evaluate", "--store", store, "--year", str(YEAR))
    text = subprocess.run(
        ["callgrind_annotate", "--inclusive=yes", "--threshold=100", profile],
        stdout=subprocess.PIPE, text=True, check=True).stdout
    count = int(re.search(r"^ *([\d,]+) .*:sl_evaluate_station\b", text,
                          re.MULTILINE)[1].replace(",", ""))
    total = int(re.search(r"^ *([\d,]+) .*PROGRAM TOTALS", text,
                          re.MULTILINE)[1].replace(",", ""))
    inventory, published = ready(program, FIXED, work, "fixed")
    rule = next(iter(published.rules))
    found = {(key, condition): figures
             for station in sorted(inventory.stations)
             for condition in published.conditions
             for key, figures in recompute(
                 inventory, published, station, condition, rule, YEAR,
                 with_limits=True).items()}
    sets = sum(one["sets_tried"] for one in found.values())
    print("fixed case: %d pumps under a condition, %d running sets, %d "
          "instructions a set; evaluation is %.0f %% of the command's %.0f "
          "million" % (len(found), sets, count / sets, 100 * count / total,
                       total / 1e6))
    difference, compared = largest_difference(
        os.path.join(work, "fixed.db"), found)
    print("largest difference of %d margins and surpluses there: %.1e m"
          % (compared, difference))
    return difference <= TOLERANCE


def main(arguments):
    if len(arguments) != 3:
        print(__doc__, file=sys.stderr)
        return 2
    program, evaluate_bench, work = arguments
    shutil.rmtree(work, ignore_errors=True)
    os.makedirs(work)
    agree = against_the_other(program, evaluate_bench, work)
    agree = instructions(program, work) and agree
    if not agree:
        print("The two implementations do not agree: the ratio says nothing.")
    return 0 if agree else 1


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
