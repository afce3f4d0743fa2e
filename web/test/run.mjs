// The tests of the front end: node web/test/run.mjs [messages|edge|page|engine|work]...
// Everything is built first, into dist/test, so that what is tested is what is
// here. The last line counts: "N passed, N failed", with ", N skipped" where a
// browser is not installed.

import path from "node:path";

import { browsers, installed, openBrowser, openSink, openSite } from "./browser.mjs";
import { check, close, root, run, skip } from "./harness.mjs";
import { edge } from "./edge.mjs";
import { engine } from "./engine.mjs";
import { messages } from "./messages.mjs";
import { pages } from "./page.mjs";
import { work } from "./work.mjs";

const asked = process.argv.slice(2);
const wanted = (group) => asked.length === 0 || asked.includes(group);
const dist = path.join(root, "dist", "test");
const faulty = path.join(dist, "faulty");

await run("go", "run", "./web/build", "page", "-out", dist);
if (wanted("messages")) {
  await group("messages", () => messages(path.join(dist, "site")));
}
if (wanted("edge")) {
  await group("edge", () => edge(dist));
}
if (wanted("page") || wanted("engine") || wanted("work")) {
  const source = "web/test/testdata/faulty";
  await run("go", "run", "./web/build", "page", "-out", faulty, "-entry", `${source}/main.ts`, "-core", `./${source}`);
  await inBrowsers();
}
process.exit(close());

async function inBrowsers() {
  const sink = await openSink();
  const site = await openSite(path.join(dist, "site"));
  for (const one of browsers) {
    if (!installed(one)) {
      skip(`${one.name}: page, engine and work`, `${one.program} is not installed`);
      continue;
    }
    await group(one.name, async () => {
      const browser = await openBrowser(one, sink);
      try {
        if (wanted("page")) {
          await pages(one.name, browser, sink, dist, site);
        }
        if (wanted("engine")) {
          await engine(one.name, browser, faulty);
        }
        if (wanted("work")) {
          await work(one.name, browser, sink, dist, site);
        }
      } finally {
        await browser.close();
      }
    });
  }
  await site.close();
  sink.close();
}

/** A group that cannot even begin is a failure, and the others go on. */
async function group(name, run) {
  try {
    await run();
  } catch (cause) {
    await check(`${name}: could be run`, () => {
      throw cause;
    });
  }
}
