//! From the study as typed to the study the core knows, with every problem at its field.

use super::draft::*;
use super::number_text::{NumberText, number};
use unstir_core::study::{
    Amount, Concentrate, ConcentrateTo, Disputed, EnteringSolvent, Extraction, Feed, Goal, Ingredient, Isolate, Loss,
    LossAmount, MakeUp, PartitionEntry, Portion, Problem, Quantity, Reading, Room, Scheme, Site, SolventChoice, Strip,
    StripReading, StrongIon, Study, VERSION, check,
};

/// Reads the numbers of a draft and notes each text that is no number.
#[derive(Default)]
struct Reader {
    problems: Vec<Problem>,
}

impl Reader {
    fn problem(&mut self, path: String, message: String) {
        self.problems.push(Problem { at: path, message });
    }

    /// A number that must be there.
    fn required(&mut self, text: &NumberText, path: impl Into<String>, what: &str) -> Quantity {
        text.quantity(what).unwrap_or_else(|message| {
            self.problem(path.into(), message);
            Quantity::exact(f64::NAN)
        })
    }

    /// A number that may be left out; a spread alone, as a value once typed leaves behind, is not one.
    fn optional(&mut self, text: &NumberText, path: impl Into<String>, what: &str) -> Option<Quantity> {
        if text.value.trim().is_empty() { None } else { Some(self.required(text, path, what)) }
    }

    /// A number that is 0 when left out.
    fn or_zero(&mut self, text: &NumberText, path: impl Into<String>, what: &str) -> Quantity {
        self.optional(text, path, what).unwrap_or_default()
    }

    /// A bare number with a value of its own when left out.
    fn bare_or(&mut self, text: &str, fallback: f64, path: String, what: &str) -> f64 {
        if text.trim().is_empty() {
            return fallback;
        }
        number(text).unwrap_or_else(|e| {
            self.problem(path, format!("{what}: {e}"));
            f64::NAN
        })
    }
}

impl Draft {
    /// The study typed.
    ///
    /// # Errors
    /// Every text that is no number and everything the core's check finds, each at its field.
    pub fn to_study(&self) -> Result<Study, Vec<Problem>> {
        let (study, mut problems) = self.read();
        // A field whose text is no number has its message already.
        let judged: Vec<Problem> =
            check(&study).into_iter().filter(|j| problems.iter().all(|p: &Problem| p.at != j.at)).collect();
        problems.extend(judged);
        // Without a solvent, or a name for the target, what is missing is that and not a K.
        let no_solvent = self.solvent.id.trim().is_empty();
        if no_solvent {
            problems.push(Problem::new("solvent.name", "no solvent is chosen; take one of the list, or name your own"));
        }
        if no_solvent || self.target().is_some_and(|t| t.name.trim().is_empty()) {
            problems.retain(|p| p.at != "partition");
        }
        if problems.is_empty() { Ok(study) } else { Err(problems) }
    }

    /// The study typed, for a file: its numbers can be read, their values are not judged.
    ///
    /// # Errors
    /// Every text that is no number.
    pub fn to_unjudged_study(&self) -> Result<Study, Vec<Problem>> {
        let (study, problems) = self.read();
        if problems.is_empty() { Ok(study) } else { Err(problems) }
    }

