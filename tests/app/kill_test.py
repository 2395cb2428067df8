#!/usr/bin/python3
"""Kills palier again and again while it runs: a result under its final name is whole, or it is not there.

    kill_test.py PALIER CASE.yaml
"""

import os
import random
import subprocess
import sys
import tempfile
import time
import unittest

sys.path.insert(0, os.path.join(os.path.dirname(os.path.abspath(__file__)), "../../tools"))
from palier_result import read_result  # noqa: E402

PROGRAM, CASE = None, None
KILLS = 40
BUDGET = 30.0  # [s] for all of them
FEWEST = 8     # kills below which the test has shown nothing
SEED = 20240521


class Kill(unittest.TestCase):
    def setUp(self):
        self.folder = tempfile.TemporaryDirectory()
        self.path = os.path.join(self.folder.name, "run.h5")
        self.random = random.Random(SEED)

    def tearDown(self):
        self.folder.cleanup()

    def start(self):
        return subprocess.Popen([PROGRAM, "run", CASE, "-o", self.path], stdout=subprocess.DEVNULL,
                                stderr=subprocess.DEVNULL)

    def moments_of_an_undisturbed_run(self):
        """Seconds until the file aside is first seen, or until the end where it came and went unseen; and in all."""
        begin, seen = time.monotonic(), None
        run = self.start()
        while run.poll() is None:
            if seen is None and os.path.exists(self.path + ".partial"):
                seen = time.monotonic() - begin
        whole = time.monotonic() - begin
        self.assertEqual(run.returncode, 0)
        return (whole if seen is None else seen), whole

    def kill_at(self, delay):
        """True if the kill came before the run was over."""
        run = self.start()
        time.sleep(delay)
        run.kill()
        return run.wait() != 0

    def kill_while_writing(self, spread):
        """Waits for the file aside (or, of a writer that does without, the file itself), perhaps a moment more, then
        kills."""
        names = (self.path, self.path + ".partial")
        for name in names:
            if os.path.exists(name):
                os.unlink(name)
        run = self.start()
        while run.poll() is None and not any(map(os.path.exists, names)):
            pass
        if self.random.random() < 0.5:
            time.sleep(self.random.uniform(0, spread))
        run.kill()
        return run.wait() != 0

    def test_a_killed_run_leaves_no_broken_result(self):
        writing, whole = min((self.moments_of_an_undisturbed_run() for _ in range(3)), key=lambda moments: moments[1])
        reference = read_result(self.path)
        killed, complete = 0, 0
        end = time.monotonic() + BUDGET
        for attempt in range(KILLS):
            if time.monotonic() > end:
                break
            if os.path.exists(self.path) and attempt % 2:  # every other run overwrites the one before
                os.unlink(self.path)
            kind = attempt % 3
            if kind == 0:
                killed += self.kill_at(self.random.uniform(0, whole))
            elif kind == 1:
                killed += self.kill_at(self.random.uniform(0.9 * writing, 1.02 * whole))
            else:
                killed += self.kill_while_writing(max(1e-4, whole - writing))
            if os.path.exists(self.path):
                result = read_result(self.path)
                complete += 1
                self.assertTrue((result["temperature"] == reference["temperature"]).all())
        print(f"{killed} runs killed, {complete} times a whole result stood there", file=sys.stderr)
        self.assertGreaterEqual(killed, FEWEST)
        # What the killed ones left aside is in nobody's way.
        subprocess.run([PROGRAM, "run", CASE, "-o", self.path], check=True, stdout=subprocess.DEVNULL)
        read_result(self.path)
        self.assertEqual(os.listdir(self.folder.name), ["run.h5"])


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    CASE, PROGRAM = sys.argv.pop(), sys.argv.pop()
    unittest.main(verbosity=2)
