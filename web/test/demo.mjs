// The page with the demo on it.

import { holds, same } from "./harness.mjs";
import { log, pause } from "./person.mjs";

/** The demo: its sentence, its board, its choices, and what can be saved of it. */
export async function onDemo(on, file) {
  await on("ready from a file within 5 s", file, async (person) => {
    const times = [];
    for (let i = 0; i < 5; i++) {
      times.push(await person.page.evaluate(() => performance.getEntriesByName("ready")[0].startTime));
      await person.page.reload();
      await person.settle();
    }
    // The fastest: what else the machine does lengthens the others. The aim is 2 s.
    holds(Math.min(...times) < 5000, `times: ${times.map(Math.round)}`);
    return `${times.map(Math.round).join(", ")} ms`;
  });

  await on("the demo opens with a sentence, unfinished, and n leads to its open point", file, async (person) => {
    holds((await person.sentence()).startsWith("For drag coefficient at C1"), `sentence: ${await person.sentence()}`);
    holds(/[1-9]\d* open points/.test(await person.text(".status")), `status: ${await person.text(".status")}`);
    await person.press("n");
    holds((await person.focused()).startsWith("Has each run settled?"), `focus: ${await person.focused()}`);
    await person.press("Escape");
    holds((await person.focused()).startsWith("For drag coefficient"), `focus: ${await person.focused()}`);
  });

  await on("every blank and number of the sentence leads somewhere", file, async (person) => {
    const ways = await person.page.$$("#sentence [role=button]");
    holds(ways.length > 5, `${ways.length} ways`);
    for (let i = 0; i < ways.length; i++) {
      await person.page.evaluate((i) => document.querySelectorAll("#sentence [role=button]")[i].focus(), i);
      const from = await person.focused();
      await person.press("Enter");
      holds((await person.focused()) !== from, `“${from}” leads nowhere`);
    }
  });

  await on("the board goes by arrows and Enter selects", file, async (person) => {
    await person.page.focus('[data-at="0,0"]');
    await person.press("ArrowRight", "ArrowDown");
    holds((await person.focused()).includes("pressure coefficient, upper branch, model B"), `focus: ${await person.focused()}`);
    await person.press("Enter");
    holds((await person.sentence()).includes("model B"), await person.sentence());
    const spoken = await person.page.$eval('[aria-selected="true"] button', (button) => button.getAttribute("aria-label"));
    holds(/agreement \w+/.test(spoken), `spoken: ${spoken}`);
    await person.press(".");
    holds((await person.page.$eval('[aria-selected="true"] button', (button) => button.dataset.cell)) === "c1", ". goes on to the next cell with doubts");
  });

  await on("a changed coverage factor is on screen at once", file, async (person) => {
    const times = [];
    for (const k of ["1", "2", "3", "2", "1", "3", "2"]) {
      await person.press("Escape", "k");
      await person.page.keyboard.press("Enter");
      await person.page.waitForSelector("[data-editor]");
      times.push(
        await person.page.evaluate(
          (k) =>
            new Promise((resolve) => {
              const field = document.activeElement;
              field.value = k;
              const sentence = document.getElementById("sentence");
              const start = performance.now();
              const watch = new MutationObserver(() => {
                if (sentence.textContent.replace(/\u00a0/g, " ").includes(`(k = ${k})`)) {
                  watch.disconnect();
                  // It is on screen once the frame with it has been drawn.
                  requestAnimationFrame(() => setTimeout(() => resolve(performance.now() - start)));
                }
              });
              watch.observe(sentence, { subtree: true, childList: true, characterData: true });
              field.dispatchEvent(new KeyboardEvent("keydown", { key: "Enter", bubbles: true, cancelable: true }));
            }),
          k,
        ),
      );
      await person.settle();
    }
    // The aim is 100 ms on a free machine; what else this one does may more than double it.
    holds(Math.min(...times) < 400, `times: ${times.map(Math.round)}`);
    return `${times.map(Math.round).join(", ")} ms`;
  });

  await on("choices, undo and redo; the log keeps everything", file, async (person) => {
    const first = await person.sentence();
    await person.goTo("k of the statement");
    await person.fill("1");
    holds((await person.sentence()).includes("(k = 1)"), await person.sentence());
    await person.goTo("accuracy requirement ±");
    await person.fill("20");
    holds((await person.sentence()).includes("±20 %"), await person.sentence());
    await person.page.keyboard.down("Control");
    await person.press("z", "z");
    await person.page.keyboard.up("Control");
    same(await person.sentence(), first, "sentence after undo");
    await person.page.keyboard.down("Control");
    await person.press("y");
    await person.page.keyboard.up("Control");
    holds((await person.sentence()).includes("(k = 1)"), await person.sentence());
    const lines = await log(person);
    for (const line of ["k of drag coefficient at C1: 2 → 1", "Undone: ", "Redone: "]) {
      holds(lines.includes(line), `the log lacks “${line}”: ${lines}`);
    }
  });

  await on("a refused value changes nothing and says why", file, async (person) => {
    const first = await person.sentence();
    await person.goTo("k of the statement");
    await person.fill("two");
    holds((await person.text(".message")).includes("two"), `message: ${await person.text(".message")}`);
    same(await person.sentence(), first, "sentence");
  });

  await on("stations go by arrows, with their ledger; one is excluded with a reason and taken back", file, async (person) => {
    await person.page.click('[data-at="1,1"]');
    await person.settle();
    if ((await person.text(".veil")) !== "") {
      await person.press("Escape", "v");
      holds((await person.text(".veil")) === "", "a key lifts the veil");
      holds((await log(person)).includes("requirement not set"), "the log does not say what was missing");
    }
    await person.page.focus(".stepped");
    await person.press("ArrowRight", "ArrowRight");
    // w walks back from E of the station: to D, and to the row of its file.
    const shown = (wanted) => person.page.waitForFunction((text) => document.querySelector(".walk")?.textContent?.includes(text), {}, wanted);
    await person.page.keyboard.press("w");
    await shown("E = S − D");
    await person.page.click('.walk [data-path$=".d"]');
    await shown("data D");
    await person.settle();
    await person.page.waitForFunction(() => document.activeElement !== document.body);
    await person.page.keyboard.press("w");
    await shown("Written in");
    await person.page.keyboard.press("Escape");
    await person.page.waitForFunction(() => document.querySelector(".walk") === null);
    await person.page.focus(".picture.stepped");
    const ledger = await person.text(".ledger");
    holds(/line \d+/.test(ledger), `ledger: ${ledger}`);
    holds((await person.page.$$(".cursor")).length > 0, "there is no cursor");
    await person.page.keyboard.press("x");
    await person.page.waitForSelector('[name="why"]');
    await person.type("blocked tap");
    await person.press("Enter");
    holds((await person.sentence()).includes("23 of 24"), await person.sentence());
    holds((await person.text(".exclusions")).includes("blocked tap"), await person.text(".exclusions"));
    await person.click("include it again");
    holds((await person.sentence()).includes("24 of 24"), await person.sentence());
  });

  await on("sources are added, said and removed; their pattern changes the joint statistic at once", file, async (person) => {
    await person.press("3");
    await person.click("the data’s uncertainty");
    const last = '.source:has([data-place$="|2.value"])';
    holds((await person.text(last)).includes("source"), await person.text(".sources"));
    holds((await person.sentence()).includes("No statement"), await person.sentence());
    await person.correct("value", "0.0001", last);
    await person.correct("coverage", "standard", last);
    holds(!(await person.sentence()).includes("No statement"), await person.sentence());
    await person.click("remove", last);
    await person.type("entered twice");
    await person.press("Enter");
    holds((await log(person)).includes("entered twice"), "the log lacks the reason");
  });

  await on("conditions are added to their list, said and taken away", file, async (person) => {
    await person.press("3");
    await person.click("Further entries", "[aria-labelledby=course-3]");
    const conditions = '[data-list="Conditions of both sides"]';
    await person.click("add one", conditions);
    await person.correct("condition", "incidence", conditions);
    holds((await person.text(conditions)).includes("incidence"), await person.text(conditions));
    await person.click("Put the further entries away", "[aria-labelledby=course-3]");
    holds((await person.text(conditions)).includes("incidence"), "what is used stays in sight");
    await person.click("remove", conditions);
    await person.press("Enter");
    same(await person.text(conditions), "", "the list is away again");
  });

  await on("the whole campaign: a full board, and slips that are folded until one is needed", file, async (person) => {
    await person.click("worked through");
    holds((await person.page.$$(".cell")).length > 20, await person.text(".board"));
    const folded = (await person.page.$$('.slip h3 [aria-expanded="false"]')).length;
    holds(folded > 20, `${folded} folded slips`);
    await person.click("C1-balance.csv", ".slip");
    same((await person.page.$$('.slip h3 [aria-expanded="false"]')).length, folded - 1, "folded slips");
    holds((await person.text("#slip-s1, .slip:has(.chip)")).includes("C1-balance.csv"), "the slip is unfolded");
    const over = await person.page.evaluate(() => document.scrollingElement.scrollWidth - innerWidth);
    holds(over <= 0, `${over} pixels too wide`);
  });

  await on("memo, stations, study, SVG and PNG are saved; the study opens again", file, async (person) => {
    await person.click("Save the memo");
    const memo = await person.saved("memo.html");
    const text = memo.bytes.toString();
    holds(text.includes("<svg") && text.includes("drag coefficient"), "the memo lacks its figures or its words");
    await person.click("the stations");
    holds((await person.saved("stations.csv")).bytes.toString().includes("drag coefficient"), "the table of stations");
    await person.click("save SVG");
    holds((await person.saved(".svg")).bytes.toString().startsWith("<svg"), "the SVG");
    await person.click("save PNG");
    same([...(await person.saved(".png")).bytes.subarray(1, 4)], [...Buffer.from("PNG")], "the PNG");

    await person.goTo("k of the statement");
    await person.fill("3");
    const sentence = await person.sentence();
    holds((await person.text(".work")).includes("(it has changes)"), "changes are told");
    await person.click("Save the study");
    holds(!(await person.text(".work")).includes("(it has changes)"), "changes are told after saving");
    const study = await person.saved("study.json");
    await person.click("a new one");
    holds((await person.sentence()).includes("no file has been given"), await person.sentence());
    await person.letFall([["again.study.json", study.bytes.toString()]]);
    await person.until(() => document.getElementById("sentence").textContent.includes("drag coefficient"));
    same(await person.sentence(), sentence, "sentence of the opened study");
  });

  await on("the memo is printed from a frame of its own", file, async (person) => {
    await person.press("p");
    await person.page.waitForSelector("#memo");
    const frame = await (await person.page.$("#memo")).contentFrame();
    await frame.waitForSelector("svg");
    await person.until(() => window.printed > 0);
    holds((await frame.evaluate(() => document.body.innerText)).includes("drag coefficient"), "the memo");
  }, {
    prepare: () => {
      // No printer here: the call is counted, in the frame of the memo too.
      window.print = () => {
        window.top.printed = (window.top.printed ?? 0) + 1;
      };
    },
  });

  await on("find leads to a station", file, async (person) => {
    await person.press("/");
    await person.type("balance");
    await person.until(() => document.querySelectorAll(".hits li").length > 0);
    await person.press("Enter");
    await pause(100);
    holds((await person.focused()).includes("looks like"), `focus: ${await person.focused()}`);
  });

  await on("letter keys can be switched off; keys and help are told", file, async (person) => {
    await person.press("?");
    holds((await person.text("dialog")).includes("next open point"), await person.text("dialog"));
    await person.press("Escape");
    await person.page.waitForFunction(() => document.querySelector("dialog") === null);
    await person.press("t");
    holds((await person.page.$$(".picture")).length === 0, "t shows tables");
    await person.press("t");
    await person.click("on", ".work");
    await person.press("t");
    holds((await person.page.$$(".picture")).length > 0, "t does nothing when letters are off");
  });
}
