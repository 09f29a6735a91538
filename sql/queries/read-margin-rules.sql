-- The margin rules of a vintage, or the one named, a row a tier: the
-- published ones, an owner's in the place of one of its name, then the
-- owner's others.
SELECT
    0 AS own, r.place, r.rule, r.make_up, r.measure, r.lift_limit, r.edition,
    r.source, r.trust, t.tier, t.over, t.ratio, t.floor
FROM margin_rules AS r
JOIN margin_tiers AS t ON t.rule = r.rule
WHERE (:rule IS NULL OR r.rule = :rule)
    AND r.rule NOT IN (
        SELECT rule FROM owner_margin_rules WHERE vintage = :vintage)
UNION ALL
SELECT
    r.place IS NULL, coalesce(r.place, o.line), o.rule, NULL, 'none', NULL,
    coalesce(o.edition, ''), coalesce(o.source, 'the owner''s own'), 'O', 1,
    NULL, o.ratio, o.floor
FROM owner_margin_rules AS o
LEFT JOIN margin_rules AS r ON r.rule = o.rule
WHERE o.vintage = :vintage AND (:rule IS NULL OR o.rule = :rule)
ORDER BY own, place, tier;
