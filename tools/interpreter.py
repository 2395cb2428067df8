"""Finds a Python that has the modules a tool needs, or says in one breath what to install."""

import importlib.util
import os
import subprocess
import sys

SYSTEM_PYTHON = "/usr/bin/python3"


def ensure(*modules):
    """Returns if this Python has all `modules`; else starts the script again under the system's Python if that one
    has them; else prints what is missing and exits with status 4. Debian's packages serve the system's Python only,
    and another python3 may come first on PATH."""
    missing = [name for name in modules if importlib.util.find_spec(name) is None]
    if not missing:
        return
    elsewhere = os.path.realpath(sys.executable) != os.path.realpath(SYSTEM_PYTHON)
    if elsewhere and _has(SYSTEM_PYTHON, modules):
        os.execv(SYSTEM_PYTHON, [SYSTEM_PYTHON, *sys.argv])
    packages = " ".join("python3-" + name.lower() for name in modules)
    sys.stderr.write(f"{os.path.basename(sys.argv[0])}: {sys.executable} has no module {', '.join(missing)}; "
                     f"install with: apt-get install {packages}\n")
    sys.exit(4)


def _has(python, modules):
    try:
        found = subprocess.run([python, "-c", "import " + ", ".join(modules)], stderr=subprocess.DEVNULL, check=False)
    except OSError:
        return False
    return found.returncode == 0
