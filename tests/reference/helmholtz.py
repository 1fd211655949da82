"""Helmholtz-energy equations of state in many-digit arithmetic.

An evaluator apart from the program's own and apart from CoolProp's: each term is written as its paper prints it, the
derivatives are taken numerically with sixty digits, so that what is left in a table is the equation and not the rounding.
Needs mpmath. Used by make_fluids.py (critical points) and make_tables.py (reference tables).
"""

import json

from mpmath import cosh, diff, exp, findroot, log, mp, mpf, sinh, sqrt

mp.dps = 60

# Water and carbon dioxide: the terms that model the critical region have singular third derivatives there.
NON_ANALYTIC = "ResidualHelmholtzNonAnalytic"


def load_equations(path):
    """The published equations by name, as the data file carries them, but for one flag.

    The vapour-density ancillary of propylene glycol is marked as carrying the factor T_r/T. It does not: without the factor it
    follows the equation within 0.02 % from 213 K to 0.7 T_c, with it the exponent is twice too large at half T_c and three times
    at the lower limit. CoolProp 8.0.0, led astray by that guess, settles on false saturation states below about 300 K (half the
    vapour pressure at 270 K, a vapour of Z = 20 at 220 K). The equation itself is sound down to its lower limit: latent heat,
    vapour and liquid run smoothly there.
    """
    with open(path, encoding="utf-8") as file:
        equations = json.load(file)
    equations["PropyleneGlycol"]["ANCILLARIES"]["rhoV"]["using_tau_r"] = False
    return equations


def _columns(term, *names):
    """The term's coefficient lists side by side, one row a summand, every double taken exactly."""
    return [tuple(mpf(value) for value in row) for row in zip(*(term[name] for name in names), strict=True)]


def _power(term):
    rows = _columns(term, "n", "t", "d", "l")
    return lambda tau, delta: sum(n * tau**t * delta**d * (exp(-(delta**l)) if l else 1) for n, t, d, l in rows)


def _exponential(term):
    rows = _columns(term, "n", "t", "d", "g", "l")
    return lambda tau, delta: sum(n * tau**t * delta**d * exp(-g * delta**l) for n, t, d, g, l in rows)


def _gaussian(term):
    rows = _columns(term, "n", "t", "d", "eta", "epsilon", "beta", "gamma")
    return lambda tau, delta: sum(
        n * tau**t * delta**d * exp(-eta * (delta - epsilon) ** 2 - beta * (tau - gamma) ** 2)
        for n, t, d, eta, epsilon, beta, gamma in rows
    )


def _gao_b(term):
    rows = _columns(term, "n", "t", "d", "eta", "epsilon", "beta", "gamma", "b")
    return lambda tau, delta: sum(
        n * tau**t * delta**d * exp(eta * (delta - epsilon) ** 2 + 1 / (b + beta * (tau - gamma) ** 2))
        for n, t, d, eta, epsilon, beta, gamma, b in rows
    )


def _double_exponential(term):
    rows = _columns(term, "n", "t", "d", "gd", "ld", "gt", "lt")
    return lambda tau, delta: sum(
        n * tau**t * delta**d * exp(-gd * delta**ld - gt * tau**lt) for n, t, d, gd, ld, gt, lt in rows
    )


def _lemmon_2005(term):
    rows = _columns(term, "n", "t", "d", "l", "m")
    return lambda tau, delta: sum(
        n * tau**t * delta**d * exp(-(delta**l if l else 0) - (tau**m if m else 0)) for n, t, d, l, m in rows
    )


def _non_analytic(term):
    rows = _columns(term, "n", "a", "b", "beta", "A", "B", "C", "D")

    def value(tau, delta):
        total = mpf(0)
        square = (delta - 1) ** 2
        for n, a, b, beta, big_a, big_b, big_c, big_d in rows:
            theta = (1 - tau) + big_a * square ** (1 / (2 * beta))
            distance = theta**2 + big_b * square**a
            total += n * distance**b * delta * exp(-big_c * square - big_d * (tau - 1) ** 2)
        return total

    return value


