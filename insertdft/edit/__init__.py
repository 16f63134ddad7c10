"""From a plan to splices."""
