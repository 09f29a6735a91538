-- A margin rule of an evaluation, before any pump is judged.
INSERT INTO evaluation_rules (
    evaluation, place, rule, edition, source, trust, pumps_short, pumps_thin,
    pumps_unproven, pumps_clear, pumps_apart
) VALUES (
    :evaluation, :place, :rule, :edition, :source, :trust, 0, 0, 0, 0, 0
);
