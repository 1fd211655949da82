"""Writes assets/fluids/<id>.ron from published coefficients and from the facts beside this script.

    python3 -m venv target/venv
    target/venv/bin/pip install mpmath==1.3.0
    target/venv/bin/python tests/reference/make_fluids.py <folder with fluid-equations.json and correlation-coefficients.json>

The coefficients are those that CoolProp 8.0.0 carries (see assets/fluids/NOTICE.txt). What a person has to know and cite
(melting point, hazards, limits) stands in facts/<id>.json, the papers and what they promise in papers.json. Two things are computed here:
the equation's own critical point, and the highest density at which the equation may be asked. Only mpmath is needed.
Running it twice writes the same bytes.
"""

import json
import pathlib
import sys

from mpmath import findroot, mp, mpf

import correlated
import metals
import phase_lines
import viscosity
from helmholtz import Equation, load_equations

HERE = pathlib.Path(__file__).resolve().parent
ASSETS = HERE.parent.parent / "assets" / "fluids"
EQUATIONS = HERE / "equations"

# Equations that only the tests read: they bring in the term forms that the catalogue does not use.
TEST_ONLY = {
    "hfe-143m": "HFE143m",        # constant and polynomial heat capacity in powers of kelvin
    "fluorine": "Fluorine",       # exponential residual terms, generalised Planck-Einstein
}


# ---- RON text -------------------------------------------------------------------------------------------------------


def number(value):
    """Shortest text that reads back as the same double."""
    return repr(float(value))


def numbers(values):
    return "[" + ", ".join(number(value) for value in values) + "]"


def text(value):
    return json.dumps(value, ensure_ascii=False)


def source(fact):
    """Published, Memory or Practice, whichever the fact names; exactly one of them."""
    (kind,) = [kind for kind in ("Published", "Memory", "Practice") if kind in fact]
    return f"{kind}({text(fact[kind])})"


def sourced(fact):
    value = fact["value"]
    if isinstance(value, list):
        shown = "[" + ", ".join(text(item) for item in value) + "]"
    elif isinstance(value, str):
        shown = text(value)
    else:
        shown = number(value)
    return f"(value: {shown}, source: {source(fact)})"


def field(key, shown):
    return [f"{key}: {shown},"]


def optional(key, fact, show=sourced):
    """A fact that is not known is left out: a gap stays a gap."""
    return [] if fact is None else [f"{key}: Some({show(fact)}),"]


def block(opening, lines, closing):
    return [opening, *("    " + line for line in lines), closing]


def lists(term, names):
    """`name: [...]` for each coefficient list, renamed plainly."""
    return ", ".join(f"{ours}: {numbers(term[theirs])}" for ours, theirs in names)


def plain(*names):
    return [(name, name) for name in names]


# ---- terms ----------------------------------------------------------------------------------------------------------


def ideal_term(term):
    kind = term["type"].removeprefix("IdealGasHelmholtz")
    own_gas_constant = f", gas_constant: Some({number(term['R'])})" if "R" in term else ""
    if kind == "Lead":
        return f"Lead(a1: {number(term['a1'])}, a2: {number(term['a2'])})"
    if kind == "EnthalpyEntropyOffset":
        return f"Offset(a1: {number(term['a1'])}, a2: {number(term['a2'])})"
    if kind == "LogTau":
        return f"LogTau(a: {number(term['a'])})"
    if kind == "Power":
        return f"Power({lists(term, plain('n', 't'))})"
    if kind == "PlanckEinstein":
        return f"PlanckEinstein({lists(term, [('n', 'n'), ('theta', 't')])})"
    if kind == "PlanckEinsteinGeneralized":
        return f"PlanckEinsteinGeneral({lists(term, [('n', 'n'), ('theta', 't'), ('c', 'c'), ('d', 'd')])})"
    if kind == "PlanckEinsteinFunctionT":
        return (
            f"PlanckEinsteinKelvin({lists(term, [('n', 'n'), ('v_k', 'v')])}, "
            f"critical_temperature_k: {number(term['Tcrit'])}{own_gas_constant})"
        )
    at = f"critical_temperature_k: {number(term['Tc'])}, t0_k: {number(term['T0'])}"
    if kind == "CP0Constant":
        return f"HeatCapacityConstant(cp_over_r: {number(term['cp_over_R'])}, {at})"
    if kind == "CP0PolyT":
        return f"HeatCapacityPoly({lists(term, plain('c', 't'))}, {at}{own_gas_constant})"
    if kind == "CP0AlyLee":
        return f"HeatCapacityAlyLee(c: {numbers(term['c'])}, {at})"
    raise ValueError(f"no rule for the ideal-gas term {kind}")


