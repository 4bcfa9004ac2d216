#!/usr/bin/env python3
"""Times hubgrip beside scripts of the same model (benches/practice.py), and prints two tables for the README.

    python3 benches/compare.py                      prints the tables
    python3 benches/compare.py --readme README.md   puts them between the marks in that file

The scripts are written the way one would write them for the job: whole arrays, PCG64, all processes that there are
cores. numpy, scipy and matplotlib are fetched from PyPI into a temporary environment when they are not there. Both
sides work the same joint, examples/population/speed.yaml, and must find the same numbers, or nothing is printed.
"""

import argparse
import csv
import json
import math
import os
import platform
import random
import resource
import subprocess
import sys
import tempfile
import time
from concurrent.futures import ProcessPoolExecutor
from pathlib import Path

ROOT = Path(__file__).resolve().parent.parent
JOINT = ROOT / "examples" / "population" / "speed.yaml"
PRACTICE = ROOT / "benches" / "practice.py"
MARKS = {
    "scatter": ("<!-- speed of scatter: made by benches/compare.py -->", "<!-- end of speed of scatter -->"),
    "processes": ("<!-- speed of processes: made by benches/compare.py -->", "<!-- end of speed of processes -->"),
}
COLUMNS = [
    "loosest.pressure_mpa", "loosest.torque_capacity_nm", "tightest.pressure_mpa", "tightest.hub_bore_von_mises_mpa",
    "tightest.press_force_n", "slip_safety", "hub_safety",
]


