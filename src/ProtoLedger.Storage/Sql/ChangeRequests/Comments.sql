SELECT number, author, author_name, pointer, text, created_at AS time
FROM comment
WHERE change_request_id = @id
ORDER BY number
