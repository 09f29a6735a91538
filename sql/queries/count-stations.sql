-- How many stations a vintage has.
SELECT count(*) AS stations
FROM stations
WHERE vintage = :vintage;
