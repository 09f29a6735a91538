-- A kept point of a curve by its flow.
SELECT point, line
FROM curve_points
WHERE vintage = :vintage AND curve_id = :curve_id AND flow = :flow;
