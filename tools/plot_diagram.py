#!/usr/bin/python3
"""Draws how an alloy freezes: its phase diagram with the path on it, and temperature against fraction solid."""

import argparse
import os
import sys
import textwrap

import interpreter

interpreter.ensure("numpy", "matplotlib")

import numpy  # noqa: E402

from alloy_answer import read_answer  # noqa: E402
from drawing import (BLACK, BLUE, GREEN, ORANGE, VERMILION, TemperatureUnits, caption, deliver,  # noqa: E402
                     freezing_lines, new_figure)

RULES = {"scheil": "Scheil", "lever": "lever-rule", "pure": "one-temperature"}  # others go by the name in the answer
LEGEND = {"loc": "lower left", "bbox_to_anchor": (0, 1.0), "frameon": False, "fontsize": 9, "handlelength": 2.5,
          "borderpad": 0, "columnspacing": 1.3}
MARGIN = 0.08         # of the temperatures shown, above and below them
LEAST_SPAN = 40.0     # K shown at least, so that a pure metal's arrest has something around it
NARROW_FIELD = 0.1    # of the panel's width; a field narrower than this is named from outside
MARKER = {"markersize": 8, "markeredgecolor": "white", "markeredgewidth": 1.2, "linestyle": "none", "zorder": 6,
          "clip_on": False}


class Units(TemperatureUnits):
    """The alloy's answer is in degC; what is shown follows the reader's system."""

    def celsius(self, value):
        return self.temperature(value + 273.15)

    def told_celsius(self, value):
        return self.told_temperature(value + 273.15)

    def told_range(self, kelvins):
        return f"{kelvins * 1.8:.0f} °F" if self.us else f"{kelvins:.0f} K"


def path_told(rule):
    return RULES.get(rule, rule) + " path"


def temperature_limits(answer):
    """Lowest and highest temperature to show [degC]."""
    shown = [answer.liquidus, answer.end_of_freezing]
    if answer.diagram:
        shown.append(answer.diagram.temperature[0])
        if answer.diagram.invariant:
            shown.append(answer.diagram.invariant[1])
    low, high = min(shown), max(shown)
    margin = max(MARGIN * (high - low), (LEAST_SPAN - (high - low)) / 2)
    return low - margin, high + margin


def composition_limit(answer):
    """Largest composition to show [mass percent]: a little beyond the invariant or the last liquid."""
    shown = [answer.composition]
    if answer.last_liquid is not None:
        shown.append(answer.last_liquid)
    if answer.diagram.invariant:
        shown.append(answer.diagram.invariant[2])
    return 1.08 * max(shown) if max(shown) > 0 else float(answer.diagram.liquid[-1])


def draw_lines(axes, diagram, units):
    """Liquidus, solidus and the invariant as far as its composition is known."""
    temperature = units.celsius(diagram.temperature)
    axes.plot(diagram.liquid, temperature, color=BLACK, linewidth=1.6, label="liquidus")
    axes.plot(diagram.solid, temperature, color=BLACK, linewidth=1.6, linestyle=(0, (6, 2)), label="solidus")
    if diagram.invariant:
        reaction, at, liquid = diagram.invariant
        solid = diagram.at(at)[1]
        axes.plot([solid, liquid], [units.celsius(at)] * 2, color=ORANGE, linewidth=2.2, label=reaction, zorder=2)
        axes.annotate(f"{reaction} {units.told_celsius(at)}, {liquid:.3g} wt% {diagram.solute}",
                      (liquid, units.celsius(at)), (0, -7), textcoords="offset points", ha="right", va="top",
                      fontsize=9, zorder=3, bbox={"facecolor": "white", "edgecolor": "none", "pad": 1})


