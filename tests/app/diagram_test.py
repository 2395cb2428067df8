#!/usr/bin/python3
"""Draws the shipped alloys with tools/plot_diagram.py, and gives the tool answers it must refuse.

    diagram_test.py PALIER CASE     CASE is not used
"""

import json
import os
import subprocess
import sys
import tempfile
import unittest

import matplotlib.image

sys.path.insert(0, os.path.join(os.path.dirname(os.path.abspath(__file__)), "../../tools"))
from alloy_answer import read_answer  # noqa: E402
from file_trouble import FileTrouble  # noqa: E402
from plot_diagram import draw  # noqa: E402

PROGRAM = None
TOOL = os.path.join(sys.path[0], "plot_diagram.py")
ALLOYS = ("Al", "Al-4.5Cu", "Al-7Si-0.3Mg", "gray-iron-eutectic", "steel-0.25C")


def ask(*arguments):
    return subprocess.run([PROGRAM, "alloy", *arguments, "--json"], capture_output=True, check=True).stdout


def plot(*arguments, **more):
    return subprocess.run([sys.executable, TOOL, *arguments], capture_output=True, check=False, **more)


class Picture(unittest.TestCase):
    @classmethod
    def setUpClass(cls):
        cls.folder = tempfile.TemporaryDirectory()
        cls.answers = {name: ask(name) for name in ALLOYS}
        for name, answer in cls.answers.items():
            cls.write(name + ".json", answer)

    @classmethod
    def tearDownClass(cls):
        cls.folder.cleanup()

    @classmethod
    def file(cls, name):
        return os.path.join(cls.folder.name, name)

    @classmethod
    def write(cls, name, content):
        with open(cls.file(name), "wb") as file:
            file.write(content)
        return cls.file(name)

    @classmethod
    def content(cls, name):
        with open(cls.file(name), "rb") as file:
            return file.read()

    def drawn(self, name, figure, *arguments):
        done = plot(self.file(name + ".json"), "-o", self.file(figure), *arguments)
        self.assertEqual((done.returncode, done.stdout.decode()), (0, self.file(figure) + "\n"), done.stderr)
        return self.content(figure)

    @staticmethod
    def labels(svg):
        # matplotlib draws letters as curves and leaves each text beside them as a comment.
        return [line.strip()[5:-4] for line in svg.decode().splitlines() if line.strip().startswith("<!-- ")]


