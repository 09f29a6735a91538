-- Clear stations of which some pump, in some condition, carries a flag or is
-- short or thin by a rule other than the one ranked on.
SELECT count(*) AS stations
FROM station_results AS t
WHERE
    t.evaluation = :evaluation
    AND t.state = 'clear'
    AND EXISTS (
        SELECT 1
        FROM pump_results AS r
        WHERE
            r.evaluation = t.evaluation
            AND r.station = t.station
            AND (r.flags <> '' OR r.rule_states GLOB '*[ST]*')
    );