def draw_track(axes, answer, units):
    """Liquid along the liquidus and solid along the solidus while the alloy freezes."""
    if not answer.follows_compositions:
        return
    solute = answer.diagram.solute
    start, end = answer.liquidus, answer.end_of_freezing
    track = numpy.linspace(start, end, 200)
    liquid, solid = answer.diagram.at(track)
    for composition, color, label in ((liquid, BLUE, "liquid while it freezes"),
                                      (solid, VERMILION, "solid as it forms")):
        axes.plot(composition, units.celsius(track), color=color, linewidth=4.5, alpha=0.75, solid_capstyle="butt",
                  label=label, zorder=3)
    axes.plot(answer.first_solid, units.celsius(start), "o", color=VERMILION, **MARKER,
              label=f"first solid, {answer.first_solid:.3g} wt% {solute}")
    axes.plot(answer.last_liquid, units.celsius(end), "s", color=BLUE, **MARKER,
              label=f"last liquid, {answer.last_liquid:.3g} wt% {solute}")


def wider_side(left, right, line):
    """(middle, width) of the interval, or of its wider part where a line cuts it."""
    if left < line < right:
        left, right = (left, line) if line - left > right - line else (line, right)
    return (left + right) / 2, right - left


def name_fields(axes, answer, low, high, units):
    """Names the phases of each field, off the alloy's own line. low, high: temperatures shown [degC]."""
    diagram, right, alloy = answer.diagram, composition_limit(answer), answer.composition
    words = {"fontsize": 11, "style": "italic", "color": "0.25", "ha": "center", "va": "center", "zorder": 5}
    bottom, shown = max(low, diagram.temperature[-1]), high - low
    x, _ = wider_side(0.45 * right, right, alloy)
    line = numpy.interp(x, diagram.liquid, diagram.temperature)
    axes.text(x, units.celsius((max(line, bottom) + high) / 2), "liquid", **words)
    at = bottom + 0.22 * shown
    liquid, solid = diagram.at(at)
    x, _ = wider_side(solid, min(liquid, right), alloy)
    axes.text(x, units.celsius(at), "liquid + solid", **words)
    at = bottom + 0.045 * shown
    solid = min(diagram.at(at)[1], right)
    x, width = wider_side(0.0, solid, alloy)
    if width > NARROW_FIELD * right:
        axes.text(x, units.celsius(at), "solid", **words)
    else:
        axes.annotate("solid", (x, units.celsius(at)), (solid + 0.08 * right, units.celsius(at)), **words,
                      arrowprops={"arrowstyle": "-", "color": "0.35", "linewidth": 0.8})


def draw_diagram(axes, answer, low, high, units):
    diagram, right = answer.diagram, composition_limit(answer)
    draw_lines(axes, diagram, units)
    axes.axvline(answer.composition, color=GREEN, linewidth=1.6, linestyle=(0, (7, 2, 1.5, 2)), zorder=2.5,
                 label=f"the alloy, {answer.composition:.4g} wt% {diagram.solute}", clip_on=False)
    draw_track(axes, answer, units)
    name_fields(axes, answer, low, high, units)
    axes.set_xlim(0, right)
    axes.set_xlabel(f"{diagram.solute} in {diagram.base}, wt%")
    axes.legend(ncol=3, **LEGEND)


def draw_path(axes, answer, low, high, units):
    """Temperature against fraction solid: liquid above the liquidus, solid below the end of freezing."""
    temperature = units.celsius(numpy.concatenate(([high], answer.path[:, 0], [low])))
    solid = numpy.concatenate(([0.0], answer.path[:, 1], [1.0]))
    axes.plot(solid, temperature, color=BLUE, linewidth=2.0, label=path_told(answer.rule), zorder=3)
    for i, (at, reaction, fraction) in enumerate(answer.arrests):
        before = float(answer.path[answer.path[:, 0] >= at][:, 1].max()) - fraction
        axes.plot([before, before + fraction], [units.celsius(at)] * 2, color=VERMILION, linewidth=4.5,
                  solid_capstyle="butt", zorder=4, label="arrest" if i == 0 else None)
        middle = before + fraction / 2
        side, x, shift = (("center", middle, 0) if 0.25 <= middle <= 0.75 else  # else off the path's upright ends
                          ("right", 1.0, -6) if middle > 0.5 else ("left", 0.0, 6))
        axes.annotate(f"{reaction}, {100 * fraction:.1f} %", (x, units.celsius(at)), (shift, -7),
                      textcoords="offset points", ha=side, va="top", fontsize=9)
    axes.set_xlim(-0.03, 1.03)
    axes.set_xlabel("fraction solid")
    axes.legend(ncol=2, **LEGEND)


