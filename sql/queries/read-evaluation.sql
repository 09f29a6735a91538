-- An evaluation with its vintage and its rule.
SELECT
    e.vintage, v.label, v.inventory_sha256,
    e.rule, r.ratio, r.floor, r.edition, r.source, r.trust
FROM evaluations AS e
JOIN vintages AS v ON v.vintage = e.vintage
LEFT JOIN margin_rules AS r ON r.rule = e.rule
WHERE e.evaluation = :evaluation;
