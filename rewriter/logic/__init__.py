"""From RTL to netlists, graphs and answers: the only user of Yosys and of the SAT solver."""
