"""Static timing on the library's own tables."""
