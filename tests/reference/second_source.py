"""How far a second published source agrees where a paper's own uncertainty is not at hand.

The vapour pressure (Wagner 2.5/5) and liquid density (PPDS) of the VDI Heat Atlas,
2nd ed., Springer 2010, table D3.1, as carried by chemicals 1.5.2, were fitted to data by
others than the authors of the equations of state. The largest difference found here stands
as the stated uncertainty of these fluids in facts/<id>.json.

    cargo build --no-default-features
    target/venv/bin/pip install chemicals==1.5.2
    target/venv/bin/python -B tests/reference/second_source.py target/debug/chargewright
"""

import subprocess
import sys

from chemicals import vapor_pressure, volume

FLUIDS = [
    # id, CAS number, lowest and highest temperature compared in K (p above 1 kPa)
    ("ammonia", "7664-41-7", 200.0, 385.0),
    ("methanol", "67-56-1", 256.0, 485.0),
    ("n-pentane", "109-66-0", 220.0, 445.0),
    ("diethyl-ether", "60-29-7", 271.0, 440.0),
]


def saturation(program, fluid, temperatures):
    listed = ",".join(str(t) for t in temperatures)
    run = subprocess.run([program, "saturation", fluid, "--at", listed], capture_output=True, text=True, check=True)
    return [[float(cell) for cell in line.split(",")[:3]] for line in run.stdout.splitlines()[1:]]


def liquid_density(row, temperature):
    theta = 1.0 - temperature / row.Tc
    powers = [(row.A, 0.35), (row.B, 2.0 / 3.0), (row.C, 1.0), (row.D, 4.0 / 3.0)]
    return row.rhoc + sum(a * theta**e for a, e in powers)


def main():
    for fluid, cas, low, high in FLUIDS:
        temperatures = [low + (high - low) * i / 40 for i in range(41)]
        states = saturation(sys.argv[1], fluid, temperatures)
        p = vapor_pressure.Psat_data_VDI_PPDS_3.loc[cas]
        rho = volume.rho_data_VDI_PPDS_2.loc[cas]
        off_p = max(
            abs(vapor_pressure.Wagner(t, p.Tc, p.Pc, p.A, p.B, p.C, p.D) / found - 1.0) for t, found, _ in states
        )
        off_rho = max(abs(liquid_density(rho, t) / found - 1.0) for t, _, found in states)
        print(f"{fluid}: {low:g} to {high:g} K: vapour pressure {100 * off_p:.2f} %, liquid density {100 * off_rho:.2f} %")


if __name__ == "__main__":
    main()
