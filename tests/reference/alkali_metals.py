"""The alkali metals: which published forms make_fluids.py takes, and why.

Sodium. Vapour pressure, liquid density and surface tension of Fink and Leibowitz 1995; the vapour pressure is made for 864 to
2499 K, and McBride et al. 2002 agree within 4.2 % from there down to the melting point. The vapour is the quasi-chemical
mixture of atoms, pairs and fours fitted by the Naval Research Laboratory to its own p-V-T measurements, in the form of Golden
and Tokar 1967. Their latent heat from calorimetry, that of Fink and Leibowitz, and Clapeyron's here agree within 1.5 %.
Potassium. Vapour pressure, liquid density and vapour of the same laboratory (Golden's form for potassium). It boils 2 K low
by the other handbooks, which is to the careful side. The constants of McBride et al. 2002 rest on a binding energy of K2 that is
242 cm-1 under the spectroscopic one, so they are not used.
Lithium. Vapour pressure of Bystrov et al. 1988 (700 to 2000 K, stated within 2 %; it joins McBride et al. within 5 % down to
the melting point, where Browning and Potter 1985, made for 1057 to 2156 K, parts from both), liquid density of Ohse's
handbook, Li2 by McBride et al. The slope of the CRC Handbook's line is five times too steep: only its value at the melting
point counts.
Caesium. Vapour pressure of the Naval Research Laboratory from memory; the equation for 643 to 933 K in lbh15's manual agrees
within 1.4 %. Cs2 by McBride et al.; the straight line of the CRC Handbook ends at 783 K, so the liquid's density is a
parabola through it and the handbook values that J. Thermodyn. Catal. 7 (2016) 163 lists for 800 to 1100 K.
Rubidium. No published equation was at hand that holds at the boiling point: the vapour pressure is fitted to atoms and Rb2
in equilibrium with the liquid by McBride et al.; it boils 1.3 K below the handbooks. Rb2 (missing there) from the
spectroscopic constants as a vibrating rotor. Done for Na2 and Cs2 the same calculation is within 7 and 14 % of McBride et al.
from 600 to 1200 K, which is 0.6 % of the vapour's density; it gives 7.4 % of Rb2 at 950 K, as is published.
"""

from mpmath import mp, mpf

import nasa_glenn
from association import Association, fitted
from metal_choice import (
    BYSTROV, CRC, FINK, GOLDEN_K, GOLDEN_NA, HANDBOOK, MCBRIDE, OHSE, Choice, associating, bars, crc_line, dippr,
    exact_pairs, mcbride_pairs, molar, pairs_of, straight, theta,
)
from metal_forms import (
    ATM, RB2, dippr_101, fahrenheit_density, polynomial, rankine_constants, rankine_pressure, thermochemical_pressure,
)
from published_forms import least_squares

YAWS = "Published(Yaws, C. L. 2014, Thermophysical Properties of Chemicals and Hydrocarbons, as carried by chemicals 1.5.2)"


def sodium(coefficients, molar_mass):
    tables = coefficients["tables"]
    pressure, form = dippr([mpf("11.9463") + mp.log(10**6), "-12633.73", "-0.4672", 0, 0])
    density, density_form = theta(219, "2503.7", ["275.32", "511.58"], ["1", "0.5"])
    vapour, mixture = associating(1, rankine_constants((2, "-9.95845", "16588.3"), (4, "-24.59115", "37589.7")), ATM)
    other = Association(1, [(2, *fitted(mcbride_pairs("Na"), 500, 1500))], nasa_glenn.BAR)
    navy = dippr_101(rankine_pressure("6.8817602e6", "0.61344", "-22981.96"))
    return Choice(
        (370.9, 1500.0), (2503.7, 25.64e6, 219.0), f"Published({FINK.format('critical point')})",
        pressure, form, ("Published", FINK.format("vapour pressure, after Browning and Potter 1985")),
        density, density_form, ("Published", FINK.format("liquid density")),
        vapour, ("Published", GOLDEN_NA.format("quasi-chemical constants of sodium vapour")), mixture,
        other_pressures={"McBride": (thermochemical_pressure("Na", mcbride_pairs("Na")), 371.1, 1290.0), "Navy": (navy, 1150.0, 1500.0)},
        other_densities={
            "Golden": (polynomial(fahrenheit_density("59.566", "-7.9504e-3", "-0.2872e-6", "0.06035e-9")), 371.0, 1500.0),
            "CRC": (polynomial(crc_line(tables["rho_data_CRC_inorg_l"])), 371.0, 873.15),
        },
        other_vapours={"McBride": (lambda p, t: other.density(p, t, molar_mass), 500.0, 1500.0)},
        least_density_uncertainty=0.6,
        tension=(2503.7, [0.2405], [1.126], 370.9, 1500.0, f"Published({FINK.format('surface tension')})"),
    )


