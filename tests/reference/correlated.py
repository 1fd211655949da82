"""The correlated fluid dichloromethane: which published forms make_fluids.py takes, and the evidence.

Vapour pressure. Four forms are carried by chemicals 1.5.2. Three agree with each other within 1 % from 260 to 333 K:
the Wagner 2.5/5 form of the VDI Heat Atlas, DIPPR 101 of Perry's Handbook and the Antoine form of Poling et al. (the
Landolt-Boernstein Antoine row is the same equation in other units). The Wagner 3/6 form of McGarry is 10 to 15 % above them
at 235 K and 4 % above at 480 K, and boils half a kelvin late: it is left out. Below 260 K the VDI form climbs to 5 % above
DIPPR 101 and Antoine. Integrating the Clapeyron equation down from 25 degC with the calorimetric latent heat, liquid and gas
heat capacities and a second virial coefficient follows the VDI form within 0.5 % down to 230 K, so the VDI form is taken,
and the whole disagreement is stated as its uncertainty.

Latent heat. The printed PPDS 12 coefficients (and Watson's form in Perry's Handbook alike) are 1.4 % above the calorimetric
values, 28.82 kJ/mol at 298.15 K and 28.06 kJ/mol at the boiling point. With the vapour pressure above they give a
compressibility factor above 1 from about 210 to 285 K, which no real vapour of this kind has. So the same form is fitted here to
the latent heat that belongs to the vapour pressure taken: T dp/dT (1/rho'' - 1/rho'), rho'' by the three-parameter equation
of Lee and Kesler 1975 (AIChE J. 21, 510-527), which is within 1 % in rho'' of the reference equations of n-butane, benzene,
R-11 and R-21 up to 0.95 of the critical temperature. The fit is within 0.7 % of both calorimetric values. From 450 K up the
printed coefficients fall 2 to 8 % below it; that too is in the stated uncertainty.

Run by itself it prints the comparison:  correlated.py <folder with correlation-coefficients.json>
"""

import json
import pathlib
import sys

from mpmath import diff, exp, findroot, log, log10, lu_solve, matrix, mp, mpf

R = mpf("8.31446261815324")
WORKING_RANGE = (230.0, 484.5)  # K: lower end where the sources still agree within 5 %, upper end 0.95 of the critical point
LIQUID_RANGE = (178.15, 484.5)  # K: from the melting point, since both density forms hold there
CALORIMETRIC = ((298.15, 28820.0), (313.15, 28060.0))  # J/mol, CRC Handbook, 95th ed., as carried by chemicals 1.5.2
MEASURED = (298.15, 58.7e3)  # Pa: 440 mmHg at 25 degC, NTP chemical repository


# ---- published forms ------------------------------------------------------------------------------------------------


def wagner_25(row):
    tc, pc = mpf(row["Tc"]), mpf(row["Pc"])
    a, b, c, d = (mpf(row[name]) for name in "ABCD")

    def pressure(t):
        x = 1 - t / tc
        return pc * exp((a * x + b * x**1.5 + c * x**2.5 + d * x**5) * tc / t)

    return pressure


def wagner_36(row):
    tc, pc = mpf(row["Tc"]), mpf(row["Pc"])
    a, b, c, d = (mpf(row[name]) for name in "ABCD")

    def pressure(t):
        x = 1 - t / tc
        return pc * exp((a * x + b * x**1.5 + c * x**3 + d * x**6) * tc / t)

    return pressure


def dippr_101(row):
    c1, c2, c3, c4, c5 = (mpf(row[f"C{k}"]) for k in range(1, 6))
    return lambda t: exp(c1 + c2 / t + c3 * log(t) + c4 * t**c5)


def antoine(row):
    a, b, c = (mpf(row[name]) for name in "ABC")
    return lambda t: 10 ** (a - b / (t + c))


def ppds_density(row):
    tc, rho_c = mpf(row["Tc"]), mpf(row["rhoc"])
    a, b, c, d = (mpf(row[name]) for name in "ABCD")

    def density(t):
        x = 1 - t / tc
        return rho_c + a * x ** mpf("0.35") + b * x ** (mpf(2) / 3) + c * x + d * x ** (mpf(4) / 3)

    return density


