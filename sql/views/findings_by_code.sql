CREATE VIEW findings_by_code AS
-- How often each import says what.
SELECT vintage, severity, code, count(*) AS findings
FROM findings
GROUP BY vintage, severity, code;