    /// The study with NaN where a text is no number, and those texts.
    fn read(&self) -> (Study, Vec<Problem>) {
        let mut r = Reader::default();
        let study = Study {
            unstir_study: VERSION,
            name: self.name.clone(),
            note: self.note.clone(),
            goal: Goal {
                removal_fraction: r.required(&self.goal, "goal.removal_fraction", "removal to reach"),
                purpose: self.purpose,
            },
            feed: self.read_feed(&mut r),
            concentrate: self.read_concentrate(&mut r),
            solvent: SolventChoice {
                id: self.solvent.id.clone(),
                name: self.solvent.name.clone(),
                density_g_per_ml: r.optional(&self.solvent.density, "solvent.density_g_per_ml", "solvent density"),
            },
            partition: self.read_partition(&mut r),
            extraction: self.read_extraction(&mut r),
            isolate: self.isolate.weighed.then(|| read_isolate(&self.isolate, &mut r)),
            room: Room {
                volume_m3: r.optional(&self.room.volume, "room.volume_m3", "volume of the room"),
                changes_per_h: r.optional(&self.room.changes, "room.changes_per_h", "air changes"),
                spill_ml: r.optional(&self.room.spill, "room.spill_ml", "volume spilled"),
            },
            strip: read_strip(&self.strip, &mut r),
            losses: self.losses.iter().enumerate().map(|(i, l)| read_loss(l, i, &mut r)).collect(),
            make_up: MakeUp {
                made_up_to_ml: r.optional(&self.made_up_to, "make_up.made_up_to_ml", "made-up volume"),
                carbonate_at_c: r.optional(&self.carbonate_at, "make_up.carbonate_at_c", "temperature of carbonating"),
            },
        };
        (study, r.problems)
    }

    fn read_feed(&self, r: &mut Reader) -> Feed {
        let f = &self.feed;
        Feed {
            volume_ml: r.required(&f.volume, "feed.volume_ml", "feed volume"),
            ph: r.optional(&f.ph, "feed.ph", "pH of the feed"),
            strong_ions: f.ions.iter().enumerate().map(|(i, ion)| read_ion(ion, i, r)).collect(),
            co2_g_per_l: r.optional(&f.co2, "feed.co2_g_per_l", "dissolved carbon dioxide"),
            temperature_c: r.required(&f.temperature, "feed.temperature_c", "temperature"),
            soluble_solids_brix: r.optional(&f.brix, "feed.soluble_solids_brix", "soluble solids"),
            target: self.target().map_or_else(|| f.target_not_listed.clone(), |t| t.name.clone()),
            ingredients: self.ingredients.iter().enumerate().map(|(i, g)| read_ingredient(g, i, r)).collect(),
        }
    }

    fn read_concentrate(&self, r: &mut Reader) -> Concentrate {
        let c = &self.concentrate;
        let to = match c.by {
            ConcentrateBy::Unchanged => ConcentrateTo::Unchanged,
            ConcentrateBy::VolumeMl => {
                ConcentrateTo::VolumeMl(r.required(&c.to, "concentrate.to.volume_ml", "liquor volume"))
            }
            ConcentrateBy::WaterRemovedG => {
                ConcentrateTo::WaterRemovedG(r.required(&c.to, "concentrate.to.water_removed_g", "water removed"))
            }
            ConcentrateBy::Brix => {
                ConcentrateTo::Brix(r.required(&c.to, "concentrate.to.brix", "soluble solids to reach"))
            }
        };
        Concentrate { to, ph_after: r.optional(&c.ph_after, "concentrate.ph_after", "pH after concentrating") }
    }

    fn ingredient_name(&self, id: RowId, not_listed: &str) -> String {
        self.ingredient(id).map_or_else(|| not_listed.to_owned(), |i| i.name.clone())
    }

    fn read_partition(&self, r: &mut Reader) -> Vec<PartitionEntry> {
        let typed = self.partition.iter().filter(|p| !p.is_blank()).enumerate();
        typed
            .map(|(i, p)| {
                let at = format!("partition[{i}]");
                let ingredient = self.ingredient_name(p.ingredient, &p.not_listed);
                let k = format!("K of {ingredient}");
                PartitionEntry {
                    solvent: p.solvent.clone(),
                    k_neutral: r.required(&p.k, format!("{at}.k_neutral"), &k),
                    k_ion_pair: r.optional(&p.k_ion_pair, format!("{at}.k_ion_pair"), "K of the ion pair"),
                    transfer_enthalpy_kj_per_mol: r.optional(
                        &p.enthalpy,
                        format!("{at}.transfer_enthalpy_kj_per_mol"),
                        "enthalpy of transfer",
                    ),
                    k_temperature_c: r.bare_or(
                        &p.temperature,
                        25.0,
                        format!("{at}.k_temperature_c"),
                        "temperature of K",
                    ),
                    ingredient,
                }
            })
            .collect()
    }

