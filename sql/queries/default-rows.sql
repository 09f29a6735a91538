-- Every default, with how often an evaluation used it.
SELECT
    d.field, d.circumstance, d.typical, d.adverse, d.favourable, d.quantity,
    d.source, d.trust, coalesce(u.uses, 0) AS uses
FROM defaults AS d
LEFT JOIN default_uses AS u
    ON u.evaluation = :evaluation
    AND u.field = d.field
    AND u.circumstance = d.circumstance
ORDER BY d.field, d.circumstance;
