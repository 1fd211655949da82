"""Viscosity: writes the `viscosity` section of a fluid's file. Called by make_fluids.py for every fluid.

What is taken, and why, stands in viscosity_choice.py; the rows of handbook tables in handbook-rows.json. Coefficients of forms
that CoolProp 8.0.0 holds in its program text and not in its data are in HARD_CODED below, under the papers' names.
"""

import json
import math
import pathlib

import viscosity_choice as choice

HERE = pathlib.Path(__file__).resolve().parent
ROWS = json.loads((HERE / "handbook-rows.json").read_text(encoding="utf-8"))

PERRY = "Green, D. W.; Perry, R. H. (eds), Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, table {}, as carried by chemicals 1.5.2"
VDI = "VDI Heat Atlas, 2nd ed., Springer 2010, section D3.1, dynamic viscosity of {}, as carried by chemicals 1.5.2"
VISWANATH = (
    "Viswanath, D. S.; Natarajan, G. 1989, Data Book on the Viscosity of Liquids, three-constant equation, as carried by chemicals 1.5.2"
)

# Largest disagreement of two tables that is taken for their uncertainty.
DISAGREEMENT = 0.15
# The VDI liquid form was compared with reference forms and with Perry's rows: it leaves both above this share of T_c.
VDI_LIQUID_TOP = 0.65
VDI_LIQUID_FOOT = 0.40
# Tables of gases are for low pressure. Against the saturated vapour of the reference forms they are 3 to 10 % low here.
VAPOUR_TOP = 0.80
# The VDI gas polynomials were fitted from about -50 degC up; argon is 19 % off at 84 K, helium by a factor.
VDI_VAPOUR_FOOT = 200.0

NEUFELD_RULE = (1.2593, 0.809)  # Chung et al. 1988: eps/k = T_c/1.2593, sigma/nm = 0.809 (mol/L / rho_c)^(1/3)


def number(value):
    return repr(float(value))


def tuples(*columns):
    rows = zip(*columns, strict=True)
    return "[" + ", ".join("(" + ", ".join(number(cell) for cell in row) + ")" for row in rows) + "]"


def values(*cells):
    return "(" + ", ".join(number(cell) for cell in cells) + ")"


def text(words):
    return json.dumps(words, ensure_ascii=False)


def molecule(form):
    return f"(well_depth_temperature_k: {number(form['epsilon_over_k'])}, diameter_nm: {number(float(repr(form['sigma_eta'])) * 1e9)})"


# ---- reference forms ------------------------------------------------------------------------------------------------


def dilute(form, name):
    part = form["dilute"]
    if "hardcoded" in part:
        return HARD_CODED[part["hardcoded"] + ", dilute"]
    kind = part["type"]
    if kind == "collision_integral":
        return (
            f"CollisionIntegral(c: {number(part['C'])}, molar_mass_g_per_mol: {number(part['molar_mass'] * 1000)}, "
            f"molecule: {molecule(form)}, terms: {tuples(part['a'], part['t'])})"
        )
    if kind == "kinetic_theory":
        return f"LennardJones(molecule: {molecule(form)})"
    if kind == "collision_integral_powers_of_Tstar":
        return (
            f"OverPowers(c: {number(part['C'])}, reducing_temperature_k: {number(part['T_reducing'])}, "
            f"terms: {tuples(part['a'], part['t'])})"
        )
    if kind in ("powers_of_T", "powers_of_Tr"):
        return f"Powers(reducing_temperature_k: {number(part.get('T_reducing', 1))}, terms: {tuples(part['a'], part['t'])})"
    raise ValueError(f"no rule for the dilute gas of {name}: {kind}")


def initial(form, name):
    part = form.get("initial_density")
    if part is None:
        return ""
    if part["type"] == "Rainwater-Friend":
        return f", initial: Some(RainwaterFriend(molecule: {molecule(form)}, terms: {tuples(part['b'], part['t'])}))"
    if part["type"] == "empirical":
        assert part["T_reducing"] == part["rhomolar_reducing"] == 1 and set(part["d"]) == {1}
        return f", initial: Some(Powers(terms: {tuples(part['n'], [-t for t in part['t']])}))"
    raise ValueError(f"no rule for the initial density of {name}: {part['type']}")


