"""Forms of vapour pressure, liquid density and dimer constants for metals, in the units their papers use."""

from mpmath import exp, log, mpf, pi, sqrt

import nasa_glenn

ATM = mpf(101325)
RANKINE = mpf("1.8")
POUND_PER_CUBIC_FOOT = mpf("16.01846337")


def dippr_101(coefficients):
    a, b, c, d, e = (mpf(value) for value in coefficients)
    return lambda t: exp(a + b / t + c * log(t) + d * mpf(t) ** e)


def rankine_pressure(a, b, c):
    """atm = a/T^b exp(c/T), T in degrees Rankine, as DIPPR 101 coefficients."""
    a, b, c = mpf(a), mpf(b), mpf(c)
    return [log(a * ATM) - b * log(RANKINE), c / RANKINE, -b, mpf(0), mpf(0)]


def fahrenheit_density(*coefficients):
    """lb/ft3 in powers of degrees Fahrenheit, as powers of kelvin in kg/m3."""
    shift, powers = mpf("-459.7"), [mpf(0)] * len(coefficients)
    expanded = [mpf(1)]  # (1.8 T - 459.7)^k
    for coefficient in coefficients:
        for k, value in enumerate(expanded):
            powers[k] += POUND_PER_CUBIC_FOOT * mpf(coefficient) * value
        raised = [mpf(0)] * (len(expanded) + 1)
        for k, value in enumerate(expanded):
            raised[k] += shift * value
            raised[k + 1] += RANKINE * value
        expanded = raised
    return powers


def polynomial(powers):
    return lambda t: sum(mpf(value) * mpf(t) ** k for k, value in enumerate(powers))


def powers_of_theta(critical_density, tc, n, t):
    return lambda at: mpf(critical_density) + sum(mpf(a) * (1 - mpf(at) / mpf(tc)) ** mpf(e) for a, e in zip(n, t))


def rankine_constants(*pairs):
    """(atoms, a, b) with ln K = a + b/T, T in degrees Rankine, as decadic constants in kelvin."""
    ten = log(mpf(10))
    return [(atoms, mpf(a) / ten, mpf(b) / RANKINE / ten) for atoms, a, b in pairs]


def thermochemical_pressure(atom, constant):
    """Atoms over the liquid by McBride et al., and pairs by a constant in 1/bar."""

    def pressure(t):
        one = nasa_glenn.partial_pressure(atom, 1, f"{atom}(L)", t)
        return one + constant(t) * one**2 / nasa_glenn.BAR

    return pressure


def rotor_constant(molar_mass, omega, anharmonic, rotation, coupling, binding):
    """K of 2 A = A2 in 1/bar of a vibrating rotor; spectroscopic constants and D0 in cm-1, atoms in a doublet S state."""
    h, c, k, avogadro = mpf("6.62607015e-34"), mpf("2.99792458e10"), mpf("1.380649e-23"), mpf("6.02214076e23")
    omega, anharmonic, rotation, coupling, binding = (mpf(v) for v in (omega, anharmonic, rotation, coupling, binding))
    ground = omega / 2 - anharmonic / 4
    mass = mpf(molar_mass) / avogadro

    def constant(t):
        kt = k * t / (h * c)
        total, v, below = mpf(0), 0, mpf(-1)
        while True:
            x = v + mpf("0.5")
            level = omega * x - anharmonic * x**2
            turn = rotation - coupling * x
            if level >= binding + ground or level <= below or turn <= 0:
                break
            room = 1 - exp(-(binding + ground - level) / kt)
            total += exp(-(level - ground) / kt) * kt / (2 * turn) * room
            v, below = v + 1, level
        one = sqrt(2 * pi * mass * k * t / h**2) ** 3
        pair = sqrt(4 * pi * mass * k * t / h**2) ** 3
        return total * pair / (2 * one) ** 2 * exp(binding / kt) / (k * t) * nasa_glenn.BAR

    return constant


# Huber, K. P.; Herzberg, G. 1979, Constants of Diatomic Molecules (85Rb2, scaled to the mean mass); from memory.
RB2 = rotor_constant("0.0854678", "57.747", "0.1582", "0.0226", "5.5e-5", "3951")
