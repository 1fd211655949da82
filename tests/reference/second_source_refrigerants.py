"""As second_source.py, for the refrigerants, whose second sources come from several tables.

All as carried by chemicals 1.5.2. Where a table of the VDI Heat Atlas follows an equation of state within some hundredths
of a per cent it was fitted to that equation and is no second source; older tables are taken there.

    cargo build --no-default-features
    target/venv/bin/pip install chemicals==1.5.2
    target/venv/bin/python -B tests/reference/second_source_refrigerants.py target/debug/chargewright
"""

import sys
from math import exp

from chemicals import dippr, vapor_pressure, volume

from second_source import liquid_density, saturation


def tables(module, names):
    """Rows by CAS number; asking for a table makes chemicals read it."""
    return {ours: getattr(module, theirs) for ours, theirs in names.items()}


PRESSURES = tables(vapor_pressure, {
    "VDI": "Psat_data_VDI_PPDS_3",
    "McGarry": "Psat_data_WagnerMcGarry",
    "Poling": "Psat_data_AntoinePoling",
    "Landolt": "Psat_data_Landolt_Antoine",
    "Perry": "Psat_data_Perrys2_8",
})
DENSITIES = tables(volume, {"VDI": "rho_data_VDI_PPDS_2", "Perry": "rho_data_Perry_8E_105_l"})


def pressure(source, cas, t):
    """Pa"""
    row = PRESSURES[source].loc[cas]
    if source == "VDI":
        return vapor_pressure.Wagner(t, row.Tc, row.Pc, row.A, row.B, row.C, row.D)
    if source == "McGarry":
        return vapor_pressure.Wagner_original(t, row.Tc, row.Pc, row.A, row.B, row.C, row.D)
    if source == "Poling":
        return vapor_pressure.Antoine(t, row.A, row.B, row.C)
    if source == "Landolt":
        return exp(row.A - row.B / (t + row.C))
    return dippr.EQ101(t, row.C1, row.C2, row.C3, row.C4, row.C5)


def density(source, cas, molar_mass, t):
    """kg/m3"""
    row = DENSITIES[source].loc[cas]
    if source == "VDI":
        return liquid_density(row, t)
    return 1e-3 * molar_mass * dippr.EQ105(t, row.C1, row.C2, row.C3, row.C4)


FLUIDS = [
    # id, CAS number, g/mol, source of vapour pressure, source of liquid density, temperatures compared in K
    ("r-11", "75-69-4", 137.368, "VDI", "VDI", 211.0, 447.0),
    ("r-12", "75-71-8", 120.913, "McGarry", None, 172.0, 365.0),
    ("r-13", "75-72-9", 104.459, "VDI", "VDI", 135.0, 287.0),
    ("r-14", "75-73-0", 88.0046, "VDI", "VDI", 120.0, 216.0),
    ("r-21", "75-43-4", 102.9227, "VDI", "VDI", 202.0, 430.0),
    ("r-21", "75-43-4", 102.9227, "VDI", "VDI", 248.0, 430.0),
    ("r-22", "75-45-6", 86.468, "McGarry", None, 170.0, 350.0),
    ("r-40", "74-87-3", 50.48752, "VDI", "VDI", 230.0, 397.0),
    ("r-40", "74-87-3", 50.48752, "Poling", None, 230.0, 265.9),
    ("r-40", "74-87-3", 50.48752, "McGarry", None, 230.0, 397.0),
    ("r-40", "74-87-3", 50.48752, "Perry", "Perry", 230.0, 395.0),
    ("r-41", "593-53-3", 34.03292, "McGarry", "Perry", 139.0, 301.0),
    ("r-113", "76-13-1", 187.375, "McGarry", None, 238.0, 462.0),
    ("r-114", "76-14-2", 170.921, "VDI", "VDI", 274.0, 399.0),
    ("r-115", "76-15-3", 154.466416, "McGarry", None, 178.0, 335.0),
    ("r-116", "76-16-4", 138.01182, "Poling", None, 176.0, 208.8),
    ("r-116", "76-16-4", 138.01182, "Poling", None, 196.0, 208.8),
    ("r-123", "306-83-2", 152.931, "Poling", None, 223.2, 321.0),
    ("r-123", "306-83-2", 152.931, "Poling", None, 297.0, 321.0),
    ("r-124", "2837-89-0", 136.4762, "Poling", None, 222.0, 286.0),
    ("r-141b", "1717-00-6", 116.94962, "Poling", None, 227.0, 326.0),
    ("r-142b", "75-68-3", 100.49503, "Poling", None, 196.0, 282.0),
    ("r-152a", "75-37-6", 66.051, "Perry", None, 180.0, 367.0),
    ("r-161", "353-36-6", 48.0595, "VDI", "VDI", 174.1, 356.0),
    ("r-161", "353-36-6", 48.0595, "VDI", "VDI", 203.1, 356.0),
    ("r-161", "353-36-6", 48.0595, "VDI", "VDI", 222.5, 356.0),
    ("r-218", "76-19-7", 188.01933, "Landolt", None, 218.0, 327.0),
    ("r-c318", "115-25-3", 200.0312, "Landolt", None, 234.0, 293.0),
]


def main():
    for fluid, cas, molar_mass, of_pressure, of_density, low, high in FLUIDS:
        temperatures = [low + (high - low) * i / 40 for i in range(41)]
        states = saturation(sys.argv[1], fluid, temperatures)
        off = max(abs(pressure(of_pressure, cas, t) / found - 1.0) for t, found, _ in states)
        line = f"{fluid}: {low:g} to {high:g} K: vapour pressure {100 * off:.2f} % ({of_pressure})"
        if of_density:
            off = max(abs(density(of_density, cas, molar_mass, t) / found - 1.0) for t, _, found in states)
            line += f", liquid density {100 * off:.2f} % ({of_density})"
        print(line)


if __name__ == "__main__":
    main()
