//! The columns of the table: what they show, in which unit, and the table as text.

use std::cmp::Ordering;
use std::fmt::Write as _;

use crate::assess::{Figure, Ranked};
use crate::design::Duty;
use crate::fluid::Regime;
use crate::units::{Kind, NBSP, Pressure, Quantity, Unit, Units};
use crate::words;

pub(super) const COLUMNS: usize = 8;

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Column {
    Name,
    Hottest,
    Coldest,
    Slope,
    Merit,
    DryOut,
    LiquidFull,
    Charge,
    Objection,
}

impl Column {
    /// The columns of a duty: a wick lives on the merit, a bulb on the slope.
    const fn all(duty: Duty) -> [Self; COLUMNS] {
        let own = match duty {
            Duty::HeatPipe | Duty::VapourChamber | Duty::Thermosyphon | Duty::PulsatingLoop => {
                Self::Merit
            }
            Duty::SensingBulb | Duty::LiquidLift | Duty::PlainVessel => Self::Slope,
        };
        [
            Self::Name,
            Self::Hottest,
            Self::Coldest,
            own,
            Self::DryOut,
            Self::LiquidFull,
            Self::Charge,
            Self::Objection,
        ]
    }

    pub(super) const fn title(self) -> &'static str {
        match self {
            Self::Name => "fluid",
            Self::Hottest => "at hottest",
            Self::Coldest => "at coldest",
            Self::Slope => "slope",
            Self::Merit => "merit",
            Self::DryOut => "dries out",
            Self::LiquidFull => "full from",
            Self::Charge => "charge",
            Self::Objection => "objection, hazard",
        }
    }

    pub(super) const fn tooltip(self) -> &'static str {
        match self {
            Self::Name => {
                "Name of the fluid. A click on a row tries it; Escape puts the old one back."
            }
            Self::Hottest => "Absolute pressure of the unit at the hottest temperature",
            Self::Coldest => "Absolute pressure of the unit at the coldest temperature",
            Self::Slope => "Slope of the vapour pressure in the middle of the working range",
            Self::Merit => {
                "Liquid density × surface tension × latent heat ÷ liquid viscosity in the middle of the working range: what a wick can carry"
            }
            Self::DryOut => "Temperature at which the last liquid evaporates",
            Self::LiquidFull => "Temperature at which the unit is full of liquid",
            Self::Charge => "Mass that gives the fill ratio of this design",
            Self::Objection => {
                "Why the fluid cannot be used here as it is; without objection, what it does to people"
            }
        }
    }

    /// At the narrowest; all grow together.
    const fn width(self) -> f32 {
        match self {
            Self::Name => 140.0,
            Self::Objection => 144.0,
            _ => 60.0,
        }
    }

    pub(super) fn compare(self, a: &Ranked, b: &Ranked) -> Ordering {
        let number = |x: Option<f64>, y: Option<f64>| match (x, y) {
            (Some(x), Some(y)) => x.total_cmp(&y),
            (Some(_), None) => Ordering::Less,
            (None, Some(_)) => Ordering::Greater,
            (None, None) => Ordering::Equal,
        };
        match self {
            Self::Name => a
                .fluid
                .name()
                .to_lowercase()
                .cmp(&b.fluid.name().to_lowercase()),
            Self::Objection => a.objections.cmp(&b.objections),
            _ => number(self.value(a), self.value(b)),
        }
    }

    /// In SI; none where it is not known.
    pub(super) fn value(self, row: &Ranked) -> Option<f64> {
        let pressure =
            |figure: &Figure<(Pressure, Regime)>| figure.as_ref().ok().map(|(p, _)| p.pascal());
        match self {
            Self::Name | Self::Objection => None,
            Self::Hottest => pressure(&row.at_hottest),
            Self::Coldest => pressure(&row.at_coldest),
            Self::Slope => row.slope.as_ref().ok().copied(),
            Self::Merit => row.merit,
            Self::DryOut => row.dry_out.map(Quantity::si),
            Self::LiquidFull => row.liquid_full.map(Quantity::si),
            Self::Charge => row.mass.as_ref().ok().map(|mass| mass.si()),
        }
    }
}

