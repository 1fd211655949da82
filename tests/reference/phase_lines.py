"""Triple point, melting line and sublimation line: writes the `lines` section of a fluid's file. Called by make_fluids.py.

Melting lines are those that CoolProp 8.0.0 carries, less those that do not meet the triple point (REFUSED). Simon's form is
rewritten to start at the lower end of its range, p_0 = p(T_0) there: the same numbers, and every pressure positive.
Run by itself it prints how each line meets the equation's lowest vapour pressure:  phase_lines.py <folder with fluid-equations.json>
"""

import json
import math
import pathlib
import sys

HERE = pathlib.Path(__file__).resolve().parent
ROWS = json.loads((HERE / "handbook-rows.json").read_text(encoding="utf-8"))

CARRIED = ", as carried by CoolProp 8.0.0"
STAVELEY = "Staveley, L. A. K.; Lobo, L. Q.; Calado, J. C. G. 1981, Cryogenics 21, 131-144, doi 10.1016/0011-2275(81)90264-6, as carried by chemicals 1.5.2"
LANDOLT = "Landolt-Börnstein IV/20 (1999-2001), Antoine equation of the solid, as carried by chemicals 1.5.2"
ALCOCK = "Alcock, C. B.; Itkin, V. P.; Horrigan, M. K. 1984, Can. Metall. Q. 23, 309-313, solid, as carried by chemicals 1.5.2"

MELTING_PAPERS = {
    "Tegeler-JPCRD-1999": "Tegeler, C.; Span, R.; Wagner, W. 1999, J. Phys. Chem. Ref. Data 28, 779-850",
    "Span-JPCRD-1996": "Span, R.; Wagner, W. 1996, J. Phys. Chem. Ref. Data 25, 1509-1596, doi 10.1063/1.555991",
    "Barreiros-JCT-1982": "Barreiros, S. F.; Calado, J. C. G.; Nunes da Ponte, M. 1982, J. Chem. Thermodyn. 14, 1197-1198",
    "Penoncello-IJT-1995": "Penoncello, S. G.; Jacobsen, R. T; Goodwin, A. R. H. 1995, Int. J. Thermophys. 16, 519-531, moved to the equation's triple point",
    "Buecker-JPCRD-2006": "Bücker, D.; Wagner, W. 2006, J. Phys. Chem. Ref. Data 35, 205-266, doi 10.1063/1.1859286",
    "Buecker-JPCRD-2006B": "Bücker, D.; Wagner, W. 2006, J. Phys. Chem. Ref. Data 35, 929-1019, doi 10.1063/1.1901687",
    "Sun-BBPC-1988": "Sun, T. F.; Schouten, J. A.; Trappeniers, N. J.; Biswas, S. N. 1988, Ber. Bunsenges. Phys. Chem. 92, 652-655, moved to the triple point",
    "Smukala-JPCRD-2000": "Smukala, J.; Span, R.; Wagner, W. 2000, J. Phys. Chem. Ref. Data 29, 1053-1121, doi 10.1063/1.1329318",
    "Herrig-JPCRD-2019": "Herrig, S.; Thol, M.; Harvey, A. H.; Lemmon, E. W. 2018, J. Phys. Chem. Ref. Data 47, 043102, doi 10.1063/1.5053993",
    "Reeves-JCP-1964": "Reeves, L. E.; Scott, G. J.; Babb, S. E. 1964, J. Chem. Phys. 40, 3662-3666, doi 10.1063/1.1725068",
    "Michels-PHYSICA-1962": "Michels, A.; Prins, C. 1962, Physica 28, 101-116",
    "Abramson-HPR-2011": "Abramson, E. H. 2011, High Press. Res. 31, 549-554, doi 10.1080/08957959.2011.629617",
    "deReuck-BOOK-1993": "de Reuck, K. M.; Craven, R. J. B. 1993, International Thermodynamic Tables of the Fluid State 12: Methanol, Blackwell",
    "Bell-NeonMelting-2026": "Bell, I. H. 2026, melting curve of neon",
    "Span-JPCRD-2000": "Span, R. et al. 2000, J. Phys. Chem. Ref. Data 29, 1361-1433, doi 10.1063/1.1349047",
    "Younglove-NIST-1982": "Younglove, B. A. 1982, J. Phys. Chem. Ref. Data 11, supplement 1",
    "IAPWS-Melting-2011": "IAPWS R14-08 (2011), pressure along the melting and sublimation curves of ordinary water substance",
}

