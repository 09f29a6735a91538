-- The newest evaluation of a vintage, of this version, rule and year if
-- given.
SELECT evaluation, version, rule, year
FROM evaluations
WHERE vintage = :vintage
    AND (:version IS NULL OR version = :version)
    AND (:rule IS NULL OR rule = :rule)
    AND (:year IS NULL OR year = :year)
ORDER BY evaluation DESC
LIMIT 1;
