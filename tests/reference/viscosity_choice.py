"""Which viscosity form a fluid takes, over which range, and why: what a person decided. viscosity.py writes it down.

Names are those of fluid-equations.json. A range end of None is the equation's own. Papers are cited from memory, their coefficients
are those that CoolProp 8.0.0 carries, compared with its results by viscosity_tables.py.

Forms that are carried but not taken, with what was seen (per cent: carried form against the handbook tables, at saturation):
- n-Pentane, friction theory (Quinones-Cisneros and Deiters 2006): the data itself calls the set unpublished; the liquid is 20 %
  below Perry's handbook and the VDI Heat Atlas (which agree within 5 %) at 293 K and twenty times too thin at 143 K.
- Cyclopentane, Isopentane, Chung's estimate: the liquid is 25 to 60 % and 10 to 50 % below the tables, which agree within 2 %.
- R14, corresponding states with nitrogen: the tables give 1.5 and 2.5 times its liquid, and each other's; nothing is taken.
- R22, residual entropy: 23 % below the handbooks at 298 K (127 against 156 to 166 uPa s); corresponding states gives 171.
- R32, R245fa: residual entropy is 2 to 10 % from corresponding states, which is nearer to the measurements quoted in 2003.
- R152A, residual entropy: there is a paper on this fluid alone (Krauss et al. 1996).
- R1234yf, R1234ze(E), R124: the residual entropy form is taken; corresponding states is 5 to 12 % higher at 298 K, bends the
  wrong way when cold (R1234yf) or finds no conformal vapour (R124).
"""

CARRIED = "{}, coefficients as carried by CoolProp 8.0.0"
UNSTATED = "The paper's own statement is not at hand."
HUBER_2003 = "Huber, M. L.; Laesecke, A.; Perkins, R. A. 2003, Ind. Eng. Chem. Res. 42, 3163-3178, doi 10.1021/ie0300880"
KLEIN_1997 = "Klein, S. A.; McLinden, M. O.; Laesecke, A. 1997, Int. J. Refrig. 20, 208-217, doi 10.1016/S0140-7007(96)00073-4"
BELL_2016 = "Bell, I. H.; Laesecke, A. 2016, 16th International Refrigeration and Air Conditioning Conference at Purdue, paper 1658"
LEMMON_2004 = "Lemmon, E. W.; Jacobsen, R. T 2004, Int. J. Thermophys. 25, 21-69, doi 10.1023/B:IJOT.0000022327.04529.f3"
HUBER_2004 = "Huber, M. L.; Laesecke, A.; Xiang, H. W. 2004, Fluid Phase Equilib. 224, 263-270, doi 10.1016/j.fluid.2004.07.012"
CAO_2016 = "Cao, F. L.; Meng, X. Y.; Wu, J. T.; Vesovic, V. 2016, J. Phys. Chem. Ref. Data 45, {}"
FRICTION_2006 = "Quiñones-Cisneros, S. E.; Deiters, U. K. 2006, J. Phys. Chem. B 110, 12820-12834, doi 10.1021/jp0618577"

