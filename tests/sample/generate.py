#!/usr/bin/env python3
"""Writes sample-inventory/: the invented Brindmoor Vale Joint Water Board.

Deterministic (one seed), plain Python. The figures hang together as those of
real stations do: a pump's curve goes through its rated point, its NPSHR at
best efficiency follows from a suction specific speed makers reach, the motor
carries the pump, the discharge lets one pump alone run where it should, bores
keep velocities ordinary. Then gaps are made as records have them, and the
faults that README.md lists are planted.

Usage: generate.py FOLDER
"""
import csv
import math
import os
import random
import sys

SEED = 20260724  # one whose portfolio has all four states in fair number
LAST_YEAR = 2025  # of works; the export is of summer 2026
SHORTEST_MAIN_FT, LONGEST_MAIN_FT = 140, 24000
# Sewage lifts whose mains were laid for all pumps: one alone runs out past
# the end of its curve.
RUN_OUT = (3, 9, 12, 15)
G_FT = 32.174
MOTORS = [3, 5, 7.5, 10, 15, 20, 25, 30, 40, 50, 60, 75, 100, 125, 150, 200,
          250, 300, 350, 400, 450, 500, 600, 700, 800, 900, 1000, 1250, 1500]
BORES = [4, 6, 8, 10, 12, 14, 16, 18, 20, 24, 30, 36, 42, 48, 54, 60]
FIRST = ["Alder", "Bracken", "Cinder", "Dunlin", "Ember", "Fallow", "Gorse",
         "Heron", "Ivy", "Juniper", "Kestrel", "Linden", "Marram", "Nettle",
         "Osier", "Plover", "Quarry", "Rowan", "Sedge", "Teasel", "Umber",
         "Vetch", "Willow", "Yarrow"]
SECOND = ["Reach", "Hollow", "Bank", "Rise", "Gate", "Ferry", "Mill", "Cross",
          "Lane", "Moor", "End", "Point"]

STATION_COLUMNS = [
    "station_id", "name", "gis_object_no", "service", "in_service",
    "year_retired", "latitude", "longitude", "site_elevation_ft",
    "site_elevation_grade", "installation", "source_kind",
    "source_pressure_low_psi", "source_pressure_normal_psi",
    "source_pressure_elevation_ft", "cut_out_level_ft", "record_low_level_ft",
    "normal_level_ft", "water_temp_summer_f", "water_temp_normal_f",
    "barometer_low_inhg", "discharge_low_ft", "discharge_normal_ft",
    "discharge_loss_flow_gpm", "discharge_loss_head_ft",
    "discharge_length_ft", "discharge_bore_in", "discharge_material",
    "discharge_year", "discharge_minor_k", "pumps_running_max",
    "pumps_running_firm", "people_served", "flow_served_mgd",
    "outage_cost_per_day", "days_to_restore", "note"]
PUMP_COLUMNS = [
    "pump_id", "station_id", "position", "make_up", "in_service",
    "datum_elevation_ft", "datum_elevation_grade", "curve_id",
    "rated_flow_gpm", "rated_head_ft", "rated_npshr_ft", "rated_speed_rpm",
    "max_speed_rpm", "bep_flow_gpm", "stages", "double_suction",
    "suction_nozzle_bore_in", "inlet_elevation_ft", "inlet_diameter_in",
    "suction_pipe_id", "largest_recorded_flow_gpm", "motor_power_hp",
    "year_installed", "straight_run_ft"]
CURVE_COLUMNS = ["curve_id", "flow_gpm", "head_ft", "npshr_ft", "efficiency",
                 "speed_rpm"]
PIPE_COLUMNS = ["pipe_id", "station_id", "draws_from", "length_m",
                "bore_mm", "material", "lining", "condition",
                "year_installed", "roughness_mm", "hazen_williams_c"]
FITTING_COLUMNS = ["pipe_id", "fitting", "count", "k"]


class Board:
    """All records made so far, in the order they will be written."""

    def __init__(self):
        self.random = random.Random(SEED)
        self.stations, self.pumps, self.curves = [], [], []
        self.pipes, self.fittings = [], []
        self.names = [f"{a} {b}" for a in FIRST for b in SECOND]
        self.random.shuffle(self.names)

    def number(self):
        return len(self.stations) + 1

    def curve_id(self):
        return f"C-{len({c['curve_id'] for c in self.curves}) + 101}"


def tidy(value, digits=1):
    text = f"{value:.{digits}f}"
    return text.rstrip("0").rstrip(".") if "." in text else text


