"""From two texts to a verdict; shares no planning code."""
