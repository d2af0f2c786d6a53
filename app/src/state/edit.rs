//! Finding, adding and removing rows of a [`Draft`].

use super::draft::*;
use unstir_core::study::{LossPlace, MeantAs, SiteKind};

impl Draft {
    /// The ingredient with this row id.
    pub fn ingredient(&self, id: RowId) -> Option<&IngredientDraft> {
        self.ingredients.iter().find(|i| i.id == id)
    }

    /// The same, to change.
    pub fn ingredient_mut(&mut self, id: RowId) -> Option<&mut IngredientDraft> {
        self.ingredients.iter_mut().find(|i| i.id == id)
    }

    /// Where the ingredient stands in the file.
    pub fn ingredient_index(&self, id: RowId) -> usize {
        self.ingredients.iter().position(|i| i.id == id).unwrap_or_default()
    }

    /// The ingredient to remove.
    pub fn target(&self) -> Option<&IngredientDraft> {
        self.ingredient(self.feed.target)
    }

    /// Name of an ingredient, or a word for it while it has none.
    pub fn name_of(&self, id: RowId) -> String {
        match self.ingredient(id).map(|i| i.name.trim()) {
            Some("") | None => "this ingredient".to_owned(),
            Some(name) => name.to_owned(),
        }
    }

    /// Adds an empty ingredient.
    pub fn add_ingredient(&mut self) -> RowId {
        let id = self.new_id();
        self.ingredients.push(IngredientDraft { id, ..IngredientDraft::default() });
        id
    }

    /// Removes an ingredient with everything said about it.
    pub fn remove_ingredient(&mut self, id: RowId) {
        self.ingredients.retain(|i| i.id != id);
        self.partition.retain(|p| p.ingredient != id);
        self.extraction.entering.retain(|e| e.ingredient != id);
        if self.feed.target == id {
            self.feed.target = self.ingredients.first().map_or(0, |i| i.id);
        }
    }

    /// Adds a site to an ingredient.
    pub fn add_site(&mut self, ingredient: RowId) {
        let id = self.new_id();
        if let Some(i) = self.ingredient_mut(ingredient) {
            i.sites.push(SiteDraft {
                id,
                kind: SiteKind::Acid,
                pka: Default::default(),
                enthalpy: Default::default(),
                temperature: String::new(),
            });
        }
    }

    /// Adds a reading of the disputed constant of an ingredient.
    pub fn add_reading(&mut self, ingredient: RowId, value: super::NumberText, meant_as: MeantAs) {
        let id = self.new_id();
        if let Some(i) = self.ingredient_mut(ingredient) {
            i.disputed = true;
            i.readings.push(ReadingDraft { id, value, meant_as });
            if !i.readings.iter().any(|r| r.id == i.reading_in_use) {
                i.reading_in_use = id;
            }
        }
    }

    /// Removes a reading; without any left nothing is disputed.
    pub fn remove_reading(&mut self, ingredient: RowId, reading: RowId) {
        if let Some(i) = self.ingredient_mut(ingredient) {
            i.readings.retain(|r| r.id != reading);
            i.disputed = !i.readings.is_empty();
            if i.reading_in_use == reading {
                i.reading_in_use = i.readings.first().map_or(0, |r| r.id);
            }
        }
    }

    /// Adds every other way in which the number of a reading could be meant, beside it.
    pub fn try_every_way(&mut self, ingredient: RowId, reading: RowId) {
        const WAYS: [MeantAs; 3] = [MeantAs::Acid, MeantAs::ConjugateAcidOfBase, MeantAs::PkbWrittenAsPka];
        let Some(value) = self
            .ingredient(ingredient)
            .and_then(|i| i.readings.iter().find(|r| r.id == reading))
            .map(|r| r.value.clone())
        else {
            return;
        };
        for way in WAYS {
            let there = self.ingredient(ingredient).is_some_and(|i| {
                i.readings.iter().any(|r| r.value.value.trim() == value.value.trim() && r.meant_as == way)
            });
            if !there {
                self.add_reading(ingredient, value.clone(), way);
            }
        }
        // An unstated reading has now been spelt out; it goes unless the plan used it, and then
        // its use passes to the first way.
        if let Some(i) = self.ingredient_mut(ingredient)
            && i.readings.iter().any(|r| r.id == reading && r.meant_as == MeantAs::Unstated)
        {
            if i.reading_in_use == reading {
                let first = i
                    .readings
                    .iter()
                    .find(|r| r.value.value.trim() == value.value.trim() && r.meant_as == MeantAs::ConjugateAcidOfBase);
                i.reading_in_use = first.map_or(0, |r| r.id);
            }
            i.readings.retain(|r| r.id != reading);
        }
    }

