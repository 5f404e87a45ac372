"""What goes around a coil: the share of the supply air, as it is stated in one way or another.

Knows nothing of the states of the air.
"""

from __future__ import annotations

from schedtui.air.step import DEFINITION, Number, Step, Steps
from schedtui.units import AIRFLOW, PERCENT, RATIO

_SYMBOL = "x_b"
_NAME = "share of the supply air around the coil"


def share_of_percent(percent: float, steps: Steps | None = None) -> float:
    """Return the share around the coil that is stated in percent.

    Args:
        percent: as stated [%].
        steps: the working to append to, where there is a share.
    """
    share = percent / 100
    if steps is not None and share:
        _append(steps, "x_b = B / 100", (("B", percent, PERCENT),), share)
    return share


def share_beside(coil_airflow: float, airflow: float, steps: Steps | None = None) -> float:
    """Return the share that does not go through a coil whose own airflow is stated.

    Args:
        coil_airflow: through the coil [cfm | L/s].
        airflow: of the unit [cfm | L/s].
        steps: the working to append to.
    """
    share = max(1 - coil_airflow / airflow, 0.0)
    if steps is not None:
        numbers: tuple[Number, ...] = (("Q_c", coil_airflow, AIRFLOW), ("Q_s", airflow, AIRFLOW))
        _append(steps, "x_b = max(1 − Q_c / Q_s, 0)", numbers, share)
    return share


def within_return(share: float, outdoor_share: float, steps: Steps | None = None) -> float:
    """Return a share of return air around the coil: no more than returns.

    Args:
        share: as stated.
        outdoor_share: the outdoor air's share of the supply.
        steps: the working to append to, where the share is bounded.
    """
    returned = 1 - outdoor_share
    if steps is not None and share > returned:
        name = f"{_NAME}: no more than returns"
        numbers: tuple[Number, ...] = (("x_o", outdoor_share, RATIO),)
        steps.append(Step(_SYMBOL, name, "x_b = 1 − x_o", numbers, returned, RATIO, DEFINITION))
    return min(share, returned)


def _append(steps: Steps, formula: str, numbers: tuple[Number, ...], share: float) -> None:
    steps.append(Step(_SYMBOL, _NAME, formula, numbers, share, RATIO, DEFINITION))
