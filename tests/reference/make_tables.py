"""Writes the reference tables for the equations of state.

    python3 -m venv target/venv
    target/venv/bin/pip install coolprop==8.0.0 mpmath==1.3.0
    target/venv/bin/python tests/reference/make_tables.py <folder with fluid-equations.json>

Every value is computed twice: by helmholtz.py from the printed form of the equation with fifty digits, which is what is
written, and by CoolProp 8.0.0 in double precision, which must agree within AGREEMENT or the script stops. The two share the
coefficients and nothing else. Running it twice writes the same bytes.
"""

import math
import pathlib
import random
import sys

import CoolProp
from mpmath import findroot, mp, mpf

from helmholtz import Equation, load_equations
from make_fluids import HERE, TEST_ONLY, lower_limit, own_critical_point, read

SATURATION_POINTS = 25
NEAREST_TO_CRITICAL = 0.995
SINGLE_PHASE_POINTS = 21  # a third each: gas, compressed liquid, supercritical
HIGHEST_PRESSURE = 100e6  # Pa

# Largest relative difference from CoolProp that is still taken for its rounding: its pressure, energies and speeds at the
# densities written here.
AGREEMENT = 1e-10

SATURATION_HEADER = """\
# Saturation states of {what}.
# Source: {source}
# Evaluated by tests/reference/make_tables.py with fifty digits (mpmath 1.3.0): equal pressure and equal Gibbs energy in both
# phases. At these densities CoolProp 8.0.0 gives the same vapour-side pressure, latent heat and slope within {difference:.0e}.
# Units: {units}
# Tolerance: 1e-9 relative in every column. The values are exact to all digits printed; a solver in double precision
# is left with about 1e-12 at the lower limits and 1e-10 at 0.995 of the critical temperature, and one digit is kept in hand.
"""

SINGLE_HEADER = """\
# Single-phase states of {what}: gas, compressed liquid and supercritical, drawn at random with a fixed seed.
# Source: {source}
# Evaluated by tests/reference/make_tables.py with fifty digits (mpmath 1.3.0); CoolProp 8.0.0 agrees within {difference:.0e}.
# Units: {units}
# Tolerance: 1e-9 relative in every column. The values are exact to all digits printed; double precision loses most in the
# pressure of a liquid near saturation, a small difference of large terms, where about 1e-11 is left.
"""

EQUATIONS_SOURCE = (
    "the equations whose papers are named in {where}; coefficients as carried by CoolProp 8.0.0 (MIT licence)."
)


def digits(value):
    return f"{float(value):.17g}"


def relative(ours, theirs):
    return abs(float(mpf(theirs) / ours - 1))


