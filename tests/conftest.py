"""Options and fixtures for all tests."""

import pytest


def pytest_addoption(parser: pytest.Parser) -> None:
    """Add the option that writes reviewed files again."""
    parser.addoption("--update-golden", action="store_true", help="write expected files again")
