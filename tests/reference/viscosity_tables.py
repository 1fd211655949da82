"""Writes viscosity.csv: the viscosity forms in use against CoolProp 8.0.0.

    target/venv/bin/pip install coolprop==8.0.0
    target/venv/bin/python tests/reference/viscosity_tables.py <folder with fluid-equations.json>

Saturated liquid and vapour, and single-phase states drawn with a fixed seed, for every fluid whose reference form is taken
(viscosity_choice.py). CoolProp is asked at (T, rho); the densities are its own. Of a record with two forms CoolProp uses the
first: where the second is taken, it is given a copy of its own record that holds only that. Left out are states where CoolProp finds
no conformal state, and vapours below a hundredth of the critical density: there the two equations for it become one, and searches
end in different places, though the gas is dilute in all of them. Running it twice writes the same bytes.
"""

import copy
import json
import math
import pathlib
import random
import sys

import CoolProp
import CoolProp.CoolProp as CP

import viscosity_choice as choice

HERE = pathlib.Path(__file__).resolve().parent
SATURATION_POINTS, SINGLE_POINTS, NEAREST = 7, 8, 0.98
THINNEST_CONFORMAL = 0.01

HEADER = """\
# Viscosity of the reference forms that are in use: saturated liquid, saturated vapour, and single-phase states drawn at random.
# Source: CoolProp 8.0.0, with the forms named in tests/reference/viscosity_choice.py; written by tests/reference/viscosity_tables.py.
# Units: K, kg/m3, Pa s
# Tolerance: 1e-9 relative; for corresponding states (R-11 ... propylene) 1e-6, since CoolProp's conformal state is found to 1e-9 only.
"""


def reader(name):
    """A state to ask at (T, rho), with the taken form."""
    index = choice.TAKEN_OF_TWO.get(name, 0)
    asked = name
    if index:
        (record,) = json.loads(CP.get_fluid_param_string(name, "JSON"))
        record = copy.deepcopy(record)
        record["TRANSPORT"]["viscosity"] = record["TRANSPORT"]["viscosity"][index]
        asked = f"{name} with the second form"
        record["INFO"].update(NAME=asked, CAS=f"second of {record['INFO']['CAS']}", ALIASES=[], REFPROP_NAME="N/A")
        CP.add_fluids_as_JSON("HEOS", json.dumps([record]))
    return CoolProp.AbstractState("HEOS", asked)


def states(name, record, low, high, draw):
    saturated = CoolProp.AbstractState("HEOS", name)
    critical = saturated.T_critical()
    top = min(NEAREST * critical, high)
    if low < top:
        for k in range(SATURATION_POINTS):
            t = math.ceil((low + (top - low) * k / (SATURATION_POINTS - 1)) * 1e3) / 1e3 if k == 0 else round(
                low + (top - low) * k / (SATURATION_POINTS - 1), 3)
            t = min(t, math.floor(top * 1e3) / 1e3)
            for share in (0, 1):
                saturated.update(CoolProp.QT_INPUTS, share, t)
                yield t, saturated.rhomass()
    highest_pressure = min(50e6, record["EOS"][0]["p_max"])
    found = 0
    while found < SINGLE_POINTS:
        t = round(draw.uniform(max(low, 0.55 * critical), min(high, 2.0 * critical)), 3)
        p = math.exp(draw.uniform(math.log(1e4), math.log(highest_pressure)))
        try:
            saturated.update(CoolProp.PT_INPUTS, p, t)
        except ValueError:
            found += 1  # solid, or no solution: one state less
            continue
        found += 1
        yield t, saturated.rhomass()


def main(data):
    equations = json.loads((pathlib.Path(data) / "fluid-equations.json").read_text(encoding="utf-8"))
    facts = {}
    for path in sorted((HERE / "facts").glob("*.json")):
        facts[json.loads(path.read_text(encoding="utf-8"))["data"]] = path.stem
    lines = []
    for name in sorted(choice.PAPERS):
        if name not in facts:
            print(f"{name}: no facts yet")
            continue
        record, identity = equations[name], facts[name]
        end = record["EOS"][0]
        lowest = max(float(f"{end['STATES']['sat_min_liquid']['T']:.6f}"), end["Ttriple"])
        low = max(choice.PAPERS[name][0] or 0, lowest) + 1e-3
        high = min(choice.highest_temperature(name, record), end["T_max"])
        asked = reader(name)
        least = THINNEST_CONFORMAL * asked.rhomass_critical() if choice.is_conformal(name, record) else 0.0
        asked.specify_phase(CoolProp.iphase_gas)
        for t, rho in states(name, record, low, high, random.Random(name)):
            if rho < least:
                continue
            try:
                asked.update(CoolProp.DmassT_INPUTS, rho, t)
                eta = asked.viscosity()
            except ValueError as error:
                print(f"{name} at {t} K, {rho:.4g} kg/m3: {error}")
                continue
            if not (math.isfinite(eta) and eta > 0):
                print(f"{name} at {t} K, {rho:.4g} kg/m3: {eta}")
                continue
            lines.append(f"{identity},{t!r},{rho:.17g},{eta:.17g}")
    text = HEADER + "fluid,temperature_k,density_kg_per_m3,viscosity_pa_s\n" + "\n".join(lines) + "\n"
    (HERE / "viscosity.csv").write_text(text, encoding="utf-8")
    print(f"{len(lines)} states")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
