-- Curves and suction pipes that nothing kept refers to: perhaps a slip in a
-- key.
SELECT 'curves.csv' AS file, min(line) AS line, curve_id AS id
FROM curve_points
WHERE vintage = :vintage
    AND curve_id NOT IN (
        SELECT curve_id FROM pumps
        WHERE vintage = :vintage AND curve_id IS NOT NULL)
GROUP BY curve_id
UNION ALL
SELECT 'suction_pipes.csv', line, pipe_id
FROM suction_pipes
WHERE vintage = :vintage
    AND pipe_id NOT IN (
        SELECT suction_pipe_id FROM pumps
        WHERE vintage = :vintage AND suction_pipe_id IS NOT NULL)
    AND pipe_id NOT IN (
        SELECT draws_from FROM suction_pipes
        WHERE vintage = :vintage AND draws_from IS NOT NULL)
ORDER BY file, line, id;