def reducing(temperature, density):
    return f"reducing: (temperature_k: {number(temperature)}, density_mol_per_m3: {number(density)})"


def residual(form, name, record):
    part = form["higher_order"]
    if "hardcoded" in part:
        return HARD_CODED[part["hardcoded"] + ", residual"](record)
    if part["type"] == "modified_Batschinski_Hildebrand":
        gamma = [-value for value in part["gamma"]]
        terms = [row for row in zip(part["a"], part["d1"], part["t1"], gamma, part["l"], strict=True) if row[0]]
        shown = [reducing(part["T_reduce"], part["rhomolar_reduce"]), f"terms: {tuples(*zip(*terms))}"]
        if any(part["f"]):
            shown.append(f"free_volume: {tuples(part['f'], part['d2'], part['t2'])}")
            shown.append(f"close_packed: {tuples(part['g'], part['h'])}")
            if part["p"] != [1]:
                shown.append(f"close_packed_under: {tuples(part['p'], part['q'])}")
        return f"FreeVolume({', '.join(shown)})"
    if part["type"] == "friction_theory":
        names = [
            ("ideal", "Ai", None), ("attractive", "Aa", "Na"), ("repulsive", "Ar", "Nr"), ("attractive_squared", "Aaa", "Naa"),
            ("ideal_squared", "Aii", "Nii"), ("thermal_squared", "Arr", "Nrr"), ("repulsive_squared", "Adrdr", "Nrr"),
            ("attractive_cubed", "Aaaa", "Naaa"), ("thermal_cubed", "Arrr", "Nrrr"),
        ]
        shown = [f"reducing_temperature_k: {number(part['T_reduce'])}", f"c1: {number(part['c1'])}", f"c2: {number(part['c2'])}"]
        for ours, theirs, power in names:
            if theirs in part:
                cells = values(*part[theirs], part[power] if power else 1)
                always = ours in ("ideal", "attractive", "repulsive", "attractive_squared")
                shown.append(f"{ours}: {cells}" if always else f"{ours}: Some({cells})")
        return f"Friction(({', '.join(shown)}))"
    raise ValueError(f"no rule for the residual of {name}: {part['type']}")


def fractions(temperature, density, terms):
    shown = []
    for over, under in terms:
        below = f", under: {tuples(*zip(*under))}" if under else ""
        shown.append(f"(over: {tuples(*zip(*over))}{below})")
    return f"Fractions({reducing(temperature, density)}, terms: [{', '.join(shown)}])"


def scaled(terms):
    """delta^(2/3) sqrt(T_r) times the fractions, multiplied out above; micropascal seconds."""
    return [([(n * 1e-6, d + 2 / 3, t + 0.5) for n, d, t in over], under) for over, under in terms]


def molar_mass(record):
    return record["EOS"][0]["molar_mass"]


def benzene(record):
    return fractions(562.02, 304.792 / molar_mass(record), scaled([
        ([(-9.98945, 2, 0)], []),
        ([(86.06260, 1, 0)], [(2.74872, 0, 0), (1.11130, 0, 1), (-1.0, 1, 0)]),
        ([(-134.1330, 1, 0), (-352.473, 2, 0)], [(6.60989, 0, 0), (88.4174, 2, 0)]),
    ]))


def toluene(record):
    return fractions(591.75, 291.987 / molar_mass(record), scaled([
        ([(19.919216, 1, -1), (-2.6557905, 4, -1), (-10.113817, 1, 0)], []),
        ([(-135.904211, 3, 0)], [(1.0, 2, 0), (-7.9962719, 0, 0), (-11.014795, 0, 1)]),
    ]))


