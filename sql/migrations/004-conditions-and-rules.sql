-- Conditions say the state of friction, additions to level and temperature;
-- margin rules have tiers.  What an owner wrote into the tables before stays.
-- Trust as in 002, and O: the owner's own.
CREATE TEMP TABLE conditions_before AS SELECT * FROM main.conditions;
DROP TABLE main.conditions;
CREATE TABLE main.conditions (
    -- A case to audit, where the inventory names none of its own.
    condition TEXT PRIMARY KEY, -- its name
    place INTEGER NOT NULL UNIQUE, -- its order, from 1, mildest first
    level TEXT NOT NULL CHECK (
        level IN ('normal', 'low', 'cut-out', 'record low')),
        -- which source level; low: the lowest the audit knows of
    level_addition REAL NOT NULL DEFAULT 0, -- to that level, m
    discharge TEXT NOT NULL CHECK (discharge IN ('normal', 'low')),
        -- which discharge level
    pressure TEXT NOT NULL CHECK (pressure IN ('normal', 'low')),
        -- which source pressure
    summer_temperature INTEGER NOT NULL, -- 1: warmest water; 0: usual
    temperature_addition REAL NOT NULL DEFAULT 0, -- to that temperature, K
    storm_barometer INTEGER NOT NULL, -- 1: take the barometer allowance
    suction_friction TEXT NOT NULL CHECK (suction_friction IN ('new', 'aged')),
        -- suction walls as laid, or rougher by their years
    discharge_friction TEXT NOT NULL CHECK (
        discharge_friction IN ('new', 'aged')) -- likewise, discharge walls
) STRICT;

-- The probable case has both sides at their age; the worst pairs an aged
-- suction (most loss) with a new discharge (most flow).
INSERT INTO main.conditions (
    place, condition, level, discharge, pressure, summer_temperature,
    storm_barometer, suction_friction, discharge_friction)
SELECT
    place, condition, level, discharge, pressure, summer_temperature,
    storm_barometer, 'aged',
    CASE condition WHEN 'normal' THEN 'aged' ELSE 'new' END
FROM conditions_before;
DROP TABLE conditions_before;

CREATE TEMP TABLE rules_before AS SELECT * FROM main.margin_rules;
DROP TABLE main.margin_rules;
CREATE TABLE main.margin_rules (
    -- What is asked of NPSHA over NPSHR; the figures are in margin_tiers.
    rule TEXT PRIMARY KEY, -- its name
    place INTEGER NOT NULL UNIQUE, -- its order; the first is ranked on
    make_up TEXT CHECK (make_up IN (
        'end suction', 'split case', 'vertical turbine', 'submersible',
        'self-priming')), -- the only one it is about; NULL: all
    measure TEXT NOT NULL CHECK (measure IN (
        'none', 'suction energy', 'suction specific speed', 'suction lift')),
        -- what decides the tier: suction energy as a multiple of the start
        -- of high; suction specific speed in rev/min, US gpm, ft; suction
        -- lift in m
    lift_limit REAL, -- most that suction lift with its losses and NPSHR may
                     -- come to, m; NULL: none
    edition TEXT NOT NULL, -- of the standard, empty when it is none
    source TEXT NOT NULL, -- where the rule comes from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N', 'O'))
        -- see the head of this file
) STRICT;

CREATE TABLE main.margin_tiers (
    -- Met when NPSHA is at least ratio * NPSHR and at least NPSHR + floor,
    -- by the last tier whose `over` the measure exceeds.
    rule TEXT NOT NULL REFERENCES margin_rules, -- the rule's name
    tier INTEGER NOT NULL CHECK (tier BETWEEN 1 AND 3), -- from 1
    over REAL, -- in the rule's measure; NULL of the first: it always holds
    ratio REAL NOT NULL, -- of NPSHA to NPSHR, pure number
    floor REAL NOT NULL, -- NPSHA over NPSHR, m
    PRIMARY KEY (rule, tier),
    CHECK ((tier = 1) = (over IS NULL))
) STRICT;

INSERT INTO main.margin_rules (rule, place, measure, edition, source, trust)
SELECT
    rule,
    CASE rule
        WHEN 'fixed head' THEN 1
        ELSE 6 + row_number() OVER (ORDER BY rule)
    END,
    'none', edition, source, trust
FROM rules_before;
INSERT INTO main.margin_tiers (rule, tier, ratio, floor)
SELECT rule, 1, ratio, floor
FROM rules_before;

INSERT INTO main.margin_rules
    (place, rule, make_up, measure, lift_limit, edition, source, trust)
VALUES
    (2, 'ANSI/HI 9.6.1-1998', NULL, 'suction energy', NULL, '1998',
     'from memory, check the source: ANSI/HI 9.6.1-1998, water and ' ||
     'wastewater, by low, high and very high suction energy',
     'M'),
    (3, 'ANSI/HI 9.6.1 after 2012', NULL, 'suction specific speed', NULL,
     'after 2012',
     'ANSI/HI 9.6.1 after 2012, as a one-page digest prints it; that it ' ||
     'holds for water is inferred',
     'S'),
    (4, 'Ill. Adm. Code 370.420', NULL, 'suction lift', NULL, '',
     '35 Ill. Adm. Code 370.420: a safety factor of 6 ft where the suction ' ||
     'lift, from the lead pump''s off level, is beyond its table; taken ' ||
     'here for any suction lift',
     'S'),
    (5, 'Ill. Adm. Code 370.420, self-priming', 'self-priming', 'none', 6.7,
     '',
     '35 Ill. Adm. Code 370.420: dynamic suction lift at the pump''s off ' ||
     'level and NPSHR together at most 22 ft; not adjusted for altitude',
     'S'),
    (6, 'ISO 5199 and ISO 9905', NULL, 'none', NULL, '',
     'from memory, check the source: ISO 5199 and ISO 9905, 10 % of NPSHR ' ||
     'and at least 0.5 m',
     'M')
ON CONFLICT (rule) DO NOTHING;
INSERT INTO main.margin_tiers (rule, tier, over, ratio, floor)
SELECT column1, column2, column3, column4, column5
FROM (VALUES
    ('ANSI/HI 9.6.1-1998', 1, NULL, 1.1, 0.6),
    ('ANSI/HI 9.6.1-1998', 2, 1.0, 1.3, 1.5),
    ('ANSI/HI 9.6.1-1998', 3, 1.5, 2.0, 1.5),
    ('ANSI/HI 9.6.1 after 2012', 1, NULL, 1.1, 0.6),
    ('ANSI/HI 9.6.1 after 2012', 2, 7500.0, 1.2, 1.0),
    ('Ill. Adm. Code 370.420', 1, NULL, 1.0, 0.0),
    ('Ill. Adm. Code 370.420', 2, 0.0, 1.0, 1.83),
    ('Ill. Adm. Code 370.420, self-priming', 1, NULL, 1.0, 0.0),
    ('ISO 5199 and ISO 9905', 1, NULL, 1.1, 0.5))
WHERE column1 NOT IN (SELECT rule FROM rules_before);
DROP TABLE rules_before;
