// The page at several widths and in both lights.

import { holds, same } from "./harness.mjs";

/** Widths, targets and contrast. */
export async function onLook(on, file) {
  for (const [width, height] of [[1440, 900], [1000, 800], [400, 800], [320, 640]]) {
    await on(`nothing hangs over at ${width} pixels`, file, async (person) => {
      const over = await person.page.evaluate(() => document.scrollingElement.scrollWidth - innerWidth);
      holds(over <= 0, `${over} pixels too wide`);
      const sticky = await person.page.evaluate(() => {
        scrollTo(0, 1200);
        return new Promise((resolve) =>
          setTimeout(() => resolve([...document.querySelectorAll("body *")].filter((one) => one.checkVisibility() && ["fixed", "sticky"].includes(getComputedStyle(one).position)).map((one) => one.className)), 200),
        );
      });
      same(sticky, width < 700 ? [] : width < 1000 ? ["pinned"] : ["pinned", "drawer-inside"], "what stays in place");
    }, { width, height });
  }

  await on("one course at a time on a narrow page, the board in a drawer", file, async (person) => {
    await person.press("2");
    same(await person.page.$$eval(".course:not(.folded)", (all) => all.length), 1, "open courses");
    await person.press("5");
    same(await person.page.$$eval(".course:not(.folded) h2", (all) => all.map((one) => one.innerText)), ["What can be said?"], "open courses");
    holds(!(await person.page.$eval(".board", (board) => board.checkVisibility())), "the board is away");
    await person.click("Tally board and the study");
    holds(await person.page.$eval(".board", (board) => board.checkVisibility()), "the board is there");
  }, { width: 400, height: 800 });

  await on("buttons are large enough to hit, and words are dark enough to read, in both lights", file, async (person) => {
    for (const light of ["light", "dark"]) {
      await person.click(light, ".work");
      const small = await person.page.evaluate(() =>
        [...document.querySelectorAll("button, summary, input, select")]
          .filter((one) => one.checkVisibility() && !one.closest("[hidden]"))
          .map((one) => [one.innerText || one.id, one.getBoundingClientRect()])
          .filter(([, box]) => box.width > 0 && (box.height < 24 || box.width < 12))
          .map(([text, box]) => `${text}: ${Math.round(box.width)} × ${Math.round(box.height)}`),
      );
      same(small, [], "small targets");
      const pale = await person.page.evaluate(() => {
        const channel = (v) => (v / 255 <= 0.03928 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4);
        const parts = (colour) => colour.match(/[\d.]+/g).map(Number);
        const light = (colour) => {
          const [r, g, b] = parts(colour);
          return 0.2126 * channel(r) + 0.7152 * channel(g) + 0.0722 * channel(b);
        };
        const behind = (one) => {
          for (let at = one; at !== null; at = at.parentElement) {
            const colour = getComputedStyle(at).backgroundColor;
            if ((parts(colour)[3] ?? 1) === 1) {
              return colour;
            }
          }
          return "rgb(255, 255, 255)";
        };
        const found = new Set();
        for (const one of document.querySelectorAll("body *")) {
          const own = [...one.childNodes].some((node) => node.nodeType === 3 && node.data.trim() !== "");
          if (!own || !one.checkVisibility() || one.closest("script, svg, .working, :disabled") !== null) {
            continue;
          }
          const [a, b] = [light(getComputedStyle(one).color), light(behind(one))].sort((x, y) => y - x);
          const ratio = (a + 0.05) / (b + 0.05);
          if (ratio < 4.5) {
            found.add(`${one.className || one.tagName} ${ratio.toFixed(2)}`);
          }
        }
        return [...found];
      });
      same(pale, [], `pale words, ${light}`);
    }
  });
}