REFUSED = {
    "Hydrogen": "at the triple point it gives 23.6 MPa instead of 7 kPa",
    "Deuterium": "its zero lies 1 K above the triple point: it would call the boiling liquid solid",
}
HIGHEST = {"Ethanol": 250.0}  # K; the range carried ends at 10 000 K

# A figure carried wrong: (name, piece) to p_0. R14-08 prints 632.4 MPa for the triple point of ice V, ice VI and the liquid, where the
# piece of ice V ends too; with 623.4 MPa the check value at 320 K would be 1337 and not 1356.76 MPa.
# Helium's paper has one constant, p = a T^c: the second carried, -a, gives 2.2 MPa at 2.18 K where 5.4 is nearer to what is measured.
CORRECTED = {("Water", 3): 632.4e6, ("Helium", 0): 1606700.0}

# name: (form, coefficients, lowest temperature, source). (T_t, p_t) stand in the coefficients.
SUBLIMATION = {
    "Water": ("Powers", 273.16, 611.657, [(-21.2144006, 0.00333333333), (27.3203819, 1.20666667), (-6.10598130, 1.70333333)], 50.0,
              ("Published", MELTING_PAPERS["IAPWS-Melting-2011"])),
    "HeavyWater": ("LogPowers", 276.969, 661.59, [(-13.14226, -1.73), (32.12969, -1.42)], 210.0,
                   ("Memory", MELTING_PAPERS["Herrig-JPCRD-2019"] + ", Eq. 8")),
    "CarbonDioxide": ("PowersOfFall", 216.592, 517950.0, [(-14.740846, 1.0), (2.4327015, 1.9), (-5.3061778, 2.9)], 154.0,
                      ("Published", MELTING_PAPERS["Span-JPCRD-1996"] + ", Eq. 3.12, as carried by several public programs")),
    "Argon": ("PowersOfFall", 83.8058, 68891.0, [(-11.391604, 1.0), (-0.39513431, 2.7)], 60.0,
              ("Memory", MELTING_PAPERS["Tegeler-JPCRD-1999"])),
    "Nitrogen": ("PowersOfFall", 63.151, 12523.0, [(-13.088692, 1.0)], 40.0, ("Memory", MELTING_PAPERS["Span-JPCRD-2000"])),
    "Methane": ("PowersOfFall", 90.6941, 11696.0, [(-12.84, 1.0)], 53.0,
                ("Memory", "Setzmann, U.; Wagner, W. 1991, J. Phys. Chem. Ref. Data 20, 1061-1155, doi 10.1063/1.555898")),
}
# Landolt's rows that are not taken. n-Pentane's spans one kelvin; carried on to the triple point the others miss the vapour pressure
# of the equation (or, R-116, the measured triple pressure) by more than 5 %: n-hexane 13, n-heptane 7, o-xylene 39, R-23 24, R-116 13.
LANDOLT_LEFT_OUT = {"109-66-0", "110-54-3", "142-82-5", "95-47-6", "75-46-7", "76-16-4"}

# A triple point and the melting point under an atmosphere lie this close in kelvin, or one of them is not what it says.
SAME_POINT = 0.6
# The lower end of an equation is its triple point only if the fluid melts there.
SAME_END = 0.3
NO_TRIPLE_POINT = {"Helium"}  # liquid, liquid and vapour meet at its lower end, not the solid


