//! The units that are understood when typed, one row each.

/// What a number measures; decides which units are understood for it.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Kind {
    Temperature,
    TemperatureDifference,
    Pressure,
    Length,
    Volume,
    Mass,
    Density,
    Ratio,
    Energy,
    /// Permeability of a wick.
    Area,
    /// Openings of a screen per length.
    MeshNumber,
    Angle,
    /// Of substance.
    Amount,
    /// A bare number, such as a factor.
    Number,
}

/// One unit: `SI value = number × scale + offset`.
#[derive(Debug, PartialEq)]
pub struct Unit {
    pub kind: Kind,
    /// As printed.
    pub symbol: &'static str,
    /// Other spellings that are understood.
    pub aliases: &'static [&'static str],
    pub scale: f64,
    pub offset: f64,
}

impl Unit {
    /// SI value of a number in this unit.
    pub fn to_si(&self, number: f64) -> f64 {
        number * self.scale + self.offset
    }

    /// Number in this unit of an SI value.
    pub fn number_of(&self, si: f64) -> f64 {
        (si - self.offset) / self.scale
    }
}

/// The unit of a kind printed as `symbol`.
///
/// # Panics
/// If the symbol is not in [`UNITS`]; callers name units in source only.
pub fn unit_named(kind: Kind, symbol: &str) -> &'static Unit {
    UNITS
        .iter()
        .find(|unit| unit.kind == kind && unit.symbol == symbol)
        .expect("units named in source are in the table")
}

const fn unit(
    kind: Kind,
    symbol: &'static str,
    aliases: &'static [&'static str],
    scale: f64,
) -> Unit {
    Unit {
        kind,
        symbol,
        aliases,
        scale,
        offset: 0.0,
    }
}

const INCH: f64 = 0.0254;
const FOOT: f64 = 0.3048;
const POUND: f64 = 0.453_592_37;
const PSI: f64 = 6_894.757_293_168_361;
/// An ideal gas at 20 °C and 101 325 Pa, mol/m³: what NTP means here and to NIST [from memory].
const MOLE_PER_M3_NTP: f64 = 101_325.0 / (8.314_462_618_153_24 * 293.15);
const US_GALLON: f64 = 231.0 * INCH * INCH * INCH;

