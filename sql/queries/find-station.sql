-- A kept station by the owner's key.
SELECT station, line
FROM stations
WHERE vintage = :vintage AND station_id = :id;
