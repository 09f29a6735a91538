-- A station's suction pipes in order of the owner's key.
SELECT *
FROM suction_pipes
WHERE station = :station
ORDER BY pipe_id;
