-- The facts: every import of the inventory as it was recorded, and what was
-- made of it.  Never changed after the import.  SI values; NULL is unknown.
CREATE TABLE vintages (
    -- One import of the inventory.
    vintage INTEGER PRIMARY KEY, -- the store's key, from 1
    label TEXT NOT NULL, -- what the owner calls it, e.g. a year
    inventory_sha256 TEXT NOT NULL UNIQUE, -- of all files' content
    imported_at TEXT NOT NULL -- ISO 8601, UTC
) STRICT;

CREATE TABLE files (
    -- One file of the inventory, counted: what was read is kept or told of.
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import
    file TEXT NOT NULL, -- its name, e.g. pumps.csv
    present INTEGER NOT NULL, -- 1: it was there
    sha256 TEXT NOT NULL, -- of its bytes, empty when it was not there
    bytes INTEGER NOT NULL, -- its length
    read INTEGER NOT NULL, -- records in it
    kept INTEGER NOT NULL, -- records in the tables below
    rejected INTEGER NOT NULL, -- records with an error
    out_of_scope INTEGER NOT NULL, -- records not to be audited
    PRIMARY KEY (vintage, file),
    CHECK (read = kept + rejected + out_of_scope)
) STRICT;

CREATE TABLE columns (
    -- One column of a file and how it was understood.
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import
    file TEXT NOT NULL, -- the file's name
    position INTEGER NOT NULL, -- from 1
    header TEXT NOT NULL, -- as written
    field TEXT, -- the column it was taken for; NULL: not used
    unit TEXT, -- the suffix of its unit; NULL: none
    PRIMARY KEY (vintage, file, position)
) STRICT;

CREATE TABLE stations (
    -- One station as recorded in stations.csv; NULL is unknown.
    station INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    station_id TEXT NOT NULL, -- the owner's key of the station
    name TEXT, -- what people call it
    service TEXT, -- what it pumps
    in_service TEXT, -- no: out of scope, and its pumps and pipes with it
    year_retired INTEGER, -- the year it was taken out of service
    latitude REAL, -- degrees north, WGS 84
    longitude REAL, -- degrees east, WGS 84
    site_elevation REAL, -- ground above sea level; sets the air pressure, m
    installation TEXT, -- where the pumps stand
    source_kind TEXT, -- open: a free surface; closed: a tank with gauge
                      -- pressure; main: a pressurised pipe
    source_pressure_low REAL, -- lowest gauge pressure of the tank or main, Pa
    source_pressure_normal REAL, -- usual gauge pressure, Pa
    source_pressure_elevation REAL, -- where the main's gauge sits, m
    cut_out_level REAL, -- lowest source level the controls permit, m
    record_low_level REAL, -- lowest source level ever recorded, m
    normal_level REAL, -- usual source level, m
    water_temp_summer REAL, -- warmest water of the year, K
    water_temp_normal REAL, -- usual water temperature, K
    barometer_low REAL, -- lowest air pressure at the site, absolute, not
                        -- reduced to sea level, Pa
    discharge_low REAL, -- lowest discharge level or hydraulic grade, m
    discharge_normal REAL, -- usual discharge level or hydraulic grade, m
    discharge_loss_flow REAL, -- flow of a measured discharge loss, m³/s
    discharge_loss_head REAL, -- head lost in the discharge at that flow, m
    discharge_length REAL, -- length of the discharge main, m
    discharge_bore REAL, -- inside diameter of the discharge main, m
    discharge_material TEXT, -- material of the discharge main
    discharge_year INTEGER, -- year the discharge main was laid
    discharge_minor_k REAL, -- sum of K of the discharge's fittings, on its
                            -- bore, pure number
    pumps_running_max INTEGER, -- most pumps the controls run at once
    pumps_running_firm INTEGER, -- pumps that meet firm capacity
    people_served INTEGER, -- people who depend on it
    flow_served REAL, -- flow that depends on it, m³/s
    outage_cost_per_day REAL, -- cost of a day's outage, the owner's currency
    days_to_restore REAL, -- days to bring it back
    note TEXT, -- anything else
    UNIQUE (vintage, station_id)
) STRICT;

CREATE TABLE curve_points (
    -- One point of a maker's curve, from curves.csv.
    point INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    curve_id TEXT NOT NULL, -- the curve it belongs to
    flow REAL NOT NULL, -- flow of the point, m³/s
    head REAL, -- head at that flow, m
    npshr REAL, -- NPSHR (NPSH3) at that flow, m
    efficiency REAL, -- per cent
    speed REAL, -- speed of the test, rev/min
    UNIQUE (vintage, curve_id, flow)
) STRICT;

CREATE TABLE suction_pipes (
    -- One pipe of a suction side, from suction_pipes.csv.
    pipe INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    station INTEGER NOT NULL REFERENCES stations, -- the station's key
    pipe_id TEXT NOT NULL, -- the owner's key of the pipe
    station_id TEXT NOT NULL, -- the station it belongs to
    draws_from TEXT, -- the pipe it draws from
    length REAL, -- its length, m
    bore REAL, -- its inside diameter, m
    material TEXT, -- its material
    lining TEXT, -- its lining
    condition TEXT, -- good, fair or poor
    year_installed INTEGER, -- year it was laid
    roughness REAL, -- absolute roughness, m
    hazen_williams_c REAL, -- Hazen-Williams C, pure number
    UNIQUE (vintage, pipe_id)
) STRICT;

