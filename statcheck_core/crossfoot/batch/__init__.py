"""Many files: which ones, their bytes, and a report for each."""
