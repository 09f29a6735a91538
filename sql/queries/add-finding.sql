-- Keep one finding of the import.
INSERT INTO findings (
    vintage, code, severity, file, line, header, record_id, value, reason,
    remedy
) VALUES (
    :vintage, :code, :severity, :file, :line, :header, :record_id, :value,
    :reason, :remedy
);
