-- Keep one suction fitting.
INSERT INTO suction_fittings (
    vintage, line, pipe, pipe_id, fitting, count, k
) VALUES (
    :vintage, :line, :pipe, :pipe_id, :fitting, :count, :k
);
