CREATE VIEW pump_limits AS
-- How far one thing may go until the rule ranked on is just met, all else
-- typical: m, °C and L/s.  An end of none: nowhere within the range looked
-- at; always: over all of it; figures end: so far, and past it some set
-- leaves its published curve.
SELECT
    r.evaluation, s.station_id, p.pump_id, r.condition, r.state,
    round(r.limit_level, 2) AS lowest_level_m,
    r.limit_level_end AS lowest_level_end,
    round(r.limit_temperature - 273.15, 1) AS warmest_water_deg_c,
    r.limit_temperature_end AS warmest_water_end,
    round(1000 * r.limit_flow, 1) AS largest_flow_l_s,
    r.limit_flow_end AS largest_flow_end
FROM pump_results AS r
JOIN stations AS s ON s.station = r.station
JOIN pumps AS p ON p.pump = r.pump;
