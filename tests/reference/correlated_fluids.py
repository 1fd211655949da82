"""Correlated fluids by CAS number: which published form each takes, over which range, and the reasons.

"Calorimetry" below means: Clapeyron's equation integrated down from 25 degC with the calorimetric latent heat, the heat
capacities of liquid (Perry's Handbook) and ideal gas (Poling et al.) and the vapour of vapour_models.py. correlated.py
prints it, with all the figures quoted here. Rows named: VDI (Wagner 2.5/5, VDI Heat Atlas), Poling (Wagner 2.5/5), McGarry
(Wagner 3/6), DIPPR 101 (Perry's Handbook), Antoine (Poling et al.), Landolt (Antoine, Landolt-Boernstein; mostly the same
equation). The working range ends at 0.95 of the critical temperature unless the choice says otherwise.
"""

from dataclasses import dataclass, field

from mpmath import mpf

import published_forms as forms
from taken_forms import (
    MCGARRY_PRESSURE, POLING_PRESSURE, VDI_PRESSURE, FittedWagner, GeneralWagner, PerryDensity, PowersOfTheta, SingleTerm,
    StraightDensity, VdiDensity,
)
from vapour_models import calorimetric_pressure

ESTER = "ketone, nitrile or ester"
HFE_PREPRINT = (
    "Zhou, Y.; Lemmon, E. W.; Mahmoud, A. M. 2012, Equations of state for RE245cb2, RE347mcc, RE245fa2 and R1216 "
    "(preliminary), {} as carried by the public repository jjgomera/pychemqt"
)
MATTHEWS = "Matthews, J. F. 1972, Chem. Rev. 72, 71-100, doi 10.1021/cr60275a004, as carried by chemicals 1.5.2"
STULL = (
    "form Wagner 2.5/5, fitted by tests/reference/correlated.py through Stull, D. R. 1947, Ind. Eng. Chem. 39, 540-550, table for {} "
    "from 5 to 760 mmHg, the boiling point of the CRC Handbook, and above it the equation of Lee and Kesler 1975"
)


@dataclass
class Choice:
    lowest: float  # K, where the working range begins
    liquid_from: float  # K, where the liquid density begins: the melting point, rounded up
    highest: float = None  # K, where it ends before 0.95 of the critical temperature
    pressure: object = field(default_factory=lambda: VDI_PRESSURE)
    density: object = field(default_factory=VdiDensity)
    left_out: dict = field(default_factory=dict)  # vapour-pressure rows that do not count, with the reason
    impossible_heats: tuple = ()  # printed latent heats that no vapour can have
    second_slope: tuple = None  # a second form of the vapour pressure, and where its slope says something on the heat
    polar: str = "none"
    dipole: float = 0.0  # debye, CCCBDB or Muller as carried by chemicals 1.5.2
    tension: object = "VDI"
    joint: float = 1000.0  # Pa, below which the second virial coefficient is held
    extra_pressures: dict = field(default_factory=dict)  # name: (form, lowest, highest)
    extra_densities: dict = field(default_factory=dict)
    least_pressure_uncertainty: float = 0.0  # percent, where the rows compared are not independent enough
    least_density_uncertainty: float = 0.3  # the tables share their data; handbooks differ by this at 20 degC
    least_heat_uncertainty: float = 0.0


def chemsep_105(a, b, c, d, molar_mass):
    a, b, c, d, molar_mass = (mpf(value) for value in (a, b, c, d, molar_mass))
    return lambda t: 1000 * a / b ** (1 + (1 - t / c) ** d) * molar_mass


def from_millimetres(table):
    """(degC, mmHg) as Stull prints them, to (K, Pa)."""
    return tuple((celsius + 273.15, millimetres * 101325 / 760) for celsius, millimetres in table)


def hfe_347mcc_earlier():
    """The first version of the preliminary equation's ancillaries: not independent, it shows what a new fit changed."""
    pressure = GeneralWagner("", 437.7, 2476200.0, [-8.0456, 2.6285, -2.7498, -5.4277, -4.3693], [1, 1.5, 2, 4.25, 12.8], "", "")
    density = PowersOfTheta("", 437.7, 524.143687, [1.5144, 2.3745, -2.6363, 2.0830, 0.50537], [0.29, 0.85, 1.5, 2.2, 9.0], "")
    return pressure.function(), density.function()