def hexane(record):
    return fractions(507.82, 233.182 / molar_mass(record), scaled([
        ([(2.53402335, 0, -1)], []),
        ([(-9.724061002, 0, 0)], [(0.469437316, 0, 0), (1.0, 0, 1), (158.5571631, 2, 0)]),
        ([(72.42916856, 0, 0), (72.42916856, 1, 0)],
         [(10.60751253, 0, 0), (8.628373915, 0, 1), (-6.61346441, 1, 0), (1.0, 2, 0), (-2.212724566, 1, 1)]),
    ]))


def heptane(record):
    return fractions(540.13, 232 / molar_mass(record), scaled([
        ([(22.15000, 1, 0), (-15.00870, 2, 0), (3.71791, 3, 0)], []),
        ([(77.72818, 1, 0)], [(9.73449, 0, 0), (9.51900, 0, 1), (-6.34076, 1, 0), (1.0, 2, 0), (-2.51909, 1, 1)]),
    ]))


def ethane(record):
    g = [0.47177003, -0.23950311, 0.39808301, -0.27343335, 0.35192260, -0.21101308, -0.00478579, 0.07378129, -0.030435255]
    r, s = [1, 1, 2, 2, 2, 3, 3, 4, 4], [0, 1, 0, 1, 1.5, 0, 2, 0, 1]
    over = [(15.977e-6 * n, d, -t) for n, d, t in zip(g, r, s, strict=True)]
    return fractions(305.33, 6870, [(over, [(1.0, 0, 0), (-0.30435286, 1, 0), (0.001215675, 1, -1)])])


def carbon_dioxide(record):
    """Laesecke and Muzny's residual, its scale eta_tL made of the triple point, the gas constant and the molar mass."""
    state = record["EOS"][0]
    triple, gas_constant, mass = state["Ttriple"], state["gas_constant"], state["molar_mass"]
    liquid = 1178.53
    scale = liquid ** (2 / 3) * math.sqrt(gas_constant * triple) / (mass ** (1 / 6) * 84446887.43579945)
    c1, c2, power = 0.360603235428487, 0.121550806591497, 8.06282737481277
    return fractions(triple, liquid / mass, [
        ([(scale * c1, 3, 1)], []),
        ([(scale, 2, 0), (scale, power, 0)], [(1.0, 0, 1), (-c2, 0, 0)]),
    ])


def hydrogen(record):
    density = 1 / 0.011 / molar_mass(record)
    return (
        f"Hydrogen({reducing(33.145, density)}, c: 6.43449673e-6, "
        f"a: {values(4.56334068e-2, 2.32797868e-1, 9.58326120e-1, 1.27941189e-1, 3.63576595e-1)})"
    )


XYLENE_SECTION = tuples([-1.4933, 473.2, -57033.0], [0, -1, -2])
XYLENE_SLOPE = tuples([13.2814e-9, -10862.4e-9, 1664060e-9], [0, -1, -2])


def xylene(c, residual_part):
    return (
        f"Sum(dilute: CrossSection(c: {number(c * 1e-6)}, terms: {XYLENE_SECTION}), "
        f"initial: Some(Powers(terms: {XYLENE_SLOPE})), residual: {residual_part})"
    )


def cao(temperature, density, d, n, e, k):
    """Both xylenes of Cao et al.: D and E of the paper's terms, their exponents n and k."""
    terms = [
        (d[0], n[0], 0), (e[0], n[0], -k[0]), (d[1], n[1], 0), (e[2], n[2], -k[2]),
        (d[3], 1 + n[3], 0), (e[3], n[3], 1), (d[4], n[4], 0),
    ]
    return fractions(temperature, density, scaled([(terms, [])]))


def p_xylene():
    first = [(122.919, 1.5), (-282.329, 2), (279.348, 3), (-146.776, 4), (28.361, 5), (-0.004585, 11)]
    second = [(15.337, 1.5), (-0.0004382, 11), (0.00002307, 15)]
    terms = [(n * 1e-6, d + 2 / 3, 0) for n, d in first] + [(n * 1e-6, d + 2 / 3, -0.5) for n, d in second]
    return fractions(616.168, 2693.92, [(terms, [])])


