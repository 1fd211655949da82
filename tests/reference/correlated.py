"""Correlated fluids without a reference equation: the method. Which forms a fluid takes, and why, stands in correlated_fluids.py.

Vapour pressure. A published form is taken over the range in which it and the other published rows agree; the greatest
disagreement over that range is the stated uncertainty. A row left out is named with its reason.

Latent heat. The printed coefficients often give a vapour that cannot be (a compressibility factor above 1, or one that falls
at low pressure). So the form PPDS 12 is fitted here to the heat that belongs to the vapour pressure taken,
T dp/dT (1/rho'' - 1/rho'), the vapour by vapour_models.py. Its stated uncertainty is its greatest disagreement with
the calorimetric values, with the printed forms that are possible at all, and with the heat that belongs to a second
vapour-pressure form.

Run by itself it prints the comparison:  correlated.py <folder with correlation-coefficients.json> [name ...]
"""

import json
import pathlib
import sys

from mpmath import diff, exp, log, log10, mp, mpf, workdps

import published_forms as forms
import vapour_models
from correlated_fluids import FLUIDS
from published_forms import R
from taken_forms import tension_of

DIGITS = 25
HIGHEST_REDUCED = mpf("0.95")  # above it the pieces do not join
TBH = "Thomson, G. H.; Brobst, K. R.; Hankinson, R. W. 1982, AIChE J. 28, 671–676, doi 10.1002/aic.690280420"

PRESSURE_ROWS = {  # name: (table, how to read it, range)
    "VDI": ("Psat_data_VDI_PPDS_3", forms.wagner_25, lambda row: (row["Tm"], row["Tc"])),
    "Poling": ("Psat_data_WagnerPoling", forms.wagner_25, lambda row: (row["Tmin"], row["Tmax"])),
    "McGarry": ("Psat_data_WagnerMcGarry", forms.wagner_36, lambda row: (row["Tmin"], row["Tc"])),
    "DIPPR 101": ("Psat_data_Perrys2_8", forms.dippr_101, lambda row: (row["Tmin"], row["Tmax"])),
    "Antoine": ("Psat_data_AntoinePoling", forms.antoine, lambda row: (row["Tmin"], row["Tmax"])),
    "Landolt": ("Psat_data_Landolt_Antoine", forms.antoine_natural, lambda row: (row["Tmin"], row["Tmax"])),
}


