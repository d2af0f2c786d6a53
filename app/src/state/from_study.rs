//! From a study to the texts that read back as it.

use super::draft::*;
use super::number_text::NumberText;
use unstir_core::study::{Amount, ConcentrateTo, Ingredient, LossAmount, Scheme, Strip, Study};

impl Draft {
    /// The draft that reads back as `study`.
    pub fn from_study(study: &Study) -> Self {
        let mut d = Self::empty();
        d.name = study.name.clone();
        d.note = study.note.clone();
        d.goal = NumberText::from_quantity(&study.goal.removal_fraction);
        d.purpose = study.goal.purpose;
        d.take_strip(&study.strip);
        d.room = RoomDraft {
            volume: NumberText::from_optional(study.room.volume_m3.as_ref()),
            changes: NumberText::from_optional(study.room.changes_per_h.as_ref()),
            spill: NumberText::from_optional(study.room.spill_ml.as_ref()),
        };
        d.feed.volume = NumberText::from_quantity(&study.feed.volume_ml);
        d.feed.ph = NumberText::from_optional(study.feed.ph.as_ref());
        d.feed.co2 = NumberText::from_optional(study.feed.co2_g_per_l.as_ref());
        for ion in &study.feed.strong_ions {
            let id = d.new_id();
            let amount = NumberText::from_quantity(&ion.mmol_per_l);
            d.feed.ions.push(IonDraft { id, name: ion.name.clone(), charge: ion.charge.to_string(), amount });
        }
        d.feed.temperature = NumberText::from_quantity(&study.feed.temperature_c);
        d.feed.brix = NumberText::from_optional(study.feed.soluble_solids_brix.as_ref());
        for ingredient in &study.feed.ingredients {
            let row = d.ingredient_row(ingredient);
            d.ingredients.push(row);
        }
        d.feed.target = d.id_of(&study.feed.target);
        if d.feed.target == 0 {
            d.feed.target_not_listed = study.feed.target.clone();
        }
        d.take_concentrate(study);
        d.solvent = SolventDraft {
            id: study.solvent.id.clone(),
            name: study.solvent.name.clone(),
            density: NumberText::from_optional(study.solvent.density_g_per_ml.as_ref()),
        };
        d.take_partition(study);
        d.take_extraction(study);
        d.take_bench(study);
        d
    }

    /// Row of the first ingredient with this name; 0 if there is none.
    fn id_of(&self, name: &str) -> RowId {
        self.ingredients.iter().find(|i| i.name == name).map_or(0, |i| i.id)
    }

    fn ingredient_row(&mut self, g: &Ingredient) -> IngredientDraft {
        let mut row = IngredientDraft {
            id: self.new_id(),
            name: g.name.clone(),
            molar_mass: NumberText::from_optional(g.molar_mass_g_per_mol.as_ref()),
            ..IngredientDraft::default()
        };
        (row.amount_as, row.amount) = match &g.amount {
            Amount::MassMg(q) => (AmountAs::MassMg, NumberText::from_quantity(q)),
            Amount::MgPerL(q) => (AmountAs::MgPerL, NumberText::from_quantity(q)),
            Amount::PerServing { mg, serving_ml } => {
                row.serving = NumberText::from_quantity(serving_ml);
                (AmountAs::PerServing, NumberText::from_quantity(mg))
            }
        };
        for s in &g.sites {
            row.sites.push(SiteDraft {
                id: self.new_id(),
                kind: s.kind,
                pka: NumberText::from_quantity(&s.pka),
                enthalpy: NumberText::from_optional(s.enthalpy_kj_per_mol.as_ref()),
                temperature: temperature(s.pka_temperature_c),
            });
        }
        if let Some(disputed) = &g.disputed {
            row.disputed = true;
            for reading in &disputed.readings {
                row.readings.push(ReadingDraft {
                    id: self.new_id(),
                    value: NumberText::from_quantity(&reading.value),
                    meant_as: reading.meant_as,
                });
            }
            row.reading_in_use = row.readings.get(disputed.in_use).map_or(0, |r| r.id);
        }
        row
    }

