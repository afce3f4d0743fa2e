// The desk holds what the page shows: the last view of the core, what is being
// asked, and how the person has laid the page out. The study itself is the
// core's; every change here is a request.

import { Engine, Interrupted } from "../engine/engine";
import type { Attached } from "../engine/exchange";
import type { Entry, EntryList, Open, Reply, Request, Target, View, WalkReply } from "../engine/types";

type Files = Uint8Array<ArrayBuffer>[];

/** A request without what the engine and the desk add to it. */
export type Asked = Omit<Request, "protocol" | "number" | "at">;

/** What lies over the page. */
export type Sheet = "" | "keys" | "help" | "typing" | "find" | "copy" | "walk";

/** How the page is laid out; nothing of it is in the study. */
export interface Layout {
  theme: "auto" | "light" | "dark";
  mono: boolean;
  letters: boolean;
  tables: boolean;
  open: boolean[];
  /** Courses whose unused entries are in sight. */
  aside: boolean[];
  board: boolean;
  /** Slips that stay unfolded although nothing of them is open. */
  slips: string[];
  sheet: Sheet;
}

/** Slices that are empty in Go may come as null. */
export function list<T>(items: T[] | null | undefined): T[] {
  return items ?? [];
}

/** The place in the report of a number of the selected cell. */
export function inCell(view: View, path: string): string {
  return `cells.${Number(view.selected.slice(1)) - 1}.${path}`;
}

/** Whether nobody said anything of a list, and nothing has to be said. */
export function idle(one: EntryList): boolean {
  return !one.main && list(one.items).every((item) => item.remove === null && list(item.entries).every((entry) => entry.aside));
}

/** All entries of the question. */
export function entriesOf(view: View): Entry[] {
  return list(view.lists).flatMap((one) => list(one.items).flatMap((item) => list(item.entries)));
}

/** On a narrow page one course is open at a time. */
export function narrow(): boolean {
  return matchMedia("(max-width: 699px)").matches;
}

/** The time of a line of the log, to the minute; the core has no clock. */
function now(): string {
  return new Date().toISOString().slice(0, 16).replace("T", " ");
}

/** How long the core may be at work before the page offers to stop it. */
const patience = 4000;

/** The size of a file, in bytes, whose reading is told from the start. */
const sizeable = 5e7;

/** How long the study has to rest before a copy of it is kept for a new start. */
const rest = 800;

export class Desk {
  view: View | undefined;
  /** What went wrong or was done by the page itself; stays until the next change. */
  message = "";
  /** Text to be copied by hand where the browser gives no clipboard. */
  byHand = "";
  /** The steps of a walk back from a number, the last one shown. */
  walked: WalkReply[] = [];
  /** The core has been at work for long; the person may stop it. */
  slow = false;
  /** Bytes read of a large file, of all. */
  progress: { done: number; total: number } | undefined;
  layout: Layout = {
    theme: "auto",
    mono: false,
    letters: true,
    tables: false,
    open: narrow() ? [false, false, false, true, false] : [false, true, false, true, true],
    aside: [false, false, false, false, false],
    board: false,
    slips: [],
    sheet: "",
  };

  readonly engine = new Engine({ reopen: (study) => ({ request: { kind: "open", names: ["study"] }, files: [study] }) });
  #changed: () => void;
  #asking = 0;
  #demo = false;
  #lost = false;
  #patience: ReturnType<typeof setTimeout> | undefined;
  #resting: ReturnType<typeof setTimeout> | undefined;
  #visited: Target[] = [];

  constructor(changed: () => void) {
    this.#changed = changed;
    matchMedia("(prefers-color-scheme: dark)").addEventListener("change", () => void this.show({}));
    this.engine.progress = (done, total) => {
      this.progress = { done, total };
      if (total > sizeable) {
        this.slow = true; // it will be: no need to wait and see
      }
      if (this.slow) {
        this.#changed();
      }
    };
    this.engine.watch(({ state, message }) => {
      if (state === "restarted" || state === "stopped") {
        this.tell(message);
      }
      if (state === "stopped") {
        document.documentElement.dataset["state"] = "stopped";
      }
    });
  }

