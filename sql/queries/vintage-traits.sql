-- Whether a vintage has any grade.
SELECT EXISTS (SELECT 1 FROM grades WHERE vintage = :vintage) AS graded;
