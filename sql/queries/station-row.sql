-- One station of the ranked list, with its worst pump and condition.
SELECT
    s.station_id, s.name AS station_name, s.service, s.installation,
    s.people_served, s.latitude, s.longitude, s.line,
    t.state AS station_state, t.pumps, t.pumps_rejected,
    t.pumps_short, t.pumps_thin,
    t.pumps_unproven, t.pumps_clear,
    p.pump_id, p.make_up, r.condition,
    r.state, r.likely, r.reason, r.flow_basis, r.source_basis,
    r.off_curve, r.stands, r.flow_typical, r.flow_adverse,
    r.flow_favourable, r.npsha_typical, r.npsha_adverse,
    r.npsha_favourable, r.npshr_typical, r.npshr_adverse,
    r.npshr_favourable, r.required_typical, r.required_adverse,
    r.required_favourable, r.margin_typical, r.margin_adverse,
    r.margin_favourable, r.surplus_typical, r.surplus_adverse,
    r.surplus_favourable, r.atmosphere, r.barometer, r.gauge, r.elevation,
    r.velocity, r.friction, r.minor, r.vapour, r.gas, r.altitude,
    r.temperature, r.recorded, r.derived, r.assumed, r.unknown,
    r.leading_unknown,
    r.npshr_basis, r.running_set, r.running, r.sets_tried, r.sets_all, r.adverse_set,
    r.one_out_set, r.one_out_margin, r.one_out_surplus, r.curve_position,
    r.off_curve_set, r.stands_set, r.two_crossings, r.flags, r.rule_states,
    r.limit_level, r.limit_level_end, r.limit_temperature,
    r.limit_temperature_end, r.limit_flow, r.limit_flow_end,
    EXISTS (
        SELECT 1
        FROM pump_results AS b
        WHERE
            b.evaluation = t.evaluation
            AND b.station = t.station
            AND (b.flags <> '' OR b.rule_states GLOB '*[ST]*')
    ) AS any_beside
FROM station_results AS t
JOIN stations AS s ON s.station = t.station
LEFT JOIN pumps AS p ON p.pump = t.worst_pump
LEFT JOIN pump_results AS r
    ON r.evaluation = t.evaluation
    AND r.station = t.station
    AND r.pump = t.worst_pump
    AND r.condition = t.worst_condition
WHERE t.evaluation = :evaluation AND t.station = :station;
