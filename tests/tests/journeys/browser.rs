//! The page as the journeys handle it: one browser, one fresh profile, fields by their path.

use serde_json::json;
use std::future::Future;
use std::net::TcpListener;
use std::panic::{AssertUnwindSafe, catch_unwind, resume_unwind};
use std::path::PathBuf;
use std::process::{Child, Command, Stdio};
use std::time::Duration;
use thirtyfour::prelude::*;

/// The built page: `UNSTIR_PAGE`, or where `cargo xtask build` puts it.
fn page_file() -> PathBuf {
    let file = std::env::var_os("UNSTIR_PAGE")
        .map_or_else(|| PathBuf::from(concat!(env!("CARGO_MANIFEST_DIR"), "/../dist/unstir.html")), PathBuf::from);
    assert!(file.exists(), "{} is not built; run `cargo xtask test`, or `cargo xtask build` first", file.display());
    file.canonicalize().expect("a path")
}

/// How the browser is set up.
#[derive(Clone, Copy)]
pub struct Setup {
    /// Window width and height.
    pub size: (u32, u32),
    /// Whether local storage is blocked, as a cautious user sets it.
    pub storage_blocked: bool,
    /// Pixels of the screen per pixel of the page.
    pub density: f64,
}

impl Default for Setup {
    fn default() -> Self {
        Self { size: (1280, 900), storage_blocked: false, density: 1.0 }
    }
}

/// chromedriver with a folder of its own for what the browser leaves behind; both end with the
/// journey.
struct Driver {
    process: Child,
    scratch: PathBuf,
}

impl Driver {
    fn start(port: u16) -> Self {
        let scratch = std::env::temp_dir().join(format!("unstir-journey-{port}"));
        std::fs::create_dir_all(&scratch).expect("a scratch folder");
        let program = std::env::var_os("CHROMEDRIVER").unwrap_or_else(|| "chromedriver".into());
        let process = Command::new(program)
            .arg(format!("--port={port}"))
            .env("TMPDIR", &scratch)
            .stdout(Stdio::null())
            .stderr(Stdio::null())
            .spawn()
            .expect("chromedriver; install it or run `cargo xtask test`");
        Self { process, scratch }
    }
}

impl Drop for Driver {
    fn drop(&mut self) {
        let _ = self.process.kill();
        let _ = self.process.wait();
        let _ = std::fs::remove_dir_all(&self.scratch);
    }
}

/// One browser with the page open.
pub struct Page {
    driver: WebDriver,
}

/// Runs a journey on a freshly opened page; the browser is closed whatever happens.
pub fn journey<F, Fut>(setup: Setup, walk: F)
where
    F: FnOnce(Page) -> Fut,
    Fut: Future<Output = WebDriverResult<()>>,
{
    let runtime = tokio::runtime::Builder::new_current_thread().enable_all().build().expect("a runtime");
    let port = TcpListener::bind("127.0.0.1:0").expect("a port").local_addr().expect("an address").port();
    let _ended_with_us = Driver::start(port);
    let driver = runtime.block_on(connect(port, setup));
    let page = Page { driver: driver.clone() };
    // A failed assertion must not leave the browser running.
    let done = catch_unwind(AssertUnwindSafe(|| {
        runtime.block_on(async {
            page.open().await?;
            walk(page).await
        })
    }));
    let errors = runtime.block_on(async {
        let errors = console_errors(&driver).await;
        let _ = driver.quit().await;
        errors
    });
    match done {
        Ok(done) => done.expect("the journey"),
        Err(failed) => resume_unwind(failed),
    }
    assert!(errors.is_empty(), "the page reported: {errors:?}");
}

