#!/usr/bin/python3
"""Draws a palier run: cooling curves at the probes, and fraction solid over depth and time with the two fronts."""

import argparse
import math
import os
import sys
import textwrap

import interpreter

interpreter.ensure("numpy", "h5py", "matplotlib")

import matplotlib.patheffects  # noqa: E402
import numpy  # noqa: E402

from drawing import COLORS, TemperatureUnits, caption, deliver, freezing_lines, new_figure  # noqa: E402
from palier_result import read_result  # noqa: E402

LINES = ("-", (0, (6, 2)), (0, (2, 1.5)), (0, (7, 2, 1.5, 2)), (0, (4, 1.5, 1, 1.5, 1, 1.5)))
MAP_ROWS = 2000   # more columns than the picture has pixels would only cost time
LEGEND_COLUMNS = 6


class Units(TemperatureUnits):
    """Turns SI into what the reader of the picture expects."""

    def __init__(self, system, span):
        """span: length of the time axis [s]; decides between s, min and h."""
        super().__init__(system)
        self.length = "in" if self.us else "mm"
        self.time, self.second = ("s", 1.0) if span <= 600 else ("min", 60.0) if span <= 4 * 3600 else ("h", 3600.0)

    def depth(self, meters):
        return meters / 0.0254 if self.us else meters * 1e3

    def times(self, seconds):
        return seconds / self.second

    def told_depth(self, meters):
        return f"{self.depth(meters):.3g} {self.length}"

    def told_time(self, seconds, error):
        """Value ± error with as many decimals as the error's first digit; four digits where the error is not known."""
        value, width = self.times(seconds), self.times(error)
        if not numpy.isfinite(width) or width <= 0:
            return f"{value:.4g} {self.time}"
        decimals = max(0, -math.floor(math.log10(width)))
        return f"{value:.{decimals}f} ± {width:.{decimals}f} {self.time} (numerical error)"


def midpoint_edges(centers):
    """Edges half way between neighbors, the outer ones at the first and last center; one center gets a unit width."""
    if len(centers) == 1:
        return numpy.array([centers[0] - 0.5, centers[0] + 0.5])
    return numpy.concatenate(([centers[0]], (centers[1:] + centers[:-1]) / 2, [centers[-1]]))


def draw_curves(axes, result, units):
    time, temperature, ends = result["time"], result["probe_temperature"], result["end_of_freezing"]
    for i, depth in enumerate(result["depth"]):
        color = COLORS[i % len(COLORS)]
        label = units.told_depth(depth) + (" (surface)" if depth == 0 else "")
        axes.plot(units.times(time), units.temperature(temperature[:, i]), color=color,
                  linestyle=LINES[i % len(LINES)], linewidth=1.8, label=label, zorder=3)
        if numpy.isfinite(ends[i]):
            there = numpy.interp(ends[i], time, temperature[:, i])
            axes.plot(units.times(ends[i]), units.temperature(there), "o", color=color, markersize=7,
                      markeredgecolor="white", markeredgewidth=1.2, zorder=4, clip_on=False)
    axes.plot([], [], "o", color="0.4", markersize=7, markeredgecolor="white", label="end of freezing there")
    liquidus, freezing_end = float(result["liquidus_temperature"]), float(result["end_of_freezing_temperature"])
    shown = [units.temperature(kelvin) for kelvin in (temperature.min(), temperature.max(), liquidus, freezing_end)]
    margin = 0.05 * (max(shown) - min(shown))
    low, high = min(shown) - margin, max(shown) + margin
    axes.set_ylim(low, high)
    freezing_lines([axes], units, liquidus, freezing_end, low, high)
    axes.set_ylabel(f"temperature, {units.degree}")
    axes.grid(True, color="0.9", linewidth=0.6)
    axes.set_axisbelow(True)
    axes.legend(loc="lower left", bbox_to_anchor=(0, 1.0), ncol=LEGEND_COLUMNS, frameon=False, fontsize=9,
                title="probes, depth below the surface", alignment="left", handlelength=3, columnspacing=1.3)