RESIDUAL = {
    "ResidualHelmholtzPower": _power,
    "ResidualHelmholtzExponential": _exponential,
    "ResidualHelmholtzGaussian": _gaussian,
    "ResidualHelmholtzGaoB": _gao_b,
    "ResidualHelmholtzDoubleExponential": _double_exponential,
    "ResidualHelmholtzLemmon2005": _lemmon_2005,
    NON_ANALYTIC: _non_analytic,
}


def _ideal_curvature(term, tau):
    """tau^2 times the second derivative of one ideal-gas term by tau: all that heat capacities need of it."""
    kind = term["type"].removeprefix("IdealGasHelmholtz")
    if kind in ("Lead", "EnthalpyEntropyOffset"):
        return mpf(0)
    if kind == "LogTau":
        return -mpf(term["a"])
    if kind == "Power":
        return sum(n * t * (t - 1) * tau**t for n, t in _columns(term, "n", "t"))
    if kind == "PlanckEinstein":
        return sum(-n * (t * tau) ** 2 * exp(-t * tau) / (1 - exp(-t * tau)) ** 2 for n, t in _columns(term, "n", "t"))
    if kind == "PlanckEinsteinFunctionT":
        critical = mpf(term["Tcrit"])
        return sum(
            -n * (v / critical * tau) ** 2 * exp(-v / critical * tau) / (1 - exp(-v / critical * tau)) ** 2
            for n, v in _columns(term, "n", "v")
        )
    if kind == "PlanckEinsteinGeneralized":
        return sum(
            n * (t * tau) ** 2 * c * d * exp(t * tau) / (c + d * exp(t * tau)) ** 2
            for n, t, c, d in _columns(term, "n", "t", "c", "d")
        )
    # The remaining forms give the ideal heat capacity at constant pressure over R; a LogTau of -1 beside them turns it into c_v.
    temperature = mpf(term["Tc"]) / tau
    if kind == "CP0Constant":
        return -mpf(term["cp_over_R"])
    if kind == "CP0PolyT":
        return -sum(c * temperature**t for c, t in _columns(term, "c", "t"))
    if kind == "CP0AlyLee":
        c = [mpf(value) for value in term["c"]]
        heat = c[0]
        if c[1]:
            heat += c[1] * (c[2] / temperature / sinh(c[2] / temperature)) ** 2
        if c[3]:
            heat += c[3] * (c[4] / temperature / cosh(c[4] / temperature)) ** 2
        return -heat
    raise ValueError(f"no rule for the ideal-gas term {kind}")


