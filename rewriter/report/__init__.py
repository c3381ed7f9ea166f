"""Say what was found and write what was made: tables, report.json, diffs, the output folder."""
