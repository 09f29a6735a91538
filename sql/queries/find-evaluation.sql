-- The newest evaluation of a vintage, of this version and rule if given.
SELECT evaluation, version, rule
FROM evaluations
WHERE vintage = :vintage
    AND (:version IS NULL OR version = :version)
    AND (:rule IS NULL OR rule = :rule)
ORDER BY evaluation DESC
LIMIT 1;