class Drawing(Picture):
    @classmethod
    def setUpClass(cls):
        super().setUpClass()
        for name in ALLOYS:
            for figure in (".png", ".svg"):
                plot(cls.file(name + ".json"), "-o", cls.file(name + figure))

    def test_pictures_of_the_shipped_alloys(self):
        for name in ALLOYS:
            with self.subTest(alloy=name):
                pixels = matplotlib.image.imread(self.file(name + ".png"))
                binary = "diagram" in json.loads(self.answers[name])
                self.assertEqual(pixels.shape[1] > 1300, binary)  # two panels are wider than one
                self.assertGreater(pixels[..., :3].std(), 0.05)   # not a blank page

    def test_same_bytes_each_time(self):
        for name in ALLOYS:
            for extension in (".png", ".svg"):
                with self.subTest(alloy=name, extension=extension):
                    self.assertEqual(self.drawn(name, "again" + extension), self.content(name + extension))

    def test_the_picture_stands_beside_the_answer(self):
        self.write("beside.json", self.answers["Al"])
        self.assertEqual(plot(self.file("beside.json")).stdout.decode(), self.file("beside.png") + "\n")
        self.assertEqual(self.content("beside.png"), self.content("Al.png"))

    def test_the_path_on_the_diagram_ends_where_the_closed_form_ends(self):
        # Straight lines: liquid at T is (Tm - T)/slope, solid k times it; the Scheil (1942) path ends at the eutectic
        # with (C_E/C0)^(-1/(1-k)) of liquid left, which freezes there.
        answer = json.loads(self.answers["Al-4.5Cu"])
        lines = {line.get_label(): line for axes in draw(read_answer(self.file("Al-4.5Cu.json")), "metric").axes
                 for line in axes.get_lines()}
        eutectic, alloy = answer["diagram"]["invariant"]["liquid_mass_percent"], answer["composition_mass_percent"]
        k = answer["first_solid_mass_percent"] / alloy
        ends = [answer["liquidus_C"], answer["diagram"]["invariant"]["temperature_C"]]
        for label, compositions in (("liquid while it freezes", (alloy, eutectic)),
                                    ("solid as it forms", (k * alloy, k * eutectic))):
            x, y = lines[label].get_data()
            for found, wanted in zip((x[0], x[-1], y[0], y[-1]), (*compositions, *ends)):
                self.assertAlmostEqual(found, wanted, places=6)
        x, y = lines["arrest"].get_data()
        self.assertAlmostEqual(x[0], 1 - (eutectic / alloy) ** (-1 / (1 - k)), places=6)
        self.assertAlmostEqual(x[1], 1, places=6)
        self.assertAlmostEqual(y[0], ends[1], places=6)

    def test_labels_of_a_binary_alloy_tell_the_answer(self):
        for name in ("Al-4.5Cu", "Al-7Si-0.3Mg"):
            answer, labels = json.loads(self.answers[name]), self.labels(self.content(name + ".svg"))
            solute, arrest = answer["solute"], answer["arrests"][0]
            for label in ("liquid", "solid", "liquid + solid", "liquidus", "solidus", "eutectic", "fraction solid",
                          f"{name}, {answer['composition_mass_percent']:.4g} wt% {solute} in Al, Scheil path",
                          f"liquidus {answer['liquidus_C']:.0f} °C",
                          f"freezing ends {answer['end_of_freezing_C']['scheil']:.0f} °C",
                          f"first solid, {answer['first_solid_mass_percent']:.3g} wt% {solute}",
                          f"last liquid, {answer['last_liquid_mass_percent']:.3g} wt% {solute}",
                          f"eutectic, {100 * arrest['fraction']:.1f} %"):
                with self.subTest(alloy=name, label=label):
                    self.assertIn(label, labels)
            self.assertTrue(any(label.startswith("Design aid: ") for label in labels))

    def test_no_invariant_and_no_arrest_are_made_up(self):
        labels = self.labels(self.content("steel-0.25C.svg"))
        self.assertIn("steel-0.25C, 0.25 wt% C in Fe, lever-rule path", labels)
        self.assertIn("liquid + solid", labels)
        self.assertFalse([label for label in labels if "eutectic" in label or "arrest" in label])

    def test_no_diagram_of_what_is_no_binary(self):
        for name, title in (("Al", "Al, one-temperature path"),
                            ("gray-iron-eutectic", "gray-iron-eutectic, measured path")):
            labels = self.labels(self.content(name + ".svg"))
            self.assertIn(title, labels)
            self.assertNotIn("solidus", labels)
        self.assertIn("melting point, 100.0 %", self.labels(self.content("Al.svg")))

    def test_us_units(self):
        labels = self.labels(self.drawn("Al-4.5Cu", "us.svg", "--units", "us"))
        fahrenheit = json.loads(self.answers["Al-4.5Cu"])["liquidus_C"] * 1.8 + 32
        self.assertIn(f"liquidus {fahrenheit:.0f} °F", labels)
        self.assertFalse([label for label in labels if "°C" in label])

    def test_other_compositions_and_rules(self):
        for arguments in (("Al-7Si-0.3Mg", "--composition", "Si 12.3 %"), ("Al-7Si-0.3Mg", "--composition", "Si 1 %"),
                          ("Al-4.5Cu", "--composition", "Cu 0.3 %", "--path", "lever")):
            self.write("other.json", ask(*arguments))
            self.drawn("other", "other.png")

    def test_standard_input(self):
        done = plot("-", "-o", self.file("piped.svg"), input=self.answers["Al"])
        self.assertEqual(done.returncode, 0, done.stderr)
        self.assertEqual(self.content("piped.svg"), self.content("Al.svg"))


