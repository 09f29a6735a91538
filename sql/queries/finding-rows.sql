-- The findings of an import in the order they were told.
SELECT
    code, severity, file, line, header, record_id, value, reason, remedy
FROM findings
WHERE vintage = :vintage
ORDER BY finding;
