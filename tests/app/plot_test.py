#!/usr/bin/python3
"""Draws the result of a case with tools/plot_run.py, and gives the tool files it must refuse.

    plot_test.py PALIER CASE.yaml
"""

import os
import shutil
import subprocess
import sys
import tempfile
import unittest

import h5py
import matplotlib.image

PROGRAM, CASE = None, None
TOOL = os.path.join(os.path.dirname(os.path.abspath(__file__)), "../../tools/plot_run.py")


class Plot(unittest.TestCase):
    @classmethod
    def setUpClass(cls):
        cls.folder = tempfile.TemporaryDirectory()
        cls.result = cls.file("run.h5")
        subprocess.run([PROGRAM, "run", CASE, "-o", cls.result], check=True, stdout=subprocess.DEVNULL)

    @classmethod
    def tearDownClass(cls):
        cls.folder.cleanup()

    @classmethod
    def file(cls, name):
        return os.path.join(cls.folder.name, name)

    def plot(self, *arguments):
        return subprocess.run([sys.executable, TOOL, *arguments], capture_output=True, text=True, check=False)

    def content(self, name):
        with open(self.file(name), "rb") as file:
            return file.read()

    def refused(self, status, words, *arguments):
        done = self.plot(*arguments)
        self.assertEqual(done.returncode, status, done.stderr)
        self.assertEqual(done.stderr.count("\n"), 1, done.stderr)
        self.assertIn(words, done.stderr)

    def test_the_picture_stands_beside_the_result(self):
        done = self.plot(self.result)
        self.assertEqual((done.returncode, done.stdout), (0, self.file("run.png") + "\n"), done.stderr)
        pixels = matplotlib.image.imread(self.file("run.png"))
        self.assertGreater(pixels.shape[0], 900)
        self.assertGreater(pixels[..., :3].std(), 0.05)  # not a blank page

    def test_same_bytes_each_time(self):
        for extension in (".png", ".svg"):
            for name in ("a", "b"):
                done = self.plot(self.result, "-o", self.file(name + extension))
                self.assertEqual(done.returncode, 0, done.stderr)
            self.assertEqual(self.content("a" + extension), self.content("b" + extension))

    def test_us_units_differ(self):
        self.plot(self.result, "-o", self.file("metric.svg"))
        self.plot(self.result, "-o", self.file("us.svg"), "--units", "us")
        self.assertIn("°C", self.content("metric.svg").decode())
        self.assertIn("°F", self.content("us.svg").decode())

    def test_refusals(self):
        self.refused(4, "cannot be read: No such file", self.file("none.h5"))
        self.refused(4, "is a folder", self.folder.name)
        with open(self.file("text.h5"), "w", encoding="utf-8") as file:
            file.write("no HDF5")
        self.refused(2, "is not an HDF5 file", self.file("text.h5"))
        with h5py.File(self.file("foreign.h5"), "w") as file:
            file["time"] = [1.0]
        self.refused(2, "is not a complete palier result", self.file("foreign.h5"))
        shutil.copy(self.result, self.file("less.h5"))
        with h5py.File(self.file("less.h5"), "a") as file:
            del file["temperature"]
        self.refused(2, "no temperature", self.file("less.h5"))
        with open(self.file("short.h5"), "wb") as file:
            file.write(self.content("run.h5")[:5000])
        self.refused(2, "perhaps cut short", self.file("short.h5"))
        self.refused(2, "end the name in .png or .svg", self.result, "-o", self.file("run.jpg"))
        self.refused(4, "cannot be written", self.result, "-o", self.file("no/such/run.png"))

    def test_a_python_without_the_modules_hands_over_or_explains(self):
        blind = {**os.environ, "PYTHONPATH": self.folder.name}
        with open(self.file("sitecustomize.py"), "w", encoding="utf-8") as file:
            file.write("import importlib.util as u\nfind = u.find_spec\n"
                       "u.find_spec = lambda name, *a: None if name == 'h5py' else find(name, *a)\n")
        done = subprocess.run(["/usr/bin/python3", TOOL, self.result], env=blind, capture_output=True, text=True,
                              check=False)
        self.assertEqual(done.returncode, 4, done.stderr)
        self.assertIn("apt-get install python3-numpy python3-h5py python3-matplotlib", done.stderr)


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    CASE, PROGRAM = sys.argv.pop(), sys.argv.pop()
    unittest.main(verbosity=2)
