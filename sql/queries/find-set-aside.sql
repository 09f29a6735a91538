-- What became of a record that is not kept: the first of that key.
SELECT fate, line
FROM set_aside
WHERE vintage = :vintage AND file = :file AND record_id = :id
ORDER BY line, set_aside
LIMIT 1;
