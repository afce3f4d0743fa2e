// The way from a blank, a number or an open point to the place that answers it.

import type { EntryList, Target } from "../engine/types";
import { idle, list, narrow, type Desk } from "./desk";

/** The name of the place of an entry, in data-place. */
export function placeOf(target: Target): string {
  return `${target.kind}|${target.id}|${target.field}`;
}

/** The course where a result of the core stands, by its field. */
const courseOfResult: Record<string, number> = { stations: 2, uncertainty: 2, agreement: 3, joint: 3, adequacy: 4, fragility: 4 };

/** The list of entries that holds a target, or what begins with it. */
function listOf(desk: Desk, target: Target): EntryList | undefined {
  const holds = (one: Target) => one.kind === target.kind && one.id === target.id && (one.field === target.field || one.field.startsWith(target.field + "."));
  return list(desk.view?.lists).find((one) => list(one.items).some((item) => list(item.entries).some((entry) => holds(entry.target))));
}

/** The course of what a question lacks that is no entry; the third where it is not named. */
const courseOfLack: Record<string, number> = { settled: 0, numerical: 1 };

/** Shows the place of a target and puts the focus there; at is the course of the open point it belongs to. */
export function jump(desk: Desk, target: Target, at?: number): void {
  const within = listOf(desk, target);
  const course = within?.course ?? courseOf(desk, target) ?? (target.kind === "answer" ? at : undefined);
  if (course !== undefined) {
    openCourse(desk, course);
  }
  if (within !== undefined && idle(within)) {
    desk.layAside(within.course, true);
  }
  if (target.kind === "slip") {
    unfold(desk, target.id);
  }
  // What was opened is on the page after the next frame.
  requestAnimationFrame(() => requestAnimationFrame(() => focusOn(find(target, course))));
}

/** Keeps a slip unfolded. */
export function unfold(desk: Desk, slip: string): void {
  if (!desk.layout.slips.includes(slip)) {
    desk.lay({ slips: [...desk.layout.slips, slip] });
  }
}

/** Opens a course; on a narrow page it is then the only open one. */
export function openCourse(desk: Desk, course: number): void {
  const alone = narrow();
  desk.lay({ open: desk.layout.open.map((open, i) => i === course || (open && !alone)) });
}

function courseOf(desk: Desk, target: Target): number | undefined {
  switch (target.kind) {
    case "result":
      return courseOfResult[target.field] ?? 3;
    case "question":
      return courseOfLack[target.field] ?? 2;
    case "source":
      return courseOfSource(desk, target);
    case "course":
      return Number(target.field);
  }
  return undefined;
}

/** Numerical sources stand in the second course, the others in the third. */
function courseOfSource(desk: Desk, target: Target): number {
  const [at] = target.field.split(".");
  const line = list(desk.view?.sources).find((source) => source.target.field === at);
  return target.field === "numerical" || line?.of === "numerical" ? 1 : 2;
}

function find(target: Target, course: number | undefined): HTMLElement | null {
  const wanted = placeOf(target);
  const places = Array.from(document.querySelectorAll<HTMLElement>("[data-place]"));
  const exact = places.find((place) => place.dataset["place"] === wanted);
  const within = exact ?? places.find((place) => place.dataset["place"]!.startsWith(wanted + "."));
  if (within !== undefined) {
    return within;
  }
  const slip = target.kind === "slip" ? document.querySelector<HTMLElement>(`#slip-${target.id} .chip`) : null;
  if (slip !== null) {
    return slip;
  }
  if (target.kind === "slip" || target.field === "reference" || target.field === "simulation") {
    return document.querySelector<HTMLElement>(".tray [data-open]") ?? document.querySelector<HTMLElement>(".tray h2");
  }
  return course === undefined ? null : document.getElementById(`course-${course + 1}`);
}

/** Brings an element into sight and gives it the focus. */
export function focusOn(element: HTMLElement | null): void {
  if (element === null) {
    return;
  }
  for (let fold = element.closest("details"); fold !== null; fold = fold.parentElement?.closest("details") ?? null) {
    fold.open = true;
  }
  element.scrollIntoView({ block: "center" });
  element.focus({ preventScroll: true });
}