def iapws_water():
    h = [
        (5.20094e-1, 0, 0), (8.50895e-2, 1, 0), (-1.08374, 2, 0), (-2.89555e-1, 3, 0), (2.22531e-1, 0, 1), (9.99115e-1, 1, 1),
        (1.88797, 2, 1), (1.26613, 3, 1), (1.20573e-1, 5, 1), (-2.81378e-1, 0, 2), (-9.06851e-1, 1, 2), (-7.72479e-1, 2, 2),
        (-4.89837e-1, 3, 2), (-2.57040e-1, 4, 2), (1.61913e-1, 0, 3), (2.57399e-1, 1, 3), (-3.25372e-2, 0, 4), (6.98452e-2, 3, 4),
        (8.72102e-3, 4, 5), (-4.35673e-3, 3, 6), (-5.93264e-4, 5, 6),
    ]
    residual_part = "[" + ", ".join(f"({number(a)}, {i}, {j})" for a, i, j in h) + "]"
    dilute_part = tuples([1.67752, 2.20462, 0.6366564, -0.241605], [0, 1, 2, 3])
    return (
        f"Iapws((reference_temperature_k: 647.096, reference_density_kg_per_m3: 322.0, reference_viscosity: 1e-4, dilute: {dilute_part}, "
        f"residual: {residual_part}, critical: Some((reference_pressure_pa: 22.064e6, exponent: 0.068, amplitude_nm: 0.13, cut_off_c_nm: 1.9, "
        "cut_off_d_nm: 1.1, susceptibility: 0.06, nu: 0.630, gamma: 1.239, reference_reduced: 1.5, series_below_nm: 0.3817016416))))"
    )


def iapws_heavy_water():
    i = [0, 1, 2, 3, 4, 5, 0, 1, 2, 3, 0, 1, 2, 5, 0, 1, 2, 3, 0, 1, 3, 5, 0, 1, 5, 3]
    j = [0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2, 3, 3, 3, 3, 4, 4, 4, 4, 5, 5, 5, 6]
    b = [
        0.4864192, -0.2448372, -0.8702035, 0.8716056, -1.051126, 0.3458395, 0.3509007, 1.315436, 1.297752, 1.353448, -0.2847572,
        -1.037026, -1.287846, -0.02148229, 0.07013759, 0.4660127, 0.2292075, -0.4857462, 0.01641220, -0.02884911, 0.1607171,
        -0.009603846, -0.01163815, -0.008239587, 0.004559914, -0.003886659,
    ]
    residual_part = "[" + ", ".join(f"({number(a)}, {x}, {y})" for a, x, y in zip(b, i, j, strict=True)) + "]"
    dilute_part = tuples([1.0, 0.940695, 0.578377, -0.202044], [0, 1, 2, 3])
    return (
        "Iapws((reference_temperature_k: 643.847, reference_density_kg_per_m3: 358.0, reference_viscosity: 55.2651e-6, "
        f"dilute: {dilute_part}, residual: {residual_part}))"
    )


def helium():
    whole = [0, 1, 2, 3]
    return (
        f"Helium((dilute: {tuples([-0.135311743, 1.00347841, 1.20654649, -0.149564551, 0.012520841], [-1, *whole])}, "
        f"first: {tuples([-47.5295259, 87.6799309, -42.0741589, 8.33128289, -0.589252385], [-1, *whole])}, "
        f"second: {tuples([547.309267, -904.870586, 431.404928, -81.4504854, 5.37008433], [-1, *whole])}, "
        f"third: {tuples([-1684.39324, 3331.08630, -1632.19172, 308.804413, -20.2936367], [-1, *whole])}, "
        f"warmest_temperature_k: 300.0, joint_temperature_k: 100.0, warm: {values(196, 0.71938, -4.1249, 12.451, -295.67)}))"
    )


