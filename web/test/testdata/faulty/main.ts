// A page for tests of the engine: it shows nothing and hands the engine out.

import { Engine } from "../../../engine/engine";
import { fromBase64 } from "../../../engine/source";

const changes: string[] = [];
const engine = new Engine({ reopen: (study) => ({ request: { kind: "open" }, files: [study] }) });
engine.watch(({ state, message }) => {
  changes.push(message === "" ? state : `${state}: ${message}`);
  document.documentElement.dataset["state"] = state;
});

Object.assign(window, { engine, changes, fromBase64 });
