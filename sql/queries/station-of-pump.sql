-- The station a pump stands in.
SELECT s.*
FROM pumps AS p
JOIN stations AS s ON s.station = p.station
WHERE p.vintage = :vintage AND p.pump_id = :pump_id;
