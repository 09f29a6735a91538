-- Keep one thing to find out.
INSERT INTO unknowns (
    evaluation, station, pump, condition, input, provenance, field,
    circumstance, typical, adverse, favourable, swing, settles, what
) VALUES (
    :evaluation, :station, :pump, :condition, :input, :provenance, :field,
    :circumstance, :typical, :adverse, :favourable, :swing, :settles,
    :what
);
