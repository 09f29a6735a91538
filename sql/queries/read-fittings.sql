-- The K table in order of the vocabulary.
SELECT fitting, typical, adverse, favourable, source, trust
FROM fitting_k
ORDER BY place;