    fn read_extraction(&self, r: &mut Reader) -> Extraction {
        let e = &self.extraction;
        let scheme = match e.scheme {
            SchemeKind::CrossCurrent => Scheme::CrossCurrent {
                portions: e.portions.iter().enumerate().map(|(i, p)| read_portion(p, i, r)).collect(),
            },
            SchemeKind::CounterCurrent => Scheme::CounterCurrent {
                stages: read_stages(&e.stages, r),
                solvent_ml: r.required(&e.solvent_total, "extraction.solvent_ml", "solvent in all"),
            },
            SchemeKind::Continuous => Scheme::Continuous {
                solvent_ml: r.required(&e.solvent_total, "extraction.solvent_ml", "solvent in all"),
            },
        };
        Extraction {
            scheme,
            stage_efficiency: r.required(&e.efficiency, "extraction.stage_efficiency", "stage efficiency"),
            organic_left_behind_ml: r.or_zero(
                &e.left_behind,
                "extraction.organic_left_behind_ml",
                "solvent left behind",
            ),
            aqueous_carried_out_ml: r.or_zero(
                &e.carried_out,
                "extraction.aqueous_carried_out_ml",
                "liquor carried out",
            ),
            entering_solvent: e
                .entering
                .iter()
                .enumerate()
                .map(|(i, s)| EnteringSolvent {
                    ingredient: self.ingredient_name(s.ingredient, &s.not_listed),
                    mg_per_ml: r.required(
                        &s.concentration,
                        format!("extraction.entering_solvent[{i}].mg_per_ml"),
                        "concentration in the entering solvent",
                    ),
                })
                .collect(),
            vessel_ml: r.optional(&e.vessel, "extraction.vessel_ml", "largest vessel"),
        }
    }
}

fn read_ingredient(g: &IngredientDraft, index: usize, r: &mut Reader) -> Ingredient {
    let at = format!("feed.ingredients[{index}]");
    let amount = match g.amount_as {
        AmountAs::MassMg => Amount::MassMg(r.required(&g.amount, format!("{at}.amount.mass_mg"), "amount in the feed")),
        AmountAs::MgPerL => Amount::MgPerL(r.required(&g.amount, format!("{at}.amount.mg_per_l"), "concentration")),
        AmountAs::PerServing => Amount::PerServing {
            mg: r.required(&g.amount, format!("{at}.amount.per_serving.mg"), "amount in a serving"),
            serving_ml: r.required(&g.serving, format!("{at}.amount.per_serving.serving_ml"), "serving"),
        },
    };
    Ingredient {
        name: g.name.clone(),
        molar_mass_g_per_mol: r.optional(&g.molar_mass, format!("{at}.molar_mass_g_per_mol"), "molar mass"),
        amount,
        sites: g.sites.iter().enumerate().map(|(j, s)| read_site(s, &at, j, r)).collect(),
        disputed: g.disputed.then(|| Disputed {
            in_use: g.readings.iter().position(|x| x.id == g.reading_in_use).unwrap_or(g.readings.len()),
            readings: g
                .readings
                .iter()
                .enumerate()
                .map(|(j, x)| Reading {
                    value: r.required(&x.value, format!("{at}.disputed.readings[{j}].value"), "published constant"),
                    meant_as: x.meant_as,
                })
                .collect(),
        }),
    }
}

