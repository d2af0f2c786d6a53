//! Journeys on the built page, as a user meets it: opened from disk, typed into, reloaded.
//!
//! They need Chromium and chromedriver and a built `dist/unstir.html`; `cargo xtask test` sees to
//! all three.
#![cfg(not(target_arch = "wasm32"))]

#[path = "journeys/browser.rs"]
mod browser;

use browser::{Page, Setup, journey};
use thirtyfour::error::WebDriverResult;

async fn answer(page: &Page) -> WebDriverResult<String> {
    page.text(".answer-sentence").await
}

/// A new user describes a liquid of their own and gets a verdict.
async fn describe_own_liquid(page: &Page) -> WebDriverResult<()> {
    page.press("Describe the liquid on your bench").await?;
    page.type_at("feed.volume_ml", "50").await?;
    page.type_at("feed.ph", "7").await?;
    page.type_at("feed.ingredients[0].name", "bitter stuff").await?;
    page.type_at("feed.ingredients[0].amount.mg_per_l", "200").await?;
    page.press("Use a solvent of your own").await?;
    // Where nothing is typed the path is that of the missing K; then it gets its own.
    page.type_at("partition", "5").await?;
    page.type_at("extraction.portions[0].volume_ml", "15").await
}

#[test]
fn a_new_user_gets_a_verdict_on_an_own_liquid() {
    journey(Setup::default(), |page| async move {
        describe_own_liquid(&page).await?;
        // D. Harvey, Modern Analytical Chemistry (2000), Example 7.14: 60.0 % of a solute with
        // D 5 leaves 50 mL of water for 15 mL of solvent.
        let said = answer(&page).await?;
        assert!(said.contains("60 %") && said.contains("bitter stuff") && said.contains("short of"), "{said}");
        page.press("Add a portion").await?;
        page.type_at("extraction.portions[1].volume_ml", "15").await?;
        // Example 7.15: 84.0 % after two.
        let said = answer(&page).await?;
        assert!(said.contains("84 %"), "{said}");
        page.picture("own-liquid.png").await
    });
}

#[test]
fn the_demo_of_a_neutral_alkaloid_shows_plan_and_isolate_side_by_side() {
    journey(Setup::default(), |page| async move {
        let said = answer(&page).await?;
        assert!(said.contains("24 %") && said.contains("98 %"), "{said}");
        let isolate = page.text("#isolate").await?;
        // 47 mg, 90 % pure, a monohydrate: 38.7 mg without its water.
        for word in ["stage efficiency", "38.7"] {
            assert!(isolate.contains(word), "no {word} in {isolate}");
        }
        let made = page.text("#make-up").await?;
        assert!(made.contains("480"), "{made}");
        // 11.6 mPa·s and 1.214 g/mL: (11.56/1.002)·(0.3284/0.1122) = 33.8.
        let feed = page.text("#feed").await?;
        assert!(feed.contains("34 times as slowly"), "{feed}");
        let readings = page.text("#ionisation").await?;
        assert!(readings.contains("The disagreement matters"), "{readings}");
        Ok(())
    });
}

#[test]
fn each_demo_teaches_its_own_lesson() {
    journey(Setup::default(), |page| async move {
        page.press("Demo: Base charged at the liquid's own pH").await?;
        let said = page.text(".answer").await?;
        assert!(said.contains("Ionisation is the limit") && said.contains("sodium"), "{said}");
        page.press("Demo: Weak-acid preservative near its pKa").await?;
        let said = answer(&page).await?;
        assert!(said.contains("borderline"), "{said}");
        page.press("Demo: Neutral alkaloid, crude isolate far below plan").await?;
        assert!(answer(&page).await?.contains("24 %"));
        Ok(())
    });
}

