"""Thermodynamic functions of the elements from nasa-glenn.inp: nine-coefficient polynomials of McBride, Zehe and Gordon 2002.

From the Gibbs energies follow, at a pressure of one bar, the partial pressures of atoms and molecules over the liquid and
the equilibrium constants between them. The gases are ideal there: the sum is right to a few per cent up to about 3 bar.
"""

import pathlib

from mpmath import exp, log, mpf

BAR = mpf(100000)


def _number(text):
    text = text.strip().replace("D", "E")
    return mpf(text) if text else mpf(0)


def _read():
    path = pathlib.Path(__file__).resolve().with_name("nasa-glenn.inp")
    lines = [line for line in path.read_text(encoding="ascii").splitlines() if not line.startswith("!")]
    species, at = {}, 0
    while at < len(lines):
        name, intervals = lines[at].split()[0], int(lines[at + 1][:2])
        pieces = []
        for k in range(intervals):
            limits, first, second = lines[at + 2 + 3 * k : at + 5 + 3 * k]
            powers = [_number(first[16 * i : 16 * i + 16]) for i in range(5)]
            powers += [_number(second[16 * i : 16 * i + 16]) for i in range(2)]
            constants = _number(second[48:64]), _number(second[64:80])
            pieces.append((_number(limits[:11]), _number(limits[11:22]), powers, constants))
        species[name] = pieces
        at += 2 + 3 * intervals
    return species


SPECIES = _read()


def gibbs(name, t):
    """G/RT at one bar."""
    t = mpf(t)
    # A kelvin more at the ends: the melting points of the sources differ by some hundredths.
    (_, _, a, (b1, b2)), *_ = [piece for piece in SPECIES[name] if piece[0] - 1 <= t <= piece[1] + 1]
    enthalpy = -a[0] / t**2 + a[1] * log(t) / t + a[2] + sum(a[2 + k] * t**k / (k + 1) for k in range(1, 5)) + b1 / t
    entropy = -a[0] / t**2 / 2 - a[1] / t + a[2] * log(t) + sum(a[2 + k] * t**k / k for k in range(1, 5)) + b2
    return enthalpy - entropy


def partial_pressure(molecule, atoms, liquid, t):
    """Of a molecule of so many atoms over the liquid element, Pa."""
    return BAR * exp(atoms * gibbs(liquid, t) - gibbs(molecule, t))


def constant(molecule, atoms, smallest, smallest_atoms, t):
    """K of (atoms/smallest_atoms) smallest = molecule, in powers of a bar."""
    return exp(mpf(atoms) / smallest_atoms * gibbs(smallest, t) - gibbs(molecule, t))
