"""What each unknown of a station is taken for (docs/formulas.md).

Every figure takes a corner: "typical", "adverse", "favourable", or a part
from 0 (adverse) to 1 (favourable) of the way between these two.
"""
from inventory import Unbounded, between, pick, words
from physics import Curve, altitude_of, small_bore, standard_air

LOWEST_LAND = -430.0  # m above the sea
RIVERS = ("", "raw water", "irrigation", "seawater")
RUNS_WET = ("vertical turbine", "submersible")
GROWS_NO_FURTHER = 0.05  # of the bore
OTHER_END = {"typical": "typical", "adverse": "favourable",
             "favourable": "adverse"}


def stand_in(value, corner, *corners):
    """A stand-in bounds the margin from one side only."""
    if value is None or corner not in corners:
        raise Unbounded
    return value


class Station:
    """One station under one condition in one year."""

    def __init__(self, inventory, published, key, condition, year):
        self.inventory, self.published, self.year = inventory, published, year
        self.record = inventory.stations[key]
        self.key = key
        self.shift = 0.0  # of the source level, while a limit is sought
        self.condition = published.conditions[condition]
        self.service = words(self.record.get("service", ""))
        self.installation = words(self.record.get("installation", ""))
        self.pumps = [Pump(self, pump) for pump in inventory.of_station(key)]

    def default(self, field, corner, circumstance=""):
        return pick(self.published.default(field, circumstance), corner)

    def most_running(self):
        most = self.record.get("pumps_running_max")
        count = len(self.pumps)
        return count if most is None else min(count, max(1, int(most)))

    # -- water and air

    def temperature(self, corner):
        summer, normal = (self.record.get("water_temp_summer"),
                          self.record.get("water_temp_normal"))
        added = self.condition["temperature_addition"]
        if self.condition["summer"]:
            if summer is not None:
                return summer + added
            kelvin = self.default("water_temp_summer", corner, self.service)
            return (kelvin if normal is None else max(kelvin, normal)) + added
        if normal is not None:
            return normal + added
        kelvin = self.default("water_temp_normal", corner, self.service)
        return (kelvin if summer is None else min(kelvin, summer)) + added

    def salinity(self):
        if self.service != "seawater":
            return None
        return self.default("salinity", "typical", "seawater")

    def altitude(self, corner):
        record = self.record
        if "site_elevation" in record:
            return record["site_elevation"]
        if "barometer_low" in record:
            if self.condition["storm"] or corner != "favourable":
                return altitude_of(record["barometer_low"])
            return LOWEST_LAND
        if corner == "favourable":
            return LOWEST_LAND
        lows = [record[name] for name in ("cut_out_level", "record_low_level")
                if name in record]
        level = record.get("normal_level", min(lows, default=record.get(
            "source_pressure_elevation")))
        return stand_in(level, corner, "typical")

    def barometer_fall(self, corner):
        """Under the standard air, which must be known."""
        air = standard_air(self.altitude(corner))
        if not self.condition["storm"]:
            return 0.0
        if "barometer_low" not in self.record:
            return self.default("barometer_fall", corner) * air
        if "site_elevation" not in self.record:
            return 0.0
        return air - self.record["barometer_low"]

    def gas(self, corner):
        if self.service == "wastewater":
            return self.default("gas_allowance", corner, "wastewater")
        return self.default("gas_allowance", corner) if not self.service else 0

    # -- source

    def levels(self):
        return [self.record.get(name + "_level")
                for name in ("cut_out", "record_low", "normal")]

    def source_kind(self):
        """And whether it is known."""
        if "source_kind" in self.record:
            return words(self.record["source_kind"]), True
        if self.installation == "on main":
            return "main", True
        if self.installation == "wet pit":
            return "open", True
        pressure = ("source_pressure_low" in self.record
                    or "source_pressure_normal" in self.record)
        level = any(one is not None for one in self.levels())
        return "open", (level and not pressure
                        and self.service not in ("", "industrial"))

    def lowest(self, corner):
        cut_out, record, normal = self.levels()
        if self.service in RIVERS and record is not None:
            return (min(record, cut_out) if cut_out is not None else record)
        if cut_out is not None:
            return cut_out
        return stand_in(normal if record is None else record, corner,
                        "typical", "favourable")

    def level(self, corner):
        cut_out, record, normal = self.levels()
        basis = self.condition["level"]
        if basis == "low":
            return self.lowest(corner)
        if basis == "normal":
            if normal is not None:
                return normal
            return stand_in(self.lowest("typical"), corner,
                            "typical", "adverse")
        first, second = ((cut_out, record) if basis == "cut-out"
                         else (record, cut_out))
        if first is not None:
            return first
        return stand_in(normal if second is None else second, corner,
                        "typical", "favourable")

    def surface(self, corner):
        """Of the liquid; of a main, its gauge."""
        if self.source_kind()[0] == "main":
            if "source_pressure_elevation" not in self.record:
                raise Unbounded
            return self.record["source_pressure_elevation"] + self.shift
        return (between(self.level, corner)
                + self.condition["level_addition"] + self.shift)

    def pressure_at(self, corner):
        kind, known = self.source_kind()
        if kind == "open":
            return 0.0 if known else stand_in(0.0, corner, "typical")
        low = self.record.get("source_pressure_low")
        normal = self.record.get("source_pressure_normal")
        if self.condition["pressure"] == "normal":
            if normal is not None:
                return normal
            return stand_in(low, corner, "typical", "adverse")
        if low is not None:
            return low
        return stand_in(normal, corner, "typical", "favourable")

    def pressure(self, corner):
        return between(self.pressure_at, corner)

    # -- discharge

    def discharge_level_at(self, corner):
        """A lower one gives more flow."""
        low = self.record.get("discharge_low")
        normal = self.record.get("discharge_normal")
        if self.condition["discharge"] == "low":
            if low is not None:
                return low
            return stand_in(normal, corner, "typical", "favourable")
        if normal is not None:
            return normal
        return stand_in(low, corner, "typical", "adverse")

    def discharge_level(self, corner):
        return between(self.discharge_level_at, corner)

    def discharge(self, corner):
        """("measured", flow, head) or ("pipe", length, bore, roughness, K)."""
        record = self.record
        if "discharge_loss_flow" in record and "discharge_loss_head" in record:
            return ("measured", record["discharge_loss_flow"],
                    record["discharge_loss_head"])
        if "discharge_length" not in record or "discharge_bore" not in record:
            raise Unbounded
        k = record.get("discharge_minor_k")
        return ("pipe", record["discharge_length"], record["discharge_bore"],
                between(self.discharge_roughness, corner),
                between(lambda end: self.default("discharge_minor_k", end),
                        corner) if k is None else float(k))

    def discharge_roughness(self, corner):
        material = words(self.record.get("discharge_material", ""))
        if material not in self.published.roughness:
            return self.default("discharge_roughness", corner)
        return self.wall(material, "", self.record.get("discharge_year"),
                         OTHER_END[corner], self.record["discharge_bore"],
                         self.condition["discharge_friction"])

    def discharge_known(self):
        try:
            self.discharge_level("typical")
            self.discharge("typical")
            return True
        except Unbounded:
            return False

    # -- walls

    def wall(self, material, state, year, end, bore, friction):
        """Its roughness; the end is that of loss: adverse is rough."""
        row = self.published.roughness[material]
        if state:
            laid = row[("good", "fair", "poor").index(state)]
        else:
            laid = row[("favourable", "typical", "adverse").index(end)]
        if friction == "new":
            return laid
        rates = self.published.ageing.get(
            (material, state or None),
            self.published.ageing.get((material, None)))
        rate = 0.0 if rates is None else pick(rates, end)
        if year is None:
            years = self.default("pipe_age", end)
        else:
            years = max(0.0, self.year - float(year))
        aged = laid + rate * years
        return max(laid, min(aged, GROWS_NO_FURTHER * bore))

    def pipe_roughness(self, pipe, corner):
        """None where Hazen and Williams' C is used."""
        if "roughness" in pipe:
            return pipe["roughness"]
        if "hazen_williams_c" in pipe:
            return None
        material = words(pipe.get("material", ""))
        if material not in self.published.roughness:
            return self.default("suction_roughness", corner)
        return self.wall(material, words(pipe.get("condition", "")),
                         pipe.get("year_installed"), corner, pipe["bore"],
                         self.condition["suction_friction"])

    def pipe_k(self, pipe, corner):
        total = 0.0
        for fitting in self.inventory.fittings[pipe["pipe_id"]]:
            count = float(fitting.get("count", 1))
            row = self.published.fitting[words(fitting["fitting"])]
            if "k" in fitting:
                total += count * float(fitting["k"])
            elif "bore" in pipe:
                total += count * small_bore(pick(row, corner), pipe["bore"])
        return total


