#!/usr/bin/python3
"""Compares the liquidus of every shipped alloy with a published temperature, within the tolerance stated beside it.

    liquidus_test.py PALIER CASE     CASE is not used
"""

import csv
import json
import pathlib
import re
import subprocess
import sys
import unittest

ROOT = pathlib.Path(__file__).resolve().parents[2]
PROGRAM = None


def published():
    with open(ROOT / "tests/published/data/liquidus.csv", encoding="utf-8") as file:
        return list(csv.DictReader(line for line in file if not line.startswith("#")))


def shipped():
    return [re.search(r"^name: (.*)$", file.read_text(encoding="utf-8"), re.MULTILINE)[1]
            for file in sorted((ROOT / "cases/alloys").glob("*.yaml"))]


def answer(alloy):
    done = subprocess.run([PROGRAM, "alloy", alloy, "--json", "--library", ROOT / "cases"],
                          capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr
    return json.loads(done.stdout)


class Liquidus(unittest.TestCase):
    def test_every_shipped_alloy_has_one_published_value(self):
        self.assertEqual(sorted(row["alloy"] for row in published()), sorted(shipped()))

    def test_liquidus_is_the_published_one(self):
        for row in published():
            with self.subTest(row["alloy"]):
                found = answer(row["alloy"])["liquidus_C"]
                self.assertLessEqual(abs(found - float(row["published_C"])), float(row["tolerance_K"]),
                                     f"{found} degC against {row['published_C']} degC, {row['source']}")

    def test_values_have_sources_and_tolerances_reasons(self):
        for row in published():
            self.assertGreater(float(row["tolerance_K"]), 0)
            self.assertIn(row["rests"], ("same", "partly", "other"))
            self.assertTrue(row["source"] and row["reason"], row["alloy"])

    def test_freezing_ends_below_the_liquidus_and_is_complete(self):
        for name in shipped():
            with self.subTest(name):
                found = answer(name)
                end = found["end_of_freezing_C"][found["rule"]]
                if found["rule"] == "pure":
                    self.assertEqual(end, found["liquidus_C"])
                else:
                    self.assertLess(end, found["liquidus_C"])
                self.assertAlmostEqual(found["path"][-1][1], 1, places=9)


if __name__ == "__main__":
    PROGRAM = sys.argv[1]
    unittest.main(argv=sys.argv[:1])
