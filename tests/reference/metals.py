"""Mercury, sulfur and the alkali metals of alkali_metals.py: what make_fluids.py writes, and how the sources compare.

The tables for metals that the packages carry hold to about 100 Pa only and are 7 to 15 % off at the boiling point.

Mercury. Huber, Laesecke and Friend 2006; the vapour is an ideal monatomic gas.
Sulfur. Vapour pressure and density of the VDI Heat Atlas; other rows of the packages under its name are hydrogen sulfide's.
The vapour is S2 to S8 in equilibrium by McBride et al.; the latent heat that follows at the boiling point is 286 kJ/kg.

Disagreements count where the pressure is above 1 Pa: below that it loads no wall, and the sources for alkali metals differ
by some 10 %. McBride et al. count up to 3 bar, as their gas is ideal.

Run by itself it prints the comparison:  metals.py <folder with correlation-coefficients.json>
"""

import json
import pathlib
import sys

from mpmath import mp, mpf

import nasa_glenn
from alkali_metals import caesium, lithium, potassium, rubidium, sodium
from association import fitted
from correlated import upward
from metal_choice import CRC, HUBER, MCBRIDE, NOT_KNOWN, Choice, associating, crc_line, straight
from metal_forms import polynomial
from published_forms import R, antoine, least_squares, ppds_density, wagner, wagner_25
from taken_forms import POLING, VDI

mp.dps = 40

# VDI Heat Atlas, 2nd ed., Springer 2010, table D2.1: K, Pa, liquid and vapour in kg/m3, as carried by chemicals 1.5.2.
MERCURY_TABLE = (
    (630.1, 1.013e5, 12737.0, 3.91), (650.0, 1.45e5, 12688.0, 5.37), (700.0, 3.16e5, 12567.0, 10.9),
    (750.0, 6.2e5, 12444.0, 20.1), (800.0, 1.12e6, 12318.0, 34.2), (850.0, 1.88e6, 12190.0, 54.6), (900.0, 2.99e6, 12059.0, 82.7),
)


def mercury(coefficients, molar_mass):
    n = ["-4.57618368", "-1.40726277", "2.36263541", "-31.0889985", "58.0183959", "-27.6304546"]
    t = ["1", "1.89", "2", "8", "8.5", "9"]
    pressure = wagner(n, t, 1764, mpf("167e6"))
    listed = lambda values: "[" + ", ".join(repr(float(value)) for value in values) + "]"
    form = f"WagnerGeneral(n: {listed(n)}, t: {listed(t)}, critical_temperature_k: 1764.0, critical_pressure_pa: 167000000.0"
    row = coefficients["thermo_fits"]["elements.json"]["VolumeLiquid"]["DIPPR100_parameters"]["Fit 2023"]
    cold = lambda at: molar_mass / polynomial([row[name] for name in "ABCDEF"])(at)
    points = [(mpf(at), cold(at)) for at in range(253, 574, 20)] + [(mpf(at), mpf(rho)) for at, _, rho, _ in MERCURY_TABLE]
    density, density_form = straight(least_squares([[at**k for k in range(4)] for at, _ in points], [rho for _, rho in points]))
    return Choice(
        (234.31, 900.0), (1764.0, 167.0e6, 5800.0), "Memory(the critical density by Hensel; temperature and pressure as the vapour pressure has them)",
        pressure, form, ("Published", HUBER),
        density, density_form, ("Practice", "cubic fitted by tests/reference/metals.py to the volumes of the package thermo 0.6.1 from 253 to 573 K and to the VDI Heat Atlas, 2nd ed., Springer 2010, table for mercury, from 630 to 900 K"),
        "Ideal(", ("Practice", "an ideal gas of atoms; compared with the densities of the VDI Heat Atlas, 2nd ed., Springer 2010, table for mercury"),
        other_pressures={"VDI": {at: p for at, p, _, _ in MERCURY_TABLE}},
        other_densities={"thermo": (cold, 253.15, 573.15), "VDI": {at: rho for at, _, rho, _ in MERCURY_TABLE}},
        other_vapours={"VDI": {at: rho for at, _, _, rho in MERCURY_TABLE}},
        least_pressure_uncertainty=3.0,
        least_density_uncertainty=0.2,
    )


