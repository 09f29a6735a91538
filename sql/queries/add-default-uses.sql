-- Add to the uses of a default.
INSERT INTO default_uses (
    evaluation, field, circumstance, uses
) VALUES (
    :evaluation, :field, :circumstance, :uses
)
ON CONFLICT (evaluation, field, circumstance)
    DO UPDATE SET uses = uses + excluded.uses;