  /** Whether the study holds work that no file holds. */
  get unsaved(): boolean {
    return this.view !== undefined && (this.view.unsaved || this.#lost);
  }

  /** Whether this is the demo as it came. */
  get untouched(): boolean {
    return this.#demo && this.view !== undefined && !this.view.unsaved;
  }

  /** The theme of figures. */
  get theme(): string {
    const { theme, mono } = this.layout;
    const dark = theme === "dark" || (theme === "auto" && matchMedia("(prefers-color-scheme: dark)").matches);
    return mono ? "mono" : dark ? "dark" : "light";
  }

  tell(message: string): void {
    this.message = message;
    this.#changed();
  }

  lay(part: Partial<Layout>): void {
    this.layout = { ...this.layout, ...part };
    this.#changed();
  }

  /** Shows the unused entries of a course, or puts them away. */
  layAside(course: number, shown: boolean): void {
    this.lay({ aside: this.layout.aside.map((one, i) => (i === course ? shown : one)) });
  }

  /** Changes the layout and asks for the figures in the theme that it comes to. */
  async show(part: Partial<Layout>): Promise<void> {
    this.lay(part);
    if (this.view !== undefined) {
      await this.ask({ kind: "view" });
    }
  }

  /** Walks a number one step back and shows it over the page. */
  async walk(path: string): Promise<void> {
    const walk = (await this.ask({ kind: "walk", value: path }))?.reply.walk;
    if (walk !== undefined) {
      this.walked = [...this.walked, walk];
      this.lay({ sheet: "walk" });
    }
  }

  /** Goes one step of the walk back up. */
  walkUp(): void {
    this.walked = this.walked.slice(0, -1);
    this.lay({});
  }

  /** Asks the core; the page is busy until the answer is on it. */
  async ask(asked: Asked, files: Attached[] = []): Promise<{ reply: Reply; files: Files } | undefined> {
    if (this.#asking++ === 0) {
      this.#patience = setTimeout(() => this.#long(true), patience);
    }
    document.documentElement.dataset["state"] = this.view === undefined ? "starting" : "busy";
    try {
      const answer = await this.engine.ask({ ...asked, theme: asked.theme ?? this.theme, at: now() }, files);
      const { view, error } = answer.reply;
      if (view !== undefined) {
        this.view = view;
        this.message = "";
        document.title = (view.title === "" ? "" : view.title + " – ") + "Weirmark";
      }
      if (error !== undefined) {
        this.message = error.text;
      }
      if (view !== undefined || error !== undefined) {
        this.#changed();
      }
      return answer;
    } catch (cause) {
      await this.#interrupted(cause);
      return undefined;
    } finally {
      if (--this.#asking === 0) {
        clearTimeout(this.#patience);
        this.#long(false);
        if (this.engine.change.state !== "stopped") {
          document.documentElement.dataset["state"] = "ready";
        }
      }
    }
  }

  /** Ends what the core is at; it starts again with the study as it was before. */
  stop(): void {
    this.engine.cancel();
  }

  #long(slow: boolean): void {
    if (!slow) {
      this.progress = undefined;
    }
    if (this.slow !== slow) {
      this.slow = slow;
      this.#changed();
    }
  }

  /** Asks for a change of the study and keeps a copy of what it comes to. */
  async change(asked: Asked, files: Attached[] = []): Promise<boolean> {
    const answer = await this.ask(asked, files);
    const done = answer?.reply.view !== undefined;
    if (done) {
      this.#keepSoon();
    }
    return done;
  }

  /** Opens a demo by its name; the empty one is the first that is shown. */
  async demo(value = ""): Promise<void> {
    this.#begin(await this.change({ kind: "demo", value }), true);
  }

  /** Begins an empty study. */
  async blank(): Promise<void> {
    this.#begin(await this.change({ kind: "new" }), false);
  }

  /** Opens a study document. */
  async open(name: string, study: Attached): Promise<void> {
    this.#begin(await this.change({ kind: "open", names: [name] }, [study]), false);
  }

  #begin(done: boolean, demo: boolean): void {
    if (done) {
      this.#demo = demo;
      this.#lost = false;
      this.#visited = [];
      this.#changed();
    }
  }

