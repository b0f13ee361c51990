// Run by test_vscode.py: goes through a draft in VS Code as its author would, with a picture of
// each step, and prints what it saw as JSON.

import { createRequire } from "node:module";

const require = createRequire(`${process.env.CROSSFOOT_NODE_MODULES}/`);
const { chromium } = require("playwright-core");

const { CROSSFOOT_URL: url, CROSSFOOT_PICTURES: pictures, CROSSFOOT_CHROMIUM: executablePath } = process.env;

// Milliseconds that a step may take in all, that its first try may take, and its longest.
const [PATIENCE, FIRST, LONGEST] = [240_000, 3_000, 30_000];

const browser = await chromium.launch({
  executablePath,
  args: [
    "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-sync",
    "--disable-background-networking", "--disable-component-update",
  ],
});
const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
page.setDefaultTimeout(LONGEST);
const seen = { pictures: [] };
let step = "start";

// What is done in a step may come to nothing: a key is lost while the window is being built, and
// VS Code drops a menu that was asked for if it isn't answered before it looks for quick fixes by
// itself, half a second after a click. So each step is tried again, more patiently each time,
// until it has led to what it is for.
async function until(name, wanted, act, state = "visible") {
  step = name;
  const end = Date.now() + PATIENCE;
  for (let timeout = FIRST; ; timeout = Math.min(2 * timeout, LONGEST)) {
    try {
      await act?.(timeout);
      await wanted.waitFor({ state, timeout });
      return;
    } catch (error) {
      if (Date.now() > end) {
        throw error;
      }
    }
  }
}

const text = (locator) => locator.first().innerText().then((words) => words.replaceAll("\u00a0", " ").trim());

async function picture(name) {
  await page.waitForTimeout(500); // what fades in has come
  await page.screenshot({ path: `${pictures}/${name}.png` });
  seen.pictures.push(name);
}

async function open(name) {
  const file = page.locator(".quick-input-list .monaco-list-row", { hasText: name }).first();
  await until(`find ${name}`, file, async (timeout) => {
    await page.keyboard.press("Escape");
    await page.keyboard.press("Control+P");
    await input.fill(name, { timeout });
  });
  await until(`open ${name}`, page.locator(".tab", { hasText: name }), (timeout) => file.click({ timeout }));
}

const editor = page.locator(".editor-instance .view-lines").first();
const squiggle = editor.locator("xpath=..").locator(".squiggly-error").first();
const menu = page.locator(".action-widget:not(.action-list-submenu-panel)");
const entry = (words) => menu.locator(".monaco-list-row", { hasText: words }).first();
const written = (words) => page.locator(".view-lines", { hasText: words }).first();
const input = page.locator(".quick-input-widget input").first();

async function middle(locator, timeout) {
  await locator.waitFor({ timeout });
  const box = await locator.boundingBox({ timeout });
  return [box.x + box.width / 2, box.y + box.height / 2];
}

async function point(timeout) {
  await page.mouse.move(5, 5);
  await page.mouse.move(...(await middle(squiggle, timeout)), { steps: 5 });
}

async function openMenu(timeout) {
  await page.keyboard.press("Escape");
  await page.mouse.click(...(await middle(squiggle, timeout)));
  await page.mouse.move(5, 5); // or the hover would come up behind the menu
  await page.keyboard.press("Control+.");
}

async function choose(words, timeout) {
  if (!(await entry(words).isVisible())) {
    await openMenu(timeout);
  }
  await entry(words).click({ timeout });
}

try {
  await until("the window", page.locator(".monaco-workbench"), () => page.goto(url));
  await open("draft.qmd");
  await until("the squiggle", squiggle);
  await picture("1-squiggle");

  const hover = page.locator(".monaco-hover", { hasText: "it must be" }).first();
  await until("the hover", hover, point);
  seen.hover = await text(hover);
  await picture("2-hover");

  // The name of the identity leads to what is said about it.
  const draft = page.locator(".tab", { hasText: "draft.qmd" });
  const about = page.locator(".view-lines", { hasText: "The p value of an F test is the area" });
  await until("the identity", about, async (timeout) => {
    await draft.click({ timeout });
    await point(timeout);
    await hover.locator("a", { hasText: "p-from-f" }).first().click({ timeout });
  });
  await picture("3-identity");
  await until("the draft again", squiggle, (timeout) => draft.click({ timeout }));

  await until("the menu", entry("Change to p = .018"), openMenu);
  await picture("4-actions");
  seen.actions = await menu.locator(".monaco-list-row").allInnerTexts();
  await until("the fix", written("= .018, as the crew"), (timeout) => choose("Change to p = .018", timeout));
  await until("no squiggle", squiggle, null, "hidden");
  await until("the status", page.locator(".statusbar-item", { hasText: /Crossfoot 1\s*$/ }));
  const lens = page.locator(".codelens-decoration", { hasText: "1 agrees" });
  await until("the lens", lens);
  seen.lens = await text(lens);
  seen.text = await text(editor);
  await picture("5-fixed");

  await until("the cursor", page.locator(".editor-instance .monaco-editor.focused"), async (timeout) => {
    await page.keyboard.press("Escape");
    await editor.locator(".view-line").last().click({ timeout });
  });
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Enter");
  await page.keyboard.type("Now t(40) = 2.20, p = .533.");
  await until("the next squiggle", squiggle);
  // An allowance asks for its reason.
  const prompt = page.locator(".quick-input-widget", { hasText: "Why is it right as printed?" });
  await until("the prompt", prompt, (timeout) => choose("with a reason", timeout));
  await input.fill("it was copied from the registered report");
  await picture("6-reason");
  await until("the remark", written("because it was copied"), () => page.keyboard.press("Enter"));
  await until("no squiggle again", squiggle, null, "hidden");
  seen.allowed = await text(editor);
  await picture("7-allowed");

  const summary = page.locator(".notification-toast", { hasText: "1 agrees, 1 is settled" });
  await until("the summary", summary, async (timeout) => {
    await page.locator(".statusbar-item", { hasText: "Crossfoot" }).first().click({ timeout });
  });
  await picture("8-summary");

  await open("notes.ipynb");
  // The cell is drawn in a frame above the list of cells, at its top; there it can be opened.
  const cells = page.locator(".notebookOverlay .cell-list-container").first();
  await until("the cell", cells.locator(".squiggly-error").first(), async (timeout) => {
    const { x, y } = await cells.boundingBox({ timeout });
    await page.mouse.dblclick(x + 150, y + 35);
  });
  seen.cell = await text(cells.locator(".view-lines"));
  await picture("9-notebook");
} catch (error) {
  await picture("problem").catch(() => undefined);
  seen.problem = {
    step,
    error: String(error),
    picture: `${pictures}/problem.png`,
    page: await page.locator("body").innerText().catch(String),
  };
} finally {
  await browser.close();
}
console.log(JSON.stringify(seen));
