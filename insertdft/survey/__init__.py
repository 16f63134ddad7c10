"""Facts and findings about a design: storage, clocks, sets and resets; nothing is changed here."""

from insertdft.survey.facts import LEFT_ALONE, Domain, HeldPort, Survey
from insertdft.survey.look import survey

__all__ = ["LEFT_ALONE", "Domain", "HeldPort", "Survey", "survey"]