    fn take_concentrate(&mut self, study: &Study) {
        let (by, to) = match &study.concentrate.to {
            ConcentrateTo::Unchanged => (ConcentrateBy::Unchanged, NumberText::default()),
            ConcentrateTo::VolumeMl(q) => (ConcentrateBy::VolumeMl, NumberText::from_quantity(q)),
            ConcentrateTo::WaterRemovedG(q) => (ConcentrateBy::WaterRemovedG, NumberText::from_quantity(q)),
            ConcentrateTo::Brix(q) => (ConcentrateBy::Brix, NumberText::from_quantity(q)),
        };
        let ph_after = NumberText::from_optional(study.concentrate.ph_after.as_ref());
        self.concentrate = ConcentrateDraft { by, to, ph_after };
    }

    fn take_strip(&mut self, strip: &Strip) {
        let readings = strip
            .readings
            .iter()
            .map(|r| StripReadingDraft {
                id: self.new_id(),
                minutes: NumberText::from_quantity(&r.minutes),
                content: NumberText::from_quantity(&r.mg_per_l),
            })
            .collect();
        self.strip = StripDraft {
            pressure: NumberText::from_optional(strip.pressure_kpa.as_ref()),
            readings,
            limit: NumberText::from_optional(strip.limit_mg_per_l.as_ref()),
            serving: NumberText::from_optional(strip.serving_ml.as_ref()),
        };
    }

    fn take_partition(&mut self, study: &Study) {
        for p in &study.partition {
            let ingredient = self.id_of(&p.ingredient);
            let row = PartitionDraft {
                id: self.new_id(),
                ingredient,
                not_listed: if ingredient == 0 { p.ingredient.clone() } else { String::new() },
                solvent: p.solvent.clone(),
                k: NumberText::from_quantity(&p.k_neutral),
                k_ion_pair: NumberText::from_optional(p.k_ion_pair.as_ref()),
                enthalpy: NumberText::from_optional(p.transfer_enthalpy_kj_per_mol.as_ref()),
                temperature: temperature(p.k_temperature_c),
            };
            self.partition.push(row);
        }
    }

    fn take_extraction(&mut self, study: &Study) {
        let from = &study.extraction;
        let mut e = ExtractionDraft {
            efficiency: NumberText::from_quantity(&from.stage_efficiency),
            left_behind: NumberText::from_quantity(&from.organic_left_behind_ml),
            carried_out: NumberText::from_quantity(&from.aqueous_carried_out_ml),
            vessel: NumberText::from_optional(from.vessel_ml.as_ref()),
            ..ExtractionDraft::default()
        };
        match &from.scheme {
            Scheme::CrossCurrent { portions } => {
                for p in portions {
                    e.portions.push(PortionDraft {
                        id: self.new_id(),
                        volume: NumberText::from_quantity(&p.volume_ml),
                        efficiency: NumberText::from_optional(p.stage_efficiency.as_ref()),
                    });
                }
            }
            Scheme::CounterCurrent { stages, solvent_ml } => {
                e.scheme = SchemeKind::CounterCurrent;
                e.stages = stages.to_string();
                e.solvent_total = NumberText::from_quantity(solvent_ml);
            }
            Scheme::Continuous { solvent_ml } => {
                e.scheme = SchemeKind::Continuous;
                e.solvent_total = NumberText::from_quantity(solvent_ml);
            }
        }
        for s in &from.entering_solvent {
            let ingredient = self.id_of(&s.ingredient);
            e.entering.push(EnteringDraft {
                id: self.new_id(),
                ingredient,
                not_listed: if ingredient == 0 { s.ingredient.clone() } else { String::new() },
                concentration: NumberText::from_quantity(&s.mg_per_ml),
            });
        }
        self.extraction = e;
    }

    fn take_bench(&mut self, study: &Study) {
        if let Some(i) = &study.isolate {
            self.isolate = IsolateDraft {
                weighed: true,
                crude_mass: NumberText::from_quantity(&i.crude_mass_mg),
                purity: NumberText::from_quantity(&i.purity),
                hydrate_waters: NumberText::from_quantity(&i.hydrate_waters),
                residual_solvent: NumberText::from_quantity(&i.residual_solvent_fraction),
            };
        }
        for l in &study.losses {
            let (amount_as, q) = match &l.amount {
                LossAmount::Fraction(q) => (LossAs::Fraction, q),
                LossAmount::VolumeMl(q) => (LossAs::VolumeMl, q),
            };
            let id = self.new_id();
            let amount = NumberText::from_quantity(q);
            self.losses.push(LossDraft { id, what: l.what.clone(), at: l.at, amount_as, amount });
        }
        self.made_up_to = NumberText::from_optional(study.make_up.made_up_to_ml.as_ref());
        self.carbonate_at = NumberText::from_optional(study.make_up.carbonate_at_c.as_ref());
    }
}