/// How a column's figures are written: one unit for the whole column.
pub(super) struct Scale {
    unit: Option<&'static Unit>,
    kind: Kind,
    pub(super) symbol: String,
    factor: f64,
}

impl Scale {
    /// The unit that suits the present fluid's figure.
    fn of(column: Column, present: Option<&Ranked>, units: &Units) -> Self {
        let of_kind = |kind: Kind, otherwise: f64| {
            let si = present
                .and_then(|row| column.value(row))
                .unwrap_or(otherwise);
            let unit = units.unit_for(kind, si);
            let symbol = unit.symbol.to_owned();
            Self {
                unit: Some(unit),
                kind,
                symbol,
                factor: 1.0,
            }
        };
        match column {
            Column::Name | Column::Objection => Self {
                unit: None,
                kind: Kind::Number,
                symbol: String::new(),
                factor: 1.0,
            },
            Column::Hottest | Column::Coldest => of_kind(Kind::Pressure, 1e5),
            Column::Slope => {
                let mut scale = of_kind(Kind::Pressure, 1e3);
                let kelvin = units.unit_for(Kind::TemperatureDifference, 1.0);
                scale.factor = kelvin.to_si(1.0);
                let _ = write!(scale.symbol, "/{}", kelvin.symbol);
                scale
            }
            Column::Merit => Self {
                unit: None,
                kind: Kind::Number,
                symbol: "GW/m²".to_owned(),
                factor: 1e-9,
            },
            Column::DryOut | Column::LiquidFull => of_kind(Kind::Temperature, 300.0),
            Column::Charge => of_kind(Kind::Mass, 1e-3),
        }
    }

    pub(super) fn text(&self, si: f64, units: &Units) -> String {
        match self.unit {
            Some(unit) => {
                // Leading noughts take the room of figures.
                let digits = match unit.number_of(si * self.factor).abs() {
                    small if small < 0.01 => 2,
                    small if small < 0.1 => 3,
                    _ => 4,
                };
                units.number(self.kind, si * self.factor, unit, digits)
            }
            None => crate::units::figures(si * self.factor, 3),
        }
    }
}

/// The columns shown, each with the unit of all its figures.
pub(super) struct Columns(pub(super) [(Column, Scale); COLUMNS]);

impl Columns {
    pub(super) fn new(duty: Duty, present: Option<&Ranked>, units: &Units) -> Self {
        Self(Column::all(duty).map(|column| (column, Scale::of(column, present, units))))
    }

    /// Left ends of the columns and the right end of the last.
    pub(super) fn lefts(&self, available: f32) -> Vec<f32> {
        let natural: f32 = self.0.iter().map(|(column, _)| column.width()).sum();
        let stretch = (available / natural).max(1.0);
        let mut x = 0.0;
        let mut lefts = vec![x];
        for (column, _) in &self.0 {
            x += column.width() * stretch;
            lefts.push(x);
        }
        lefts
    }
}

/// Tab-separated, units in the header, for a spreadsheet.
pub(super) fn as_text(rows: &[Ranked], duty: Duty, units: &Units) -> String {
    let columns = Columns::new(duty, rows.first(), units);
    let heads = columns.0.iter().map(|(column, scale)| {
        if scale.symbol.is_empty() {
            column.title().to_owned()
        } else {
            format!("{} / {}", column.title(), scale.symbol.replace(NBSP, " "))
        }
    });
    let mut text = heads.collect::<Vec<_>>().join("\t");
    for row in rows {
        let cells = columns.0.iter().map(|(column, scale)| match column {
            Column::Name => row.fluid.name().to_owned(),
            Column::Objection => row
                .objections
                .iter()
                .map(|objection| words::objection(*objection))
                .collect::<Vec<_>>()
                .join("; "),
            _ => column
                .value(row)
                .map_or(String::new(), |si| scale.text(si, units)),
        });
        text.push('\n');
        text.push_str(&cells.collect::<Vec<_>>().join("\t"));
    }
    text.push('\n');
    text
}
