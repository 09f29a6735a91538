-- The stations of an evaluation, at risk first, unproven last.
SELECT station, rank
FROM station_order
WHERE evaluation = :evaluation
ORDER BY block, rank;
