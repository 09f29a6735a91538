CREATE VIEW pump_terms AS
-- The head balance of every pump and condition at the typical values: m of
-- the water pumped, L/s and °C.
SELECT
    r.evaluation, s.station_id, p.pump_id, r.condition, r.state,
    round(1000 * r.flow_typical, 1) AS flow_l_s,
    round(r.temperature - 273.15, 1) AS water_deg_c,
    round(r.atmosphere, 2) AS atmosphere_m,
    round(r.barometer, 2) AS barometer_m,
    round(r.gauge, 2) AS gauge_m,
    round(r.elevation, 2) AS elevation_m,
    round(r.velocity, 2) AS velocity_m,
    round(r.friction, 2) AS friction_m,
    round(r.minor, 2) AS minor_m,
    round(r.vapour, 2) AS vapour_m,
    round(r.gas, 2) AS gas_m,
    round(r.npsha_typical, 2) AS npsha_m,
    round(r.npshr_typical, 2) AS npshr_m,
    round(r.required_typical, 2) AS required_m,
    round(r.surplus_typical, 2) AS surplus_m
FROM pump_results AS r
JOIN stations AS s ON s.station = r.station
JOIN pumps AS p ON p.pump = r.pump;