class Refusals(Picture):
    def refused(self, status, words, *arguments, **more):
        done = plot(*arguments, **more)
        error = done.stderr.decode()
        self.assertEqual(done.returncode, status, error)
        self.assertEqual(error.count("\n"), 1, error)
        self.assertIn(words, error)

    def changed(self, **values):
        """An answer with values replaced; one of None is taken out."""
        answer = {**json.loads(self.answers["Al-4.5Cu"]), **values}
        answer = {key: value for key, value in answer.items() if value is not None}
        return self.write("changed.json", json.dumps(answer).encode())

    def test_files_and_names(self):
        self.refused(4, "cannot be read: No such file", self.file("none.json"))
        self.refused(4, "is a folder", self.folder.name)
        self.refused(4, "cannot be written", self.file("Al.json"), "-o", self.file("no/such/Al.png"))
        self.refused(2, "end the name in .png or .svg", self.file("Al.json"), "-o", self.file("Al.jpg"))
        self.refused(2, "say -o", "-", input=self.answers["Al"])
        self.refused(2, "standard input: is not JSON", "-", "-o", self.file("x.svg"), input=b"")
        self.assertFalse(os.path.exists(self.file("x.svg")))

    def test_what_is_no_answer(self):
        for content in (b"no JSON", b"\xff\xfe", self.answers["Al-4.5Cu"][:900], b"[" * 100000):
            self.refused(2, "is not JSON", self.write("bad.json", content))
        for content in (b"[1, 2]", b"{}", b"null", b'{"path": 3}', b'{"path": [[1, 0], [1]]}'):
            self.refused(2, "is not an answer of palier alloy --json", self.write("bad.json", content))

    def test_answers_that_do_not_hold_together(self):
        whole = json.loads(self.answers["Al-4.5Cu"])
        diagram = whole["diagram"]
        for words, values in (
                ("no alloy", {"alloy": None}), ("no rule", {"rule": None}), ("no arrests", {"arrests": None}),
                ("alloy is not text", {"alloy": "two\nlines"}),
                ("path is not a list of numbers", {"path": [[645.0, float("nan")], [548.0, 1.0]]}),
                ("path does not fall", {"path": whole["path"][::-1]}),
                ("an arrest lies off the path", {"arrests": [{**whole["arrests"][0], "temperature_C": 900.0}]}),
                ("composition_mass_percent of a binary alloy is missing", {"composition_mass_percent": None}),
                ("not lists of one length", {"diagram": {**diagram, "solid_mass_percent": [0.0, 1.0]}}),
                ("the path leaves the diagram", {"path": [[700.0, 0.0], [548.2, 1.0]]})):
            with self.subTest(words=words):
                with self.assertRaises(FileTrouble) as trouble:
                    read_answer(self.changed(**values))
                self.assertEqual(trouble.exception.status, 2)
                self.assertIn(words, str(trouble.exception))
                self.assertNotIn("\n", str(trouble.exception))

    def test_a_python_without_the_modules_hands_over_or_explains(self):
        self.write("sitecustomize.py", b"import importlib.util as u\nfind = u.find_spec\n"
                                       b"u.find_spec = lambda name, *a: None if name == 'numpy' else find(name, *a)\n")
        done = subprocess.run(["/usr/bin/python3", TOOL, self.file("Al.json")], capture_output=True, check=False,
                              env={**os.environ, "PYTHONPATH": self.folder.name})
        self.assertEqual(done.returncode, 4, done.stderr)
        self.assertIn(b"apt-get install python3-numpy python3-matplotlib", done.stderr)


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    sys.argv.pop()
    PROGRAM = sys.argv.pop()
    unittest.main(verbosity=2)