def subtitle(answer, units, letters):
    """Where it freezes by the rule drawn, then by the others; on lines of at most so many letters."""
    start, end = answer.liquidus, answer.end_of_freezing
    if start == end:
        return f"freezes at {units.told_celsius(end)}"
    drawn = (f"liquidus {units.told_celsius(start)}, freezing ends at {units.told_celsius(end)}: "
             f"a range of {units.told_range(start - end)}")
    others = "; ".join(f"{path_told(rule)} ends at {units.told_celsius(other)}"
                       for rule, other in answer.ends.items() if rule != answer.rule and other is not None)
    if not others:
        return drawn
    one_line = f"{drawn}; {others}"
    return one_line if len(one_line) <= letters else f"{drawn}\n{textwrap.fill(others, letters)}"


def title(answer):
    parts = [answer.alloy]
    if answer.diagram:
        parts.append(f"{answer.composition:.4g} wt% {answer.diagram.solute} in {answer.diagram.base}")
    return textwrap.shorten(", ".join(parts + [path_told(answer.rule)]), 90, placeholder=" ...")


def draw(answer, system):
    """The figure of an alloy. system: "metric" or "us"."""
    units = Units(system)
    low, high = temperature_limits(answer)
    width, left, right, top = (12.0, 0.07, 0.86, 0.80) if answer.diagram else (8.6, 0.1, 0.8, 0.85)
    told = subtitle(answer, units, int(10.5 * width))
    figure = new_figure(width, 6.8)
    panels = figure.subplots(1, 2 if answer.diagram else 1, sharey=True, squeeze=False, gridspec_kw={
        "width_ratios": (1.35, 1) if answer.diagram else (1,), "left": left, "right": right, "bottom": 0.13,
        "top": top - 0.03 * told.count("\n"), "wspace": 0.06})[0]
    if answer.diagram:
        draw_diagram(panels[0], answer, low, high, units)
    draw_path(panels[-1], answer, low, high, units)
    ends = units.celsius(low), units.celsius(high)
    panels[0].set_ylim(*ends)
    panels[0].set_ylabel(f"temperature, {units.degree}")
    freezing_lines(panels, units, answer.liquidus + 273.15, answer.end_of_freezing + 273.15, *ends)
    for axes in panels:
        axes.grid(True, color="0.9", linewidth=0.6)
        axes.set_axisbelow(True)
    caption(figure, left, title(answer), told)
    return figure


def main():
    parser = argparse.ArgumentParser(description=__doc__, epilog="Example: palier alloy Al-4.5Cu --json | "
                                                                 "tools/plot_diagram.py - -o Al-4.5Cu.svg")
    parser.add_argument("answer", metavar="ALLOY.json",
                        help="written by palier alloy NAME --json; - for standard input")
    parser.add_argument("-o", "--output", metavar="FIGURE",
                        help=".png or .svg; without it, beside the answer as .png (needed with -)")
    parser.add_argument("--units", choices=("metric", "us"), default="metric", help="°C or °F")
    asked = parser.parse_args()
    if asked.answer == "-" and not asked.output:
        sys.stderr.write("plot_diagram.py: standard input has no name to put the picture beside; say -o FIGURE\n")
        return 2
    output = asked.output or os.path.splitext(asked.answer)[0] + ".png"
    return deliver(output, lambda: draw(read_answer(asked.answer), asked.units))


if __name__ == "__main__":
    sys.exit(main())
