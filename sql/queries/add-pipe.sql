-- Keep one suction pipe; changes nothing when its key is taken.
INSERT INTO suction_pipes (
    vintage, line, station, pipe_id, station_id, draws_from, length, bore,
    material, lining, condition, year_installed, roughness,
    hazen_williams_c
) VALUES (
    :vintage, :line, :station, :pipe_id, :station_id, :draws_from,
    :length, :bore, :material, :lining, :condition, :year_installed,
    :roughness, :hazen_williams_c
)
ON CONFLICT (vintage, pipe_id) DO NOTHING;
