"""Reads a palier result file (docs/result-file.md) into numpy arrays.

    from palier_result import read_result
    result = read_result("rim.h5")
    result["temperature"]          # array (time, r), in kelvin
    result.units["temperature"]    # "K"
    result.text["title"]

Needs numpy and h5py. For xarray users: xarray.open_dataset("rim.h5", engine="netcdf4") does the same without this file.
"""

import dataclasses
import os

import h5py
import numpy

from file_trouble import FileTrouble

# Every variable a complete result has, with its dimensions.
VARIABLES = {
    "time": ("time",), "r": ("r",), "r_metal": ("r_metal",), "r_bounds": ("r", "side"),
    "depth": ("probe",), "depth_metal": ("r_metal",), "layer": ("r",),
    "temperature": ("time", "r"), "fraction_solid": ("time", "r_metal"),
    "probe_temperature": ("time", "probe"), "probe_fraction_solid": ("time", "probe"),
    "solidus_depth": ("time",), "liquidus_depth": ("time",), "mushy_width": ("time",), "surface_heat_flux": ("time",),
    "start_of_freezing": ("probe",), "start_of_freezing_error": ("probe",),
    "end_of_freezing": ("probe",), "end_of_freezing_error": ("probe",),
    "local_solidification_time": ("probe",), "local_solidification_time_error": ("probe",),
    "start_of_freezing_by_depth": ("r_metal",), "end_of_freezing_by_depth": ("r_metal",),
    "local_solidification_time_by_depth": ("r_metal",),
    "solidification_time": (), "solidification_time_error": (), "last_to_freeze_depth": (), "end_time": (),
    "liquidus_temperature": (), "end_of_freezing_temperature": (), "pouring_temperature": (),
    "heat_imbalance": (), "steps": (), "rejected_steps": (), "newton_iterations": (),
}
TEXTS = ("Conventions", "title", "source", "history", "shape", "alloy", "solidification_path", "remarks", "caution")
FACE_TOLERANCE = 1e-9  # faces of neighboring cells agree to this share of the section


class ResultTrouble(FileTrouble):
    """A file that gives no result: status 2 not a (complete) result, 4 cannot be read."""


@dataclasses.dataclass(frozen=True)
class Result:
    """A result in memory.

    values  name -> numpy array, in the file's SI units and with the dimensions of VARIABLES; NaN: not reached, none
    units   name -> text, as UDUNITS reads it
    text    name -> attribute of the whole file, e.g. title, alloy, shape, caution
    layer_names  of the layers, in the order of the numbers in values["layer"]
    """

    path: str
    values: dict
    units: dict
    text: dict
    layer_names: tuple

    def __getitem__(self, name):
        return self.values[name]

    def depth_edges(self):
        """Depths of the faces of the metal's cells below the surface [m], one more than r_metal, in the order of r."""
        r, depth = self["r"], self["depth_metal"]
        first = int(numpy.argmin(numpy.abs(r - self["r_metal"][0])))
        bounds = self["r_bounds"][first:first + len(depth)]
        inward = -1.0 if len(depth) == 1 or depth[-1] < depth[0] else 1.0
        faces = numpy.append(bounds[:, 0], bounds[-1, 1])
        edges = depth[0] + inward * (faces - self["r_metal"][0])
        # A surface at depth 0 may come out as a few ulp beside it.
        edges[numpy.abs(edges) < FACE_TOLERANCE * numpy.ptp(edges)] = 0.0
        return edges


def read_result(path):
    """Reads the whole file. Raises ResultTrouble where it is missing, foreign or incomplete."""
    path = os.fspath(path)
    if os.path.isdir(path):
        raise ResultTrouble(path, "is a folder, not a result file", 4)
    try:
        with open(path, "rb"):
            pass
    except OSError as trouble:
        raise ResultTrouble(path, f"cannot be read: {trouble.strerror}", 4) from trouble
    if not h5py.is_hdf5(path):
        raise ResultTrouble(path, "is not an HDF5 file", 2)
    try:
        with h5py.File(path, "r") as file:
            return _read(path, file)
    except (OSError, RuntimeError) as trouble:
        raise ResultTrouble(path, f"cannot be read as HDF5, perhaps cut short: {trouble}", 2) from trouble


def _read(path, file):
    absent = [name for name in VARIABLES if not isinstance(file.get(name), h5py.Dataset)]
    absent += [name for name in TEXTS if name not in file.attrs]
    if absent:
        more = f" and {len(absent) - 3} more" if len(absent) > 3 else ""
        raise ResultTrouble(path, f"is not a complete palier result: no {', '.join(absent[:3])}{more}", 2)
    sizes = {name: file[name].shape[0] for name in ("time", "r", "r_metal", "probe", "side") if name in file}
    for name, dimensions in VARIABLES.items():
        wanted = tuple(sizes.get(dimension) for dimension in dimensions)
        if file[name].shape != wanted:
            raise ResultTrouble(path, f"is not a complete palier result: {name} has shape {file[name].shape}, "
                                      f"expected {wanted}", 2)
    return Result(path=path,
                  values={name: file[name][()] for name in VARIABLES},
                  units={name: _text(file[name].attrs["units"]) for name in VARIABLES},
                  text={name: _text(file.attrs[name]) for name in TEXTS},
                  layer_names=tuple(_text(file["layer"].attrs["names"]).split("\n")))


def _text(value):
    """Text attributes come as bytes or as str, depending on the writer's form and the version of h5py."""
    return value.decode("utf-8") if isinstance(value, bytes) else str(value)
