-- The fittings of a station's suction pipes, pipe by pipe, by line.
SELECT f.*
FROM suction_pipes AS p
JOIN suction_fittings AS f ON f.pipe = p.pipe
WHERE p.station = :station
ORDER BY p.pipe_id, f.line, f.suction_fitting;
