"""One flat graph over netlist and library."""