CREATE TABLE suction_fittings (
    -- Fittings of one sort in a pipe, from suction_fittings.csv.
    suction_fitting INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    pipe INTEGER NOT NULL REFERENCES suction_pipes, -- the pipe's key
    pipe_id TEXT NOT NULL, -- the pipe it is in
    fitting TEXT NOT NULL, -- a row of the K table
    count INTEGER, -- how many
    k REAL -- K of V²/2g in the pipe's bore, pure number
) STRICT;

CREATE TABLE pumps (
    -- One pump's place and machine as recorded in pumps.csv.
    pump INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    line INTEGER NOT NULL, -- line of its file, from 1
    station INTEGER NOT NULL REFERENCES stations, -- the station's key
    suction_pipe INTEGER, -- the suction pipe's key; NULL: none recorded
    pump_id TEXT NOT NULL, -- the owner's key of the pump's place
    station_id TEXT NOT NULL, -- the station it stands in
    position TEXT, -- its place in the station
    make_up TEXT, -- its build
    in_service TEXT, -- no: out of scope
    datum_elevation REAL, -- the impeller eye: shaft axis of a horizontal pump,
                          -- inlet edge of the first-stage blades of a vertical
                          -- one, m
    curve_id TEXT, -- the maker's curve it runs on
    rated_flow REAL, -- flow at the rated point, m³/s
    rated_head REAL, -- head at the rated point, m
    rated_npshr REAL, -- NPSHR (NPSH3) at the rated point, m
    rated_speed REAL, -- speed at the rated point, rev/min
    max_speed REAL, -- highest speed the drive allows, rev/min
    bep_flow REAL, -- flow at best efficiency, m³/s
    stages INTEGER, -- number of stages
    double_suction TEXT, -- two impeller eyes
    suction_nozzle_bore REAL, -- bore of the suction flange, m
    eye_diameter REAL, -- diameter of the impeller eye, m
    inlet_elevation REAL, -- lip of the bell or opening, m
    inlet_diameter REAL, -- diameter of the bell or opening, m
    suction_pipe_id TEXT, -- the suction pipe at its flange
    largest_recorded_flow REAL, -- largest flow ever recorded, m³/s
    motor_power REAL, -- power of the motor, W
    year_installed INTEGER, -- year this machine was put in
    UNIQUE (vintage, pump_id)
) STRICT;

CREATE TABLE grades (
    -- How well a recorded value is known, where the owner says so.
    of_table TEXT NOT NULL, -- the record's table, e.g. pumps
    record INTEGER NOT NULL, -- the record's key in that table
    field TEXT NOT NULL, -- the value's column
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    grade TEXT NOT NULL CHECK (grade IN ('A', 'B', 'C', 'D', 'E')),
        -- A (best) to E (worst), as the owner wrote it
    PRIMARY KEY (of_table, record, field)
) STRICT, WITHOUT ROWID;

CREATE TABLE set_aside (
    -- One record that is not kept, and why.
    set_aside INTEGER PRIMARY KEY, -- the store's key
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    file TEXT NOT NULL, -- the file's name
    line INTEGER NOT NULL, -- its first line in that file, from 1
    record_id TEXT NOT NULL, -- its key, empty when it has none
    station_id TEXT NOT NULL, -- of a pump or pipe, as written; else empty
    fate TEXT NOT NULL CHECK (fate IN ('rejected', 'out of scope')),
        -- rejected, or out of scope
    reason TEXT NOT NULL, -- why, in words
    raw ANY -- as read: a text, or a blob where it is not UTF-8
) STRICT;

CREATE TABLE findings (
    -- One thing the import has to say about a file, a column or a record.
    finding INTEGER PRIMARY KEY, -- the store's key, in the order told
    vintage INTEGER NOT NULL REFERENCES vintages, -- the import it is from
    code TEXT NOT NULL, -- stable, e.g. number-form
    severity TEXT NOT NULL CHECK (severity IN ('error', 'doubt', 'note')),
        -- error: the record is rejected; doubt: kept; note: no record
    file TEXT NOT NULL, -- the file's name
    line INTEGER NOT NULL, -- from 1; 0: about the file as a whole
    header TEXT NOT NULL, -- the column's; empty: about the record
    record_id TEXT NOT NULL, -- the record's key, empty when it has none
    value TEXT NOT NULL, -- the cell as written
    reason TEXT NOT NULL, -- what is wrong
    remedy TEXT NOT NULL -- what to do
) STRICT;

CREATE INDEX pumps_of_station ON pumps (station, pump_id);
CREATE INDEX pipes_of_station ON suction_pipes (station, pipe_id);
CREATE INDEX drawing_pipes ON suction_pipes (vintage, station, draws_from)
    WHERE draws_from IS NOT NULL;
CREATE INDEX fittings_of_pipe ON suction_fittings (pipe, line);
CREATE INDEX grades_of_vintage ON grades (vintage);
CREATE INDEX set_aside_by_record
    ON set_aside (vintage, file, record_id, line);
CREATE INDEX set_aside_by_station ON set_aside (vintage, file, station_id);
CREATE INDEX findings_of_vintage ON findings (vintage);