RESIDUAL_FIELDS = {
    "Power": plain("n", "t", "d", "l"),
    "Exponential": plain("n", "t", "d", "g", "l"),
    "Gaussian": plain("n", "t", "d", "eta", "epsilon", "beta", "gamma"),
    "NonAnalytic": plain("n", "a", "b", "beta") + [("big_a", "A"), ("big_b", "B"), ("big_c", "C"), ("big_d", "D")],
    "GaoB": plain("n", "t", "d", "eta", "epsilon", "beta", "gamma", "b"),
    "DoubleExponential": plain("n", "t", "d", "gd", "ld", "gt", "lt"),
    "Lemmon2005": plain("n", "t", "d", "l", "m"),
}


def residual_term(term):
    kind = term["type"].removeprefix("ResidualHelmholtz")
    names = RESIDUAL_FIELDS[kind]
    lengths = {len(term[theirs]) for _, theirs in names}
    assert len(lengths) == 1, f"lists of unequal length in {kind}"
    return f"{kind}({lists(term, names)})"


def ancillary(term):
    form = "Linear" if term["type"] == "rhoLnoexp" else "Exponential"
    return (
        f"(form: {form}, tau_first: {str(term['using_tau_r']).lower()}, "
        f"reducing_temperature_k: {number(term['T_r'])}, reducing: {number(term['reducing_value'])}, "
        f"n: {numbers(term['n'])}, t: {numbers(term['t'])})"
    )


# ---- one equation ---------------------------------------------------------------------------------------------------


def lower_limit(record):
    """The equation's lower limit: CoolProp's lowest saturation state, which is never below the stated triple point."""
    lowest = record["STATES"]["sat_min_liquid"]["T"]
    return max(float(f"{lowest:.6f}"), record["Ttriple"])


def own_critical_point(equation, record):
    """Temperature, density and pressure where the equation's own isotherm has its flat inflection."""
    if equation.is_non_analytic:
        # The critical-region terms make the third derivative singular; both equations were made to pass through this point.
        temperature, density = equation.reducing_temperature, equation.reducing_density
    else:
        states = record["STATES"]["critical"]
        temperature, density = equation.critical_point(states["T"], states["rhomolar"])
        assert abs(temperature / mpf(states["T"]) - 1) < 0.01, "the critical point found is not the published one"
    return temperature, density, equation.pressure(temperature, density)


def over_the_dome(stated, critical, share):
    """The paper's limit; where it ends below the top of the dome, a little above that.

    R-161: 5 MPa against 5.01 MPa. R-236ea: 412 K against 412.41 K.
    """
    return stated if stated > critical else float(f"{share * float(critical):.4g}")


def highest_density(equation, record, lowest):
    """The larger of 1.05 saturated liquid densities at the lower limit and the density at (lower limit, highest pressure)."""
    liquid = mpf(record["EOS"][0]["STATES"]["sat_min_liquid"]["rhomolar"])
    highest_pressure = mpf(record["EOS"][0]["p_max"])
    digits, mp.dps = mp.dps, 25
    try:
        upper = liquid
        while equation.pressure(lowest, upper) < highest_pressure:
            upper *= mpf("1.02")
        squeezed = liquid
        if upper > liquid:
            squeezed = findroot(
                lambda density: equation.pressure(lowest, density) / highest_pressure - 1,
                (upper / mpf("1.02"), upper), solver="anderson", tol=1e-12,
            )
    finally:
        mp.dps = digits
    return float(f"{float(max(squeezed, mpf('1.05') * liquid)):.6g}")


