-- A kept condition of the owner's by its name.
SELECT owner_condition, line
FROM owner_conditions
WHERE vintage = :vintage AND condition = :id;