def methanol():
    b = [-19.572881, 219.73999, -1015.3226, 2471.01251, -3375.1717, 2491.6597, -787.26086, 14.085455, -0.34664158]
    t = [0, -0.25, -0.5, -0.75, -1.0, -1.25, -1.5, -2.5, -5.5]
    d = [-1.181909, 0.5031030, -0.6268461, 0.5169312, -0.2351349, 5.3980235e-2, -4.9069617e-3]
    e = [4.018368, -4.239180, 2.245110, -0.5750698, 2.3021026e-2, 2.5696775e-2, -6.8372749e-3, 7.2707189e-4, -2.9255711e-5]
    return (
        "Methanol((molecule: (well_depth_temperature_k: 577.87, diameter_nm: 0.3408), molar_mass_g_per_mol: 32.04216, polarity: 0.4575, "
        f"stockmayer: ({values(0.10225, -0.97346)}, {values(0.10657, -0.34528)}, {values(-0.44557, -2.58055)}, 0.95976e-3), "
        f"second: {tuples(b, t)}, third: {values(1.86222085e-3, 9.990338)}, critical_temperature_k: 512.6, "
        f"critical_density_kg_per_m3: 273.0, hard_sphere_nm: 0.7193422, by_temperature: {tuples(d, [-i for i in range(7)])}, "
        f"by_density: {tuples(e, range(1, 10))}, steepness: 5.0))"
    )


def r23():
    integral = tuples([0.4425728, -0.5138403, 0.1547566, -0.02821844, 0.001578286], range(5))
    return (
        "Shan((molecule: (well_depth_temperature_k: 243.91, diameter_nm: 0.4278), molar_mass_g_per_mol: 70.014, "
        f"integral: {integral}, c1: 1.3163, c2: 0.1832, activation_j_per_mol: 771.23, densest_mol_per_l: 32.174, "
        "critical_mol_per_l: 7.5114, critical_temperature_k: 299.2793, critical_excess: 3.967, gas_constant_j_per_mol_k: 8.31451))"
    )


ETHANE_GAS = [
    -3.0328138281, 16.918880086, -37.189364917, 41.288861858, -24.615921140, 8.9488430959, -1.8739245042, 0.20966101390,
    -9.6570437074e-3,
]
HARD_CODED = {
    "Water": iapws_water(),
    "HeavyWater": iapws_heavy_water(),
    "Helium": helium(),
    "Methanol": methanol(),
    "R23": r23(),
    "o-Xylene": xylene(0.22225, cao(
        630.259, 2684.5, [-2.05581e-3, 2.38762, 0, 10.4497, 15.9587], [10.3, 3.3, 25, 0.7, 0.4],
        [2.65651e-3, 0, 1.77616e-12, -18.2446, 0], [0.8, 0, 4.4])),
    "m-Xylene": xylene(0.22115, cao(
        616.89, 2665, [-0.268950, -0.0290018, 0, 14.7728, 17.1128], [6.8, 3.3, 22.0, 0.6, 0.4],
        [0.320971, 0, 1.72866e-10, -18.9852, 0], [0.3, 0, 3.2])),
    "p-Xylene": xylene(0.22005, p_xylene()),
    "Ethane, dilute": "Powers(reducing_temperature_k: 245.0, terms: "
    + tuples([12.0085e-6 * c for c in ETHANE_GAS], [i / 3 - 0.5 for i in range(9)]) + ")",
    "Cyclohexane, dilute": f"CrossSection(c: 0.19592e-6, terms: {tuples([-1.5093, 364.87, -39537], [0, -1, -2])})",
    "CarbonDioxideLaeseckeJPCRD2017, dilute": "LaeseckeMuzny(c: 0.0010055, a: " + values(
        1749.354893188350, -369.069300007128, 5423856.34887691, -2.21283852168356, -269503.247933569, 73145.021531826,
        5.34368649509278) + ")",
    "Benzene, residual": benzene,
    "Toluene, residual": toluene,
    "n-Hexane, residual": hexane,
    "n-Heptane, residual": heptane,
    "Ethane, residual": ethane,
    "CarbonDioxideLaeseckeJPCRD2017, residual": carbon_dioxide,
    "Hydrogen, residual": hydrogen,
}