class Correlated:
    """The forms taken, the forms compared, and the fitted latent heat of one fluid. Molar units inside."""

    def __init__(self, coefficients):
        self.choice = choice = FLUIDS[coefficients["CAS"]]
        self.tables = tables = coefficients["tables"]
        self.molar_mass = mpf(str(coefficients["MW"]["value"])) / 1000
        self.pressures = {
            name: (read(tables[table]), *reach(tables[table]))
            for name, (table, read, reach) in PRESSURE_ROWS.items()
            if table in tables
        }
        self.pressures.update(choice.extra_pressures)
        self.taken = choice.pressure.resolve(self.pressures, tables)
        self.pressure, self.tc, self.pc = self.taken.function, mpf(self.taken.tc), mpf(self.taken.pc)
        self.low = choice.lowest
        self.high = choice.highest or float(f"{float(self.tc * HIGHEST_REDUCED) - 0.05:.1f}")
        self.liquid = choice.density.resolve(tables, self.molar_mass)
        self.liquid_density = self.liquid.function
        self.other_densities = dict(choice.extra_densities)
        if "rho_data_Perry_8E_105_l" in tables and self.liquid.name != "DIPPR 105":
            row = tables["rho_data_Perry_8E_105_l"]
            self.other_densities["DIPPR 105"] = (forms.dippr_105(row, self.molar_mass), row["Tmin"], row["Tmax"])
        self.printed_heats = {}
        if "phase_change_data_VDI_PPDS_4" in tables:
            row = tables["phase_change_data_VDI_PPDS_4"]
            self.printed_heats["VDI"] = forms.ppds_12(row["Tc"], [row[name] for name in "ABCDE"])
        if "phase_change_data_Perrys2_150" in tables:
            self.printed_heats["DIPPR 106"] = forms.dippr_106(tables["phase_change_data_Perrys2_150"])
        row = tables.get("Hvap_data_CRC", {})
        self.calorimetric = [  # CRC Handbook, 95th ed., as carried by chemicals 1.5.2
            (t, row[name]) for t, name in ((298.15, "Hvap298"), (row.get("Tb"), "HvapTb")) if row.get(name)
        ]
        self.polar = vapour_models.polar_terms(choice.polar, choice.dipole, self.tc, self.pc)
        # Pitzer's definition, so that the factor belongs to the vapour pressure taken.
        self.acentric = mpf(f"{float(-log10(self.pressure(self.tc * mpf('0.7')) / self.pc) - 1):.4f}")
        self.heat_coefficients = self._fit_heat()
        self.heat = forms.ppds_12(self.tc, self.heat_coefficients)

    def slope(self, t, pressure=None):
        pressure = pressure or self.pressure
        step = mpf(10) ** -8 * t
        return (pressure(t + step) - pressure(t - step)) / (2 * step)

    def vapour_compressibility(self, t, p):
        return vapour_models.compressibility(t, p, self.tc, self.pc, self.acentric, self.polar)

    def heat_from(self, pressure, t):
        """Clapeyron's latent heat (J/mol) of a vapour-pressure form."""
        p = pressure(t)
        vapour_volume = self.vapour_compressibility(t, p) * R * t / p
        return t * self.slope(t, pressure) * (vapour_volume - self.molar_mass / self.liquid_density(t))

    def _fit_heat(self):
        """Least squares of the relative error on an even grid, from a little below the working range to a little above."""
        rows = []
        for t in range(int(self.low) - 25, int(self.tc * mpf("0.955")) + 1, 4):
            x = 1 - t / self.tc
            target = self.heat_from(self.pressure, mpf(t)) / (R * self.tc)
            rows.append([x**power / target for power in forms.PPDS_12])
        return forms.least_squares(rows, [mpf(1)] * len(rows))

    def compressibility(self, t, heat):
        """That the program will find from the heat, by Clapeyron."""
        p = self.pressure(t)
        vapour_volume = heat(t) / (t * self.slope(t)) + self.molar_mass / self.liquid_density(t)
        return p * vapour_volume / (R * t)

    # ---- what the sources say against each other -------------------------------------------------------------------

    def grid(self, low=None, high=None):
        low, high = low or self.low, high or self.high
        return [mpf(low) + (mpf(high) - mpf(low)) * k / 100 for k in range(101)]

    def compared_pressures(self):
        """Rows that count, with the part of their own range that lies in the working range."""
        for name, (form, low, high) in self.pressures.items():
            if name != self.taken.name and name not in self.choice.left_out:
                yield name, form, low - 1.0, high

    def pressure_disagreement(self):
        return worst({
            name: [(form(t) / self.pressure(t) - 1, t) for t in self.grid() if lo <= t <= hi]
            for name, form, lo, hi in self.compared_pressures()
        })

    def density_disagreement(self):
        return worst({
            name: [(form(t) / self.liquid_density(t) - 1, t) for t in self.grid(self.choice.liquid_from) if lo - 1 <= t <= hi]
            for name, (form, lo, hi) in self.other_densities.items()
        })

    def heat_disagreement(self, highest=None):
        grid = [t for t in self.grid() if t <= (highest or self.high)]
        found = {
            "the calorimetric value": [
                (value / self.heat(mpf(t)) - 1, t) for t, value in self.calorimetric if self.low - 1 <= t <= self.high
            ]
        }
        for name, form in self.printed_heats.items():
            if name not in self.choice.impossible_heats:
                found[f"the printed {name} coefficients"] = [(form(t) / self.heat(t) - 1, t) for t in grid if t < self.tc]
        if self.choice.second_slope:
            name, low, high = self.choice.second_slope
            form = self.pressures[name][0]
            found[f"Clapeyron's heat of {name}"] = [
                (self.heat_from(form, t) / self.heat(t) - 1, t) for t in grid if low <= t <= high
            ]
        return worst(found)

    def integrated_pressures(self, lowest):
        """Vapour pressures that follow from calorimetry alone, by Clapeyron down from 25 degC in steps of 1 K.

        Latent heat at 25 degC as measured; its change from the heat capacities of liquid and ideal gas and from the
        enthalpy departure (B - T dB/dT) p of the vapour. Starts at the pressure of the form taken, so it tests the slope only.
        """
        liquid, gas = (self.tables[name] for name in ("Cp_data_Perry_Table_153_100", "Cp_data_Poling"))
        start, heat_at_start = (mpf(value) for value in self.calorimetric[0])
        virial = lambda t: vapour_models.second_virial(t, self.tc, self.pc, self.acentric, self.polar)

        def change(t):  # J/mol/K, ideal gas less liquid; Perry prints J/kmol/K
            return R * sum(mpf(gas[f"a{k}"]) * t**k for k in range(5)) - (
                liquid["A"] + liquid["B"] * t + liquid["C"] * t**2 + liquid["D"] * t**3 + liquid["E"] * t**4
            ) / mpf(1000)

        def departure(t, p):
            return (virial(t) - t * diff(virial, t)) * p

        base = heat_at_start - departure(start, self.pressure(start))

        def rate(t, log_p):  # Simpson's rule: the integrand is nearly a straight line
            p = exp(log_p)
            swelling = R * t / p + virial(t) - self.molar_mass / self.liquid_density(t)
            ideal_heat = (t - start) / 6 * (change(start) + 4 * change((start + t) / 2) + change(t))
            return (base + ideal_heat + departure(t, p)) / (t * swelling * p)

        t, log_p, step = start, log(self.pressure(start)), mpf(-1)
        while t + step >= lowest:
            k1 = rate(t, log_p)
            k2 = rate(t + step / 2, log_p + step / 2 * k1)
            k3 = rate(t + step / 2, log_p + step / 2 * k2)
            k4 = rate(t + step, log_p + step * k3)
            log_p += step / 6 * (k1 + 2 * k2 + 2 * k3 + k4)
            t += step
            yield t, exp(log_p)


