"""What a metal takes for each property, with how it is written in RON; and the names of the sources."""

from dataclasses import dataclass, field

from mpmath import mpf

import nasa_glenn
from association import Association, fitted
from metal_forms import dippr_101, polynomial, powers_of_theta
from published_forms import R

CRC = "Haynes, W. M. (ed.), CRC Handbook of Chemistry and Physics, 95th ed., CRC Press 2014, {}, as carried by chemicals 1.5.2"
FINK = "Fink, J. K.; Leibowitz, L. 1995, Thermodynamic and Transport Properties of Sodium Liquid and Vapor, ANL/RE-95/2, {}, as public codes carry it"
GOLDEN_NA = "Golden, G. H.; Tokar, J. V. 1967, Thermophysical Properties of Sodium, ANL-7323, {}, as the public code idaholab/sodium carries it"
GOLDEN_K = "the Naval Research Laboratory's measurements in the form of Golden et al., {}, as the public code idaholab/potassium carries it"
MCBRIDE = "McBride, B. J.; Zehe, M. J.; Gordon, S. 2002, NASA/TP-2002-211556, as the package CEA_Wrap 2.1.2 carries it"
NOT_KNOWN = "no published equation of its compressed liquid is carried"
OHSE = "Ohse, R. W. (ed.) 1985, Handbook of Thermodynamic and Transport Properties of Alkali Metals, Blackwell, {}"
BYSTROV = "Bystrov, P. I.; Kagan, D. N.; Krechetova, G. A.; Shpilrain, E. E. 1988, Liquid Metal Heat Carriers, Thermal Pipes and Power Installations, Nauka, Moscow, as the public code cfe316/livapordata carries it"
HUBER = "Huber, M. L.; Laesecke, A.; Friend, D. G. 2006, Ind. Eng. Chem. Res. 45, 7351-7361, doi 10.1021/ie060560s, as the package thermo carries it; uncertainty by its abstract, 3 % near the triple point, 0.5 % from 400 to 900 K"
HANDBOOK = "J. Thermodyn. Catal. 7 (2016) 163, table 4"


@dataclass
class Choice:
    """One element: functions of the temperature in K, and how they are written in RON."""

    range: tuple  # K
    critical: tuple  # K, Pa, kg/m3
    critical_source: str  # Published(..) and its kin without quotation marks
    pressure: object
    pressure_form: str
    pressure_source: tuple  # kind, text
    density: object
    density_form: str
    density_source: tuple
    vapour_form: str
    vapour_source: tuple
    association: object = None  # None: an ideal gas of atoms
    # name: (function, lowest, highest), or a table {K: value}
    other_pressures: dict = field(default_factory=dict)
    other_densities: dict = field(default_factory=dict)
    other_vapours: dict = field(default_factory=dict)  # functions of p and T, kg/m3
    least_pressure_uncertainty: float = 0.0  # percent, where the source states more than the comparison shows
    least_density_uncertainty: float = 0.3
    least_vapour_uncertainty: float = 1.0
    tension: tuple = None  # critical temperature, a, n, lowest, highest, source


def listed(values):
    return "[" + ", ".join(repr(float(f"{float(value):.9g}")) for value in values) + "]"


def rounded(coefficients):
    return [float(f"{float(value):.9g}") for value in coefficients]


def associating(smallest, larger, unit):
    """The RON of a mixture, and the mixture with the very numbers that are written."""
    larger = [(n, *rounded((a, b))) for n, a, b in larger]
    molecules = ", ".join(f"(atoms: {float(n)!r}, log10_k: {listed((a, b))})" for n, a, b in larger)
    form = f"Associating(smallest_atoms: {float(smallest)!r}, larger: [{molecules}], unit_pa: {float(unit)!r}"
    return form, Association(smallest, larger, unit)


def pairs_of(constant, low, high):
    """A mixture of atoms and pairs whose constant (1/bar) is fitted as A + B/T."""
    return associating(1, [(2, *fitted(constant, low, high))], nasa_glenn.BAR)


def mcbride_pairs(atom):
    return lambda t: nasa_glenn.constant(f"{atom}2", 2, atom, 1, t)


def dippr(coefficients):
    coefficients = rounded(coefficients)
    return dippr_101(coefficients), f"Dippr101(a: {listed(coefficients)}"


def straight(powers):
    powers = rounded(powers)
    return polynomial(powers), f"Polynomial(a: {listed(powers)}"


def theta(critical_density, tc, n, t):
    form = (
        f"PowersOfTheta(n: {listed(n)}, t: {listed(t)}, critical_temperature_k: {float(tc)!r}, "
        f"critical_density_kg_per_m3: {float(critical_density)!r}"
    )
    return powers_of_theta(critical_density, tc, n, t), form


def crc_line(row):
    """The CRC Handbook's straight line from the melting point, as powers of kelvin."""
    return [mpf(row["rho"]) + mpf(row["k"]) * mpf(row["Tm"]), -mpf(row["k"])]


def exact_pairs(constant, molar_mass):
    """Density over p and T with the constant (1/bar) itself, not its fit."""

    def density(p, t):
        k = constant(t) / nasa_glenn.BAR
        atoms = 2 * p / (1 + (1 + 4 * k * p) ** mpf("0.5"))
        return atoms * (1 + 2 * k * atoms) * molar_mass / (R * t)

    return density


def molar(volumes, molar_mass):
    """A table of molar volumes in 1e-5 m3/mol as one of densities."""
    return {t: molar_mass / mpf(str(volume)) * 10**5 for t, volume in volumes.items()}


def bars(table):
    """A table of pressures in bar, as Pa."""
    return {t: nasa_glenn.BAR * mpf(str(p)) for t, p in table.items()}