fn read_ion(ion: &IonDraft, i: usize, r: &mut Reader) -> StrongIon {
    let at = format!("feed.strong_ions[{i}]");
    let charge = match number(&ion.charge) {
        Ok(z) if z.fract() == 0.0 && (-8.0..=8.0).contains(&z) => z as i32,
        Ok(z) => {
            r.problem(format!("{at}.charge"), format!("charge: {z} is not a whole number from −8 to 8"));
            1
        }
        Err(e) => {
            r.problem(format!("{at}.charge"), format!("charge: {e}"));
            1
        }
    };
    let mmol_per_l = r.required(&ion.amount, format!("{at}.mmol_per_l"), "concentration of the ion");
    StrongIon { name: ion.name.clone(), charge, mmol_per_l }
}

fn read_site(s: &SiteDraft, at: &str, j: usize, r: &mut Reader) -> Site {
    let at = format!("{at}.sites[{j}]");
    Site {
        kind: s.kind,
        pka: r.required(&s.pka, format!("{at}.pka"), "pKa"),
        enthalpy_kj_per_mol: r.optional(&s.enthalpy, format!("{at}.enthalpy_kj_per_mol"), "enthalpy"),
        pka_temperature_c: r.bare_or(&s.temperature, 25.0, format!("{at}.pka_temperature_c"), "temperature of the pKa"),
    }
}

fn read_portion(p: &PortionDraft, i: usize, r: &mut Reader) -> Portion {
    let at = format!("extraction.portions[{i}]");
    Portion {
        volume_ml: r.required(&p.volume, format!("{at}.volume_ml"), "portion"),
        stage_efficiency: r.optional(&p.efficiency, format!("{at}.stage_efficiency"), "stage efficiency"),
    }
}

/// A whole number of stages; 1 where the text is none.
fn read_stages(text: &str, r: &mut Reader) -> u32 {
    let path = "extraction.stages";
    match number(text) {
        Ok(v) if v.fract() == 0.0 && (0.0..=1e6).contains(&v) => v as u32,
        Ok(v) => {
            r.problem(path.into(), format!("number of stages: {v} is not a whole number of stages"));
            1
        }
        Err(e) => {
            r.problem(path.into(), format!("number of stages: {e}"));
            1
        }
    }
}

fn read_isolate(i: &IsolateDraft, r: &mut Reader) -> Isolate {
    Isolate {
        crude_mass_mg: r.required(&i.crude_mass, "isolate.crude_mass_mg", "crude mass"),
        purity: r.required(&i.purity, "isolate.purity", "purity"),
        hydrate_waters: r.or_zero(&i.hydrate_waters, "isolate.hydrate_waters", "water of the hydrate"),
        residual_solvent_fraction: r.or_zero(
            &i.residual_solvent,
            "isolate.residual_solvent_fraction",
            "solvent in the isolate",
        ),
    }
}

fn read_strip(s: &StripDraft, r: &mut Reader) -> Strip {
    let readings = s
        .readings
        .iter()
        .enumerate()
        .map(|(i, x)| StripReading {
            minutes: r.required(&x.minutes, format!("strip.readings[{i}].minutes"), "time"),
            mg_per_l: r.required(&x.content, format!("strip.readings[{i}].mg_per_l"), "content"),
        })
        .collect();
    Strip {
        pressure_kpa: r.optional(&s.pressure, "strip.pressure_kpa", "pressure"),
        readings,
        limit_mg_per_l: r.optional(&s.limit, "strip.limit_mg_per_l", "residue to reach"),
        serving_ml: r.optional(&s.serving, "strip.serving_ml", "serving"),
    }
}

fn read_loss(l: &LossDraft, i: usize, r: &mut Reader) -> Loss {
    let at = format!("losses[{i}].amount");
    let amount = match l.amount_as {
        LossAs::Fraction => LossAmount::Fraction(r.required(&l.amount, format!("{at}.fraction"), "fraction lost")),
        LossAs::VolumeMl => LossAmount::VolumeMl(r.required(&l.amount, format!("{at}.volume_ml"), "volume lost")),
    };
    Loss { what: l.what.clone(), at: l.at, amount }
}