# Lowest temperature, highest, what is stated of the uncertainty, paper.
PAPERS = {
    "Water": (273.16, 1173.15, "1 to 3 % below 100 MPa, 0.15 % near ambient (IAPWS R12-08, from memory).",
              "IAPWS R12-08; Huber, M. L. et al. 2009, J. Phys. Chem. Ref. Data 38, 101-125, doi 10.1063/1.3088050"),
    "HeavyWater": (None, 775.0, "1 to 5 % (from memory of the release).",
                   "IAPWS R4-84 (2007), viscosity and thermal conductivity of heavy water substance"),
    "Helium": (None, None, UNSTATED, "Arp, V. D.; McCarty, R. D.; Friend, D. G. 1998, NIST Technical Note 1334 (revised)"),
    "Methanol": (None, 620.0, "0.6 % in the dilute gas, 2 % in the liquid to 100 MPa (from memory of the paper).",
                 "Xiang, H. W.; Laesecke, A.; Huber, M. L. 2006, J. Phys. Chem. Ref. Data 35, 1597-1620, doi 10.1063/1.2360605"),
    "R23": (153.0, 570.0, UNSTATED, "Shan, Z.; Penoncello, S. G.; Jacobsen, R. T 2000, ASHRAE Transactions 106, part 1, 757-767"),
    "m-Xylene": (273.0, 673.0, "1 % in the dilute gas, 4 % in the liquid (from memory of the paper).", CAO_2016.format("013103")),
    "o-Xylene": (None, 673.0, "1 % in the dilute gas, 4 % in the liquid (from memory of the paper).", CAO_2016.format("023102")),
    "p-Xylene": (None, 673.0, "1 % in the dilute gas, 4 % in the liquid (from memory of the paper).",
                 "Balogun, B.; Riesco, N.; Vesovic, V. 2015, J. Phys. Chem. Ref. Data 44, 013103, doi 10.1063/1.4908048"),
    "Ammonia": (196.0, 680.0, "2 % in the dilute gas, 4 to 5 % in the dense fluid (from memory of the paper).",
                "Fenghour, A. et al. 1995, J. Phys. Chem. Ref. Data 24, 1649-1667, doi 10.1063/1.555961"),
    "Nitrogen": (None, None, "0.5 % in the dilute gas, 2 % elsewhere (from memory of the paper).", LEMMON_2004),
    "Argon": (None, None, "0.5 % in the dilute gas, 2 % elsewhere (from memory of the paper).", LEMMON_2004),
    "Oxygen": (None, None, "1 % in the dilute gas, 5 % in the liquid (from memory of the paper).", LEMMON_2004),
    "Hydrogen": (None, 1000.0, "4 % in the liquid, 0.1 % in the gas near 300 K (from memory of the paper).",
                 "Muzny, C. D.; Huber, M. L.; Kazakov, A. F. 2013, J. Chem. Eng. Data 58, 969-979, doi 10.1021/je301273j"),
    "ParaHydrogen": (None, 1000.0, "As normal hydrogen: 4 % in the liquid (from memory of the paper).",
                     "Muzny, C. D.; Huber, M. L.; Kazakov, A. F. 2013, J. Chem. Eng. Data 58, 969-979, doi 10.1021/je301273j"),
    "Methane": (None, None, UNSTATED + " Perry's handbook agrees within 5 % in the liquid.", FRICTION_2006),
    "Ethane": (None, 500.0, "2 % (from memory of the paper).",
               "Friend, D. G.; Ingham, H.; Ely, J. F. 1991, J. Phys. Chem. Ref. Data 20, 275-347, doi 10.1063/1.555881"),
    "CarbonDioxide": (None, None, "0.2 % in the gas near ambient, 1 to 4 % in the liquid (from memory of the paper).",
                      "Laesecke, A.; Muzny, C. D. 2017, J. Phys. Chem. Ref. Data 46, 013107, doi 10.1063/1.4977429"),
    "SulfurHexafluoride": (None, None, "2 % (from memory of the paper).",
                           "Quiñones-Cisneros, S. E.; Huber, M. L.; Deiters, U. K. 2012, J. Phys. Chem. Ref. Data 41, 023102, "
                           "doi 10.1063/1.3702441"),
    "HydrogenSulfide": (None, None, UNSTATED + " The few handbook tables differ by 20 % in the liquid.",
                        "Quiñones-Cisneros, S. E.; Schmidt, K. A. G.; Giri, B. R.; Blais, P.; Marriott, R. A. 2012, "
                        "J. Chem. Eng. Data 57, 3014-3018, doi 10.1021/je300601h"),
    "DimethylEther": (233.15, 373.15, UNSTATED,
                      "Meng, X. Y.; Zhang, J. B.; Wu, J. T.; Liu, Z. G. 2012, J. Chem. Eng. Data 57, 988-993, doi 10.1021/je201297j"),
    "Ethanol": (200.0, 600.0, UNSTATED + " Perry's handbook agrees within 8 % in the liquid.",
                "Kiselev, S. B. et al. 2005, Ind. Eng. Chem. Res. 44, 6916-6927, doi 10.1021/ie050010e"),
    "n-Propane": (90.0, 600.0, "0.4 to 4 % (from memory of the paper).",
                  "Vogel, E. et al. 1998, J. Phys. Chem. Ref. Data 27, 947-970, doi 10.1063/1.556025"),
    "n-Butane": (None, 500.0, "0.4 to 4 % (from memory of the paper).",
                 "Vogel, E.; Küchenmeister, C.; Bich, E. 1999, High Temp. High Press. 31, 173-186"),
    "IsoButane": (None, 575.0, "0.4 to 4 % (from memory of the paper).",
                  "Vogel, E.; Küchenmeister, C.; Bich, E. 2000, Int. J. Thermophys. 21, 343-356, doi 10.1023/A:1006623310780"),
    "n-Hexane": (None, 600.0, "1 % in the dilute gas, 2 % in the liquid (from memory of the paper).",
                 "Michailidou, E. K. et al. 2013, J. Phys. Chem. Ref. Data 42, 033104, doi 10.1063/1.4818980"),
    "n-Heptane": (None, 600.0, "1 % in the dilute gas, 3.5 % in the liquid (from memory of the paper).",
                  "Michailidou, E. K. et al. 2014, J. Phys. Chem. Ref. Data 43, 023103, doi 10.1063/1.4875930"),
    "n-Octane": (None, None, "2 to 5 % (from memory of the paper).", HUBER_2004),
    "n-Nonane": (None, None, "2 to 5 % (from memory of the paper).", HUBER_2004),
    "n-Decane": (None, None, "2 to 5 % (from memory of the paper).", HUBER_2004),
    "n-Dodecane": (None, None, "0.5 to 3 % in the liquid (from memory of the paper).",
                   "Huber, M. L.; Laesecke, A.; Perkins, R. 2004, Energy Fuels 18, 968-975, doi 10.1021/ef034109e"),
    "Benzene": (None, 675.0, "1 % in the dilute gas, 1.8 to 3 % in the liquid (from memory of the paper).",
                "Avgeri, S. et al. 2014, J. Phys. Chem. Ref. Data 43, 033103, doi 10.1063/1.4892935"),
    "Toluene": (None, 675.0, "1 % in the dilute gas, 2 to 3 % in the liquid (from memory of the paper).",
                "Avgeri, S. et al. 2015, J. Phys. Chem. Ref. Data 44, 033101, doi 10.1063/1.4926955"),
    "CycloHexane": (None, 700.0, "0.5 % in the dilute gas, 1.2 to 3 % in the liquid (from memory of the paper).",
                    "Tariq, U.; Jusoh, A. R. B.; Riesco, N.; Vesovic, V. 2014, J. Phys. Chem. Ref. Data 43, 033101, "
                    "doi 10.1063/1.4891103"),
    "R123": (233.15, 423.15, UNSTATED, "Tanaka, Y.; Sotani, T. 1996, Int. J. Thermophys. 17, 293-328, doi 10.1007/BF01443394"),
    "R125": (None, None, "0.8 to 3 % (from memory of the paper).",
             "Huber, M. L.; Laesecke, A. 2006, Ind. Eng. Chem. Res. 45, 4447-4453, doi 10.1021/ie051367l"),
    "R134a": (None, None, "1.5 to 3 % (from memory of the paper).", HUBER_2003),
    "R152A": (240.0, 440.0, UNSTATED + " Perry's handbook agrees within 2 % in the liquid from 250 to 320 K.",
              "Krauss, R.; Weiss, V. C.; Edison, T. A.; Sengers, J. V.; Stephan, K. 1996, Int. J. Thermophys. 17, 731-757, "
              "doi 10.1007/BF01439187"),
    "R1234yf": (184.0, None, UNSTATED + " The corresponding-states form of the same record is within 10 % from 250 to 350 K.", BELL_2016),
    "R1234ze(E)": (192.0, None, UNSTATED + " The corresponding-states form of the same record is 5 to 17 % higher from 250 to 350 K.",
                   BELL_2016),
    "R124": (198.0, None, UNSTATED + " The corresponding-states form of the same record is within 5 % from 250 to 350 K.", BELL_2016),
    # Corresponding states. Below half the critical temperature nothing was found to check them by, and some run away.
    "R11": (236.0, None, UNSTATED, KLEIN_1997),
    "R12": (193.0, None, UNSTATED, KLEIN_1997),
    "R13": (152.0, None, UNSTATED, HUBER_2003),
    "R22": (185.0, None, UNSTATED + " A handbook value at 298 K is 3 % lower.", KLEIN_1997),
    "R32": (176.0, None, UNSTATED + " Perry's handbook agrees within 2 % in the liquid from 230 to 323 K.", HUBER_2003),
    "R116": (None, None, UNSTATED, HUBER_2003),
    "R141b": (239.0, None, UNSTATED, HUBER_2003),
    "R142b": (206.0, None, UNSTATED, HUBER_2003),
    "R143a": (173.0, None, UNSTATED, KLEIN_1997),
    "R218": (173.0, None, UNSTATED, HUBER_2003),
    "R227EA": (188.0, None, UNSTATED, HUBER_2003),
    "R236EA": (243.0, None, UNSTATED, HUBER_2003),
    "R236FA": (200.0, None, UNSTATED, HUBER_2003),
    "R245fa": (240.0, None, UNSTATED + " Colder, the form runs away.", HUBER_2003),
    "RC318": (None, None, UNSTATED, HUBER_2003),
    "Propylene": (183.0, None, UNSTATED, HUBER_2003),
    "EthylBenzene": (309.0, None, UNSTATED + " Perry's handbook is 4 % higher at 298 K.",
                     "Huber, M. L., NIST, unpublished report of project RP-912"),
}

