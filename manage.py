#!/usr/bin/env python3
"""Buildlog's commands: `start` and `test` on a bare machine, everything else inside the environment they make."""

import sys

from buildlog.setup.front import main

if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
