-- Keep one pump's result under one condition.
INSERT INTO pump_results (
    evaluation, station, pump, condition, state, likely, reason,
    flow_basis, source_basis, off_curve, stands, flow_typical,
    flow_adverse, flow_favourable, npsha_typical, npsha_adverse,
    npsha_favourable, npshr_typical, npshr_adverse, npshr_favourable,
    required_typical, required_adverse, required_favourable,
    margin_typical, margin_adverse, margin_favourable, surplus_typical,
    surplus_adverse, surplus_favourable, atmosphere, barometer, gauge,
    elevation, velocity, friction, minor, vapour, gas, altitude,
    temperature, recorded, derived, assumed, unknown, leading_unknown,
    npshr_basis, running_set, running, sets_tried, sets_all, adverse_set, one_out_set,
    one_out_margin, one_out_surplus, curve_position, off_curve_set,
    stands_set, two_crossings, flags, rule_states, limit_level,
    limit_level_end, limit_temperature, limit_temperature_end, limit_flow,
    limit_flow_end
) VALUES (
    :evaluation, :station, :pump, :condition, :state, :likely, :reason,
    :flow_basis, :source_basis, :off_curve, :stands, :flow_typical,
    :flow_adverse, :flow_favourable, :npsha_typical, :npsha_adverse,
    :npsha_favourable, :npshr_typical, :npshr_adverse, :npshr_favourable,
    :required_typical, :required_adverse, :required_favourable,
    :margin_typical, :margin_adverse, :margin_favourable,
    :surplus_typical, :surplus_adverse, :surplus_favourable, :atmosphere,
    :barometer, :gauge, :elevation, :velocity, :friction, :minor, :vapour,
    :gas, :altitude, :temperature, :recorded, :derived, :assumed,
    :unknown, :leading_unknown,
    :npshr_basis, :running_set, :running, :sets_tried, :sets_all, :adverse_set,
    :one_out_set, :one_out_margin, :one_out_surplus, :curve_position,
    :off_curve_set, :stands_set, :two_crossings, :flags, :rule_states,
    :limit_level, :limit_level_end, :limit_temperature,
    :limit_temperature_end, :limit_flow, :limit_flow_end
);
