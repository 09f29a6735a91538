-- The roughness table in order of the vocabulary.
SELECT material, good, fair, poor, source, trust
FROM roughness
ORDER BY place;
