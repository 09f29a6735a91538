-- Evaluations: derived from one vintage, by one version, for one margin
-- rule.  Everything here can be worked out anew from the facts.  A value
-- that is not known exactly is taken at three corners: typical, adverse
-- (smallest margin) and favourable; NULL there is no honest figure.
CREATE TABLE evaluations (
    -- One evaluation of one vintage.
    evaluation INTEGER PRIMARY KEY, -- the store's key, from 1
    vintage INTEGER NOT NULL REFERENCES vintages, -- what was evaluated
    version TEXT NOT NULL, -- of the program
    rule TEXT NOT NULL, -- the margin rule ranked on
    UNIQUE (vintage, version, rule)
) STRICT;

CREATE TABLE station_results (
    -- One station: its worst pump in its worst condition.
    evaluation INTEGER NOT NULL REFERENCES evaluations, -- the evaluation
    station INTEGER NOT NULL REFERENCES stations, -- the station's key
    state TEXT NOT NULL CHECK (
        state IN ('short', 'thin', 'unproven', 'clear')), -- of that pump
    worst_pump INTEGER, -- that pump's key; NULL: no pump was kept
    worst_condition TEXT, -- that condition; NULL: no pump was kept
    pumps INTEGER NOT NULL, -- how many were judged
    pumps_rejected INTEGER NOT NULL, -- how many could not be: not kept
    pumps_short INTEGER NOT NULL, -- of these, by their worst condition
    pumps_thin INTEGER NOT NULL, -- likewise
    pumps_unproven INTEGER NOT NULL, -- likewise
    pumps_clear INTEGER NOT NULL, -- likewise
    PRIMARY KEY (evaluation, station),
    CHECK (pumps = pumps_short + pumps_thin + pumps_unproven + pumps_clear)
) STRICT, WITHOUT ROWID;

CREATE TABLE pump_results (
    -- One pump under one condition: its head balance and state.
    result INTEGER PRIMARY KEY, -- the store's key
    evaluation INTEGER NOT NULL REFERENCES evaluations, -- the evaluation
    station INTEGER NOT NULL REFERENCES stations, -- the station's key
    pump INTEGER NOT NULL REFERENCES pumps, -- the pump's key
    condition TEXT NOT NULL, -- the condition's name
    state TEXT NOT NULL CHECK (
        state IN ('short', 'thin', 'unproven', 'clear')), -- proven state
    likely TEXT NOT NULL CHECK (
        likely IN ('short', 'thin', 'unproven', 'clear')),
        -- state by the typical values; unproven: there are none
    reason TEXT NOT NULL, -- why it is not clear, or not proven
    flow_basis TEXT NOT NULL, -- how the flow was found
    source_basis TEXT NOT NULL, -- which level or pressure was used
    off_curve INTEGER NOT NULL, -- 1: the flow lies past its NPSHR curve
    stands INTEGER NOT NULL, -- 1: it cannot reach the discharge head
    flow_typical REAL, -- flow of this pump, m³/s
    flow_adverse REAL, -- likewise, adverse corner, m³/s
    flow_favourable REAL, -- likewise, favourable corner, m³/s
    npsha_typical REAL, -- NPSHA, m
    npsha_adverse REAL, -- likewise, adverse corner, m
    npsha_favourable REAL, -- likewise, favourable corner, m
    npshr_typical REAL, -- NPSHR, m
    npshr_adverse REAL, -- likewise, adverse corner, m
    npshr_favourable REAL, -- likewise, favourable corner, m
    required_typical REAL, -- NPSHA the margin rule asks for, m
    required_adverse REAL, -- likewise, adverse corner, m
    required_favourable REAL, -- likewise, favourable corner, m
    margin_typical REAL, -- NPSHA less NPSHR, m
    margin_adverse REAL, -- likewise, adverse corner, m
    margin_favourable REAL, -- likewise, favourable corner, m
    surplus_typical REAL, -- NPSHA less what the rule asks for, m
    surplus_adverse REAL, -- likewise, adverse corner, m
    surplus_favourable REAL, -- likewise, favourable corner, m
    atmosphere REAL, -- standard air at the site, typical corner, m
    barometer REAL, -- its fall in a storm, typical corner, m
    gauge REAL, -- gauge pressure of a tank or main, typical corner, m
    elevation REAL, -- liquid surface, or gauge, over the datum, typical corner, m
    velocity REAL, -- V²/2g at a main's gauge, typical corner, m
    friction REAL, -- of the suction pipes, typical corner, m
    minor REAL, -- losses of the suction fittings, typical corner, m
    vapour REAL, -- vapour pressure, typical corner, m
    gas REAL, -- allowance for gas, typical corner, m
    altitude REAL, -- of the site, m
    temperature REAL, -- of the water, typical, K
    recorded INTEGER NOT NULL, -- inputs recorded
    derived INTEGER NOT NULL, -- inputs derived from recorded ones
    assumed INTEGER NOT NULL, -- inputs taken from a default
    unknown INTEGER NOT NULL, -- inputs without an honest figure
    leading_unknown TEXT, -- the column to fill in first; NULL: none
    UNIQUE (evaluation, station, pump, condition)
) STRICT;

CREATE TABLE unknowns (
    -- One input to find out, of a pump that is unproven and in no condition
    -- worse: under the harshest condition it is unproven in.
    unknown INTEGER PRIMARY KEY, -- the store's key
    evaluation INTEGER NOT NULL REFERENCES evaluations, -- the evaluation
    station INTEGER NOT NULL REFERENCES stations, -- the station's key
    pump INTEGER NOT NULL REFERENCES pumps, -- the pump's key
    condition TEXT NOT NULL, -- the condition's name
    input TEXT NOT NULL, -- the column to fill in
    provenance TEXT NOT NULL CHECK (provenance IN ('derived', 'assumed', 'unknown')),
        -- assumed: a default stands in; unknown: nothing can
    field TEXT, -- of the default used; NULL: none
    circumstance TEXT, -- of the default used; NULL: none
    typical REAL, -- taken for it, SI; NULL: no honest figure
    adverse REAL, -- likewise, the end with the smaller margin, SI
    favourable REAL, -- likewise, the other end, SI
    swing REAL, -- what it alone moves the margin by, m; NULL: no bound
    settles INTEGER NOT NULL, -- 1: it alone could settle the state
    what TEXT NOT NULL, -- the rule or source it rests on now
    UNIQUE (evaluation, station, pump, condition, input)
) STRICT;

CREATE TABLE default_uses (
    -- How often a default was used in an evaluation.
    evaluation INTEGER NOT NULL REFERENCES evaluations, -- the evaluation
    field TEXT NOT NULL, -- of the default
    circumstance TEXT NOT NULL, -- of the default
    uses INTEGER NOT NULL, -- pumps and conditions it was used for
    PRIMARY KEY (evaluation, field, circumstance)
) STRICT, WITHOUT ROWID;
