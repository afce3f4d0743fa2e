// The edge service on its own runtime: the record of messages, the page, and
// what it refuses. What its handler refuses in detail is tested in Go.

import { spawn } from "node:child_process";
import { createRequire } from "node:module";
import { request as httpRequest } from "node:http";
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";

import { base64, check, freePort, holds, matches, record, root, run, same } from "./harness.mjs";

const message = "/v1/message";
const json = { "Content-Type": "application/json" };

/** Starts the service; call asks it, stop ends it. */
async function start(dist) {
  const port = await freePort();
  await run("go", "run", "./web/build", "edge", "-build", "-dist", dist, "-at", `127.0.0.1:${port}`);
  const program = createRequire(path.join(root, "web/package.json"))("workerd").default;
  const child = spawn(program, ["serve", path.join(dist, "edge/config.capnp")], { stdio: ["ignore", "inherit", "inherit"] });
  const call = (method, at, headers = {}, body) =>
    new Promise((resolve, reject) => {
      const sent = httpRequest({ host: "127.0.0.1", port, method, path: at, headers }, (answer) => {
        const pieces = [];
        answer.on("data", (piece) => pieces.push(piece));
        answer.on("end", () => resolve({ status: answer.statusCode, headers: answer.headers, body: Buffer.concat(pieces) }));
      });
      sent.on("error", reject);
      sent.end(body);
    });
  const until = performance.now() + 20_000;
  for (;;) {
    try {
      await call("HEAD", "/");
      break;
    } catch (cause) {
      if (performance.now() > until || child.exitCode !== null) {
        throw cause;
      }
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }
  return { call, stop: () => new Promise((resolve) => child.once("exit", resolve) && child.kill()) };
}

/** The body of a call, as wasm/edge/door describes it. */
function body({ request, attached }) {
  if (attached.length === 0) {
    return request;
  }
  return `${request.slice(0, -1)},"attached":${JSON.stringify(attached.map(base64))}}`;
}

/** Splits an answer into reply and files. */
function split(text) {
  const found = /^(.*),"attached":(\["[^\]]*"\])\}$/s.exec(text);
  if (found === null) {
    return [text, []];
  }
  return [`${found[1]}}`, JSON.parse(found[2]).map((file) => Buffer.from(file, "base64"))];
}

export async function edge(dist) {
  const service = await start(dist);
  try {
    await messages(service.call);
    await page(service.call, path.join(dist, "site"));
    await refusals(service.call);
  } finally {
    await service.stop();
  }
}

async function messages(call) {
  for (const exchange of await record()) {
    // The service keeps nothing between calls, so it has no session to go on with.
    if (exchange.continues) {
      continue;
    }
    await check(`edge: ${exchange.name}`, async () => {
      const answer = await call("POST", message, json, body(exchange));
      same(answer.status, 200, "status");
      matches(exchange, ...split(answer.body.toString()));
    });
  }
  await check("edge: calls at the same time do not meet", async () => {
    const first = (await record())[0];
    const answers = await Promise.all(Array.from({ length: 8 }, () => call("POST", message, json, body(first))));
    for (const answer of answers) {
      matches(first, ...split(answer.body.toString()));
    }
  });
}

async function page(call, site) {
  for (const name of await readdir(site)) {
    await check(`edge: serves ${name.replace(/\.[0-9a-f]+\./, ".*.")}`, async () => {
      const answer = await call("GET", `/${name}`);
      same(answer.status, 200, "status");
      holds(answer.body.equals(await readFile(path.join(site, name))), "the bytes are not those of the site");
      strict(answer.headers, /^text\/(html|css|javascript); charset=utf-8$|^application\/wasm$/);
      same(answer.headers["cache-control"], name === "index.html" ? "no-store" : "public, max-age=31536000, immutable", "caching");
    });
  }
}

async function refusals(call) {
  const large = `{"a":"${"x".repeat(4 << 20)}"}`;
  for (const [name, status, method, at, headers, content] of [
    ["GET of a message", 405, "GET", message, {}],
    ["OPTIONS of a message", 405, "OPTIONS", message, {}],
    ["a form", 415, "POST", message, { "Content-Type": "text/plain" }, "{}"],
    ["no JSON", 400, "POST", message, json, "kind"],
    ["more than 4 MiB", 413, "POST", message, json, large],
    ["POST to the page", 405, "POST", "/", json, "{}"],
    ["DELETE of the page", 405, "DELETE", "/index.html", {}],
    ["an unknown path", 404, "GET", "/config.capnp", {}],
    ["a path that climbs", 404, "GET", "/../go.mod", {}],
    ["another host's name", 421, "GET", "/", { Host: "weirmark.example" }],
    ["a message for another host's name", 421, "POST", message, { ...json, Host: "weirmark.example" }, "{}"],
  ]) {
    await check(`edge: refuses ${name}`, async () => {
      const answer = await call(method, at, headers, content);
      same(answer.status, status, "status");
      strict(answer.headers, /^application\/json$|^undefined$/);
      same(answer.headers["cache-control"], "no-store", "caching");
      if (status === 405) {
        same(answer.headers.allow, at === message ? "POST" : "GET, HEAD", "allowed");
      }
    });
  }
}

function strict(headers, type) {
  holds(type.test(String(headers["content-type"])), `content type ${headers["content-type"]}`);
  same(headers["x-content-type-options"], "nosniff", "sniffing");
  same(headers["referrer-policy"], "no-referrer", "referrer");
  const policy = headers["content-security-policy"];
  holds(policy?.startsWith("default-src 'none';") && policy.endsWith("frame-ancestors 'none'"), `policy ${policy}`);
}
