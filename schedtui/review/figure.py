"""Figures of an evaluation: computed when first asked, remembered, absences included.

An evaluation asks only for what someone wants to know, so a check costs what it reads and a row
with gaps answers for everything that does not need them.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any, Generic, ParamSpec, Self, TypeVar, overload

from schedtui.errors import Absent, StateError

if TYPE_CHECKING:
    from collections.abc import Callable

P = ParamSpec("P")
T = TypeVar("T")

_UNKNOWN: Any = object()


class figure(Generic[T]):  # noqa: N801  reads as a decorator beside `property`
    """A method turned into a figure: an attribute that is computed once.

    Asking may raise `Absent`, whenever the figure cannot be had: that too is remembered. Air that
    cannot be is an absence with its reason.

    Args:
        method: computes the figure from its evaluation.
    """

    def __init__(self, method: Callable[[Any], T]) -> None:
        self._method = method
        self.__doc__ = method.__doc__

    def __set_name__(self, owner: type, name: str) -> None:
        """Remember the attribute's name, under which the evaluation keeps the result."""
        self._name = name

    @overload
    def __get__(self, evaluation: None, owner: type) -> Self: ...
    @overload
    def __get__(self, evaluation: object, owner: type) -> T: ...
    def __get__(self, evaluation: object | None, owner: type) -> Self | T:
        """Return the figure.

        Raises:
            Absent: it cannot be had.
        """
        if evaluation is None:
            return self
        # What is there stands in the evaluation under its own name, where Python finds it without
        # asking here again; what is absent, or was given for a trial, is among the known.
        known: dict[str, T | Absent] = evaluation.__dict__.setdefault("_known", {})
        result: T | Absent = known.get(self._name, _UNKNOWN)
        if result is _UNKNOWN:
            try:
                result = self._method(evaluation)
            except Absent as absent:
                result = known[self._name] = absent.with_traceback(None)
            except StateError as error:
                result = known[self._name] = Absent(why=str(error))
        if isinstance(result, Absent):
            # A twin of it: what is remembered must not keep the frames of everyone who asks.
            raise Absent(*result.keys, why=result.why)
        evaluation.__dict__[self._name] = result
        return result


def known(ask: Callable[P, T], *args: P.args, **kwargs: P.kwargs) -> T | None:
    """Return what `ask` returns, None where it is absent or no air can have it."""
    try:
        return ask(*args, **kwargs)
    except (Absent, StateError):
        return None