def residual_entropy(form, record):
    point = record["EOS"][0]["STATES"]["reducing"]
    depth, size = NEUFELD_RULE
    spheres = {"epsilon_over_k": point["T"] / depth, "sigma_eta": size * (point["rhomolar"] / 1000) ** (-1 / 3) * 1e-9}
    return (
        f"ResidualEntropy((molecule: {molecule(spheres)}, scale: {number(form['C'])}, critical: {number(form['rhosr_critical'])}, "
        f"liquid: {values(*form['c_liq'])}, vapour: {values(*form['c_vap'])}, crossover: {number(form['x_crossover'])}, steepness: 100.0))"
    )


def conformal(form):
    like = choice.REFERENCE_FLUIDS[form["reference_fluid"]]
    psi = form["psi"]
    powers = psi["t"][:len(psi["a"])]  # ethylbenzene carries one exponent more than coefficients
    return (
        f"ConformalFluid((like: {text(like)}, molecule: {molecule(form)}, reducing_density_mol_per_m3: {number(psi['rhomolar_reducing'])}, "
        f"stretch: {tuples(psi['a'], powers)}))"
    )


def reference_form(name, record):
    """The form's text, or None where none is taken."""
    if name not in choice.PAPERS:
        return None
    carried = choice.form_taken(name, record)
    if "hardcoded" in carried:
        return HARD_CODED[carried["hardcoded"]]
    kind = carried.get("type")
    if kind == "rhosr-CS":
        return residual_entropy(carried, record)
    if kind == "ECS":
        return conformal(carried)
    return f"Sum(dilute: {dilute(carried, name)}{initial(carried, name)}, residual: {residual(carried, name, record)})"


def reference_lines(name, record, lowest, highest):
    form = reference_form(name, record)
    if form is None:
        return []
    low, _, uncertainty, paper = choice.PAPERS[name]
    low, high = max(low or 0, lowest), min(choice.highest_temperature(name, record), highest)
    return [
        "reference: Some((",
        f"    form: {form},",
        f"    temperature_range_k: ({number(low)}, {number(high)}),",
        f"    uncertainty: {text(uncertainty)},",
        f"    source: Published({text(choice.CARRIED.format(paper))}),",
        ")),",
    ]


# ---- tables ---------------------------------------------------------------------------------------------------------


def dippr_101(row, t):
    return math.exp(row["C1"] + row["C2"] / t + row["C3"] * math.log(t) + row["C4"] * t ** row["C5"])


def ppds_9(row, t):
    x = (row["C"] - t) / (t - row["D"])
    third = math.copysign(abs(x) ** (1 / 3), x)
    return row["E"] * math.exp(row["A"] * third + row["B"] * x * third)


def agreeing(row, other, low, high, top):
    """The range round its middle in which two rows agree, and their greatest disagreement there. Above `top` the other is silent."""
    grid = [low + (high - low) * k / 200 for k in range(201)]
    off = [abs(ppds_9(other, t) / dippr_101(row, t) - 1) if t <= top else 0.0 for t in grid]
    middle = min(range(201), key=lambda k: abs(grid[k] - min(0.5 * (low + min(high, top)), top)))
    if off[middle] > DISAGREEMENT:
        return None
    first = last = middle
    while first > 0 and off[first - 1] <= DISAGREEMENT:
        first -= 1
    while last < 200 and off[last + 1] <= DISAGREEMENT:
        last += 1
    return grid[first], grid[last], max(off[first:last + 1])


def table(form, cells, low, high, source):
    low, high = math.ceil(low * 100) / 100, math.floor(high * 100) / 100
    kind, words = source
    return f"(form: {form}{values(*cells)}, temperature_range_k: ({number(low)}, {number(high)}), source: {kind}({text(words)})),"