def draw_map(axes, result, units):
    step = max(1, len(result["time"]) // MAP_ROWS)
    time, solid = result["time"][::step], result["fraction_solid"][::step]
    mesh = axes.pcolormesh(midpoint_edges(units.times(time)), units.depth(result.depth_edges()), solid.T,
                           cmap="cividis", vmin=0, vmax=1, shading="flat", rasterized=True)
    depth = units.depth(result["depth_metal"])
    for name, color, rim, line, label in (
            ("start_of_freezing_by_depth", "white", "black", "-", "freezing starts (liquidus)"),
            ("end_of_freezing_by_depth", "black", "white", "--", "freezing ends")):
        outline = [matplotlib.patheffects.withStroke(linewidth=3.4, foreground=rim)]
        axes.plot(units.times(result[name]), depth, color=color, linestyle=line, linewidth=1.8, label=label,
                  path_effects=outline)
    axes.set_ylabel(f"depth below the surface, {units.length}")
    axes.invert_yaxis()
    axes.legend(loc="lower left", bbox_to_anchor=(0, 1.0), ncol=2, frameon=False, fontsize=9, handlelength=3)
    return mesh


def subtitle(result, units):
    parts = [part for part in (result.text["alloy"], result.text["shape"]) if part]
    end = float(result["solidification_time"])
    if numpy.isfinite(end):
        told = units.told_time(end, float(result["solidification_time_error"]))
        parts.append(f"last metal solid after {told}, {units.told_depth(float(result['last_to_freeze_depth']))} deep")
    else:
        parts.append(f"stopped after {units.times(float(result['end_time'])):.4g} {units.time}, not all of it solid")
    return ", ".join(parts[:2]) + ": " + parts[-1]


def draw(result, system):
    """The figure of a run. system: "metric" or "us"."""
    time = result["time"]
    title = textwrap.fill(textwrap.shorten(result.text["title"], 150, placeholder=" ..."), 78)
    second_line = 0.025 * title.count("\n")
    legend_rows = 0.023 * (len(result["depth"]) // LEGEND_COLUMNS)  # beyond the first; one entry tells the marker
    units = Units(system, float(time[-1] - time[0]))
    figure = new_figure(10, 8.2)
    grid = figure.add_gridspec(2, 2, width_ratios=(1, 0.022), height_ratios=(1, 0.85), left=0.085, right=0.845,
                               bottom=0.105, top=0.84 - second_line - legend_rows, hspace=0.2, wspace=0.03)
    curves = figure.add_subplot(grid[0, 0])
    solid = figure.add_subplot(grid[1, 0], sharex=curves)
    draw_curves(curves, result, units)
    mesh = draw_map(solid, result, units)
    bar = figure.colorbar(mesh, cax=figure.add_subplot(grid[1, 1]))
    bar.set_label("fraction solid")
    curves.tick_params(labelbottom=False)
    solid.set_xlabel(f"time since the mold was filled, {units.time}")
    if len(time) > 1:
        solid.set_xlim(units.times(time[0]), units.times(time[-1]))
    caption(figure, 0.085, title, subtitle(result, units), second_line)
    return figure


def main():
    parser = argparse.ArgumentParser(description=__doc__, epilog="Example: tools/plot_run.py rim.h5 -o rim.svg")
    parser.add_argument("result", metavar="RESULT.h5", help="written by palier run")
    parser.add_argument("-o", "--output", metavar="FIGURE", help=".png or .svg; without it, beside the result as .png")
    parser.add_argument("--units", choices=("metric", "us"), default="metric", help="°C and mm, or °F and in")
    asked = parser.parse_args()
    output = asked.output or os.path.splitext(asked.result)[0] + ".png"
    return deliver(output, lambda: draw(read_result(asked.result), asked.units))


if __name__ == "__main__":
    sys.exit(main())
