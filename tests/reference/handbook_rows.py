"""Copies the rows that viscosity.py and phase_lines.py use out of the tables that chemicals 1.5.2 carries, into handbook-rows.json.

    target/venv/bin/pip install chemicals==1.5.2 pandas
    target/venv/bin/python tests/reference/handbook_rows.py <folder with catalogue.csv>

One row a fluid and table, keyed by CAS number, the numbers as printed there. Only chemicals is needed, and only when a fluid
is new. The rows under sulfur's number (7704-34-9) are those of another substance (hydrogen sulfide) and are left out.
"""

import csv
import json
import math
import pathlib
import sys

import chemicals.vapor_pressure as vapour
import chemicals.viscosity as viscosity
from chemicals.triple import Pt, Pt_methods, Tt, Tt_methods

HERE = pathlib.Path(__file__).resolve().parent
VISCOSITY_TABLES = [
    "mu_data_Perrys_8E_2_313", "mu_data_Perrys_8E_2_312", "mu_data_VDI_PPDS_7", "mu_data_VDI_PPDS_8", "mu_data_VN3",
    "mu_data_Dutt_Prasad",
]
SUBLIMATION_TABLES = ["Psub_data_Landolt_Antoine", "Psub_data_Alcock_elements"]
WORDS = {"Chemical", "Formula", "Name", "name", "Substance"}
WRONG_SUBSTANCE = {"7704-34-9"}


def plain(value):
    value = float(value)
    return None if math.isnan(value) else value


def row(table, cas):
    return {key: plain(value) for key, value in table.loc[cas].items() if key not in WORDS}


def triple(cas):
    found = {}
    if "STAVELEY" in Tt_methods(cas):
        found["temperature"] = plain(Tt(cas, method="STAVELEY"))
    if "STAVELEY" in Pt_methods(cas):
        found["pressure"] = plain(Pt(cas, method="STAVELEY"))
    return found


def main(data):
    vapour.Psat_data_WagnerMcGarry  # reads all tables: the sublimation rows are not listed by themselves
    numbers = {line["CAS"] for line in csv.DictReader(open(pathlib.Path(data) / "catalogue.csv", encoding="utf-8"))}
    rows = {}
    for cas in sorted(number for number in numbers if number[-1].isdigit() and number not in WRONG_SUBSTANCE):
        tables = {}
        for module, names in ((viscosity, VISCOSITY_TABLES), (vapour, SUBLIMATION_TABLES)):
            for name in names:
                table = getattr(module, name)
                if cas in table.index:
                    tables[name] = row(table, cas)
        if triple(cas):
            tables["Staveley"] = triple(cas)
        if tables:
            rows[cas] = tables
    text = ",\n".join(f"{json.dumps(cas)}: {json.dumps(tables)}" for cas, tables in rows.items())
    (HERE / "handbook-rows.json").write_text("{\n" + text + "\n}\n", encoding="utf-8")
    print(f"{len(rows)} fluids")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit(__doc__)
    main(sys.argv[1])
