-- How many pumps of a station were rejected.
SELECT count(*) AS rejected
FROM set_aside
WHERE vintage = :vintage AND file = 'pumps.csv' AND station_id = :id
    AND fate = 'rejected';
