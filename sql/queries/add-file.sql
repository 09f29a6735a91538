-- Keep the sums of one file.
INSERT INTO files (
    vintage, file, present, sha256, bytes, read, kept, rejected, out_of_scope
) VALUES (
    :vintage, :file, :present, :sha256, :bytes, :read, :kept, :rejected,
    :out_of_scope
);
