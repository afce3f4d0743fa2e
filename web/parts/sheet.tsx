// A sheet lies over the page until it is put away: the keys, the methods, a
// table to type, what was found, text to copy by hand.

import { useLayoutEffect, useRef, useState } from "preact/hooks";
import type { ComponentChildren } from "preact";

import methods from "../help/methods.txt";
import manual from "../help/manual.txt";
import type { View } from "../engine/types";
import { useDesk } from "./context";
import { entriesOf, list } from "./desk";
import { take } from "./intake";
import { focusOn, jump } from "./jump";
import { keys } from "./keys";
import { Words } from "./words";

export function Sheets({ view }: { view: View }) {
  const desk = useDesk();
  switch (desk.layout.sheet) {
    case "keys":
      return <Keys />;
    case "help":
      return <Help />;
    case "typing":
      return <Typing />;
    case "find":
      return <Finder view={view} />;
    case "copy":
      return <ByHand />;
    case "walk":
      return <Walked />;
  }
  return null;
}

function Sheet({ name, children }: { name: string; children: ComponentChildren }) {
  const desk = useDesk();
  const dialog = useRef<HTMLDialogElement>(null);
  useLayoutEffect(() => dialog.current!.showModal(), []);
  return (
    <dialog ref={dialog} class="sheet" aria-label={name} onClose={() => desk.lay({ sheet: "" })}>
      <form method="dialog">
        <button class="close">put away</button>
      </form>
      <h2>{name}</h2>
      {children}
    </dialog>
  );
}