def round_to(value, step):
    return round(value / step) * step


def machine(flow, head, wanted_s, stages=1, eyes=1):
    """The speed that gives an ordinary specific speed, NPSHR with it: the
    suction specific speed is that of one eye, which takes its part."""
    for speed in (1780, 1180, 885, 705, 590, 505, 3560):
        specific = speed * math.sqrt(flow) / (head / stages) ** 0.75
        npshr = (speed * math.sqrt(flow / eyes) / wanted_s) ** (4 / 3)
        if 700 <= specific <= 4600 and 4 <= npshr <= 27:
            return speed, npshr
    return 1180, (1180 * math.sqrt(flow / eyes) / wanted_s) ** (4 / 3)


def add_curve(board, flow, head, npshr, speed):
    """A maker's curve through the rated point, as printed: 0 to 130 %."""
    key = board.curve_id()
    best = min(0.88, 0.70 + 0.045 * math.log10(flow))
    step = 10 if flow > 400 else 5
    for part in (0, 0.3, 0.55, 0.8, 1.0, 1.15, 1.3):
        need = "" if part < 0.3 else tidy(
            npshr * (0.62 + 0.38 * part ** 2.6), 1)
        board.curves.append({
            "curve_id": key,
            "flow_gpm": f"{round_to(flow * part, step):.0f}",
            "head_ft": tidy(head * (1.27 - 0.27 * part ** 2), 1),
            "npshr_ft": need,
            "efficiency": "" if part == 0 else
            f"{100 * best * (1 - 1.05 * (1 - part) ** 2):.0f}",
            "speed_rpm": str(speed)})
    return key, best


def curve_head(flow, rated_flow, head):
    return head * (1.27 - 0.27 * (flow / rated_flow) ** 2)


def bore_for(flow_gpm, velocity_fps):
    wanted = math.sqrt(0.4085 * flow_gpm / velocity_fps)
    return min(BORES, key=lambda bore: abs(bore - wanted))


def discharge(board, station, low, flow, head, running, run_at, by_pipe):
    """A discharge that lets one pump alone run at `run_at` of best
    efficiency: a measured loss, or a main of matching length."""
    lifted = curve_head(flow * run_at, flow, head)
    static = min(head * board.random.uniform(0.55, 0.8), 0.9 * lifted)
    loss = lifted - static
    station["discharge_low_ft"] = tidy(low + static)
    station["discharge_normal_ft"] = tidy(
        low + static + board.random.uniform(1, 5))
    if not by_pipe:
        station["discharge_loss_flow_gpm"] = f"{round_to(flow * run_at, 10):.0f}"
        station["discharge_loss_head_ft"] = tidy(loss)
        return
    bore = bore_for(flow * running, 5)
    velocity = 0.4085 * flow * run_at / bore ** 2
    k = board.random.choice([4.5, 6, 8, 11])
    friction = max(loss - k * velocity ** 2 / (2 * G_FT), 0.2 * loss)
    length = friction * bore / 12 * 2 * G_FT / (0.0165 * velocity ** 2)
    if length > LONGEST_MAIN_FT:
        length = LONGEST_MAIN_FT * board.random.uniform(0.4, 1)
        loss = (k + 0.0165 * length * 12 / bore) * velocity ** 2 / (2 * G_FT)
        rise = board.random.uniform(1, 5)
        station["discharge_low_ft"] = tidy(low + lifted - loss)
        station["discharge_normal_ft"] = tidy(low + lifted - loss + rise)
    if length < SHORTEST_MAIN_FT:
        length = SHORTEST_MAIN_FT
        loss = (k + 0.0165 * length * 12 / bore) * velocity ** 2 / (2 * G_FT)
        station["discharge_low_ft"] = tidy(low + lifted - loss)
        station["discharge_normal_ft"] = tidy(low + lifted - loss + 2.5)
    station.update({
        "discharge_length_ft": f"{round_to(length, 10):.0f}",
        "discharge_bore_in": str(bore), "discharge_minor_k": tidy(k),
        "discharge_material": board.random.choice(
            ["lined metal", "lined metal", "PVC, ring joints",
             "prestressed concrete"]),
        "discharge_year": str(board.random.randint(1962, 2016))})


