CREATE VIEW station_order AS
-- The order of the ranked stations, said here and nowhere else.
-- block: 1 short, 2 thin, 3 clear, 4 unproven; rank: from 1 within those at
-- risk (short and thin), within the clear and within the unproven.
WITH keyed AS (
    SELECT
        t.evaluation, t.station, s.station_id, s.people_served,
        CASE t.state
            WHEN 'short' THEN 1
            WHEN 'thin' THEN 2
            WHEN 'clear' THEN 3
            ELSE 4
        END AS block,
        -- Only among the unproven does the likely state count.
        CASE
            WHEN t.state <> 'unproven' THEN 0
            WHEN r.likely = 'short' THEN 1
            WHEN r.likely = 'thin' THEN 2
            WHEN r.likely = 'clear' THEN 3
            ELSE 4
        END AS likely_place,
        -- By how much the rule is missed, m; negative: it is met.
        coalesce(-r.surplus_typical, -r.surplus_favourable) AS shortfall
    FROM station_results AS t
    JOIN stations AS s ON s.station = t.station
    LEFT JOIN pump_results AS r
        ON r.evaluation = t.evaluation
        AND r.station = t.station
        AND r.pump = t.worst_pump
        AND r.condition = t.worst_condition
)
SELECT
    evaluation, station, block, shortfall,
    row_number() OVER (
        PARTITION BY evaluation, max(block, 2)
        ORDER BY
            block,
            likely_place,
            shortfall DESC NULLS LAST,
            people_served DESC NULLS LAST,
            station_id
    ) AS rank
FROM keyed;