def record(path, name):
    """What the data carry of a fluid, by its name there or its CAS number."""
    records = json.loads(path.read_text(encoding="utf-8"))
    return records.get(name) or next(record for record in records.values() if record["CAS"] == name)


def worst(found):
    """(name, greatest relative difference, where) of lists of differences; None where there is nothing to compare."""
    listed = [(abs(off), name, t) for name, differences in found.items() for off, t in differences]
    if not listed:
        return None
    off, name, t = max(listed)
    return name, off, t


# ---- RON ------------------------------------------------------------------------------------------------------------


def upward(value):
    """Percent, rounded up to a tenth: an uncertainty is never rounded to the careless side."""
    return -(-float(100 * value) * 10 // 1) / 10


def stated(found, least):
    """Percent, and the sentence that says where it is from."""
    if found is None:
        return least, "no second source at hand: an assumption"
    name, off, t = found
    said = f"the greatest disagreement over the range, {float(100 * off):.2g} % with {name} at {float(t):.0f} K"
    if upward(off) < least:
        return least, f"more than {said}; see tests/reference/correlated_fluids.py"
    return upward(off), said


def model_lines(coefficients, number, numbers, text):
    """The lines inside `Correlated(( ... ))`."""
    with workdps(DIGITS):
        fluid = Correlated(coefficients)
        choice, taken, liquid = fluid.choice, fluid.taken, fluid.liquid
        p_percent, p_said = stated(fluid.pressure_disagreement(), choice.least_pressure_uncertainty)
        rho_percent, rho_said = stated(fluid.density_disagreement(), choice.least_density_uncertainty)
        h_percent, h_said = stated(fluid.heat_disagreement(), choice.least_heat_uncertainty)
        calorimetric = max((upward(abs(h / fluid.heat(mpf(t)) - 1)) for t, h in fluid.calorimetric), default=None)
        below = fluid.heat_disagreement(fluid.tc * mpf("0.85"))
        if below and upward(below[1]) < h_percent:
            h_said += f"; below 0.85 of the critical temperature {upward(below[1])} %"
    tc = number(fluid.tc)
    fitted = (
        "form PPDS 12; coefficients fitted by tests/reference/correlated.py to Clapeyron's equation with the vapour pressure "
        "above and the vapour of Lee and Kesler 1975 (AIChE J. 21, 510-527)"
    )
    if choice.polar != "none":
        fitted += f" with the polar terms of Tsonopoulos 1974 and 1975 (AIChE J. 20, 263; 21, 827; {choice.polar}, {choice.dipole:g} D)"
    if fluid.calorimetric:
        fitted += f"; within {calorimetric} % of the calorimetric values in the CRC Handbook, 95th ed., as carried by chemicals 1.5.2"
    reach = lambda low, high: f"temperature_range_k: ({number(low)}, {number(high)})"
    return [
        f"critical: (temperature_k: {tc}, pressure_pa: {number(fluid.pc)}, density_kg_per_m3: {number(liquid.critical_density)}),",
        f"acentric_factor: {number(fluid.acentric)},",
        f"critical_source: Published({text(taken.critical)}),",
        f"// uncertainty: {p_said}",
        f"vapour_pressure: {taken.ron(number)}, {reach(fluid.low, fluid.high)}, uncertainty_percent: {number(p_percent)}, "
        f"source: {taken.kind}({text(taken.source)})),",
        f"// uncertainty: {rho_said}",
        f"liquid_density: {liquid.form}, {reach(choice.liquid_from, fluid.high)}, uncertainty_percent: {number(rho_percent)}, "
        f"source: {liquid.kind}({text(liquid.source)})),",
        f"// uncertainty: {h_said}",
        f"latent_heat: Ppds12(a: {numbers(fluid.heat_coefficients)}, critical_temperature_k: {tc}, {reach(fluid.low, fluid.high)}, "
        f"uncertainty_percent: {number(h_percent)}, source: Practice({text(fitted)})),",
        f"compressed_liquid: ThomsonBrobstHankinson(source: Published({text(TBH)})),",
        f"vapour: Clapeyron(lowest_pressure_pa: {number(choice.joint)}),",
    ]


def surface_tension_lines(coefficients, number, numbers, text):
    tension = tension_of(FLUIDS[coefficients["CAS"]].tension, coefficients["tables"])
    if tension is None:
        return []
    return [
        f"surface_tension: Some((critical_temperature_k: {number(tension.zero)}, a: {numbers([tension.a])}, "
        f"n: {numbers([tension.n])}, temperature_range_k: ({number(tension.low)}, {number(tension.high)}), "
        f"source: Published({text(tension.source)}))),"
    ]


# ---- the evidence as a table, for a reader who doubts a choice ------------------------------------------------------


def comparison(fluid):
    names = [name for name in fluid.pressures if name != fluid.taken.name]
    yield f"taken: {fluid.taken.name}, {fluid.low} to {fluid.high} K; left out: {fluid.choice.left_out or 'none'}"
    yield "T_K     p_Pa         " + " ".join(f"{name:>11}" for name in names) + "   density  Z_fit   heat: fit/printed, fit error"
    special = [298.15] + [t for t, _ in fluid.calorimetric]
    for t in sorted({fluid.low, *(fluid.low + (fluid.high - fluid.low) * k / 14 for k in range(15)), *special}):
        if not fluid.low <= t <= fluid.high:
            continue
        t = mpf(t)
        p, heat = fluid.pressure(t), fluid.heat(t)
        off = []
        for name in names:
            form, low, high = fluid.pressures[name]
            mark = " " if low - 1 <= t <= high else "x"
            try:
                off.append(f"{float(100 * (form(t) / p - 1)):+10.2f}{mark}")
            except TypeError:
                off.append("          -")
        density = ["%+.2f" % float(100 * (form(t) / fluid.liquid_density(t) - 1)) for form, lo, hi in fluid.other_densities.values() if lo - 1 <= t <= hi]
        heats = [f"{name} {float(100 * (form(t) / heat - 1)):+.2f} Z {float(fluid.compressibility(t, form)):.4f}" for name, form in fluid.printed_heats.items()]
        exact = fluid.heat_from(fluid.pressure, t)
        yield (
            f"{float(t):6.2f} {float(p):12.2f} {' '.join(off)} {float(fluid.liquid_density(t)):8.2f} {'/'.join(density)} "
            f" {float(fluid.compressibility(t, fluid.heat)):.4f}  {'; '.join(heats)}  fit {float(100 * (heat / exact - 1)):+.3f}"
        )
    for t, value in fluid.calorimetric:
        yield f"latent heat at {t} K: fitted {float(fluid.heat(mpf(t))):.0f}, calorimetric {value:.0f} J/mol ({float(100 * (value / fluid.heat(mpf(t)) - 1)):+.2f} %)"
    if "rho_data_CRC_virial" in fluid.tables:
        row = fluid.tables["rho_data_CRC_virial"]
        for t in (273.15, 298.15, 323.15, 348.15):
            printed = sum(row[f"a{k}"] * (298.15 / t - 1) ** (k - 1) for k in range(1, 6))
            found = vapour_models.second_virial(mpf(t), fluid.tc, fluid.pc, fluid.acentric, fluid.polar) * 10**6
            yield f"second virial coefficient at {t} K: model {float(found):.0f}, CRC Handbook {printed:.0f} cm3/mol"
    if all(name in fluid.tables for name in ("Cp_data_Perry_Table_153_100", "Cp_data_Poling")) and fluid.calorimetric and fluid.calorimetric[0][0] == 298.15:
        for t, p in fluid.integrated_pressures(mpf(fluid.low) - mpf("0.5")):
            if int(t) % 20 == 0 or t < fluid.low + 0.6:
                found = {name: form(t) for name, (form, _, _) in fluid.pressures.items()}
                yield f"integrated from 25 degC to {float(t):.2f} K: {float(p):.2f} Pa; " + ", ".join(f"{name} {float(100 * (value / p - 1)):+.2f} %" for name, value in found.items())
    for what, found in (("vapour pressure", fluid.pressure_disagreement()), ("density", fluid.density_disagreement()), ("latent heat", fluid.heat_disagreement())):
        yield f"{what}: {stated(found, 0.0)[1]}"


if __name__ == "__main__":
    if len(sys.argv) < 2:
        sys.exit(__doc__)
    mp.dps = DIGITS
    records = json.loads((pathlib.Path(sys.argv[1]) / "correlation-coefficients.json").read_text(encoding="utf-8"))
    for name, record in records.items():
        if record["CAS"] in FLUIDS and (len(sys.argv) == 2 or name in sys.argv[2:]):
            print(f"\n==== {name}")
            for line in comparison(Correlated(record)):
                print(line)
