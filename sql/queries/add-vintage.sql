-- Begin a vintage; the store numbers it.
INSERT INTO vintages (label, inventory_sha256, imported_at)
VALUES (:label, :inventory_sha256, :imported_at);
