"""Values on a design: three-valued and bit-parallel."""
