SELECT pg_notify('protoledger_job', '')