def numpy_side(samples, processes, numbers):
    """Random pairs per second of the script, and what it found."""
    from practice import population

    each = 1_000_000
    model = (numbers["modulus"], numbers["strength"])
    work = [(each, seed, *model) for seed in range(max(samples // each, processes))]
    with ProcessPoolExecutor(processes) as pool:
        list(pool.map(population, [(1000, 0, *model)] * processes))
        start = time.perf_counter()
        found = list(pool.map(population, work))
        elapsed = time.perf_counter() - start
    slip = sum(one[0] for one in found) / len(found)
    torque = sum(one[2][4][0] for one in found) / len(found)
    seconds = sum(one[3] for one in found)
    return {"rate": len(work) * each / elapsed, "per_core": len(work) * each / seconds, "slip": slip, "torque": torque}


def hubgrip_side(binary, samples, threads):
    """Random pairs per second of the whole process, and what it found."""
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
    torque = next(q for q in found["quantities"] if q["quantity"] == "torque capacity")
    slip = found["slip"][0]
    return {
        "rate": samples / elapsed, "per_core": samples / seconds, "slip": slip["counted"]["count"] / samples,
        "torque": torque["counted_mean"], "probability": slip["probability"],
    }


def scatter_table(binary, numbers, options):
    """Random pairs on one core and on all."""
    lines = [
        "| cores | hubgrip scatter, million pairs/s | numpy script | ratio | ns of a core for a pair | numpy script | ratio |",
        "|--:|--:|--:|--:|--:|--:|--:|",
    ]
    for threads in sorted({1, os.cpu_count() or 1}):
        runs = range(options.runs)
        ours = max((hubgrip_side(binary, 10 * options.samples, threads) for _ in runs), key=lambda run: run["rate"])
        theirs = max((numpy_side(options.samples, threads, numbers) for _ in runs), key=lambda run: run["rate"])
        agree("slip", ours["slip"], theirs["slip"], 5 * math.sqrt(ours["probability"] / options.samples))
        agree("torque", ours["torque"], theirs["torque"], 1e-3 * theirs["torque"])
        a, b, c, d = ours["rate"], theirs["rate"], ours["per_core"], theirs["per_core"]
        lines.append(
            f"| {threads} | {a / 1e6:.1f} | {b / 1e6:.2f} | {a / b:.1f} | {1e9 / c:.1f} | {1e9 / d:.0f} | {c / d:.1f} |"
        )
    return lines


def agree(what, ours, theirs, tolerance):
    """Stops when both sides do not compute the same."""
    if not abs(ours - theirs) <= tolerance:
        sys.exit(f"{what}: the two do not compute the same: {ours} against {theirs}")


def numbers_of_the_joint(binary):
    """What the scripts need: the file's own numbers, and those that hubgrip takes from its library."""
    found = json.loads(subprocess.run([binary, "check", str(JOINT), "--json"], capture_output=True, text=True).stdout)
    tightest = found["extremes"]["tightest"]
    compliance = tightest["effective_interference_um"] * 1e-6 / (tightest["pressure_mpa"] * 1e6)
    return {
        "diameter": 0.050, "outer": 0.100, "length": 0.040, "EI": 0.0, "ES": 24e-6, "ei": 42e-6, "es": 58e-6,
        "loss": 0.8 * (2.5e-6 + 3.75e-6), "friction": 0.12, "pressing": 0.14, "torque": 700.0,
        "modulus": 0.050 * (1.25 / 0.75 + 1) / compliance,
        "strength": tightest["rings"][1]["yield_safety"] * tightest["hub_bore_von_mises_mpa"] * 1e6,
        # Mean coefficients of ferritic steel from 20 °C: `hubgrip materials C45+N`.
        "temperatures": [293.15, 373.15, 473.15, 573.15],
        "strains": [0.0, 80 * 12.1e-6, 180 * 12.8e-6, 280 * 13.3e-6],
        "it6": 16e-6, "it7": 25e-6,
    }, found


def timed(command, runs, environment=None):
    """The shortest of several runs of a process, s, with its output; exit code 1 means a requirement that is not met."""
    best = math.inf
    for _ in range(runs):
        start = time.perf_counter()
        run = subprocess.run(command, capture_output=True, text=True, env=environment)
        best = min(best, time.perf_counter() - start)
        if run.returncode > 1:
            sys.exit(f"{command}: {run.stderr}")
    return best, run.stdout


def classes(binary, path):
    """Every class of hole and shaft that is defined at 50 mm, as a table for the script."""
    letters = "a b c cd d e ef f fg g h js j k m n p r s t u v x y z za zb zc".split()
    grades = ["01", *map(str, range(19))]
    rows = ["member,name,lower,upper"]
    for member in ("hole", "shaft"):
        for name in (letter + grade for letter in letters for grade in grades):
            name = name.upper() if member == "hole" else name
            run = subprocess.run([binary, "limits", "50mm", name, "--json"], capture_output=True, text=True)
            if run.returncode == 0:
                limits = json.loads(run.stdout)[member]
                rows.append(f"{member},{name},{limits['lower_um'] * 1e-6:.9g},{limits['upper_um'] * 1e-6:.9g}")
    Path(path).write_text("\n".join(rows) + "\n", encoding="utf-8")


def joints(path, rows, numbers):
    """Invented joints, one a row: as hubgrip reads them, and the same numbers plain for the script."""
    dice = random.Random(1)
    ours = ["diameter (mm),length (mm),hub.outer_diameter (mm),fit.hole.lower (um),fit.hole.upper (um),"
            "fit.shaft.lower (um),fit.shaft.upper (um),duty.rated.torque (N.m)"]
    theirs = ["d,length,outer,ES,ei,es,torque"]
    for _ in range(rows):
        d = dice.randrange(20, 120)
        length, outer = round(d * dice.uniform(0.5, 1.5), 2), round(d * dice.uniform(1.4, 2.5), 2)
        hole, low, tolerance = dice.randrange(10, 40), dice.randrange(45, 90), dice.randrange(10, 30)
        torque = round(d * d * dice.uniform(0.02, 0.3), 3)
        ours.append(f"{d},{length},{outer},0,{hole},{low},{low + tolerance},{torque}")
        theirs.append(f"{d},{length},{outer},{hole},{low},{low + tolerance},{torque}")
    Path(path).write_text("\n".join(ours) + "\n", encoding="utf-8")
    Path(f"{path}.plain").write_text("\n".join(theirs) + "\n", encoding="utf-8")
    Path(f"{path}.plain.json").write_text(json.dumps(numbers), encoding="utf-8")


def process_table(binary, numbers, found, options):
    """check, report, choose and batch as processes."""
    with tempfile.TemporaryDirectory(prefix="hubgrip-compare-") as name:
        return timed_processes(binary, numbers, found, options, Path(name))


def timed_processes(binary, numbers, found, options, folder):
    """The rows of the table; files go into the folder."""
    given, page, table, out = (str(folder / name) for name in ("joint.json", "joint.html", "joints.csv", "out.csv"))
    Path(given).write_text(json.dumps(numbers), encoding="utf-8")
    script = [sys.executable, str(PRACTICE)]
    joint, runs = str(JOINT), 3 * options.runs
    lines = ["| process | hubgrip | the script | ratio | aim |", "|---|--:|--:|--:|---|"]

    def row(name, ours, theirs, aim):
        ratio = f"{theirs / ours:.0f}" if theirs >= 10 * ours else f"{theirs / ours:.1f}"
        lines.append(f"| {name} | {show(ours)} | {show(theirs)} | {ratio} | {aim} |")

    ours, _ = timed([binary, "check", joint, "--json"], runs)
    theirs, text = timed([*script, "check", given], runs)
    worked = json.loads(text)
    for which, pair in enumerate(("loosest", "tightest")):
        agree("pressure", found["extremes"][pair]["pressure_mpa"] * 1e6, worked["pressure"][which], 1.0)
        agree("torque", found["extremes"][pair]["torque_capacity_nm"], worked["torque"][which], 1e-3)
    row("`check`", ours, theirs, "under 10 ms")
    ours, _ = timed([binary, "report", joint, "-o", page], runs)
    theirs, _ = timed([*script, "report", given, page], runs)
    row("`report`, 4 plots by the script", ours, theirs, "under 60 ms")
    classes(binary, folder / "classes.csv")
    ours, listed = timed([binary, "choose", joint, "--all", "--json"], runs)
    theirs, text = timed([*script, "choose", given, str(folder / "classes.csv")], runs)
    listed, worked = json.loads(listed), json.loads(text)
    agree("fits gone through", listed["considered"], worked["considered"], 0)
    agree("fits found", len(listed["fits"]), worked["fits"], 0)
    row(f"`choose`, {listed['considered']} fits", ours, theirs, "under 0.1 s")
    rows = options.rows
    joints(table, rows, numbers)
    base = folder / "base.yaml"
    base.write_text(
        "joint_file: 1\nshaft: {material: C45+N, roughness: Rz 2.5 um}\nhub: {material: C45+N, roughness: Rz 3.75 um}\n"
        "friction: {holding: 0.12, pressing: 0.14}\nsmoothing: {factor: 0.8, at: both}\nduty:\n  - {state: rated}\n",
        encoding="utf-8",
    )
    command = [binary, "batch", table, "--base", str(base), "--columns", ",".join(COLUMNS), "-q", "-o", out]
    for threads in sorted({1, os.cpu_count() or 1}):
        environment = dict(os.environ, RAYON_NUM_THREADS=str(threads))
        ours, _ = timed(command, options.runs, environment)
        with open(out, newline="", encoding="utf-8") as table_of_findings:
            first = next(csv.DictReader(table_of_findings))
        theirs, _ = timed([*script, "batch", f"{table}.plain", f"{out}.plain"], 1)
        with open(f"{out}.plain", encoding="utf-8") as plain:
            others = plain.readline().split(",")
        # The last column is left out: the strength depends on the section, which the script does not know.
        for column, other in zip(COLUMNS[:-1], others):
            agree(column, float(first[column]), float(other), 1e-6 * abs(float(other)))
        row(f"`batch`, {rows} joints, {threads} core{'s' if threads > 1 else ''}", ours, theirs,
            f"{rows / ours / threads:.0f} joints a second of a core; aim 100000")
    return lines


def show(seconds):
    """A time in ms or s."""
    return f"{seconds:.2f} s" if seconds >= 1 else f"{1e3 * seconds:.1f} ms"


def with_packages():
    """Runs this script again where the packages are, fetching them when need be."""
    try:
        import matplotlib  # noqa: F401
        import numpy  # noqa: F401
        import scipy  # noqa: F401

        return
    except ImportError:
        pass
    folder = Path(tempfile.gettempdir()) / "hubgrip-compare"
    python = folder / "bin" / "python"
    if not python.exists():
        subprocess.run([sys.executable, "-m", "venv", str(folder)], check=True)
    subprocess.run([str(python), "-m", "pip", "install", "--quiet", "numpy", "scipy", "matplotlib"], check=True)
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
    parser.add_argument("--rows", type=int, default=1_000_000, help="joints of the table for batch")
    parser.add_argument("--runs", type=int, default=3, help="runs of each; the fastest counts")
    parser.add_argument("--binary", help="a hubgrip that is built already")
    parser.add_argument("--readme", help="file to put the tables into")
    options = parser.parse_args()
    with_packages()
    import matplotlib
    import numpy
    import scipy

    binary = options.binary
    if not binary:
        subprocess.run(["cargo", "build", "--release", "--quiet"], cwd=ROOT, check=True)
        target = Path(os.environ.get("CARGO_TARGET_DIR", ROOT / "target"))
        binary = str(target / "release" / "hubgrip")
    numbers, found = numbers_of_the_joint(binary)
    measured = f"Measured by `python3 benches/compare.py` on {machine()}, Python {platform.python_version()}, numpy {numpy.__version__}"
    tables = {
        "scatter": [
            *scatter_table(binary, numbers, options), "",
            f"{measured}; the fastest of {options.runs} runs, start of the process included.",
        ],
        "processes": [
            *process_table(binary, numbers, found, options), "",
            f"{measured}, scipy {scipy.__version__}, matplotlib {matplotlib.__version__}; whole processes from start to end, "
            "the fastest of several runs. The script runs on one core.",
        ],
    }
    for lines in tables.values():
        print("\n".join(lines), end="\n\n")
    if options.readme:
        path = Path(options.readme)
        whole = path.read_text(encoding="utf-8")
        for name, lines in tables.items():
            begin, end = MARKS[name]
            before, rest = whole.split(begin, 1)
            after = rest.split(end, 1)[1]
            text = "\n".join(lines)
            whole = f"{before}{begin}\n{text}\n{end}{after}"
        path.write_text(whole, encoding="utf-8")


if __name__ == "__main__":
    main()
