-- Keep how one column was understood.
INSERT INTO columns (vintage, file, position, header, field, unit)
VALUES (:vintage, :file, :position, :header, :field, :unit);
