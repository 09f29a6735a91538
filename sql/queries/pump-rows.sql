-- The results of a station's pumps, mildest condition first.
SELECT
    s.station_id, s.name AS station_name, s.service, s.installation,
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
    r.limit_temperature_end, r.limit_flow, r.limit_flow_end
FROM pump_results AS r
JOIN stations AS s ON s.station = r.station
JOIN pumps AS p ON p.pump = r.pump
LEFT JOIN conditions AS c ON c.condition = r.condition
LEFT JOIN owner_conditions AS o
    ON o.vintage = s.vintage AND o.condition = r.condition
WHERE r.evaluation = :evaluation AND r.station = :station
ORDER BY p.pump_id, coalesce(o.line, c.place) NULLS LAST, r.condition;
