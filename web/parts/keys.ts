// The keys of the page. Single letters can be switched off.

import { cells, nextCell, type Desk } from "./desk";
import { inField } from "./intake";
import { focusOn, jump, openCourse } from "./jump";
import { printMemo } from "./memo";
import { liftVeil } from "./veil";

interface Key {
  shown: string;
  does: string;
}

/** The keys as the page tells of them. */
export const keys: Key[] = [
  { shown: "n", does: "next open point" },
  { shown: "1 – 5", does: "to a course" },
  { shown: "arrows", does: "on the board from cell to cell, Enter selects; on a picture from station to station, with Shift five at a time" },
  { shown: ". ,", does: "next and previous cell with doubts" },
  { shown: "x", does: "exclude the station that the cursor of a picture is at, with a reason" },
  { shown: "w", does: "why: from the number that has the focus, or from E at the cursor of a picture, back to formula, file and row; again goes deeper" },
  { shown: "k", does: "to the coverage factor of the statement" },
  { shown: "v", does: "lift the veil: use all stations, requirement not set" },
  { shown: "t", does: "tables instead of pictures" },
  { shown: "m", does: "monochrome" },
  { shown: "/", does: "find a number, a station or a file" },
  { shown: "p", does: "print the memo" },
  { shown: "Ctrl+Z", does: "undo; Ctrl+Shift+Z or Ctrl+Y redoes" },
  { shown: "?", does: "these keys" },
  { shown: "Esc", does: "back to the sentence" },
];

/** Goes to the next open point. */
export async function goNext(desk: Desk): Promise<void> {
  const open = await desk.next();
  if (open !== undefined) {
    jump(desk, open.target, open.course);
  }
}

async function goCell(desk: Desk, step: number): Promise<void> {
  const cell = desk.view && nextCell(desk.view, step);
  if (cell !== undefined) {
    await desk.ask({ kind: "select", cell });
    document.querySelector<HTMLElement>(`[data-cell="${cell}"]`)?.focus();
  }
}

/** Walks back from the number that has the focus, else from the first of the sentence. */
async function walkFromFocus(desk: Desk): Promise<void> {
  const near = document.activeElement?.closest<HTMLElement>("[data-path]") ?? document.querySelector<HTMLElement>("#sentence [data-path]");
  if (near !== null) {
    await desk.walk(near.dataset["path"]!);
  } else {
    desk.tell("No number of the sentence can be walked back yet.");
  }
}

function goCourse(desk: Desk, course: number): void {
  openCourse(desk, course);
  requestAnimationFrame(() => {
    const heading = document.getElementById(`course-${course + 1}`);
    heading?.scrollIntoView({ block: "start" });
    heading?.focus({ preventScroll: true });
  });
}

/** Listens to the keys of the page. */
export function listenToKeys(desk: Desk): void {
  addEventListener("keydown", (event) => {
    if (event.defaultPrevented || document.querySelector("dialog[open]") !== null || inField(event.target)) {
      return;
    }
    const act = event.ctrlKey || event.metaKey ? withControl(desk, event) : event.altKey ? undefined : alone(desk, event.key);
    if (act !== undefined) {
      event.preventDefault();
      act();
    }
  });
}

function withControl(desk: Desk, event: KeyboardEvent): (() => void) | undefined {
  const key = event.key.toLowerCase();
  if (key === "z" || key === "y") {
    const kind = key === "y" || event.shiftKey ? "redo" : "undo";
    const what = kind === "redo" ? desk.view?.redo : desk.view?.undo;
    return () => void (what !== undefined && what !== "" && desk.change({ kind }));
  }
  return undefined;
}

function alone(desk: Desk, key: string): (() => void) | undefined {
  if (key === "Escape") {
    return () => focusOn(document.getElementById("sentence"));
  }
  if (!desk.layout.letters || desk.view === undefined) {
    return undefined;
  }
  const view = desk.view;
  switch (key) {
    case "n":
      return () => void goNext(desk);
    case "1":
    case "2":
    case "3":
    case "4":
    case "5":
      return () => goCourse(desk, Number(key) - 1);
    case ".":
      return () => void goCell(desk, 1);
    case ",":
      return () => void goCell(desk, -1);
    case "w":
      return () => void walkFromFocus(desk);
    case "k":
      return cells(view).length === 0 ? undefined : () => jump(desk, { ...view.reveal, field: "choices.k" });
    case "v":
      return view.veiled ? () => void liftVeil(desk, view) : undefined;
    case "t":
      return () => desk.lay({ tables: !desk.layout.tables });
    case "m":
      return () => void desk.show({ mono: !desk.layout.mono });
    case "/":
      return () => desk.lay({ sheet: "find" });
    case "p":
      return () => void printMemo(desk);
    case "?":
      return () => desk.lay({ sheet: "keys" });
  }
  return undefined;
}
