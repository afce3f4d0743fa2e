// How files come onto the page: dropped anywhere, chosen, a folder, pasted, or
// typed. They all end in one request.

import type { Attached } from "../engine/exchange";
import type { Desk } from "./desk";

interface Found {
  name: string;
  bytes: Attached;
}

/** Files above this size go to the core as they are, so that the page never holds their bytes. */
const large = 1 << 22;

/** A study document says so in its first field. */
const study = /^\s*\{\s*"format":\s*"weirmark study"/;

/** Takes files onto the desk; a single study document is opened. */
export async function take(desk: Desk, files: File[]): Promise<void> {
  const found: Found[] = [];
  const failed: string[] = [];
  for (const file of files) {
    try {
      await file.slice(0, 1).arrayBuffer(); // fails for what is no file
      found.push({ name: file.name, bytes: file.size > large ? file : new Uint8Array(await file.arrayBuffer()) });
    } catch {
      failed.push(file.name);
    }
  }
  const [first] = found;
  if (found.length === 1 && study.test(await new Blob([first!.bytes]).slice(0, 200).text())) {
    if (mayLeave(desk)) {
      await desk.open(first!.name, first!.bytes);
    }
  } else if (found.length > 0) {
    await desk.drop(
      found.map((one) => one.name),
      found.map((one) => one.bytes),
    );
    showTray();
  }
  if (failed.length > 0) {
    desk.tell(`The browser could not read ${failed.join(", ")}. If it is a folder, choose it with “a folder” instead.`);
  }
}

/** Asks before work is left that no file holds. */
export function mayLeave(desk: Desk): boolean {
  return !desk.unsaved || confirm("This study has changes that were not saved. Leave them?");
}

function showTray(): void {
  const chips = document.querySelectorAll<HTMLElement>(".tray [data-open]");
  const element = chips[0] ?? document.getElementById("tray-name");
  element?.scrollIntoView({ block: "center" });
  element?.focus({ preventScroll: true });
}

/** Listens to what is dropped on the page or pasted into it. */
export function listen(desk: Desk): void {
  const over = (on: boolean) => document.documentElement.toggleAttribute("data-over", on);
  addEventListener("dragover", (event) => {
    event.preventDefault();
    over(true);
  });
  addEventListener("dragleave", (event) => {
    if (event.relatedTarget === null) {
      over(false);
    }
  });
  addEventListener("drop", (event) => {
    event.preventDefault();
    over(false);
    void dropped(event.dataTransfer).then((files) => (files.length > 0 ? take(desk, files) : undefined));
  });
  let pasted = 0;
  addEventListener("paste", (event) => {
    if (inField(event.target)) {
      return;
    }
    const files = Array.from(event.clipboardData?.files ?? []);
    const text = event.clipboardData?.getData("text/plain") ?? "";
    if (files.length > 0) {
      event.preventDefault();
      void take(desk, files);
    } else if (text.trim() !== "") {
      event.preventDefault();
      void take(desk, [new File([text], `pasted-${++pasted}.txt`)]);
    }
  });
}

export function inField(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.matches("input, textarea, select, [contenteditable]");
}

/** The files of a drop, those in its folders too where the browser gives them. */
async function dropped(data: DataTransfer | null): Promise<File[]> {
  const items = Array.from(data?.items ?? []).filter((item) => item.kind === "file");
  const entries = items.map((item) => item.webkitGetAsEntry());
  if (!entries.some((entry) => entry?.isDirectory === true)) {
    return Array.from(data?.files ?? []);
  }
  const lists = await Promise.all(entries.map((entry) => (entry === null ? [] : walk(entry))));
  return lists.flat();
}

async function walk(entry: FileSystemEntry): Promise<File[]> {
  if (entry.isFile) {
    return [await new Promise<File>((resolve, reject) => (entry as FileSystemFileEntry).file(resolve, reject))];
  }
  const reader = (entry as FileSystemDirectoryEntry).createReader();
  const found: File[] = [];
  for (;;) {
    // A reader gives a part at a time, and at last nothing.
    const part = await new Promise<FileSystemEntry[]>((resolve, reject) => reader.readEntries(resolve, reject));
    if (part.length === 0) {
      return found;
    }
    for (const one of part) {
      found.push(...(await walk(one)));
    }
  }
}
