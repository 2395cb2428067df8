"""What palier's pictures have in common: colors, temperatures, labels beside a panel, and files of the same bytes."""

import io
import os
import sys

import matplotlib
from matplotlib.backends.backend_agg import FigureCanvasAgg
from matplotlib.figure import Figure

from file_trouble import FileTrouble

CAUTION = ("Design aid: confirm by trial casting and inspection; follow local codes and qualified practice; "
           "damp chills and molds can explode.")
# Colors that the color-blind tell apart: M. Okabe & K. Ito, "Color Universal Design" (2008), without their yellow,
# which is too pale for a line on white.
BLUE, VERMILION, GREEN, PURPLE, ORANGE, SKY, BLACK = COLORS = (
    "#0072B2", "#D55E00", "#009E73", "#CC79A7", "#E69F00", "#56B4E9", "#000000")
LABEL_GAP = 0.09  # of the panel's height, between two labels beside it
FORMATS = (".png", ".svg")


class TemperatureUnits:
    """Turns kelvin into what the reader of the picture expects. system: "metric" or "us"."""

    def __init__(self, system):
        self.us = system == "us"
        self.degree = "°F" if self.us else "°C"

    def temperature(self, kelvin):
        celsius = kelvin - 273.15
        return celsius * 1.8 + 32 if self.us else celsius

    def told_temperature(self, kelvin):
        return f"{self.temperature(kelvin):.0f} {self.degree}"


def new_figure(width, height):
    """An empty figure [in] that needs no display."""
    figure = Figure(figsize=(width, height))
    FigureCanvasAgg(figure)
    return figure


def caption(figure, left, title, subtitle, second_line=0.0):
    """Title and subtitle at the top, the caution at the bottom. second_line: height of the title's further lines."""
    figure.text(left, 0.975, title, fontsize=14, fontweight="bold", va="top")
    figure.text(left, 0.94 - second_line, subtitle, fontsize=10.5, va="top")
    figure.text(0.5, 0.015, CAUTION, fontsize=8.5, ha="center", va="bottom", color="0.25")


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


def freezing_lines(panels, units, liquidus, end, low, high):
    """Lines across the panels at the liquidus and at the end of freezing [K], told at the right of the last panel.

    low, high: ends of the y axis, in the units of the picture."""
    style = {"color": "0.35", "linewidth": 0.9, "zorder": 1}
    for axes in panels:
        axes.axhline(units.temperature(liquidus), linestyle="-", **style)
        if end != liquidus:
            axes.axhline(units.temperature(end), linestyle="--", **style)
    if end == liquidus:
        labels = [(units.temperature(end), f"freezes at {units.told_temperature(end)}")]
    else:
        labels = [(units.temperature(liquidus), f"liquidus {units.told_temperature(liquidus)}"),
                  (units.temperature(end), f"freezing ends {units.told_temperature(end)}")]
    beside(panels[-1], labels, low, high)


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
        raise FileTrouble(path, f"cannot be written: {trouble.strerror}", 4) from trouble


def deliver(output, make_figure):
    """Saves the figure that make_figure() gives, says where, and returns the exit status; a FileTrouble is told in
    one line. The ending of output decides the format."""
    extension = os.path.splitext(output)[1].lower()
    matplotlib.rcdefaults()  # the same picture whatever a matplotlibrc of the user says
    matplotlib.rcParams.update({"svg.hashsalt": "palier", "text.parse_math": False})
    try:
        if extension not in FORMATS:
            raise FileTrouble(output, f"is no picture we can write; end the name in {' or '.join(FORMATS)}", 2)
        save(output, picture_bytes(make_figure(), extension))
    except FileTrouble as trouble:
        sys.stderr.write(f"{os.path.basename(sys.argv[0])}: {trouble}\n")
        return trouble.status
    print(output)
    return 0