def potassium(coefficients, molar_mass):
    tables = coefficients["tables"]
    pressure, form = dippr(rankine_pressure("1.3408e6", "0.53299", "-18717"))
    density, density_form = straight(fahrenheit_density("52.768", "-7.4975e-3", "-0.5255e-6", "0.0498e-9"))
    vapour, mixture = associating(1, rankine_constants((2, "-8.9033", "12250.1"), (4, "-23.394", "31694.6")), ATM)
    return Choice(
        (336.6, 1400.0), (2223.0, 16.0e6, 187.0), YAWS,
        pressure, form, ("Published", GOLDEN_K.format("vapour pressure")),
        density, density_form, ("Published", GOLDEN_K.format("liquid density")),
        vapour, ("Published", GOLDEN_K.format("quasi-chemical constants of potassium vapour")), mixture,
        other_pressures={
            "McBride": (thermochemical_pressure("K", mixture.pairs_per_bar), 336.8, 1140.0),
            "handbook": bars({1100: 1.86, 1200: 3.91, 1300: 7.30, 1400: 12.44}),
        },
        other_densities={"CRC": (polynomial(crc_line(tables["rho_data_CRC_inorg_l"])), 336.65, 773.15)},
        least_pressure_uncertainty=4.5,  # the handbooks boil it at 1032 K, where this is 2 % above them
        least_density_uncertainty=1.0,
        least_vapour_uncertainty=3.0,
    )


def lithium(coefficients, molar_mass):
    tables = coefficients["tables"]
    c, m, z, p = mpf("-2.0532"), mpf("-19.4268"), mpf("9.4993"), mpf("0.7530")
    # ln(p/MPa) = c ln x + m/x + z + p x with x = T/1000
    pressure, form = dippr([z + mp.log(10**6) - c * mp.log(1000), 1000 * m, c, p / 1000, 1])
    # 278.5 - 0.04657 T + 274.6 (1 - T/3500)^0.467
    slope = mpf("0.04657") * 3500
    density, density_form = theta(mpf("278.5") - slope, 3500, [slope, "274.6"], ["1", "0.467"])
    vapour, mixture = pairs_of(mcbride_pairs("Li"), 800, 1900)
    browning = dippr_101([mpf("13.0719") + mp.log(10**6), "-18880.659", "-0.4942", 0, 0])
    return Choice(
        (453.6, 1900.0), (3223.0, 67.0e6, 105.0), "Memory(CRC Handbook of Chemistry and Physics, critical constants)",
        pressure, form, ("Published", BYSTROV),
        density, density_form, ("Published", OHSE.format("liquid density, as public codes carry it")),
        vapour, ("Published", f"{MCBRIDE}: Li2, fitted as A + B/T"), mixture,
        other_pressures={
            "McBride": (thermochemical_pressure("Li", mcbride_pairs("Li")), 454.0, 1780.0), "Browning": (browning, 1057.0, 1900.0),
        },
        other_densities={"CRC": {453.65: tables["rho_data_CRC_inorg_l"]["rho"]}},
        other_vapours={"unfitted": (exact_pairs(mcbride_pairs("Li"), molar_mass), 900.0, 1900.0)},
        least_density_uncertainty=2.5,
        least_vapour_uncertainty=2.0,
    )


