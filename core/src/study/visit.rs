//! Walking over every number of a study, with its path in the file.

use super::{Amount, ConcentrateTo, LossAmount, Quantity, Scheme, Study};

/// Calls `f` with the path and the quantity of every number in `study`, in file order.
///
/// One walk serves validation, uncertainty and sensitivity, so a new field is added here once.
pub fn for_each_quantity(study: &mut Study, f: &mut dyn FnMut(&str, &mut Quantity)) {
    fn maybe(path: &str, q: &mut Option<Quantity>, f: &mut dyn FnMut(&str, &mut Quantity)) {
        if let Some(q) = q {
            f(path, q);
        }
    }
    f("goal.removal_fraction", &mut study.goal.removal_fraction);
    let feed = &mut study.feed;
    f("feed.volume_ml", &mut feed.volume_ml);
    maybe("feed.ph", &mut feed.ph, f);
    f("feed.temperature_c", &mut feed.temperature_c);
    maybe("feed.soluble_solids_brix", &mut feed.soluble_solids_brix, f);
    for (i, ion) in feed.strong_ions.iter_mut().enumerate() {
        f(&format!("feed.strong_ions[{i}].mmol_per_l"), &mut ion.mmol_per_l);
    }
    maybe("feed.co2_g_per_l", &mut feed.co2_g_per_l, f);
    for (i, ing) in feed.ingredients.iter_mut().enumerate() {
        let at = format!("feed.ingredients[{i}]");
        maybe(&format!("{at}.molar_mass_g_per_mol"), &mut ing.molar_mass_g_per_mol, f);
        match &mut ing.amount {
            Amount::MassMg(q) => f(&format!("{at}.amount.mass_mg"), q),
            Amount::MgPerL(q) => f(&format!("{at}.amount.mg_per_l"), q),
            Amount::PerServing { mg, serving_ml } => {
                f(&format!("{at}.amount.per_serving.mg"), mg);
                f(&format!("{at}.amount.per_serving.serving_ml"), serving_ml);
            }
        }
        for (j, site) in ing.sites.iter_mut().enumerate() {
            f(&format!("{at}.sites[{j}].pka"), &mut site.pka);
            maybe(&format!("{at}.sites[{j}].enthalpy_kj_per_mol"), &mut site.enthalpy_kj_per_mol, f);
        }
        if let Some(d) = &mut ing.disputed {
            for (j, r) in d.readings.iter_mut().enumerate() {
                f(&format!("{at}.disputed.readings[{j}].value"), &mut r.value);
            }
        }
    }
    match &mut study.concentrate.to {
        ConcentrateTo::Unchanged => {}
        ConcentrateTo::VolumeMl(q) => f("concentrate.to.volume_ml", q),
        ConcentrateTo::WaterRemovedG(q) => f("concentrate.to.water_removed_g", q),
        ConcentrateTo::Brix(q) => f("concentrate.to.brix", q),
    }
    maybe("concentrate.ph_after", &mut study.concentrate.ph_after, f);
    maybe("solvent.density_g_per_ml", &mut study.solvent.density_g_per_ml, f);
    for (i, p) in study.partition.iter_mut().enumerate() {
        f(&format!("partition[{i}].k_neutral"), &mut p.k_neutral);
        maybe(&format!("partition[{i}].k_ion_pair"), &mut p.k_ion_pair, f);
        maybe(&format!("partition[{i}].transfer_enthalpy_kj_per_mol"), &mut p.transfer_enthalpy_kj_per_mol, f);
    }
    let e = &mut study.extraction;
    match &mut e.scheme {
        Scheme::CrossCurrent { portions } => {
            for (i, p) in portions.iter_mut().enumerate() {
                f(&format!("extraction.portions[{i}].volume_ml"), &mut p.volume_ml);
                maybe(&format!("extraction.portions[{i}].stage_efficiency"), &mut p.stage_efficiency, f);
            }
        }
        Scheme::CounterCurrent { solvent_ml, .. } | Scheme::Continuous { solvent_ml } => {
            f("extraction.solvent_ml", solvent_ml);
        }
    }
    f("extraction.stage_efficiency", &mut e.stage_efficiency);
    f("extraction.organic_left_behind_ml", &mut e.organic_left_behind_ml);
    f("extraction.aqueous_carried_out_ml", &mut e.aqueous_carried_out_ml);
    for (i, s) in e.entering_solvent.iter_mut().enumerate() {
        f(&format!("extraction.entering_solvent[{i}].mg_per_ml"), &mut s.mg_per_ml);
    }
    maybe("extraction.vessel_ml", &mut e.vessel_ml, f);
    if let Some(i) = &mut study.isolate {
        f("isolate.crude_mass_mg", &mut i.crude_mass_mg);
        f("isolate.purity", &mut i.purity);
        f("isolate.hydrate_waters", &mut i.hydrate_waters);
        f("isolate.residual_solvent_fraction", &mut i.residual_solvent_fraction);
    }
    maybe("room.volume_m3", &mut study.room.volume_m3, f);
    maybe("room.changes_per_h", &mut study.room.changes_per_h, f);
    maybe("room.spill_ml", &mut study.room.spill_ml, f);
    maybe("strip.pressure_kpa", &mut study.strip.pressure_kpa, f);
    for (i, r) in study.strip.readings.iter_mut().enumerate() {
        f(&format!("strip.readings[{i}].minutes"), &mut r.minutes);
        f(&format!("strip.readings[{i}].mg_per_l"), &mut r.mg_per_l);
    }
    maybe("strip.limit_mg_per_l", &mut study.strip.limit_mg_per_l, f);
    maybe("strip.serving_ml", &mut study.strip.serving_ml, f);
    for (i, l) in study.losses.iter_mut().enumerate() {
        match &mut l.amount {
            LossAmount::Fraction(q) => f(&format!("losses[{i}].amount.fraction"), q),
            LossAmount::VolumeMl(q) => f(&format!("losses[{i}].amount.volume_ml"), q),
        }
    }
    maybe("make_up.made_up_to_ml", &mut study.make_up.made_up_to_ml, f);
    maybe("make_up.carbonate_at_c", &mut study.make_up.carbonate_at_c, f);
}
