// The page in each browser, from a file and from a server: it gets ready, says
// nothing to the console, and asks nobody for anything but its own files.

import { readdir } from "node:fs/promises";
import path from "node:path";
import { pathToFileURL } from "node:url";

import { openPage, untilReady } from "./browser.mjs";
import { check, holds, same } from "./harness.mjs";

const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

export async function pages(name, browser, sink, dist, site) {
  await watching(name, browser, sink, site);
  await check(`${name}: the page gets ready from a file`, async () => {
    const before = [site.calls.length, sink.calls.length];
    const time = await ready(browser, pathToFileURL(path.join(dist, "weirmark.html")).href);
    same([site.calls.length, sink.calls.length], before, "calls of the server and of the sink");
    return time;
  });
  await check(`${name}: the page gets ready from a server`, async () => {
    const before = sink.calls.length;
    site.calls.length = 0;
    const time = await ready(browser, site.address);
    const files = (await readdir(path.join(dist, "site"))).filter((file) => file !== "index.html");
    same(site.calls.toSorted(), ["GET /", ...files.map((file) => `GET /${file}`)].toSorted(), "calls of the server");
    same(sink.calls.slice(before), [], "calls of the sink");
    return time;
  });
}

/** Opens the page at the address and returns when it was ready, in its own time. */
async function ready(browser, address) {
  const { page, said, close } = await openPage(browser);
  try {
    await page.goto(address);
    await untilReady(page).catch(async (cause) => {
      const state = await page.evaluate(() => `${document.documentElement.dataset.state}: ${document.body.innerText.slice(0, 500)}`);
      throw new Error(`${cause.message}; the page is ${state}; console: ${said.join(" | ")}`);
    });
    const time = await page.evaluate(() => performance.getEntriesByName("ready")[0].startTime);
    // What comes late counts as well.
    await pause(500);
    same(said, [], "console");
    return `ready after ${Math.round(time)} ms`;
  } finally {
    await close();
  }
}

/** Shows that the means of the other checks see what they are to see. */
async function watching(name, browser, sink, site) {
  await check(`${name}: the sink sees a call to another address`, async () => {
    const { page, close } = await openPage(browser);
    const before = sink.calls.length;
    await page.goto("http://weirmark.example/").catch(() => {});
    await close();
    holds(sink.calls.slice(before).some((call) => call.includes("weirmark.example")), `calls: ${sink.calls.slice(before)}`);
  });
  await check(`${name}: words to the console are seen, those of a worker too`, async () => {
    const { page, said, close } = await openPage(browser);
    await page.goto("about:blank");
    await page.evaluate(async () => {
      console.log("from the page");
      const source = 'console.warn("from the worker"); postMessage(0); setTimeout(() => { throw new Error("fallen"); });';
      const worker = new Worker(URL.createObjectURL(new Blob([source])));
      await new Promise((resolve) => (worker.onmessage = resolve));
    });
    await pause(300);
    await close();
    for (const text of ["from the page", "from the worker", "fallen"]) {
      holds(said.some((line) => line.includes(text)), `"${text}" is not among ${JSON.stringify(said)}`);
    }
  });
  await check(`${name}: a call that the policy forbids is seen`, async () => {
    const { page, said, close } = await openPage(browser);
    await page.goto(site.address);
    await untilReady(page);
    const before = sink.calls.length;
    await page.evaluate(() => fetch("http://weirmark.example/").catch(() => {}));
    await pause(300);
    await close();
    same(sink.calls.slice(before), [], "calls of the sink");
    holds(said.length > 0, "the console says nothing");
  });
}
