-- The station after this one in order of the owner's key.
SELECT *
FROM stations
WHERE vintage = :vintage AND station_id > :after
ORDER BY station_id
LIMIT 1;
