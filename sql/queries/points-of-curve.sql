-- A curve's points in order of flow.
SELECT *
FROM curve_points
WHERE vintage = :vintage AND curve_id = :curve_id
ORDER BY flow;
