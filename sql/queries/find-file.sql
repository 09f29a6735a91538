-- The sums of one file.
SELECT present, sha256, bytes, read, kept, rejected, out_of_scope
FROM files
WHERE vintage = :vintage AND file = :file;
