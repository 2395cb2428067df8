#!/usr/bin/env python3
"""Checks the layers of the sources: who may include what, and how long a file may be.

    check_layers.py ROOT        checks ROOT/include/palier and ROOT/src; status 1 and one line per breach
    check_layers.py --self-test plants each kind of breach in a scratch tree and demands that it is found
"""

import re
import sys
import tempfile
from pathlib import Path

# From the bottom up. A layer may include itself and what stands before it, and of other people's headers only its own.
LAYERS = {
    "base": ("Eigen/",),
    "alloy": ("Eigen/", "boost/math/"),
    "heat": ("Eigen/",),
    "freeze": (),
    # Eigen/Core only for its version, which a result file records
    "files": ("yaml-cpp/", "udunits2.h", "hdf5.h", "hdf5_hl.h", "fmt/", "Eigen/Core"),
    "app": ("CLI/", "nlohmann/", "fmt/"),
}
ORDER = list(LAYERS)
WITHOUT_IO = ORDER[: ORDER.index("files")]  # these take and give plain values
IO_HEADERS = {"iostream", "ostream", "istream", "fstream", "cstdio", "stdio.h", "filesystem", "print", "syncstream"}
OPERATING_SYSTEM = ("unistd.h", "fcntl.h", "sys/")  # for layers that do I/O
# Words that speak, listen or look at the environment, whatever header brought them in.
IO_WORDS = re.compile(r"\b(getenv|f?printf|f?puts|putchar|scanf|fopen|std::(cout|cerr|clog|cin))\b")
LONGEST_FILE = 400  # lines
INCLUDE = re.compile(r'^\s*#\s*include\s*([<"])([^>"]+)[>"]')


def layer_of(path, root):
    """The layer a file of the tree belongs to; None for one outside of all (then it may be included by nobody)."""
    for folder in (root / "include" / "palier", root / "src"):
        if path.is_relative_to(folder):
            parts = path.relative_to(folder).parts
            return parts[0] if len(parts) > 1 else "app"  # src/main.cpp
    return None


def breach_of_include(root, path, layer, quote, name):
    """What is wrong with one include of a file, or None."""
    if name.startswith("palier/"):
        target = name.split("/")[1]
    elif quote == '"':
        near = (path.parent / name).resolve()
        if near.exists():
            target = layer_of(near, root)
        elif "/" in name:
            target = name.split("/")[0]  # src/<layer>/...
        else:
            target = layer  # made by the build, for its own layer
    else:
        return breach_of_foreign_include(layer, name)
    if target not in ORDER:
        return f"includes {name}, which is in no layer"
    if ORDER.index(target) > ORDER.index(layer):
        return f"includes {name}: layer {layer} stands below layer {target}"
    return None


def breach_of_foreign_include(layer, name):
    if layer in WITHOUT_IO and name in IO_HEADERS:
        return f"includes <{name}>: layer {layer} does no I/O"
    is_standard = re.fullmatch(r"[a-z_0-9]+", name) or name == "stdio.h"
    if is_standard or name.startswith(LAYERS[layer]):
        return None
    if layer not in WITHOUT_IO and name.startswith(OPERATING_SYSTEM):
        return None
    allowed = ", ".join(LAYERS[layer]) or "none"
    return f"includes <{name}>: outside libraries of layer {layer}: {allowed}"


def breaches(root):
    """All breaches in a tree, as lines of text, and the number of files. Ends where the tree holds nothing to check."""
    root = root.resolve()
    found = []
    files = [p for folder in ("include/palier", "src") for p in sorted((root / folder).rglob("*.[hc]pp"))]
    if not files:
        raise SystemExit(f"check_layers: no sources under {root}")
    for path in files:
        where = path.relative_to(root)
        layer = layer_of(path, root)
        if layer not in ORDER:
            found.append(f"{where}: layer {layer} is unknown; known: {', '.join(ORDER)}")
            continue
        lines = path.read_text(encoding="utf-8").splitlines()
        if len(lines) > LONGEST_FILE:
            found.append(f"{where}: {len(lines)} lines; at most {LONGEST_FILE}")
        for number, line in enumerate(lines, start=1):
            if match := INCLUDE.match(line):
                if wrong := breach_of_include(root, path, layer, *match.groups()):
                    found.append(f"{where}:{number}: {wrong}")
            elif layer in WITHOUT_IO and (word := IO_WORDS.search(line.split("//")[0])):
                found.append(f"{where}:{number}: says {word[0]}: layer {layer} does no I/O")
    return found, len(files)


