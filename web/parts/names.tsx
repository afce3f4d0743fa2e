// How names of files are read: the pattern, what it makes of every name, and
// what two files claim together. One part at a time is accepted for all names.

import type { View } from "../engine/types";
import { Chip } from "./chip";
import { useDesk } from "./context";
import { list } from "./desk";
import { FoldedTable } from "./table";
import { Words } from "./words";

/** Below this number of files a pattern saves nothing. */
const few = 2;

export function Names({ view: { names, files } }: { view: View }) {
  const desk = useDesk();
  if (list(files).length < few && names.pattern.value === "") {
    return null;
  }
  const parts = names.table === null ? [] : list(names.table.head).slice(1);
  return (
    <div class="names">
      <p class="entries">
        <Chip entry={names.pattern} />
        {parts.length > 0 && " · accept for all names: "}
        {parts.map((part) => (
          <button key={part} class="quiet-way" onClick={() => void desk.change({ kind: "accept names", value: part })}>
            the {part}
          </button>
        ))}
      </p>
      {list(names.notices).map((text) => (
        <p key={text} class="notice">
          <Words text={text} />
        </p>
      ))}
      {names.table !== null && <FoldedTable title={names.table.title} head={list(names.table.head)} rows={list(names.table.rows).map(list)} />}
    </div>
  );
}
