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

    def test_dilute_alloy_by_scheil_is_that_of_the_closed_form(self):
        # Scheil (1942) for each element: C = C0 f^(k-1), T = Tm + sum of slope C; lines as in the alloy file.
        found = answer("Al-7Si-0.55Mg", "--composition", "Si 6.5 %, Mg 0.4 %", "--path", "scheil")
        lines = {"Si": (6.5, -6.613, 0.131), "Mg": (0.4, -4.46, 0.48)}
        self.assertEqual(found["elements_mass_percent"], {"Si": 6.5, "Mg": 0.4})
        for T, solid in found["path"][:-1]:
            at_T = 660.323 + sum(m * c * (1 - solid) ** (k - 1) for c, m, k in lines.values())
            self.assertAlmostEqual(T, at_T, places=8)
        last = found["arrests"][0]
        self.assertEqual((last["temperature_C"], last["reaction"]), (574, "last liquid"))
        for element, (c, _, k) in lines.items():
            self.assertAlmostEqual(found["first_solid_elements_mass_percent"][element], k * c, places=12)
            self.assertAlmostEqual(found["last_liquid_elements_mass_percent"][element],
                                   c * last["fraction"] ** (k - 1), places=8)

    def test_partial_equilibrium_lies_between_lever_and_scheil(self):
        ends = answer("steel-0.25C-0.4Si-0.7Mn")["end_of_freezing_C"]
        self.assertGreater(ends["lever"], ends["partial"] + 1)
        self.assertGreater(ends["partial"], ends["scheil"] + 1)

    def test_steel_without_other_elements_is_that_of_iron_and_carbon(self):
        # Lever rule in the textbook diagram of iron-carbon: at 0.25 % carbon the liquid left at the peritectic,
        # (0.25 - 0.09)/(0.53 - 0.09), takes up all delta ferrite and leaves (0.25 - 0.17)/(0.53 - 0.17).
        found = answer("steel-0.25C-0.4Si-0.7Mn", "--composition", "Si 0 %, Mn 0 %, P 0 %, S 0 %", "--path", "lever")
        (arrest,) = found["arrests"]
        self.assertEqual(arrest["reaction"], "peritectic")
        self.assertAlmostEqual(arrest["temperature_C"], 1495, places=9)
        self.assertAlmostEqual(arrest["fraction"], 0.16 / 0.44 - 0.08 / 0.36, places=9)
        self.assertAlmostEqual(found["liquidus_C"], 1538 - 43 / 0.53 * 0.25, places=9)

    def test_elements_not_named_keep_their_content(self):
        found = answer("steel-0.25C-0.4Si-0.7Mn", "--composition", "Mn 1 %, C 0.2 %")["elements_mass_percent"]
        self.assertEqual({e: round(c, 12) for e, c in found.items()},
                         {"C": 0.2, "Si": 0.4, "Mn": 1, "P": 0.02, "S": 0.02})

    def test_elements_are_shown_to_a_person(self):
        told = ask("steel-0.25C-0.4Si-0.7Mn", "--path", "partial").stdout
        self.assertRegex(told, r"element, wt% +alloy +first solid +last liquid +\(partial path\)\n +C +0\.25 ")

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
            (["Al-7Si-0.55Mg", "--composition", "Si 7 %, Cu 1 %"], "the elements of Al-7Si-0.55Mg are Si, Mg"),
            (["Al-7Si-0.55Mg", "--composition", "Si 7 %, Si 6 %"], "twice"),
            (["Al-7Si-0.55Mg", "--composition", "Si 7 at%"], "state each in wt%"),
            (["steel-0.25C-0.4Si-0.7Mn", "--composition", "C 3 %"], "for a steel"),
            (["Al-4.5Cu", "--path", "partial"], "has data for: lever, scheil"),
            (["Al-4.5C"], "did you mean 'Al-4.5Cu'"),
        ):
            done = ask(*arguments)
            self.assertEqual(done.returncode, 2, arguments)
            self.assertIn(words, done.stderr)
            self.assertEqual(done.stdout, "")


if __name__ == "__main__":
    PROGRAM = sys.argv[1]
    unittest.main(argv=sys.argv[:1])
