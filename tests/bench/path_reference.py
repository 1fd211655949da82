"""The path of the ready designs with the reference library, for a ratio in the same run.

Run by tests/bench/compare. Needs CoolProp 8.0.0:
    python3 -m venv target/venv && target/venv/bin/pip install coolprop==8.0.0

Prints, for each design, the milliseconds of 400 states on a line of constant
density through the library's low-level interface: its share of what one
assessment of Chargewright holds.
"""

import time

from CoolProp.CoolProp import AbstractState, DmassT_INPUTS

# Mean density (kg/m3) and temperatures (K) of the ready designs' paths.
DESIGNS = {
    "aluminium-ammonia-pipe": ("Ammonia", 218.0, 205.0, 369.0),
    "copper-water-heat-pipe": ("Water", 184.0, 273.2, 407.0),
    "glass-liquid-lift": ("Ethanol", 337.0, 243.0, 343.0),
    "refrigerant-vessel": ("R134a", 742.0, 242.0, 349.0),
}
POINTS = 400
REPEATS = 20


def path(state, density, low, high):
    for i in range(POINTS):
        state.update(DmassT_INPUTS, density, low + (high - low) * i / (POINTS - 1))
        state.p()


for name, (fluid, density, low, high) in DESIGNS.items():
    state = AbstractState("HEOS", fluid)
    path(state, density, low, high)
    times = []
    for _ in range(REPEATS):
        start = time.perf_counter()
        path(state, density, low, high)
        times.append(time.perf_counter() - start)
    times.sort()
    print(f"{name}: 400 states on the path, reference library: {1e3 * times[len(times) // 2]:.3f} ms")
