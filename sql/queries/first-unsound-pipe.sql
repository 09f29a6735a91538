-- A station's first pipe, by line, whose draws_from is not a kept pipe of it.
SELECT
    p.pipe, p.pipe_id, p.draws_from, p.line, d.line AS other_line
FROM suction_pipes AS p
LEFT JOIN suction_pipes AS d
    ON d.vintage = p.vintage AND d.pipe_id = p.draws_from
WHERE p.station = :station
    AND p.draws_from IS NOT NULL
    AND (d.pipe IS NULL OR d.station <> p.station)
ORDER BY p.line, p.pipe
LIMIT 1;
