"""Scan insertion for gate-level netlists: convert, compare, export, prove."""

__version__ = "0.1.0"
