// The record of messages played through the page's own worker and core, on Node.

import { readFile, readdir } from "node:fs/promises";
import path from "node:path";
import { Worker } from "node:worker_threads";

import { check, holds, matches, record } from "./harness.mjs";

// What the worker's program finds in a browser: its messages.
const prelude = `
  const { parentPort } = require("node:worker_threads");
  globalThis.postMessage = (message, transfer) => parentPort.postMessage(message, transfer);
  parentPort.on("message", (data) => globalThis.onmessage({ data }));
`;

/** Opens a core in a worker; ask gives one request and resolves with the answer. */
async function open(source, module) {
  const worker = new Worker(prelude + source, { eval: true });
  const waiting = [];
  const next = () =>
    new Promise((resolve, reject) => {
      waiting.push({ resolve, reject });
    });
  worker.on("message", (message) => {
    const { resolve, reject } = waiting.shift();
    message.is === "ended" ? reject(new Error(message.detail)) : resolve(message);
  });
  worker.on("error", (cause) => waiting.shift()?.reject(cause));

  await next();
  worker.postMessage({ module });
  await next();
  return {
    ask(request, attached) {
      worker.postMessage({ number: 1, request: new TextEncoder().encode(request), attached });
      return next();
    },
    close: () => worker.terminate(),
  };
}

export async function messages(site) {
  const names = await readdir(site);
  const index = await readFile(path.join(site, "index.html"), "utf8");
  const source = /<script type="text\/plain" id="worker">(.*?)<\/script>/s.exec(index)?.[1];
  holds(source, "the page has no worker");
  const module = await WebAssembly.compile(await readFile(path.join(site, names.find((name) => name.endsWith(".wasm")))));

  let core;
  for (const exchange of await record()) {
    if (!exchange.continues) {
      await core?.close();
      core = await open(source, module);
    }
    await check(`worker: ${exchange.name}`, async () => {
      const { reply, files } = await core.ask(exchange.request, exchange.attached);
      matches(exchange, new TextDecoder().decode(reply), files);
    });
  }
  await core?.close();
}
