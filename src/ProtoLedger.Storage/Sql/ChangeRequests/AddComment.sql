INSERT INTO comment (change_request_id, number, author, author_name, pointer, text, created_at)
SELECT @id, coalesce(max(number), 0) + 1, @author, @authorName, @pointer, @text, @time
FROM comment
WHERE change_request_id = @id
RETURNING number
