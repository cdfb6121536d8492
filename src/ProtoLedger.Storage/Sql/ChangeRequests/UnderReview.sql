SELECT id
FROM change_request
WHERE state = 'under review'
ORDER BY id
