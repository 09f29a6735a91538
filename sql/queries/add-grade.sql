-- Note how well a recorded value is known.
INSERT INTO grades (of_table, record, field, vintage, grade)
VALUES (:of_table, :record, :field, :vintage, :grade);
