"""The head balance of one pump under one condition (docs/formulas.md)."""
import math

from inventory import Unbounded, pick, words
from physics import (Curve, Water, altitude_of, darcy, hazen_williams,
                     operating_flow, small_bore, standard_air, velocity_head)

LOWEST_LAND = -430.0  # m above the sea
RIVERS = ("", "raw water", "irrigation", "seawater")
TERMS = ("atmosphere_m", "barometer_m", "gauge_m", "elevation_m",
         "velocity_m", "friction_m", "minor_m", "vapour_m", "gas_m")


class Case:
    """One pump under one condition at one corner."""

    lenient = False

    def __init__(self, inventory, published, pump, condition, corner,
                 temperature_corner=None):
        self.published, self.inventory = published, inventory
        self.pump, self.condition = pump, published.conditions[condition]
        self.station = inventory.stations[pump["station_id"]]
        self.service = words(self.station.get("service", ""))
        self.corner = corner
        self.temperature_corner = temperature_corner or corner
        self.pipes = inventory.path(pump)

    def default(self, field, circumstance=""):
        return pick(self.published.default(field, circumstance), self.corner)

    # -- water and air

    def water(self):
        name = ("water_temp_summer" if self.condition["summer"]
                else "water_temp_normal")
        kelvin = self.station.get(name)
        if kelvin is None:
            kelvin = pick(self.published.default(name, self.service),
                          self.temperature_corner)
            if self.condition["summer"]:
                kelvin = max(kelvin, self.station.get("water_temp_normal",
                                                      kelvin))
            else:
                kelvin = min(kelvin, self.station.get("water_temp_summer",
                                                      kelvin))
        salinity = (self.default("salinity", "seawater")
                    if self.service == "seawater" else None)
        return Water(kelvin, salinity)

    def altitude(self):
        """Unknown, the low barometer tells it in a storm and bounds it
        otherwise, else a level stands in; land lies no lower than
        LOWEST_LAND."""
        if "site_elevation" in self.station:
            return self.station["site_elevation"]
        if "barometer_low" in self.station:
            if self.condition["storm"] or self.corner != "favourable":
                return altitude_of(self.station["barometer_low"])
            return LOWEST_LAND
        if self.corner == "favourable":
            return LOWEST_LAND
        for name in ("normal_level", "cut_out_level", "record_low_level",
                     "source_pressure_elevation"):
            if name in self.station:
                return self.bounded(self.station[name], "typical")
        raise Unbounded

    def air(self):
        return standard_air(self.altitude())

    def barometer_fall(self):
        """Under the standard air, which must be known."""
        self.air()
        if not self.condition["storm"]:
            return 0.0
        if "barometer_low" in self.station and (
                "site_elevation" not in self.station):
            return 0.0
        if "barometer_low" in self.station:
            return self.air() - self.station["barometer_low"]
        return self.default("barometer_fall") * self.air()

    def gas(self):
        if self.service == "wastewater":
            return self.default("gas_allowance", "wastewater")
        return self.default("gas_allowance") if not self.service else 0.0

    # -- source

    def source_kind(self):
        kind = words(self.station.get("source_kind", ""))
        on_main = words(self.station.get("installation", "")) == "on main"
        return kind or ("main" if on_main else "open")

    def source_kind_unsure(self):
        """Not recorded, and nothing tells it: no bound to either side."""
        return not ("source_kind" in self.station or self.service
                    or words(self.station.get("installation", ""))
                    in ("on main", "wet pit"))

    def bounded(self, value, *corners):
        """A stand-in bounds the margin from one side only."""
        if value is None or self.corner not in corners:
            raise Unbounded
        return value

    def level(self):
        """A level that stands in for a lower one bounds the margin from
        above, one that stands in for a higher one from below."""
        normal = self.station.get("normal_level")
        cut_out = self.station.get("cut_out_level")
        record = self.station.get("record_low_level")
        lows = [v for v in (cut_out, record) if v is not None]
        if self.condition["level"] == "normal":
            if normal is not None:
                return normal
            if self.service not in RIVERS and cut_out is not None:
                lows = [cut_out]
            return self.bounded(min(lows, default=None),
                                "typical", "adverse")
        if self.service in RIVERS and record is not None:
            return min(lows)
        if cut_out is not None:
            return cut_out
        return self.bounded(normal if record is None else record,
                            "typical", "favourable")

    def gauge(self):
        if self.source_kind() == "open":
            return (self.bounded(0.0, "typical")
                    if self.source_kind_unsure() else 0.0)
        low = self.station.get("source_pressure_low")
        normal = self.station.get("source_pressure_normal")
        if self.condition["pressure"] == "normal":
            if normal is not None:
                return normal
            return self.bounded(low, "typical", "adverse")
        if low is not None:
            return low
        return self.bounded(normal, "typical", "favourable")

    def surface(self):
        if self.source_kind() == "main":
            if "source_pressure_elevation" not in self.station:
                raise Unbounded
            return self.station["source_pressure_elevation"]
        return self.level()

    # -- suction side

    def datum(self):
        """The eye; no lower than the inlet's lip."""
        if "datum_elevation" in self.pump:
            return self.pump["datum_elevation"]
        return self.bounded(self.pump.get("inlet_elevation"), "favourable")

    def wet(self):
        """It stands in its water, and has no suction pipe."""
        if self.pipes:
            return False
        make_up = words(self.pump.get("make_up", ""))
        stands = words(self.station.get("installation", ""))
        if make_up and make_up not in ("vertical turbine", "submersible"):
            return False
        return stands == "wet pit" or (bool(make_up) and not stands)

    def suction_roughness(self, pipe):
        if "roughness" in pipe:
            return pipe["roughness"]
        row = self.published.roughness.get(words(pipe.get("material", "")))
        if row is None:
            return self.default("suction_roughness")
        state = words(pipe.get("condition", ""))
        if state:
            return row[("good", "fair", "poor").index(state)]
        return row[{"favourable": 0, "typical": 1, "adverse": 2}[self.corner]]

    def pipe_friction(self, pipe, flow, water):
        if "length" not in pipe or "bore" not in pipe:
            raise Unbounded
        if "hazen_williams_c" in pipe and "roughness" not in pipe:
            return hazen_williams(flow, pipe["length"], pipe["bore"],
                                  float(pipe["hazen_williams_c"]))
        return darcy(flow, pipe["length"], pipe["bore"],
                     self.suction_roughness(pipe), water)

    def pipe_k(self, pipe):
        total = 0.0
        for fitting in self.inventory.fittings[pipe["pipe_id"]]:
            count = float(fitting.get("count", 1))
            row = self.published.fitting.get(words(fitting["fitting"]))
            if row is None:
                continue
            if "k" in fitting:
                total += count * float(fitting["k"])
            else:
                total += count * small_bore(pick(row, self.corner),
                                            pipe["bore"])
        return total

    def inlet_loss(self, flow):
        """The bell of a pump that stands in its water."""
        bore = self.pump.get("inlet_diameter")
        if bore is None:
            return self.default("wet_pit_inlet_loss")
        k = pick(self.published.fitting["bellmouth entrance"], self.corner)
        return k * velocity_head(flow, bore)

    def suction(self, flow, water):
        """Friction and minor losses."""
        if self.wet():
            return 0.0, self.inlet_loss(flow)
        whole = [p for p in self.pipes if "length" in p and "bore" in p]
        friction = sum(self.pipe_friction(p, flow, water) for p in whole)
        if len(whole) < len(self.pipes) or not self.pipes:
            friction += self.where_bounded(lambda case: case.default(
                "suction_loss"))
        return friction, self.where_bounded(lambda case: case.pipe_minor(
            flow))

    def where_bounded(self, figure):
        """A lenient case takes what has no adverse end at its favourable
        one."""
        try:
            return figure(self)
        except Unbounded:
            if not self.lenient:
                raise
            return figure(self.at("favourable"))

    def pipe_minor(self, flow):
        """Where no fitting is recorded, a sum on the narrowest bore."""
        bores = [p["bore"] for p in self.pipes if "bore" in p]
        if not bores:
            return 0.0
        if any(p["pipe_id"] in self.inventory.short_fittings
               for p in self.pipes):
            self.bounded(0.0, "typical", "favourable")
        if any(self.inventory.fittings[p["pipe_id"]] for p in self.pipes):
            return sum(self.pipe_k(p) * velocity_head(flow, p["bore"])
                       for p in self.pipes if "bore" in p)
        datum = self.pump.get("datum_elevation")
        surface = value_of(self.at("typical").surface)
        lift = datum is None or surface is None or surface < datum
        k = self.default("suction_minor_k", "suction lift" if lift else "")
        return k * velocity_head(flow, min(bores))

    def velocity(self, flow):
        """Only a gauge on a pipe shows static pressure (F1)."""
        if self.source_kind() != "main" or not self.pipes:
            return 0.0
        return velocity_head(flow, self.pipes[-1]["bore"])

    # -- discharge side and flow

    def discharge_level(self):
        """A lower one gives more flow, and so the smaller margin."""
        low = self.station.get("discharge_low")
        normal = self.station.get("discharge_normal")
        if self.condition["discharge"] == "low":
            if low is not None:
                return low
            return self.bounded(normal, "typical", "favourable")
        if normal is not None:
            return normal
        return self.bounded(low, "typical", "adverse")

    def discharge_loss(self, flow, water):
        station = self.station
        if "discharge_loss_flow" in station and (
                "discharge_loss_head" in station):
            return (station["discharge_loss_head"]
                    * (flow / station["discharge_loss_flow"]) ** 2)
        length = station.get("discharge_length")
        bore = station.get("discharge_bore")
        if length is None or bore is None:
            raise Unbounded
        row = self.published.roughness.get(
            words(station.get("discharge_material", "")))
        if row is None:
            roughness = self.default("discharge_roughness")
        else:
            roughness = row[
                {"adverse": 0, "typical": 1, "favourable": 2}[self.corner]]
        k = station.get("discharge_minor_k")
        k = self.default("discharge_minor_k") if k is None else float(k)
        return (darcy(flow, length, bore, roughness, water)
                + k * velocity_head(flow, bore))

    def curve(self, what, exponent):
        points = [p for p in self.inventory.curves.get(
            self.pump.get("curve_id"), []) if what in p]
        if len(points) < 2:
            return None
        get = self.pump.get
        flows, values = [], []
        for point in points:
            test = point.get("speed", get("rated_speed"))
            speed = get("max_speed", get("rated_speed", test))
            ratio = speed / test if speed and test else 1.0
            flows.append(point["flow"] * ratio)
            values.append(point[what] * ratio ** exponent(ratio))
        return Curve(flows, values)

    def head_curve(self):
        return self.curve("head", lambda ratio: 2)

    def npshr_curve(self):
        return self.curve("npshr", self.speed_exponent)

    def speed_exponent(self, ratio):
        return self.default("npshr_speed_exponent_%s"
                            % ("up" if ratio >= 1 else "down"))

    def system_head(self, flow, water):
        """The suction's losses count at the other end than in the
        balance, where they have both: more loss would lessen the flow, and
        NPSHR with it (F12)."""
        suction = self
        if self.corner == "adverse":
            suction = self.at("favourable")
        elif self.corner == "favourable":
            suction = self.at("adverse")
            suction.lenient = True
        return (self.discharge_level() - self.surface()
                - water.head(self.gauge()) - self.velocity(flow)
                + self.discharge_loss(flow, water)
                + sum(suction.suction(flow, water)))

    def solvable(self):
        """Whether curve and system are known, at their typical values."""
        typical = self.at("typical")
        return (typical.head_curve() is not None
                and value_of(typical.discharge_level) is not None
                and value_of(typical.discharge_loss, 0.01,
                             typical.water()) is not None)

    def at(self, corner, temperature_corner=None):
        other = object.__new__(Case)
        other.__dict__.update(self.__dict__, corner=corner)
        other.temperature_corner = temperature_corner or corner
        return other

    def basis(self):
        if self.solvable():
            return "solved"
        if "largest_recorded_flow" in self.pump:
            return "recorded"
        return "rated" if "rated_flow" in self.pump else "unknown"

    def flow(self, water):
        """What it may run out to is not known but where it is solved."""
        basis = self.basis()
        if basis == "solved":
            solved = operating_flow(self.head_curve(),
                                    lambda q: self.system_head(q, water))
            if self.corner == "adverse" and self.head_curve().holds(solved):
                solved = max(solved,
                             self.pump.get("largest_recorded_flow", 0))
            return solved
        if basis == "recorded":
            return self.bounded(self.pump["largest_recorded_flow"],
                                "typical", "favourable")
        return self.bounded(self.pump["rated_flow"] * self.rated_ratio(),
                            "typical", "favourable")

    # -- the balance

    def rated_ratio(self):
        """A faster drive moves the rated point by the affinity laws."""
        rated = self.pump.get("rated_speed", self.test_speed())
        speed = self.pump.get("max_speed")
        return speed / rated if speed and rated else 1.0

    def test_speed(self):
        for point in self.inventory.curves.get(self.pump.get("curve_id"), []):
            if "speed" in point:
                return point["speed"]
        return None

    def npshr(self, flow):
        """Known at the rated point alone, it rises with the flow: under it
        the rated one is too much to be the favourable end."""
        curve = self.npshr_curve()
        if curve is not None:
            if self.basis() == "solved" and not self.head_curve().holds(flow):
                raise Unbounded
            if self.pump["curve_id"] in self.inventory.short_curves:
                return self.bounded(curve.at(flow), "typical")
            return curve.at(flow)
        ratio = self.rated_ratio()
        rated = self.pump["rated_npshr"] * ratio ** self.speed_exponent(ratio)
        if flow < self.pump["rated_flow"] * ratio:
            return self.bounded(rated, "typical")
        return self.bounded(rated, "typical", "favourable")

    def balance(self):
        """Every figure, None where it has no value at this corner."""
        water = self.water()
        flow = value_of(self.flow, water)
        losses = value_of(self.suction, flow, water) or (None, None)
        terms = [
            value_of(lambda: water.head(self.air())),
            value_of(lambda: -water.head(self.barometer_fall())),
            value_of(lambda: water.head(self.gauge())),
            value_of(lambda: self.surface() - self.datum()),
            value_of(self.velocity, flow),
            minus(losses[0]), minus(losses[1]),
            -water.head(water.vapour),
            value_of(lambda: -self.gas()),
        ]
        out = dict(zip(TERMS, terms))
        out["flow_l_s"] = None if flow is None else flow * 1e3
        out["temperature_c"] = water.kelvin - 273.15
        out["altitude_m"] = value_of(self.altitude)
        out["npsha_m"] = None if None in terms else sum(terms)
        out["npshr_m"] = (None if flow is None
                          else value_of(self.npshr, flow))
        return out


def value_of(function, *arguments):
    """None where a figure has no bound or rests on something unknown."""
    try:
        value = function(*arguments)
    except (Unbounded, KeyError, TypeError):
        return None
    unknown = isinstance(value, float) and math.isnan(value)
    return None if unknown else value


def minus(value):
    return None if value is None else -value