/// Every unit understood. Conversion factors: NIST SP 811 (2008), appendix B;
/// inch, pound and the conventional millimetres of mercury are exact there.
pub static UNITS: &[Unit] = &[
    unit(Kind::Temperature, "K", &["kelvin"], 1.0),
    Unit {
        kind: Kind::Temperature,
        symbol: "°C",
        aliases: &["degC", "C", "celsius", "ºC", "deg C"],
        scale: 1.0,
        offset: 273.15,
    },
    Unit {
        kind: Kind::Temperature,
        symbol: "°F",
        aliases: &["degF", "F", "fahrenheit", "ºF", "deg F"],
        scale: 5.0 / 9.0,
        offset: 459.67 * 5.0 / 9.0,
    },
    unit(
        Kind::Temperature,
        "°R",
        &["degR", "R", "rankine"],
        5.0 / 9.0,
    ),
    unit(
        Kind::TemperatureDifference,
        "K",
        &["kelvin", "°C", "degC", "C", "celsius"],
        1.0,
    ),
    unit(
        Kind::TemperatureDifference,
        "°F",
        &["degF", "F", "°R", "R"],
        5.0 / 9.0,
    ),
    unit(Kind::TemperatureDifference, "mK", &[], 1e-3),
    unit(Kind::Pressure, "Pa", &["pascal"], 1.0),
    unit(Kind::Pressure, "hPa", &[], 100.0),
    unit(Kind::Pressure, "kPa", &[], 1e3),
    unit(Kind::Pressure, "MPa", &["N/mm2", "N/mm²"], 1e6),
    unit(Kind::Pressure, "GPa", &[], 1e9),
    unit(Kind::Pressure, "bar", &["bara", "bar(a)", "bar a"], 1e5),
    unit(Kind::Pressure, "mbar", &[], 100.0),
    unit(Kind::Pressure, "µbar", &["ubar", "microbar"], 0.1),
    unit(Kind::Pressure, "psi", &["psia", "lbf/in2", "lb/in2"], PSI),
    unit(Kind::Pressure, "ksi", &[], 1000.0 * PSI),
    unit(Kind::Pressure, "atm", &[], 101_325.0),
    unit(Kind::Pressure, "Torr", &[], 101_325.0 / 760.0),
    unit(Kind::Pressure, "mmHg", &["mm Hg"], 133.322_387_415),
    unit(Kind::Pressure, "inHg", &["in Hg"], 3_386.388_640_341),
    unit(Kind::Length, "m", &["metre", "meter"], 1.0),
    unit(Kind::Length, "cm", &[], 1e-2),
    unit(Kind::Length, "mm", &[], 1e-3),
    unit(Kind::Length, "µm", &["um", "micron", "μm"], 1e-6),
    unit(Kind::Length, "in", &["inch", "inches", "\"", "″"], INCH),
    unit(Kind::Length, "mil", &["thou"], INCH / 1000.0),
    unit(Kind::Length, "ft", &["foot", "feet", "'"], FOOT),
    unit(Kind::Volume, "m³", &["m3", "m^3"], 1.0),
    unit(
        Kind::Volume,
        "L",
        &["l", "litre", "liter", "dm3", "dm³"],
        1e-3,
    ),
    unit(
        Kind::Volume,
        "mL",
        &["ml", "cc", "cm3", "cm³", "cm^3"],
        1e-6,
    ),
    unit(Kind::Volume, "µL", &["ul", "uL", "mm3", "mm³", "μL"], 1e-9),
    unit(
        Kind::Volume,
        "in³",
        &["in3", "in^3", "cu in", "cuin"],
        INCH * INCH * INCH,
    ),
    unit(
        Kind::Volume,
        "ft³",
        &["ft3", "ft^3", "cu ft", "cuft"],
        FOOT * FOOT * FOOT,
    ),
    unit(
        Kind::Volume,
        "fl oz",
        &["floz", "US fl oz"],
        US_GALLON / 128.0,
    ),
    unit(Kind::Volume, "gal", &["US gal"], US_GALLON),
    unit(Kind::Mass, "kg", &["kilogram"], 1.0),
    unit(Kind::Mass, "g", &["gram", "grams"], 1e-3),
    unit(Kind::Mass, "mg", &[], 1e-6),
    unit(Kind::Mass, "t", &["tonne"], 1e3),
    unit(Kind::Mass, "lb", &["lbs", "pound", "lbm"], POUND),
    unit(Kind::Mass, "oz", &["ounce"], POUND / 16.0),
    unit(Kind::Mass, "gr", &["grain"], POUND / 7000.0),
    unit(
        Kind::Density,
        "kg/m³",
        &["kg/m3", "kg/m^3", "g/L", "g/l"],
        1.0,
    ),
    unit(
        Kind::Density,
        "kg/L",
        &["kg/l", "g/mL", "g/ml", "g/cc", "g/cm3", "g/cm³"],
        1e3,
    ),
    unit(Kind::Density, "mg/m³", &["mg/m3"], 1e-6),
    unit(Kind::Density, "g/m³", &["g/m3"], 1e-3),
    unit(
        Kind::Density,
        "lb/ft³",
        &["lb/ft3"],
        POUND / (FOOT * FOOT * FOOT),
    ),
    unit(Kind::Ratio, "%", &["percent", "pct"], 1e-2),
    unit(Kind::Ratio, "", &[], 1.0),
    unit(Kind::Energy, "J", &[], 1.0),
    unit(Kind::Energy, "kJ", &[], 1e3),
    unit(Kind::Energy, "ft·lbf", &["ft lbf"], 1.355_817_948_331_400_4),
    unit(Kind::Area, "m²", &["m2", "m^2"], 1.0),
    unit(
        Kind::Area,
        "µm²",
        &["um2", "um²", "µm2", "μm²", "μm2"],
        1e-12,
    ),
    unit(Kind::MeshNumber, "/m", &["1/m"], 1.0),
    unit(Kind::MeshNumber, "/mm", &["1/mm", "per mm"], 1e3),
    unit(Kind::MeshNumber, "/cm", &["1/cm", "per cm"], 1e2),
    unit(
        Kind::MeshNumber,
        "/in",
        &["1/in", "per inch", "mesh", "openings per inch"],
        1.0 / INCH,
    ),
    unit(Kind::Angle, "rad", &["radian"], 1.0),
    unit(
        Kind::Angle,
        "°",
        &["deg", "degree", "degrees"],
        std::f64::consts::PI / 180.0,
    ),
    unit(Kind::Amount, "mol", &["mole", "moles"], 1.0),
    unit(Kind::Amount, "mmol", &[], 1e-3),
    unit(Kind::Amount, "µmol", &["umol", "μmol", "micromol"], 1e-6),
    unit(Kind::Amount, "nmol", &[], 1e-9),
    unit(
        Kind::Amount,
        "mL(NTP)",
        &["mL NTP", "ml(NTP)", "ml NTP", "cm3(NTP)", "cm³(NTP)"],
        1e-6 * MOLE_PER_M3_NTP,
    ),
    unit(Kind::Number, "", &["-", "1"], 1.0),
];
