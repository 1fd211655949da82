"""What a correlated fluid takes for its vapour pressure, liquid density and surface tension, with how it is written in RON."""

from dataclasses import dataclass

from mpmath import log, mpf

import published_forms as forms

VDI = "VDI Heat Atlas, 2nd ed., Springer 2010, table D3.1, {}, as carried by chemicals 1.5.2"
POLING = "Poling, B. E.; Prausnitz, J. M.; O'Connell, J. P., The Properties of Gases and Liquids, 5th ed., 2001, {}, as carried by chemicals 1.5.2"
MCGARRY = "McGarry, J. 1983, Ind. Eng. Chem. Process Des. Dev. 22, 313-322, doi 10.1021/i200021a023, as carried by chemicals 1.5.2"
PERRY_DENSITY = "Green, D.; Perry, R., Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2007, liquid density, DIPPR 105, as carried by chemicals 1.5.2"


# ---- vapour pressure ------------------------------------------------------------------------------------------------


@dataclass
class Pressure:
    name: str  # the row it is
    function: object
    tc: float
    pc: float
    form: str  # the RON variant with its coefficients
    source: str  # Published(..), Memory(..) or Practice(..), without quotation marks
    kind: str
    critical: str

    def ron(self, number):
        return f"{self.form}, critical_temperature_k: {number(self.tc)}, critical_pressure_pa: {number(self.pc)}"


@dataclass
class PrintedWagner:
    """A printed Wagner equation as it stands."""

    name: str
    table: str
    form: str
    source: str
    critical: str

    def resolve(self, pressures, tables):
        row = tables[self.table]
        form = f"{self.form}(a: [{', '.join(repr(float(row[name])) for name in 'ABCD')}]"
        return Pressure(
            self.name, pressures[self.name][0], row["Tc"], row["Pc"], form, self.source, "Published", self.critical
        )


VDI_PRESSURE = PrintedWagner(
    "VDI", "Psat_data_VDI_PPDS_3", "Wagner25", VDI.format("vapour pressure"), VDI.format("the constants of the forms below")
)
POLING_PRESSURE = PrintedWagner(
    "Poling", "Psat_data_WagnerPoling", "Wagner25", POLING.format("appendix A, vapour pressure"),
    POLING.format("the constants of the vapour pressure"),
)
MCGARRY_PRESSURE = PrintedWagner("McGarry", "Psat_data_WagnerMcGarry", "Wagner36", MCGARRY, MCGARRY)


@dataclass
class GeneralWagner:
    """ln(p/pc) = Tc/T sum n theta^t, printed outside the packages."""

    name: str
    tc: float
    pc: float
    n: list
    t: list
    source: str
    critical: str

    def function(self):
        return forms.wagner(self.n, self.t, self.tc, self.pc)

    def resolve(self, pressures, tables):
        listed = lambda values: "[" + ", ".join(repr(float(value)) for value in values) + "]"
        form = f"WagnerGeneral(n: {listed(self.n)}, t: {listed(self.t)}"
        return Pressure(self.name, self.function(), self.tc, self.pc, form, self.source, "Published", self.critical)


@dataclass
class FittedWagner:
    """Wagner's 2.5/5 form fitted here through published rows or points, each where it is believed."""

    tc: float
    pc: float
    source: str
    critical: str
    rows: tuple = ()  # (row, lowest, highest), taken every 5 K
    points: tuple = ()  # (K, Pa)
    kind: str = "Practice"

    def resolve(self, pressures, tables):
        tc, pc = mpf(self.tc), mpf(self.pc)
        points = [(mpf(t), mpf(p)) for t, p in self.points]
        for name, low, high in self.rows:
            t = mpf(low)
            while t <= high:
                points.append((t, pressures[name][0](t)))
                t += 5
        # The same absolute error in ln p everywhere.
        coefficients = forms.least_squares(
            [[tc / t * (1 - t / tc) ** e for e in forms.WAGNER_25] for t, _ in points], [log(p / pc) for _, p in points]
        )
        form = f"Wagner25(a: [{', '.join(repr(value) for value in coefficients)}]"
        function = forms.wagner(coefficients, forms.WAGNER_25, tc, pc)
        return Pressure("fitted", function, self.tc, self.pc, form, self.source, self.kind, self.critical)


# ---- liquid density -------------------------------------------------------------------------------------------------


