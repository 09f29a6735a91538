-- How walls grow rougher, in the order of the materials.
SELECT
    a.material, a.condition, a.typical, a.adverse, a.favourable, a.source,
    a.trust
FROM ageing AS a
JOIN roughness AS r ON r.material = a.material
ORDER BY r.place, a.ageing;