async fn connect(port: u16, setup: Setup) -> WebDriver {
    let mut caps = DesiredCapabilities::chrome();
    let (w, h) = setup.size;
    for arg in [
        "--headless=new".to_owned(),
        "--no-sandbox".to_owned(),
        "--disable-gpu".to_owned(),
        "--disable-background-networking".to_owned(),
        "--disable-component-update".to_owned(),
        "--disable-sync".to_owned(),
        "--disable-quic".to_owned(),
        "--no-first-run".to_owned(),
        "--disable-dev-shm-usage".to_owned(),
        format!("--window-size={w},{h}"),
        format!("--force-device-scale-factor={}", setup.density),
    ] {
        caps.add_arg(&arg).expect("an argument");
    }
    if let Ok(binary) = std::env::var("CHROMIUM") {
        caps.set_binary(&binary).expect("a binary");
    }
    if setup.storage_blocked {
        caps.add_experimental_option("prefs", json!({ "profile.default_content_setting_values.cookies": 2 }))
            .expect("a preference");
    }
    let address = format!("http://127.0.0.1:{port}");
    for _ in 0..100 {
        if let Ok(driver) = WebDriver::new(&address, caps.clone()).await {
            return driver;
        }
        tokio::time::sleep(Duration::from_millis(100)).await;
    }
    panic!("chromedriver did not answer at {address}");
}

/// What the page wrote as errors since it was opened.
async fn console_errors(driver: &WebDriver) -> Vec<String> {
    let script = "return window.unstirErrors || [];";
    match driver.execute(script, vec![]).await {
        Ok(r) => r.convert().unwrap_or_default(),
        Err(e) => vec![format!("the page no longer answers: {e}")],
    }
}

impl Page {
    /// Opens the page from disk and waits until it can be used.
    pub async fn open(&self) -> WebDriverResult<()> {
        self.driver.goto(&format!("file://{}", page_file().display())).await?;
        self.ready().await
    }

    /// Opens it again, as after a crash or the next morning.
    pub async fn reload(&self) -> WebDriverResult<()> {
        self.driver.refresh().await?;
        self.ready().await
    }

    async fn ready(&self) -> WebDriverResult<()> {
        self.wait_for("header.top").await?;
        let watch = "window.unstirErrors = window.unstirErrors || []; \
             if (!window.unstirWatched) { window.unstirWatched = true; \
             window.addEventListener('error', e => window.unstirErrors.push(e.message)); \
             const old = console.error; console.error = function () { \
             window.unstirErrors.push(Array.from(arguments).join(' ')); old.apply(console, arguments); }; }";
        self.driver.execute(watch, vec![]).await?;
        Ok(())
    }

    /// The first element that matches, waited for.
    pub async fn wait_for(&self, css: &str) -> WebDriverResult<WebElement> {
        self.driver.query(By::Css(css)).wait(Duration::from_secs(20), Duration::from_millis(50)).first().await
    }

    /// The id of the field at a path of the study file; see `app/src/parts/field.rs`.
    fn id(path: &str) -> String {
        let parts: Vec<&str> = path.split(['.', '[', ']']).filter(|p| !p.is_empty()).collect();
        format!("field-{}", parts.join("-").to_lowercase())
    }

    /// The input at a path.
    pub async fn field(&self, path: &str) -> WebDriverResult<WebElement> {
        self.wait_for(&format!("#{}", Self::id(path))).await
    }

    /// Replaces what is typed at a path, by keystrokes.
    pub async fn type_at(&self, path: &str, text: &str) -> WebDriverResult<()> {
        let field = self.field(path).await?;
        field.scroll_into_view().await?;
        field.click().await?;
        field.send_keys(Key::Control + "a").await?;
        field.send_keys(Key::Delete + "").await?;
        if !text.is_empty() {
            field.send_keys(text).await?;
        }
        self.settle().await
    }

    /// Replaces what is typed at a path in one go, so that no half-typed number is ever there.
    pub async fn paste_at(&self, path: &str, text: &str) -> WebDriverResult<()> {
        let script = "const field = arguments[0]; field.focus(); field.select(); \
             document.execCommand(arguments[1] ? 'insertText' : 'delete', false, arguments[1]);";
        self.driver.execute(script, vec![self.field(path).await?.to_json()?, json!(text)]).await?;
        self.settle().await
    }

