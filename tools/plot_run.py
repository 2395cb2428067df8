#!/usr/bin/python3
"""Draws a palier run: cooling curves at the probes, and fraction solid over depth and time with the two fronts."""

import argparse
import io
import math
import os
import sys
import textwrap

import interpreter

interpreter.ensure("numpy", "h5py", "matplotlib")

import matplotlib  # noqa: E402
import matplotlib.patheffects  # noqa: E402
import numpy  # noqa: E402
from matplotlib.backends.backend_agg import FigureCanvasAgg  # noqa: E402
from matplotlib.figure import Figure  # noqa: E402

from palier_result import ResultTrouble, read_result  # noqa: E402

CAUTION = ("Design aid: confirm by trial casting and inspection; follow local codes and qualified practice; "
           "damp chills and molds can explode.")
# Colors that the color-blind tell apart: M. Okabe & K. Ito, "Color Universal Design" (2008), without their yellow,
# which is too pale for a line on white.
COLORS = ("#0072B2", "#D55E00", "#009E73", "#CC79A7", "#E69F00", "#56B4E9", "#000000")
LINES = ("-", (0, (6, 2)), (0, (2, 1.5)), (0, (7, 2, 1.5, 2)), (0, (4, 1.5, 1, 1.5, 1, 1.5)))
MAP_ROWS = 2000   # more columns than the picture has pixels would only cost time
LABEL_GAP = 0.09  # of the panel's height, between two labels beside it
LEGEND_COLUMNS = 6
FORMATS = (".png", ".svg")


class Units:
    """Turns SI into what the reader of the picture expects."""

    def __init__(self, system, span):
        """span: length of the time axis [s]; decides between s, min and h."""
        self.us = system == "us"
        self.degree = "°F" if self.us else "°C"
        self.length = "in" if self.us else "mm"
        self.time, self.second = ("s", 1.0) if span <= 600 else ("min", 60.0) if span <= 4 * 3600 else ("h", 3600.0)

    def temperature(self, kelvin):
        celsius = kelvin - 273.15
        return celsius * 1.8 + 32 if self.us else celsius

    def depth(self, meters):
        return meters / 0.0254 if self.us else meters * 1e3

    def times(self, seconds):
        return seconds / self.second

    def told_temperature(self, kelvin):
        return f"{self.temperature(kelvin):.0f} {self.degree}"

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


def beside(axes, labels, low, high):
    """Labels at the right of a panel at heights of its y axis, moved apart where they would collide.

    labels: (height, text) by falling height; low, high: ends of the y axis."""
    heights = [(height - low) / (high - low) for height, _ in labels]
    for i in range(1, len(heights)):
        overlap = LABEL_GAP - (heights[i - 1] - heights[i])
        if overlap > 0:
            heights[i - 1] += overlap / 2
            heights[i] -= overlap / 2
    for height, (_, text) in zip(heights, labels):
        axes.text(1.018, height, text, transform=axes.transAxes, va="center", fontsize=9)


def draw_arrests(axes, result, units, low, high):
    liquidus, end = float(result["liquidus_temperature"]), float(result["end_of_freezing_temperature"])
    style = {"color": "0.35", "linewidth": 0.9, "zorder": 1}
    axes.axhline(units.temperature(liquidus), linestyle="-", **style)
    if end == liquidus:
        labels = [(units.temperature(end), f"freezes at {units.told_temperature(end)}")]
    else:
        axes.axhline(units.temperature(end), linestyle="--", **style)
        labels = [(units.temperature(liquidus), f"liquidus {units.told_temperature(liquidus)}"),
                  (units.temperature(end), f"freezing ends {units.told_temperature(end)}")]
    beside(axes, labels, low, high)


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
    shown = [units.temperature(temperature.min()), units.temperature(temperature.max()),
             units.temperature(float(result["liquidus_temperature"])),
             units.temperature(float(result["end_of_freezing_temperature"]))]
    margin = 0.05 * (max(shown) - min(shown))
    low, high = min(shown) - margin, max(shown) + margin
    axes.set_ylim(low, high)
    draw_arrests(axes, result, units, low, high)
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
    figure = Figure(figsize=(10, 8.2))
    FigureCanvasAgg(figure)
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
    figure.text(0.085, 0.975, title, fontsize=14, fontweight="bold", va="top", parse_math=False)
    figure.text(0.085, 0.94 - second_line, subtitle(result, units), fontsize=10.5, va="top",
                parse_math=False)
    figure.text(0.5, 0.015, CAUTION, fontsize=8.5, ha="center", va="bottom", color="0.25")
    return figure


def picture_bytes(figure, extension):
    """The picture as a file's bytes, the same for the same figure: without date and with fixed names inside."""
    stream = io.BytesIO()
    if extension == ".png":
        figure.savefig(stream, format="png", dpi=130, metadata={"Software": None})
    else:
        figure.savefig(stream, format="svg", dpi=200, metadata={"Date": None, "Creator": None})
    return stream.getvalue()


def save(path, content):
    """Writes aside and renames, so that no half picture stands under the name."""
    partial = path + ".partial"
    try:
        with open(partial, "wb") as file:
            file.write(content)
        os.replace(partial, path)
    except OSError as trouble:
        if os.path.isfile(partial):
            os.unlink(partial)
        raise ResultTrouble(path, f"cannot be written: {trouble.strerror}", 4) from trouble


def main():
    parser = argparse.ArgumentParser(description=__doc__, epilog="Example: tools/plot_run.py rim.h5 -o rim.svg")
    parser.add_argument("result", metavar="RESULT.h5", help="written by palier run")
    parser.add_argument("-o", "--output", metavar="FIGURE", help=".png or .svg; without it, beside the result as .png")
    parser.add_argument("--units", choices=("metric", "us"), default="metric", help="°C and mm, or °F and in")
    asked = parser.parse_args()
    output = asked.output or os.path.splitext(asked.result)[0] + ".png"
    extension = os.path.splitext(output)[1].lower()
    matplotlib.rcdefaults()  # the same picture whatever a matplotlibrc of the user says
    matplotlib.rcParams["svg.hashsalt"] = "palier"
    try:
        if extension not in FORMATS:
            raise ResultTrouble(output, f"is no picture we can write; end the name in {' or '.join(FORMATS)}", 2)
        save(output, picture_bytes(draw(read_result(asked.result), asked.units), extension))
    except ResultTrouble as trouble:
        sys.stderr.write(f"plot_run.py: {trouble}\n")
        return trouble.status
    print(output)
    return 0


if __name__ == "__main__":
    sys.exit(main())
