-- An evaluation is of a year: pipes are as old as that makes them.  Those
-- made before are of the year their vintage was imported in.
-- The rows of an evaluation wait for it without their parent until the end.
PRAGMA defer_foreign_keys = ON;
CREATE TEMP TABLE evaluations_before AS SELECT * FROM main.evaluations;
DROP TABLE main.evaluations;
CREATE TABLE main.evaluations (
    -- One evaluation of one vintage.
    evaluation INTEGER PRIMARY KEY, -- the store's key, from 1
    vintage INTEGER NOT NULL REFERENCES vintages, -- what was evaluated
    version TEXT NOT NULL, -- of the program
    rule TEXT NOT NULL, -- the margin rule ranked on
    year INTEGER NOT NULL, -- of the audit: pipes are as old as that makes them
    UNIQUE (vintage, version, rule, year)
) STRICT;
INSERT INTO main.evaluations (evaluation, vintage, version, rule, year)
SELECT
    e.evaluation, e.vintage, e.version, e.rule,
    CAST(substr(v.imported_at, 1, 4) AS INTEGER)
FROM evaluations_before AS e
JOIN vintages AS v ON v.vintage = e.vintage;
DROP TABLE evaluations_before;
