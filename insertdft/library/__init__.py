"""Cells, their functions and their scan roles."""