    /// Adds an empty portion.
    pub fn add_portion(&mut self) {
        let id = self.new_id();
        let volume = self.extraction.portions.last().map(|p| p.volume.clone()).unwrap_or_default();
        self.extraction.portions.push(PortionDraft { id, volume, efficiency: Default::default() });
    }

    /// Adds a row to what the entering solvent holds: the target.
    pub fn add_entering(&mut self) {
        let id = self.new_id();
        let ingredient = self.feed.target;
        self.extraction.entering.push(EnteringDraft { id, ingredient, ..EnteringDraft::default() });
    }

    /// Adds an empty loss.
    pub fn add_loss(&mut self) {
        let id = self.new_id();
        self.losses.push(LossDraft {
            id,
            what: String::new(),
            at: LossPlace::Raffinate,
            amount_as: LossAs::VolumeMl,
            amount: Default::default(),
        });
    }

    /// Adds an assay of the raffinate while it is stripped.
    pub fn add_strip_reading(&mut self) {
        let id = self.new_id();
        self.strip.readings.push(StripReadingDraft { id, ..StripReadingDraft::default() });
    }

    /// Adds an ion of fixed charge.
    pub fn add_ion(&mut self) {
        let id = self.new_id();
        self.feed.ions.push(IonDraft { id, charge: "1".to_owned(), ..IonDraft::default() });
    }

    /// What is typed about an ingredient in the solvent in use; the first row where there are two.
    pub fn partition_of(&self, ingredient: RowId) -> Option<&PartitionDraft> {
        self.partition.iter().find(|p| p.ingredient == ingredient && p.solvent == self.solvent.id)
    }

    /// The same, to change; added if there is none.
    pub fn partition_mut(&mut self, ingredient: RowId) -> &mut PartitionDraft {
        let solvent = self.solvent.id.clone();
        let at = self.partition.iter().position(|p| p.ingredient == ingredient && p.solvent == solvent);
        let at = at.unwrap_or_else(|| {
            let id = self.new_id();
            self.partition.push(PartitionDraft { id, ingredient, solvent, ..PartitionDraft::default() });
            self.partition.len() - 1
        });
        &mut self.partition[at]
    }

    /// Path of an ingredient's entry in the file; where there is none, where a missing K of the
    /// target is reported.
    pub fn partition_path(&self, ingredient: RowId) -> String {
        let Some(row) = self.partition_of(ingredient).filter(|p| !p.is_blank()) else {
            return if ingredient == self.feed.target { "partition".to_owned() } else { String::new() };
        };
        let index = self.partition.iter().filter(|p| !p.is_blank()).position(|p| p.id == row.id);
        format!("partition[{}]", index.unwrap_or_default())
    }

    /// Rows of the partition that the solvent's table does not show: other solvents, ingredients
    /// that are not listed, and second rows.
    pub fn other_partition_rows(&self) -> Vec<(RowId, String)> {
        let shown: Vec<RowId> = self.ingredients.iter().filter_map(|i| self.partition_of(i.id)).map(|p| p.id).collect();
        self.partition
            .iter()
            .filter(|p| !p.is_blank() && !shown.contains(&p.id))
            .map(|p| {
                let name = if p.ingredient == 0 { p.not_listed.clone() } else { self.name_of(p.ingredient) };
                (p.id, format!("{name} in {}: K {}", p.solvent, p.k.value))
            })
            .collect()
    }

