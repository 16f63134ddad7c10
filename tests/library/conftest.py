"""Random examples of these tests are the same in every run and may take any time."""

from hypothesis import settings

settings.register_profile("steady", deadline=None, derandomize=True)
settings.load_profile("steady")
