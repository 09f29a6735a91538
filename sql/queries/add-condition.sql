-- Keep one of the owner's conditions; changes nothing when its name is
-- taken.
INSERT INTO owner_conditions (
    vintage, line, condition, level_basis, level_addition, discharge_basis,
    pressure_basis, temperature_basis, temperature_addition, barometer,
    suction_friction, discharge_friction
) VALUES (
    :vintage, :line, :condition, :level_basis, :level_addition,
    :discharge_basis, :pressure_basis, :temperature_basis,
    :temperature_addition, :barometer, :suction_friction, :discharge_friction
)
ON CONFLICT (vintage, condition) DO NOTHING;
