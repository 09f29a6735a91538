-- The keys of a station's pumps in order of the owner's key.
SELECT pump, pump_id
FROM pumps
WHERE station = :station
ORDER BY pump_id;
