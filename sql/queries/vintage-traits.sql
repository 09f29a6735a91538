-- Whether a vintage has any grade, and any rejected record.
SELECT
    EXISTS (SELECT 1 FROM grades WHERE vintage = :vintage) AS graded,
    EXISTS (
        SELECT 1 FROM set_aside
        WHERE vintage = :vintage AND fate = 'rejected'
    ) AS rejected;
