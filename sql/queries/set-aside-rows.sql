-- The records of an import that were not kept, by file and line.
SELECT file, line, record_id, fate, reason
FROM set_aside
WHERE vintage = :vintage
ORDER BY file, line, set_aside;
