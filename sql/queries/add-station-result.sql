-- Keep one station's result.
INSERT INTO station_results (
    evaluation, station, state, worst_pump, worst_condition, pumps,
    pumps_rejected,
    pumps_short, pumps_thin, pumps_unproven, pumps_clear
) VALUES (
    :evaluation, :station, :state, :worst_pump, :worst_condition, :pumps,
    :pumps_rejected,
    :pumps_short, :pumps_thin, :pumps_unproven, :pumps_clear
);
