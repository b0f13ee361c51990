// Run by test_vscode.py: goes through a draft in VS Code as its author would, with a picture of
// each step, and prints what it saw as JSON.

import { createRequire } from "node:module";

const require = createRequire(`${process.env.CROSSFOOT_NODE_MODULES}/`);
const { chromium } = require("playwright-core");

const { CROSSFOOT_URL: url, CROSSFOOT_PICTURES: pictures, CROSSFOOT_CHROMIUM: executablePath } = process.env;
const PATIENCE = { timeout: 60_000 };

const browser = await chromium.launch({
  executablePath,
  args: [
    "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-sync",
    "--disable-background-networking", "--disable-component-update",
  ],
});
const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
const seen = {};
const picture = (name) => page.screenshot({ path: `${pictures}/${name}.png` });

try {
  await page.goto(url, PATIENCE);
  await page.waitForSelector(".monaco-workbench", PATIENCE);
  await page.waitForTimeout(2000);
  await page.keyboard.press("Control+P");
  await page.waitForSelector(".quick-input-widget input", PATIENCE);
  await page.keyboard.type("draft.qmd");
  await page.waitForSelector('.quick-input-list .monaco-list-row[aria-label*="draft.qmd"]', PATIENCE);
  await page.keyboard.press("Enter");
  const squiggle = page.locator(".squiggly-error").first();
  await squiggle.waitFor(PATIENCE);
  await page.waitForTimeout(500);
  await picture("1-squiggle");
  const box = await squiggle.boundingBox();
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y, { steps: 5 });
  const hover = page.locator(".monaco-hover", { hasText: "it must be" });
  await hover.waitFor(PATIENCE);
  seen.hover = await hover.first().innerText();
  await page.waitForTimeout(300);
  await picture("2-hover");
  await page.mouse.click(x, y);
  await page.keyboard.press("Control+.");
  const menu = page.locator(".action-widget:not(.action-list-submenu-panel)");
  await menu.waitFor(PATIENCE);
  await page.waitForTimeout(500);
  seen.actions = await menu.locator(".monaco-list-row").allInnerTexts();
  await picture("3-actions");
  await page.keyboard.press("Enter");
  await page.waitForFunction(() => !document.querySelector(".squiggly-error"), null, PATIENCE);
  const status = page.locator(".statusbar-item", { hasText: "Crossfoot 1" });
  await status.waitFor(PATIENCE);
  seen.status = (await status.first().innerText()).trim();
  seen.text = (await page.locator(".view-lines").first().innerText()).replaceAll("\u00a0", " ");
  const lens = page.locator(".codelens-decoration", { hasText: "1 agrees" });
  await lens.waitFor(PATIENCE);
  seen.lens = (await lens.first().innerText()).replaceAll("\u00a0", " ");
  await picture("4-fixed");
  // An allowance asks for its reason.
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Enter");
  await page.keyboard.type("Now t(40) = 2.20, p = .533.");
  await page.locator(".squiggly-error").first().waitFor(PATIENCE);
  await page.keyboard.press("Control+ArrowLeft");
  await page.keyboard.press("Control+.");
  await menu.waitFor(PATIENCE);
  await page.waitForTimeout(500);
  await page.keyboard.type("Allow");
  await page.waitForTimeout(300);
  const allow = menu.locator(".monaco-list-row", { hasText: "with a reason" }).first();
  await allow.click();
  await page.waitForSelector(".quick-input-widget input", PATIENCE);
  await page.keyboard.type("it was copied from the registered report");
  await page.waitForTimeout(300);
  await picture("5-reason");
  await page.keyboard.press("Enter");
  await page.waitForFunction(() => !document.querySelector(".squiggly-error"), null, PATIENCE);
  await page.waitForTimeout(500);
  seen.allowed = (await page.locator(".view-lines").first().innerText()).replaceAll("\u00a0", " ");
  await picture("6-allowed");
  await page.locator(".statusbar-item", { hasText: "Crossfoot" }).first().click();
  await page.waitForTimeout(800);
  await picture("7-summary");
} catch (error) {
  seen.problem = String(error);
  await picture("problem");
} finally {
  await browser.close();
}
console.log(JSON.stringify(seen));