def new_station(board, code, service, installation, elevation, **more):
    number = board.number()
    station = dict.fromkeys(STATION_COLUMNS, "")
    station.update({
        "station_id": f"{code}-{number:03d}", "name": board.names.pop(),
        "gis_object_no": str(40000 + 37 * number), "service": service,
        "in_service": "yes",
        "latitude": f"{41.20 + elevation / 9000 + board.random.random() * 0.25:.5f}",
        "longitude": f"{-30.40 + board.random.random() * 1.1:.5f}",
        "site_elevation_ft": tidy(elevation),
        "installation": installation,
        "days_to_restore": str(board.random.choice([2, 3, 5, 8, 14]))})
    hottest = {"wastewater": 79, "stormwater": 77, "potable": 70,
               "raw water": 76, "irrigation": 78, "industrial": 84}[service]
    hottest -= elevation / 1000
    station["water_temp_summer_f"] = tidy(
        hottest + board.random.uniform(-3, 4))
    station["water_temp_normal_f"] = tidy(
        hottest - board.random.uniform(14, 20))
    station.update(more)
    board.stations.append(station)
    return station


def levels(station, low, span, natural):
    station["cut_out_level_ft"] = tidy(low)
    station["normal_level_ft"] = tidy(low + span)
    if natural:
        station["record_low_level_ft"] = tidy(low - 0.4)


def serve(board, station, gallons_a_day):
    """Who depends on the station follows from what it moves."""
    station["flow_served_mgd"] = tidy(gallons_a_day / 1e6, 2)
    if station["service"] in ("irrigation", "industrial"):
        station["outage_cost_per_day"] = str(
            round_to(gallons_a_day / 1000 * 4.1, 500) or 500)
        return
    each = board.random.uniform(110, 190)
    if station["service"] == "stormwater":
        each = board.random.uniform(600, 1500)
    people = max(100, round_to(gallons_a_day / each, 100))
    station["people_served"] = f"{people:.0f}"
    station["outage_cost_per_day"] = f"{max(500, round_to(people * 1.7, 500)):.0f}"


def add_pumps(board, station, count, make_up, flow, head, s, eye, running,
              run_at, by_pipe, low, stages=1, curve=True, **more):
    speed, npshr = machine(flow, head, s, stages,
                           2 if make_up == "split case" else 1)
    rated = {"rated_flow_gpm": f"{flow:.0f}", "rated_head_ft": tidy(head),
             "rated_npshr_ft": tidy(npshr), "rated_speed_rpm": str(speed),
             "bep_flow_gpm": f"{flow:.0f}"}
    efficiency = 0.8
    if curve:
        rated["curve_id"], efficiency = add_curve(board, flow, head, npshr,
                                                  speed)
    power = flow * head / 3960 / efficiency * 1.15
    discharge(board, station, low, flow, head, running, run_at, by_pipe)
    station["pumps_running_max"] = str(running)
    station["pumps_running_firm"] = str(max(1, count - 1))
    serve(board, station, flow * running * 0.45 * 1440)
    year = board.random.randint(1974, 2021)
    made = []
    for place in range(1, count + 1):
        pump = dict.fromkeys(PUMP_COLUMNS, "")
        pump.update(rated)
        pump.update({
            "pump_id": f"{station['station_id']}-P{place}",
            "station_id": station["station_id"], "position": str(place),
            "make_up": make_up, "in_service": "yes",
            "datum_elevation_ft": tidy(eye), "stages": str(stages),
            "double_suction": "yes" if make_up == "split case" else "no",
            "motor_power_hp": tidy(min(m for m in MOTORS if m >= power)),
            "year_installed": str(min(year + board.random.choice([0, 0, 0, 9]),
                                      LAST_YEAR))})
        pump.update(more)
        board.pumps.append(pump)
        made.append(pump)
    return made


YEARS_LAID = {"good": 2001, "fair": 1983, "poor": 1958}


def wall(pick, condition):
    """What was laid then, and what became of it."""
    return pick.choice({
        "good": ["lined metal", "lined metal", "coated steel", "GRP",
                 "PVC, ring joints"],
        "fair": ["lined metal", "coated steel", "uncoated cast iron",
                 "galvanised iron"],
        "poor": ["uncoated cast iron", "rusty steel",
                 "tuberculated main, slight", "tuberculated main, moderate"],
    }[condition])


def add_pipe(board, key, station, draws_from, length, bore, condition):
    pipe = dict.fromkeys(PIPE_COLUMNS, "")
    pipe.update({
        "pipe_id": key, "station_id": station["station_id"],
        "draws_from": draws_from, "length_m": tidy(length * 0.3048),
        "bore_mm": f"{bore * 25.4:.0f}", "condition": condition,
        "material": wall(board.random, condition),
        "year_installed": str(YEARS_LAID[condition] +
                              board.random.randint(0, 16))})
    board.pipes.append(pipe)
    return pipe


