-- A kept margin rule of the owner's by its name.
SELECT owner_margin_rule, line
FROM owner_margin_rules
WHERE vintage = :vintage AND rule = :id;