def sulfur(coefficients, molar_mass):
    tables = coefficients["tables"]
    row, rho = tables["Psat_data_VDI_PPDS_3"], tables["rho_data_VDI_PPDS_2"]
    letters = lambda of: "[" + ", ".join(repr(float(of[name])) for name in "ABCD") + "]"
    pressure, density = wagner_25(row), ppds_density(rho)
    constant = lambda n: lambda t: nasa_glenn.constant(f"S{n}", n, "S2", 2, t)
    vapour, mixture = associating(2, [(n, *fitted(constant(n), 430, 900)) for n in range(3, 9)], nasa_glenn.BAR)
    thermochemical = lambda t: sum(nasa_glenn.partial_pressure(f"S{n}", n, "S(L)", t) for n in range(2, 9))
    return Choice(
        (430.0, 900.0), (1313.0, 18.208e6, 564.0), "Published(NIST Chemistry WebBook, critical constants of sulfur, as carried by chemicals 1.5.2)",
        pressure, f"Wagner25(a: {letters(row)}, critical_temperature_k: {row['Tc']!r}, critical_pressure_pa: {row['Pc']!r}", ("Published", VDI.format("vapour pressure")),
        density, f"Ppds(a: {letters(rho)}, critical_temperature_k: {rho['Tc']!r}, critical_density_kg_per_m3: {rho['rhoc']!r}", ("Published", VDI.format("liquid density")),
        vapour, ("Published", f"{MCBRIDE}: S2 to S8, fitted as A + B/T"), mixture,
        other_pressures={"Antoine": (antoine(tables["Psat_data_AntoinePoling"]), 527.98, 768.55), "McBride": (thermochemical, 430.0, 810.0)},
        other_densities={"CRC": (polynomial(crc_line(tables["rho_data_CRC_inorg_l"])), 430.0, 433.15)},
        least_density_uncertainty=1.5,
        least_vapour_uncertainty=5.0,
        tension=(tables["sigma_data_VDI_PPDS_11"]["Tc"], [tables["sigma_data_VDI_PPDS_11"]["A"]], [tables["sigma_data_VDI_PPDS_11"]["B"]], 430.0, 900.0, f"Published({VDI.format('surface tension')})"),
    )


ELEMENTS = {
    "Sodium": sodium, "Potassium": potassium, "Lithium": lithium, "Rubidium": rubidium, "Caesium": caesium, "Mercury": mercury,
    "Sulfur": sulfur,
}


def choose(coefficients):
    """The choice for one row of correlation-coefficients.json; the molar mass as the file of the fluid has it."""
    (make,) = [make for name, make in ELEMENTS.items() if name == coefficients["name"]]
    molar_mass = mpf(str(coefficients["MW"]["value"])) / 1000
    return make(coefficients, molar_mass), molar_mass


def vapour_density(choice, p, t, molar_mass):
    if choice.association is None:
        return p * molar_mass / (R * t)
    return choice.association.density(p, t, molar_mass)


def disagreements(choice, molar_mass):
    """(quantity, source, K, relative difference) of every comparison."""
    low, high = choice.range

    def grid(other):
        if isinstance(other, dict):
            return [(mpf(t), mpf(str(value))) for t, value in other.items()]
        function, start, end = other
        start, end = max(start, low), min(end, high)
        return [(mpf(start + (end - start) * k / 40), function) for k in range(41)]

    for name, other in choice.other_pressures.items():
        for t, value in grid(other):
            p = choice.pressure(t)
            yield "pressure", name, t, (value(t) if callable(value) else value) / p - 1
    for name, other in choice.other_densities.items():
        for t, value in grid(other):
            yield "density", name, t, (value(t) if callable(value) else value) / choice.density(t) - 1
    for name, other in choice.other_vapours.items():
        for t, value in grid(other):
            p = choice.pressure(t)
            found = value(p, t) if callable(value) else value
            yield "vapour", name, t, found / vapour_density(choice, p, t, molar_mass) - 1


