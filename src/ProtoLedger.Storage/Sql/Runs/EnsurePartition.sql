SELECT ensure_run_result_partition(@run)
