"""Edit the sources: cells, conditions, ports, and the byte ranges they replace."""
