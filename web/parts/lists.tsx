// What a person enters for the question, in groups and lists, in the order of
// use. What is always needed is in sight; what something was said of is one line
// that unfolds; what nobody said anything of is named in one line of its course.

import { useState } from "preact/hooks";

import type { Entry, EntryItem, EntryList, View } from "../engine/types";
import { Chip } from "./chip";
import { useDesk } from "./context";
import { idle, list } from "./desk";
import { Removal } from "./removal";
import { Words } from "./words";

export function Lists({ view, place }: { view: View; place: number }) {
  const desk = useDesk();
  const here = list(view.lists).filter((one) => one.course === place);
  const aside = here.filter(idle);
  const all = desk.layout.aside[place]!;
  return (
    <>
      {here
        .filter((one) => all || !idle(one))
        .map((one) => (
          <ListOf key={view.reveal.id + one.title} entries={one} />
        ))}
      {aside.length > 0 && (
        <p class="unused">
          <button class="aside" aria-expanded={all} onClick={() => desk.layAside(place, !all)}>
            {all ? "Put the further entries away" : "Further entries: "}
            {!all && <Words text={aside.map((one) => one.title).join(", ")} />}
          </button>
        </p>
      )}
    </>
  );
}

/** What was said of the entries of a list, as its summary tells it. */
const told = 4;

function ListOf({ entries: { title, hint, add, items, main } }: { entries: EntryList }) {
  const desk = useDesk();
  const entries = list(items).flatMap((item) => list(item.entries));
  const open = entries.some((entry) => entry.open);
  const [unfolded, unfold] = useState(open);
  if (main) {
    return list(items).map((item, i) => <ItemOf key={i} item={item} what={title} />);
  }
  const another = add !== null && (
    <button
      class="quiet-way"
      onClick={() => {
        unfold(true);
        void desk.change({ kind: "add item", target: add });
      }}
    >
      add one
    </button>
  );
  if (entries.length === 0) {
    return (
      <p class="list" data-list={title}>
        <b>
          <Words text={title} />
        </b>
        <span class="quiet">
          : <Words text={hint} />.
        </span>{" "}
        {another}
      </p>
    );
  }
  const said = entries.filter((entry) => !entry.aside && entry.value !== "");
  const summary = said.slice(0, told).map(wordsOf).join(" · ") + (said.length > told ? ` · and ${said.length - told} more` : "");
  return (
    <details class="list" data-list={title} open={unfolded} onToggle={(event) => unfold(event.currentTarget.open)}>
      <summary>
        <b>
          <Words text={title} />
        </b>
        <span class="quiet">
          : <Words text={unfolded || summary === "" ? hint : summary} />
        </span>
      </summary>
      {list(items).map((item, i) => (
        <ItemOf key={i} item={item} what={`${title}, item ${i + 1}`} />
      ))}
      {another !== false && <p>{another}</p>}
    </details>
  );
}

function wordsOf(entry: Entry): string {
  return `${entry.label} ${list(entry.options).find((option) => option.value === entry.value)?.label ?? entry.value}`;
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
      {remove !== null && <Removal what={what} request={{ kind: "remove item", target: remove }} />}
    </p>
  );
}