class Fluid:
    """One equation with its range, in the density unit of its table."""

    def __init__(self, identity, name, record, by_mass):
        self.identity, self.name = identity, name
        state = record["EOS"][0]
        self.equation = Equation(state)
        self.unit = self.equation.molar_mass if by_mass else mpf(1)  # table density = molar density times this
        self.lowest, self.highest = lower_limit(state), state["T_max"]
        self.highest_pressure = min(HIGHEST_PRESSURE, state["p_max"])
        self.critical_temperature, self.critical_density, _ = own_critical_point(self.equation, record)
        self.state = CoolProp.AbstractState("HEOS", name)
        self.start_off = 0.0  # greatest difference of CoolProp's own saturated densities, for the report only
        # A second one without phase logic, so that any density can be asked.
        self.forced = CoolProp.AbstractState("HEOS", name)
        self.forced.specify_phase(CoolProp.iphase_gas)

    def saturation(self, temperature):
        """Pressure, both densities, latent heat and slope, molar; started from CoolProp's own solution."""
        start = []
        for vapour_share in (0, 1):
            self.state.update(CoolProp.QT_INPUTS, vapour_share, temperature)
            start.append(self.state.rhomolar())
        liquid, vapour = self.equation.saturation(temperature, *start)
        latent, slope = self.equation.latent_heat_and_slope(temperature, liquid, vapour)
        self.start_off = max(self.start_off, relative(liquid, start[0]), relative(vapour, start[1]))
        return self.equation.pressure(temperature, vapour), liquid, vapour, latent, slope

    def coolprop_saturation(self, temperature, liquid, vapour):
        """CoolProp's vapour-side pressure, latent heat and slope at given densities."""
        self.forced.update(CoolProp.DmolarT_INPUTS, float(liquid), temperature)
        liquid_energy, liquid_entropy = self.forced.umolar(), self.forced.smolar()
        self.forced.update(CoolProp.DmolarT_INPUTS, float(vapour), temperature)
        pressure = self.forced.p()
        swelling = float(1 / vapour - 1 / liquid)
        latent = self.forced.umolar() - liquid_energy + pressure * swelling
        return pressure, latent, (self.forced.smolar() - liquid_entropy) / swelling

    def saturation_rows(self):
        top = NEAREST_TO_CRITICAL * float(self.critical_temperature)
        for k in range(SATURATION_POINTS):
            exact = self.lowest + (top - self.lowest) * k / (SATURATION_POINTS - 1)
            # Rounded inwards to 0.1 mK; the lower limit itself is kept.
            temperature = exact if k == 0 else math.floor(exact * 1e4) / 1e4
            pressure, liquid, vapour, latent, slope = self.saturation(temperature)
            theirs = self.coolprop_saturation(temperature, liquid, vapour)
            off = max(relative(*pair) for pair in zip((pressure, latent, slope), theirs, strict=True))
            yield (
                self.identity, digits(temperature), digits(pressure), digits(liquid * self.unit), digits(vapour * self.unit),
                digits(latent / self.unit), digits(slope),
            ), off

    def density_at(self, temperature, pressure, start):
        """The density above `start` where the isotherm reaches the pressure; `start` if it is there already."""
        density = mpf(start)
        while self.equation.pressure(temperature, density) < pressure:
            density *= mpf("1.02")
        if density == start:
            return density
        return findroot(
            lambda x: self.equation.pressure(temperature, x) / pressure - 1, (density / mpf("1.02"), density),
            solver="anderson", tol=1e-10,
        )

    def single_phase_states(self):
        """(temperature, density in the table's unit), seeded by the fluid's name alone."""
        chance = random.Random(self.identity)
        critical = float(self.critical_temperature)
        third = SINGLE_PHASE_POINTS // 3
        for _ in range(third):  # gas
            temperature = round(chance.uniform(self.lowest, min(self.highest, 2.5 * critical)), 3)
            if temperature < 0.99 * critical:
                most = float(self.saturation(temperature)[2]) * 0.98
            else:
                most = float(self.critical_density) * 0.3
            yield temperature, most * 10 ** chance.uniform(-3, 0)
        for _ in range(third):  # compressed liquid
            temperature = round(chance.uniform(self.lowest, 0.97 * critical), 3)
            least = float(self.saturation(temperature)[1]) * 1.0005
            most = float(self.density_at(temperature, self.highest_pressure, least))
            yield temperature, chance.uniform(least, most)
        for _ in range(third):  # supercritical
            temperature = round(chance.uniform(1.02 * critical, min(self.highest, 2.5 * critical)), 3)
            least = float(self.critical_density) * 0.3
            most = float(self.density_at(temperature, self.highest_pressure, least))
            yield temperature, chance.uniform(least, most)

    def single_phase_rows(self):
        for temperature, density in self.single_phase_states():
            shown = float(f"{density * float(self.unit):.6g}")
            molar = mpf(shown) / self.unit
            pressure = self.equation.pressure(temperature, molar)
            c_v, c_p, sound = self.equation.heat_capacities_and_sound(temperature, molar)
            if c_v <= 0:
                continue  # past the melting line, where helium's equation means nothing
            self.forced.update(CoolProp.DmolarT_INPUTS, float(molar), temperature)
            theirs = self.forced
            off = max(
                relative(pressure, theirs.p()), relative(c_v, theirs.cvmolar()), relative(c_p, theirs.cpmolar()),
                relative(sound, theirs.speed_sound()),
            )
            yield (
                self.identity, digits(temperature), digits(shown), digits(pressure), digits(c_v / self.unit),
                digits(c_p / self.unit), digits(sound),
            ), off


def write(path, header, columns, rows, **words):
    shown, worst = [], (0.0, "")
    for row, off in rows:
        shown.append(",".join(row))
        worst = max(worst, (off, f"{row[0]} at {row[1]} K"))
    if worst[0] > AGREEMENT:
        sys.exit(f"{path.name}: CoolProp differs by {worst[0]:.1e} for {worst[1]}")
    text = header.format(difference=worst[0], **words)
    path.write_text(text + ",".join(columns) + "\n" + "\n".join(shown) + "\n", encoding="utf-8")
    print(f"tests/reference/{path.name}: {len(shown)} rows, CoolProp within {worst[0]:.1e} ({worst[1]})")


def main(data):
    mp.dps = 50
    equations = load_equations(pathlib.Path(data) / "fluid-equations.json")
    names = {path.stem: read(path)["data"] for path in sorted((HERE / "facts").glob("*.json"))}
    catalogue = {identity: name for identity, name in names.items() if name in equations}
    for names, prefix, by_mass, what, where in (
        (catalogue, "", True, "the catalogue's equation fluids", "assets/fluids/*.ron"),
        (TEST_ONLY, "extra-", False, "the test-only equations", "tests/reference/equations/*.ron"),
    ):
        fluids = [Fluid(identity, name, equations[name], by_mass) for identity, name in names.items()]
        amount, density = ("kg", "kg_per_m3") if by_mass else ("mol", "mol_per_m3")
        source = EQUATIONS_SOURCE.format(where=where)
        write(
            HERE / f"{prefix}saturation.csv", SATURATION_HEADER,
            ("fluid", "temperature_k", "pressure_pa", f"liquid_density_{density}", f"vapour_density_{density}",
             f"latent_heat_j_per_{amount}", "slope_pa_per_k"),
            (row for fluid in fluids for row in fluid.saturation_rows()),
            what=what, source=source, units=f"K, Pa, {amount}/m3, {amount}/m3, J/{amount}, Pa/K (dp/dT along saturation).",
        )
        write(
            HERE / f"{prefix}single-phase.csv", SINGLE_HEADER,
            ("fluid", "temperature_k", f"density_{density}", "pressure_pa", f"cv_j_per_{amount}_k", f"cp_j_per_{amount}_k",
             "sound_speed_m_per_s"),
            (row for fluid in fluids for row in fluid.single_phase_rows()),
            what=what, source=source, units=f"K, {amount}/m3, Pa, J/({amount} K), J/({amount} K), m/s.",
        )
        for fluid in fluids:
            print(f"    {fluid.identity}: CoolProp's own saturated densities within {fluid.start_off:.1e}")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
