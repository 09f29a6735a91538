-- Keep a record that is not kept: as read, with the reason.
INSERT INTO set_aside (
    vintage, file, line, record_id, station_id, fate, reason, raw
) VALUES (
    :vintage, :file, :line, :record_id, :station_id, :fate, :reason, :raw
);
