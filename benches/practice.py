"""The same jobs as hubgrip, the way one would script them for oneself: numpy, scipy, matplotlib.

Each job is run as a process of its own by compare.py:

    python practice.py check NUMBERS.json               both extremes, one state, oven temperature
    python practice.py report NUMBERS.json OUT.html     the same with four plots
    python practice.py choose NUMBERS.json CLASSES.csv  every hole class with every shaft class
    python practice.py batch TABLE.csv OUT.csv          many joints, one a row

The joint is two plain rings of one steel, so that a script stays short; its limits are read from a table, as one would.
"""

import json
import math
import sys

import numpy as np

LEVELS = [0.135, 1, 5, 50, 95, 99, 99.865]


def population(arguments):
    """One process: n random pairs of the joint in examples/population/speed.yaml."""
    import time

    n, seed, modulus, strength = arguments
    begin = time.process_time()
    rng = np.random.Generator(np.random.PCG64(seed))
    hole = rng.normal(12e-6, 4e-6, n)
    shaft = rng.normal(50e-6, 3e-6, n)
    friction = rng.normal(0.12, 0.008, n)
    pressing = rng.uniform(0.08, 0.14, n)
    found = joint(shaft - hole, 0.050, 0.100, 0.040, modulus, 0.8 * (2.5e-6 + 3.75e-6), friction, pressing)
    rows = [(float(x.mean()), float(x.std()), np.percentile(x, LEVELS).tolist()) for x in found]
    pressure_stress, torque = found[3], found[4]
    slip = np.count_nonzero(torque < 700) / n
    yields = np.count_nonzero(pressure_stress > strength) / n
    return slip, yields, rows, time.process_time() - begin


def joint(interference, d, outer, length, modulus, loss, friction, pressing, chamfer=math.radians(5)):
    """Interference, grip, pressure, hub stress, torque at slip, press force of solid shaft and hub of one steel."""
    q = d / outer
    compliance = d * ((1 + q * q) / (1 - q * q) + 1) / modulus
    grip = np.where(interference > 0, np.maximum(interference - loss, 0), interference)
    pressure = np.maximum(grip, 0) / compliance
    hub_stress = pressure * np.sqrt(3 + q**4) / (1 - q * q)
    torque = friction * pressure * math.pi * d * d * length / 2
    wedge = (pressing + math.tan(chamfer)) / (1 - pressing * math.tan(chamfer))
    lead = np.maximum(grip, 0) * (wedge - pressing) ** 2 / (4 * wedge * math.tan(chamfer))
    force = math.pi * d * pressure * (pressing * length + lead)
    return interference, grip, pressure, hub_stress, torque, force


def extremes(numbers):
    """Both extreme pairs of the joint in the file."""
    made = np.array([numbers["ei"] - numbers["ES"], numbers["es"] - numbers["EI"]])
    d, outer, length = numbers["diameter"], numbers["outer"], numbers["length"]
    return joint(made, d, outer, length, numbers["modulus"], numbers["loss"], numbers["friction"], numbers["pressing"])


def check(numbers):
    """Findings as one would print them."""
    from scipy.interpolate import PchipInterpolator
    from scipy.optimize import brentq

    made, grip, pressure, stress, torque, force = extremes(numbers)
    strain = PchipInterpolator(numbers["temperatures"], numbers["strains"])
    needed = made[1] / numbers["diameter"] + 1e-3
    return {
        "pressure": pressure.tolist(),
        "hub_stress": stress.tolist(),
        "torque": torque.tolist(),
        "slip_safety": torque[0] / numbers["torque"],
        "yield_safety": numbers["strength"] / stress[1],
        "press_force": force[1],
        "hub_temperature": brentq(lambda t: strain(t) - needed, 293.15, numbers["temperatures"][-1]),
    }


