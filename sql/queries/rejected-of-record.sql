-- How many rejected rows of a file had this key.
SELECT count(*) AS rejected
FROM set_aside
WHERE vintage = :vintage AND file = :file AND record_id = :id
    AND fate = 'rejected';
