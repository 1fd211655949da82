"""A vapour of molecules of several sizes in equilibrium, as src/fluid/correlated/association.rs has it."""

from mpmath import exp, log, mpf

from published_forms import R, least_squares


class Association:
    """`larger` are (atoms, A, B) with log10 K = A + B/T in powers of `unit` (Pa)."""

    def __init__(self, smallest_atoms, larger, unit):
        self.smallest, self.unit = mpf(smallest_atoms), mpf(unit)
        self.larger = [(mpf(atoms), mpf(a), mpf(b)) for atoms, a, b in larger]

    def parts(self, p, t):
        """(atoms, partial pressure in Pa) of each molecule at a total pressure."""
        kinds = [(self.smallest, mpf(1), mpf(0))]
        kinds += [(n, n / self.smallest, (a + b / t) * log(mpf(10))) for n, a, b in self.larger]
        wanted = mpf(p) / self.unit
        u = min((log(wanted) - k) / size for _, size, k in kinds)
        for _ in range(60):
            shares = [(size, exp(k + size * u)) for _, size, k in kinds]
            total = sum(share for _, share in shares)
            step = log(total / wanted) * total / sum(size * share for size, share in shares)
            u -= step
            if abs(step) < mpf(10) ** -25:
                break
        return [(n, self.unit * exp(k + size * u)) for n, size, k in kinds]

    def density(self, p, t, molar_mass):
        """kg/m3; the molar mass is that of one atom, kg/mol."""
        return sum(n * part for n, part in self.parts(p, t)) * molar_mass / (R * t)

    def pairs_per_bar(self, t):
        """The constant of two of the smallest in one molecule, 1/bar."""
        ((_, a, b),) = [kind for kind in self.larger if kind[0] == 2 * self.smallest]
        return mpf(10) ** (a + b / mpf(t)) * 100000 / self.unit

    def mass_fraction(self, atoms, p, t):
        parts = self.parts(p, t)
        return sum(n * part for n, part in parts if n == atoms) / sum(n * part for n, part in parts)


def fitted(constant, low, high):
    """A and B of log10 K = A + B/T through a constant every 10 K."""
    grid = range(int(low), int(high) + 1, 10)
    return least_squares([[mpf(1), 1 / mpf(t)] for t in grid], [log(constant(t), 10) for t in grid])
