"""Times the whole program beside general-purpose tools on the same file, in turn, and checks large pictures.

Needs Debian's python3-numpy, python3-scipy, python3-tifffile and liblcms2-utils, and the jar built (mvn -q -DskipTests package).
Run from the top of the tree:  /usr/bin/python3 src/bench/compare.py WORK_FOLDER [mosaic]
The test image P3-resist-dome is tiled to 6000 x 4000 pixels, 16-bit RGB; with 'mosaic' also to 20000 x 20000 (BigTIFF, tiled, 2.4 GB).
"""

import os
import pathlib
import statistics
import subprocess
import sys
import time

import numpy as np
import tifffile
from scipy.spatial import cKDTree

SCENE = pathlib.Path("test-images/P3-resist-dome")
JAR = "target/iridepth.jar"
WORK = pathlib.Path(sys.argv[1])
ROUNDS = 5


def run(command):
    """Wall seconds, CPU seconds and peak memory in MB of a process."""
    begin = time.monotonic()
    child = subprocess.Popen(command, stdout=subprocess.DEVNULL)
    _, status, used = os.wait4(child.pid, 0)
    child.returncode = os.waitstatus_to_exitcode(status)
    if child.returncode != 0:
        sys.exit(f"failed with {child.returncode}: {' '.join(map(str, command))}")
    return time.monotonic() - begin, used.ru_utime + used.ru_stime, used.ru_maxrss / 1024


def java(*arguments, memory=None):
    return ["java"] + ([f"-Xmx{memory}"] if memory else []) + ["-jar", JAR, *map(str, arguments)]


def tiled(name, width, height):
    source = tifffile.imread(SCENE / f"{name}.tif")
    down, across = -(-height // source.shape[0]), -(-width // source.shape[1])
    return np.tile(source, (down, across, 1))[:height, :width]


def recipe(folder, width, height, **changes):
    """A folder with the scene tiled to a size, and its recipe."""
    folder.mkdir(parents=True, exist_ok=True)
    for name in ("photo", "flat"):
        tifffile.imwrite(folder / f"{name}.tif", tiled(name, width, height), photometric="rgb", rowsperstrip=64)
    (folder / "steps.tif").write_bytes((SCENE / "steps.tif").read_bytes())
    text = (SCENE / "recipe.toml").read_text()
    for old, new in changes.values():
        text = text.replace(old, new)
    (folder / "recipe.toml").write_text(text)
    return folder


def mapping(folder, calibration, out="result", memory=None):
    return java("map", "--recipe", folder / "recipe.toml", "--calibration", calibration, "--out", folder / out, "--replace",
                folder / "photo.tif", memory=memory)


def report(what, rounds):
    wall, cpu, memory = (statistics.median(r[i] for r in rounds) for i in range(3))
    print(f"{what:52s} wall {wall:7.2f} s   cpu {cpu:7.2f} s   peak {memory:6.0f} MB", flush=True)
    return wall


def beside_the_colour_engine(folder, calibration):
    ours, theirs = [], []
    for _ in range(ROUNDS):
        ours.append(run(mapping(folder, calibration, memory="1100m")))
        theirs.append(run(["tificc", "-i*sRGB", "-o*Lab4", "-w16", str(folder / "photo.tif"), str(folder / "lab.tif")]))
    ratio = report("map, 6000 x 4000", ours) / report("tificc, the same file", theirs)
    print(f"  ratio of wall times {ratio:.1f}")


def beside_nearest_neighbours(folder, ours):
    """Queries the same pixels, over the flat, in a tree of the curve that the map itself shows, sampled every 0.05 nm."""
    nm = tifffile.imread(folder / "result/thickness.tif")
    signal = tifffile.imread(folder / "photo.tif").astype(np.float32) / tifffile.imread(folder / "flat.tif")
    read = np.isfinite(nm)
    bins = np.round(nm[read] / 0.5).astype(int)
    count = np.bincount(bins)
    known = np.flatnonzero(count > 20)
    fine = np.arange(known[0] * 0.5, known[-1] * 0.5, 0.05)
    curve = np.stack([np.interp(fine, known * 0.5, (np.bincount(bins, signal[..., c][read]) / np.maximum(count, 1))[known])
                      for c in range(3)], axis=1)
    pixels = signal.reshape(-1, 3)
    begin = time.monotonic()
    cKDTree(curve).query(pixels, workers=-1)
    wall = time.monotonic() - begin
    print(f"cKDTree.query of {len(pixels)} pixels in {len(curve)} points, all processors: {wall:.2f} s; ratio to the whole map "
          f"{wall / ours:.2f}")


def growth(calibration):
    for size in ((1000, 1000), (2000, 2000), (6000, 4000)):
        folder = recipe(WORK / f"{size[0]}x{size[1]}", *size)
        rounds = [run(mapping(folder, calibration)) for _ in range(3)]
        report(f"map, {size[0]} x {size[1]}", rounds)
    for most in (1500, 3000):
        folder = recipe(WORK / f"to{most}", 2000, 2000, range=("[0, 1500]", f"[0, {most}]"))
        rounds = [run(mapping(folder, calibration)) for _ in range(3)]
        report(f"map, 2000 x 2000, range to {most} nm", rounds)


def mosaic(calibration, edge=20000):
    folder = recipe(WORK / "mosaic", 400, 300)
    for name in ("photo", "flat"):
        row = tiled(name, edge, 304)
        with tifffile.TiffWriter(folder / f"{name}.tif", bigtiff=True) as file:
            def tiles():
                for y in range(0, edge, 256):
                    for x in range(0, edge, 256):
                        block = row[np.arange(y, min(y + 256, edge)) % 300, x:x + 256]
                        yield np.pad(block, ((0, 256 - block.shape[0]), (0, 256 - block.shape[1]), (0, 0)))
            file.write(tiles(), shape=(edge, edge, 3), dtype="uint16", tile=(256, 256), photometric="rgb")
    report(f"map, {edge} x {edge} BigTIFF, -Xmx1500m", [run(mapping(folder, calibration, memory="1500m"))])


def main():
    WORK.mkdir(parents=True, exist_ok=True)
    calibration = WORK / "calibration"
    run(java("calibrate", "--recipe", SCENE / "recipe.toml", "--out", calibration, "--replace"))
    if "mosaic" in sys.argv[2:]:
        mosaic(calibration)
        return
    folder = recipe(WORK / "6000x4000", 6000, 4000)
    beside_the_colour_engine(folder, calibration)
    ours = report("map, 6000 x 4000, all memory", [run(mapping(folder, calibration)) for _ in range(3)])
    growth(calibration)
    beside_nearest_neighbours(folder, ours)


main()
