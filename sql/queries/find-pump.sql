-- A kept pump by the owner's key.
SELECT pump, line
FROM pumps
WHERE vintage = :vintage AND pump_id = :id;
