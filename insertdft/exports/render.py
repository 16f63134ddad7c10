"""The templates of this folder, ready to render."""

from functools import cache

from jinja2 import Environment, PackageLoader, StrictUndefined


@cache
def _environment() -> Environment:
    return Environment(  # the outputs are no markup
        loader=PackageLoader("insertdft.exports", "templates"),
        undefined=StrictUndefined,
        trim_blocks=True,
        lstrip_blocks=True,
        keep_trailing_newline=True,
        autoescape=False,  # noqa: S701
    )


def render(template: str, **values: object) -> str:
    """Return a template of this folder filled in."""
    return _environment().get_template(template).render(**values)