/// A temperature as text; 25 °C is what an empty field means.
fn temperature(t: f64) -> String {
    if t == 25.0 { String::new() } else { t.to_string() }
}

#[cfg(test)]
mod tests {
    use super::super::demos::DEMOS;
    use super::*;
    use unstir_core::study::{Purpose, Quantity, StripReading, StrongIon, parse};

    #[test]
    fn every_demo_survives_as_text() {
        for demo in DEMOS {
            let study = parse(demo.text).unwrap();
            let draft = Draft::from_study(&study);
            assert_eq!(draft.to_study().unwrap(), study, "{}", demo.title);
            let saved = serde_json::to_string(&draft).unwrap();
            assert_eq!(serde_json::from_str::<Draft>(&saved).unwrap(), draft);
        }
    }

    #[test]
    fn rarer_fields_survive_as_text() {
        let mut study = parse(DEMOS[0].text).unwrap();
        study.extraction.scheme = Scheme::CounterCurrent { stages: 3, solvent_ml: Quantity::with_u(75.0, 1.0) };
        study.extraction.vessel_ml = Some(500.0.into());
        study.feed.ingredients[1].amount = Amount::PerServing { mg: 3.0.into(), serving_ml: 250.0.into() };
        study.feed.ingredients[1].sites[0].pka_temperature_c = 20.0;
        study.feed.ingredients[1].sites[0].enthalpy_kj_per_mol = Some(4.1.into());
        study.partition[0].k_ion_pair = Some(0.01.into());
        study.partition[0].transfer_enthalpy_kj_per_mol = Some((-5.0).into());
        study.partition[0].k_temperature_c = 30.0;
        study.make_up.made_up_to_ml = Some(500.0.into());
        study.make_up.carbonate_at_c = Some(4.0.into());
        study.concentrate.ph_after = Some(3.3.into());
        study.feed.co2_g_per_l = Some(5.0.into());
        study.goal.purpose = Purpose::Medicine;
        study.strip.pressure_kpa = Some(20.0.into());
        study.room.volume_m3 = Some(60.0.into());
        study.room.changes_per_h = Some(6.0.into());
        study.room.spill_ml = Some(100.0.into());
        study.strip.serving_ml = Some(250.0.into());
        study.strip.limit_mg_per_l = Some(0.5.into());
        study.strip.readings.push(StripReading { minutes: 5.0.into(), mg_per_l: Quantity::with_u(12.0, 0.5) });
        study.feed.strong_ions.push(StrongIon { name: "chloride".into(), charge: -1, mmol_per_l: 12.0.into() });
        assert_eq!(Draft::from_study(&study).to_study(), Ok(study));
    }

    #[test]
    fn a_text_that_is_no_number_is_one_problem_at_its_field() {
        let mut draft = Draft::from_study(&parse(DEMOS[0].text).unwrap());
        draft.feed.ph.value = "3.4.".into();
        draft.extraction.portions[1].volume.value = String::new();
        let problems = draft.to_study().unwrap_err();
        let at: Vec<&str> = problems.iter().map(|p| p.at.as_str()).collect();
        assert_eq!(at, ["feed.ph", "extraction.portions[1].volume_ml"]);
        assert!(problems[1].message.contains("enter a number"));
    }

    #[test]
    fn what_the_core_finds_comes_along() {
        let mut draft = Draft::from_study(&parse(DEMOS[0].text).unwrap());
        draft.feed.ph.value = "34".into();
        let problems = draft.to_study().unwrap_err();
        assert_eq!(problems[0].at, "feed.ph");
        let blank = Draft::blank().to_study().unwrap_err();
        assert!(blank.iter().any(|p| p.at == "solvent.name") && blank.iter().all(|p| p.at != "partition"));
    }
}