def rubidium(coefficients, molar_mass):
    tables = coefficients["tables"]
    source = thermochemical_pressure("Rb", RB2)
    grid = [mpf(t) for t in range(315, 1075, 10)]
    pressure, form = dippr([*least_squares([[1, 1 / t, mp.log(t)] for t in grid], [mp.log(source(t)) for t in grid]), 0, 0])
    density, density_form = straight(crc_line(tables["rho_data_CRC_inorg_l"]))
    vapour, mixture = pairs_of(RB2, 500, 1070)
    alcock = tables["Psat_data_Alcock_elements"]
    return Choice(
        (312.4, 1073.15), (2093.0, 16.0e6, 346.0), YAWS,
        pressure, form, ("Practice", f"form DIPPR 101, fitted by tests/reference/metals.py to atoms and Rb2 over the liquid by {MCBRIDE}"),
        density, density_form, ("Published", CRC.format("liquid density")),
        vapour, ("Memory", "Huber, K. P.; Herzberg, G. 1979, Constants of Diatomic Molecules, Rb2 as a vibrating rotor (tests/reference/metals.py), fitted as A + B/T"), mixture,
        other_pressures={
            "unfitted": (source, 313.0, 1073.0),
            "Alcock": (dippr_101([alcock[name] for name in "ABCDE"]), 313.0, 550.0),
            "handbook": bars({1000: 1.47}),
        },
        other_densities={"handbook": molar({800: 6.85, 900: 7.11, 1000: 7.39}, molar_mass)},
        other_vapours={"unfitted": (exact_pairs(RB2, molar_mass), 500.0, 1073.0)},
        least_pressure_uncertainty=4.5,  # the ideal gas of McBride et al. is that far below the other alkali metals at 2 bar
        least_vapour_uncertainty=3.0,
    )


def caesium(coefficients, molar_mass):
    tables = coefficients["tables"]
    pressure, form = dippr(rankine_pressure(mpf(10) ** mpf("5.87480"), "0.53290", mpf("-7040.7") * mp.log(10)))
    line = crc_line(tables["rho_data_CRC_inorg_l"])
    volumes = {800: 8.56, 900: 8.89, 1000: 9.24, 1100: 9.65}
    points = [(mpf(t), polynomial(line)(t)) for t in range(302, 783, 40)]
    points += [(mpf(t), molar_mass / mpf(str(v)) * 10**5) for t, v in volumes.items()]
    density, density_form = straight(least_squares([[1, t, t**2] for t, _ in points], [rho for _, rho in points]))
    vapour, mixture = pairs_of(mcbride_pairs("Cs"), 500, 1100)
    manual = lambda t: mpf(10) ** (
        mpf("-4979.5799") / t - mpf("9.3234247") * mp.log(t, 10) + mpf("0.0044733132") * t - mpf("8.684092e-7") * t**2 + mpf("34.573234")
    )
    return Choice(
        (301.6, 1100.0), (1938.0, 9.4e6, 390.0), YAWS,
        pressure, form, ("Memory", "Stone, J. P.; Ewing, C. T.; Spann, J. R.; Steinkuller, E. W.; Williams, D. D.; Miller, R. R. 1966, J. Chem. Eng. Data 11, 309-314"),
        density, density_form, ("Practice", f"parabola fitted by tests/reference/metals.py to the line of the CRC Handbook, 95th ed., as carried by chemicals 1.5.2, up to 783 K and to {HANDBOOK} from 800 to 1100 K"),
        vapour, ("Published", f"{MCBRIDE}: Cs2, fitted as A + B/T"), mixture,
        other_pressures={
            "McBride": (thermochemical_pressure("Cs", mcbride_pairs("Cs")), 301.7, 1060.0),
            "manual": (manual, 643.0, 933.0),
            "handbook": bars({1000: 1.69, 1100: 3.63}),
        },
        other_densities={
            "CRC": (polynomial(line), 301.65, 783.15), "handbook": molar(volumes, molar_mass),
        },
        other_vapours={"unfitted": (exact_pairs(mcbride_pairs("Cs"), molar_mass), 500.0, 1100.0)},
        least_density_uncertainty=1.0,
        least_vapour_uncertainty=3.0,
    )
