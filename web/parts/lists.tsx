// Lists that a person adds to: conditions of both sides, regions, the point of
// application. The core says which there are and what an item holds.

import type { EntryItem, EntryList, View } from "../engine/types";
import { Chip } from "./chip";
import { useDesk } from "./context";
import { list } from "./desk";
import { Removal } from "./removal";

export function Lists({ view, place }: { view: View; place: number }) {
  return (
    <>
      {list(view.lists)
        .filter((one) => one.course === place)
        .map((one) => (
          <ListOf key={one.title} entries={one} />
        ))}
    </>
  );
}

function ListOf({ entries: { title, hint, add, items } }: { entries: EntryList }) {
  const desk = useDesk();
  return (
    <div class="list">
      <p>
        <b>{title}</b>
        <span class="quiet">: {hint}.</span>{" "}
        {add !== null && (
          <button class="quiet-way" onClick={() => void desk.change({ kind: "add item", target: add })}>
            add one
          </button>
        )}
      </p>
      {list(items).map((item, i) => (
        <ItemOf key={i} item={item} what={title} />
      ))}
    </div>
  );
}

function ItemOf({ item: { entries, remove }, what }: { item: EntryItem; what: string }) {
  return (
    <p class="entries">
      {list(entries).map((entry, i) => (
        <span key={entry.target.field}>
          {i > 0 && " · "}
          <Chip entry={entry} />
        </span>
      ))}{" "}
      {remove !== null && <Removal what={`this of ${what}`} request={{ kind: "remove item", target: remove }} />}
    </p>
  );
}
