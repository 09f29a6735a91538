-- The margin rules.
SELECT rule, ratio, floor, edition, source, trust
FROM margin_rules
ORDER BY rule;
