-- The conditions to audit a vintage under, mildest first: the owner's where
-- there are any, with the adverse choice for what was left out.
SELECT
    line AS place, condition,
    iif(level_basis = 'lowest', 'low', level_basis) AS level,
    coalesce(level_addition, 0) AS level_addition,
    coalesce(discharge_basis, 'low') AS discharge,
    coalesce(pressure_basis, 'low') AS pressure,
    temperature_basis = 'summer' AS summer_temperature,
    coalesce(temperature_addition, 0) AS temperature_addition,
    coalesce(barometer, 'storm low') = 'storm low' AS storm_barometer,
    coalesce(suction_friction, 'aged') AS suction_friction,
    coalesce(discharge_friction, 'new') AS discharge_friction
FROM owner_conditions
WHERE vintage = :vintage
UNION ALL
SELECT
    place, condition, level, level_addition, discharge, pressure,
    summer_temperature, temperature_addition, storm_barometer,
    suction_friction, discharge_friction
FROM conditions
WHERE NOT EXISTS (SELECT 1 FROM owner_conditions WHERE vintage = :vintage)
ORDER BY place;
