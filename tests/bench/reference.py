"""The same jobs with the reference library, and the ratios. Run by tests/bench/compare.

    reference.py SPEEDS    SPEEDS holds the lines that `cargo bench --bench speeds` printed

CoolProp 8.0.0 through its low-level interface, one state object per fluid, each job by the fastest way that interface has:
saturation by its expansions (`update_QT_pure_superanc` or `update` with quality and temperature, whichever is faster),
solved with the expansions switched off, pressure from density and temperature of unknown phase. A call from Python costs
something itself: a call of the same object that computes nothing is timed beside and taken off.
"""

import csv
import sys
import time

import CoolProp.CoolProp as coolprop
from CoolProp.CoolProp import AbstractState, DmassT_INPUTS, QT_INPUTS

FLUIDS = {"water": "Water", "ammonia": "Ammonia", "r-134a": "R134a", "acetone": "Acetone", "n-pentane": "n-Pentane"}
STATES = 256
ROUNDS = 7
# What the catalogue issue of this project set out to reach, times the reference library's speed.
GOALS = {
    "saturation looked up": 8, "saturation solved": 8, "p of liquid": 6, "p of vapour": 6, "p of two phases": 15,
}


def best(call, arguments):
    """Seconds of one call, the best of several rounds through all arguments."""
    least = float("inf")
    for _ in range(ROUNDS):
        start = time.perf_counter()
        for argument in arguments:
            call(*argument)
        least = min(least, (time.perf_counter() - start) / len(arguments))
    return least


def measure(name):
    coolprop.set_config_bool(coolprop.ENABLE_SUPERANCILLARIES, True)
    state = AbstractState("HEOS", name)
    critical, lowest = state.T_critical(), max(0.55 * state.T_critical(), state.Tmin())
    kelvin = [lowest + (0.98 * critical - lowest) * (i * 155 % STATES) / STATES for i in range(STATES)]
    saturated = []
    for t in kelvin:
        state.update(QT_INPUTS, 0.0, t)
        liquid = state.rhomass()
        state.update(QT_INPUTS, 1.0, t)
        saturated.append((t, liquid, state.rhomass()))
    empty = best(lambda t: state.T_critical(), [(t,) for t in kelvin])
    plain = best(lambda t: state.update(QT_INPUTS, 0.0, t), [(t,) for t in kelvin])
    direct = best(lambda t: state.update_QT_pure_superanc(0.0, t), [(t,) for t in kelvin])
    found = {"saturation looked up": min(plain, direct) - empty}

    def pressure(density, t):
        state.update(DmassT_INPUTS, density, t)

    for job, of in (
        ("p of liquid", lambda liquid, vapour: 1.005 * liquid),
        ("p of vapour", lambda liquid, vapour: 0.7 * vapour),
        ("p of two phases", lambda liquid, vapour: 0.4 * liquid + 0.6 * vapour),
    ):
        found[job] = best(pressure, [(of(liquid, vapour), t) for t, liquid, vapour in saturated]) - empty
    coolprop.set_config_bool(coolprop.ENABLE_SUPERANCILLARIES, False)
    solver = AbstractState("HEOS", name)
    found["saturation solved"] = best(lambda t: solver.update(QT_INPUTS, 0.0, t), [(t,) for t in kelvin[::4]]) - empty
    return found, empty


def ranking():
    """Four states a fluid, as a script would rank a catalogue: milliseconds for all of them."""
    coolprop.set_config_bool(coolprop.ENABLE_SUPERANCILLARIES, True)
    states = []
    for name in coolprop.get_global_param_string("FluidsList").split(","):
        state = AbstractState("HEOS", name)
        low, high = state.Tmin(), state.T_critical()
        states.append((state, [low + share * (high - low) for share in (0.3, 0.5, 0.7, 0.9)]))

    def all_of_them():
        for state, kelvin in states:
            for t in kelvin:
                state.update(QT_INPUTS, 0.0, t)
                state.p()

    return len(states), 1e3 * best(all_of_them, [()])


def main(path):
    ours = [row for row in csv.DictReader(open(path, encoding="utf-8")) if row["nanoseconds"]]
    theirs = {identity: measure(name) for identity, name in FLUIDS.items()}
    print(f"{'job':22}{'fluid':12}{'here, ns':>12}{'reference, ns':>15}{'ratio':>8}{'goal':>6}")
    for row in ours:
        job, fluid, here = row["job"], row["fluid"], float(row["nanoseconds"])
        if fluid in theirs and job in GOALS:
            there = 1e9 * theirs[fluid][0][job]
            print(f"{job:22}{fluid:12}{here:12.1f}{there:15.0f}{there / here:8.1f}{GOALS[job]:6}")
        else:
            print(f"{job:22}{fluid:24}{here / 1e6:10.4f} ms")
    count, milliseconds = ranking()
    print(f"{'ranking':22}reference library, four states for each of {count} fluids: {milliseconds:.1f} ms")
    empty = 1e9 * min(empty for _, empty in theirs.values())
    print(f"An empty call from Python, {empty:.0f} ns, is taken off each of the reference library's times.")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
