-- The margin rules of an evaluation, in order.
SELECT
    rule, edition, source, trust, pumps_short, pumps_thin, pumps_unproven,
    pumps_clear, pumps_apart
FROM evaluation_rules
WHERE evaluation = :evaluation
ORDER BY place;
