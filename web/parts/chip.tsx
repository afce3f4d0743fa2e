// A chip is one entry within a sentence. A guess has a dotted underline until
// it is accepted on its own chip: Enter accepts, F2 or the space bar corrects.
// A gap that has to be filled is hatched.

import { useLayoutEffect, useRef, useState } from "preact/hooks";

import type { Entry } from "../engine/types";
import { useDesk } from "./context";
import { list } from "./desk";
import { Gap } from "./hatch";
import { placeOf } from "./jump";
import { Way } from "./way";
import { Words } from "./words";

interface Shown {
  entry: Entry;
  /** The label is for ears only; the sentence around says it. */
  bare?: boolean;
  /** Called once the entry has got the value. */
  after?: (entry: Entry, value: string) => void;
}

export function Chip({ entry, bare, after }: Shown) {
  const desk = useDesk();
  const [editing, setEditing] = useState(false);
  const chip = useRef<HTMLSpanElement>(null);
  const back = useRef(false);
  const options = list(entry.options);
  const guessed = entry.by === "guessed";
  const shown = options.find((option) => option.value === entry.value)?.label ?? entry.value;

  // At once, not after the next frame: who types fast must not type past the field.
  useLayoutEffect(() => {
    if (!editing && back.current) {
      back.current = false;
      chip.current?.focus();
    }
  }, [editing]);

  const accept = async () => {
    if (await desk.change({ kind: "accept", target: entry.target })) {
      after?.(entry, entry.value);
    }
  };
  const enter = async (value: string) => {
    setEditing(false);
    back.current = true;
    if (value === entry.value) {
      if (guessed) {
        await accept();
      }
      return;
    }
    if (await desk.change({ kind: "set", target: entry.target, value })) {
      after?.(entry, value);
    }
  };

  if (editing) {
    return (
      <span class="pair editing">
        <label>
          <Words text={entry.label} />{" "}
          <Editor
            entry={entry}
            enter={(value) => void enter(value)}
            leave={() => {
              back.current = true;
              setEditing(false);
            }}
          />
        </label>
        {entry.hint !== "" && <span class="hint">{entry.hint}</span>}
      </span>
    );
  }
  const state = guessed ? ", guessed: Enter accepts, F2 corrects" : entry.open ? ", missing: Enter fills" : "";
  return (
    <span class="pair">
      {bare !== true && (
        <>
          <Words text={entry.label} />{" "}
        </>
      )}
      <Way
        handle={chip}
        act={() => setEditing(true)}
        class={"chip" + (guessed ? " guessed" : entry.open ? " missing" : "")}
        data-place={placeOf(entry.target)}
        data-open={entry.open ? "" : undefined}
        aria-label={`${entry.label} ${shown === "" ? "not given" : shown}${state}`}
        title={entry.hint === "" ? undefined : entry.hint}
        onKeyDown={(event) => {
          if (event.key === "F2" || event.key === " ") {
            event.preventDefault();
            setEditing(true);
          } else if (event.key === "Enter") {
            event.preventDefault();
            if (guessed) {
              void accept();
            } else {
              setEditing(true);
            }
          }
        }}
      >
        {shown === "" || shown === "–" ? (
          entry.open ? (
            <>
              <Gap /> <i>{entry.hint === "" ? "not given" : entry.hint}</i>
            </>
          ) : (
            "–"
          )
        ) : (
          shown
        )}
      </Way>
      {guessed && (
        <button class="accept" tabIndex={-1} aria-label={`Accept ${entry.label} ${shown}`} onClick={() => void accept()}>
          accept
        </button>
      )}
    </span>
  );
}

interface Editing {
  entry: Entry;
  enter(value: string): void;
  leave(): void;
}

/** The field that stands in place of the chip while it is corrected. */
function Editor({ entry, enter, leave }: Editing) {
  const field = useRef<HTMLInputElement & HTMLSelectElement>(null);
  // A choice by keyboard counts when it is confirmed, one by mouse at once.
  const pointing = useRef(true);
  const done = useRef(false);
  const options = list(entry.options);

  useLayoutEffect(() => {
    field.current?.focus();
    if (options.length === 0) {
      field.current?.select();
    }
  }, []);

  const finish = (act: () => void) => {
    if (!done.current) {
      done.current = true;
      act();
    }
  };
  const common = {
    ref: field,
    "data-editor": "",
    onKeyDown: (event: KeyboardEvent) => {
      pointing.current = false;
      event.stopPropagation();
      if (event.key === "Enter") {
        event.preventDefault();
        finish(() => enter(field.current!.value));
      } else if (event.key === "Escape") {
        event.preventDefault();
        finish(leave);
      }
    },
    onPointerDown: () => (pointing.current = true),
    onBlur: () => finish(() => (field.current!.value === entry.value ? leave() : enter(field.current!.value))),
  };
  if (options.length > 0) {
    return (
      <select {...common} value={entry.value} onChange={() => pointing.current && finish(() => enter(field.current!.value))}>
        {!options.some((option) => option.value === entry.value) && <option value={entry.value}>{entry.value}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    );
  }
  return <input {...common} type="text" defaultValue={entry.value} size={Math.max(8, entry.value.length + 2)} spellcheck={false} autocomplete="off" />;
}