class Equation:
    """One fundamental equation. Temperatures in K, densities in mol/m3, pressures in Pa."""

    def __init__(self, record):
        self.record = record
        self.gas_constant = mpf(record["gas_constant"])
        self.molar_mass = mpf(record["molar_mass"])
        self.reducing_temperature = mpf(record["STATES"]["reducing"]["T"])
        self.reducing_density = mpf(record["STATES"]["reducing"]["rhomolar"])
        self.terms = [RESIDUAL[term["type"]](term) for term in record["alphar"]]
        self.is_non_analytic = any(term["type"] == NON_ANALYTIC for term in record["alphar"])

    def residual(self, tau, delta):
        return sum(term(tau, delta) for term in self.terms)

    def reduced(self, temperature, density):
        return self.reducing_temperature / mpf(temperature), mpf(density) / self.reducing_density

    def by_density(self, temperature, density, order):
        """delta^k times the k-th derivative of the residual energy by delta, for k = 0 to `order`."""
        tau, delta = self.reduced(temperature, density)
        along = lambda x: self.residual(tau, x)
        return [along(delta)] + [delta**k * diff(along, delta, k) for k in range(1, order + 1)]

    def pressure(self, temperature, density):
        _, first = self.by_density(temperature, density, 1)
        return self.gas_constant * mpf(temperature) * mpf(density) * (1 + first)

    def critical_point(self, start_temperature, start_density):
        """Where dp/drho and d2p/drho2 both vanish, found by Newton from the published point."""

        def both(temperature, density):
            _, first, second, third = self.by_density(temperature, density, 3)
            return [1 + 2 * first + second, 2 * first + 4 * second + third]

        digits, mp.dps = mp.dps, 30
        try:
            solution = findroot(both, (mpf(start_temperature), mpf(start_density)), tol=1e-22, maxsteps=50)
        finally:
            mp.dps = digits
        return solution[0], solution[1]

    def saturation(self, temperature, liquid, vapour):
        """Saturated densities from equal pressure and equal Gibbs energy, by Newton from the given start.

        The unknowns are the logarithms of both densities. The stop is relative to the density alone: with sixty digits the
        liquid's pressure stays exact even where it is the small difference of large numbers.
        """
        liquid, vapour = mpf(liquid), mpf(vapour)
        for _ in range(40):
            state = []
            for density in (liquid, vapour):
                value, first, second = self.by_density(temperature, density, 2)
                state.append((
                    density * (1 + first),                   # p / (R T)
                    density * (1 + 2 * first + second),      # dp/d(ln rho) / (R T)
                    value + first + log(density),            # g / (R T) up to a constant
                    1 + 2 * first + second,                  # dg/d(ln rho) / (R T)
                ))
            (p_l, dp_l, g_l, dg_l), (p_v, dp_v, g_v, dg_v) = state
            determinant = -dp_l * dg_v + dp_v * dg_l
            step_l = ((p_l - p_v) * dg_v - (g_l - g_v) * dp_v) / determinant
            step_v = ((p_l - p_v) * dg_l - (g_l - g_v) * dp_l) / determinant
            # A long step would leave the branch; half a unit of ln(rho) is far more than any good start needs.
            longest = max(abs(step_l), abs(step_v))
            scale = 1 if longest < 0.5 else 0.5 / longest
            liquid *= exp(scale * step_l)
            vapour *= exp(scale * step_v)
            if longest < mpf(10) ** -30:
                return liquid, vapour
        raise ArithmeticError(f"no saturation at {temperature} K")

    def latent_heat_and_slope(self, temperature, liquid, vapour):
        """Molar latent heat (J/mol) from the entropies of both phases, and dp/dT (Pa/K) by Clapeyron."""
        entropy = []
        for density in (liquid, vapour):
            tau, delta = self.reduced(temperature, density)
            value = self.residual(tau, delta)
            by_tau = diff(lambda x: self.residual(x, delta), tau)
            entropy.append(tau * by_tau - value - log(density))  # s/R up to what both phases share
        jump = self.gas_constant * (entropy[1] - entropy[0])
        return mpf(temperature) * jump, jump / (1 / vapour - 1 / liquid)

    def heat_capacities_and_sound(self, temperature, density):
        """Molar c_v and c_p (J/mol/K) and the speed of sound (m/s)."""
        tau, delta = self.reduced(temperature, density)
        _, first, second = self.by_density(temperature, density, 2)
        by_tau_twice = tau**2 * diff(lambda x: self.residual(x, delta), tau, 2)
        mixed = delta * tau * diff(self.residual, (tau, delta), (1, 1))
        ideal = sum(_ideal_curvature(term, tau) for term in self.record["alpha0"])
        c_v = -(ideal + by_tau_twice)
        c_p = c_v + (1 + first - mixed) ** 2 / (1 + 2 * first + second)
        sound_squared = (1 + 2 * first + second) * c_p / c_v * self.gas_constant * mpf(temperature) / self.molar_mass
        return self.gas_constant * c_v, self.gas_constant * c_p, sqrt(sound_squared)
