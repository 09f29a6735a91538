-- Begin an evaluation; the store numbers it.
INSERT INTO evaluations (
    vintage, version, rule
) VALUES (
    :vintage, :version, :rule
);
