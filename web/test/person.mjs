// A person at the page: what a test does and sees goes through the keys, the
// mouse and the words on the screen.

import { existsSync } from "node:fs";
import { mkdtemp, readdir, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";

import { openPage, untilReady } from "./browser.mjs";
import { holds, root, same } from "./harness.mjs";

export const pause = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

/** The folder of the shared files above the repository, or undefined. */
export function sharedFolder() {
  if (process.env.WEIRMARK_SHARED) {
    return process.env.WEIRMARK_SHARED;
  }
  for (let folder = path.resolve(root); ; folder = path.dirname(folder)) {
    if (existsSync(path.join(folder, "shared", "nasa-tmr"))) {
      return path.join(folder, "shared");
    }
    if (folder === path.dirname(folder)) {
      return undefined;
    }
  }
}

/** The log of the study, folded away or not. */
export function log(person) {
  return person.page.$eval(".log", (one) => one.textContent);
}

export class Person {
  /** Opens the page at the address; prepare runs in it before its own scripts. */
  static async at(browser, address, { prepare, width = 1440, height = 900 } = {}) {
    const person = new Person();
    person.downloads = await mkdtemp(path.join(tmpdir(), "weirmark-saved-"));
    const { page, said, close } = await openPage(browser, { downloadBehavior: { policy: "allow", downloadPath: person.downloads } });
    person.page = page;
    person.said = said;
    person.dialogs = [];
    page.on("dialog", (dialog) => {
      person.dialogs.push(dialog.type());
      void dialog.accept();
    });
    person.leave = async () => {
      await close();
      await rm(person.downloads, { recursive: true, force: true });
    };
    if (prepare !== undefined) {
      await page.evaluateOnNewDocument(prepare);
    }
    await page.setViewport({ width, height });
    await page.goto(address);
    await untilReady(page);
    return person;
  }

  /** Waits until the core is at rest and the page has drawn what it said. */
  async settle() {
    await untilReady(this.page);
    await this.page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(() => resolve()))));
    await untilReady(this.page);
  }

  /** Waits until the expression holds on the page. */
  async until(condition, ...parameters) {
    await this.page.waitForFunction(condition, { timeout: 15_000, polling: 20 }, ...parameters);
    await this.settle();
  }

  async press(...keys) {
    for (const key of keys) {
      await this.page.keyboard.press(key);
      await this.settle();
    }
  }

  async type(text) {
    await this.page.keyboard.type(text);
  }

  /** Clicks the one visible thing of a kind whose words begin with the text. */
  async click(text, within = "body", kinds = "button, [role=button], summary") {
    const handle = await this.page.evaluateHandle(
      (text, within, kinds) => {
        const plain = (element) => element.innerText.replace(/\s+/g, " ").trim();
        return [...document.querySelectorAll(within)]
          .flatMap((part) => [...part.querySelectorAll(kinds)])
          .find((element) => element.checkVisibility() && plain(element).startsWith(text)) ?? null;
      },
      text,
      within,
      kinds,
    );
    const element = handle.asElement();
    holds(element !== null, `there is no “${text}” to click in ${within}`);
    await element.evaluate((one) => one.scrollIntoView({ block: "center" }));
    await element.click();
    await this.settle();
  }

  /** Chooses files as by the browser's own dialog. */
  async choose(files, field = "#files") {
    const before = await this.slips();
    const input = await this.page.$(field);
    await input.uploadFile(...files);
    await this.until((before) => document.documentElement.dataset.state === "ready" && document.querySelectorAll(".slip").length !== before, before);
  }

  /** Drops files on the page and waits until they are in the study. */
  async drop(files) {
    await this.letFall(files);
    await this.until(() => document.documentElement.dataset.state === "ready" && document.querySelector(".message") !== null);
  }

  /** Drops files made of names and texts on the page. */
  letFall(files) {
    return this.page.evaluate((files) => {
      const data = new DataTransfer();
      for (const [name, text] of files) {
        data.items.add(new File([text], name));
      }
      document.body.dispatchEvent(new DragEvent("drop", { dataTransfer: data, bubbles: true, cancelable: true }));
    }, files);
  }

  slips() {
    return this.page.evaluate(() => document.querySelectorAll(".slip").length);
  }

  text(selector) {
    return this.page.evaluate(
      (selector) =>
        [...document.querySelectorAll(selector)].map((element) => element.innerText.replace(/[\s\u00a0]+/g, " ").trim()).join(" | "),
      selector,
    );
  }

  /** The sentence as one reads it; what is for ears only is left out. */
  sentence() {
    return this.page.evaluate(() => {
      const copy = document.getElementById("sentence").cloneNode(true);
      for (const spoken of copy.querySelectorAll(".spoken")) {
        spoken.remove();
      }
      return copy.textContent.replace(/[\s\u00a0]+/g, " ").trim();
    });
  }

  /** What has the focus, as a screen reader names it. */
  focused() {
    return this.page.evaluate(() => {
      const element = document.activeElement;
      return element.getAttribute("aria-label") ?? element.innerText ?? element.tagName;
    });
  }

  /** Enters a value on the chip that has the focus, by keyboard. */
  async fill(value) {
    const key = (await this.focused()).includes("guessed") ? "F2" : "Enter";
    await this.page.keyboard.press(key);
    await this.page.waitForSelector("[data-editor]");
    const select = await this.page.evaluate(() => document.activeElement.tagName === "SELECT");
    if (select) {
      await this.choosePlace(value);
    } else {
      // What the field held is selected when it opens.
      await this.page.keyboard.type(value);
    }
    await this.page.keyboard.press("Enter");
    await this.page.waitForFunction(() => document.querySelector("[data-editor]") === null);
    await this.settle();
  }

  /** Goes by arrows to the option whose label begins with the text. */
  async choosePlace(label) {
    const steps = await this.page.evaluate((label) => {
      const select = document.activeElement;
      return [...select.options].findIndex((option) => option.label.startsWith(label)) - select.selectedIndex;
    }, label);
    for (let i = 0; i < Math.abs(steps); i++) {
      await this.page.keyboard.press(steps > 0 ? "ArrowDown" : "ArrowUp");
    }
    const chosen = await this.page.evaluate(() => document.activeElement.selectedOptions[0].label);
    holds(chosen.startsWith(label), `the choice is ${chosen}, not ${label}`);
  }

  /** Puts the focus on the chip of a slip or question by its label, unfolding what hides it. */
  async goTo(label, within = "body") {
    for (let unfolded = false; ; unfolded = true) {
      const found = await this.page.evaluate(
        (label, within) => {
          const chip = [...document.querySelectorAll(`${within} .chip`)].find((one) => one.getAttribute("aria-label").startsWith(label + " "));
          chip?.closest("details:not([open])")?.querySelector("summary").click();
          chip?.scrollIntoView({ block: "center" });
          chip?.focus();
          return chip !== undefined;
        },
        label,
        within,
      );
      if (found) {
        return;
      }
      holds(!unfolded, `there is no chip “${label}” in ${within}`);
      await this.page.evaluate((within) => document.querySelectorAll(`${within} .aside[aria-expanded=false]`).forEach((one) => one.click()), within);
      await this.settle();
    }
  }

  /** Opens the chip of that label by mouse: once more where a picture that was drawn meanwhile moved it away. */
  async open(label, within) {
    for (let i = 0; ; i++) {
      await this.goTo(label, within);
      const chip = await this.page.evaluateHandle(() => document.activeElement);
      await chip.asElement().click();
      try {
        await this.page.waitForSelector("[data-editor]", { timeout: 2_000 });
        return;
      } catch (error) {
        if (i === 4) {
          throw error;
        }
      }
    }
  }

  /** Enters a value on the chip of that label by mouse. */
  async correct(label, value, within = "body") {
    await this.open(label, within);
    if (await this.page.evaluate(() => document.activeElement.tagName === "SELECT")) {
      await this.choosePlace(value);
    } else {
      await this.page.evaluate(() => document.activeElement.select());
      await this.page.keyboard.type(value);
    }
    await this.page.keyboard.press("Enter");
    await this.page.waitForFunction(() => document.querySelector("[data-editor]") === null);
    await this.settle();
  }

  /** Accepts every guess of the tray one by one, filling the gaps from answers by label. */
  async acceptAll(answers, by = "keys") {
    const asked = [];
    await this.page.evaluate(() => document.querySelector(".tray [data-open]")?.focus());
    for (let i = 0; i < 400; i++) {
      const label = await this.page.evaluate(() => document.querySelector(".tray [data-open]")?.getAttribute("aria-label") ?? "");
      if (label === "") {
        return asked;
      }
      await this.page.evaluate(() => document.querySelector(".tray [data-open]").focus());
      asked.push(label);
      if (label.includes("guessed")) {
        if (by === "keys") {
          await this.press("Enter");
        } else {
          const accept = await this.page.evaluateHandle(() => document.querySelector(".tray [data-open]").parentElement.querySelector(".accept"));
          await accept.asElement().click();
          await this.settle();
        }
        continue;
      }
      const answer = Object.entries(answers).find(([known]) => label.startsWith(known));
      holds(answer !== undefined, `nothing is prepared for “${label}”`);
      await this.fill(answer[1]);
    }
    throw new Error("the tray does not come to an end");
  }

  /** The next file that the browser has saved. */
  async saved(ending) {
    for (let i = 0; i < 100; i++) {
      const name = (await readdir(this.downloads)).find((one) => one.endsWith(ending));
      if (name !== undefined) {
        const bytes = await readFile(path.join(this.downloads, name));
        if (bytes.length > 0) {
          await rm(path.join(this.downloads, name));
          return { name, bytes };
        }
      }
      await pause(50);
    }
    throw new Error(`no file *${ending} was saved`);
  }

  /** Nothing was said to the console. */
  quiet() {
    same(this.said, [], "console");
  }
}