/// Everything a user may type by mistake: the message stands at the field, the text stays, the
/// last good answer stays and is marked stale, and it is good again when the text is.
#[test]
fn bad_input_keeps_the_text_and_the_last_good_answer() {
    journey(Setup::default(), |page| async move {
        let good = answer(&page).await?;
        for (path, text, word) in [
            ("feed.volume_ml", "", "enter"),
            ("feed.volume_ml", "abc", "abc"),
            ("feed.volume_ml", "-500", "more than 0"),
            ("feed.volume_ml", "1,234.5", "1,234.5"),
            ("feed.volume_ml", "1e99", "up to"),
            ("feed.ph", "34", "pH"),
            ("extraction.portions[0].volume_ml", "0", "more than 0"),
            ("extraction.portions[0].volume_ml", "4000", "vessel"),
            ("partition[0].k_neutral", "0", "K of the target is 0"),
            ("partition[0].k_neutral", "inf", "inf"),
            ("feed.ingredients[1].sites[1].pka", "1", "rising order"),
            ("isolate.purity", "90", "fraction"),
        ] {
            let before = page.typed(path).await?;
            page.paste_at(path, text).await?;
            let problem = page.problem(path).await?;
            assert!(problem.to_lowercase().contains(&word.to_lowercase()), "{path} “{text}”: {problem}");
            assert_eq!(page.typed(path).await?, text, "{path}: typed text was changed");
            assert_eq!(answer(&page).await?, good, "{path} “{text}”: the last good answer is gone");
            assert!(page.count(".answer.stale").await? == 1, "{path} “{text}”: not marked stale");
            page.paste_at(path, &before).await?;
            assert_eq!(page.problem(path).await?, "", "{path}");
            assert_eq!(page.count(".answer.stale").await?, 0, "{path}: still stale");
        }
        // A decimal comma is a number.
        page.type_at("feed.ph", "3,4").await?;
        assert_eq!(page.problem("feed.ph").await?, "");
        assert_eq!(answer(&page).await?, good);
        Ok(())
    });
}

/// A pH that was not measured is worked out, and the liquor's is carried on from the feed's.
#[test]
fn a_missing_ph_is_worked_out_from_what_is_listed() {
    journey(Setup::default(), |page| async move {
        let before = page.text("#feed").await?;
        assert!(before.contains("by composition"), "{before}");
        page.paste_at("feed.ph", "").await?;
        // 13 mmol/L of citric acid alone; pKa 3.13: pH = (pKa − log c)/2 = 2.5, a little more.
        let sum = page.text("#feed .step-sum").await?;
        assert!(sum.contains("pH 2.5") && sum.contains("by composition"), "{sum}");
        assert_eq!(page.count(".answer.stale").await?, 0);
        page.press("Add an ion of fixed charge").await?;
        page.type_at("feed.strong_ions[0].name", "sodium").await?;
        page.type_at("feed.strong_ions[0].mmol_per_l", "13").await?;
        // As monosodium citrate: pH about half the sum of the first two pKa, 3.9.
        let sum = page.text("#feed .step-sum").await?;
        assert!(sum.contains("pH 3.8") || sum.contains("pH 3.9"), "{sum}");
        // Twice what one atmosphere dissolves at 5 °C, so about one bar of gauge pressure.
        page.paste_at("feed.co2_g_per_l", "5.63").await?;
        let made = page.text("#make-up").await?;
        assert!(made.contains("2.7 g for the made-up liquid") && made.contains("under 1.0 bar"), "{made}");
        page.paste_at("feed.strong_ions[0].charge", "0.5").await?;
        let problem = page.problem("feed.strong_ions[0].charge").await?;
        assert!(problem.contains("whole number"), "{problem}");
        assert_eq!(page.count(".answer.stale").await?, 1);
        Ok(())
    });
}

/// Assays while stripping give the time to a residue; nothing on the page says what it permits.
#[test]
fn stripping_is_followed_to_a_residue() {
    journey(Setup::default(), |page| async move {
        let strip = page.text("#strip").await?;
        for words in ["times as volatile as water", "check the current law", "2 mg/kg for roasted coffee"] {
            assert!(strip.contains(words), "no {words} in {strip}");
        }
        for (i, (minutes, content)) in [("0", "1000"), ("10", "100"), ("20", "10")].into_iter().enumerate() {
            page.press("Add an assay").await?;
            page.type_at(&format!("strip.readings[{i}].minutes"), minutes).await?;
            page.type_at(&format!("strip.readings[{i}].mg_per_l"), content).await?;
        }
        // Tenfold every 10 min; 0.2 mg/L in 480 mL is 1 mg/L in 96 mL: 30 min.
        page.type_at("strip.limit_mg_per_l", "0.2").await?;
        let table = page.text("#strip table").await?;
        assert!(table.contains("as entered") && table.contains("30 (30–30)"), "{table}");
        page.paste_at("strip.pressure_kpa", "0").await?;
        assert!(page.problem("strip.pressure_kpa").await?.contains("0.1"));
        page.paste_at("strip.pressure_kpa", "5").await?;
        // Steam tables: 32.88 °C at 5 kPa.
        assert!(page.text("#strip").await?.contains("33 °C"));
        page.choose("goal.purpose", "medicine").await?;
        assert!(page.text("#strip").await?.contains("600 ppm"));
        page.choose("goal.purpose", "technical").await?;
        assert!(!page.text("#strip").await?.contains("as listed in"));
        page.picture("strip.png").await
    });
}