class Pump:
    """A pump in its place: its curves at the speed it runs at."""

    def __init__(self, station, record):
        self.station, self.record = station, record
        self.key = record["pump_id"]
        self.path = station.inventory.path(record)
        self.pipe_keys = {pipe["pipe_id"] for pipe in self.path}
        self.make_up = words(record.get("make_up", ""))
        self.points = station.inventory.curves.get(record.get("curve_id"), [])
        self.head = self.curve("head", lambda ratio: 2)
        self.npshr = self.curve("npshr", self.exponent)
        self.solved = self.head is not None and station.discharge_known()

    # -- speed

    def speeds(self):
        """The speed it runs at, and that of its rated point."""
        test = next((p["speed"] for p in self.points if "speed" in p), None)
        rated = self.record.get("rated_speed", test)
        return self.record.get("max_speed", rated), rated

    def exponent(self, ratio):
        return self.station.default(
            "npshr_speed_exponent_%s" % ("up" if ratio >= 1 else "down"),
            "typical")

    def curve(self, what, exponent):
        points = [p for p in self.points if what in p]
        if len(points) < 2:
            return None
        flows, values = [], []
        for point in points:
            rated = self.record.get("rated_speed")
            test = point.get("speed", rated)
            speed = self.record.get("max_speed", rated or test)
            ratio = speed / test if speed and test else 1.0
            flows.append(point["flow"] * ratio)
            values.append(point[what] * ratio ** exponent(ratio))
        return Curve(flows, values)

    def rated_ratio(self):
        speed, rated = self.speeds()
        return speed / rated if speed and rated else 1.0

    def rated_flow(self):
        flow = self.record.get("rated_flow")
        return None if flow is None else flow * self.rated_ratio()

    def best_flow(self):
        flow = self.record.get("bep_flow")
        return None if flow is None else flow * self.rated_ratio()

    def rated_npshr(self):
        npshr, ratio = self.record.get("rated_npshr"), self.rated_ratio()
        return None if npshr is None else npshr * ratio ** self.exponent(ratio)

    # -- flow and place

    def basis(self):
        if self.solved:
            return "solved"
        if "largest_recorded_flow" in self.record:
            return "recorded"
        return "rated" if "rated_flow" in self.record else "unknown"

    def given_flow(self, corner):
        flow = self.record.get("largest_recorded_flow", self.rated_flow())
        return stand_in(flow, corner, "typical", "favourable")

    def datum(self, corner):
        if "datum_elevation" in self.record:
            return self.record["datum_elevation"]
        if self.make_up not in RUNS_WET:
            raise Unbounded
        return stand_in(self.record.get("inlet_elevation"), corner,
                        "favourable")

    def wet(self):
        """It stands in its water, and has no suction pipe."""
        if self.path or (self.make_up and self.make_up not in RUNS_WET):
            return False
        return self.station.installation == "wet pit" or (
            bool(self.make_up) and not self.station.installation)

    # -- suction

    def without_adverse_suction(self, pumps):
        """Beside a pump that may draw through the same pipes: one of the set
        whose suction is not on record, or one that was rejected."""
        station = self.station
        most = station.record.get("pumps_running_max")
        if not self.path or (most is not None and int(most) <= 1):
            return False
        return (station.key in station.inventory.short_stations
                or any(other is not self and not other.path
                       and not other.wet() for other in pumps))

    def lift(self):
        """Whether the surface lies under the eye, or may; on a main there is
        none."""
        if self.station.source_kind()[0] == "main":
            return False
        datum = self.record.get("datum_elevation")
        try:
            surface = self.station.surface("typical") - self.station.shift
        except Unbounded:
            return True
        return datum is None or surface < datum

    def ways(self, corner, beside=()):
        """The parts of its suction: a list of (pipe key, length, bore,
        roughness, C, K), constant friction, constant minor loss, and the
        bell's (bore, K).  `corner` is a function of a pipe key (None for
        what is no pipe), since other pumps may set theirs differently."""
        station = self.station
        if self.wet():
            bore = self.record.get("inlet_diameter")
            if bore is None:
                return [], 0.0, between(
                    lambda end: station.default("wet_pit_inlet_loss", end),
                    corner(None)), None
            row = station.published.fitting["bellmouth entrance"]
            return [], 0.0, 0.0, (bore, between(
                lambda end: pick(row, end), corner(None)))
        parts, friction = [], 0.0
        incomplete = [None] if not self.path else [
            p["pipe_id"] for p in self.path
            if "length" not in p or "bore" not in p]
        if incomplete:
            friction = between(lambda end: station.default(
                "suction_loss", end), corner(incomplete[0]))
        recorded = any(station.inventory.fittings[p["pipe_id"]]
                       for p in self.path)
        for pipe in self.path:
            end = corner(pipe["pipe_id"])
            if pipe["pipe_id"] in station.inventory.short_fittings and not (
                    end in ("typical", "favourable")):
                raise Unbounded
            if "bore" not in pipe:
                continue
            k = between(lambda e: station.pipe_k(pipe, e), end)
            if not recorded and pipe is self.path[0]:
                k += between(lambda e: station.default(
                    "suction_minor_k", e,
                    "suction lift" if self.lift() else ""), end)
            length = pipe.get("length", 0.0)
            rough = station.pipe_roughness(pipe, "typical")
            if rough is not None and length > 0:
                rough = between(lambda e: station.pipe_roughness(pipe, e), end)
            parts.append((pipe["pipe_id"], length, pipe["bore"], rough,
                          float(pipe.get("hazen_williams_c", 0)), k))
        if self.without_adverse_suction(beside) and not (
                corner(None) in ("typical", "favourable")):
            raise Unbounded
        return parts, friction, 0.0, None

    # -- NPSHR

    def eyes(self):
        """Of the impeller, for the estimate F13."""
        double = words(self.record.get(
            "double_suction", "yes" if self.make_up == "split case"
            else "no"))
        return 2 if double == "yes" else 1

    def estimate(self):
        speed = self.speeds()[0]
        flow = self.best_flow() or self.rated_flow()
        if speed is None or flow is None:
            raise Unbounded
        s = self.station.default("suction_specific_speed", "typical")
        return (speed * (flow / self.eyes()) ** 0.5 / s) ** (4 / 3)

    def off_curve(self, flow):
        return ((self.solved and not self.head.holds(flow))
                or (self.npshr is not None and not self.npshr.holds(flow)))

    def npshr_at(self, flow, corner):
        if self.off_curve(flow):
            raise Unbounded
        short = (self.record.get("curve_id")
                 in self.station.inventory.short_curves)
        if self.npshr is not None:
            value = self.npshr.at(flow)
            return stand_in(value, corner, "typical") if short else value
        rated, rated_flow = self.rated_npshr(), self.rated_flow()
        if rated is None:
            return stand_in(self.estimate(), corner, "typical")
        if short or rated_flow is None or flow < rated_flow:
            return stand_in(rated, corner, "typical")
        return stand_in(rated, corner, "typical", "favourable")

    def ends_hold(self, ratio):
        """Whether -H' >= r NPSHR' all over the NPSHR curve."""
        if self.npshr is None or self.head is None:
            return True
        return all(-self.head.slope(q) >= ratio * self.npshr.slope(q)
                   for q in self.npshr_flows())

    def npshr_falls(self):
        return self.npshr is not None and any(
            self.npshr.slope(q) < 0 for q in self.npshr_flows())

    def npshr_flows(self):
        x = self.npshr.x
        return [a + (b - a) * i / 8 for a, b in zip(x, x[1:])
                for i in range(9)]

    # -- what decides a rule's tier

    def one_eye(self):
        if "double_suction" in self.record:
            return 2 if words(self.record["double_suction"]) == "yes" else 1
        if self.make_up and self.make_up != "split case":
            return 1
        raise Unbounded

    def specific_speed(self):
        """F14 in the US customary number."""
        best, speed = self.best_flow(), self.speeds()[0]
        if best is None or speed is None:
            raise Unbounded
        if self.npshr is not None:
            npshr = self.npshr.at(best)
        elif self.record.get("rated_flow") == self.record.get("bep_flow"):
            npshr = self.rated_npshr()
        else:
            npshr = None
        if npshr is None or npshr != npshr:
            raise Unbounded
        return (51.645 * speed * (best / self.one_eye()) ** 0.5
                / npshr ** 0.75)

    def suction_energy(self, density):
        """F15, over the start of high for its make-up."""
        eye = self.record.get("eye_diameter")
        if eye is None:
            bore = self.record.get("suction_nozzle_bore")
            part = self.station.published.defaults.get(
                ("eye_of_nozzle", self.make_up))
            if bore is None or part is None:
                raise Unbounded
            eye = bore * part[0]
        high = self.station.published.high_energy.get(self.make_up)
        if high is None:
            raise Unbounded
        return (eye / 0.0254 * self.speeds()[0] * self.specific_speed()
                * density / 1000 / high)
