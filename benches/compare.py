#!/usr/bin/env python3
"""Times hubgrip scatter beside a numpy script of the same model, and prints a table for the README.

    python3 benches/compare.py                      prints the table
    python3 benches/compare.py --readme README.md   puts it between the marks in that file

The numpy script is written the way one would write it for the job: whole arrays, PCG64, all processes that
there are cores. numpy is fetched from PyPI into a temporary environment when it is not there. Both sides draw the
same four random quantities (two normal sizes, one normal and one uniform friction) and give six quantities with
seven percentiles, mean and standard deviation, and the probabilities of slip and of yield.
"""

import argparse
import json
import math
import os
import platform
import resource
import subprocess
import sys
import tempfile
import time
from pathlib import Path

ROOT = Path(__file__).resolve().parent.parent
JOINT = ROOT / "examples" / "population" / "speed.yaml"
LEVELS = [0.135, 1, 5, 50, 95, 99, 99.865]
BEGIN, END = "<!-- speed of scatter: made by benches/compare.py -->", "<!-- end of speed of scatter -->"


def population(arguments):
    """One process: n random pairs of the joint in examples/population/speed.yaml."""
    import numpy as np

    n, seed, e_hub, e_shaft, strength = arguments
    begin = time.process_time()
    rng = np.random.Generator(np.random.PCG64(seed))
    hole = rng.normal(12e-6, 4e-6, n)
    shaft = rng.normal(50e-6, 3e-6, n)
    friction = rng.normal(0.12, 0.008, n)
    pressing = rng.uniform(0.08, 0.14, n)

    d, outer, length, nu, phi = 0.050, 0.100, 0.040, 0.3, math.radians(5)
    loss = 0.8 * (2.5e-6 + 3.75e-6)
    q = d / outer
    hoop = (1 + q * q) / (1 - q * q)
    compliance = d * ((hoop + nu) / e_hub + (1 - nu) / e_shaft)

    interference = shaft - hole
    grip = np.where(interference > 0, np.maximum(interference - loss, 0), interference)
    pressure = np.maximum(grip, 0) / compliance
    hub_stress = pressure * math.sqrt(3 + q**4) / (1 - q * q)
    torque = friction * pressure * math.pi * d * d * length / 2
    wedge = (pressing + math.tan(phi)) / (1 - pressing * math.tan(phi))
    chamfer = np.maximum(grip, 0) * (wedge - pressing) ** 2 / (4 * wedge * math.tan(phi))
    force = math.pi * d * pressure * (pressing * length + chamfer)

    slip = np.count_nonzero(torque < 700) / n
    yields = np.count_nonzero(hub_stress > strength) / n
    rows = [
        (float(x.mean()), float(x.std()), np.percentile(x, LEVELS).tolist())
        for x in (interference, grip, pressure, hub_stress, torque, force)
    ]
    return slip, yields, rows, time.process_time() - begin


