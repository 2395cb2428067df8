"""Reads the answer of `palier alloy NAME --json`: how an alloy freezes by one rule, and its phase diagram."""

import dataclasses
import json
import os
import sys

import numpy

from file_trouble import FileTrouble

LARGEST = 1e6  # neither a temperature [degC] nor a percentage; larger numbers are no answer of ours

@dataclasses.dataclass(frozen=True)
class Diagram:
    """Liquidus and solidus of the base metal's side, from its melting point downward.

    temperature [degC], liquid and solid [mass percent of the solute] in equilibrium at it: arrays of one length
    invariant  (reaction, temperature [degC], liquid [mass percent]) where the lines end in one, else None
    """

    base: str
    solute: str
    temperature: numpy.ndarray
    liquid: numpy.ndarray
    solid: numpy.ndarray
    invariant: tuple | None

    def at(self, temperature):
        """(liquid, solid) in equilibrium [mass percent] at temperatures [degC] of the diagram."""
        upward = self.temperature[::-1]
        return (numpy.interp(temperature, upward, self.liquid[::-1]),
                numpy.interp(temperature, upward, self.solid[::-1]))


@dataclasses.dataclass(frozen=True)
class AlloyAnswer:
    """Temperatures in degC, compositions in mass percent.

    path     array (point, 2) of temperature, fraction solid; from the liquidus down, an arrest as two points
    arrests  (temperature, reaction, fraction that freezes there)
    ends     rule -> end of freezing, None where the rule gives none
    diagram, composition  of a binary alloy, else None
    first_solid, last_liquid  None where the rule follows no compositions
    """

    alloy: str
    rule: str
    path: numpy.ndarray
    arrests: tuple
    ends: dict
    diagram: Diagram | None
    composition: float | None
    first_solid: float | None
    last_liquid: float | None

    @property
    def follows_compositions(self):
        return self.first_solid is not None and self.last_liquid is not None

    @property
    def liquidus(self):
        return float(self.path[0, 0])

    @property
    def end_of_freezing(self):
        return float(self.path[-1, 0])


def read_answer(path):
    """Reads a file, or standard input for "-". Raises FileTrouble where it is missing or no such answer."""
    name = "standard input" if path == "-" else path
    text = sys.stdin.buffer.read() if path == "-" else _content(path)
    try:
        found = json.loads(text)
    except (ValueError, RecursionError) as trouble:
        raise FileTrouble(name, f"is not JSON: {trouble}", 2) from trouble
    try:
        return _answer(found)
    except KeyError as trouble:
        raise FileTrouble(name, f"is not an answer of palier alloy --json: no {trouble.args[0]}", 2) from trouble
    except (ValueError, TypeError, AttributeError, OverflowError) as trouble:
        raise FileTrouble(name, f"is not an answer of palier alloy --json: {trouble}", 2) from trouble


def _content(path):
    if os.path.isdir(path):
        raise FileTrouble(path, "is a folder, not an answer of palier alloy --json", 4)
    try:
        with open(path, "rb") as file:
            return file.read()
    except OSError as trouble:
        raise FileTrouble(path, f"cannot be read: {trouble.strerror}", 4) from trouble


def _answer(found):
    if not isinstance(found, dict):
        raise ValueError("not an object")
    path = _numbers("path", found["path"])
    if path.ndim != 2 or path.shape[1] != 2 or len(path) < 2:
        raise ValueError("path is not a list of two and more pairs")
    if (numpy.diff(path[:, 0]) > 0).any() or (numpy.diff(path[:, 1]) < 0).any():
        raise ValueError("path does not fall in temperature while fraction solid grows")
    optional = {name: _number(name, found[name + "_mass_percent"]) if name + "_mass_percent" in found else None
                for name in ("composition", "first_solid", "last_liquid")}
    answer = AlloyAnswer(
        alloy=_text("alloy", found["alloy"]), rule=_text("rule", found["rule"]), path=path,
        arrests=tuple((_number("arrest", arrest["temperature_C"]), _text("reaction", arrest["reaction"]),
                       _number("arrest", arrest["fraction"])) for arrest in found["arrests"]),
        ends={_text("rule", rule): None if end is None else _number("end_of_freezing_C", end)
              for rule, end in found["end_of_freezing_C"].items()},
        diagram=_diagram(found["diagram"]) if "diagram" in found else None, **optional)
    _agree(answer)
    return answer


def _agree(answer):
    """The parts of an answer fit together as far as a picture relies on it."""
    if any(not answer.end_of_freezing <= at <= answer.liquidus for at, _, _ in answer.arrests):
        raise ValueError("an arrest lies off the path")
    if answer.diagram is None:
        return
    if answer.composition is None or answer.composition < 0:
        raise ValueError("composition_mass_percent of a binary alloy is missing or negative")
    top, bottom = answer.diagram.temperature[[0, -1]]
    if answer.follows_compositions and not (bottom - 1e-6 <= answer.end_of_freezing and answer.liquidus <= top + 1e-6):
        raise ValueError("the path leaves the diagram")


def _diagram(found):
    temperature, liquid, solid = (_numbers(name, found[name]) for name in
                                  ("temperature_C", "liquid_mass_percent", "solid_mass_percent"))
    if temperature.ndim != 1 or len(temperature) < 2 or not temperature.shape == liquid.shape == solid.shape:
        raise ValueError("the lines of the diagram are not lists of one length")
    if (numpy.diff(temperature) >= 0).any():
        raise ValueError("temperature_C of the diagram does not fall")
    invariant = found.get("invariant")
    if invariant is not None:
        invariant = (_text("reaction", invariant["reaction"]), _number("invariant", invariant["temperature_C"]),
                     _number("invariant", invariant["liquid_mass_percent"]))
    return Diagram(base=_text("base", found["base"]), solute=_text("solute", found["solute"]), temperature=temperature,
                   liquid=liquid, solid=solid, invariant=invariant)


def _text(name, value):
    if not isinstance(value, str) or not value.isprintable():
        raise ValueError(f"{name} is not text of one line")
    return value


def _number(name, value):
    if isinstance(value, bool) or not isinstance(value, (int, float)) or not abs(value) < LARGEST:
        raise ValueError(f"{name} is not a number within {LARGEST:.0f}")
    return float(value)


def _numbers(name, value):
    try:
        numbers = numpy.array(value, dtype=float)
    except (ValueError, TypeError, OverflowError) as trouble:
        raise ValueError(f"{name} is not a list of numbers") from trouble
    if numbers.size == 0 or not (abs(numbers) < LARGEST).all():
        raise ValueError(f"{name} is not a list of numbers within {LARGEST:.0f}")
    return numbers
