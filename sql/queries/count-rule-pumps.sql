-- Add to the pumps that a margin rule was asked about.
UPDATE evaluation_rules
SET
    pumps_short = pumps_short + :pumps_short,
    pumps_thin = pumps_thin + :pumps_thin,
    pumps_unproven = pumps_unproven + :pumps_unproven,
    pumps_clear = pumps_clear + :pumps_clear,
    pumps_apart = pumps_apart + :pumps_apart
WHERE evaluation = :evaluation AND place = :place;
