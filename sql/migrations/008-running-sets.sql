-- What was found over all running sets of a pump, and by every margin rule.
-- NULL in the new columns: of an evaluation made before they were kept, or
-- where there is no such set or figure.
ALTER TABLE pump_results
    ADD COLUMN npshr_basis TEXT /* what NPSHR comes from: its curve, ... */;
ALTER TABLE pump_results
    ADD COLUMN running_set TEXT /* the set that governs, in words: "alone" */;
ALTER TABLE pump_results
    ADD COLUMN running INTEGER /* pumps in that set, this one counted */;
ALTER TABLE pump_results
    ADD COLUMN sets_tried INTEGER /* running sets solved for it */;
ALTER TABLE pump_results
    ADD COLUMN sets_all INTEGER /* 1: those are all the controls allow */;
ALTER TABLE pump_results
    ADD COLUMN adverse_set TEXT /* the set of the adverse corner, in words */;
ALTER TABLE pump_results
    ADD COLUMN one_out_set TEXT /* worst with one less than may run, in words */;
ALTER TABLE pump_results
    ADD COLUMN one_out_margin REAL /* NPSHA less NPSHR in that set, typical, m */;
ALTER TABLE pump_results
    ADD COLUMN one_out_surplus REAL /* over the rule in that set, typical, m */;
ALTER TABLE pump_results
    ADD COLUMN curve_position TEXT /* of the off-curve set, on its curve */;
ALTER TABLE pump_results
    ADD COLUMN off_curve_set TEXT /* the first it is off its curve in, words */;
ALTER TABLE pump_results
    ADD COLUMN stands_set TEXT /* the first it cannot deliver in, in words */;
ALTER TABLE pump_results
    ADD COLUMN two_crossings INTEGER /* 1: a set where it may settle at less */;
ALTER TABLE pump_results
    ADD COLUMN flags TEXT /* checks that are beyond, "; " between; empty: none */;
ALTER TABLE pump_results
    ADD COLUMN rule_states TEXT /* a letter a rule by place: S, T, U, C, or - */;
ALTER TABLE pump_results
    ADD COLUMN limit_level REAL /* lowest source level that meets the rule, m */;
ALTER TABLE pump_results
    ADD COLUMN limit_level_end TEXT /* found, none, always, figures end (past the value) or unknown */;
ALTER TABLE pump_results
    ADD COLUMN limit_temperature REAL /* warmest water that meets the rule, K */;
ALTER TABLE pump_results
    ADD COLUMN limit_temperature_end TEXT /* likewise */;
ALTER TABLE pump_results
    ADD COLUMN limit_flow REAL /* its largest flow that meets the rule, m³/s */;
ALTER TABLE pump_results
    ADD COLUMN limit_flow_end TEXT /* likewise, of that flow */;

CREATE TABLE evaluation_rules (
    -- A margin rule that an evaluation judged every pump by.
    evaluation INTEGER NOT NULL REFERENCES evaluations, -- the evaluation
    place INTEGER NOT NULL, -- from 1: its letter in rule_states
    rule TEXT NOT NULL, -- its name
    edition TEXT NOT NULL, -- of the standard it is from
    source TEXT NOT NULL, -- where it comes from
    trust TEXT NOT NULL, -- as for margin_rules; O: the owner's own
    pumps_short INTEGER NOT NULL, -- by this rule, by their worst condition
    pumps_thin INTEGER NOT NULL, -- likewise
    pumps_unproven INTEGER NOT NULL, -- likewise
    pumps_clear INTEGER NOT NULL, -- likewise
    pumps_apart INTEGER NOT NULL, -- that it is not about
    PRIMARY KEY (evaluation, place)
) STRICT, WITHOUT ROWID;
