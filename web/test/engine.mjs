// The engine in each browser, with a core that fails when it is asked to.

import { readFile, writeFile } from "node:fs/promises";
import path from "node:path";
import { pathToFileURL } from "node:url";

import { openPage, untilReady } from "./browser.mjs";
import { base64, check, holds, same } from "./harness.mjs";

export async function engine(name, browser, folder) {
  const address = pathToFileURL(path.join(folder, "weirmark.html")).href;

  /** One check on a fresh page; prepare runs in it before its own scripts. */
  const on = (what, prepare, run) =>
    check(`${name}: engine: ${what}`, async () => {
      const { page, said, close } = await openPage(browser);
      try {
        if (prepare !== undefined) {
          await page.evaluateOnNewDocument(prepare);
        }
        await page.goto(address);
        await untilReady(page);
        const result = await run(page);
        same(said, [], "console");
        return result;
      } finally {
        await close();
      }
    });

  await on("answers in order, numbered, with the bytes that came", undefined, async (page) => {
    const answers = await page.evaluate(async () => {
      const asked = ["a", "b", "c"].map((kind, i) => engine.ask({ kind }, [new Uint8Array(i), new Uint8Array([1, 2])]));
      return (await Promise.all(asked)).map(({ reply, files }) => [reply.calls, reply.bytes, reply.request, files.map((file) => [...file])]);
    });
    const want = ["a", "b", "c"].map((kind, i) => [
      i + 1,
      i + 2,
      { protocol: 1, number: i + 1, kind },
      [Array(i).fill(0), [1, 2]],
    ]);
    same(answers, want, "answers");
    same(await page.evaluate(() => changes), ["starting", "ready", "busy", "ready"], "states");
  });

  for (const [where, prepare] of hosts) {
    await on(`${where}, starts again after a panic with the last study`, prepare, async (page) => {
      const found = await page.evaluate(async () => {
        engine.remember(new TextEncoder().encode("study"));
        const lost = engine.ask({ kind: "panic" }).catch((cause) => ({ message: cause.message, detail: cause.detail }));
        const waiting = engine.ask({ kind: "next" });
        const [{ message, detail }, { reply }] = await Promise.all([lost, waiting]);
        return { message, detail: detail.split("\n")[0], opened: reply.opened, calls: reply.calls, changes };
      });
      const message = "The engine stopped at the last step and was started again with the study as it was before.";
      same(found.message, message, "message");
      holds(found.detail.includes("asked to fail"), `detail: ${found.detail}`);
      // The new core has answered to opening and to what was waiting.
      same([found.opened, found.calls], ["study", 2], "opened and calls");
      holds(found.changes.includes(`restarted: ${message}`), `states: ${found.changes}`);
    });
    await on(`${where}, stops where the last study makes it fail`, prepare, async (page) => {
      const found = await page.evaluate(async () => {
        engine.remember(new TextEncoder().encode("broken"));
        await engine.ask({ kind: "panic" }).catch(() => {});
        const late = await engine.ask({ kind: "next" }).catch((cause) => cause.message);
        return [engine.change.state, late, new TextDecoder().decode(engine.study)];
      });
      const message = "The engine stopped again while opening the last study. Please save the study and reload the page.";
      same(found, ["stopped", message, "broken"], "state, message and study");
    });
  }

  await check(`${name}: engine: runs in the page where its policy forbids a worker`, async () => {
    const page = await readFile(path.join(folder, "weirmark.html"), "utf8");
    const other = path.join(folder, "no-worker.html");
    await writeFile(other, page.replace("worker-src blob:", "worker-src 'none'"));
    const { page: opened, said, close } = await openPage(browser);
    try {
      await opened.goto(pathToFileURL(other).href);
      await untilReady(opened);
      same(await opened.evaluate(async () => (await engine.ask({ kind: "a" })).reply.calls), 1, "calls");
      // The browser reports the refusal; without it the test would have met a worker.
      holds(said.length > 0 && said.every((line) => line.includes("worker-src")), `console: ${said}`);
    } finally {
      await close();
    }
  });

  await on("cancel ends work without end and goes on with the last study", undefined, async (page) => {
    const found = await page.evaluate(async () => {
      engine.remember(new TextEncoder().encode("study"));
      const told = (cause) => cause.message;
      const lost = [engine.ask({ kind: "hang" }).catch(told), engine.ask({ kind: "waiting" }).catch(told)];
      await new Promise((resolve) => setTimeout(resolve, 200));
      const start = performance.now();
      engine.cancel();
      const { reply } = await engine.ask({ kind: "next" });
      return { lost: await Promise.all(lost), opened: reply.opened, kind: reply.request.kind, time: performance.now() - start };
    });
    same([found.lost, found.opened, found.kind], [["Cancelled.", "Cancelled."], "study", "next"], "lost, opened and kind");
    return `next answer after ${Math.round(found.time)} ms`;
  });

  await on("cancel helps where the worker was killed", keepWorkers, async (page) => {
    const found = await page.evaluate(async () => {
      engine.remember(new TextEncoder().encode("study"));
      workers[0].terminate();
      const lost = engine.ask({ kind: "unheard" }).catch((cause) => cause.message);
      await new Promise((resolve) => setTimeout(resolve, 200));
      engine.cancel();
      const { reply } = await engine.ask({ kind: "next" });
      return [await lost, reply.opened, workers.length];
    });
    same(found, ["Cancelled.", "study", 2], "lost, opened and workers");
  });

  await on("cancel with nothing asked leaves the core as it is", undefined, async (page) => {
    const calls = await page.evaluate(async () => {
      await engine.ask({ kind: "first" });
      engine.cancel();
      return (await engine.ask({ kind: "second" })).reply.calls;
    });
    same(calls, 2, "calls");
  });

  await on("40 MB go to the core without holding up the page", undefined, async (page) => {
    const tries = await page.evaluate(async () => {
      const file = new File([new Uint8Array(40e6).fill(55)], "large");
      const tries = [];
      for (let i = 0; i < 3; i++) {
        let longest = 0;
        let last = performance.now();
        const watch = setInterval(() => {
          longest = Math.max(longest, performance.now() - last);
          last = performance.now();
        }, 1);
        const { reply } = await engine.ask({ kind: "read" }, [file]); // as the page sends a large file
        clearInterval(watch);
        tries.push({ bytes: reply.bytes, longest });
      }
      return tries;
    });
    same(tries.map(({ bytes }) => bytes), [40e6, 40e6, 40e6], "bytes");
    // At most 50 ms is what the page promises for one task. A busy machine only
    // adds to what the timer sees, so the least of the tries is the page's share.
    const least = Math.min(...tries.map(({ longest }) => longest));
    holds(least < 50, `the page stood still for ${Math.round(least)} ms`);
    return `longest wait ${Math.round(least)} ms`;
  });

  await on("base64 is decoded alike by the table and by the browser", undefined, async (page) => {
    const texts = Array.from({ length: 300 }, (_, n) => base64(Uint8Array.from({ length: n }, (_, i) => (i * 37 + n) % 256)));
    const found = await page.evaluate(
      (texts) => texts.map((text) => [fromBase64(text, {}), fromBase64(text)].map((bytes) => btoa(String.fromCharCode(...bytes)))),
      texts,
    );
    same(found, texts.map((text) => [text, text]), "texts");
  });
}

/** Where the core runs, and what makes it run there; the functions run in the page. */
const hosts = [
  ["in a worker", undefined],
  [
    "in the page where no worker can be made",
    () => {
      window.Worker = function () {
        throw new Error("refused");
      };
    },
  ],
  [
    "in the page where a worker fails at once",
    () => {
      window.Worker = class extends EventTarget {
        constructor() {
          super();
          setTimeout(() => this.onerror?.(new ErrorEvent("error", { message: "refused", cancelable: true })));
        }
        terminate() {}
      };
    },
  ],
];

function keepWorkers() {
  window.workers = [];
  window.Worker = class extends Worker {
    constructor(address) {
      super(address);
      window.workers.push(this);
    }
  };
}
