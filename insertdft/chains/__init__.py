"""From survey and wishes to a plan."""
