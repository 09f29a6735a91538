-- A station's first pipe, by line, from which no way leads to the source.
WITH RECURSIVE sound (pipe_id) AS (
    SELECT pipe_id
    FROM suction_pipes
    WHERE station = :station AND draws_from IS NULL
    UNION
    SELECT p.pipe_id
    FROM sound AS s
    JOIN suction_pipes AS p
        ON p.vintage = :vintage
        AND p.station = :station
        AND p.draws_from = s.pipe_id
)
SELECT
    p.pipe,
    (SELECT count(*) FROM suction_pipes WHERE station = :station) AS pipes
FROM suction_pipes AS p
WHERE p.station = :station AND p.pipe_id NOT IN (SELECT pipe_id FROM sound)
ORDER BY p.line, p.pipe
LIMIT 1;
