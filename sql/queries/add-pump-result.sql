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
    temperature, recorded, derived, assumed, unknown, leading_unknown
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
    :unknown, :leading_unknown
);
