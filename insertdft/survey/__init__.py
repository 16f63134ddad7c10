"""Facts and findings about a design."""