def uncertainty(choice, molar_mass, quantity, least):
    """Percent, rounded up, and who disagrees most where; pressures below 1 Pa do not count."""
    worst = (0, "", 0)
    for what, name, t, off in disagreements(choice, molar_mass):
        if what == quantity and (what != "pressure" or choice.pressure(t) >= 1):
            worst = max(worst, (abs(off), name, t))
    off, name, t = worst
    if float(100 * off) <= least:
        return least, "stated or assumed, more than the comparison in tests/reference/metals.py shows"
    return upward(off), f"the greatest disagreement where the pressure is above 1 Pa: {name} at {float(t):.0f} K"


def quoted(kind, source, text):
    return f"source: {kind}({text(source)})"


def model_lines(coefficients, number, numbers, text):
    """The lines inside `Correlated(( ... ))`."""
    choice, molar_mass = choose(coefficients)
    low, high = choice.range
    where = f"temperature_range_k: ({number(low)}, {number(high)})"
    tc, pc, rho_c = choice.critical
    kind, _, source = choice.critical_source.rstrip(")").partition("(")
    lines = [
        f"critical: (temperature_k: {number(tc)}, pressure_pa: {number(pc)}, density_kg_per_m3: {number(rho_c)}),",
        f"critical_source: {kind}({text(source)}),",
    ]
    for field, quantity, least, form, source in (
        ("vapour_pressure", "pressure", choice.least_pressure_uncertainty, choice.pressure_form, choice.pressure_source),
        ("liquid_density", "density", choice.least_density_uncertainty, choice.density_form, choice.density_source),
        ("vapour", "vapour", choice.least_vapour_uncertainty, choice.vapour_form, choice.vapour_source),
    ):
        percent, why = uncertainty(choice, molar_mass, quantity, least)
        joint = "" if form.endswith("(") else ", "
        lines += [
            f"// uncertainty: {why}",
            f"{field}: {form}{joint}{where}, uncertainty_percent: {number(percent)}, {quoted(*source, text)}),",
        ]
    return [*lines, f"compressed_liquid: NotKnown(reason: {text(NOT_KNOWN)}),"]


def surface_tension_lines(coefficients, number, numbers, text):
    choice, _ = choose(coefficients)
    if choice.tension is None:
        return []
    tc, a, n, low, high, source = choice.tension
    kind, _, source = source.rstrip(")").partition("(")
    return [
        f"surface_tension: Some((critical_temperature_k: {number(tc)}, a: {numbers(a)}, n: {numbers(n)}, "
        f"temperature_range_k: ({number(low)}, {number(high)}), {quoted(kind, source, text)})),"
    ]


def record(path, name):
    return {**json.loads(pathlib.Path(path).read_text(encoding="utf-8"))[name], "name": name}


def comparison(path):
    for name in ELEMENTS:
        choice, molar_mass = choose(record(path, name))
        yield name
        for t in [choice.range[0] + (choice.range[1] - choice.range[0]) * k / 8 for k in range(9)]:
            t = mpf(t)
            p = choice.pressure(t)
            slope = mp.diff(choice.pressure, t)
            vapour = vapour_density(choice, p, t, molar_mass)
            heat = t * slope * (1 / vapour - 1 / choice.density(t))
            pairs = choice.association.mass_fraction(2, p, t) if choice.association else mpf(0)
            yield f"  {float(t):7.1f} K {float(p):12.5g} Pa  liquid {float(choice.density(t)):8.1f}  vapour {float(vapour):10.4g} kg/m3  pairs {float(pairs):.3f}  heat {float(heat) / 1000:.1f} kJ/kg"
        boiling = mp.findroot(lambda t: mp.log(choice.pressure(t) / 101325), (mpf(choice.range[0]) + mpf(choice.range[1])) / 2)
        yield f"  boils at {float(boiling):.2f} K"
        for quantity, least in (
            ("pressure", choice.least_pressure_uncertainty), ("density", choice.least_density_uncertainty), ("vapour", choice.least_vapour_uncertainty),
        ):
            percent, why = uncertainty(choice, molar_mass, quantity, least)
            yield f"  {quantity}: {percent} %, {why}"


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    print("\n".join(comparison(pathlib.Path(sys.argv[1]) / "correlation-coefficients.json")))
