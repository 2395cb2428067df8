#!/usr/bin/python3
"""Runs a case and opens its result with h5py, xarray, ncdump and h5dump: all must see the same names, units, values.

    readers_test.py PALIER CASE.yaml
"""

import os
import re
import shutil
import subprocess
import sys
import tempfile
import unittest

import h5py
import netCDF4
import numpy
import xarray

PROGRAM, CASE = None, None

# The file format of docs/result-file.md, written down a second time on purpose.
FORMAT = {
    "time": ("time", "s"), "r": ("r", "m"), "r_metal": ("r_metal", "m"), "r_bounds": ("r side", "m"),
    "depth": ("probe", "m"), "depth_metal": ("r_metal", "m"), "layer": ("r", "1"),
    "temperature": ("time r", "K"), "fraction_solid": ("time r_metal", "1"),
    "probe_temperature": ("time probe", "K"), "probe_fraction_solid": ("time probe", "1"),
    "solidus_depth": ("time", "m"), "liquidus_depth": ("time", "m"), "mushy_width": ("time", "m"),
    "surface_heat_flux": ("time", "W m-2"),
    "start_of_freezing": ("probe", "s"), "start_of_freezing_error": ("probe", "s"),
    "end_of_freezing": ("probe", "s"), "end_of_freezing_error": ("probe", "s"),
    "local_solidification_time": ("probe", "s"), "local_solidification_time_error": ("probe", "s"),
    "start_of_freezing_by_depth": ("r_metal", "s"), "end_of_freezing_by_depth": ("r_metal", "s"),
    "local_solidification_time_by_depth": ("r_metal", "s"),
    "solidification_time": ("", "s"), "solidification_time_error": ("", "s"), "last_to_freeze_depth": ("", "m"),
    "end_time": ("", "s"), "liquidus_temperature": ("", "K"), "end_of_freezing_temperature": ("", "K"),
    "pouring_temperature": ("", "K"), "heat_imbalance": ("", "1"),
    "steps": ("", "1"), "rejected_steps": ("", "1"), "newton_iterations": ("", "1"),
}


def output_of(*command):
    return subprocess.run(command, check=True, capture_output=True, text=True).stdout


def content(path):
    with open(path, "rb") as file:
        return file.read()


