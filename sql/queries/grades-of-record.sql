-- The grades of a record's values.
SELECT field, grade
FROM grades
WHERE of_table = :of_table AND record = :record
ORDER BY field;
