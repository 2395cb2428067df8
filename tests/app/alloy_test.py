#!/usr/bin/python3
"""Asks palier how alloys freeze and checks the answers against closed forms.

    alloy_test.py PALIER CASE     CASE is not used
"""

import json
import subprocess
import sys
import unittest

PROGRAM = None


def ask(*arguments):
    return subprocess.run([PROGRAM, "alloy", *arguments], capture_output=True, text=True, check=False)


def answer(*arguments):
    done = ask(*arguments, "--json")
    assert done.returncode == 0, done.stderr
    return json.loads(done.stdout)


class Alloy(unittest.TestCase):
    def test_scheil_eutectic_share_is_that_of_the_closed_form(self):
        # Scheil (1942): fl = (C_E/C0)^(-1/(1-k)); C_E from the file's straight liquidus.
        for copper in (2.0, 4.5, 5.5):
            found = answer("Al-4.5Cu", "--composition", f"Cu {copper} %", "--path", "scheil")
            eutectic, k = found["last_liquid_mass_percent"], found["first_solid_mass_percent"] / copper
            share = (eutectic / copper) ** (-1 / (1 - k))
            self.assertEqual([a["reaction"] for a in found["arrests"]], ["eutectic"])
            self.assertAlmostEqual(found["arrests"][0]["fraction"], share, places=9)
            self.assertAlmostEqual(found["arrests"][0]["temperature_C"], found["end_of_freezing_C"]["scheil"], places=9)

    def test_path_falls_from_nothing_to_all_solid(self):
        for name in ("Al", "Al-7Si-0.3Mg", "Al-4.5Cu", "steel-0.25C", "gray-iron-eutectic"):
            path = answer(name)["path"]
            self.assertEqual(path[0][1], 0)
            self.assertAlmostEqual(path[-1][1], 1, places=9)
            for (hot, less), (cold, more) in zip(path, path[1:]):
                self.assertGreaterEqual(hot, cold)
                self.assertGreaterEqual(more, less)

    def test_more_solute_freezes_colder(self):
        low, high = (answer("Al-7Si-0.3Mg", "--composition", f"Si {c} %")["liquidus_C"] for c in (6.5, 7.5))
        self.assertGreater(low, high)

    def test_atomic_percent_is_converted(self):
        # 10 at% Si in Al: 10*28.085/(10*28.085 + 90*26.982) = 10.366 mass %, weights from memory of IUPAC (2022).
        found = answer("Al-7Si-0.3Mg", "--composition", "Si 10 at%")["composition_mass_percent"]
        self.assertAlmostEqual(found, 10.366, places=2)

    def test_back_diffusion_lies_between_lever_and_scheil(self):
        def share(rule, rate):
            found = answer("Al-4.5Cu", "--path", rule, "--cooling-rate", rate)
            return sum(a["fraction"] for a in found["arrests"]), found["back_diffusion"]

        none = answer("Al-4.5Cu", "--path", "scheil")["arrests"][0]["fraction"]
        for rule in ("clyne-kurz", "ohnaka"):
            (fast, _), (slow, back) = share(rule, "100 K/s"), share(rule, "0.01 K/s")
            self.assertLess(slow, fast)
            self.assertLess(fast, none)
            # Bower, Brody & Flemings (1966), from memory: spacing 7.5 um (t/s)^0.39; D as in the alloy file.
            spacing = 7.5e-6 * back["local_solidification_time_s"] ** 0.39
            self.assertAlmostEqual(back["arm_spacing_m"] / spacing, 1, places=9)
            number = 4 * 5e-13 * back["local_solidification_time_s"] / spacing**2
            self.assertAlmostEqual(back["diffusion_number"] / number, 1, places=9)

    def test_what_cannot_be_is_refused(self):
        for arguments, words in (
            (["Al-4.5Cu", "--composition", "Cu 40 %"], "outside the diagram"),
            (["Al-4.5Cu", "--composition", "Si 4 %"], "the solute of Al-4.5Cu is Cu"),
            (["Al-4.5Cu", "--composition", "Cu 4, Si 1 %"], "several elements"),
            (["Al", "--composition", "Cu 4 %"], "no binary lines"),
            (["Al-4.5Cu", "--path", "pure"], "has data for"),
            (["steel-0.25C", "--path", "scheil"], "never ends"),
            (["Al-4.5Cu", "--cooling-rate", "1 K"], "expected a cooling rate"),
            (["Al", "--cooling-rate", "1 K/s"], "no data on back-diffusion"),
            (["Al-4.5Cu", "--path", "ohnaka"], "more with --cooling-rate"),
            (["Al-4.5C"], "did you mean 'Al-4.5Cu'"),
        ):
            done = ask(*arguments)
            self.assertEqual(done.returncode, 2, arguments)
            self.assertIn(words, done.stderr)
            self.assertEqual(done.stdout, "")


if __name__ == "__main__":
    PROGRAM = sys.argv[1]
    unittest.main(argv=sys.argv[:1])
