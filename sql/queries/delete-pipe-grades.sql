-- Take back the grades of a suction pipe's values.
DELETE FROM grades
WHERE of_table = 'suction_pipes' AND record = :pipe;
