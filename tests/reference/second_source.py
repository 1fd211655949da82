"""How far a second published source agrees where a paper's own uncertainty is not at hand.

The vapour pressure (Wagner 2.5/5) and liquid density (PPDS) of the VDI Heat Atlas,
2nd ed., Springer 2010, table D3.1, as carried by chemicals 1.5.2, were fitted to data by
others than the authors of the equations of state. Where that book has no row, Perry's
Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2007, tables 2-8 (DIPPR 101) and 2-32
(DIPPR 105), or McGarry's vapour pressures of 1983 (Wagner 3/6), by the same carrier.
The largest difference found here stands as the stated uncertainty of these fluids in
facts/<id>.json.

    cargo build --no-default-features
    target/venv/bin/pip install chemicals==1.5.2
    target/venv/bin/python -B tests/reference/second_source.py target/debug/chargewright
"""

import math
import subprocess
import sys

from chemicals import identifiers, vapor_pressure, volume

FLUIDS = [
    # id, CAS number, lowest and highest temperature compared in K (p above 1 kPa)
    ("ammonia", "7664-41-7", 200.0, 385.0),
    ("methanol", "67-56-1", 256.0, 485.0),
    ("n-pentane", "109-66-0", 220.0, 445.0),
    ("diethyl-ether", "60-29-7", 271.0, 440.0),
    ("toluene", "108-88-3", 275.0, 562.0),
    ("n-heptane", "142-82-5", 267.0, 514.0),
    ("n-nonane", "111-84-2", 308.0, 564.0),
    ("n-decane", "124-18-5", 326.0, 586.0),
    ("n-undecane", "1120-21-4", 343.0, 606.0),
    ("1-2-dichloroethane", "107-06-2", 257.0, 533.0),
]

PERRY = [
    ("tetrahydrofuran", "109-99-9", 243.0, 513.0),
    ("propylene-glycol", "57-55-6", 290.0, 480.0),
]

MCGARRY = [
    ("n-perfluorohexane", "355-42-0", 303.0, 425.0),
]


def saturation(program, fluid, temperatures):
    listed = ",".join(str(t) for t in temperatures)
    run = subprocess.run([program, "saturation", fluid, "--at", listed], capture_output=True, text=True, check=True)
    return [[float(cell) for cell in line.split(",")[:3]] for line in run.stdout.splitlines()[1:]]


def liquid_density(row, temperature):
    theta = 1.0 - temperature / row.Tc
    powers = [(row.A, 0.35), (row.B, 2.0 / 3.0), (row.C, 1.0), (row.D, 4.0 / 3.0)]
    return row.rhoc + sum(a * theta**e for a, e in powers)


def perry_pressure(row, temperature):
    return math.exp(row.C1 + row.C2 / temperature + row.C3 * math.log(temperature) + row.C4 * temperature**row.C5)


def perry_density(row, temperature):
    """mol/m3"""
    return row.C1 / row.C2 ** (1.0 + (1.0 - temperature / row.C3) ** row.C4)


def compare(fluid, low, high, pressure, density):
    temperatures = [low + (high - low) * i / 40 for i in range(41)]
    states = saturation(sys.argv[1], fluid, temperatures)
    told = f"{fluid}: {low:g} to {high:g} K: vapour pressure {100 * max(abs(pressure(t) / p - 1.0) for t, p, _ in states):.2f} %"
    if density is not None:
        told += f", liquid density {100 * max(abs(density(t) / rho - 1.0) for t, _, rho in states):.2f} %"
    print(told)


def main():
    for fluid, cas, low, high in FLUIDS:
        p = vapor_pressure.Psat_data_VDI_PPDS_3.loc[cas]
        rho = volume.rho_data_VDI_PPDS_2.loc[cas]
        compare(
            fluid, low, high,
            lambda t: vapor_pressure.Wagner(t, p.Tc, p.Pc, p.A, p.B, p.C, p.D),
            lambda t: liquid_density(rho, t),
        )
    for fluid, cas, low, high in PERRY:
        p = vapor_pressure.Psat_data_Perrys2_8.loc[cas]
        rho = volume.rho_data_Perry_8E_105_l.loc[cas]
        kg_per_mol = identifiers.MW(cas) * 1e-3
        compare(
            fluid, low, high,
            lambda t: perry_pressure(p, t),
            lambda t: perry_density(rho, t) * kg_per_mol,
        )
    for fluid, cas, low, high in MCGARRY:
        p = vapor_pressure.Psat_data_WagnerMcGarry.loc[cas]
        compare(fluid, low, high, lambda t: vapor_pressure.Wagner_original(t, p.Tc, p.Pc, p.A, p.B, p.C, p.D), None)


if __name__ == "__main__":
    main()