@dataclass
class Liquid:
    name: str
    function: object
    critical_density: float
    form: str  # the RON variant with all but range, uncertainty and source
    source: str
    kind: str = "Published"


def _ppds(row):
    listed = ", ".join(repr(float(row[name])) for name in "ABCD")
    return (
        f"Ppds(a: [{listed}], critical_temperature_k: {float(row['Tc'])!r}, critical_density_kg_per_m3: {float(row['rhoc'])!r}"
    )


class VdiDensity:
    def resolve(self, tables, molar_mass):
        row = tables["rho_data_VDI_PPDS_2"]
        return Liquid("VDI", forms.ppds_density(row), row["rhoc"], _ppds(row), VDI.format("liquid density"))


@dataclass
class PerryDensity:
    critical_volume: float  # m3/mol

    def resolve(self, tables, molar_mass):
        row = tables["rho_data_Perry_8E_105_l"]
        kmol = [row["C1"] / 1000, row["C2"], row["C3"], row["C4"]]
        form = f"Dippr105(a: [{', '.join(repr(float(f'{value:.10g}')) for value in kmol)}]"
        density = float(f"{float(molar_mass / mpf(self.critical_volume)):.5g}")
        return Liquid("DIPPR 105", forms.dippr_105(row, molar_mass), density, form, PERRY_DENSITY)


@dataclass
class StraightDensity:
    """rho = rho_m - k (T - Tm), as the CRC Handbook prints it for molten and liquid inorganic substances."""

    critical_volume: float  # m3/mol

    def resolve(self, tables, molar_mass):
        row = tables["rho_data_CRC_inorg_l"]
        a = [float(f"{row['rho'] + row['k'] * row['Tm']:.8g}"), -row["k"]]
        function = lambda t: mpf(a[0]) + mpf(a[1]) * t
        source = "Haynes, W. M. (ed.), CRC Handbook of Chemistry and Physics, 95th ed., CRC Press 2014, density of molten elements and representative salts, as carried by chemicals 1.5.2"
        density = float(f"{float(molar_mass / mpf(self.critical_volume)):.5g}")
        return Liquid("CRC", function, density, f"Polynomial(a: [{a[0]!r}, {a[1]!r}]", source)


@dataclass
class PowersOfTheta:
    """rho = rho_c (1 + sum n theta^t), printed outside the packages."""

    name: str
    tc: float
    critical_density: float
    n: list
    t: list
    source: str

    def function(self):
        tc, rho_c = mpf(self.tc), mpf(self.critical_density)
        terms = [(mpf(n), mpf(t)) for n, t in zip(self.n, self.t)]
        return lambda t: rho_c * (1 + sum(n * (1 - t / tc) ** e for n, e in terms))

    def resolve(self, tables, molar_mass):
        n = ", ".join(repr(float(f"{value * self.critical_density:.12g}")) for value in self.n)
        t = ", ".join(repr(float(value)) for value in self.t)
        form = (
            f"PowersOfTheta(n: [{n}], t: [{t}], critical_temperature_k: {self.tc!r}, "
            f"critical_density_kg_per_m3: {self.critical_density!r}"
        )
        return Liquid(self.name, self.function(), self.critical_density, form, self.source)


# ---- surface tension ------------------------------------------------------------------------------------------------


@dataclass
class SingleTerm:
    """a (1 - T/zero)^n, N/m; `zero` is the critical temperature unless the line is straight."""

    zero: float
    a: float
    n: float
    low: float
    high: float
    source: str


def tension_of(choice, tables):
    if choice == "VDI":
        row = tables["sigma_data_VDI_PPDS_11"]
        assert row["C"] == row["D"] == row["E"] == 0, "PPDS 11 is a single term only then"
        return SingleTerm(row["Tc"], row["A"], row["B"], row["Tm"], row["Tc"], VDI.format("surface tension"))
    if choice == "Jasper":  # a - b t, mN/m over degC: a single term with the exponent 1
        row = tables["sigma_data_Jasper_Lange"]
        zero = row["a"] / row["b"] + 273.15
        return SingleTerm(
            float(f"{zero:.8g}"), float(f"{row['b'] * zero / 1000:.8g}"), 1.0, row["Tmin"], row["Tmax"],
            "Jasper, J. J. 1972, J. Phys. Chem. Ref. Data 1, 841-1010, straight line, as carried by chemicals 1.5.2",
        )
    return choice
