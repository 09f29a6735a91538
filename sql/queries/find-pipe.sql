-- A kept suction pipe by the owner's key.
SELECT pipe, station, line
FROM suction_pipes
WHERE vintage = :vintage AND pipe_id = :id;
