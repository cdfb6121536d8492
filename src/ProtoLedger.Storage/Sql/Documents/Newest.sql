SELECT coalesce(max(version), 0)
FROM document
WHERE kind = @kind AND id = @id
