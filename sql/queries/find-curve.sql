-- Whether a curve has a point that was kept.
SELECT point
FROM curve_points
WHERE vintage = :vintage AND curve_id = :id
ORDER BY flow
LIMIT 1;
