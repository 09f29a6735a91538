-- The vintage of this content, or the newest when none is given.
SELECT vintage, label, inventory_sha256, imported_at
FROM vintages
WHERE :sha256 IS NULL OR inventory_sha256 = :sha256
ORDER BY vintage DESC
LIMIT 1;
