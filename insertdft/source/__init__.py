"""Structural Verilog text to a netlist that remembers its places."""