# Of a record with two forms, the one that is taken.
TAKEN_OF_TWO = {"R1234yf": 0, "R1234ze(E)": 0, "R124": 0, "R152A": 1, "R22": 1, "R245fa": 1, "R32": 1}

# Reference fluids of corresponding states: name in the data, id here.
REFERENCE_FLUIDS = {"R134a": "r-134a", "Propane": "propane", "Nitrogen": "nitrogen"}

# Highest temperature over the critical one: above it the conformal state leaves the reference fluid's own equation.
HIGHEST_CONFORMAL = {"R134a": 1.15, "Propane": 1.65, "Nitrogen": 7.0}

# With a reference form, tables go on beyond its range only where they join it within some 10 %.
TABLES_BESIDE_A_FORM = {
    "R152A": ("liquid", "vapour"), "m-Xylene": ("liquid",), "EthylBenzene": ("liquid", "vapour"),
    "Propylene": ("liquid", "vapour"), "R32": ("liquid", "vapour"),
}

# Ranges narrowed by hand, K: CAS number, phase; None takes the table out.
NARROWED = {
    ("75-73-0", "liquid"): None,  # the tables differ by a factor of 1.5 to 3
    ("75-19-4", "liquid"): None,  # cyclopropane: the tables differ by 15 to 25 %
    ("75-37-6", "liquid"): (200.0, 343.15),  # R-152a: 20 % from the residual entropy form at 180 K
    ("67-64-1", "liquid"): (190.0, 329.44),
}


