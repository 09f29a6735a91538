-- The conditions, mildest first.
SELECT
    condition, level, discharge, pressure, summer_temperature, storm_barometer
FROM conditions
ORDER BY place;
