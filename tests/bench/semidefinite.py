"""Rival to the semidefinite programming solver: CVXOPT on the same programmes, one thread.

    OPENBLAS_NUM_THREADS=1 /usr/bin/python3 semidefinite.py [tolerance=1e-8] < programmes.json

Reads a JSON list of programmes as tests/reference/semidefinite.py does and prints one {"status", "dual", "iterations",
"seconds"} each; `seconds` is the processor time of CVXOPT's solver, the conversion to its matrices left out."""

import json
import os
import sys

os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")
sys.path.insert(0, os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", "reference"))

from semidefinite import solve  # noqa: E402  (found beside the tests' reference)


def main(tolerance=1e-8):
    answers = [solve(programme, (float(tolerance),)) for programme in json.load(sys.stdin)]
    kept = ("status", "dual", "iterations", "seconds")
    json.dump([{key: answer.get(key) for key in kept} for answer in answers], sys.stdout)


if __name__ == "__main__":
    main(*sys.argv[1:])
