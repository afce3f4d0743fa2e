// What stands behind a study: its people, its files with their hashes, and the
// log of everything that was done, in order.

import type { View } from "../engine/types";
import { Chip } from "./chip";
import { list } from "./desk";
import { Removal } from "./removal";

export function Record({ view }: { view: View }) {
  const log = list(view.log);
  return (
    <section class="record" aria-labelledby="record-name">
      <h2 id="record-name">The record</h2>
      <p class="entries">
        {list(view.people).map((entry, i) => (
          <span key={entry.target.field}>
            {i > 0 && " · "}
            <Chip entry={entry} />
          </span>
        ))}
      </p>
      <details>
        <summary>Files and their hashes ({list(view.files).length})</summary>
        <ul class="files">
          {list(view.files).map((file) => (
            <li key={file.id}>
              <b>{file.name}</b>, {file.size}, SHA-256 <code>{file.sha256}</code>
              {list(file.uses).map((use, i) => (
                <span key={i}>; {use}</span>
              ))}{" "}
              <Removal what={file.name} request={{ kind: "remove file", target: { kind: "file", id: file.id, field: "" } }} />
            </li>
          ))}
        </ul>
      </details>
      <details>
        <summary>
          Log ({log.length} {log.length === 1 ? "entry" : "entries"})
        </summary>
        <ol class="log">
          {log.map((entry) => (
            <li key={entry.number} value={entry.number}>
              <span class="when">{entry.at}</span> {entry.what}
              {entry.why !== undefined && <i> Why: {entry.why}</i>}
              {entry.shown && <span class="quiet"> (after the comparison was shown)</span>}
            </li>
          ))}
        </ol>
      </details>
    </section>
  );
}
