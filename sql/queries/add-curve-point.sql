-- Keep one point of a curve; changes nothing when its key is taken.
INSERT INTO curve_points (
    vintage, line, curve_id, flow, head, npshr, efficiency, speed
) VALUES (
    :vintage, :line, :curve_id, :flow, :head, :npshr, :efficiency, :speed
)
ON CONFLICT (vintage, curve_id, flow) DO NOTHING;
