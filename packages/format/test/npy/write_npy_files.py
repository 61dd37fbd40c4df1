"""Writes .npy files of every kind that readNpy takes or refuses into a folder; prints what is in them as JSON."""

import json
import sys
from pathlib import Path

import numpy as np

FOLDER = Path(sys.argv[1])
NUMBERS = ["?", "i1", "i2", "i4", "i8", "u1", "u2", "u4", "u8", "f2", "f4", "f8", "c8", "c16"]


def main():
    random = np.random.default_rng(7)
    good, bad = [], []
    for code in NUMBERS:
        for order in "<>":
            for layout in "CF":
                for version in [(1, 0), (2, 0), (3, 0)]:
                    values = sample(random, code).astype(np.dtype(code).newbyteorder(order))
                    name = f"{code.replace('?', 'bool')}-{'little' if order == '<' else 'big'}-{layout}-v{version[0]}.npy"
                    good.append(entry(name, np.asarray(values, order=layout), version))
    good.append(entry("row.npy", np.arange(5.0).reshape(1, 5)))
    good.append(entry("column.npy", np.arange(5.0).reshape(5, 1)))
    good.append(entry("transposed.npy", (np.arange(6) + 1j).reshape(2, 3).T))
    good.append(entry("strided.npy", np.arange(24.0).reshape(4, 6)[::2, 1::2]))
    good.append(entry("subnormal-half.npy", np.array([[2.0**-24, -(2.0**-14), 65504, 1 / 3]], dtype="f2")))
    good.append(entry("extreme.npy", np.array([[5e-324, -1.7976931348623157e308, -0.0]])))
    bad.append(refused("object.npy", np.array([[{"a": 1}]], dtype=object), allow_pickle=True))
    bad.append(refused("text.npy", np.array([["ab"]])))
    bad.append(refused("date.npy", np.array([["2020-01-01"]], dtype="M8[D]")))
    bad.append(refused("structured.npy", np.zeros((2, 2), dtype=[("x", "f8"), ("y", "i4")])))
    bad.append(refused("long-double.npy", np.zeros((2, 2), dtype=np.longdouble)))
    bad.append(refused("vector.npy", np.arange(3.0)))
    bad.append(refused("scalar.npy", np.array(3.0)))
    bad.append(refused("cube.npy", np.zeros((2, 2, 2))))
    bad.append(refused("empty.npy", np.zeros((0, 3))))
    bad.append(refused("nan.npy", np.array([[1.0, np.nan]])))
    bad.append(refused("infinite.npy", np.array([[1.0, 0], [0, complex(0, np.inf)]])))
    bad.append(refused("large-integer.npy", np.array([[2**53 + 1]])))
    bad.append(refused("wide.npy", np.zeros((5000, 1))))
    np.savez(FOLDER / "archive.npy", a=np.zeros((2, 2)))
    (FOLDER / "archive.npy.npz").rename(FOLDER / "archive.npy")
    bad.append("archive.npy")
    with open(FOLDER / "two.npy", "wb") as file:
        np.save(file, np.zeros((2, 2)))
        np.save(file, np.zeros((2, 2)))
    bad.append("two.npy")
    print(json.dumps({"good": good, "bad": bad}))


def sample(random, code):
    kind = np.dtype(code).kind
    if kind == "b":
        return random.integers(0, 2, (3, 4)).astype(bool)
    if kind in "iu":
        info = np.iinfo(code)
        largest = 2**53
        values = random.integers(max(info.min, -largest), min(info.max, largest), (3, 4), endpoint=True, dtype="i8")
        return values.astype(code)
    values = random.normal(size=(3, 4))
    return values + 1j * random.normal(size=(3, 4)) if kind == "c" else values


def entry(name, array, version=None):
    with open(FOLDER / name, "wb") as file:
        np.lib.format.write_array(file, array, version=version)
    values = np.load(FOLDER / name).astype(complex)
    return {"name": name, "re": values.real.tolist(), "im": values.imag.tolist()}


def refused(name, array, **options):
    np.save(FOLDER / name, array, **options)
    return name


main()