FLUIDS = {
    # Dichloromethane. Three rows agree within 1 % from 260 to 333 K. McGarry is 10 to 15 % above them at 235 K and 4 % at
    # 480 K, and boils half a kelvin late. Below 260 K the VDI row climbs to 5 % above DIPPR 101 and Antoine; calorimetry
    # follows it within 0.5 % down to 230 K.
    "75-09-2": Choice(
        lowest=230.0, liquid_from=178.15, second_slope=("DIPPR 101", 260.0, 484.5),
        left_out={"McGarry": "10 to 15 % above the other rows and above calorimetry at 235 K"},
    ),
    # Chloroform. Below 248 K the VDI, DIPPR 101 and Antoine rows agree within 1 % down to 210 K, and all of them are wrong
    # together: calorimetry follows McGarry within 1.6 % down to 210 K, where the others are 17 % below. So the range
    # begins where all rows are within 5 %.
    "67-66-3": Choice(lowest=248.0, liquid_from=210.0, second_slope=("DIPPR 101", 248.0, 509.5)),
    # Carbon tetrachloride. All rows within 2.4 % from the melting point, calorimetry within 0.3 %.
    "56-23-5": Choice(lowest=250.4, liquid_from=250.4, second_slope=("DIPPR 101", 255.0, 528.0)),
    # Trichloroethylene. The VDI row boils 0.8 K early (and implies Z > 1 below 300 K with its latent heat), McGarry is
    # 7 % below Landolt at 25 degC, where its own range hardly begins, and joins it at the boiling point. The Wagner form
    # is fitted here through Landolt in its range and McGarry above it; the VDI row counts as the second source.
    "79-01-6": Choice(
        lowest=232.0, liquid_from=188.5,
        pressure=FittedWagner(
            571.05, 4910000.0,
            "form Wagner 2.5/5; coefficients fitted by tests/reference/correlated.py through the Antoine row of Landolt-Boernstein, "
            "New Series IV/20, from 229 to 369 K and through McGarry 1983 (Ind. Eng. Chem. Process Des. Dev. 22, 313) from 380 to "
            "560 K, both as carried by chemicals 1.5.2, since the row of the VDI Heat Atlas boils 0.8 K early",
            "VDI Heat Atlas, 2nd ed., Springer 2010, table D3.1, the constants of the liquid density, as carried by chemicals 1.5.2",
            rows=(("Landolt", 229.0, 369.0), ("McGarry", 380.0, 560.0)),
        ),
        left_out={"McGarry": "fitted above 380 K; 7 % below Landolt and VDI at 25 degC, where calorimetry cannot judge"},
        extra_densities={"ChemSep": (chemsep_105(1.0632, 0.27217, 571.0, 0.2986, "0.13138834"), 188.4, 571.0)},
    ),
    # Carbon disulfide. VDI and McGarry are one curve above 277 K; DIPPR 101 is 4 % above at 210 K and 3 % at 460 K.
    "75-15-0": Choice(lowest=210.0, liquid_from=161.5, second_slope=("DIPPR 101", 250.0, 460.0)),
    # Acetonitrile. Its vapour associates strongly: B at 25 degC is -5840 cm3/mol (CRC Handbook), -5440 with the polar terms
    # here. The printed VDI latent heat gives Z = 0.76 at 235 K: impossible. DIPPR 101 gives Z > 1 below 280 K.
    "75-05-8": Choice(
        lowest=235.0, liquid_from=229.3, polar=ESTER, dipole=3.92, second_slope=("DIPPR 101", 290.0, 470.0),
        impossible_heats=("VDI", "DIPPR 106"), joint=2000.0,
    ),
    # 2-Butanone. Calorimetry lies between McGarry (1.5 % above it at 260 K) and the Antoine row (3 % below).
    "78-93-3": Choice(lowest=255.0, liquid_from=186.6, polar=ESTER, dipole=2.78, second_slope=("DIPPR 101", 260.0, 500.0)),
    # Isopropanol. Calorimetry follows Poling within 0.4 % down to 255 K, where VDI is 5 % below it and the Antoine row 6 %
    # above; at 25 degC DIPPR 101 is 4 % above the three Wagner rows, which agree within 0.3 %.
    "67-63-0": Choice(
        lowest=255.0, liquid_from=185.3, pressure=POLING_PRESSURE, polar="alkanol", dipole=1.58,
        left_out={
            "Antoine": "4 % above three Wagner rows at 25 degC and 6 % above calorimetry at 260 K",
            "Landolt": "the same equation",
        },
    ),
    # 1-Propanol. The three Wagner rows agree within 1.4 %, calorimetry within 0.8 % of VDI at 260 K; DIPPR 101 is 4 % below.
    "71-23-8": Choice(lowest=260.0, liquid_from=148.8, polar="alkanol", dipole=1.55),
    # Ethylene glycol. McGarry's row takes 645 K for the critical temperature (719 K): 40 % below at 25 degC and 50 % above
    # at 590 K. VDI and DIPPR 101 agree within 3 % from the melting point; Landolt within 3 % in its range. The older
    # calorimetric latent heats of the CRC Handbook are 4 and 5 % below all vapour-pressure rows; they are in the uncertainty.
    "107-21-1": Choice(
        lowest=262.0, liquid_from=260.2, polar="alkanol", dipole=2.31, joint=20000.0,
        left_out={"McGarry": "a wrong critical temperature"},
    ),
    # Methyl formate. VDI and DIPPR 101 within 0.4 %, calorimetry within 0.7 % down to 200 K.
    "107-31-3": Choice(lowest=200.0, liquid_from=174.2, polar=ESTER, dipole=1.77, second_slope=("DIPPR 101", 200.0, 462.0)),
    # Bromoethane. Below 250 K the VDI row parts from DIPPR 101 and Antoine (by 7 % at 235 K, 20 % at 208 K), and its
    # latent heat gives Z = 0.64 at the melting point. At 250 K calorimetry lies 5 % below VDI.
    "74-96-4": Choice(lowest=250.0, liquid_from=154.8, second_slope=("DIPPR 101", 260.0, 400.0), impossible_heats=("DIPPR 106",)),
    # Chlorobenzene. VDI and DIPPR 101 within 1.1 %; calorimetry 3 % below both at 257 K.
    "108-90-7": Choice(lowest=255.0, liquid_from=228.0, second_slope=("DIPPR 101", 260.0, 600.0)),
    # Naphthalene. Five rows within 1.5 % in their own ranges, from the melting point.
    "91-20-3": Choice(lowest=353.4, liquid_from=353.4, second_slope=("DIPPR 101", 353.4, 711.0)),
    # Biphenyl. VDI and McGarry are one curve and take 789 K for the critical temperature; the CRC Handbook and IUPAC say
    # 773 K, so the range ends at 0.95 of that. At the melting point DIPPR 101 is 10 % below, above 445 K within 1.3 %.
    "92-52-4": Choice(
        lowest=342.6, liquid_from=342.6, highest=734.0, tension="Jasper", joint=2000.0, second_slope=("DIPPR 101", 450.0, 734.0)
    ),
    # Diphenyl ether. Not in the VDI tables. McGarry and Landolt are one curve from 477 to 544 K and, beyond their ranges,
    # within 1 % from 407 to 640 K. DIPPR 101 boils half a kelvin late and climbs to twice McGarry at the melting point, with
    # a latent heat of 58.6 kJ/mol at 25 degC; the compilation of Gharagheizi (as carried by chemicals 1.5.2) says 66.1, and
    # McGarry's slope 65.6. So McGarry is followed to the melting point, and 10 % is stated for what 1 % of the latent heat
    # makes there of the vapour pressure.
    "101-84-8": Choice(
        lowest=301.0, liquid_from=300.2, pressure=MCGARRY_PRESSURE, density=PerryDensity(0.000503), tension="Jasper",
        left_out={"DIPPR 101": "twice McGarry at the melting point, against the latent heat there"},
        second_slope=("DIPPR 101", 500.0, 720.0), joint=3000.0, least_pressure_uncertainty=10.0, least_density_uncertainty=1.0,
    ),
    # Phenol. VDI, DIPPR 101 and Antoine agree within 1.5 %. McGarry climbs to 5 % above them at 630 K; Landolt's row, for
    # 315 to 351 K, is 15 % below them at 335 K and 29 % at 314 K.
    "108-95-2": Choice(
        lowest=314.1, liquid_from=314.1, joint=10000.0, second_slope=("DIPPR 101", 340.0, 659.0),
        left_out={"McGarry": "5 % above three other rows at 630 K", "Landolt": "15 % below three other rows at 335 K"},
        impossible_heats=("DIPPR 106",),
    ),
    # 1,1,1,2,2,3,3-Heptafluoro-3-methoxypropane. The ancillary equations of a preliminary equation of state, two versions of
    # which differ by 0.5 % in vapour pressure and 0.6 % in density; the newer is taken. They are not independent, so 2 %
    # is stated: the boiling points of the CRC Handbook (307.15 K), Yaws (307.38 K) and the WebBook (307.4 K) spread by 1 %.
    # The vapour of the equation of state itself is within 0.4 % of Lee and Kesler from 250 to 416 K. A maker's straight line
    # of ln p over 1/T (from memory, 22.978 - 3548.6/T) is 10 % below at 290 K and contradicts the maker's own boiling
    # point of 34 degC by 9 %: left out. The maker's density (1473.3 - 2.6951 t/degC, from memory) agrees within 0.4 % to 320 K;
    # the maker's latent heat at the boiling point (142 kJ/kg, from memory) is 6 % above that of the equation of state.
    "375-03-1": Choice(
        lowest=250.0, liquid_from=250.0,
        pressure=GeneralWagner(
            "ancillary", 437.7, 2476200.0, [-7.911, 1.4904, -3.0464, -4.9639, -7.7423], [1.0, 1.5, 2.7, 4.8, 13.5],
            HFE_PREPRINT.format("ancillary equation of the vapour pressure"), HFE_PREPRINT.format("critical point"),
        ),
        density=PowersOfTheta(
            "ancillary", 437.7, 528.144784, [3.1002, -3.1869, 8.0538, -7.5947, 2.8275], [0.395, 0.75, 1.15, 1.5, 2.15],
            HFE_PREPRINT.format("ancillary equation of the liquid density"),
        ),
        extra_pressures={"earlier version": (hfe_347mcc_earlier()[0], 250.0, 437.7)},
        extra_densities={"earlier version": (hfe_347mcc_earlier()[1], 250.0, 437.7)},
        least_pressure_uncertainty=2.0, least_density_uncertainty=1.0, least_heat_uncertainty=6.0,
        tension=SingleTerm(
            437.7, 0.05031, 1.232, 150.7, 393.93,
            "Mulero, A.; Cachadina, I. 2014, J. Phys. Chem. Ref. Data 43, 023104, doi 10.1063/1.4878755, as carried by chemicals 1.5.2",
        ),
    ),
    # Iodine. VDI and Antoine agree within 0.3 % in the latter's range. Above 650 K nothing is at hand to compare with. The
    # surface tension of the VDI tables is 40 % above the measured values at the melting point: left out.
    "7553-56-2": Choice(
        lowest=386.8, liquid_from=386.8, highest=650.0, tension=None, joint=12000.0, second_slope=("Antoine", 393.0, 487.0),
        least_pressure_uncertainty=2.0, least_density_uncertainty=1.0,
    ),
    # Titanium tetrachloride. Measured vapour pressures are at hand only from memory (Stull's table). At 298 K they give 1.65 kPa;
    # calorimetry from the boiling point (41.0 kJ/mol at 298 K from the enthalpies of formation, 36.2 kJ/mol at the boiling
    # point) 1.35 kPa, the Gibbs energies of formation of the CRC Handbook 1.23 kPa, Lee and Kesler 1.19 kPa. The measured ones
    # are taken and the whole disagreement stated. The range ends with the density's, at the boiling point.
    "7550-45-0": Choice(
        lowest=283.0, liquid_from=249.1, highest=410.0,
        pressure=FittedWagner(
            638.0, 4660950.0, STULL.format("titanium tetrachloride"), MATTHEWS, kind="Memory", rows=(("Lee-Kesler", 430.0, 600.0),),
            points=from_millimetres((
                (9.4, 5), (21.3, 10), (34.2, 20), (48.4, 40), (58.0, 60), (71.0, 100), (90.5, 200), (112.7, 400), (136.0, 760), (136.45, 760),
            )),
        ),
        density=StraightDensity(0.00034), tension=None, least_density_uncertainty=1.0,
        left_out={"Lee-Kesler": "a third below the measured table at 283 K; fitted above the boiling point"},
        extra_pressures={
            "Lee-Kesler": (forms.lee_kesler_pressure(638.0, 4660950.0, 409.6), 200.0, 638.0),
            "calorimetry": (
                calorimetric_pressure(638.0, 4660950.0, 0.265, 409.6, (298.15, 41000), (409.6, 36200), 1.15e-4), 273.0, 410.0,
            ),
        },
    ),
    # Tin tetrachloride. As titanium tetrachloride: at 298 K Stull's table 3.1 kPa, Lee and Kesler 3.3, calorimetry 2.9. (The
    # Gibbs energies of formation give 4.1 kPa; two of them rounded to 0.1 kJ/mol are good for 8 %.)
    "7646-78-8": Choice(
        lowest=273.0, liquid_from=239.1, highest=411.0,
        pressure=FittedWagner(
            592.0, 3749025.0, STULL.format("stannic chloride"), MATTHEWS, kind="Memory", rows=(("Lee-Kesler", 410.0, 560.0),),
            points=from_millimetres((
                (-1.0, 5), (10.0, 10), (22.0, 20), (35.2, 40), (43.5, 60), (54.7, 100), (72.0, 200), (92.1, 400), (113.0, 760), (114.15, 760),
            )),
        ),
        density=StraightDensity(0.000351), tension=None, least_density_uncertainty=1.0,
        extra_pressures={
            "Lee-Kesler": (forms.lee_kesler_pressure(592.0, 3749025.0, 387.3), 200.0, 592.0),
            "calorimetry": (
                calorimetric_pressure(592.0, 3749025.0, 0.262, 387.3, (298.15, 39800), (387.3, 34900), 1.25e-4), 270.0, 411.0,
            ),
        },
    ),
}
