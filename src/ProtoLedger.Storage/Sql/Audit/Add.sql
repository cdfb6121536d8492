INSERT INTO audit_event (time, actor, action, subject, outcome, detail, address)
VALUES (@time, @actor, @action, @subject, @outcome, @detail, @address)
