CREATE VIEW ranked_stations AS
-- The ranked list: ORDER BY evaluation, block, rank.
SELECT
    o.evaluation, o.block, o.rank, t.state, s.station_id, s.name,
    p.pump_id AS worst_pump, t.worst_condition,
    round(o.shortfall, 2) AS shortfall_m,
    s.people_served, r.reason
FROM station_order AS o
JOIN station_results AS t
    ON t.evaluation = o.evaluation AND t.station = o.station
JOIN stations AS s ON s.station = o.station
LEFT JOIN pumps AS p ON p.pump = t.worst_pump
LEFT JOIN pump_results AS r
    ON r.evaluation = t.evaluation
    AND r.station = t.station
    AND r.pump = t.worst_pump
    AND r.condition = t.worst_condition;
