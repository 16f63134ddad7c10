"""Group cells by a net, without a loop over the cells."""

import numpy as np

from insertdft.netlist import Ids


def by_net(cells: Ids, nets: Ids) -> dict[int, list[int]]:
    """Return the cells at each net that is connected, cells in their given order.

    Args:
        cells: Shape (c,), flat instance ids.
        nets: Shape (c,), the net of each, OPEN for none.
    """
    order = np.argsort(nets, kind="stable")
    order = order[nets[order] >= 0]
    found, starts = np.unique(nets[order], return_index=True)
    parts = np.split(cells[order], starts[1:])
    return {net: part.tolist() for net, part in zip(found.tolist(), parts, strict=False)}
