-- Stations and pumps of an evaluation, by the station's state.
SELECT
    state, count(*) AS stations, sum(pumps = 0) AS without_pumps,
    sum(pumps_short) AS pumps_short, sum(pumps_thin) AS pumps_thin,
    sum(pumps_unproven) AS pumps_unproven, sum(pumps_clear) AS pumps_clear
FROM station_results
WHERE evaluation = :evaluation
GROUP BY state
ORDER BY state;
