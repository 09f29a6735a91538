-- A station's pumps in order of the owner's key.
SELECT *
FROM pumps
WHERE station = :station
ORDER BY pump_id;