def report(numbers, path):
    """The findings with four plots in one page."""
    import io

    import matplotlib

    matplotlib.use("svg")
    import matplotlib.pyplot as plt

    found = check(numbers)
    d, outer, length = numbers["diameter"], numbers["outer"], numbers["length"]
    pages = []

    def picture(draw, x, y):
        figure, axes = plt.subplots(figsize=(7, 4))
        draw(axes)
        axes.set_xlabel(x)
        axes.set_ylabel(y)
        axes.grid(True)
        axes.legend()
        text = io.StringIO()
        figure.savefig(text, format="svg")
        plt.close(figure)
        pages.append(text.getvalue())

    def zones(axes):
        for name, low, high in [("hole", "EI", "ES"), ("shaft", "ei", "es")]:
            axes.bar([name], [1e6 * (numbers[high] - numbers[low])], bottom=1e6 * numbers[low], label=name)

    def stresses(axes):
        r = np.linspace(d / 2, outer / 2, 200)
        a, b = d / 2, outer / 2
        for name, p in zip(("loosest", "tightest"), found["pressure"]):
            k = p * a * a / (b * b - a * a)
            axes.plot(1e3 * r, 1e-6 * k * (1 + b * b / r**2), label=f"hoop, {name}")
            axes.plot(1e3 * r, 1e-6 * k * (1 - b * b / r**2), label=f"radial, {name}")

    def travel(axes):
        s = np.linspace(0, length, 200)
        for name, p in zip(("loosest", "tightest"), found["pressure"]):
            axes.plot(1e3 * s, 1e-3 * math.pi * d * p * numbers["pressing"] * s, label=name)

    def heat(axes):
        t = np.array(numbers["temperatures"])
        axes.plot(t - 273.15, 1e6 * d * np.array(numbers["strains"]), label="hub bore")
        axes.axhline(1e6 * (numbers["es"] - numbers["EI"]), label="tightest shaft")

    picture(zones, "member", "deviation, um")
    picture(stresses, "radius, mm", "stress, MPa")
    picture(travel, "travel, mm", "force, kN")
    picture(heat, "temperature, degC", "change of diameter, um")
    rows = "".join(f"<tr><td>{name}</td><td>{value}</td></tr>" for name, value in found.items())
    with open(path, "w", encoding="utf-8") as page:
        page.write(f"<!DOCTYPE html><title>Joint</title><table>{rows}</table>{''.join(pages)}")


def choose(numbers, classes):
    """How many pairs of classes meet the requirements, the cheapest named first."""
    table = np.genfromtxt(classes, delimiter=",", names=True, dtype=None, encoding="utf-8")
    holes, shafts = table[table["member"] == "hole"], table[table["member"] == "shaft"]
    loosest = shafts["lower"][None, :] - holes["upper"][:, None]
    tightest = shafts["upper"][None, :] - holes["lower"][:, None]
    d, outer, length = numbers["diameter"], numbers["outer"], numbers["length"]
    rest = (d, outer, length, numbers["modulus"], numbers["loss"], numbers["friction"], numbers["pressing"])
    torque, stress = joint(loosest, *rest)[4], joint(tightest, *rest)[3]
    good = (torque >= 1.5 * numbers["torque"]) & (1.2 * stress <= numbers["strength"])
    cost = 0.5 * numbers["it7"] / (holes["upper"] - holes["lower"])[:, None] + 0.5 * numbers["it6"] / (
        shafts["upper"] - shafts["lower"]
    )[None, :]
    row, column = np.nonzero(good)
    order = np.argsort(cost[row, column], kind="stable")
    best = [f"{holes['name'][row[i]]}/{shafts['name'][column[i]]}" for i in order[:20]]
    return {"considered": int(good.size), "fits": int(good.sum()), "best": best}


def batch(table, out):
    """A row of findings for each row of joints."""
    rows = np.loadtxt(table, delimiter=",", skiprows=1)
    d, length, outer, upper_hole, lower_shaft, upper_shaft, torque = rows.T * np.array([[1e-3] * 3 + [1e-6] * 3 + [1.0]]).T
    numbers = json.load(open(table + ".json", encoding="utf-8"))
    rest = (d, outer, length, numbers["modulus"], numbers["loss"], numbers["friction"], numbers["pressing"])
    loosest, tightest = joint(lower_shaft - upper_hole, *rest), joint(upper_shaft, *rest)
    found = np.column_stack([
        1e-6 * loosest[2], loosest[4], 1e-6 * tightest[2], 1e-6 * tightest[3], tightest[5], loosest[4] / torque,
        numbers["strength"] / tightest[3],
    ])
    np.savetxt(out, found, delimiter=",", fmt="%.9g")


if __name__ == "__main__":
    job, first = sys.argv[1], sys.argv[2]
    if job == "batch":
        batch(first, sys.argv[3])
    else:
        with open(first, encoding="utf-8") as file:
            given = json.load(file)
        if job == "check":
            print(json.dumps(check(given)))
        elif job == "report":
            report(given, sys.argv[3])
        else:
            print(json.dumps(choose(given, sys.argv[3])))