def add_fittings(board, key, *names):
    for name in names:
        name, _, count = name.partition("*")
        board.fittings.append({"pipe_id": key, "fitting": name,
                               "count": count or "1", "k": ""})


def suctions(board, station, pumps, flow, running, shared, lift):
    """One header and branches, or a pipe for each pump."""
    branch = bore_for(flow, 5.5)
    condition = board.random.choice(["good", "fair", "fair", "poor"])
    key = station["station_id"]
    header = ""
    if shared:
        header = f"{key}-SH"
        add_pipe(board, header, station, "", board.random.randint(15, 60),
                 bore_for(flow * running, 5), condition)
        add_fittings(board, header, "flush entrance", "gate valve")
    for pump in pumps:
        pipe = f"{key}-S{pump['position']}"
        add_pipe(board, pipe, station, header, board.random.randint(8, 26),
                 branch, condition)
        pump["suction_pipe_id"] = pipe
        pump["suction_nozzle_bore_in"] = str(max(4, branch - 2))
        if shared:
            add_fittings(board, pipe, "tee, branch", "gate valve",
                         "eccentric reducer")
        elif lift:
            add_fittings(board, pipe, "bellmouth entrance",
                         "90 elbow, long radius", "eccentric reducer")
        else:
            add_fittings(board, pipe, "rounded entrance", "gate valve",
                         "90 elbow, long radius", "eccentric reducer")


def wet_pit(board, code, service, elevation, flow, head, count, s, drown,
            make_up="submersible", run_at=1.05):
    """Submersibles or vertical turbines in their own water."""
    floor = elevation - board.random.uniform(18, 34)
    vertical = make_up == "vertical turbine"
    stages = 2 if vertical and head > 120 else 1
    natural = service in ("raw water", "irrigation")
    eye = floor + (3.2 if vertical else 1.6)
    low = eye + drown
    station = new_station(board, code, service, "wet pit", elevation,
                          source_kind="open")
    levels(station, low, board.random.uniform(4, 9), natural)
    bell = bore_for(flow, 5.4)
    running = max(1, count - 1)
    add_pumps(board, station, count, make_up, flow, head, s, eye, running,
              run_at, board.random.random() < 0.5, low, stages,
              inlet_elevation_ft=tidy(eye - (1.4 if vertical else 0.5)),
              inlet_diameter_in=str(bell))
    return station


def dry_pit(board, code, service, elevation, flow, head, count, s, over,
            shared, make_up="end suction", run_at=1.0):
    """Pumps beside their water: drowned when `over` is positive."""
    lift = over < -4  # nearer than that, the usual level drowns it
    natural = service in ("raw water", "irrigation")
    eye = elevation - (board.random.uniform(12, 26) if not lift else -2.5)
    low = eye + over
    station = new_station(board, code, service, "dry pit", elevation,
                          source_kind="open")
    span = board.random.uniform(3, 8)
    if lift:  # the water stays a foot or more under the bank
        span = min(span, elevation - low - 1)
    levels(station, low, span, natural)
    running = max(1, count - 1)
    pumps = add_pumps(board, station, count, make_up, flow, head, s, eye,
                      running, run_at, board.random.random() < 0.5, low)
    suctions(board, station, pumps, flow, running, shared, lift)
    return station


def booster(board, elevation, flow, head, count, s, pressure, run_at=1.0):
    station = new_station(board, "PW", "potable", "on main", elevation,
                          source_kind="main")
    eye = elevation - 3
    station.update({
        "source_pressure_low_psi": tidy(pressure),
        "source_pressure_normal_psi": tidy(pressure + 14),
        "source_pressure_elevation_ft": tidy(eye + 1.5)})
    running = max(1, count - 1)
    low = eye + 1.5 + pressure * 2.31
    pumps = add_pumps(board, station, count, "split case", flow, head, s, eye,
                      running, run_at, True, low)
    suctions(board, station, pumps, flow, running, True, False)
    for fitting in board.fittings:
        if fitting["fitting"] == "flush entrance" and \
                fitting["pipe_id"] == f"{station['station_id']}-SH":
            fitting["fitting"] = "tee, branch"
    return station