def dippr_105(row, molar_mass):
    c1, c2, c3, c4 = (mpf(row[f"C{k}"]) for k in range(1, 5))
    # Perry prints mol/dm3 here with C1 already in mol/m3.
    return lambda t: c1 / c2 ** (1 + (1 - t / c3) ** c4) * molar_mass


def ppds_12(tc, coefficients):
    a, b, c, d, e = (mpf(value) for value in coefficients)

    def heat(t):
        x = 1 - t / tc
        return R * tc * (a * x ** (mpf(1) / 3) + b * x ** (mpf(2) / 3) + c * x + d * x**2 + e * x**6)

    return heat


# ---- Lee and Kesler 1975 --------------------------------------------------------------------------------------------

SIMPLE = dict(b=("0.1181193", "0.265728", "0.154790", "0.030323"), c=("0.0236744", "0.0186984", "0", "0.042724"),
              d=("0.155488e-4", "0.623689e-4"), beta="0.65392", gamma="0.060167")
OCTANE = dict(b=("0.2026579", "0.331511", "0.027655", "0.203488"), c=("0.0313385", "0.0503618", "0.016901", "0.041577"),
              d=("0.48736e-4", "0.0740336e-4"), beta="1.226", gamma="0.03754")
OCTANE_ACENTRIC = mpf("0.3978")


def _reference_fluid(constants, t, p):
    """Compressibility factor of the vapour of one of the two reference fluids at reduced t and p."""
    b, c, d = ([mpf(value) for value in constants[name]] for name in "bcd")
    beta, gamma = mpf(constants["beta"]), mpf(constants["gamma"])
    big_b = b[0] - b[1] / t - b[2] / t**2 - b[3] / t**3
    big_c = c[0] - c[1] / t + c[2] / t**3
    big_d = d[0] + d[1] / t

    def factor(v):
        tail = c[3] / (t**3 * v**2) * (beta + gamma / v**2) * exp(-gamma / v**2)
        return 1 + big_b / v + big_c / v**2 + big_d / v**5 + tail

    # From the ideal gas inwards: the first volume at which the pressure is reached belongs to the vapour.
    volume = t / p
    while t / volume * factor(volume) < p:
        volume *= mpf("0.99")
        assert volume > mpf("0.3"), "no vapour root"
    volume = findroot(lambda v: t / v * factor(v) / p - 1, (volume, volume / mpf("0.99")), solver="anderson", tol=1e-20)
    return factor(volume)


def lee_kesler_vapour(t, p, tc, pc, acentric):
    simple = _reference_fluid(SIMPLE, t / tc, p / pc)
    octane = _reference_fluid(OCTANE, t / tc, p / pc)
    return simple + acentric / OCTANE_ACENTRIC * (octane - simple)


# ---- dichloromethane ------------------------------------------------------------------------------------------------


