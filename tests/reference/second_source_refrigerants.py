"""As second_source.py, for the refrigerants, whose second sources come from several tables.

All as carried by chemicals 1.5.2. Where a table of the VDI Heat Atlas follows an equation of state within some hundredths
of a per cent it was fitted to that equation and is no second source; older tables are taken there.

    cargo build --no-default-features
    target/venv/bin/pip install chemicals==1.5.2
    target/venv/bin/python -B tests/reference/second_source_refrigerants.py target/debug/chargewright
"""

from math import exp

from chemicals import identifiers, vapor_pressure, volume

from second_source import compare, liquid_density, perry_density, perry_pressure


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
    return perry_pressure(row, t)


def density(source, cas, t):
    """kg/m3"""
    row = DENSITIES[source].loc[cas]
    if source == "VDI":
        return liquid_density(row, t)
    return 1e-3 * identifiers.MW(cas) * perry_density(row, t)


FLUIDS = [
    # id, CAS number, source of vapour pressure, source of liquid density, temperatures compared in K
    ("r-11", "75-69-4", "VDI", "VDI", 211.0, 447.0),
    ("r-12", "75-71-8", "McGarry", None, 172.0, 365.0),
    ("r-13", "75-72-9", "VDI", "VDI", 135.0, 287.0),
    ("r-14", "75-73-0", "VDI", "VDI", 120.0, 216.0),
    ("r-21", "75-43-4", "VDI", "VDI", 202.0, 430.0),
    ("r-21", "75-43-4", "VDI", "VDI", 248.0, 430.0),
    ("r-22", "75-45-6", "McGarry", None, 170.0, 350.0),
    ("r-40", "74-87-3", "VDI", "VDI", 230.0, 397.0),
    ("r-40", "74-87-3", "Poling", None, 230.0, 265.9),
    ("r-40", "74-87-3", "McGarry", None, 230.0, 397.0),
    ("r-40", "74-87-3", "Perry", "Perry", 230.0, 395.0),
    ("r-41", "593-53-3", "McGarry", "Perry", 139.0, 301.0),
    ("r-113", "76-13-1", "McGarry", None, 238.0, 462.0),
    ("r-114", "76-14-2", "VDI", "VDI", 274.0, 399.0),
    ("r-115", "76-15-3", "McGarry", None, 178.0, 335.0),
    ("r-116", "76-16-4", "Poling", None, 176.0, 208.8),
    ("r-116", "76-16-4", "Poling", None, 196.0, 208.8),
    ("r-123", "306-83-2", "Poling", None, 223.2, 321.0),
    ("r-123", "306-83-2", "Poling", None, 297.0, 321.0),
    ("r-124", "2837-89-0", "Poling", None, 222.0, 286.0),
    ("r-141b", "1717-00-6", "Poling", None, 227.0, 326.0),
    ("r-142b", "75-68-3", "Poling", None, 196.0, 282.0),
    ("r-152a", "75-37-6", "Perry", None, 180.0, 367.0),
    ("r-161", "353-36-6", "VDI", "VDI", 174.1, 356.0),
    ("r-161", "353-36-6", "VDI", "VDI", 203.1, 356.0),
    ("r-161", "353-36-6", "VDI", "VDI", 222.5, 356.0),
    ("r-218", "76-19-7", "Landolt", None, 218.0, 327.0),
    ("r-c318", "115-25-3", "Landolt", None, 234.0, 293.0),
]


def main():
    for fluid, cas, of_pressure, of_density, low, high in FLUIDS:
        print(f"{of_pressure} and {of_density}" if of_density else of_pressure, end=": ")
        compare(
            fluid, low, high,
            lambda t: pressure(of_pressure, cas, t),
            (lambda t: density(of_density, cas, t)) if of_density else None,
        )


if __name__ == "__main__":
    main()