#[test]
fn what_was_typed_survives_a_reload() {
    journey(Setup::default(), |page| async move {
        describe_own_liquid(&page).await?;
        page.type_at("feed.ph", "not a pH").await?;
        page.kept().await?;
        page.reload().await?;
        assert_eq!(page.typed("feed.ph").await?, "not a pH");
        assert_eq!(page.typed("feed.ingredients[0].name").await?, "bitter stuff");
        page.type_at("feed.ph", "7").await?;
        assert!(answer(&page).await?.contains("60 %"));
        Ok(())
    });
}

#[test]
fn a_study_is_duplicated_deleted_and_put_back() {
    journey(Setup::default(), |page| async move {
        describe_own_liquid(&page).await?;
        page.kept().await?;
        let studies = page.count(".shelf-row").await?;
        page.press("Duplicate this study").await?;
        page.kept().await?;
        assert_eq!(page.count(".shelf-row").await?, studies + 1);
        page.type_at("feed.volume_ml", "60").await?;
        page.press("Delete this study").await?;
        page.kept().await?;
        assert_eq!(page.count(".shelf-row").await?, studies);
        page.press("Undo").await?;
        page.kept().await?;
        assert_eq!(page.count(".shelf-row").await?, studies + 1);
        assert_eq!(page.typed("feed.volume_ml").await?, "60");
        Ok(())
    });
}

#[test]
fn the_page_works_where_nothing_may_be_stored() {
    journey(Setup { storage_blocked: true, ..Setup::default() }, |page| async move {
        let told = page.text(".told").await?;
        assert!(told.contains("keeps nothing"), "{told}");
        describe_own_liquid(&page).await?;
        assert!(answer(&page).await?.contains("60 %"));
        Ok(())
    });
}

#[test]
fn a_damaged_entry_is_set_aside_and_not_lost() {
    journey(Setup::default(), |page| async move {
        describe_own_liquid(&page).await?;
        page.kept().await?;
        page.ask(
            "for (const k of Object.keys(localStorage)) if (k.startsWith('unstir.study.')) \
             localStorage.setItem(k, '{damaged'); return 1;",
        )
        .await?;
        // Leaving the page must not write the good study over the damaged entry under test.
        page.ask("window.addEventListener('pagehide', e => e.stopImmediatePropagation(), true); return 1;").await?;
        page.reload().await?;
        let aside = page.ask("return Object.keys(localStorage).filter(k => k.endsWith('-broken')).length;").await?;
        assert!(aside.as_u64().unwrap_or(0) >= 1, "{aside}");
        assert!(page.count("header.top").await? == 1);
        Ok(())
    });
}

#[test]
fn portions_and_ingredients_come_and_go() {
    journey(Setup::default(), |page| async move {
        let rows = page.count("#portions .row").await?;
        page.press("Add a portion").await?;
        page.type_at("extraction.portions[4].volume_ml", "15").await?;
        assert_eq!(page.count("#portions .row").await?, rows + 1);
        page.press("Add an ingredient").await?;
        page.type_at("feed.ingredients[3].name", "aroma").await?;
        page.type_at("feed.ingredients[3].amount.mg_per_l", "5").await?;
        let balance = page.text("#balance").await?;
        assert!(balance.contains("aroma"), "{balance}");
        page.press("Remove this portion").await?;
        assert_eq!(page.count("#portions .row").await?, rows);
        page.choose("extraction.scheme", "counter_current").await?;
        page.type_at("extraction.stages", "3").await?;
        page.type_at("extraction.solvent_ml", "75").await?;
        let portions = page.text("#portions").await?;
        assert!(portions.contains("stage 3") || portions.contains("counter-current"), "{portions}");
        assert_eq!(page.count(".answer.stale").await?, 0);
        Ok(())
    });
}