    /// Chooses a value in the list at a path.
    pub async fn choose(&self, path: &str, value: &str) -> WebDriverResult<()> {
        let field = self.field(path).await?;
        let script = "arguments[0].value = arguments[1]; \
             arguments[0].dispatchEvent(new Event('input', {bubbles: true})); \
             arguments[0].dispatchEvent(new Event('change', {bubbles: true}));";
        self.driver.execute(script, vec![field.to_json()?, json!(value)]).await?;
        self.settle().await
    }

    /// What is typed at a path.
    pub async fn typed(&self, path: &str) -> WebDriverResult<String> {
        Ok(self.field(path).await?.prop("value").await?.unwrap_or_default())
    }

    /// The message below the field at a path; empty if there is none.
    pub async fn problem(&self, path: &str) -> WebDriverResult<String> {
        self.text(&format!("#{}-problem", Self::id(path))).await
    }

    /// The text of the first element that matches.
    pub async fn text(&self, css: &str) -> WebDriverResult<String> {
        // What is folded away still counts.
        let text = self.wait_for(css).await?.prop("textContent").await?.unwrap_or_default();
        Ok(text.replace('\u{a0}', " "))
    }

    /// How many elements match.
    pub async fn count(&self, css: &str) -> WebDriverResult<usize> {
        Ok(self.driver.find_all(By::Css(css)).await?.len())
    }

    /// Presses the first button with these words.
    pub async fn press(&self, words: &str) -> WebDriverResult<()> {
        let script = "const b = [...document.querySelectorAll('button')]\
             .find(b => b.textContent.trim() === arguments[0] || b.getAttribute('aria-label') === arguments[0]); \
             if (!b) return false; \
             for (let d = b.closest('details'); d; d = d.parentElement.closest('details')) d.open = true; \
             b.scrollIntoView({block: 'center'}); b.click(); return true;";
        let found = self.driver.execute(script, vec![json!(words)]).await?.json().as_bool() == Some(true);
        assert!(found, "there is no button “{words}”");
        self.settle().await
    }

    /// Ticks or unticks the box with these words.
    pub async fn tick(&self, words: &str) -> WebDriverResult<()> {
        let script = "const b = [...document.querySelectorAll('input[type=checkbox]')]\
             .find(b => b.getAttribute('aria-label') === arguments[0] || b.parentElement.textContent.trim() === arguments[0]); \
             if (!b) return false; b.scrollIntoView({block: 'center'}); b.click(); return true;";
        let found = self.driver.execute(script, vec![json!(words)]).await?.json().as_bool() == Some(true);
        assert!(found, "there is no box “{words}”");
        self.settle().await
    }

    /// The value of a script.
    pub async fn ask(&self, script: &str) -> WebDriverResult<serde_json::Value> {
        Ok(self.driver.execute(script, vec![]).await?.json().clone())
    }

    /// Lets what follows from an edit happen: two frames, and the rest before storing.
    pub async fn settle(&self) -> WebDriverResult<()> {
        let script = "const done = arguments[arguments.length - 1]; \
             requestAnimationFrame(() => requestAnimationFrame(() => setTimeout(done, 30)));";
        self.driver.execute_async(script, vec![]).await?;
        Ok(())
    }

    /// Waits until what was typed has been kept.
    pub async fn kept(&self) -> WebDriverResult<()> {
        tokio::time::sleep(Duration::from_millis(500)).await;
        Ok(())
    }

    /// A picture of the window, for looking at.
    pub async fn picture(&self, file: &str) -> WebDriverResult<()> {
        let Some(folder) = std::env::var_os("UNSTIR_SHOTS") else { return Ok(()) };
        let folder = PathBuf::from(folder);
        let _ = std::fs::create_dir_all(&folder);
        self.driver.screenshot(&folder.join(file)).await
    }
}
