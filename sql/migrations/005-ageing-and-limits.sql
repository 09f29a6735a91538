-- How walls grow rougher with their years, the limits of the checks beside
-- the margin, and the defaults both rest on.  Trust as in 002.
CREATE TABLE ageing (
    -- Growth of a wall's absolute roughness, by condition of the surface.
    ageing INTEGER PRIMARY KEY, -- the store's key
    material TEXT NOT NULL REFERENCES roughness, -- the word of roughness
    condition TEXT CHECK (condition IN ('good', 'fair', 'poor')),
        -- NULL: not recorded, or any that has no row of its own
    typical REAL NOT NULL, -- m a year
    adverse REAL NOT NULL, -- m a year, the fastest
    favourable REAL NOT NULL, -- m a year, the slowest
    source TEXT NOT NULL, -- where the figures come from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N'))
        -- S, C, M, P or N, as for fitting_k
) STRICT;
CREATE UNIQUE INDEX ageing_of_surface
    ON ageing (material, coalesce(condition, ''));

INSERT INTO ageing (material, condition, typical, adverse, favourable, source,
                    trust)
SELECT
    m.material, r.column1, r.column2, r.column3, r.column4,
    'from memory, check the source: Lamont 1981, growth of roughness with ' ||
    'age, attack slight, moderate, appreciable, severe; which attack goes ' ||
    'with which condition is a proposal',
    'M'
FROM roughness AS m
CROSS JOIN (VALUES
    (NULL, 0.076e-3, 0.76e-3, 0.025e-3),
    ('good', 0.025e-3, 0.025e-3, 0.025e-3),
    ('fair', 0.076e-3, 0.076e-3, 0.076e-3),
    ('poor', 0.25e-3, 0.76e-3, 0.25e-3)) AS r
WHERE m.material IN ('uncoated cast iron', 'uncoated steel', 'rusty steel')
ORDER BY m.place;

INSERT INTO ageing (material, typical, adverse, favourable, source, trust)
SELECT
    material, 0, 0.025e-3, 0,
    'proposal, no outside authority: none while the coating holds; at ' ||
    'worst the slight attack of Lamont 1981, from memory',
    'P'
FROM roughness
WHERE material IN ('galvanised iron', 'coated steel')
ORDER BY place;

INSERT INTO ageing (material, typical, adverse, favourable, source, trust)
SELECT
    material, 0, 0, 0,
    CASE
        WHEN material LIKE 'tuberculated main%' OR material LIKE 'slimed%'
            THEN 'proposal, no outside authority: none, its roughness ' ||
                'already holds its age'
        ELSE 'proposal, no outside authority: none, a wall that does not ' ||
            'corrode'
    END,
    'P'
FROM roughness
WHERE material NOT IN (SELECT material FROM ageing)
ORDER BY place;

CREATE TABLE check_limits (
    -- A limit that a check beside the margin holds a figure to.
    check_name TEXT NOT NULL, -- the check
    circumstance TEXT NOT NULL, -- a service, make-up or size; empty: others
    lowest REAL, -- SI; NULL: no limit on that side
    highest REAL, -- SI; NULL: no limit on that side
    quantity TEXT NOT NULL CHECK (quantity IN (
        'pure', 'length', 'bore', 'flow', 'pressure', 'temperature',
        'speed', 'power', 'velocity')), -- what is measured; sets the unit
    source TEXT NOT NULL, -- where the figures come from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N')),
        -- S, C, M, P or N, as for fitting_k
    PRIMARY KEY (check_name, circumstance)
) STRICT;

INSERT INTO check_limits
    (check_name, circumstance, lowest, highest, quantity, source, trust)
VALUES
    ('suction velocity', '', NULL, 2.4, 'velocity',
     'from memory, check the source: ANSI/HI 9.6.6, 8 ft/s',
     'M'),
    ('suction velocity', 'wastewater', 0.9, 2.1, 'velocity',
     '30 Tex. Adm. Code 217.62: 3 to 7 ft/s',
     'S'),
    ('suction lift', '', NULL, 4.6, 'length',
     'Wis. Adm. Code NR 811.28: 15 ft',
     'S'),
    ('straight run', '', 5, NULL, 'pure',
     'API RP 686, as quoted: bores of straight pipe before the flange',
     'S'),
    ('operating region', '', 0.7, 1.2, 'pure',
     'ANSI/HI 9.6.3-2012, preferred operating region: part of the flow at ' ||
     'best efficiency; the allowable region is the maker''s',
     'S'),
    ('operating region', 'specific speed over 4500', 0.8, 1.15, 'pure',
     'ANSI/HI 9.6.3-2012, preferred operating region: part of the flow at ' ||
     'best efficiency; specific speed in rev/min, US gpm, ft; sources put ' ||
     'the upper end at 1.10, 1.15 and 1.20',
     'S'),
    ('bell velocity', '', 0.6, 2.7, 'velocity',
     'from memory, check the source: ANSI/HI 9.8, below 315 L/s',
     'M'),
    ('bell velocity', 'over 315 L/s', 0.9, 2.4, 'velocity',
     'from memory, check the source: ANSI/HI 9.8, 315 to 1,260 L/s',
     'M'),
    ('bell velocity', 'over 1260 L/s', 1.2, 2.1, 'velocity',
     'from memory, check the source: ANSI/HI 9.8, above 1,260 L/s',
     'M'),
    ('suction pressure of a booster', '', 241317, NULL, 'pressure',
     'Wis. Adm. Code NR 811.81: 35 psi in the main',
     'S'),
    ('suction energy', 'end suction', NULL, 160e6, 'pure',
     'from memory, check the source: ANSI/HI 9.6.1, start of high suction ' ||
     'energy (inch, rev/min, US gpm, ft)',
     'M'),
    ('suction energy', 'split case', NULL, 120e6, 'pure',
     'from memory, check the source: ANSI/HI 9.6.1, start of high suction ' ||
     'energy, split case or radial inlet (inch, rev/min, US gpm, ft)',
     'M'),
    ('suction energy', 'vertical turbine', NULL, 200e6, 'pure',
     'from memory, check the source: ANSI/HI 9.6.1, start of high suction ' ||
     'energy (inch, rev/min, US gpm, ft)',
     'M'),
    ('suction energy', 'submersible', NULL, 100e6, 'pure',
     'from memory, check the source: ANSI/HI 9.6.1, start of high suction ' ||
     'energy, two-vane sewage (inch, rev/min, US gpm, ft)',
     'M');

INSERT INTO defaults
    (field, circumstance, typical, adverse, favourable, quantity, source, trust)
VALUES
    ('suction_specific_speed', '', 164.585, NULL, NULL, 'pure',
     'common figure, no source: 8,500 in rev/min, US gpm, ft; here in ' ||
     'rev/min, m³/s, m; for an estimate only',
     'P'),
    ('pipe_age', '', 40, 100, 0, 'pure',
     'proposal, no outside authority; years',
     'P'),
    ('eye_of_nozzle', 'end suction', 0.9, 0.9, 0.9, 'pure',
     'from memory, check the source: diameter of the impeller eye as part ' ||
     'of the suction nozzle''s bore',
     'M'),
    ('eye_of_nozzle', 'split case', 0.75, 0.75, 0.75, 'pure',
     'from memory, check the source: diameter of the impeller eye as part ' ||
     'of the suction nozzle''s bore',
     'M'),
    ('suction_energy_very_high', '', 1.5, 1.5, 1.5, 'pure',
     'from memory, check the source: ANSI/HI 9.6.1, start of very high ' ||
     'suction energy as a multiple of the start of high',
     'M');
