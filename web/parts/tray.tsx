// The tray holds a slip for every table and says of every file that gave none
// why it did not: nothing disappears.

import type { View } from "../engine/types";
import { list } from "./desk";
import { Names } from "./names";
import { Removal } from "./removal";
import { SlipOf } from "./slip";
import { Words } from "./words";

function toDo(open: number): string {
  return open === 0 ? "Nothing is left to accept." : open === 1 ? "1 entry to accept or fill." : `${open} entries to accept or fill.`;
}

export function Tray({ view }: { view: View }) {
  const slips = list(view.slips);
  const open = slips.reduce((sum, slip) => sum + slip.open, 0);
  const used = new Set(slips.map((slip) => slip.file));
  const rejected = list(view.files).filter((file) => !used.has(file.id));
  return (
    <section class="tray" aria-labelledby="tray-name">
      <h2 id="tray-name" tabIndex={-1}>
        What was read
      </h2>
      <p class="quiet" data-count={open}>
        {slips.length === 0 ? "No table yet." : toDo(open)} Enter accepts a guess on its own chip; F2 or a click corrects it.
      </p>
      {list(view.clashes).map((text) => (
        <p key={text} class="notice clash">
          <Words text={text} />
        </p>
      ))}
      <Names view={view} />
      <div class="slips">
        {[...slips].sort((a, b) => Number(b.odd !== "") - Number(a.odd !== "")).map((slip) => (
          <SlipOf key={slip.id} slip={slip} all={slips} />
        ))}
        {rejected.map((file) => (
          <article key={file.id} class="slip rejected" aria-label={file.name}>
            <h3>{file.name}</h3>
            {list(file.rejects).map((text, i) => (
              <p key={i}>{text}</p>
            ))}
            {list(file.rejects).length === 0 && <p>Nothing of it is used.</p>}
            <p class="ways">
              <Removal what={file.name} request={{ kind: "remove file", target: { kind: "file", id: file.id, field: "" } }} />
            </p>
          </article>
        ))}
      </div>
    </section>
  );
}