def closed_tank(board, service, elevation, flow, head, count, s, over, low,
                normal):
    station = new_station(board, "IN" if service == "industrial" else "PW",
                          service, "dry pit", elevation, source_kind="closed",
                          source_pressure_low_psi=tidy(low),
                          source_pressure_normal_psi=tidy(normal))
    eye = elevation + 2
    levels(station, eye + over, 4, False)
    pumps = add_pumps(board, station, count, "end suction", flow, head, s,
                      eye, max(1, count - 1), 1.0, False,
                      eye + over + low * 2.31)
    suctions(board, station, pumps, flow, max(1, count - 1), False, False)
    return station


def build(board):
    pick = board.random
    for i in range(20):  # sewage and storm lift stations
        sewage = i % 4 != 3
        wet_pit(board, "WW" if sewage else "SW",
                "wastewater" if sewage else "stormwater",
                pick.choice([12, 40, 95, 180, 420, 900, 1700, 3100]),
                round_to(10 ** pick.uniform(2.4, 3.7), 10),
                pick.randint(24, 70), pick.choice([2, 2, 3, 3, 4]),
                pick.uniform(7300, 9000), pick.uniform(0.6, 3.5),
                run_at=max(pick.choice([0.95, 1.0, 1.05, 1.1, 1.36]),
                           1.38 if i in RUN_OUT else 0))
    for i in range(14):  # intakes and clear wells
        raw = i % 2 == 0
        wet_pit(board, "RW" if raw else "PW",
                "raw water" if raw else "potable",
                pick.choice([4400, 5900, 6500] if i % 3 != 2 else
                            [60, 350, 2600, 4400]),
                round_to(10 ** (pick.uniform(3.19, 3.30) if i % 3 != 2 else
                                pick.uniform(2.9, 3.9)), 10),
                pick.randint(70, 230), pick.choice([2, 3, 4, 5]),
                pick.uniform(7000, 7600) if i % 3 != 2 else
                pick.uniform(7000, 8800),
                pick.uniform(0.5, 1.5) if i % 3 != 2 else
                pick.uniform(0.5, 6),
                "vertical turbine", pick.choice([0.95, 1.02, 1.1]))
    for i in range(14):  # drowned dry pits
        sewage = i % 3 == 0
        dry_pit(board, "WW" if sewage else "PW",
                "wastewater" if sewage else "potable",
                pick.choice([30, 150, 600, 1900, 3600, 5200, 6300]),
                round_to(10 ** pick.uniform(2.8, 3.8), 10),
                pick.randint(45, 190), pick.choice([2, 3, 3, 4]),
                pick.uniform(7000, 8600), pick.uniform(-3, 0.5) if i % 4 == 3
                else pick.uniform(0.5, 6), i % 2 == 0,
                "end suction" if sewage else "split case",
                pick.choice([0.92, 1.0, 1.08, 1.12]))
    for i in range(13):  # suction lifts from rivers, ponds and canals
        irrigation = i % 3 == 1
        dry_pit(board, "IR" if irrigation else "RW",
                "irrigation" if irrigation else "raw water",
                pick.choice([20, 260, 1500, 3300, 4800, 6100, 6500]),
                round_to(10 ** pick.uniform(2.9, 3.6), 10),
                pick.randint(50, 160), pick.choice([2, 3, 4]),
                pick.uniform(7000, 8200), -pick.uniform(5, 14), False,
                pick.choice(["end suction", "self-priming"]),
                pick.choice([0.95, 1.02, 1.1]))
    for i in range(7):
        booster(board, pick.choice([80, 700, 2300, 4100, 5600]),
                round_to(10 ** pick.uniform(2.5, 3.3), 10),
                pick.randint(80, 210), pick.choice([2, 3, 4]),
                pick.uniform(7200, 9000),
                [3, 22, 0.5, 34, -1, 12, 38][i])
    closed_tank(board, "potable", 2100, 640, 150, 3, 8600, 4, 6, 18)
    closed_tank(board, "industrial", 140, 420, 95, 2, 8200, 7, -4.5, -2)
    closed_tank(board, "industrial", 5300, 380, 120, 2, 8900, 3, 2, 9)
    closed_tank(board, "potable", 900, 900, 130, 3, 9100, 5, 11, 20)
    retire(board)


def retire(board):
    """One station that was given up, with all that stands in it."""
    station = dry_pit(board, "WW", "wastewater", 210, 700, 60, 2, 8300, 6,
                      True)
    station.update({"in_service": "no", "year_retired": "2019",
                    "note": "flow diverted to the interceptor"})


