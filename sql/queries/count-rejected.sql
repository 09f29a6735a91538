-- How many records of one file an import rejected.
SELECT count(*) AS records
FROM set_aside
WHERE vintage = :vintage AND file = :file AND fate = 'rejected';
