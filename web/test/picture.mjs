// Takes the picture of the page for the README: node web/test/picture.mjs [page] [picture]
// The page is the single file as it is built (dist/weirmark.html).

import { writeFile } from "node:fs/promises";
import path from "node:path";
import { pathToFileURL } from "node:url";

import { browsers, openBrowser, openSink } from "./browser.mjs";
import { root } from "./harness.mjs";
import { Person } from "./person.mjs";

const [page = path.join(root, "dist", "weirmark.html"), picture = path.join(root, "web", "help", "page.png")] = process.argv.slice(2);

const sink = await openSink();
const browser = await openBrowser(browsers[0], sink);
try {
  const person = await Person.at(browser, pathToFileURL(path.resolve(page)).href, { width: 1280, height: 860 });
  // The cell of the demo whose requirement one better grid would resolve.
  await person.page.click('[data-cell="c2"]');
  await person.settle();
  await person.page.evaluate(() => document.activeElement.blur());
  const bytes = await person.page.screenshot({ type: "png", optimizeForSpeed: false });
  await writeFile(picture, bytes);
  console.log(`${picture}: ${Math.round(bytes.length / 1000)} kB`);
  await person.leave();
} finally {
  await browser.close();
  sink.close();
}
