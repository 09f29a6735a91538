-- The defaults.
SELECT
    field, circumstance, typical, adverse, favourable, quantity, source, trust
FROM defaults
ORDER BY field, circumstance;
