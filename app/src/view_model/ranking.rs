//! The solvents of the library in an order and a choice of the reader's, and two beside each other.

use super::format::{percent, significant};
use super::solvent::{Fact, SolventRow, cite, solvent_row};
use unstir_core::judgement::rank::{KOrigin, Parted, SolventRank};
use unstir_core::library::limits::exposure_limits_for;
use unstir_core::library::residual::{Purpose, limits_for};
use unstir_core::library::solvents::{Layer, PeroxideClass, Solvent, solvents};
use unstir_core::order::put_in_order;

/// What the solvents are put in order by.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub enum OrderBy {
    /// Target taken out, most first.
    #[default]
    Removal,
    /// Selectivity, most first.
    Selectivity,
    /// Largest part of any company ingredient taken along, least first.
    Company,
    /// Density difference to the liquor, largest first.
    Parting,
    /// Boiling point, lowest first.
    Boiling,
    /// Flash point, highest first; none counts as highest.
    Flash,
    /// Lowest exposure limit, highest first.
    Limit,
    /// Solubility in water, least first.
    Solubility,
    /// Name.
    Name,
}

/// The orders with their tags and words.
pub const ORDERS: [(OrderBy, &str, &str); 9] = [
    (OrderBy::Removal, "removal", "target taken out, most first"),
    (OrderBy::Selectivity, "selectivity", "selectivity, most first"),
    (OrderBy::Company, "company", "company taken along, least first"),
    (OrderBy::Parting, "parting", "density difference to the liquor, largest first"),
    (OrderBy::Boiling, "boiling", "boiling point, lowest first"),
    (OrderBy::Flash, "flash", "flash point, highest first"),
    (OrderBy::Limit, "limit", "exposure limit, highest first"),
    (OrderBy::Solubility, "solubility", "solubility in water, least first"),
    (OrderBy::Name, "name", "name"),
];

/// Which solvents are shown and how.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Wish {
    /// Order.
    pub order: OrderBy,
    /// Only those whose layer can be told from the liquor's by 0.05 g/mL or more.
    pub parts: bool,
    /// No peroxide formers.
    pub no_peroxides: bool,
    /// None classed for cancer, heredity or reproduction (H340–H362).
    pub no_lasting_harm: bool,
    /// Only those whose row holds these words.
    pub words: String,
}

/// Smallest density difference with which layers are sure to part [g/mL]; common practice.
const PARTS_G_PER_ML: f64 = 0.05;

/// What the solvents are looked at for.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Liquid {
    /// How each solvent would do; empty while there is no plan.
    pub ranks: Vec<SolventRank>,
    /// Name of the target.
    pub target: String,
    /// What the liquid is for.
    pub purpose: Purpose,
    /// Density of the liquor [g/mL], if its soluble solids are known.
    pub density: Option<f64>,
}

/// The solvents as wished, for this liquid.
pub fn arrange(liquid: &Liquid, wish: &Wish) -> Vec<SolventRow> {
    let Liquid { ranks, target, purpose, density } = liquid;
    let density = *density;
    let mut list: Vec<(f64, SolventRow)> = Vec::new();
    for s in solvents().iter().filter(|s| wanted(s, density, wish)) {
        let rank = ranks.iter().find(|r| r.id == s.id);
        let mut row = solvent_row(s, density);
        let mut facts = rank.map(|r| parting_facts(r, target)).unwrap_or_default();
        facts.append(&mut row.facts);
        row.facts = facts;
        row.facts.extend(residue_lists(&s.id, *purpose));
        row.limits.extend(residue_facts(&s.id, *purpose));
        if holds(&row, &wish.words) {
            list.push((key(s, rank, density, wish.order), row));
        }
    }
    // What is not known comes last in every order.
    put_in_order(&mut list, |a, b| a.0.total_cmp(&b.0).then_with(|| a.1.name.cmp(&b.1.name)));
    list.into_iter().map(|(_, row)| row).collect()
}

fn wanted(s: &Solvent, density: Option<f64>, wish: &Wish) -> bool {
    let parts = match density {
        Some(d) => (s.density_20c_g_ml - d).abs() >= PARTS_G_PER_ML,
        None => s.layer_against_water() != Layer::Uncertain,
    };
    let lasting = |code: &String| code.starts_with("H34") || code.starts_with("H35") || code.starts_with("H36");
    (parts || !wish.parts)
        && (s.peroxide_class == PeroxideClass::No || !wish.no_peroxides)
        && !(wish.no_lasting_harm && s.h_codes.iter().any(lasting))
}

