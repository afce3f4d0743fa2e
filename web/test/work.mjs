// The whole job on the page, in each browser, from a file and from a server.

import path from "node:path";
import { pathToFileURL } from "node:url";

import { onDemo } from "./demo.mjs";
import { onSharedFiles } from "./evidence.mjs";
import { check, same, skip } from "./harness.mjs";
import { onLook } from "./look.mjs";
import { Person, sharedFolder } from "./person.mjs";
import { onTrouble } from "./trouble.mjs";

/** Runs all checks; sink and site count what is called. */
export async function work(name, browser, sink, dist, site) {
  const file = pathToFileURL(path.join(dist, "weirmark.html")).href;

  /** One check with a person at a fresh page. */
  const on = (what, address, run, options) =>
    check(`${name}: work: ${what}`, async () => {
      const before = sink.calls.length;
      const person = await Person.at(browser, address, options);
      const asked = site.calls.length;
      try {
        const told = await run(person);
        person.quiet();
        same(sink.calls.slice(before), [], "calls of the sink");
        same(site.calls.slice(asked), [], "calls of the server after ready");
        return told;
      } catch (cause) {
        cause.message += `; the page says: ${await person.text(".message").catch(() => "")}; console: ${person.said.join(" | ")}`;
        throw cause;
      } finally {
        await person.leave();
      }
    });

  await onDemo(on, file);
  await onTrouble(on, file, site.address);
  await onLook(on, file);

  const shared = sharedFolder();
  if (shared === undefined) {
    skip(`${name}: work on the files of shared/nasa-tmr`, "the shared folder is absent");
    return;
  }
  const files = (...names) => names.map((one) => path.join(shared, "nasa-tmr", one));
  await onSharedFiles(on, file, site.address, files);
}
