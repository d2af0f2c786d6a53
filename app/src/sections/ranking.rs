//! The solvents of the library for this liquor: in order, filtered, two compared, each with its
//! cautions in its row.

use super::bind::{button, of_draft, of_plan};
use super::step::Results;
use crate::parts::{CautionBox, ChoiceField, DataTable, Working, live, live_view};
use crate::state::work::work;
use crate::view_model::ranking::{Liquid, ORDERS, Wish, arrange, beside};
use crate::view_model::solvent::{Fact, SolventRow};
use leptos::prelude::*;
use unstir_core::judgement::rank::rank;
use unstir_core::library::solvents::solvents;
use unstir_core::process::concentrate::density_g_per_ml;

/// Longest value that stands in the list of facts; longer ones get a line of their own.
const LONGEST_FACT: usize = 90;

/// The library, ranked.
#[component]
pub fn Ranking() -> impl IntoView {
    let wish = RwSignal::new(Wish::default());
    let picked: RwSignal<Vec<String>> = RwSignal::new(Vec::new());
    let liquid = of_plan(|g| Liquid {
        ranks: rank(&g.study).unwrap_or_default(),
        target: g.study.feed.target.clone(),
        purpose: g.study.goal.purpose,
        // To two decimals, so that the list is not built anew at each keystroke.
        density: g.plan.liquor.brix.map(|b| (density_g_per_ml(b) * 100.0).round() / 100.0),
    });
    let rows = Memo::new(move |_| liquid.with(|l| wish.with(|wish| arrange(l, wish))));
    let pair = Memo::new(move |_| {
        picked.with(|p| {
            let [a, b] = p.as_slice() else { return Default::default() };
            // A picked solvent is compared also where the wish leaves it out.
            let all = liquid.with(|l| arrange(l, &Wish::default()));
            let row = |id: &String| all.iter().find(|r| r.id == *id);
            row(a).zip(row(b)).map(|(a, b)| beside(a, b)).unwrap_or_default()
        })
    });
    let held = solvents().len();
    let order = ChoiceField(crate::parts::ChoiceFieldProps {
        label: "in order of".to_owned(),
        path: Signal::stored("ranking.order".to_owned()),
        options: Signal::stored(ORDERS.iter().map(|o| (o.1.to_owned(), o.2.to_owned())).collect()),
        value: Signal::derive(move || {
            wish.with(|w| ORDERS.iter().find(|o| o.0 == w.order).map_or_else(String::new, |o| o.1.to_owned()))
        }),
        on_change: Callback::new(move |tag: String| {
            if let Some(o) = ORDERS.iter().find(|o| o.1 == tag) {
                wish.update(|w| w.order = o.0);
            }
        }),
        problem: Signal::stored(None),
    });
    view! {
        <div class="ranking">
            <h3 id="solvents">"Solvents of the library, for this liquor and this scheme"</h3>
            <div class="fields">
                {order}
                <div class="field field-text">
                    <label class="field-label" for="ranking-words">"show only rows with these words"</label>
                    <input
                        id="ranking-words"
                        type="search"
                        autocomplete="off"
                        prop:value=live(move || wish.with(|w| w.words.clone()))
                        on:input=move |e| wish.update(|w| w.words = event_target_value(&e))
                    />
                </div>
            </div>
            <div class="checks">
                {tick("layers differ by 0.05 g/mL or more", wish, |w| &mut w.parts)}
                {tick("no peroxide formers", wish, |w| &mut w.no_peroxides)}
                {tick("none classed for cancer, heredity or reproduction", wish, |w| &mut w.no_lasting_harm)}
            </div>
            <p class="quiet">
                {live(move || {
                    let shown = rows.with(Vec::len);
                    format!("{shown} of {held} shown. A K that is not known is not taken to be 0: measure it with one portion of a 10 mL sample.")
                })}
            </p>
            <Results there=Signal::derive(move || pair.with(|p| !p.0.is_empty()))>
                <DataTable
                    caption=Signal::stored("Compared".to_owned())
                    head=Signal::derive(move || pair.with(|p| p.0.clone()))
                    rows=Signal::derive(move || pair.with(|p| p.1.clone()))
                />
            </Results>
            <Working
                title="the ranking"
                lines=Signal::stored(
                    vec![
                        "D = K·f_N + K_ip·(1 − f_N) at the liquor's pH, for each ingredient".to_owned(),
                        "taken out: D run through the portions or stages above, fresh solvent".to_owned(),
                        "selectivity = D of the target / largest known D of the company".to_owned(),
                    ],
                )
                reference="definitions; K as entered for the pair, else the published value held in the library, else a linear free-energy estimate (M. H. Abraham et al., J. Pharm. Sci. 99 (2010) 1500)"
                validity="as for the portions; an ingredient without a K has no part in the selectivity, which is then an upper bound"
            />
            <div class="choices">
                {live_view(move || rows.get().into_iter().map(|row| view! { <Choice row picked/> }).collect_view())}
            </div>
        </div>
    }
}

