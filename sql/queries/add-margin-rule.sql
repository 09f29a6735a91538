-- Keep one of the owner's margin rules; changes nothing when its name is
-- taken.
INSERT INTO owner_margin_rules (
    vintage, line, rule, ratio, floor, edition, source
) VALUES (
    :vintage, :line, :rule, :ratio, :floor, :edition, :source
)
ON CONFLICT (vintage, rule) DO NOTHING;