  /** Takes files into the study; into a new one where the demo is as it came. */
  async drop(names: string[], files: Attached[]): Promise<void> {
    const aside = this.untouched;
    if (aside) {
      await this.ask({ kind: "new" });
      this.#demo = false;
    }
    const before = new Set(list(this.view?.slips).map((slip) => slip.id));
    if (!(await this.change({ kind: "drop", names }, files))) {
      return;
    }
    const added = list(this.view?.slips).filter((slip) => !before.has(slip.id)).length;
    this.tell(
      (aside ? "The demo was put aside: a new study begins with " : "Added: ") +
        (names.length === 1 ? names[0] : `${names.length} files`) +
        (added === 0 ? ". No table could be read; the reason stands with the file." : ". Accept or correct what was read of it."),
    );
  }

  /** The study as a file. */
  async save(): Promise<{ name: string; bytes: Uint8Array<ArrayBuffer> } | undefined> {
    const answer = await this.ask({ kind: "save" });
    const name = answer?.reply.files?.[0];
    const bytes = answer?.files[0];
    if (name === undefined || bytes === undefined) {
      return undefined;
    }
    this.engine.remember(bytes);
    this.#lost = false;
    await this.ask({ kind: "view" });
    return { name, bytes };
  }

  /** The next open point: of the selected cell in turn, then of the next cell. */
  async next(): Promise<Open | undefined> {
    const view = this.view;
    if (view === undefined || view.next === null) {
      return undefined;
    }
    const seen = (open: Open) => this.#visited.some((target) => sameTarget(target, open.target));
    const here = list(view.courses).flatMap((course) => list(course.doubts));
    here.sort((a, b) => Number(b.blocks) - Number(a.blocks));
    let open = here.find((one) => !seen(one));
    if (open === undefined) {
      this.#visited = [];
      const cell = nextCell(view);
      if (cell !== undefined && cell !== view.selected) {
        await this.ask({ kind: "select", cell });
        return this.next();
      }
      open = here[0] ?? view.next.open;
    }
    this.#visited.push(open.target);
    return open;
  }

  /** Keeps a copy for a new start of the core, once nothing has changed for a while. */
  #keepSoon(): void {
    clearTimeout(this.#resting);
    this.#resting = setTimeout(() => {
      this.engine.ask({ kind: "copy" }).then(
        ({ reply, files }) => {
          if (files[0] !== undefined) {
            this.engine.remember(files[0]);
          } else if (reply.error !== undefined) {
            this.tell(reply.error.text);
          }
        },
        () => {},
      );
    }, rest);
  }

  /** Says what was lost and shows the study as the new core has it. */
  async #interrupted(cause: unknown): Promise<void> {
    const message = cause instanceof Interrupted ? cause.message : String(cause);
    if (this.engine.change.state === "stopped") {
      this.tell(message);
      return;
    }
    this.#lost ||= this.view?.unsaved === true;
    const kind = this.engine.study === undefined ? "demo" : "view";
    const answer = await this.engine.ask({ kind, theme: this.theme }).catch(() => undefined);
    if (answer?.reply.view !== undefined) {
      this.view = answer.reply.view;
    }
    this.tell(message);
  }
}

export function sameTarget(a: Target, b: Target): boolean {
  return a.kind === b.kind && a.id === b.id && a.field === b.field;
}

/** The cells of the board in reading order. */
export function cells(view: View): string[] {
  return list(view.board.rows).flatMap((row) => list(row.cells).flatMap((cell) => (cell === null ? [] : [cell.id])));
}

/** The cell after, or before, the selected one that has doubts. */
export function nextCell(view: View, step = 1): string | undefined {
  const all = list(view.board.rows).flatMap((row) => list(row.cells).flatMap((cell) => (cell === null ? [] : [cell])));
  const at = all.findIndex((cell) => cell.id === view.selected);
  for (let i = 1; i <= all.length; i++) {
    const cell = all[(at + step * i + all.length * i) % all.length]!;
    if (cell.courses.some((state) => state !== "settled")) {
      return cell.id;
    }
  }
  return undefined;
}