    /// The same draft with every row id unlike every other, as the page relies on; a file that was
    /// edited by hand may hold one twice.
    pub fn repaired(mut self) -> Self {
        let mut used: Vec<RowId> = Vec::new();
        let mut again = false;
        self.each_row_id(&mut |id| {
            again |= *id == 0 || used.contains(id);
            used.push(*id);
        });
        self.next_id = self.next_id.max(used.iter().max().map_or(1, |m| m.saturating_add(1)));
        if again {
            let mut next = self.next_id;
            let mut seen: Vec<RowId> = Vec::new();
            self.each_row_id(&mut |id| {
                if *id == 0 || seen.contains(id) {
                    *id = next;
                    next = next.saturating_add(1);
                }
                seen.push(*id);
            });
            self.next_id = next;
        }
        self
    }

    fn each_row_id(&mut self, f: &mut dyn FnMut(&mut RowId)) {
        for i in &mut self.ingredients {
            f(&mut i.id);
            i.sites.iter_mut().for_each(|s| f(&mut s.id));
            i.readings.iter_mut().for_each(|r| f(&mut r.id));
        }
        self.partition.iter_mut().for_each(|p| f(&mut p.id));
        self.extraction.portions.iter_mut().for_each(|p| f(&mut p.id));
        self.extraction.entering.iter_mut().for_each(|e| f(&mut e.id));
        self.losses.iter_mut().for_each(|l| f(&mut l.id));
        self.feed.ions.iter_mut().for_each(|i| f(&mut i.id));
        self.strip.readings.iter_mut().for_each(|r| f(&mut r.id));
    }

    /// Takes a solvent: its id, name and density.
    pub fn choose_solvent(&mut self, id: &str, name: &str, density: super::NumberText) {
        self.solvent = SolventDraft { id: id.to_owned(), name: name.to_owned(), density };
    }
}

#[cfg(test)]
mod tests {
    use super::super::NumberText;
    use super::*;

    #[test]
    fn every_way_is_added_once_and_the_unstated_goes() {
        let mut d = Draft::blank();
        let id = d.feed.target;
        d.add_reading(id, NumberText::of("10.4"), MeantAs::Unstated);
        let reading = d.target().unwrap().readings[0].id;
        d.try_every_way(id, reading);
        let target = d.target().unwrap();
        assert_eq!(target.readings.len(), 3);
        assert!(target.readings.iter().any(|r| r.id == target.reading_in_use));
        let first = target.readings[0].id;
        d.try_every_way(id, first);
        assert_eq!(d.target().unwrap().readings.len(), 3);
    }

    #[test]
    fn row_ids_are_made_unlike() {
        let mut d = Draft::blank();
        d.add_portion();
        d.add_loss();
        assert_eq!(d.clone().repaired(), d);
        d.extraction.portions[1].id = d.extraction.portions[0].id;
        d.losses[0].id = 0;
        d.next_id = 1;
        let mut fixed = d.repaired();
        let mut ids = Vec::new();
        fixed.each_row_id(&mut |id| ids.push(*id));
        let count = ids.len();
        ids.sort_unstable();
        ids.dedup();
        assert_eq!(ids.len(), count);
        assert!(!ids.contains(&0) && !ids.contains(&fixed.new_id()));
    }

    #[test]
    fn removing_an_ingredient_takes_its_rows_along() {
        let mut d = Draft::blank();
        let other = d.add_ingredient();
        d.choose_solvent("x", "x", NumberText::default());
        d.partition_mut(other).k = NumberText::of("2");
        d.extraction.entering.push(EnteringDraft { id: 99, ingredient: other, ..EnteringDraft::default() });
        d.remove_ingredient(other);
        assert!(d.partition.is_empty() && d.extraction.entering.is_empty());
        let target = d.feed.target;
        d.remove_ingredient(target);
        assert_eq!(d.feed.target, 0);
    }
}