def whole_station(board, code, service, installation, elevation, eye, low,
                  static, loss, flow, **more):
    """A station of which everything is recorded.  `loss`: what the discharge
    takes from `flow`."""
    height = elevation * 0.3048
    pressure = 101325 * (1 - 0.0065 * height / 288.15) ** 5.255876
    record = {
        "source_kind": "open", "cut_out_level_ft": tidy(low),
        "normal_level_ft": tidy(low + 5),
        "barometer_low_inhg": tidy(pressure * 0.975 / 3386.389, 2),
        "discharge_low_ft": tidy(eye + static),
        "discharge_normal_ft": tidy(eye + static + 3),
        "discharge_loss_flow_gpm": f"{flow:.0f}",
        "discharge_loss_head_ft": tidy(loss)}
    record.update(more)
    station = new_station(board, code, service, installation, elevation,
                          **record)
    return station


def whole_pumps(board, station, count, make_up, eye, flow, head, npshr, speed,
                head_shape, npshr_shape, running=None, **more):
    """Alike pumps on one curve, head (rise, power) and NPSHR (share,
    power) from their values at best efficiency."""
    (rise, fall), (share, power) = head_shape, npshr_shape
    key = board.curve_id()
    for part in (0, 0.3, 0.5, 0.7, 0.85, 1.0, 1.1, 1.2, 1.3):
        board.curves.append({
            "curve_id": key, "flow_gpm": f"{flow * part:.0f}",
            "head_ft": tidy(head * (1 + rise - rise * part ** fall)),
            "npshr_ft": tidy(npshr * (1 - share + share * part ** power))
            if part else "",
            "efficiency": f"{83 * (1 - 1.05 * (1 - part) ** 2):.0f}"
            if part else "", "speed_rpm": str(speed)})
    power = flow * head / 3960 / 0.83 * 1.15
    for place in range(1, count + 1):
        pump = dict.fromkeys(PUMP_COLUMNS, "")
        pump.update({
            "pump_id": f"{station['station_id']}-P{place}",
            "station_id": station["station_id"], "position": str(place),
            "make_up": make_up, "in_service": "yes",
            "datum_elevation_ft": tidy(eye), "curve_id": key,
            "rated_flow_gpm": f"{flow:.0f}", "rated_head_ft": tidy(head),
            "rated_npshr_ft": tidy(npshr), "rated_speed_rpm": str(speed),
            "bep_flow_gpm": f"{flow:.0f}", "stages": "1",
            "double_suction": "yes" if make_up == "split case" else "no",
            "motor_power_hp": tidy(min(m for m in MOTORS if m >= power)),
            "year_installed": "1998"})
        pump.update(more)
        board.pumps.append(pump)
    station["pumps_running_max"] = str(running or count)
    station["pumps_running_firm"] = str(max(1, count - 1))
    serve(board, station, flow * count * 0.4 * 1440)


def whole_suctions(board, station, bore, length, wall_of, fittings,
                   header=None):
    """A suction for each pump, with what is known of its wall and K."""
    key = station["station_id"]
    upstream = ""
    if header:
        upstream = f"{key}-SH"
        whole_pipe(board, upstream, station, "", *header)
    for pump in board.pumps:
        if pump["station_id"] != key:
            continue
        pipe = f"{key}-S{pump['position']}"
        whole_pipe(board, pipe, station, upstream, bore, length, wall_of,
                   fittings)
        pump["suction_pipe_id"] = pipe
        pump["suction_nozzle_bore_in"] = str(bore - 2)


def whole_pipe(board, key, station, draws_from, bore, length, wall_of,
               fittings):
    material, condition, year = wall_of
    pipe = add_pipe(board, key, station, draws_from, length, bore, condition)
    pipe.update({"material": material, "year_installed": str(year)})
    for fitting, k in fittings:
        board.fittings.append({"pipe_id": key, "fitting": fitting,
                               "count": "1", "k": str(k)})


CAST_1957 = ("uncoated cast iron", "fair", 1957)
PLASTIC_2004 = ("PVC, ring joints", "good", 2004)
LONG_BEND = ("90 elbow, long radius", 0.2)
REDUCER = ("eccentric reducer", 0.1)


