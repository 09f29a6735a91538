-- Figures an owner might dispute, each with where it comes from.
-- Trust: S read in the source named, C computed from a formula or from rows
-- here, M from memory (check the source before relying on it), P a proposal
-- of ours, N common practice without a source.
CREATE TABLE fitting_k (
    -- K of V²/2g in a fitting's bore: the vocabulary of suction fittings.
    fitting TEXT PRIMARY KEY, -- the word used in an inventory
    place INTEGER NOT NULL UNIQUE, -- its order in the vocabulary, from 1
    typical REAL NOT NULL, -- pure number
    adverse REAL NOT NULL, -- pure number, the most loss
    favourable REAL NOT NULL, -- pure number, the least loss
    source TEXT NOT NULL, -- where the figures come from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N'))
        -- see the head of this file: S, C, M, P or N
) STRICT;

CREATE TABLE roughness (
    -- Absolute roughness of a pipe wall: the vocabulary of materials.
    material TEXT PRIMARY KEY, -- the word used in an inventory
    place INTEGER NOT NULL UNIQUE, -- its order in the vocabulary, from 1
    good REAL NOT NULL, -- m, surface in good condition
    fair REAL NOT NULL, -- m, in fair condition: the tables' normal
    poor REAL NOT NULL, -- m, in poor condition
    source TEXT NOT NULL, -- where the figures come from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N'))
        -- S, C, M, P or N, as for fitting_k
) STRICT;

CREATE TABLE defaults (
    -- What is taken where the inventory has no value, as an interval.
    field TEXT NOT NULL, -- the input it stands for
    circumstance TEXT NOT NULL, -- a service or lay-out; empty: all others
    typical REAL, -- SI; NULL: no honest figure
    adverse REAL, -- SI, the end with the smaller margin; NULL: no bound
    favourable REAL, -- SI, the other end; NULL: no bound
    quantity TEXT NOT NULL CHECK (quantity IN (
        'pure', 'length', 'bore', 'flow', 'pressure', 'temperature',
        'speed', 'power', 'velocity')), -- what is measured; sets the unit
    source TEXT NOT NULL, -- where the figures come from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N')),
        -- S, C, M, P or N, as for fitting_k
    PRIMARY KEY (field, circumstance)
) STRICT;

CREATE TABLE margin_rules (
    -- Met when NPSHA is at least ratio * NPSHR and at least NPSHR + floor.
    rule TEXT PRIMARY KEY, -- its name
    ratio REAL NOT NULL, -- of NPSHA to NPSHR, pure number
    floor REAL NOT NULL, -- NPSHA over NPSHR, m
    edition TEXT NOT NULL, -- of the standard, empty when it is none
    source TEXT NOT NULL, -- where the rule comes from
    trust TEXT NOT NULL CHECK (trust IN ('S', 'C', 'M', 'P', 'N'))
        -- S, C, M, P or N, as for fitting_k
) STRICT;

CREATE TABLE conditions (
    -- A case to audit.
    condition TEXT PRIMARY KEY, -- its name
    place INTEGER NOT NULL UNIQUE, -- its order, from 1, mildest first
    level TEXT NOT NULL CHECK (level IN ('normal', 'low')),
        -- which source level
    discharge TEXT NOT NULL CHECK (discharge IN ('normal', 'low')),
        -- which discharge level
    pressure TEXT NOT NULL CHECK (pressure IN ('normal', 'low')),
        -- which source pressure
    summer_temperature INTEGER NOT NULL, -- 1: warmest water; 0: usual
    storm_barometer INTEGER NOT NULL -- 1: take the barometer allowance
) STRICT;

INSERT INTO fitting_k
    (place, fitting, typical, adverse, favourable, source, trust)