class Readers(unittest.TestCase):
    @classmethod
    def setUpClass(cls):
        cls.folder = tempfile.TemporaryDirectory()
        cls.path = os.path.join(cls.folder.name, "run.h5")
        subprocess.run([PROGRAM, "run", CASE, "-o", cls.path], check=True, stdout=subprocess.DEVNULL)
        with h5py.File(cls.path, "r") as file:
            cls.values = {name: file[name][()] for name in FORMAT}

    @classmethod
    def tearDownClass(cls):
        cls.folder.cleanup()

    def assert_same(self, name, found):
        numpy.testing.assert_array_equal(numpy.asarray(found), self.values[name], err_msg=name)

    def test_h5py_finds_names_dimensions_and_units(self):
        with h5py.File(self.path, "r") as file:
            self.assertEqual(set(file) - {"probe", "side", "provenance"}, set(FORMAT))
            for name, (dimensions, units) in FORMAT.items():
                variable = file[name]
                self.assertEqual(variable.attrs["units"].decode(), units, name)
                self.assertTrue(variable.attrs["long_name"], name)
                if name == dimensions:
                    self.assertTrue(h5py.h5ds.is_scale(variable.id), name)
                    continue
                scales = [variable.dims[i][0].name.strip("/") for i in range(variable.ndim)]
                self.assertEqual(" ".join(scales), dimensions, name)

    def test_the_run_makes_sense(self):
        values = self.values
        self.assertTrue((numpy.diff(values["time"]) > 0).all())
        self.assertTrue((numpy.diff(values["r"]) > 0).all())
        self.assertTrue(numpy.isfinite(values["temperature"]).all())
        self.assertTrue((values["fraction_solid"] >= 0).all() and (values["fraction_solid"] <= 1).all())
        self.assertEqual(values["fraction_solid"][0].max(), 0)
        self.assertTrue((values["r_bounds"][:, 0] < values["r"]).all())
        self.assertTrue((values["r_bounds"][:, 1] > values["r"]).all())
        self.assertLessEqual(values["end_of_freezing_temperature"], values["liquidus_temperature"])
        self.assertGreater(values["temperature"].max(), values["end_of_freezing_temperature"])

    def test_xarray(self):
        with xarray.open_dataset(self.path, engine="netcdf4") as dataset:
            self.assertEqual(dataset.attrs["Conventions"], "CF-1.8")
            self.assertEqual(set(dataset.dims), {"time", "r", "r_metal", "probe", "side"})
            self.assertEqual(set(dataset.variables), set(FORMAT))
            for name, (dimensions, units) in FORMAT.items():
                self.assertEqual(" ".join(dataset[name].dims), dimensions, name)
                self.assertEqual(dataset[name].attrs["units"], units, name)
                self.assert_same(name, dataset[name].values)
            self.assertIn("depth", dataset["probe_temperature"].coords)
            self.assertEqual(dataset["time"].dtype, numpy.float64)  # not turned into dates

    def test_netcdf_opens_it_for_append(self):
        copy = os.path.join(self.folder.name, "append.h5")
        shutil.copy(self.path, copy)
        with netCDF4.Dataset(copy, "a") as dataset:
            dataset.note = "appended"
        with netCDF4.Dataset(copy) as dataset:
            self.assertEqual(dataset.note, "appended")
            self.assertTrue(dataset["provenance"].case_text)

    def test_ncdump(self):
        header = output_of("ncdump", "-h", self.path)
        for name, (dimensions, _) in FORMAT.items():
            wanted = f" {name}({dimensions.replace(' ', ', ')}) ;" if dimensions else f" {name} ;"
            self.assertIn(wanted, header)
        for name in ("temperature", "end_of_freezing", "layer", "steps"):
            data = output_of("ncdump", "-p", "9,17", "-v", name, self.path).split("\ndata:\n")[1]
            text = re.search(rf"^ {name} =(.*?) ;", data, re.DOTALL | re.MULTILINE).group(1)
            numbers = [float("nan" if item.strip() in ("_", "NaN") else item) for item in text.split(",")]
            self.assert_same(name, numpy.reshape(numbers, self.values[name].shape))

    def test_nccopy_round_trip(self):
        copy = os.path.join(self.folder.name, "copy.nc")
        output_of("nccopy", self.path, copy)
        with netCDF4.Dataset(copy) as dataset:
            dataset.set_auto_mask(False)
            for name in FORMAT:
                self.assert_same(name, dataset[name][...])

    def test_h5dump(self):
        raw = os.path.join(self.folder.name, "raw.bin")
        for name, values in self.values.items():
            output_of("h5dump", "-d", "/" + name, "-b", "LE", "-o", raw, self.path)
            found = numpy.fromfile(raw, dtype=values.dtype.newbyteorder("<"))
            self.assert_same(name, found.reshape(values.shape))

    def test_every_unit_is_read_by_udunits(self):
        if shutil.which("udunits2") is None:
            message = "udunits2 is not installed (apt-get install udunits-bin): units were NOT checked"
            print("SKIPPED:", message, file=sys.stderr)
            self.skipTest(message)
        si = {"s": "second", "m": "meter", "K": "kelvin", "1": "1", "W m-2": "kg s-3"}
        for units in {units for _, units in FORMAT.values()}:
            # `1 K = 1 kelvin` proves more than that the text parses: it is the unit we mean.
            self.assertRegex(output_of("udunits2", "-H", units, "-W", si[units]), r"= ?1 ", units)

    def test_flags_name_the_layers(self):
        with netCDF4.Dataset(self.path) as dataset:
            layer = dataset["layer"]
            words, names = layer.flag_meanings.split(" "), layer.names.split("\n")
            self.assertEqual(len(words), numpy.size(layer.flag_values))
            self.assertEqual(len(names), len(words))
            self.assertIn(dataset.alloy, names)
            metal = self.values["layer"][numpy.isin(self.values["r"], self.values["r_metal"])]
            self.assertEqual(set(metal), {names.index(dataset.alloy)})

    def test_provenance(self):
        with h5py.File(self.path, "r") as file:
            provenance = file["provenance"].attrs
            self.assertEqual(provenance["case_text"], content(CASE))
            for name in ("version", "commit", "command_line", "hdf5_version", "compiler", "resolved_case"):
                self.assertTrue(provenance[name].strip(), name)
            self.assertFalse(provenance["case_file"].startswith(b"/"))
            materials = [file["provenance"][name].attrs for name in file["provenance"]]
            self.assertTrue(materials)
            for material in materials:
                self.assertTrue(material["text"])
                self.assertFalse(material["path"].startswith(b"/"))
            self.assertIn(b"trial casting", file.attrs["caution"])

    def test_the_same_case_gives_the_same_bytes(self):
        first = content(self.path)
        subprocess.run([PROGRAM, "run", CASE, "-o", self.path], check=True, stdout=subprocess.DEVNULL)
        self.assertEqual(content(self.path), first)


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    CASE, PROGRAM = sys.argv.pop(), sys.argv.pop()
    unittest.main(verbosity=2)
