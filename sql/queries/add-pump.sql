-- Keep one pump; changes nothing when its key is taken.
INSERT INTO pumps (
    vintage, line, station, suction_pipe, pump_id, station_id, position,
    make_up, in_service, datum_elevation, curve_id, rated_flow,
    rated_head, rated_npshr, rated_speed, max_speed, bep_flow, stages,
    double_suction, suction_nozzle_bore, eye_diameter, inlet_elevation,
    inlet_diameter, suction_pipe_id, largest_recorded_flow, motor_power,
    year_installed, straight_run
) VALUES (
    :vintage, :line, :station, :suction_pipe, :pump_id, :station_id,
    :position, :make_up, :in_service, :datum_elevation, :curve_id,
    :rated_flow, :rated_head, :rated_npshr, :rated_speed, :max_speed,
    :bep_flow, :stages, :double_suction, :suction_nozzle_bore,
    :eye_diameter, :inlet_elevation, :inlet_diameter, :suction_pipe_id,
    :largest_recorded_flow, :motor_power, :year_installed,
    :straight_run
)
ON CONFLICT (vintage, pump_id) DO NOTHING;