def build_whole(board):
    """Stations with complete records, each shown in docs/running-sets.md:
    what governs differs from one to the next."""
    eye = 318  # one alone: the main's friction holds more than one back
    station = whole_station(board, "RW", "raw water", "dry pit", 316, eye,
                            eye - 12, 55, 60, 2200)
    levels(station, eye - 12, 5, True)
    whole_pumps(board, station, 3, "self-priming", eye, 1000, 95, 12.5, 1780,
                (0.27, 2), (0.38, 2.6), straight_run_ft="4")
    whole_suctions(board, station, 10, 34, CAST_1957,
                   [("bellmouth entrance", 0.05), LONG_BEND, REDUCER])

    eye = 148  # all together: one narrow header
    station = whole_station(board, "PW", "potable", "dry pit", 164, eye,
                            eye - 8, 113, 6, 4800)
    whole_pumps(board, station, 4, "split case", eye, 1200, 130, 13, 1780,
                (0.27, 2), (0.38, 2.6), straight_run_ft="5")
    whole_suctions(board, station, 12, 9, CAST_1957,
                   [("tee, branch", 0.8), ("gate valve", 0.15), REDUCER],
                   (16, 630, CAST_1957, [("flush entrance", 0.5),
                                         ("gate valve", 0.15)]))

    eye = 402  # one fewer than all: header and main are both narrow
    station = whole_station(board, "PW", "potable", "dry pit", 410, eye,
                            eye - 5, 67, 46, 2730,
                            normal_level_ft=tidy(eye + 2))
    whole_pumps(board, station, 3, "end suction", eye, 1500, 120, 16, 1780,
                (0.12, 5), (0.5, 2))
    whole_suctions(board, station, 14, 12, PLASTIC_2004,
                   [("tee, branch", 0.8), REDUCER],
                   (12, 345, CAST_1957, [("flush entrance", 0.5)]))

    eye = 1212  # the lowest level on record
    station = whole_station(board, "RW", "raw water", "dry pit", 1216, eye,
                            eye - 4, 122, 18, 1600,
                            water_temp_summer_f="57",
                            water_temp_normal_f="47",
                            record_low_level_ft=tidy(eye - 15))
    whole_pumps(board, station, 2, "split case", eye, 1600, 150, 18, 1780,
                (0.27, 2), (0.38, 2.6), running=1, straight_run_ft="9")
    whole_suctions(board, station, 14, 40, CAST_1957,
                   [("bellmouth entrance", 0.05), LONG_BEND, REDUCER])

    eye = 6496  # altitude
    station = whole_station(board, "PW", "potable", "dry pit", 6500, eye,
                            eye - 3, 106, 14, 1100,
                            normal_level_ft=tidy(eye + 4),
                            water_temp_summer_f="61",
                            water_temp_normal_f="50")
    whole_pumps(board, station, 2, "end suction", eye, 1100, 130, 21.5, 1780,
                (0.27, 2), (0.38, 2.6), running=1, straight_run_ft="7")
    whole_suctions(board, station, 12, 18, PLASTIC_2004,
                   [("rounded entrance", 0.25), ("gate valve", 0.15),
                    REDUCER])

    eye = 1498  # a booster on a weak main
    station = whole_station(board, "PW", "potable", "on main", 1500, eye, eye,
                            145, 22, 900, source_kind="main",
                            cut_out_level_ft="", normal_level_ft="",
                            source_pressure_low_psi="21",
                            source_pressure_normal_psi="27",
                            source_pressure_elevation_ft=tidy(eye + 1))
    whole_pumps(board, station, 2, "split case", eye, 900, 120, 11, 1780,
                (0.27, 2), (0.38, 2.6), running=1, straight_run_ft="6")
    whole_suctions(board, station, 10, 9, PLASTIC_2004,
                   [("tee, branch", 0.8), ("gate valve", 0.15), REDUCER])


def blank(rows, *columns):
    for row in rows:
        for column in columns:
            row[column] = ""


LEVELS = ("discharge_low_ft", "discharge_normal_ft")
SYSTEM = ("discharge_loss_flow_gpm", "discharge_loss_head_ft",
          "discharge_length_ft", "discharge_bore_in", "discharge_material",
          "discharge_year", "discharge_minor_k")


