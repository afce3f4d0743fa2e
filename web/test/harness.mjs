// What every test here uses: named checks, one count at the end.

import { spawn } from "node:child_process";
import { createServer } from "node:http";
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import { fileURLToPath } from "node:url";

export const root = fileURLToPath(new URL("../..", import.meta.url));

const tally = { passed: 0, failed: [], skipped: [] };

/** Runs one check; what it throws is its failure. */
export async function check(name, run) {
  const start = performance.now();
  try {
    const said = await run();
    tally.passed++;
    console.log(`pass ${name} (${Math.round(performance.now() - start)} ms)${said ? `: ${said}` : ""}`);
  } catch (cause) {
    tally.failed.push(name);
    console.log(`FAIL ${name}: ${cause?.stack ?? cause}`);
  }
}

/** Notes a check that cannot be made here; with CI=true it fails the run. */
export function skip(name, reason) {
  tally.skipped.push(name);
  console.log(`not run: ${name}: ${reason}`);
}

/** Prints the count as the last line and returns the exit status. */
export function close() {
  const { passed, failed, skipped } = tally;
  for (const name of failed) {
    console.log(`failed: ${name}`);
  }
  console.log(`${passed} passed, ${failed.length} failed${skipped.length > 0 ? `, ${skipped.length} skipped` : ""}`);
  const strict = process.env.CI === "true" && skipped.length > 0;
  return passed === 0 || failed.length > 0 || strict ? 1 : 0;
}

/** Fails unless the two are the same when written as JSON. */
export function same(have, want, what) {
  const [left, right] = [JSON.stringify(have), JSON.stringify(want)];
  if (left !== right) {
    throw new Error(`${what}: got ${left}, want ${right}`);
  }
}

/** Fails with the message unless the condition holds. */
export function holds(condition, message) {
  if (!condition) {
    throw new Error(message);
  }
}

/** Runs a program in the root of the repository and fails where it fails. */
export function run(program, ...parameters) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, parameters, { cwd: root, stdio: ["ignore", "inherit", "inherit"] });
    child.on("error", reject);
    child.on("exit", (status) =>
      status === 0 ? resolve() : reject(new Error(`${program} ${parameters.join(" ")} ended with ${status}`)),
    );
  });
}

/** A port that nothing listens to. */
export function freePort() {
  return new Promise((resolve) => {
    const server = createServer().listen(0, "127.0.0.1", () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

/** The record of messages, files and lines in order, each exchange with its bytes decoded. */
export async function record() {
  const folder = path.join(root, "testdata", "messages");
  const names = (await readdir(folder)).filter((name) => name.endsWith(".jsonl")).sort();
  const exchanges = [];
  for (const name of names) {
    const text = await readFile(path.join(folder, name), "utf8");
    for (const line of text.trimEnd().split("\n")) {
      const exchange = JSON.parse(line);
      exchanges.push({ ...exchange, attached: decode(exchange.attached), files: decode(exchange.files) });
    }
  }
  holds(exchanges.length > 0, "no message is recorded");
  return exchanges;
}

function decode(list) {
  return (list ?? []).map((text) => new Uint8Array(Buffer.from(text, "base64")));
}

/** Fails unless the answer of a host is the recorded one, byte for byte. */
export function matches(exchange, reply, files) {
  same(reply, exchange.reply, "reply");
  same(files.map(base64), exchange.files.map(base64), "files");
}

export function base64(bytes) {
  return Buffer.from(bytes).toString("base64");
}
