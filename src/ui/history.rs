//! Undo and redo by whole designs.

use crate::design::Design;

/// More steps back than anyone takes; a design is a few kilobytes.
const LONGEST: usize = 300;

/// Past and future designs around the committed one.
#[derive(Debug, Clone, PartialEq)]
pub struct History {
    past: Vec<Design>,
    future: Vec<Design>,
    committed: Design,
}

impl History {
    pub fn new(design: Design) -> Self {
        Self {
            past: Vec::new(),
            future: Vec::new(),
            committed: design,
        }
    }

    /// Call at a gesture's end: a changed design becomes one step back.
    pub fn commit(&mut self, design: &Design) -> bool {
        if *design == self.committed {
            return false;
        }
        let before = std::mem::replace(&mut self.committed, design.clone());
        self.past.push(before);
        if self.past.len() > LONGEST {
            self.past.remove(0);
        }
        self.future.clear();
        true
    }

    pub fn can_undo(&self, design: &Design) -> bool {
        !self.past.is_empty() || *design != self.committed
    }

    pub fn can_redo(&self) -> bool {
        !self.future.is_empty()
    }

    /// The design one step back.
    pub fn undo(&mut self, design: &Design) -> Option<Design> {
        self.commit(design);
        let before = self.past.pop()?;
        self.future
            .push(std::mem::replace(&mut self.committed, before.clone()));
        Some(before)
    }

    /// The design one step forward.
    pub fn redo(&mut self) -> Option<Design> {
        let after = self.future.pop()?;
        self.past
            .push(std::mem::replace(&mut self.committed, after.clone()));
        Some(after)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::store;

    #[test]
    fn steps_go_back_and_forward_and_a_new_edit_drops_the_future() {
        let first = store::presets().next().expect("a ready design").1;
        let titled = |title: &str| Design {
            title: title.to_owned(),
            ..first.clone()
        };
        let mut history = History::new(first.clone());
        assert!(!history.commit(&first));
        assert!(history.commit(&titled("b")));
        assert!(history.commit(&titled("c")));
        assert_eq!(history.undo(&titled("c")), Some(titled("b")));
        assert_eq!(history.undo(&titled("b")), Some(first.clone()));
        assert_eq!(history.undo(&first), None);
        assert_eq!(history.redo(), Some(titled("b")));
        assert!(history.commit(&titled("d")));
        assert_eq!(history.redo(), None);
        // An edit that was not committed yet is a step of its own.
        assert_eq!(history.undo(&titled("e")), Some(titled("d")));
        assert_eq!(history.redo(), Some(titled("e")));
    }
}
