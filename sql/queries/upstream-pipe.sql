-- The pipe a suction pipe draws from.
SELECT d.pipe, d.pipe_id, d.draws_from, d.line
FROM suction_pipes AS p
JOIN suction_pipes AS d ON d.vintage = p.vintage AND d.pipe_id = p.draws_from
WHERE p.pipe = :pipe;
