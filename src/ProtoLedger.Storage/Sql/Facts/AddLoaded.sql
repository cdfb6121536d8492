INSERT INTO loaded_fact (protocol, version, scanner, step, account, recorded_at)
VALUES (@protocol, @version, @scanner, @step, @account, @at)
