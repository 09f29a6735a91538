-- What to find out first.
SELECT
    s.station_id, s.name AS station_name, s.people_served, p.pump_id,
    u.condition, r.likely, u.input, u.provenance, u.typical, u.adverse,
    u.favourable, u.swing, u.settles, u.what
FROM unknowns AS u
JOIN stations AS s ON s.station = u.station
JOIN pumps AS p ON p.pump = u.pump
JOIN pump_results AS r
    ON r.evaluation = u.evaluation
    AND r.station = u.station
    AND r.pump = u.pump
    AND r.condition = u.condition
WHERE u.evaluation = :evaluation
ORDER BY
    u.settles DESC,
    CASE WHEN r.likely IN ('short', 'thin') THEN 1 ELSE 2 END,
    s.people_served DESC NULLS LAST,
    (u.adverse IS NULL) DESC,
    round(u.swing, 6) DESC NULLS LAST, -- not by its last bits
    s.station_id, p.pump_id, u.unknown;