fn holds(row: &SolventRow, words: &str) -> bool {
    let words = words.trim().to_lowercase();
    let has = |text: &String| text.to_lowercase().contains(&words);
    words.is_empty()
        || has(&row.name)
        || row.facts.iter().chain(&row.limits).any(|f| has(&f.value))
        || row.codes.iter().any(|c| has(&c.0) || has(&c.1))
        || row.cautions.iter().any(|c| has(&c.what_can_happen))
}

/// What the order goes by, smallest first; what is not known is infinite.
fn key(s: &Solvent, rank: Option<&SolventRank>, density: Option<f64>, order: OrderBy) -> f64 {
    let unknown = f64::INFINITY;
    match order {
        OrderBy::Removal => rank.and_then(|r| r.target.as_ref()).map_or(unknown, |t| -t.removed_fraction),
        OrderBy::Selectivity => rank.and_then(|r| r.selectivity).map_or(unknown, |s| -s),
        OrderBy::Company => {
            let known = rank.map(|r| r.company.iter().filter_map(|c| c.parted.as_ref()).map(|p| p.removed_fraction));
            known.and_then(|k| k.reduce(f64::max)).unwrap_or(unknown)
        }
        OrderBy::Parting => -(s.density_20c_g_ml - density.unwrap_or(1.0)).abs(),
        OrderBy::Boiling => s.boiling_point_c.unwrap_or(unknown),
        OrderBy::Flash => -s.flash_point_c.unwrap_or(1e3),
        OrderBy::Limit => exposure_limits_for(&s.id).and_then(|l| l.strictest_twa_ppm).map_or(unknown, |v| -v),
        OrderBy::Solubility => s.solubility_in_water_mass_pct.unwrap_or(unknown),
        OrderBy::Name => 0.0,
    }
}

fn origin_words(p: &Parted) -> &'static str {
    match p.origin {
        KOrigin::Entered => "K as entered",
        KOrigin::Published => "K published",
        KOrigin::PublishedWeak => "K published, weak",
        KOrigin::Estimated => "K estimated",
    }
}

/// Which lists speak of residues of this solvent for this purpose.
fn residue_lists(id: &str, purpose: Purpose) -> Option<Fact> {
    if purpose == Purpose::Technical {
        return None;
    }
    let mut names: Vec<&str> = limits_for(id, purpose).listed.iter().map(|l| l.list.name()).collect();
    names.dedup();
    let value = if names.is_empty() { "in no list held; check the current law".to_owned() } else { names.join(", ") };
    Some(Fact { what: "residues listed".to_owned(), value, source: "the entries below".to_owned() })
}

/// What the lists say of residues for this purpose.
fn residue_facts(id: &str, purpose: Purpose) -> Vec<Fact> {
    let said = limits_for(id, purpose);
    let fact = |value: String, source: String| Fact { what: "residues".to_owned(), value, source };
    let listed = said.listed.iter().map(|l| fact(l.sentence(), cite(&l.source)));
    listed.chain(said.not_listed.iter().map(|words| fact(words.clone(), String::new()))).collect()
}

/// How target and company part, as facts of the solvent.
fn parting_facts(r: &SolventRank, target: &str) -> Vec<Fact> {
    let fact = |what: String, value: String, source: &str| {
        let source = if source.is_empty() { "this study".to_owned() } else { source.to_owned() };
        Fact { what, value, source }
    };
    let mut list = Vec::new();
    match &r.target {
        Some(t) => {
            let value = format!("{} ({})", significant(t.d, 3), origin_words(t));
            list.push(fact(format!("D of {target}"), value, &t.source));
            list.push(fact("this scheme takes out".into(), percent(t.removed_fraction), ""));
        }
        None => list.push(fact(format!("D of {target}"), "no K known: measure one".into(), "")),
    }
    if !r.company.is_empty() {
        let words: Vec<String> = r
            .company
            .iter()
            .map(|c| match &c.parted {
                Some(p) => format!("{} {}", c.name, percent(p.removed_fraction)),
                None => format!("{} not known", c.name),
            })
            .collect();
        list.push(fact("takes along of the company".into(), words.join(", "), ""));
    }
    if let Some(s) = r.selectivity {
        let unknown = r.company.iter().any(|c| c.parted.is_none());
        let bound = if unknown { "at most " } else { "" };
        // Beyond a thousand the number says no more than that.
        let value = if s > 1000.0 { "above 1000".to_owned() } else { significant(s, 2) };
        list.push(fact("selectivity".into(), format!("{bound}{value}"), ""));
    }
    list
}