def number(value):
    return repr(float(value))


def text(words):
    return json.dumps(words, ensure_ascii=False)


def source(kind_and_words):
    kind, words = kind_and_words
    return f"source: {kind}({text(words)})"


def pairs(terms):
    return "[" + ", ".join(f"({number(a)}, {number(t)})" for a, t in terms) + "]"


# ---- melting --------------------------------------------------------------------------------------------------------


def melting_pieces(name, record):
    """(form, keys, lowest, highest, source words), in the order of the paper."""
    line = record["ANCILLARIES"].get("melting_line")
    if line is None or name in REFUSED:
        return []
    words = MELTING_PAPERS.get(line["BibTeX"], line["BibTeX"]) + CARRIED
    pieces = []
    for index, part in enumerate(line["parts"]):
        low, high = sorted((part["T_min"], part["T_max"]))
        high = min(high, HIGHEST.get(name, high))
        start = CORRECTED.get((name, index), part["p_0"])
        if line["type"] == "Simon":
            theta = (low / part["T_0"]) ** part["c"]
            form, keys = "Simon", {"p0_pa": start + part["a"] * (theta - 1), "a_pa": part["a"] * theta, "c": part["c"]}
            keys = {"t0_k": low, **keys}
        else:
            form = {"polynomial_in_Tr": "Powers", "polynomial_in_Theta": "PowersOfRise"}[line["type"]]
            keys = {"t0_k": part["T_0"], "p0_pa": start, "terms": list(zip(part["a"], part["t"], strict=True))}
        pieces.append((form, keys, low, high, words))
    if name == "Water":
        terms = [(1.73683, -1.0), (-0.0544606, 5.0), (0.806106e-7, 22.0)]
        keys = {"t0_k": 355.0, "p0_pa": 2216e6, "terms": terms}
        pieces.append(("LogPowers", keys, 355.0, 715.0, MELTING_PAPERS["IAPWS-Melting-2011"]))
    return pieces


def shown(keys):
    return ", ".join(f"{key}: {pairs(value) if key == 'terms' else number(value)}" for key, value in keys.items())


def melting_lines(name, record):
    pieces = melting_pieces(name, record)
    if not pieces:
        return []
    return ["melting: [", *(
        f"    (form: {form}({shown(keys)}), temperature_range_k: ({number(low)}, {number(high)}), {source(('Published', words))}),"
        for form, keys, low, high, words in pieces
    ), "],"]


def evaluate(form, keys, t):
    theta = t / keys["t0_k"]
    if form == "Simon":
        return keys["p0_pa"] + keys["a_pa"] * (theta ** keys["c"] - 1)
    if form == "Powers":
        return keys["p0_pa"] * (1 + sum(a * (theta**e - 1) for a, e in keys["terms"]))
    if form == "PowersOfRise":
        return keys["p0_pa"] * (1 + sum(a * (theta - 1) ** e for a, e in keys["terms"]))
    return keys["p0_pa"] * math.exp(sum(a * (1 - theta**e) for a, e in keys["terms"]))


# ---- sublimation ----------------------------------------------------------------------------------------------------