def equation_lines(record, papers, uncertainty=None, pressure_percent=None):
    """The lines inside `Helmholtz(( ... ))`; a paper on many fluids states its uncertainty fluid by fluid."""
    state = record["EOS"][0]
    equation = Equation(state)
    paper = papers[state["BibTeX_EOS"]]
    lowest = lower_limit(state)
    temperature, density, pressure = own_critical_point(equation, record)
    doi = f", doi: Some({text(paper['doi'])})" if "doi" in paper else ""
    curves = record["ANCILLARIES"]
    return [
        f"source: (authors: {text(paper['authors'])}, year: {paper['year']}, title: {text(paper['title'])}, "
        f"publication: {text(paper['publication'])}{doi}),",
        f"temperature_range_k: ({number(lowest)}, {number(over_the_dome(state['T_max'], temperature, 1.001))}),",
        f"highest_pressure_pa: {number(over_the_dome(state['p_max'], pressure, 1.01))},",
        "// the larger of 1.05 saturated liquid densities at the lower limit and the density at (lower limit, highest pressure)",
        f"highest_density_mol_per_m3: {number(highest_density(equation, record, lowest))},",
        f"uncertainty: {text(uncertainty or paper['uncertainty'])},",
        *optional("pressure_uncertainty_percent", pressure_percent, number),
        f"gas_constant_j_per_mol_k: {number(state['gas_constant'])},",
        f"reducing: (temperature_k: {number(equation.reducing_temperature)}, "
        f"density_mol_per_m3: {number(equation.reducing_density)}),",
        "// the equation's own critical point"
        + (", its reducing point (non-analytic terms)" if equation.is_non_analytic else ": dp/drho = d2p/drho2 = 0"),
        f"critical: (temperature_k: {number(temperature)}, density_mol_per_m3: {number(density)}, "
        f"pressure_pa: {number(pressure)}),",
        *block("ideal: [", [ideal_term(term) + "," for term in state["alpha0"]], "],"),
        *block("residual: [", [residual_term(term) + "," for term in state["alphar"]], "],"),
        *block("ancillary: (", [
            f"pressure: {ancillary(curves['pS'])},",
            f"liquid_density: {ancillary(curves['rhoL'])},",
            f"vapour_density: {ancillary(curves['rhoV'])},",
        ], "),"),
    ]


def end_of_tension(curve):
    """Highest temperature at which the correlation is a surface tension: its critical temperature, unless it falls
    below zero before. Then it bends away from the usual power, near 1.2, well before its zero, and ends at three times
    its zero's distance from there (a choice, no source; sulphur dioxide loses most, all above 0.91 of the critical)."""
    def sigma(theta):
        return sum(a * theta**n for a, n in zip(curve["a"], curve["n"]))

    below = [theta for theta in (10 ** (-i / 50) for i in range(50, 300)) if sigma(theta) < 0]
    return float(f"{curve['Tc'] * (1 - 3 * max(below)):.6g}") if below else curve["Tc"]


def surface_tension(record, papers):
    """The correlation, in the range it shares with the equation."""
    curve = record["ANCILLARIES"].get("surface_tension")
    if curve is None:
        return []
    lowest = lower_limit(record["EOS"][0])
    critical, _, _ = own_critical_point(Equation(record["EOS"][0]), record)
    highest = min(end_of_tension(curve), float(critical))
    return [
        f"surface_tension: Some((critical_temperature_k: {number(curve['Tc'])}, a: {numbers(curve['a'])}, "
        f"n: {numbers(curve['n'])}, temperature_range_k: ({number(lowest)}, {number(highest)}), "
        f"source: Published({text(papers[curve['BibTeX']])}))),"
    ]


def transport_and_lines(facts, cas, record, papers, critical=None):
    """The sections `viscosity` and `lines`; `record` is None for a correlated fluid, `critical` its critical temperature."""
    name, melting = facts["data"], facts["melting_point_k"]["value"]
    lowest, highest, paper = None, None, None
    if record is not None:
        state = record["EOS"][0]
        lowest, highest, critical = lower_limit(state), state["T_max"], state["STATES"]["reducing"]["T"]
        cited = papers[state["BibTeX_EOS"]]
        paper = f"{cited['authors']} {cited['year']}, {cited['publication']}"
    return [
        *viscosity.viscosity_lines(name, cas, record, critical, melting, lowest, highest),
        *phase_lines.phase_lines(name, cas, record, melting, paper),
    ]


