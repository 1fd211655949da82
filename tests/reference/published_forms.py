"""Published forms of vapour pressure, liquid density and latent heat, from rows as the packages carry them.

Temperatures in K, pressures in Pa, densities in kg/m3, heats in J/mol. Every function takes a row and gives a function of
the temperature; computed with mpmath at the precision set by the caller.
"""

from mpmath import exp, log, lu_solve, matrix, mpf

R = mpf("8.31446261815324")
WAGNER_25 = (mpf(1), mpf("1.5"), mpf("2.5"), mpf(5))
WAGNER_36 = (mpf(1), mpf("1.5"), mpf(3), mpf(6))
PPDS = (mpf("0.35"), mpf(2) / 3, mpf(1), mpf(4) / 3)
PPDS_12 = (mpf(1) / 3, mpf(2) / 3, mpf(1), mpf(2), mpf(6))


def wagner(coefficients, exponents, tc, pc):
    """ln(p/pc) = Tc/T sum n theta^t."""
    tc, pc = mpf(tc), mpf(pc)
    terms = [(mpf(n), mpf(t)) for n, t in zip(coefficients, exponents)]
    return lambda t: pc * exp(tc / t * sum(n * (1 - t / tc) ** e for n, e in terms))


def wagner_25(row):
    return wagner([row[name] for name in "ABCD"], WAGNER_25, row["Tc"], row["Pc"])


def wagner_36(row):
    return wagner([row[name] for name in "ABCD"], WAGNER_36, row["Tc"], row["Pc"])


def dippr_101(row):
    c1, c2, c3, c4, c5 = (mpf(row[f"C{k}"]) for k in range(1, 6))
    return lambda t: exp(c1 + c2 / t + c3 * log(t) + c4 * t**c5)


def antoine(row):
    """As Poling et al. print it: decadic, Pa."""
    a, b, c = (mpf(row[name]) for name in "ABC")
    return lambda t: 10 ** (a - b / (t + c))


def antoine_natural(row):
    """As the package carries the Landolt-Boernstein rows: natural logarithm, Pa."""
    a, b, c = (mpf(row[name]) for name in "ABC")
    return lambda t: exp(a - b / (t + c))


def lee_kesler_pressure(tc, pc, boiling):
    """Lee and Kesler 1975 (AIChE J. 21, 510-527), the acentric factor from the normal boiling point."""
    tc, pc, reduced = mpf(tc), mpf(pc), mpf(boiling) / mpf(tc)
    simple = lambda x: mpf("5.92714") - mpf("6.09648") / x - mpf("1.28862") * log(x) + mpf("0.169347") * x**6
    other = lambda x: mpf("15.2518") - mpf("15.6875") / x - mpf("13.4721") * log(x) + mpf("0.43577") * x**6
    acentric = (log(101325 / pc) - simple(reduced)) / other(reduced)
    return lambda t: pc * exp(simple(t / tc) + acentric * other(t / tc))


def ppds_density(row):
    tc, rho_c = mpf(row["Tc"]), mpf(row["rhoc"])
    terms = [(mpf(row[name]), e) for name, e in zip("ABCD", PPDS)]
    return lambda t: rho_c + sum(n * (1 - t / tc) ** e for n, e in terms)


def dippr_105(row, molar_mass):
    c1, c2, c3, c4 = (mpf(row[f"C{k}"]) for k in range(1, 5))
    # The package carries C1 in mol/m3 (Perry's Handbook prints mol/dm3).
    return lambda t: c1 / c2 ** (1 + (1 - t / c3) ** c4) * molar_mass


def ppds_12(tc, coefficients):
    tc = mpf(tc)
    terms = [(mpf(n), e) for n, e in zip(coefficients, PPDS_12)]
    return lambda t: R * tc * sum(n * (1 - t / tc) ** e for n, e in terms)


def dippr_106(row):
    tc = mpf(row["Tc"])
    c1, c2, c3, c4 = (mpf(row[f"C{k}"]) for k in range(1, 5))
    return lambda t: c1 * (1 - t / tc) ** (c2 + c3 * (t / tc) + c4 * (t / tc) ** 2)


def least_squares(rows, targets):
    """Coefficients of the linear fit; normal equations are harmless with many digits. Rounded to eight digits."""
    size = len(rows[0])
    normal, right = matrix(size, size), matrix(size, 1)
    for row, target in zip(rows, targets):
        for i in range(size):
            right[i] += row[i] * target
            for j in range(size):
                normal[i, j] += row[i] * row[j]
    return [float(f"{float(value):.8g}") for value in lu_solve(normal, right)]