SOUND_TREE = {
    "include/palier/base/table.hpp": "#include <vector>\n#include <Eigen/Core>\n",
    "src/base/table.cpp": '#include "palier/base/table.hpp"\n',
    "src/heat/step.hpp": '#include "palier/base/table.hpp"\n',
    "src/heat/step.cpp": '#include "step.hpp"\n#include <cmath>\n',
    "src/files/tree.cpp": "#include <fstream>\n#include <yaml-cpp/yaml.h>\n#include <unistd.h>\n",
    "src/app/version.cpp": '#include "made_by_the_build.hpp"\n',
    "src/main.cpp": '#include "app/version.hpp"\n#include <iostream>\n',
}
PLANTED = [  # file, its text, what the breach must say
    ("src/base/high.cpp", '#include "palier/heat/boundary.hpp"\n', "layer base stands below layer heat"),
    ("src/heat/high.cpp", '  #  include "../files/tree.cpp"\n', "layer heat stands below layer files"),
    ("src/files/high.cpp", '#include "app/version.hpp"\n', "layer files stands below layer app"),
    ("src/alloy/talk.cpp", "#include <iostream>\n", "layer alloy does no I/O"),
    ("src/heat/leak.cpp", 'void f() { printf("x"); }\n', "says printf: layer heat does no I/O"),
    ("src/freeze/look.cpp", 'bool f() { return getenv("X"); }\n', "says getenv: layer freeze does no I/O"),
    ("include/palier/freeze/disk.hpp", "\n#include <filesystem>\n", "disk.hpp:2: includes <filesystem>"),
    ("src/freeze/math.cpp", "#include <Eigen/Core>\n", "outside libraries of layer freeze: none"),
    ("src/heat/log.cpp", "#include <nlohmann/nlohmann.h>\n", "outside libraries of layer heat: Eigen/"),
    ("src/alloy/roots.cpp", "#include <boost/asio.hpp>\n", "outside libraries of layer alloy"),
    ("src/base/disk.cpp", "#include <unistd.h>\n", "outside libraries of layer base"),
    ("src/app/store.cpp", "#include <hdf5.h>\n", "outside libraries of layer app"),
    ("src/extra/new.cpp", "#include <vector>\n", "layer extra is unknown"),
    ("src/app/stray.cpp", '#include "../../tests/main.cpp"\n', "is in no layer"),
    ("src/app/long.cpp", "\n" * (LONGEST_FILE + 1), f"{LONGEST_FILE + 1} lines; at most {LONGEST_FILE}"),
]


def plant(root, files):
    for name, text in files.items():
        (root / name).parent.mkdir(parents=True, exist_ok=True)
        (root / name).write_text(text, encoding="utf-8")


def self_test():
    failures = 0
    for name, text, expected in [(None, None, None), *PLANTED]:
        with tempfile.TemporaryDirectory() as scratch:
            root = Path(scratch)
            plant(root, SOUND_TREE | ({name: text} if name else {}) | {"tests/main.cpp": ""})
            found, _ = breaches(root)
        right = not found if name is None else len(found) == 1 and name in found[0] and expected in found[0]
        if not right:
            failures += 1
            print(f"self-test: {name or 'sound tree'}: expected {expected!r} alone, found {found}")
    print(f"self-test: {len(PLANTED)} planted breaches, {failures} failures")
    return failures


def main(arguments):
    if arguments == ["--self-test"]:
        return 1 if self_test() else 0
    if len(arguments) != 1 or arguments[0].startswith("-"):
        print(__doc__, file=sys.stderr)
        return 2
    found, checked = breaches(Path(arguments[0]))
    for line in found:
        print(line)
    print(f"{checked} files checked, {len(found)} breaches")
    return 1 if found else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
