-- The owner's own conditions and margin rules, facts of their vintage, and
-- the straight pipe before a pump.
CREATE TABLE owner_conditions (
    -- One case to audit, from conditions.csv; NULL takes the adverse choice.
    owner_condition INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    condition TEXT NOT NULL, -- its name
    level_basis TEXT NOT NULL, -- which source level
    level_addition REAL, -- to that level, m
    discharge_basis TEXT, -- which discharge level
    pressure_basis TEXT, -- which source pressure
    temperature_basis TEXT NOT NULL, -- which water temperature
    temperature_addition REAL, -- to that temperature, K
    barometer TEXT, -- standard air, or the fall of a storm
    suction_friction TEXT, -- suction walls as laid, or rougher by their years
    discharge_friction TEXT, -- likewise, discharge walls
    UNIQUE (vintage, condition)
) STRICT;

CREATE TABLE owner_margin_rules (
    -- One margin rule, from margin_rules.csv: met when NPSHA is at least
    -- ratio * NPSHR and at least NPSHR + floor.
    owner_margin_rule INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    rule TEXT NOT NULL, -- its name
    ratio REAL NOT NULL, -- of NPSHA to NPSHR, pure number
    floor REAL NOT NULL, -- NPSHA over NPSHR, m
    edition TEXT, -- of the standard it is from
    source TEXT, -- where the rule comes from
    UNIQUE (vintage, rule)
) STRICT;

-- The comment stands before the column's comma, where a line's end cannot.
ALTER TABLE pumps
    ADD COLUMN straight_run REAL /* straight pipe before its flange, m */;
