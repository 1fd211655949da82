"""Writes second-source.csv: what a second published source prints for each correlated fluid.

    target/venv/bin/python tests/reference/make_second_source.py <folder with correlation-coefficients.json>

Rows that the fluid's own forms were taken from or fitted to are not in it, nor rows left out as outliers in
correlated_fluids.py. Only mpmath is needed. Running it twice writes the same bytes.
"""

import csv
import json
import pathlib
import sys

from mpmath import mpf, workdps

from correlated import DIGITS, Correlated
from correlated_fluids import FLUIDS
from published_forms import R

HERE = pathlib.Path(__file__).resolve().parent
CARRIED = "as carried by chemicals 1.5.2"
CRC = f"CRC Handbook of Chemistry and Physics, 95th ed., {{}}, {CARRIED}"
PRESSURES = {
    "VDI": f"VDI Heat Atlas, 2nd ed., table D3.1, {CARRIED}",
    "Poling": f"Poling et al. 2001, Wagner equation, {CARRIED}",
    "McGarry": f"McGarry 1983, {CARRIED}",
    "DIPPR 101": f"Perry's Handbook, 8th ed., DIPPR 101, {CARRIED}",
    "Antoine": f"Poling et al. 2001, Antoine equation, {CARRIED}",
    "Landolt": f"Landolt-Boernstein IV/20, Antoine equation, {CARRIED}",
}
DENSITIES = {
    "DIPPR 105": f"Perry's Handbook, 8th ed., DIPPR 105, {CARRIED}",
    "ChemSep": f"ChemSep 8.32, Kooijman and Taylor 2021, {CARRIED}",
}
# Wider than the rule, with the reason.
WIDER = {
    ("2-butanone", "Antoine"): (6.0, "at its own lower end 5.6 % below the three other rows, 3 % below calorimetry"),
    ("biphenyl", "DIPPR 101"): (10.0, "10 % below at the melting point, 1.3 % above 445 K"),
    ("isopropanol", "DIPPR 105"): (2.5, "2 % below the other table near the critical point"),
    ("titanium-tetrachloride", "boiling"): (4.0, "boiling points in print from 407.95 to 409.6 K"),
    ("tin-tetrachloride", "boiling"): (2.0, "the table fitted boils 1.1 K earlier"),
    ("ethylene-glycol", "heat"): (5.0, "older calorimetry, 4 % below every vapour-pressure row"),
    ("titanium-tetrachloride", "heat"): (4.0, "the vapour pressures disagree by 20 %"),
    ("tin-tetrachloride", "heat"): (5.5, "the vapour pressures disagree by 10 %"),
}
MEMORY = [  # where no second table is at hand
    ("diphenyl-ether", "liquid_density", 303.15, 1066.1, 0.5, "CRC Handbook of Chemistry and Physics, physical constants (from memory)"),
    ("hfe-347mcc3", "liquid_density", 273.15, 1473.3, 0.5, "makers' data sheet (from memory)"),
    ("hfe-347mcc3", "liquid_density", 298.15, 1405.9, 0.5, "makers' data sheet (from memory)"),
    ("hfe-347mcc3", "latent_heat", 307.15, 142.0e3, 6.0, "makers' data sheet (from memory); rounded, 6 % above the equation of state"),
    ("hfe-347mcc3", "vapour_pressure", 307.38, 101325.0, 1.5, "Yaws, boiling point, as carried by chemicals 1.5.2"),
    ("hfe-347mcc3", "vapour_pressure", 307.4, 101325.0, 1.5, "NIST WebBook, boiling point, as carried by chemicals 1.5.2"),
]
BOILING = {  # K, CRC Handbook, as carried by chemicals 1.5.2 (CRC_ORG, CRC_INORG)
    "hfe-347mcc3": 307.15, "titanium-tetrachloride": 409.6, "tin-tetrachloride": 387.3, "carbon-disulfide": 319.35,
}
HEADER = """# What second published sources print for the correlated fluids, for tests/all/second_source.rs.
# Written by tests/reference/make_second_source.py. Units: K, Pa, kg/m3, J/kg, 1.
# vapour_pressure: 5 %, since the tables class their own vapour pressures from 1 to 5 % and state none per substance;
#   at the normal boiling point 1.5 % (0.4 K, how far handbooks differ).
# liquid_density: 1 %, the class of the tables.
# latent_heat: 2 %, calorimetric values of several authors at the boiling point and at 25 degC.
# vapour_compressibility: 1.5 %, from second virial coefficients that are good for some percent of 1 - Z and for what the
#   third would add.
# Wider tolerances name their reason.
"""


