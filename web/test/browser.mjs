// Browsers, the server of the site and a sink that counts what else is called.

import { spawn } from "node:child_process";
import { existsSync } from "node:fs";
import { mkdtemp, rm } from "node:fs/promises";
import { createServer } from "node:http";
import { tmpdir } from "node:os";
import path from "node:path";
import { createInterface } from "node:readline";

import puppeteer from "puppeteer-core";

import { run, root } from "./harness.mjs";

/** The browsers that the page is tested in, and where Debian puts them. */
export const browsers = [
  { name: "chromium", program: "/usr/bin/chromium" },
  { name: "firefox", program: "/usr/bin/firefox-esr" },
];

export function installed({ program }) {
  return existsSync(program);
}

/** A proxy that answers nothing and keeps the address of each call. */
export async function openSink() {
  const calls = [];
  const server = createServer((request, answer) => {
    calls.push(`${request.method} ${request.url}`);
    answer.writeHead(502).end();
  });
  server.on("connect", (request, socket) => {
    calls.push(`CONNECT ${request.url}`);
    socket.end("HTTP/1.1 502 Bad Gateway\r\n\r\n");
  });
  await new Promise((resolve) => server.listen(0, "127.0.0.1", resolve));
  return { port: server.address().port, calls, close: () => server.close() };
}

/** The server of the site, with every request that reaches it. */
export async function openSite(site) {
  const program = path.join(path.dirname(site), "build");
  await run("go", "build", "-o", program, "./web/build");
  const child = spawn(program, ["serve", "-from", site, "-at", "127.0.0.1:0", "-log"], { cwd: root, stdio: ["ignore", "pipe", "inherit"] });
  const calls = [];
  const address = await new Promise((resolve, reject) => {
    child.once("exit", () => reject(new Error("the server of the site ended")));
    createInterface(child.stdout).on("line", (line) => {
      const at = /http:\S+/.exec(line);
      at === null ? calls.push(line) : resolve(at[0]);
    });
  });
  return { address, calls, close: () => new Promise((resolve) => child.once("exit", resolve) && child.kill("SIGINT")) };
}

/** Opens a browser with nothing in its profile, all its calls going to the sink. */
export async function openBrowser({ name, program }, sink) {
  const userDataDir = await mkdtemp(path.join(tmpdir(), "weirmark-"));
  const browser = await puppeteer.launch({ browser: name === "firefox" ? "firefox" : "chrome", executablePath: program, headless: true, userDataDir, ...settings[name](sink.port) });
  const close = browser.close.bind(browser);
  browser.close = async () => {
    await close();
    await rm(userDataDir, { recursive: true, force: true, maxRetries: 5 });
  };
  return browser;
}

const settings = {
  chromium: (port) => ({
    args: [
      "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking",
      "--disable-component-update", "--disable-sync", `--proxy-server=127.0.0.1:${port}`,
      // The browser's own calls, which are none of the page's: the time, its extensions, its accounts, its updates.
      "--disable-features=NetworkTimeServiceQuerying,AutofillServerCommunication", "--disable-extensions", "--gaia-url=http://127.0.0.1:9/",
      "--component-updater=url-source=http://127.0.0.1:9/",
    ],
  }),
  firefox: (port) => ({
    // Lets the setting for services.settings.server below be heard.
    env: { ...process.env, MOZ_REMOTE_SETTINGS_DEVTOOLS: "1" },
    extraPrefsFirefox: {
      "network.proxy.type": 1,
      "network.proxy.http": "127.0.0.1",
      "network.proxy.http_port": port,
      "network.proxy.ssl": "127.0.0.1",
      "network.proxy.ssl_port": port,
      // The driver loosens this; people's browsers have it strict.
      "security.fileuri.strict_origin_policy": true,
      // The browser's own calls, which are none of the page's.
      "network.captive-portal-service.enabled": false,
      "network.connectivity-service.enabled": false,
      "services.settings.server": "data:,#remote-settings-dummy/v1",
    },
  }),
};

/** Opens a page with a cache of its own; what it or its workers print or throw is kept in said. */
export async function openPage(browser, options) {
  const context = await browser.createBrowserContext(options);
  const page = await context.newPage();
  const said = [];
  page.on("console", (message) => said.push(`${message.type()}: ${message.text()}`));
  page.on("pageerror", (cause) => said.push(`error: ${cause.message}`));
  page.on("workercreated", (worker) => {
    worker.on?.("console", (message) => said.push(`worker ${message.type()}: ${message.text()}`));
    worker.on?.("error", (cause) => said.push(`worker error: ${cause.message}`));
  });
  return { page, said, close: () => context.close() };
}

/** Waits until the page says that it is ready. */
export function untilReady(page, limit = 20_000) {
  return page.waitForSelector('html[data-state="ready"]', { timeout: limit });
}
