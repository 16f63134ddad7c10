"""Chains as JSON and CSV, and the order of chains from an edited CSV."""

import csv
import io
from collections.abc import Mapping
from typing import Final

from insertdft.chainfile import description_to_json
from insertdft.description import Description
from insertdft.diagnostics import DesignError, Diagnostic, error
from insertdft.exports.inputs import ExportInput
from insertdft.netlist.names import plain, split_path

COLUMNS: Final = (
    "chain position bits instance flat_name cell scan_in scan_out inverted slave".split()
)


def to_json(given: ExportInput) -> str:
    """Return the chain description, see docs/formats.md."""
    return description_to_json(given.description)


def to_csv(given: ExportInput) -> str:
    """Return one row a position, chains in order, positions from scan-in on (first is 1)."""
    text = io.StringIO()
    table = csv.writer(text, lineterminator="\n")
    table.writerow(COLUMNS)
    for chain in given.description.chains:
        for number, cell in enumerate(chain.cells, 1):
            flat = "/".join(map(plain, split_path(cell.instance)))
            place = (chain.name, number, cell.bits, cell.instance, flat, cell.cell)
            pins = (cell.scan_in, cell.scan_out, int(cell.inverted), cell.slave or "")
            table.writerow((*place, *pins))
    return text.getvalue()


def orders_from_csv(text: str, name: str, description: Description) -> Mapping[str, list[str]]:
    """Return the instances of every chain in the order of the rows of an edited CSV.

    The columns ``chain`` and ``instance`` count, in the order of the rows; others may be missing.

    Raises:
        DesignError: A column is missing, or the chains hold other cells than the description.
    """
    table = csv.DictReader(io.StringIO(text))
    lacking = [column for column in ("chain", "instance") if column not in (table.fieldnames or ())]
    if lacking:
        hint = "the first line names the columns; keep those that the export wrote"
        what = f"`{name}` has no column `{lacking[0]}`"
        raise DesignError([error("order-unreadable", what, hint=hint)])
    orders: dict[str, list[str]] = {chain.name: [] for chain in description.chains}
    problems: list[Diagnostic] = []
    for row in table:
        if row["chain"] not in orders:
            problems.append(_illegal(f"line {table.line_num}: no chain is called `{row['chain']}`"))
            continue
        orders[row["chain"]].append(row["instance"] or "")
    wanted = sorted(cell.instance for chain in description.chains for cell in chain.cells)
    given = sorted(instance for order in orders.values() for instance in order)
    if given != wanted:
        odd = sorted(set(given) ^ set(wanted))
        first = f"`{odd[0]}`" if odd else "a cell named twice"
        problems.append(_illegal(f"`{name}` holds other cells than the chains do, first {first}"))
    if problems:
        raise DesignError(problems)
    return orders


def _illegal(message: str) -> Diagnostic:
    return error(
        "order-illegal", message, hint="every cell of the description must stand in one row"
    )