def sublimation(name, cas, melting):
    """(form text, lowest, highest, source, function) or None."""
    if name in SUBLIMATION:
        form, t0, p0, terms, low, where = SUBLIMATION[name]
        keys = {"t0_k": t0, "p0_pa": p0, "terms": terms}

        def pressure(t):
            theta = t / t0
            if form == "LogPowers":
                return p0 * math.exp(sum(a * (1 - theta**e) for a, e in terms))
            x = theta if form == "Powers" else max(1 - theta, 0.0)
            return p0 * math.exp(sum(a * x**e for a, e in terms) / theta)

        return f"{form}({shown(keys)})", low, t0, where, pressure
    rows = ROWS.get(cas.rstrip("op"), {})
    if row := rows.get("Psub_data_Alcock_elements"):
        a, b, c, d, e = (row[key] for key in "ABCDE")
        cells = ", ".join(number(value) for value in (a, b, c, d, e))
        return (
            f"Alcock({cells})", row["Tmin"], min(row["Tmax"], melting), ("Published", ALCOCK),
            lambda t: math.exp(a + b / t + c * math.log(t) + d * t**e),
        )
    row = rows.get("Psub_data_Landolt_Antoine")
    if row and cas not in LANDOLT_LEFT_OUT and row["Tmin"] < melting - 1:
        a, b, c = row["A"], row["B"], row["C"]
        cells = ", ".join(number(value) for value in (a, b, c))
        return (
            f"Antoine({cells})", row["Tmin"], min(row["Tmax"], melting), ("Published", LANDOLT),
            lambda t: math.exp(a - b / (t + c)),
        )
    return None


def sublimation_lines(name, cas, melting):
    found = sublimation(name, cas, melting)
    if found is None:
        return []
    form, low, high, where, _ = found
    return [f"sublimation: Some((form: {form}, temperature_range_k: ({number(low)}, {number(high)}), {source(where)})),"]


# ---- triple point ---------------------------------------------------------------------------------------------------


def triple_point(name, cas, record, melting, paper):
    """(temperature, pressure or None, source) or None."""
    if name in NO_TRIPLE_POINT:
        return None
    if name == "Water":
        return 273.16, 611.657, ("Published", MELTING_PAPERS["IAPWS-Melting-2011"])
    row = ROWS.get(cas.rstrip("op"), {}).get("Staveley")
    if row and abs(row["temperature"] - melting) <= SAME_POINT:
        pressure = row.get("pressure")
        return row["temperature"], pressure and float(f"{pressure:.6g}"), ("Published", STAVELEY)
    if record is not None:
        state = record["EOS"][0]
        lowest = state["STATES"]["sat_min_liquid"]
        if abs(state["Ttriple"] - melting) <= SAME_END and abs(lowest["T"] - state["Ttriple"]) < 1e-3:
            return state["Ttriple"], float(f"{lowest['p']:.6g}"), ("Published", paper + ": lower end of the equation" + CARRIED)
    return None


def triple_lines(found):
    if found is None:
        return []
    temperature, pressure, where = found
    known = f"pressure_pa: Some({number(pressure)}), " if pressure else ""
    return [f"triple_point: Some((temperature_k: {number(temperature)}, {known}{source(where)})),"]


def phase_lines(name, cas, record, melting, paper):
    """The lines of the `lines` field; `melting` is the sourced melting point in K, `paper` the equation's in words."""
    body = [
        *triple_lines(triple_point(name, cas, record, melting, paper)),
        *(melting_lines(name, record) if record else []),
        *sublimation_lines(name, cas, melting),
    ]
    return ["lines: (", *("    " + line for line in body), "),"] if body else []


def main(data):
    equations = json.loads((pathlib.Path(data) / "fluid-equations.json").read_text(encoding="utf-8"))
    for name, record in sorted(equations.items()):
        state = record["EOS"][0]["STATES"]["sat_min_liquid"]
        for form, keys, low, high, _ in melting_pieces(name, record)[:1]:
            at = low if name not in ("Water", "HeavyWater") else high
            there = evaluate(form, keys, at)
            print(f"{name}: melting line starts at {at} K with {there:.6g} Pa; equation {state['T']:.4f} K, {state['p']:.6g} Pa")
        if found := sublimation(name, record["INFO"]["CAS"], record["EOS"][0]["Ttriple"]):
            _, low, high, (kind, _), pressure = found
            there = pressure(state["T"])
            print(
                f"{name}: sublimation {kind} {low} to {high:.3f} K; at the equation's end {state['T']:.4f} K {there:.6g} Pa, "
                f"equation {state['p']:.6g} Pa, gap {100 * (there / state['p'] - 1):+.2f} %"
            )


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
