CREATE VIEW rule_verdicts AS
-- What each margin rule says of every pump and condition.
SELECT
    r.evaluation, s.station_id, p.pump_id, r.condition, e.rule, e.trust,
    CASE substr(r.rule_states, e.place, 1)
        WHEN 'S' THEN 'short'
        WHEN 'T' THEN 'thin'
        WHEN 'U' THEN 'unproven'
        WHEN 'C' THEN 'clear'
        WHEN '-' THEN 'does not apply'
    END AS state
FROM pump_results AS r
JOIN stations AS s ON s.station = r.station
JOIN pumps AS p ON p.pump = r.pump
JOIN evaluation_rules AS e ON e.evaluation = r.evaluation;
