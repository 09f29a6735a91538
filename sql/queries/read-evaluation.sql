-- An evaluation with its vintage.
SELECT e.vintage, e.rule, e.year, v.label, v.inventory_sha256
FROM evaluations AS e
JOIN vintages AS v ON v.vintage = e.vintage
WHERE e.evaluation = :evaluation;