function Keys() {
  return (
    <Sheet name="Keys">
      <dl class="keys">
        {keys.map(({ shown, does }) => (
          <div key={shown}>
            <dt>
              <kbd>{shown}</kbd>
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <p class="quiet">Single letters can be switched off beside the board. On a chip, Enter accepts and F2 corrects.</p>
    </Sheet>
  );
}

/** Text of the help: a line that begins with # is a heading, an empty line parts paragraphs. */
function Prose({ text }: { text: string }) {
  return (
    <>
      {text
        .trim()
        .split(/\n{2,}/)
        .map((part, i) => (part.startsWith("# ") ? <h3 key={i}>{part.slice(2)}</h3> : <p key={i}><Words text={part.replace(/\n/g, " ")} /></p>))}
    </>
  );
}

function Help() {
  return (
    <Sheet name="How it works and computes">
      <Prose text={manual} />
      <Prose text={methods} />
    </Sheet>
  );
}

function Typing() {
  const desk = useDesk();
  const [text, setText] = useState("");
  const [name, setName] = useState("typed.csv");
  const add = () => {
    desk.lay({ sheet: "" });
    void take(desk, [new File([text], name.trim() === "" ? "typed.csv" : name)]);
  };
  return (
    <Sheet name="Type a table">
      <p>First the names of the columns with their units, then a row a line; part the columns by commas, semicolons or tabs.</p>
      <label>
        Name <input type="text" value={name} onInput={(event) => setName(event.currentTarget.value)} autocomplete="off" />
      </label>
      <label class="wide">
        Table
        <textarea autofocus rows={10} spellcheck={false} placeholder={"x [mm],Cp,u(Cp)\n0,-1.20,0.02"} value={text} onInput={(event) => setText(event.currentTarget.value)} />
      </label>
      <button class="do" disabled={text.trim() === ""} onClick={add}>
        Add it to the study
      </button>
    </Sheet>
  );
}

function ByHand() {
  const desk = useDesk();
  const area = useRef<HTMLTextAreaElement>(null);
  useLayoutEffect(() => area.current!.select(), []);
  return (
    <Sheet name="Copy by hand">
      <p>This browser gives no clipboard to the page. The text below is selected: copy it with Ctrl+C.</p>
      <textarea ref={area} autofocus rows={12} readOnly value={desk.byHand} aria-label="Text to copy" />
    </Sheet>
  );
}

/** A number walked back, one step at a time. */
function Walked() {
  const desk = useDesk();
  const first = useRef<HTMLButtonElement>(null);
  const walk = desk.walked.at(-1)!;
  const { path, name } = walk.step;
  useLayoutEffect(() => first.current?.focus(), [path]);
  useLayoutEffect(() => () => void (desk.walked = []), []);
  const ways = list(walk.ways);
  return (
    <Sheet name="Why this number">
      <div
        class="walk"
        onKeyDown={(event) => {
          if (event.key === "w" && ways.length > 0) {
            event.preventDefault();
            const at = (document.activeElement as HTMLElement | null)?.dataset["path"];
            void desk.walk(at ?? ways[0]!.path);
          }
        }}
      >
        <p data-walk={path}>
          <Words text={name} /> {walk.shown !== "" && <b>{walk.shown}</b>}
        </p>
        {list(walk.said).map((text, i) => (
          <p key={i}>
            <Words text={text} />
          </p>
        ))}
        <ul class="hits">
          {ways.map((way, i) => (
            <li key={way.path}>
              <button ref={i === 0 ? first : null} data-path={way.path} onClick={() => void desk.walk(way.path)}>
                <Words text={way.text} />
              </button>
            </li>
          ))}
        </ul>
        <p class="quiet">
          {path}
          {ways.length > 0 && "; w goes on with what has the focus"}
        </p>
        {desk.walked.length > 1 && <button onClick={() => desk.walkUp()}>one step back up</button>}
      </div>
    </Sheet>
  );
}

interface Hit {
  text: string;
  kind: string;
  go(): void;
}

/** Everything on the page that can be looked for, with the way there. */
function places(view: View, go: (open: () => void) => () => void, leap: (target: Parameters<typeof jump>[1]) => void): Hit[] {
  const hits: Hit[] = [];
  list(view.courses).forEach((course, i) => {
    const target = { kind: "course", id: "", field: String(i) };
    hits.push({ text: course.question, kind: "course", go: go(() => leap(target)) });
    for (const doubt of list(course.doubts)) {
      hits.push({ text: doubt.text, kind: "open point", go: go(() => leap(doubt.target)) });
    }
    for (const { value, name } of list(course.numbers)) {
      hits.push({ text: `${name} ${value}`, kind: "number", go: go(() => leap(target)) });
    }
  });
  for (const slip of list(view.slips)) {
    hits.push({ text: slip.name + ": " + slip.read, kind: "table", go: go(() => focusOn(document.querySelector(`#slip-${slip.id} .chip, #slip-${slip.id} h3 button`))) });
  }
  for (const entry of entriesOf(view)) {
    hits.push({ text: `${entry.label} ${entry.value}`, kind: "entry", go: go(() => leap(entry.target)) });
  }
  list(view.courses).forEach((course, i) => {
    const target = { kind: "course", id: "", field: String(i) };
    for (const table of list(course.tables)) {
      for (const row of list(table.rows).map(list)) {
        hits.push({ text: list(table.head).map((name, c) => `${name} ${row[c]}`).join(", "), kind: table.title, go: go(() => leap(target)) });
      }
    }
  });
  return hits;
}

const most = 12;

function Finder({ view }: { view: View }) {
  const desk = useDesk();
  const [asked, setAsked] = useState("");
  const words = asked.toLowerCase().split(/\s+/).filter(Boolean);
  const go = (open: () => void) => () => {
    desk.lay({ sheet: "" });
    requestAnimationFrame(open);
  };
  const hits = words.length === 0 ? [] : places(view, go, (target) => jump(desk, target)).filter((hit) => words.every((word) => hit.text.toLowerCase().includes(word)));
  return (
    <Sheet name="Find a number, a station or a file">
      <label>
        Look for{" "}
        <input
          type="search"
          autofocus
          value={asked}
          onInput={(event) => setAsked(event.currentTarget.value)}
          onKeyDown={(event) => {
            if (event.key === "Enter") {
              event.preventDefault();
              hits[0]?.go();
            }
          }}
          autocomplete="off"
        />
      </label>
      <p class="quiet" role="status">
        {words.length === 0 ? "" : hits.length === 0 ? "Nothing found." : hits.length > most ? `${hits.length} found, the first ${most} shown.` : `${hits.length} found.`}
      </p>
      <ul class="hits">
        {hits.slice(0, most).map((hit, i) => (
          <li key={i}>
            <button onClick={hit.go}>
              {hit.text} <span class="quiet">{hit.kind}</span>
            </button>
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