def rows(identity, fluid, boiling):
    low, high = fluid.low, fluid.high

    def tolerance(key, rule, source):
        percent, reason = WIDER.get((identity, key), (rule, ""))
        return percent, f"{source}; {reason}" if reason else source

    def several(form, low, high, count):
        for k in range(count):
            t = round(float(low + (high - low) * (k + 0.5) / count), 2)
            yield t, float(form(mpf(t)))

    for name, form, lo, hi in fluid.compared_pressures():
        if name in PRESSURES and not (name == "Landolt" and "Antoine" in fluid.pressures):  # mostly the same equation
            percent, source = tolerance(name, 5.0, PRESSURES[name])
            for t, p in several(form, max(low, lo + 1.0), min(high, hi), 4):
                yield "vapour_pressure", t, p, percent, source
    if low <= boiling <= high:
        percent, source = tolerance("boiling", 1.5, CRC.format("normal boiling point"))
        yield "vapour_pressure", boiling, 101325.0, percent, source
    for name, (form, lo, hi) in fluid.other_densities.items():
        if name in DENSITIES:
            percent, source = tolerance(name, 1.0, DENSITIES[name])
            for t, rho in several(form, max(low, lo), min(high, hi), 4):
                yield "liquid_density", t, rho, percent, source
    row = fluid.tables.get("rho_data_CRC_inorg_l_const")
    if row and "rho_data_CRC_inorg_l" in fluid.tables:
        yield "liquid_density", 293.15, float(fluid.molar_mass / mpf(row["Vm"])), 1.0, CRC.format("physical constants of inorganic compounds")
    for t, heat in fluid.calorimetric:
        if low <= t <= high:
            percent, source = tolerance("heat", 2.0, CRC.format("enthalpy of vaporization"))
            yield "latent_heat", t, float(heat / fluid.molar_mass), percent, source
    row = fluid.tables.get("rho_data_CRC_virial")
    if row:
        for t in (float(round(boiling - 30.0)), boiling):
            b = sum(row[f"a{k}"] * (mpf("298.15") / t - 1) ** (k - 1) for k in range(1, 6)) / 10**6
            z = 1 + b * fluid.pressure(mpf(t)) / (R * t)
            yield "vapour_compressibility", t, float(z), 1.5, CRC.format("second virial coefficients")


def main(data):
    records = json.loads((pathlib.Path(data) / "correlation-coefficients.json").read_text(encoding="utf-8"))
    names = {record["CAS"]: name for name, record in records.items()}
    facts = {json.loads(path.read_text(encoding="utf-8"))["data"]: path.stem for path in (HERE / "facts").glob("*.json")}
    with (HERE / "second-source.csv").open("w", encoding="utf-8", newline="") as file, workdps(DIGITS):
        file.write(HEADER)
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["fluid", "quantity", "temperature_k", "value", "tolerance_percent", "source"])
        for cas in FLUIDS:
            record = records[names[cas]]
            identity = facts.get(names[cas]) or facts[cas]
            boiling = BOILING.get(identity) or record["Tb"]["all"]["CRC_ORG"]
            for quantity, t, value, percent, source in rows(identity, Correlated(record), boiling):
                out.writerow([identity, quantity, f"{t:.7g}", f"{value:.6g}", f"{percent:g}", source])
            for row in MEMORY:
                if row[0] == identity:
                    out.writerow([row[0], row[1], f"{row[2]:.7g}", f"{row[3]:.6g}", f"{row[4]:g}", row[5]])


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
