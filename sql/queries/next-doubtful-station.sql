-- The next station with a pipe whose way to the source is not plain: it draws
-- from none that is kept, from another station's, or from one that draws on.
SELECT p.station
FROM suction_pipes AS p
LEFT JOIN suction_pipes AS d
    ON d.vintage = p.vintage AND d.pipe_id = p.draws_from
WHERE p.vintage = :vintage
    AND p.station > :after
    AND p.draws_from IS NOT NULL
    AND (
        d.pipe IS NULL OR d.station <> p.station OR d.draws_from IS NOT NULL
    )
ORDER BY p.station
LIMIT 1;