VALUES
    (1, 'bellmouth entrance', 0.05, 0.1, 0.03,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (2, 'rounded entrance', 0.25, 0.5, 0.04,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement, by radius',
     'S'),
    (3, 'flush entrance', 0.5, 0.65, 0.4,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (4, 'projecting entrance', 0.8, 1.0, 0.5,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (5, '90 elbow, standard', 0.25, 0.6, 0.21,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (6, '90 elbow, long radius', 0.18, 0.33, 0.07,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (7, '45 elbow', 0.18, 0.18, 0.09,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (8, 'mitre 90', 0.8, 1.04, 0.64,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (9, 'mitre 60', 0.35, 0.455, 0.28,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (10, 'mitre 45', 0.2, 0.26, 0.16,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (11, 'mitre 30', 0.1, 0.13, 0.08,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (12, 'tee, run', 0.3, 0.39, 0.24,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (13, 'tee, branch', 0.75, 1.0, 0.75,
     'handbook tables of minor losses, several, as compiled; the ' ||
     'range has no lower end but the figure itself',
     'S'),
    (14, 'wye 45', 0.5, 0.65, 0.4,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (15, 'concentric reducer', 0.03, 0.23, 0.03,
     'handbook tables of minor losses, several, as compiled; the ' ||
     'range has no lower end but the figure itself; on the small ' ||
     'bore',
     'S'),
    (16, 'eccentric reducer', 0.05, 0.3, 0.03,
     'proposal: the concentric reducer and a little more',
     'P'),
    (17, 'gate valve', 0.15, 0.3, 0.1,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (18, 'butterfly valve', 0.3, 0.6, 0.16,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (19, 'ball valve', 0.04, 0.052, 0.032,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (20, 'eccentric plug valve', 1.0, 1.3, 0.8,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (21, 'eccentric plug valve, full bore', 0.5, 0.65, 0.4,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S'),
    (22, 'swing check valve', 1.0, 2.5, 0.6,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement',
     'S'),
    (23, 'knife gate valve', 0.25, 0.3, 0.2,
     'handbook tables of minor losses, several, as compiled; ' ||
     'ranges are their disagreement; typical is their middle',
     'S'),
    (24, 'foot valve', 1.5, 15, 0.8,
     'ends: handbook tables of minor losses, several, as compiled; ' ||
     'typical: a proposal; ask the maker',
     'P'),
    (25, 'basket strainer', 1.5, 4, 1,
     'from memory, check the source: clean 1 to 2; the adverse end ' ||
     'is 2 doubled for blinding',
     'M'),
    (26, 'exit', 1.0, 1.3, 0.8,
     'handbook tables of minor losses, several, as compiled; one ' ||
     'figure without a range: -20 % and +30 % about it, the ' ||
     'general spread of such tables',
     'S');

INSERT INTO roughness (place, material, good, fair, poor, source, trust)
VALUES
    (1, 'smooth plastic', 0.000003, 0.000003, 0.000003,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good or poor: that of normal stands there',
     'S'),
    (2, 'lined metal', 0.00003, 0.00003, 0.00003,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good or poor: that of normal stands there',
     'S'),
    (3, 'uncoated steel', 0.000015, 0.00003, 0.00006,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (4, 'coated steel', 0.00003, 0.00006, 0.00015,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (5, 'rusty steel', 0.00015, 0.00015, 0.0003,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good: that of normal stands there',
     'S'),
    (6, 'galvanised iron', 0.00006, 0.00015, 0.0003,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (7, 'uncoated cast iron', 0.00015, 0.0003, 0.0006,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (8, 'tuberculated main, slight', 0.0006, 0.0015, 0.003,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (9, 'tuberculated main, moderate', 0.0015, 0.003, 0.006,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (10, 'tuberculated main, appreciable', 0.006, 0.015, 0.03,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (11, 'tuberculated main, severe', 0.015, 0.03, 0.06,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (12, 'prestressed concrete', 0.00003, 0.00006, 0.00015,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (13, 'precast concrete', 0.00006, 0.00015, 0.0006,
     'HR Wallingford roughness tables, as reproduced',
     'S'),
    (14, 'PVC, cemented joints', 0.00003, 0.00003, 0.00003,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good or poor: that of normal stands there',
     'S'),
    (15, 'PVC, ring joints', 0.00006, 0.00006, 0.00006,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good or poor: that of normal stands there',
     'S'),
    (16, 'GRP', 0.00006, 0.00006, 0.00006,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good or poor: that of normal stands there',
     'S'),
    (17, 'slimed concrete', 0.003, 0.003, 0.006,
     'HR Wallingford roughness tables, as reproduced; no figure ' ||
     'for good: that of normal stands there',
     'S');

INSERT INTO defaults
    (field, circumstance, typical, adverse, favourable, quantity, source, trust)
VALUES
    ('water_temp_summer', '', 297.15, 308.15, 283.15, 'temperature',
     'proposal, no outside authority',
     'P'),
    ('water_temp_summer', 'raw water', 297.15, 305.15, 285.15, 'temperature',
     'proposal, no outside authority',
     'P'),
    ('water_temp_summer', 'potable', 293.15, 303.15, 283.15, 'temperature',
     'proposal, no outside authority',
     'P'),
    ('water_temp_summer', 'wastewater', 298.15, 308.15, 288.15, 'temperature',
     'from memory, check the source: Metcalf & Eddy, Wastewater ' ||
     'Engineering: 3 to 27 °C across the US, 30 to 35 °C in hot ' ||
     'countries',
     'M'),
    ('water_temp_summer', 'industrial', 303.15, NULL, 283.15, 'temperature',
     'proposal; a process may heat its water to any temperature',
     'P'),
    ('water_temp_normal', 'industrial', 298.15, NULL, 278.15, 'temperature',
     'proposal; a process may heat its water to any temperature',
     'P'),
    ('water_temp_normal', '', 287.15, 297.15, 277.15, 'temperature',
     'proposal, no outside authority',
     'P'),
    ('water_temp_normal', 'wastewater', 291.15, 300.15, 283.15, 'temperature',
     'from memory, check the source: Metcalf & Eddy, Wastewater ' ||
     'Engineering: 3 to 27 °C across the US, 30 to 35 °C in hot ' ||
     'countries',
     'M'),
    ('barometer_fall', '', 0.02, 0.03, 0, 'pure',
     'proposal: part of the standard pressure at the site',
     'P'),
    ('gas_allowance', 'wastewater', 0.6, 0.6, 0, 'length',
     'from memory, check the source: Jones et al., Pumping Station ' ||
     'Design',
     'M'),
    ('gas_allowance', '', 0, 0.6, 0, 'length',
     'from memory, check the source: Jones et al., Pumping Station ' ||
     'Design; service unknown: it may be wastewater',
     'M'),
    ('suction_roughness', '', 0.00015, 0.006, 0.000003, 'bore',
     'HR Wallingford roughness tables, as reproduced: plastic to ' ||
     'moderately tuberculated; typical is galvanised iron',
     'S'),
    ('discharge_roughness', '', 0.00015, 0.000003, 0.006, 'bore',
     'HR Wallingford roughness tables, as reproduced: plastic to ' ||
     'moderately tuberculated; smooth is adverse, since more flow ' ||
     'needs more NPSH',
     'S'),
    ('suction_minor_k', '', 0.93, 2.13, 0.23, 'pure',
     'sum over the K table: an entrance, a 90 elbow, a gate valve, ' ||
     'a reducer; the ends of their ranges',
     'C'),
    ('suction_minor_k', 'suction lift', 2.43, 17.13, 0.23, 'pure',
     'the same sum, and a foot valve; the favourable end without ' ||
     'one',
     'C'),
    ('discharge_minor_k', '', 5, 0, 20, 'pure',
     'proposal, no outside authority; little loss is adverse, ' ||
     'since more flow needs more NPSH',
     'P'),
    ('wet_pit_inlet_loss', '', 0.02, 0.1, 0, 'length',
     'proposal, no outside authority',
     'P'),
    ('suction_loss', '', 0.5, NULL, 0, 'length',
     'proposal, no outside authority; dry pit with no pipe ' ||
     'recorded: no adverse bound',
     'P'),
    ('npshr_speed_exponent_up', '', 2, 2, 2, 'pure',
     'Andrews 2007: exponent 2 going up, 1.5 coming down',
     'S'),
    ('npshr_speed_exponent_down', '', 1.5, 1.5, 1.5, 'pure',
     'Andrews 2007: exponent 2 going up, 1.5 coming down',
     'S'),
    ('salinity', 'seawater', 35, 35, 35, 'pure',
     'practical salinity of the standard seawater of EOS-80, taken ' ||
     'as g/kg',
     'C');

INSERT INTO margin_rules (rule, ratio, floor, edition, source, trust)
VALUES
    ('fixed head', 1, 1.5, '', 'common practice, no source', 'N');

INSERT INTO conditions
    (place, condition, level, discharge, pressure, summer_temperature,
     storm_barometer)
VALUES
    (1, 'normal', 'normal', 'normal', 'normal', 0, 0),
    (2, 'summer low', 'low', 'low', 'low', 1, 1);
