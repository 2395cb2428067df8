#!/usr/bin/env python3
"""Checks what palier answers to good and bad command lines: exit status, where the answer goes, what is left behind.

    command_line.py PALIER CASE     CASE: a case file that is accepted
"""

import subprocess
import sys
import tempfile
from pathlib import Path

DONE, REFUSED, FILE_TROUBLE = 0, 2, 4

# name, arguments, exit status, texts of which each must be in the answer.
# {case}: an accepted case; {empty}, {misspelt} (on line {line}): case files made below; {scratch}: an empty folder.
COMMAND_LINES = [
    ("help", ["--help"], DONE, ["check", "run", "alloy"]),
    ("help of alloy", ["alloy", "--help"], DONE, ["palier alloy", "--composition"]),
    ("help of check", ["check", "--help"], DONE, ["palier check"]),
    ("help of run", ["run", "--help"], DONE, ["palier run", "--json"]),
    ("version", ["--version"], DONE, ["palier", "0."]),
    ("an accepted case", ["check", "{case}"], DONE, []),
    ("no command", [], REFUSED, ["check", "run"]),
    ("a misspelt command", ["chekc", "{case}"], REFUSED, ["chekc"]),
    ("check without a case", ["check"], REFUSED, ["check"]),
    ("check of two cases", ["check", "{case}", "{case}"], REFUSED, []),
    ("an unknown option", ["check", "{case}", "--colour"], REFUSED, ["--colour"]),
    ("an option without its value", ["run", "{case}", "-o"], REFUSED, ["-o"]),
    ("run without a case", ["run", "-o", "{scratch}/a.h5"], REFUSED, []),
    ("a case that is not there", ["check", "{scratch}/none.yaml"], REFUSED, ["none.yaml"]),
    ("a folder for a case", ["check", "{scratch}"], REFUSED, ["{scratch}"]),
    ("an empty case", ["check", "{empty}"], REFUSED, ["empty.yaml"]),
    ("a misspelt key", ["check", "{misspelt}"], REFUSED, ["{misspelt}:{line}:1", "sectoin", "section"]),
    ("a run of a misspelt key", ["run", "{misspelt}", "-o", "{scratch}/a.h5"], REFUSED, ["{misspelt}:{line}:1"]),
    ("a folder that is not there", ["run", "{case}", "-o", "{scratch}/none/a.h5"], FILE_TROUBLE, ["none/a.h5"]),
    ("a folder for a result", ["run", "{case}", "-o", "{scratch}"], FILE_TROUBLE, ["{scratch}"]),
]


def complaints(program, arguments, status, texts):
    """What is wrong with the answer to one command line."""
    answer = subprocess.run([program, *arguments], stdin=subprocess.DEVNULL, capture_output=True, text=True, timeout=60)
    wrong = []
    if answer.returncode != status:
        wrong.append(f"exit status {answer.returncode} instead of {status}")
    spoken, silent = (answer.stdout, answer.stderr) if status == DONE else (answer.stderr, answer.stdout)
    if not spoken.strip():
        wrong.append("no answer")
    if silent.strip():
        wrong.append(f"{'error' if status == DONE else 'standard'} output is not empty")
    wrong += [f"'{text}' is not in the answer" for text in texts if text not in spoken]
    if wrong:
        wrong.append(f"output: {answer.stdout!r}, errors: {answer.stderr!r}")
    return wrong


def filled(parts, places):
    return [part.format(**places) for part in parts]


def main(program, case):
    failures = 0
    with tempfile.TemporaryDirectory() as inputs, tempfile.TemporaryDirectory() as scratch:
        empty, misspelt = Path(inputs, "empty.yaml"), Path(inputs, "misspelt.yaml")
        empty.write_text("")
        rows = Path(case).read_text(encoding="utf-8").splitlines()
        line = 1 + rows.index("section:")
        rows[line - 1] = "sectoin:"
        misspelt.write_text("\n".join(rows) + "\n", encoding="utf-8")
        places = {"case": case, "empty": empty, "misspelt": misspelt, "scratch": scratch, "line": line}
        for name, arguments, status, texts in COMMAND_LINES:
            wrong = complaints(program, filled(arguments, places), status, filled(texts, places))
            if left := sorted(p.name for p in Path(scratch).iterdir()):
                wrong.append(f"left behind: {', '.join(left)}")
            failures += bool(wrong)
            for complaint in wrong:
                print(f"{name}: {complaint}")
    print(f"{len(COMMAND_LINES)} command lines, {failures} failures")
    return 1 if failures else 0


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit(__doc__)
    sys.exit(main(*sys.argv[1:]))