/// Two solvents beside each other: head and rows.
pub fn beside(a: &SolventRow, b: &SolventRow) -> (Vec<String>, Vec<Vec<String>>) {
    let mut rows: Vec<Vec<String>> = Vec::new();
    let of = |row: &SolventRow, what: &str| {
        let all = row.facts.iter().chain(&row.limits).filter(|f| f.what == what).map(|f| f.value.as_str());
        let all = all.collect::<Vec<_>>().join(" ");
        if all.is_empty() { "–".to_owned() } else { all }
    };
    for what in a.facts.iter().chain(&a.limits).chain(&b.facts).chain(&b.limits).map(|f| &f.what) {
        if !rows.iter().any(|r| &r[0] == what) {
            rows.push(vec![what.clone(), of(a, what), of(b, what)]);
        }
    }
    let codes = |r: &SolventRow| r.codes.iter().map(|c| format!("{} {}", c.0, c.1)).collect::<Vec<_>>().join("; ");
    rows.push(vec!["hazard codes".into(), codes(a), codes(b)]);
    let cautions = |r: &SolventRow| {
        r.cautions.iter().map(|c| format!("{}: {}", c.sign_word, c.what_can_happen)).collect::<Vec<_>>().join(" ")
    };
    rows.push(vec!["cautions".into(), cautions(a), cautions(b)]);
    (vec![String::new(), a.name.clone(), b.name.clone()], rows)
}

#[cfg(test)]
mod tests {
    use super::super::testing::good;
    use super::*;
    use unstir_core::judgement::rank::rank;

    fn shown(wish: &Wish) -> Vec<SolventRow> {
        let ranks = rank(&good(0).study).unwrap();
        arrange(&Liquid { ranks, target: "caffeine".into(), density: Some(1.21), ..Liquid::default() }, wish)
    }

    #[test]
    fn every_order_shows_every_solvent_and_unknown_comes_last() {
        let all = solvents().len();
        for (order, tag, _) in ORDERS {
            assert_eq!(shown(&Wish { order, ..Wish::default() }).len(), all, "{tag}");
        }
        let rows = shown(&Wish::default());
        let value = |r: &SolventRow| r.facts[0].value.clone();
        assert!(value(&rows[0]).contains("K "), "{}", value(&rows[0]));
        assert!(value(rows.last().unwrap()).contains("no K known"));
        let boils = shown(&Wish { order: OrderBy::Boiling, ..Wish::default() });
        assert_eq!(boils[0].id, "diethyl_ether");
    }

    #[test]
    fn filters_take_out_what_they_say() {
        let none = |rows: &[SolventRow], id: &str| rows.iter().all(|r| r.id != id);
        let rows = shown(&Wish { no_peroxides: true, ..Wish::default() });
        assert!(none(&rows, "diethyl_ether") && !none(&rows, "toluene"));
        let rows = shown(&Wish { no_lasting_harm: true, ..Wish::default() });
        assert!(none(&rows, "dichloromethane") && none(&rows, "toluene") && !none(&rows, "ethyl_acetate"));
        let rows = shown(&Wish { words: " Peroxides ".into(), ..Wish::default() });
        assert!(!none(&rows, "diethyl_ether") && rows.len() < solvents().len());
        let near = Liquid { density: Some(0.9), ..Liquid::default() };
        let near = arrange(&near, &Wish { parts: true, ..Wish::default() });
        assert!(none(&near, "ethyl_acetate") && !none(&near, "dichloromethane"));
    }

    #[test]
    fn two_beside_each_other() {
        let rows = shown(&Wish::default());
        let (head, table) = beside(&rows[0], &rows[1]);
        assert_eq!(head.len(), 3);
        assert!(table.iter().all(|r| r.len() == 3));
        assert!(table.last().unwrap()[1].contains("Danger"));
    }
}