class Dichloromethane:
    """The forms taken, the forms compared, and the fitted latent heat. Molar units inside."""

    def __init__(self, coefficients):
        table = coefficients["tables"]
        self.molar_mass = mpf(str(coefficients["MW"]["value"])) / 1000
        self.pressure_row, self.density_row = table["Psat_data_VDI_PPDS_3"], table["rho_data_VDI_PPDS_2"]
        self.tension_row = table["sigma_data_VDI_PPDS_11"]
        self.tc, self.pc = mpf(self.pressure_row["Tc"]), mpf(self.pressure_row["Pc"])
        self.pressure = wagner_25(self.pressure_row)
        self.liquid_density = ppds_density(self.density_row)
        self.other_density = dippr_105(table["rho_data_Perry_8E_105_l"], self.molar_mass)
        self.other_pressures = {
            "dippr_101": (dippr_101(table["Psat_data_Perrys2_8"]), 178.01, 510.0),
            "antoine": (antoine(table["Psat_data_AntoinePoling"]), 230.0, 333.36),  # its own lower limit is 235.2 K
        }
        self.left_out = wagner_36(table["Psat_data_WagnerMcGarry"])
        liquid, gas = table["Cp_data_Perry_Table_153_100"], table["Cp_data_Poling"]
        self.heat_capacities = (  # J/mol/K: liquid (Perry prints J/kmol/K), ideal gas (Poling et al.)
            lambda t: (liquid["A"] + liquid["B"] * t + liquid["C"] * t**2) / mpf(1000),
            lambda t: R * sum(mpf(gas[f"a{k}"]) * t**k for k in range(5)),
        )
        row = table["phase_change_data_VDI_PPDS_4"]
        self.printed_heat = ppds_12(self.tc, [row[name] for name in "ABCDE"])
        # Pitzer's definition, so that the factor belongs to the vapour pressure taken.
        self.acentric = mpf(f"{float(-log10(self.pressure(self.tc * mpf('0.7')) / self.pc) - 1):.4f}")
        self.heat_coefficients = self._fit_heat()
        self.heat = ppds_12(self.tc, self.heat_coefficients)

    def slope(self, t):
        step = mpf(10) ** -15 * t
        return (self.pressure(t + step) - self.pressure(t - step)) / (2 * step)

    def heat_from(self, pressure, t):
        """Clapeyron's latent heat (J/mol) of a vapour-pressure form, the vapour by Lee and Kesler."""
        step = mpf(10) ** -15 * t
        slope = (pressure(t + step) - pressure(t - step)) / (2 * step)
        p = pressure(t)
        vapour_volume = lee_kesler_vapour(t, p, self.tc, self.pc, self.acentric) * R * t / p
        return t * slope * (vapour_volume - self.molar_mass / self.liquid_density(t))

    def _fit_heat(self):
        """Least squares of the relative error on an even grid; normal equations are harmless with sixty digits.

        The grid begins below the working range, so that the compressibility factor falls steadily all through it.
        """
        powers = (mpf(1) / 3, mpf(2) / 3, mpf(1), mpf(2), mpf(6))
        normal, right = matrix(5, 5), matrix(5, 1)
        for t in range(205, 487, 4):
            x = 1 - t / self.tc
            target = self.heat_from(self.pressure, mpf(t)) / (R * self.tc)
            row = [x**power / target for power in powers]
            for i in range(5):
                right[i] += row[i]
                for j in range(5):
                    normal[i, j] += row[i] * row[j]
        return [float(f"{float(value):.8g}") for value in lu_solve(normal, right)]

    def compressibility(self, t, heat):
        p = self.pressure(t)
        vapour_volume = heat(t) / (t * self.slope(t)) + self.molar_mass / self.liquid_density(t)
        return p * vapour_volume / (R * t)

    def second_virial(self, t):
        """m3/mol, the low-density limit of Lee and Kesler."""
        x = t / self.tc
        simple, octane = (
            b[0] - b[1] / x - b[2] / x**2 - b[3] / x**3 for b in ([mpf(v) for v in fluid["b"]] for fluid in (SIMPLE, OCTANE))
        )
        return R * self.tc / self.pc * (simple + self.acentric / OCTANE_ACENTRIC * (octane - simple))

    def integrated_pressures(self, heat_capacities, lowest):
        """Vapour pressures that follow from calorimetry alone, by Clapeyron down from 25 degC in steps of 1 K.

        Latent heat at 25 degC as measured; its change from the heat capacities of liquid and ideal gas and from the
        enthalpy departure (B - T dB/dT) p of the vapour. Starts at the pressure of the form taken, so it tests the slope only.
        """
        liquid, gas = heat_capacities
        start, heat_at_start = (mpf(value) for value in CALORIMETRIC[0])

        def departure(t, p):
            return (self.second_virial(t) - t * diff(self.second_virial, t)) * p

        def ideal_heat(t):  # Simpson's rule: the integrand is nearly a straight line
            middle = (start + t) / 2
            change = lambda x: gas(x) - liquid(x)
            return (t - start) / 6 * (change(start) + 4 * change(middle) + change(t))

        base = heat_at_start - departure(start, self.pressure(start))

        def rate(t, log_p):
            p = exp(log_p)
            swelling = R * t / p + self.second_virial(t) - self.molar_mass / self.liquid_density(t)
            return (base + ideal_heat(t) + departure(t, p)) / (t * swelling * p)

        t, log_p, step = start, log(self.pressure(start)), mpf(-1)
        while t + step >= lowest:
            k1 = rate(t, log_p)
            k2 = rate(t + step / 2, log_p + step / 2 * k1)
            k3 = rate(t + step / 2, log_p + step / 2 * k2)
            k4 = rate(t + step, log_p + step * k3)
            log_p += step / 6 * (k1 + 2 * k2 + 2 * k3 + k4)
            t += step
            yield t, exp(log_p)

    def disagreements(self):
        """Greatest differences in percent over the working range: vapour pressure, liquid density, latent heat."""
        low, high = WORKING_RANGE
        grid = [mpf(low) + (mpf(high) - low) * k / 100 for k in range(101)]
        pressure = max(
            abs(form(t) / self.pressure(t) - 1) for form, lo, hi in self.other_pressures.values() for t in grid if lo <= t <= hi
        )
        liquid_grid = [mpf(LIQUID_RANGE[0]) + (mpf(LIQUID_RANGE[1]) - mpf(LIQUID_RANGE[0])) * k / 100 for k in range(101)]
        density = max(abs(self.other_density(t) / self.liquid_density(t) - 1) for t in liquid_grid)
        other = self.other_pressures["dippr_101"][0]
        # Below 260 K the two forms of the pressure part company and their slopes say nothing about the heat.
        heat = max(
            *(abs(self.heat_from(other, t) / self.heat(t) - 1) for t in grid if t > 260),
            *(abs(value / self.heat(mpf(t)) - 1) for t, value in CALORIMETRIC),
            *(abs(self.printed_heat(t) / self.heat(t) - 1) for t in grid),
        )
        return 100 * float(pressure), 100 * float(density), 100 * float(heat)