/// Charts are drawn, sharp on a dense screen, and say their finding in words and in a table.
#[test]
fn charts_are_sharp_and_told_in_words() {
    journey(Setup { density: 2.0, ..Setup::default() }, |page| async move {
        page.wait_for("figure.chart canvas").await?;
        tokio::time::sleep(std::time::Duration::from_millis(600)).await;
        let charts = page
            .ask(
                "return [...document.querySelectorAll('figure.chart')].map(f => { \
                 const c = f.querySelector('canvas'); const css = c.clientWidth; \
                 const pixels = c.getContext('2d').getImageData(0, 0, c.width, c.height).data; \
                 let ink = 0; for (let i = 3; i < pixels.length; i += 4) if (pixels[i]) ink++; \
                 return { ratio: c.width / css, ink, alt: c.getAttribute('aria-label') || '', \
                 role: c.getAttribute('role'), cells: f.querySelectorAll('table td').length }; });",
            )
            .await?;
        let charts = charts.as_array().cloned().unwrap_or_default();
        assert!(charts.len() >= 3, "{} charts", charts.len());
        for c in charts {
            assert!((c["ratio"].as_f64().unwrap_or(0.0) - 2.0).abs() < 0.02, "{c}");
            assert!(c["ink"].as_u64().unwrap_or(0) > 500, "nothing is drawn: {c}");
            assert!(c["alt"].as_str().unwrap_or("").len() > 20 && c["role"] == "img", "{c}");
            assert!(c["cells"].as_u64().unwrap_or(0) > 3, "{c}");
        }
        Ok(())
    });
}

/// At the three agreed sizes and at 320 px nothing makes the page itself scroll sideways, controls
/// are large enough to hit, and the liquid stays in view.
#[test]
fn it_fits_every_screen() {
    for size in [(1280, 800), (820, 1180), (500, 844)] {
        journey(Setup { size, ..Setup::default() }, move |page| async move {
            let wide = page.ask("return document.documentElement.scrollWidth - innerWidth;").await?;
            assert!(wide.as_f64().unwrap_or(1.0) <= 1.0, "{size:?}: {wide} px too wide");
            let small = page
                .ask(
                    "return [...document.querySelectorAll('button, input:not([type=radio]):not([type=checkbox]):not([type=file]), select, summary')]\
                     .filter(e => e.offsetParent && e.getBoundingClientRect().height > 0 \
                     && e.getBoundingClientRect().height < 24).map(e => e.outerHTML.slice(0, 90));",
                )
                .await?;
            assert_eq!(small.as_array().map(Vec::len), Some(0), "{size:?}: {small}");
            page.ask("document.querySelector('#make-up').scrollIntoView(); return 1;").await?;
            page.settle().await?;
            let seen = page
                .ask("const r = document.querySelector('.liquid').getBoundingClientRect(); return r.bottom > 0 && r.top < innerHeight;")
                .await?;
            assert_eq!(seen.as_bool(), Some(true), "{size:?}: the liquid is out of view");
            page.picture(&format!("make-up-{}.png", size.0)).await
        });
    }
}

/// Cautions stand in the row of every solvent, without a click.
#[test]
fn cautions_stand_beside_every_solvent() {
    journey(Setup::default(), |page| async move {
        let bare = page
            .ask(
                "return [...document.querySelectorAll('.choice')].filter(c => { \
                 const k = c.querySelector('.caution'); return !k || !k.checkVisibility() }).length;",
            )
            .await?;
        assert_eq!(bare.as_u64(), Some(0));
        assert!(page.count(".choice").await? >= 6);
        Ok(())
    });
}

/// Solvents are put in order, filtered and compared; a K that is not known is not taken for 0.
#[test]
fn solvents_are_ranked_for_this_liquid() {
    journey(Setup::default(), |page| async move {
        let all = page.count(".choice").await?;
        // Published for caffeine: about 9.5 in dichloromethane and in chloroform.
        let first = page.text(".choice").await?;
        assert!(first.contains("D of caffeine") && first.contains("9.4"), "{first}");
        assert!(page.text(".choices").await?.contains("no K known"));
        // 75 mL of dichloromethane in 50 m³ is 564 ppm, 35 times 16 ppm.
        let spilled = page.text("#solvent").await?;
        assert!(spilled.contains("mL spilled in 50") && spilled.contains("35 times the lowest listed"), "{spilled}");
        page.type_at("room.changes_per_h", "0").await?;
        assert!(page.text("#solvent").await?.contains("By ventilation alone it does not fall"));
        page.choose("ranking.order", "boiling").await?;
        assert!(page.text(".choice").await?.contains("diethyl ether"));
        page.tick("no peroxide formers").await?;
        assert!(page.count(".choice").await? < all);
        assert!(!page.text(".choices").await?.contains("diethyl ether"));
        page.tick("compare toluene").await?;
        page.tick("compare ethyl acetate").await?;
        let table = page.text("#solvent .results table").await?;
        assert!(table.contains("toluene") && table.contains("ethyl acetate") && table.contains("Danger"), "{table}");
        page.picture("ranking.png").await
    });
}
