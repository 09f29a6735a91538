-- The owner's margin rules, each with the published rule of its name, letter
-- case aside, and the first line of the owner's rules that have its name so.
SELECT
    o.line, o.rule, r.rule AS shipped,
    min(o.line) OVER (PARTITION BY lower(o.rule)) AS first_line
FROM owner_margin_rules AS o
LEFT JOIN margin_rules AS r ON lower(r.rule) = lower(o.rule)
WHERE o.vintage = :vintage
ORDER BY o.line, o.owner_margin_rule;