def upward(value):
    """Rounded up to a tenth: an uncertainty is never rounded to the careless side."""
    return -(-value * 10 // 1) / 10


def model_lines(coefficients, number, numbers, text):
    """The lines inside `Correlated(( ... ))`."""
    fluid = Dichloromethane(coefficients)
    pressure, density, heat = (upward(value) for value in fluid.disagreements())
    low, high = WORKING_RANGE
    tc, pc = number(fluid.tc), number(fluid.pc)
    rho_c = number(fluid.density_row["rhoc"])
    vdi = "VDI Heat Atlas, 2nd ed., Springer 2010, table D3.1, {}, as carried by chemicals 1.5.2"
    fitted = (
        "form PPDS 12; coefficients fitted by tests/reference/correlated.py to Clapeyron's equation with the vapour pressure "
        "above and the vapour of Lee and Kesler 1975 (AIChE J. 21, 510-527), since the printed coefficients give a "
        "compressibility factor above 1; within 0.7 % of the calorimetric values in the CRC Handbook, 95th ed."
    )
    abcd = lambda row: numbers(row[name] for name in "ABCD")
    return [
        f"critical: (temperature_k: {tc}, pressure_pa: {pc}, density_kg_per_m3: {rho_c}),",
        f"acentric_factor: {number(fluid.acentric)},",
        f"critical_source: Published({text(vdi.format('the constants of the forms below'))}),",
        "// uncertainty: the greatest disagreement with DIPPR 101 and Antoine over the range, see tests/reference/correlated.py",
        f"vapour_pressure: Wagner25(a: {abcd(fluid.pressure_row)}, critical_temperature_k: {tc}, critical_pressure_pa: {pc}, "
        f"temperature_range_k: ({low}, {high}), uncertainty_percent: {number(pressure)}, "
        f"source: Published({text(vdi.format('vapour pressure'))})),",
        "// uncertainty: the greatest disagreement with DIPPR 105 over the range",
        f"liquid_density: Ppds(a: {abcd(fluid.density_row)}, critical_temperature_k: {number(fluid.density_row['Tc'])}, "
        f"critical_density_kg_per_m3: {rho_c}, temperature_range_k: ({LIQUID_RANGE[0]}, {LIQUID_RANGE[1]}), uncertainty_percent: {number(density)}, "
        f"source: Published({text(vdi.format('liquid density'))})),",
        "// uncertainty: the greatest disagreement with the printed coefficients, at the upper end; below 430 K it is under 2 %",
        f"latent_heat: Ppds12(a: {numbers(fluid.heat_coefficients)}, critical_temperature_k: {tc}, "
        f"temperature_range_k: ({low}, {high}), uncertainty_percent: {number(heat)}, source: Practice({text(fitted)})),",
        "compressed_liquid: ThomsonBrobstHankinson(source: Published(\"Thomson, G. H.; Brobst, K. R.; Hankinson, R. W. 1982, "
        "AIChE J. 28, 671–676, doi 10.1002/aic.690280420\")),",
        "vapour: Clapeyron(lowest_pressure_pa: 1000.0),",
    ]


def surface_tension_lines(coefficients, number, numbers, text):
    """PPDS 11 with its higher coefficients zero is the single-term power law."""
    row = coefficients["tables"]["sigma_data_VDI_PPDS_11"]
    assert row["C"] == row["D"] == row["E"] == 0
    return [
        f"surface_tension: Some((critical_temperature_k: {number(row['Tc'])}, a: {numbers([row['A']])}, "
        f"n: {numbers([row['B']])}, temperature_range_k: ({number(row['Tm'])}, {number(row['Tc'])}), "
        "source: Published(\"VDI Heat Atlas, 2nd ed., Springer 2010, table D3.1, surface tension, as carried by chemicals 1.5.2\"))),"
    ]


def comparison(fluid):
    """The evidence as a table, for a reader who doubts the choice."""
    yield "T_K     p_VDI_Pa     DIPPR101_%  Antoine_%  McGarry_%  rho_DIPPR105_%  Z_printed  Z_fitted  heat_fitted/printed"
    for t in (230, 235.15, 240, 250, 260, 273.15, 298.15, 312.95, 333, 350, 375, 400, 425, 450, 470, 480, 484.5):
        t = mpf(t)
        p = fluid.pressure(t)
        off = [
            f"{float(100 * (form(t) / p - 1)):+10.2f}" if lo <= t <= hi else "         -"
            for form, lo, hi in fluid.other_pressures.values()
        ]
        yield (
            f"{float(t):6.2f} {float(p):12.1f}  {' '.join(off)} {float(100 * (fluid.left_out(t) / p - 1)):+10.2f}"
            f"     {float(100 * (fluid.other_density(t) / fluid.liquid_density(t) - 1)):+8.3f}"
            f"     {float(fluid.compressibility(t, fluid.printed_heat)):8.4f}  {float(fluid.compressibility(t, fluid.heat)):8.4f}"
            f"     {float(fluid.heat(t) / fluid.printed_heat(t)):8.4f}"
        )
    for t, value in CALORIMETRIC:
        yield f"latent heat at {t} K: fitted {float(fluid.heat(mpf(t))):.0f}, printed {float(fluid.printed_heat(mpf(t))):.0f}, calorimetric {value:.0f} J/mol"
    t, value = MEASURED
    forms = {"VDI": fluid.pressure, **{name: form for name, (form, _, _) in fluid.other_pressures.items()}, "McGarry": fluid.left_out}
    yield f"at {t} K, measured {value:.0f} Pa: " + ", ".join(f"{name} {float(form(mpf(t))):.0f}" for name, form in forms.items())
    for t, p in fluid.integrated_pressures(fluid.heat_capacities, mpf("229.5")):
        if int(t) % 10 == 0 or t < 231:
            others = ", ".join(f"{name} {float(100 * (form(t) / p - 1)):+.2f} %" for name, form in forms.items())
            yield f"integrated from 25 degC to {float(t):.2f} K: {float(p):.1f} Pa; {others}"
    grid = [mpf(230) + k for k in range(255)]
    worst = max(abs(fluid.heat(t) / fluid.heat_from(fluid.pressure, t) - 1) for t in grid)
    yield f"greatest error of the fit, 230 to 484 K: {float(100 * worst):.3f} %"
    yield f"greatest disagreements over {WORKING_RANGE} K in percent (p, rho, heat): {fluid.disagreements()}"


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    mp.dps = 40
    path = pathlib.Path(sys.argv[1]) / "correlation-coefficients.json"
    for line in comparison(Dichloromethane(json.loads(path.read_text(encoding="utf-8"))["Dichloromethane"])):
        print(line)