def form_taken(name, record):
    """The form of the record that is taken."""
    carried = record["TRANSPORT"]["viscosity"]
    return carried[TAKEN_OF_TWO[name]] if isinstance(carried, list) else carried


def is_conformal(name, record):
    return form_taken(name, record).get("type") == "ECS"


def highest_temperature(name, record):
    """Of the form taken, K; infinite where the equation's own end counts."""
    reach = HIGHEST_CONFORMAL.get(form_taken(name, record).get("reference_fluid"))
    conformal = reach * record["EOS"][0]["STATES"]["reducing"]["T"] if reach else float("inf")
    return min(PAPERS[name][1] or float("inf"), float(f"{conformal:.0f}") if reach else conformal)


# Liquid metals: (form, coefficients, range, source).
METALS = {
    "7440-23-5": ("Dippr101", (-6.4406, 556.835, -0.3958, 0.0, 0.0), (371.0, 2500.0),
                  ("Memory", "Fink, J. K.; Leibowitz, L. 1995, Argonne National Laboratory report ANL/RE-95/2")),
    "7439-93-2": ("Dippr101", (-4.16435, 292.1, -0.6374, 0.0, 0.0), (454.0, 1300.0),
                  ("Memory", "Davison, H. W. 1968, NASA Technical Note D-4650")),
}
# Viswanath and Natarajan's rows that were compared with a value remembered of a handbook; many others are off by powers of ten.
VISWANATH_TAKEN = {"7439-97-6", "7440-09-7", "7440-66-6"}
