-- Begin an evaluation; the store numbers it.
INSERT INTO evaluations (
    vintage, version, rule, year
) VALUES (
    :vintage, :version, :rule, :year
);
