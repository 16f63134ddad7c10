"""What replaces a storage cell, one file a style."""