/// Puts `id` among the picked or takes it out; the two last picked stay.
fn pick(picked: &mut Vec<String>, id: &str) {
    match picked.iter().position(|p| p == id) {
        Some(i) => {
            picked.remove(i);
        }
        None => {
            picked.push(id.to_owned());
            if picked.len() > 2 {
                picked.remove(0);
            }
        }
    }
}

/// A condition of the wish.
fn tick(words: &'static str, wish: RwSignal<Wish>, of: fn(&mut Wish) -> &mut bool) -> impl IntoView {
    let change = move |e: web_sys::Event| wish.update(|w| *of(w) = event_target_checked(&e));
    view! {
        <label class="check">
            <input type="checkbox" on:change=change/>
            {words}
        </label>
    }
}

/// One solvent with everything that speaks for and against it.
#[component]
fn Choice(
    /// The solvent.
    row: SolventRow,
    /// The ids picked for comparison.
    picked: RwSignal<Vec<String>>,
) -> impl IntoView {
    let w = work();
    let id = row.id.clone();
    let chosen = of_draft(move |d| d.solvent.id == id);
    let (id, name, density) = (row.id.clone(), row.name.clone(), row.density.clone());
    let (of_pick, id_of_pick) = (row.id.clone(), row.id.clone());
    let choose = move || w.draft.update(|d| d.choose_solvent(&id, &name, density.clone()));
    let of_facts = row.facts.iter().map(|f| format!("{}: {}", f.what, f.source));
    let of_limits = row.limits.iter().map(|f| format!("{}: {}; {}", f.what, f.value, f.source));
    let of_cautions = row.cautions.iter().map(|c| format!("{}: {}", c.what_can_happen, c.source));
    let sources: Vec<String> = of_limits.chain(of_facts).chain(of_cautions).collect();
    let sources = sources.into_iter().map(|words| view! { <li>{words}</li> });
    let (long, limits): (Vec<Fact>, Vec<Fact>) = row.limits.into_iter().partition(|f| f.value.len() > LONGEST_FACT);
    let short = row.facts.into_iter().map(|f| (f, false)).chain(limits.into_iter().map(|f| (f, true)));
    let short = short.map(|(f, limit)| {
        view! {
            <div class="fact" class:limit=limit>
                <dt>{f.what}</dt>
                <dd>{f.value}</dd>
            </div>
        }
    });
    let long = long.into_iter().map(|f| {
        let residue = f.what == "residues";
        view! { <p class="fact-long" class:residue=residue>{format!("{}: {}", f.what, f.value)}</p> }
    });
    let codes = row.codes.into_iter().map(|(code, meaning)| view! { <li><strong>{code}</strong>" "{meaning}</li> });
    let cautions = row.cautions.into_iter().map(|caution| view! { <CautionBox caution/> });
    let note = (!row.note.is_empty()).then(|| view! { <p class="quiet">{row.note}</p> });
    view! {
        <div class="row choice" class:chosen=chosen>
            <div class="row-head">
                <strong>{row.name.clone()}</strong>
                <span class="role" hidden=live(move || !chosen.get())>"in use"</span>
                <span hidden=live(move || chosen.get())>{button("Use this solvent", "", choose)}</span>
                <label class="check quiet">
                    <input
                        type="checkbox"
                        aria-label=format!("compare {}", row.name)
                        prop:checked=live(move || picked.with(|p| p.contains(&of_pick)))
                        on:change=move |_| picked.update(|p| pick(p, &id_of_pick))
                    />
                    "compare"
                </label>
            </div>
            <dl class="facts">{short.collect_view()}</dl>
            {long.collect_view()}
            <ul class="codes">{codes.collect_view()}</ul>
            <div class="cautions">{cautions.collect_view()}</div>
            {note}
            <details class="quiet">
                <summary>"limits of each list, and sources"</summary>
                <ul>{sources.collect_view()}</ul>
            </details>
        </div>
    }
}
