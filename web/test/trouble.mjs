// The page with bad files, lost workers, a missing clipboard and unsaved work.

import { execFileSync } from "node:child_process";
import { open, mkdtemp, rm, stat } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";

import { holds, same } from "./harness.mjs";
import { pause } from "./person.mjs";

/** Makes the next clipboard call fail, as where a browser gives none. */
const noClipboard = () => Object.defineProperty(navigator, "clipboard", { value: undefined });

/** Keeps the workers of the page within reach. */
const keepWorkers = () => {
  window.workers = [];
  window.Worker = class extends Worker {
    constructor(address) {
      super(address);
      window.workers.push(this);
    }
  };
};

/** Writes a table of 6,200,000 rows, a little more than 200 MB. */
async function writeLarge(name) {
  const file = await open(name, "w");
  await file.write("x [m],Cp,u\n");
  for (let row = 0; row < 6_200_000; ) {
    let text = "";
    for (const end = row + 20_000; row < end; row++) {
      text += `${(row * 1e-5).toFixed(6)},${Math.sin(row * 1e-5).toFixed(8)},0.0100000000\n`;
    }
    await file.write(text);
  }
  await file.close();
}

/** Notes the longest task of the page while the core is busy, where the browser tells of tasks. */
function watchTasks() {
  window.longestTask = 0;
  if (PerformanceObserver.supportedEntryTypes.includes("longtask")) {
    const tasks = new PerformanceObserver((all) => {
      if (document.documentElement.dataset.state === "busy") {
        all.getEntries().forEach((one) => (window.longestTask = Math.max(window.longestTask, Math.round(one.duration))));
      }
    });
    tasks.observe({ type: "longtask" });
  }
}

/** Bytes of memory of all programs that this one has started, theirs too. */
function resident() {
  const rows = execFileSync("ps", ["-eo", "pid,ppid,rss", "--no-headers"]).toString().trim().split("\n").map((row) => row.trim().split(/\s+/).map(Number));
  const below = new Set([process.pid]);
  for (let grown = true; grown; ) {
    grown = false;
    for (const [pid, parent] of rows) {
      if (below.has(parent) && !below.has(pid)) {
        below.add(pid);
        grown = true;
      }
    }
  }
  below.delete(process.pid);
  return rows.filter(([pid]) => below.has(pid)).reduce((sum, [, , kilobytes]) => sum + kilobytes * 1024, 0);
}

