-- The limits of the checks beside the margin.
SELECT
    check_name, circumstance, lowest, highest, quantity, source, trust
FROM check_limits
ORDER BY check_name, circumstance;
