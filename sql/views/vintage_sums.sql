CREATE VIEW vintage_sums AS
-- What became of the records of each import.
SELECT
    v.vintage, v.label, v.imported_at, sum(f.read) AS read,
    sum(f.kept) AS kept, sum(f.rejected) AS rejected,
    sum(f.out_of_scope) AS out_of_scope
FROM vintages AS v
LEFT JOIN files AS f ON f.vintage = v.vintage
GROUP BY v.vintage;