def make_gaps(board):
    """What records lack, a different thing at about every third station."""
    lacks = [
        lambda s, p, q: blank([s], "water_temp_summer_f",
                              "water_temp_normal_f"),
        lambda s, p, q: blank(p, "datum_elevation_ft"),
        lambda s, p, q: blank([s], "discharge_low_ft", "discharge_normal_ft"),
        lambda s, p, q: blank(p, "curve_id"),
        lambda s, p, q: blank([s], "cut_out_level_ft",
                              "record_low_level_ft"),
        lambda s, p, q: blank(q, "condition", "material"),
        lambda s, p, q: blank([s], "site_elevation_ft"),
        lambda s, p, q: blank(p[:1], "suction_pipe_id"),
        lambda s, p, q: blank(q[-1:], "bore_mm"),
        lambda s, p, q: blank([s], "discharge_loss_head_ft",
                              "discharge_length_ft"),
        lambda s, p, q: blank(p, "curve_id", "rated_npshr_ft"),
        lambda s, p, q: blank([s], "discharge_material",
                              "discharge_minor_k", "pumps_running_max"),
        lambda s, p, q: blank(q[:1], "length_m"),
        lambda s, p, q: blank([s], "installation", "source_kind"),
    ]
    for i, station in enumerate(board.stations[:-1]):
        key = station["station_id"]
        pumps = [p for p in board.pumps if p["station_id"] == key]
        pipes = [p for p in board.pipes if p["station_id"] == key]
        if i % 3 == 2 or i % 10 == 0:
            lacks[(i * 5 // 3) % len(lacks)](station, pumps, pipes)
        if i % 3 == 1:
            blank([station], *(SYSTEM if i % 2 else LEVELS))
        if i % 6 == 4:
            for pump in pumps:
                pump["largest_recorded_flow_gpm"] = (
                    f"{round_to(float(pump['rated_flow_gpm']) * 1.08, 10):.0f}")
        if i % 7 == 0:
            station["site_elevation_grade"] = "B"
            for pump in pumps:
                pump["datum_elevation_grade"] = "C"
        if i % 9 == 5 and pipes and station["installation"] == "dry pit":
            keys = {pipe["pipe_id"] for pipe in pipes}
            board.fittings[:] = [f for f in board.fittings
                                 if f["pipe_id"] not in keys]
        if i % 8 == 3 and float(station["site_elevation_ft"] or 0) > 0:
            height = float(station["site_elevation_ft"]) * 0.3048
            pressure = 101325 * (1 - 0.0065 * height / 288.15) ** 5.255876
            station["barometer_low_inhg"] = tidy(
                pressure * 0.972 / 3386.389, 2)
        if i % 11 == 6:
            blank([station], "people_served")


def plant_faults(board):
    """The faults of README.md; each on records of its own, so that nothing
    sound is lost with it."""
    def pump(key, station, **more):
        row = dict.fromkeys(PUMP_COLUMNS, "")
        row.update({"pump_id": key, "station_id": station,
                    "in_service": "yes", "make_up": "submersible",
                    "rated_flow_gpm": "400", "rated_head_ft": "45"})
        row.update(more)
        board.pumps.append(row)

    first = board.stations[0]["station_id"]
    second = board.stations[6]["station_id"]
    pump(f"{first}-P1", first, position="9")
    pump("WW-090-P1", "WW-090")
    pump(f"{second}-P8", second, curve_id="C-999")
    pump(f"{second}-P9", second, rated_flow_gpm="1,250")
    pump(f"{first}-P8", first, inlet_elevation_ft="8.5 ft")
    pump("", first)
    lost = new_station(board, "PW", "potable", "wet pit", 6124)
    lost["site_elevation_ft"] = "61240"
    lost["note"] = "moved over from the old ledger"
    keep = [s for s in board.stations if s["installation"] == "dry pit"]
    home = keep[1]["station_id"]
    board.fittings.append({"pipe_id": next(
        p["pipe_id"] for p in board.pipes if p["station_id"] == home),
        "fitting": "90 bend", "count": "1", "k": ""})
    for key, source in (("X1", f"{home}-S77"), ("X2", f"{home}-X3"),
                        ("X3", f"{home}-X2")):
        add_pipe(board, f"{home}-{key}", keep[1], source, 12, 8, "fair")


def write(folder, name, columns, rows):
    path = os.path.join(folder, name)
    with open(path, "w", newline="", encoding="utf-8") as file:
        writer = csv.DictWriter(file, columns, lineterminator="\r\n")
        writer.writeheader()
        writer.writerows(rows)


def main():
    folder = sys.argv[1]
    board = Board()
    build(board)
    make_gaps(board)
    build_whole(board)
    plant_faults(board)
    os.makedirs(folder, exist_ok=True)
    write(folder, "stations.csv", STATION_COLUMNS, board.stations)
    write(folder, "pumps.csv", PUMP_COLUMNS, board.pumps)
    write(folder, "curves.csv", CURVE_COLUMNS, board.curves)
    write(folder, "suction_pipes.csv", PIPE_COLUMNS, board.pipes)
    write(folder, "suction_fittings.csv", FITTING_COLUMNS, board.fittings)


if __name__ == "__main__":
    main()