/** What goes wrong, and ways in that are not a plain choice of files. */
export async function onTrouble(on, file, served) {
  await on("names with markup are shown as text", file, async (person) => {
    const trap = '<img src=x onerror="window.caught=1">';
    await person.drop([[`${trap}.csv`, `${trap} [m],<b>Cp</b>\n0,1\n1,2\n2,3\n3,4\n`]]);
    await person.acceptAll({ unit: "1" });
    await person.page.evaluate(() => document.querySelectorAll("details").forEach((one) => (one.open = true)));
    holds((await person.text(".tray")).includes(trap), await person.text(".tray"));
    same(await person.page.evaluate(() => [window.caught ?? 0, document.querySelectorAll("img").length]), [0, 0], "caught and images");
    holds((await person.page.$eval("#sentence", (one) => one.textContent)).includes("<b>Cp</b>"), await person.sentence());
  });

  await on("bad files stay in the tray with the reason", file, async (person) => {
    await person.drop([
      ["empty.csv", ""],
      ["picture.png", "\u0089PNG\r\n\u001a\n\u0000\u0000\u0000\rIHDR"],
      ["letter.txt", "Dear colleague,\nplease find nothing attached.\n"],
    ]);
    for (const one of ["empty.csv", "picture.png", "letter.txt"]) {
      holds((await person.text(".tray")).includes(one), `${one} has disappeared: ${await person.text(".tray")}`);
    }
    const rejected = await person.text(".rejected");
    holds(rejected.length > 60, `reasons: ${rejected}`);
    holds((await person.sentence()).startsWith("No statement"), await person.sentence());
  });

  await on("dropping on the untouched demo begins a study, on a touched one it adds", file, async (person) => {
    const before = await person.slips();
    await person.goTo("k of the statement");
    await person.fill("3");
    await person.drop([["more.csv", "x,Cp\n0,1\n1,2\n2,3\n"]]);
    same(await person.slips(), before + 1, "slips");
    await person.click("the demo");
    await person.drop([["first.csv", "x,Cp\n0,1\n1,2\n2,3\n"]]);
    same(await person.slips(), 1, "slips");
    holds((await person.text(".message")).includes("The demo was put aside"), await person.text(".message"));
    same(person.dialogs, ["confirm"], "asked before the changed demo was left");
  });

  await on("text is pasted, a table is typed", file, async (person) => {
    const withControl = async (key) => {
      await person.page.keyboard.down("Control");
      await person.page.keyboard.press(key);
      await person.page.keyboard.up("Control");
    };
    await person.click("type a table");
    await person.page.focus("dialog textarea");
    await person.type("x,Cp\n0,1\n1,2\n2,3\n");
    await withControl("a");
    await withControl("c");
    await person.press("Escape");
    await withControl("v");
    await person.until(() => document.querySelector(".slip h3")?.textContent === "pasted-1.txt");
    // What was pasted is, byte by byte, what a file of the same text holds.
    await person.drop([["same.csv", "x,Cp\n0,1\n1,2\n2,3\n"]]);
    await person.page.waitForFunction(() => document.body.innerText.includes("pasted-1.txt and same.csv are byte-identical"), { timeout: 10_000 });
    await person.click("Undo");
    await person.click("type a table");
    await person.page.type("dialog textarea", "x,Cp\n0,1\n1,2\n");
    await person.click("Add it to the study", "dialog");
    await person.until(() => document.querySelectorAll(".slip").length === 2);
    holds((await person.text(".slip h3")).includes("typed.csv"), await person.text(".slip h3"));
  });

  await on("unsaved work is asked about before a reload; then the demo is there as it came", file, async (person) => {
    const first = await person.sentence();
    await person.goTo("k of the statement");
    await person.fill("3");
    holds((await person.sentence()) !== first, "the sentence is as it was");
    await person.page.reload();
    await person.settle();
    same(person.dialogs, ["beforeunload"], "asked");
    same(await person.sentence(), first, "sentence");
    await person.goTo("k of the statement");
    await person.fill("3");
    await person.click("Save the study");
    await person.saved("study.json");
    await person.page.reload();
    await person.settle();
    same(person.dialogs, ["beforeunload"], "asked once more after saving");
  });

  await on("a worker that is lost can be stopped; the study goes on as it was", file, async (person) => {
    await person.goTo("k of the statement");
    await person.fill("3");
    const sentence = await person.sentence();
    // The copy for a new start is kept once the study has rested.
    await pause(1500);
    await person.settle();
    await person.page.evaluate(() => window.workers.at(-1).terminate());
    await person.goTo("accuracy requirement ±");
    await person.page.keyboard.press("Enter");
    await person.page.waitForSelector("[data-editor]");
    await person.type("7");
    await person.page.keyboard.press("Enter");
    await person.page.waitForFunction(() => document.body.innerText.includes("still at work"), { timeout: 10_000 });
    const stop = await person.page.evaluateHandle(() => [...document.querySelectorAll("button")].find((one) => one.innerText === "Stop it"));
    await stop.asElement().click();
    await person.until(() => document.querySelector(".message")?.innerText.includes("started again") || document.querySelector(".message")?.innerText.includes("Cancelled"));
    same(await person.sentence(), sentence, "sentence");
    await person.goTo("accuracy requirement ±");
    await person.fill("8");
    holds((await person.sentence()).includes("±8 %"), await person.sentence());
  }, { prepare: keepWorkers });

  await on("tables are copied; without a clipboard the text is shown to be copied by hand", file, async (person) => {
    await person.click("copy table");
    await person.page.waitForSelector("dialog textarea");
    const text = await person.page.$eval("dialog textarea", (area) => [area.value, area.selectionEnd - area.selectionStart]);
    holds(text[0].startsWith("grid\tcells"), text[0]);
    same(text[1], text[0].length, "selected");
    await person.press("Escape");
    await person.click("copy picture");
    await person.page.waitForSelector("dialog textarea");
    holds((await person.page.$eval("dialog textarea", (area) => area.value)).startsWith("<svg"), "the SVG");
  }, { prepare: noClipboard });

  await on("a table goes to the clipboard where there is one", served, async (person) => {
    await person.click("copy table");
    await person.until(() => document.querySelector(".message")?.innerText.includes("on the clipboard"));
    same(await person.page.evaluate(() => window.copied.split("\t")[0]), "grid", "copied");
  }, {
    prepare: () => {
      // What is written is seen here: reading a clipboard needs a permission that not every browser has.
      const clipboard = globalThis.Clipboard?.prototype;
      const write = clipboard?.writeText;
      if (write !== undefined) {
        clipboard.writeText = function (text) {
          window.copied = text;
          return write.call(this, text);
        };
      }
    },
  });

  await on("three files, one in millimetres under a header of metres: told at once, names read by a pattern", file, async (person) => {
    const wing = (scale, shift) => "x [m],Cp\n" + [0, 0.03, 0.06, 0.12, 0.18, 0.24].map((x, i) => `${x * scale},${(Math.cos(i) + shift).toFixed(3)}\n`).join("");
    await person.drop([["W7_lin_coarse.csv", wing(1, 0.02)], ["W7_lin_fine.csv", wing(1, 0.01)], ["W7_test.csv", wing(1000, 0)]]);
    holds((await person.text(".clash")).includes("(millimetres against metres?)"), await person.text(".tray"));
    await person.goTo("names are read as");
    await person.fill("case_model_grid");
    await person.page.waitForFunction(() => document.querySelector(".names")?.innerText.includes("1 of 3 names do not fit the pattern: W7_test.csv"), { timeout: 10_000 });
    const open = () => person.page.$$eval(".tray [data-open]", (all) => all.filter((one) => one.getAttribute("aria-label").startsWith("grid")).length);
    same(await open(), 2, "grids to accept");
    await person.click("the grid", ".names");
    same(await open(), 0, "grids to accept");
  });

  await on("a file of 200 MB: told how far, stopped, read, within four times its size", file, async (person) => {
    const folder = await mkdtemp(path.join(tmpdir(), "weirmark-large-"));
    try {
      const name = path.join(folder, "long-line.csv");
      await writeLarge(name);
      const size = (await stat(name)).size;
      holds(size > 200e6, `size: ${size}`);
      const field = await person.page.$("#files");
      const before = resident();
      let most = before;
      const watch = setInterval(() => (most = Math.max(most, resident())), 200);
      await person.page.evaluate(watchTasks);
      await field.uploadFile(name);
      const there = () => document.documentElement.dataset.state === "ready" && [...document.querySelectorAll(".slip h3")].some((one) => one.textContent === "long-line.csv");
      await person.page.waitForFunction(there, { timeout: 120_000 });
      await person.page.waitForFunction(() => document.querySelector(".message")?.innerText.includes("No copy is kept"), { timeout: 60_000 });
      clearInterval(watch);
      const longest = await person.page.evaluate(() => window.longestTask);
      holds(most - before < 4 * size, `the browser grew from ${Math.round(before / 1e6)} to ${Math.round(most / 1e6)} MB`);

      // The file is in the study now, of which no copy is kept: what is stopped goes back to the demo before.
      await field.uploadFile(name);
      await person.page.waitForFunction(() => /still at work: \d+ of 2\d\d MB are read/.test(document.body.innerText), { timeout: 60_000 });
      await person.click("Stop it");
      await person.until(() => document.querySelector(".message")?.innerText.includes("started again") || document.querySelector(".message")?.innerText.includes("Cancelled"));
      same(await person.page.$$eval(".slip h3", (all) => all.filter((one) => one.textContent === "long-line.csv").length), 0, "slips of the stopped file");
      return `the browser's programs grew by ${((most - before) / size).toFixed(1)} times the file; longest task of the page meanwhile ${longest} ms`;
    } finally {
      await rm(folder, { recursive: true, force: true });
    }
  });

  await on("40 MB are read without holding up the page", file, async (person) => {
    const measure = (name) => person.page.evaluate(async (name) => {
      let text = "x [m],Cp,u\n";
      for (let i = 0; i < 1_250_000; i++) {
        text += `${(i * 1e-5).toFixed(6)},${Math.sin(i * 1e-5).toFixed(8)},${(0.01).toFixed(8)}\n`;
      }
      const file = new File([new TextEncoder().encode(text)], name);
      text = "";
      // What the making of the file leaves to tidy up is not the page's.
      await new Promise((resolve) => setTimeout(resolve, 1500));
      let longest = 0;
      let last = performance.now();
      let watch;
      let tasks;
      if (PerformanceObserver.supportedEntryTypes.includes("longtask")) {
        tasks = new PerformanceObserver((all) => all.getEntries().forEach((one) => (longest = Math.max(longest, one.duration))));
        tasks.observe({ type: "longtask" });
      } else {
        // Without the browser's own account a timer sees each task, and what it waits itself.
        watch = setInterval(() => {
          longest = Math.max(longest, performance.now() - last);
          last = performance.now();
        }, 1);
      }
      const data = new DataTransfer();
      data.items.add(file);
      document.body.dispatchEvent(new DragEvent("drop", { dataTransfer: data, bubbles: true, cancelable: true }));
      await new Promise((resolve) => {
        const wait = setInterval(() => {
          if (document.documentElement.dataset.state === "ready" && [...document.querySelectorAll(".slip h3")].some((one) => one.textContent === name)) {
            clearInterval(wait);
            resolve();
          }
        }, 5);
      });
      await new Promise((resolve) => setTimeout(resolve, 100));
      clearInterval(watch);
      tasks?.disconnect();
      return { longest, size: file.size };
    }, name);
    // The better of two: what else the machine does holds the page up as well.
    const runs = [await measure("large-1.csv"), await measure("large-2.csv")];
    const longest = Math.min(...runs.map((run) => run.longest));
    holds(runs.every((run) => run.size > 38e6), `sizes: ${runs.map((run) => run.size)}`);
    holds(longest < 50, `the page stood still for ${runs.map((run) => Math.round(run.longest))} ms`);
    return `longest task over 50 ms, or longest wait: ${runs.map((run) => Math.round(run.longest)).join(" and ")} ms`;
  });
}