def liquid_tables(cas, rows, critical, melting):
    if cas in choice.METALS:
        form, cells, reach, source = choice.METALS[cas]
        return [table(form, cells, *reach, source)]
    narrowed = choice.NARROWED.get((cas, "liquid"), (0.0, math.inf))
    if narrowed is None:
        return []
    perry, vdi = rows.get("mu_data_Perrys_8E_2_313"), rows.get("mu_data_VDI_PPDS_7")
    found = []
    if perry:
        low, high = max(perry["Tmin"], narrowed[0]), min(perry["Tmax"], narrowed[1])
        words = PERRY.format("2-313")
        reach = (low, high, None)
        if vdi and low < VDI_LIQUID_TOP * critical:
            reach = agreeing(perry, vdi, low, high, VDI_LIQUID_TOP * critical)
            if reach:
                share = max(1, math.ceil(100 * reach[2]))
                words += f"; the VDI Heat Atlas agrees within {share} % up to {min(high, VDI_LIQUID_TOP * critical):.0f} K"
        if reach:
            found.append(table("Dippr101", [perry[f"C{k}"] for k in range(1, 6)], reach[0], reach[1], ("Published", words)))
    elif vdi:
        low = max(melting, VDI_LIQUID_FOOT * critical, vdi["D"] + 20)
        high = VDI_LIQUID_TOP * critical
        if low < high:
            words = VDI.format("saturated liquids") + "; no range is printed with the row: used from the melting point or 0.40 T_c to 0.65 T_c"
            found.append(table("Ppds9", [vdi[key] for key in "ABCDE"], low, high, ("Published", words)))
    row = rows.get("mu_data_VN3")
    if row and cas in choice.VISWANATH_TAKEN:
        found.append(table("Viswanath", [row[key] for key in "ABC"], row["Tmin"], row["Tmax"], ("Published", VISWANATH)))
    return found


def vapour_tables(cas, rows, critical):
    if choice.NARROWED.get((cas, "vapour"), ()) is None:
        return []
    perry, vdi = rows.get("mu_data_Perrys_8E_2_312"), rows.get("mu_data_VDI_PPDS_8")
    top = VAPOUR_TOP * critical
    low_pressure = "; of the gas at low pressure, used at saturation up to 0.80 T_c, where it is up to 10 % low"
    if perry and perry["Tmin"] < top:
        cells = [perry[f"C{k}"] for k in range(1, 5)]
        words = PERRY.format("2-312") + low_pressure
        return [table("Dippr102", cells, perry["Tmin"], min(perry["Tmax"], top), ("Published", words))]
    if vdi and VDI_VAPOUR_FOOT < top:
        words = VDI.format("gases") + "; no range is printed with the row: used from 200 K" + low_pressure
        return [table("Polynomial", [vdi[key] for key in "ABCDE"], VDI_VAPOUR_FOOT, top, ("Published", words))]
    return []


# ---- the section ----------------------------------------------------------------------------------------------------


def viscosity_lines(name, cas, record, critical, melting, lowest, highest):
    """The lines of the `viscosity` field. `record` is the equation's, or None for a correlated fluid; temperatures in K:
    critical and melting point, and the ends of the equation's range (None for a correlated fluid)."""
    rows = ROWS.get(cas.rstrip("op"), {})
    reference = reference_lines(name, record, lowest, highest) if record else []
    allowed = choice.TABLES_BESIDE_A_FORM.get(name, ()) if reference else ("liquid", "vapour")
    liquid = liquid_tables(cas.rstrip("op"), rows, critical, melting) if "liquid" in allowed else []
    vapour = vapour_tables(cas.rstrip("op"), rows, critical) if "vapour" in allowed else []
    body = list(reference)
    for key, lines in (("liquid", liquid), ("vapour", vapour)):
        if lines:
            body += [f"{key}: [", *("    " + line for line in lines), "],"]
    return ["viscosity: (", *("    " + line for line in body), "),"] if body else []
