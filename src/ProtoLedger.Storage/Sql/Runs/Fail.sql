UPDATE run
SET state = 'failed', finished_at = now()
WHERE id = @run
