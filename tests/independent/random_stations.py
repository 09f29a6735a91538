#!/usr/bin/python3
"""Writes an inventory of random stations, for recompute.py.

    random_stations.py SEED COUNT FOLDER [flat]

Shared and separate suctions, unlike pumps, boosters, closed tanks, and about
every column missing at times; with `flat`, head curves so flat that NPSHR
rises faster than the head falls.  The same seed gives the same inventory.
"""
import csv
import os
import random
import sys

SERVICES = ("potable", "raw water", "wastewater", "irrigation", "industrial",
            "seawater", None)
MATERIALS = ("smooth plastic", "uncoated steel", "coated steel", "rusty steel",
             "galvanised iron", "uncoated cast iron", "GRP", None)
FITTINGS = ("bellmouth entrance", "flush entrance", "90 elbow, long radius",
            "gate valve", "butterfly valve", "eccentric reducer",
            "tee, branch", "foot valve")
MAKE_UPS = ("end suction", "split case", "vertical turbine", "submersible",
            "self-priming", None)
EYE = 100.0  # m
FILES = ("stations", "pumps", "suction_pipes", "suction_fittings", "curves")


class Maker:
    def __init__(self, seed, flat):
        self.random, self.flat = random.Random(seed), flat
        self.files = {name: [] for name in FILES}

    def between(self, low, high, digits=2):
        return round(self.random.uniform(low, high), digits)

    def maybe(self, chance, value):
        return value if self.random.random() < chance else None

    def one(self, choices):
        return self.random.choice(choices)

    def add(self, file, **cells):
        self.files[file].append(
            {name: cell for name, cell in cells.items() if cell is not None})

    def source(self):
        surface = EYE + self.between(-3, 4)
        kind = self.random.random()
        cells = {"installation": self.one(("dry pit", "dry pit", "wet pit",
                                           None)),
                 "source_kind": self.maybe(0.8, "open")}
        if kind < 0.15:
            return surface, {
                "installation": "on main",
                "source_kind": self.maybe(0.7, "main"),
                "source_pressure_low_kpa": self.maybe(
                    0.8, self.between(0, 80)),
                "source_pressure_normal_kpa": self.maybe(
                    0.8, self.between(80, 150)),
                "source_pressure_elevation_m": self.maybe(
                    0.9, EYE + self.between(-2, 2))}
        if kind < 0.27:
            cells.update(
                source_kind="closed",
                source_pressure_low_kpa=self.maybe(0.8,
                                                   self.between(-30, 20)),
                source_pressure_normal_kpa=self.maybe(0.8,
                                                      self.between(20, 40)))
        cells.update(
            cut_out_level_m=self.maybe(0.8, surface),
            record_low_level_m=self.maybe(
                0.5, round(surface - self.between(0, 1), 2)),
            normal_level_m=self.maybe(
                0.8, round(surface + self.between(0.2, 3), 2)))
        return surface, cells

    def discharge(self, head, flow, count):
        if self.random.random() < 0.5:
            return {"discharge_loss_flow_l_s": round(flow * count * 0.6, 1),
                    "discharge_loss_head_m": round(
                        head * self.between(0.03, 0.4), 2)}
        return {"discharge_length_m": self.between(20, 2000, 0),
                "discharge_bore_mm": round(
                    900 * (flow / 1000 * count) ** 0.45),
                "discharge_material": self.one(MATERIALS),
                "discharge_year": self.maybe(
                    0.5, self.random.randint(1900, 2020)),
                "discharge_minor_k": self.maybe(0.5, self.between(0, 8))}

    def curve(self, name, head, flow):
        head *= self.between(0.85, 1.1)
        fall = self.between(*((0.05, 0.35) if self.flat else (0.15, 0.6)))
        low = self.between(1.5, 4)
        rise = self.between(*((2, 7) if self.flat else (0.8, 2.2)))
        droop = self.maybe(0.25, self.between(0, 0.13)) or 0
        dip = self.maybe(0.25, self.between(0, 1.2)) or 0
        points = (0, 0.3, 0.55, 0.75, 0.9, 1.0, 1.15)
        for x in points[:self.one((6, 7))]:
            self.add(
                "curves", curve_id=name, flow_l_s=round(flow * x, 2),
                head_m=round(head * (1 - fall * x * x + droop * x * (1 - x)),
                             3),
                npshr_m=round(low * (1 + 0.8 * rise * x * x
                                     + dip * (1 - x) ** 3), 3)
                if x > 0 else None, speed_rpm=1480)

    def pipe(self, key, station, draws_from, length, bore):
        walls = self.random.random()
        self.add(
            "suction_pipes", pipe_id=key, station_id=station,
            draws_from=draws_from, length_m=self.maybe(0.93, length),
            bore_mm=self.maybe(0.95, round(bore)),
            material=self.one(MATERIALS),
            condition=self.one(("good", "fair", "poor", None)),
            year_installed=self.maybe(0.5, self.random.randint(1900, 2015)),
            roughness_mm=self.between(0.05, 1.5) if walls < 0.1 else None,
            hazen_williams_c=(self.random.randint(80, 140)
                              if 0.1 < walls < 0.17 else None))
        if self.random.random() < 0.45:
            for _ in range(self.random.randint(1, 3)):
                self.add("suction_fittings", pipe_id=key,
                         fitting=self.one(FITTINGS),
                         count=self.one((None, 2)),
                         k=self.maybe(0.2, self.between(0.1, 0.6)))

    def pump(self, key, station, pipe, curves, flow, bore):
        odd = pipe is None or self.random.random() < 0.3
        self.add(
            "pumps", pump_id=key, station_id=station,
            make_up=self.one(MAKE_UPS) if odd else "end suction",
            datum_elevation_m=self.maybe(
                0.96, EYE + self.between(-0.3, 0.3)),
            curve_id=self.maybe(0.93, self.one(curves)),
            rated_flow_l_s=round(flow * 0.8, 1),
            rated_npshr_m=self.maybe(0.8, self.between(2, 6)),
            rated_speed_rpm=1480,
            max_speed_rpm=self.maybe(0.12, self.random.randint(1250, 1650)),
            largest_recorded_flow_l_s=self.maybe(
                0.15, round(flow * self.between(0.4, 1), 1)),
            inlet_diameter_mm=self.maybe(0.5, round(bore)),
            bep_flow_l_s=self.maybe(0.6, round(flow * 0.75, 1)),
            suction_pipe_id=pipe)

    def suctions(self, station, count, bore):
        """The pipe that each pump's own draws from."""
        if self.random.random() < 0.4:
            return [None] * count
        header = station + "-H"
        self.pipe(header, station, None, self.between(5, 150),
                  bore * (0.7 * count) ** 0.5)
        if count < 4 or self.random.random() < 0.4:
            return [header] * count
        branches = [header + name for name in "AB"]
        for branch in branches:
            self.pipe(branch, station, header, self.between(3, 20),
                      bore * 1.3)
        return [self.one(branches) for _ in range(count)]

    def station(self, key):
        count = self.one((1, 1, 2, 2, 3, 3, 4, 5))
        head = self.between(*((6, 14) if self.flat else (15, 45)))
        flow = self.between(40, 300)
        bore = 1000 * (1.273 * flow / 1000 / self.between(0.8, 1.6)) ** 0.5
        surface, source = self.source()
        to = surface + head * self.between(0.3, 0.8)
        self.add(
            "stations", station_id=key, service=self.one(SERVICES),
            site_elevation_m=self.maybe(0.8, self.between(0, 2500)),
            water_temp_summer_c=self.maybe(0.6, self.between(15, 32)),
            water_temp_normal_c=self.maybe(0.6, self.between(5, 14)),
            discharge_low_m=self.maybe(0.85, round(to, 2)),
            discharge_normal_m=self.maybe(
                0.85, round(to + self.between(0, 2), 2)),
            pumps_running_max=self.maybe(0.75,
                                         self.random.randint(1, count)),
            **source, **self.discharge(head, flow, count))
        curves = ["%s-C%d" % (key, i)
                  for i in range(self.one((1, 1, 2)))]
        for curve in curves:
            self.curve(curve, head, flow)
        for i, above in enumerate(self.suctions(key, count, bore), 1):
            pipe = self.maybe(0.93, "%s-S%d" % (key, i))
            if pipe is not None:
                self.pipe(pipe, key, above, self.between(2, 25), bore)
            self.pump("%s-%d" % (key, i), key, pipe, curves, flow, bore)

    def write(self, folder):
        os.makedirs(folder, exist_ok=True)
        for name, rows in self.files.items():
            columns = list(dict.fromkeys(c for row in rows for c in row))
            with open(os.path.join(folder, name + ".csv"), "w", newline="",
                      encoding="utf-8") as file:
                out = csv.DictWriter(file, columns, restval="",
                                     lineterminator="\n")
                out.writeheader()
                out.writerows(rows)


def main(arguments):
    if len(arguments) not in (3, 4) or arguments[3:] not in ([], ["flat"]):
        print(__doc__, file=sys.stderr)
        return 2
    maker = Maker(int(arguments[0]), len(arguments) == 4)
    for i in range(int(arguments[1])):
        maker.station("R%d" % i)
    maker.write(arguments[2])
    return 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
