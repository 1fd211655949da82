"""The vapour of a correlated fluid at saturation: Lee and Kesler 1975, with the polar terms of Tsonopoulos 1974 and 1975.

Lee, B. I.; Kesler, M. G. 1975, AIChE J. 21, 510-527. Tsonopoulos, C. 1974, AIChE J. 20, 263-272, doi 10.1002/aic.690200209,
and 1975, AIChE J. 21, 827-829, doi 10.1002/aic.690210432; coefficients as carried by chemicals 1.5.2.

The polar terms are an addition to the second virial coefficient, so what they add to the compressibility factor is
f2 p/pc Tc/T. At saturation, against the reference equations as CoolProp 8.0.0 evaluates them, from 0.5 to 0.95 of the critical
temperature, the compressibility factor of the two together is off by at most: acetone 2.7 % (8.8 % without the polar terms),
ethanol 4.0 % (1.6 % up to 0.9; 7.8 % without), dimethyl ether 0.6 % (2.7 %), diethyl ether 1.8 % (2.6 %). Without polar terms
n-butane, benzene, R-11, R-21, R-123, R-245fa and 1,2-dichloroethane are within 1.3 %, hexamethyldisiloxane within 1.2 %,
FK-5-1-12 within 2.6 %, toluene within 4.1 % (1.3 % up to 0.85).
"""

from mpmath import exp, findroot, log, mpf

from published_forms import R

SIMPLE = dict(b=("0.1181193", "0.265728", "0.154790", "0.030323"), c=("0.0236744", "0.0186984", "0", "0.042724"),
              d=("0.155488e-4", "0.623689e-4"), beta="0.65392", gamma="0.060167")
OCTANE = dict(b=("0.2026579", "0.331511", "0.027655", "0.203488"), c=("0.0313385", "0.0503618", "0.016901", "0.041577"),
              d=("0.48736e-4", "0.0740336e-4"), beta="1.226", gamma="0.03754")
OCTANE_ACENTRIC = mpf("0.3978")
ATMOSPHERE = mpf(101325)


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


def polar_terms(kind, dipole_debye, tc, pc):
    """a and b of f2 = a/Tr^6 - b/Tr^8."""
    reduced = mpf(10) ** 5 * mpf(dipole_debye) ** 2 * (mpf(pc) / ATMOSPHERE) / mpf(tc) ** 2
    if kind == "none":
        return mpf(0), mpf(0)
    if kind == "ketone, nitrile or ester":
        return -mpf("2.14e-4") * reduced - mpf("4.308e-21") * reduced**8, mpf(0)
    if kind == "alkanol":
        return mpf("0.0878"), mpf("0.00908") + mpf("0.0006957") * reduced
    raise ValueError(kind)


def compressibility(t, p, tc, pc, acentric, polar=(mpf(0), mpf(0))):
    """Of the vapour at t and p; the polar part is linear in pressure."""
    x, y = t / tc, p / pc
    simple, octane = _reference_fluid(SIMPLE, x, y), _reference_fluid(OCTANE, x, y)
    a, b = polar
    return simple + acentric / OCTANE_ACENTRIC * (octane - simple) + (a / x**6 - b / x**8) * y / x


def second_virial(t, tc, pc, acentric, polar=(mpf(0), mpf(0))):
    """m3/mol, the low-density limit."""
    x = t / tc
    simple, octane = (
        b[0] - b[1] / x - b[2] / x**2 - b[3] / x**3 for b in ([mpf(v) for v in fluid["b"]] for fluid in (SIMPLE, OCTANE))
    )
    a, b = polar
    return R * tc / pc * (simple + acentric / OCTANE_ACENTRIC * (octane - simple) + a / x**6 - b / x**8)


def calorimetric_pressure(tc, pc, acentric, boiling, cold, hot, liquid_volume):
    """Vapour pressure from the normal boiling point and two latent heats (K, J/mol), a straight line between them.

    Clapeyron's equation integrated from the boiling point in steps of about 2 K; liquid volume in m3/mol.
    """
    tc, pc, acentric, boiling, volume = (mpf(value) for value in (tc, pc, acentric, boiling, liquid_volume))
    (t1, h1), (t2, h2) = ((mpf(t), mpf(h)) for t, h in (cold, hot))

    def rate(t, log_p):
        p = exp(log_p)
        return (h1 + (h2 - h1) * (t - t1) / (t2 - t1)) / (t * p * (R * t / p + second_virial(t, tc, pc, acentric) - volume))

    def pressure(end):
        steps = int(abs(end - boiling) / 2) + 1
        t, log_p, step = boiling, log(mpf(101325)), (end - boiling) / steps
        for _ in range(steps):
            k1 = rate(t, log_p)
            k2 = rate(t + step / 2, log_p + step / 2 * k1)
            k3 = rate(t + step / 2, log_p + step / 2 * k2)
            k4 = rate(t + step, log_p + step * k3)
            log_p += step / 6 * (k1 + 2 * k2 + 2 * k3 + k4)
            t += step
        return exp(log_p)

    return pressure
