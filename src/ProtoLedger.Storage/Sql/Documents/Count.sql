SELECT count(*)
FROM document