# ---- one fluid ------------------------------------------------------------------------------------------------------


def stability(notes):
    if not notes:
        return ["stability: [],"]
    return block("stability: [", [
        f"(kind: {item['kind']}, note: {text(item['note'])}, source: {source(item)})," for item in notes
    ], "],")


def safety_lines(facts):
    get = facts.get
    return block("safety: (", [
        *optional("group", get("group")),
        *field("statements", sourced(facts["statements"])),
        *optional("lower_flammable_limit", get("lower_flammable_limit")),
        *optional("upper_flammable_limit", get("upper_flammable_limit")),
        *optional("flash_point_k", get("flash_point_k")),
        *optional("autoignition_k", get("autoignition_k")),
        *optional("exposure_limit_ppm", get("exposure_limit_ppm")),
        *optional("short_term_limit_ppm", get("short_term_limit_ppm")),
        *optional("immediately_dangerous_ppm", get("immediately_dangerous_ppm")),
        *optional("consumer_restriction", get("consumer_restriction")),
        *optional("gwp_100", get("gwp_100")),
        *stability(get("stability")),
        *optional("highest_stable_temperature_k", get("highest_stable_temperature_k")),
    ], "),")


def fluid_file(identity, facts, cas, molar_mass, model, borders):
    also = "[" + ", ".join(text(name) for name in facts["also"]) + "]"
    body = [
        "format: 1,",
        f"id: {text(identity)},",
        f"name: {text(facts['name'])},",
        f"also: {also},",
        f"cas: {text(cas)},",
        *optional("refrigerant", facts.get("refrigerant"), text),
        f"formula: {text(facts['formula'])},",
        f"molar_mass_kg_per_mol: {number(molar_mass)},",
        f"melting_point_k: {sourced(facts['melting_point_k'])},",
        *optional("solid_density_kg_per_m3", facts.get("solid_density_kg_per_m3")),
        *model,
        *borders,
        *safety_lines(facts),
    ]
    first = "// Written by tests/reference/make_fluids.py; do not edit by hand."
    return "\n".join([first, *block("(", body, ")")]) + "\n"


def read(path):
    return json.loads((HERE / path).read_text(encoding="utf-8"))


def main(data):
    data = pathlib.Path(data)
    equations = load_equations(data / "fluid-equations.json")
    papers = read("papers.json")
    papers, tension_papers = papers["equations"], papers["surface_tension"]
    ASSETS.mkdir(parents=True, exist_ok=True)
    EQUATIONS.mkdir(parents=True, exist_ok=True)

    for path in sorted((HERE / "facts").glob("*.json")):
        identity, fluid = path.stem, read(path)
        if fluid["data"] in equations:
            record = equations[fluid["data"]]
            cas, molar_mass = record["INFO"]["CAS"], record["EOS"][0]["molar_mass"]
            model = block("model: Helmholtz((", equation_lines(
                record, papers, fluid.get("uncertainty"), fluid.get("pressure_uncertainty_percent"),
            ), ")),")
            borders = surface_tension(record, tension_papers) + transport_and_lines(fluid, cas, record, papers)
        else:
            forms = metals if fluid["data"] in metals.ELEMENTS else correlated
            coefficients = forms.record(data / "correlation-coefficients.json", fluid["data"])
            cas, molar_mass = coefficients["CAS"], float(f"{coefficients['MW']['value']}e-3")
            model = block("model: Correlated((", forms.model_lines(coefficients, number, numbers, text), ")),")
            borders = forms.surface_tension_lines(coefficients, number, numbers, text)
            borders += transport_and_lines(fluid, cas, None, papers, coefficients["Tc"]["value"])
        (ASSETS / f"{identity}.ron").write_text(
            fluid_file(identity, fluid, cas, molar_mass, model, borders), encoding="utf-8"
        )
        print(f"assets/fluids/{identity}.ron")

    for identity, name in TEST_ONLY.items():
        record = equations[name]
        first = "// Written by tests/reference/make_fluids.py; do not edit by hand. Read by tests only."
        lines = [first, *block("(", equation_lines(record, papers), ")")]
        (EQUATIONS / f"{identity}.ron").write_text("\n".join(lines) + "\n", encoding="utf-8")
        print(f"tests/reference/equations/{identity}.ron")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
