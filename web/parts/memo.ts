// The memo: the core writes it, the page draws its figures.

import { list, type Desk } from "./desk";
import { drawn } from "./figure";
import { saveAs } from "./outlet";

interface Written {
  name: string;
  bytes: Uint8Array<ArrayBuffer>;
}

/** Asks for the memo with its figures drawn; always light, as on paper. */
async function write(desk: Desk): Promise<Written | undefined> {
  const results = (await desk.ask({ kind: "results", theme: "light" }))?.reply.results;
  if (results === undefined) {
    return undefined;
  }
  const drawings: Record<string, string> = {};
  for (const { figure } of list(results.figures)) {
    drawings[figure.id] = drawn(figure, figure.width, figure.id);
  }
  return written(await desk.ask({ kind: "memo", theme: "light", drawings }));
}

function written(answer: Awaited<ReturnType<Desk["ask"]>>): Written | undefined {
  const name = answer?.reply.files?.[0];
  const bytes = answer?.files[0];
  return name === undefined || bytes === undefined ? undefined : { name, bytes };
}

export async function saveMemo(desk: Desk): Promise<void> {
  const memo = await write(desk);
  if (memo !== undefined) {
    saveAs(memo.name, "text/html", memo.bytes);
    desk.tell(`The memo is saved as ${memo.name}.`);
  }
}

/** Prints the memo from a frame of its own, so that it looks as it does when saved. */
export async function printMemo(desk: Desk): Promise<void> {
  const memo = await write(desk);
  if (memo === undefined) {
    return;
  }
  document.getElementById("memo")?.remove();
  const frame = document.createElement("iframe");
  frame.id = "memo";
  frame.title = "The memo, to be printed";
  frame.srcdoc = new TextDecoder().decode(memo.bytes);
  frame.onload = () => frame.contentWindow?.print();
  document.body.append(frame);
}

export async function saveStations(desk: Desk): Promise<void> {
  const table = written(await desk.ask({ kind: "stations" }));
  if (table !== undefined) {
    saveAs(table.name, "text/csv", table.bytes);
    desk.tell(`The stations are saved as ${table.name}.`);
  }
}

export async function saveStudy(desk: Desk): Promise<void> {
  const study = await desk.save();
  if (study !== undefined) {
    saveAs(study.name, "application/json", study.bytes);
    desk.tell(`The study is saved as ${study.name}.`);
  }
}