def numpy_side(samples, processes, moduli):
    """Samples per second of the numpy script, and what it found."""
    from concurrent.futures import ProcessPoolExecutor

    each = 1_000_000
    work = [(each, seed, *moduli) for seed in range(max(samples // each, processes))]
    with ProcessPoolExecutor(processes) as pool:
        list(pool.map(population, [(1000, 0, *moduli)] * processes))
        start = time.perf_counter()
        found = list(pool.map(population, work))
        elapsed = time.perf_counter() - start
    slip = sum(one[0] for one in found) / len(found)
    yields = sum(one[1] for one in found) / len(found)
    torque = sum(one[2][4][0] for one in found) / len(found)
    seconds = sum(one[3] for one in found)
    return len(work) * each / elapsed, slip, yields, torque, len(work) * each / seconds


def hubgrip_side(binary, samples, threads):
    """Samples per second of the whole process, and what it found."""
    environment = dict(os.environ, RAYON_NUM_THREADS=str(threads))
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    start = time.perf_counter()
    run = subprocess.run(
        [binary, "scatter", str(JOINT), "--samples", str(samples), "--json"],
        check=True, capture_output=True, env=environment,
    )
    elapsed = time.perf_counter() - start
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    seconds = after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime
    found = json.loads(run.stdout)
    hub = next(event for event in found["yield"] if "hub" in event["what"])
    torque = next(q for q in found["quantities"] if q["quantity"] == "torque capacity")
    slip = found["slip"][0]
    return (
        samples / elapsed, slip["counted"]["count"] / samples, hub["counted"]["count"] / samples, torque["counted_mean"],
        samples / seconds, slip["probability"],
    )


def material_of_the_joint(binary):
    """Young's modulus and strength from the library, so that both sides have the same model."""
    sheet = subprocess.run([binary, "check", str(JOINT), "--json"], capture_output=True, text=True).stdout
    tightest = json.loads(sheet)["extremes"]["tightest"]
    ring = json.loads(sheet)["extremes"]["tightest"]["rings"][1]
    compliance = tightest["effective_interference_um"] * 1e-6 / (tightest["pressure_mpa"] * 1e6)
    modulus = 0.050 * (1.25 / 0.75 + 0.3 + 0.7) / compliance
    return modulus, modulus, ring["yield_safety"] * tightest["hub_bore_von_mises_mpa"] * 1e6


def with_numpy():
    """Runs this script again where numpy is, fetching it when need be."""
    try:
        import numpy  # noqa: F401

        return
    except ImportError:
        pass
    folder = Path(tempfile.gettempdir()) / "hubgrip-compare"
    python = folder / "bin" / "python"
    if not python.exists():
        subprocess.run([sys.executable, "-m", "venv", str(folder)], check=True)
        subprocess.run([str(python), "-m", "pip", "install", "--quiet", "numpy"], check=True)
    sys.exit(subprocess.call([str(python), *sys.argv]))


def machine():
    """Processor and cores."""
    name = platform.processor() or platform.machine()
    try:
        for line in Path("/proc/cpuinfo").read_text().splitlines():
            if line.startswith("model name"):
                name = line.split(":", 1)[1].strip()
                break
    except OSError:
        pass
    return f"{name}, {os.cpu_count()} cores"


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("--samples", type=int, default=10_000_000, help="random pairs of the numpy script")
    parser.add_argument("--runs", type=int, default=3, help="runs of each; the fastest counts")
    parser.add_argument("--binary", help="a hubgrip that is built already")
    parser.add_argument("--readme", help="file to put the table into")
    options = parser.parse_args()
    with_numpy()
    import numpy

    binary = options.binary
    if not binary:
        subprocess.run(["cargo", "build", "--release", "--quiet"], cwd=ROOT, check=True)
        target = Path(os.environ.get("CARGO_TARGET_DIR", ROOT / "target"))
        binary = str(target / "release" / "hubgrip")
    cores = os.cpu_count() or 1
    moduli = material_of_the_joint(binary)
    rows = []
    for threads in sorted({1, cores}):
        ours = max((hubgrip_side(binary, 10 * options.samples, threads) for _ in range(options.runs)), key=lambda r: r[0])
        theirs = max((numpy_side(options.samples, threads, moduli) for _ in range(options.runs)), key=lambda r: r[0])
        tolerance = 5 * math.sqrt(ours[5] / options.samples)
        if abs(ours[1] - theirs[1]) > tolerance or abs(ours[3] / theirs[3] - 1) > 1e-3:
            sys.exit(f"the two do not compute the same: {ours} against {theirs}")
        rows.append((threads, ours[0], theirs[0], ours[4], theirs[4]))
    lines = [
        "| cores | hubgrip scatter, million pairs/s | numpy script | ratio | ns of a core for a pair | numpy script | ratio |",
        "|--:|--:|--:|--:|--:|--:|--:|",
        *(
            f"| {n} | {a / 1e6:.1f} | {b / 1e6:.2f} | {a / b:.1f} | {1e9 / c:.1f} | {1e9 / d:.0f} | {c / d:.1f} |"
            for n, a, b, c, d in rows
        ),
        "",
        f"Measured by `python3 benches/compare.py` on {machine()}, numpy {numpy.__version__}, "
        f"Python {platform.python_version()}; the fastest of {options.runs} runs, start of the process included.",
    ]
    text = "\n".join(lines)
    print(text)
    if options.readme:
        path = Path(options.readme)
        whole = path.read_text()
        before, rest = whole.split(BEGIN, 1)
        after = rest.split(END, 1)[1]
        path.write_text(f"{before}{BEGIN}\n{text}\n{END}{after}")


if __name__ == "__main__":
    main()
