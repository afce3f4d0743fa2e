// The claim is the sentence being earned: its blanks lead to what would fill
// them, its numbers to where they come from.

import { useEffect, useRef, useState } from "preact/hooks";

import type { Phrase, View } from "../engine/types";
import { useDesk } from "./context";
import { inCell, list } from "./desk";
import { Gap } from "./hatch";
import { jump } from "./jump";
import { Way } from "./way";
import { Words } from "./words";

const said: Record<string, string> = { missing: "missing: ", guessed: "guessed: ", assumed: "assumed: " };

function PhraseOf({ phrase, bare }: { phrase: Phrase; bare?: boolean }) {
  const desk = useDesk();
  const { mark, target, text, path } = phrase;
  if (target === null) {
    return <Words text={text} />;
  }
  const inside =
    mark === "missing" ? (
      <>
        <Gap /> <i>{text}</i> <Gap />
      </>
    ) : (
      <Words text={text} />
    );
  if (bare === true) {
    return <span class={"phrase " + mark}>{inside}</span>;
  }
  return (
    <Way class={"phrase " + mark} act={() => jump(desk, target)} data-path={path === undefined ? undefined : inCell(desk.view!, path)}>
      {mark in said && <span class="spoken">{said[mark]}</span>}
      {inside}
    </Way>
  );
}

function length(phrases: Phrase[]): string {
  const characters = phrases.reduce((sum, phrase) => sum + phrase.text.length, 0);
  return characters < 280 ? "short" : characters < 620 ? "middle" : "long";
}

export function Claim({ view, next }: { view: View; next(): void }) {
  const phrases = list(view.statement.phrases);
  const header = useRef<HTMLDivElement>(null);
  const [passed, setPassed] = useState(false);
  useEffect(() => {
    const watch = new IntersectionObserver(([entry]) => setPassed(!entry!.isIntersecting));
    watch.observe(header.current!.querySelector("#sentence")!);
    return () => watch.disconnect();
  }, []);
  return (
    <>
      <div class="claim" ref={header}>
        <h1 class="spoken">The statement</h1>
        <p id="sentence" class={"sentence " + length(phrases)} data-status={view.statement.status} tabIndex={-1}>
          {phrases.map((phrase, i) => (
            <PhraseOf key={i} phrase={phrase} />
          ))}
        </p>
        <StatusLine view={view} next={next} />
      </div>
      {passed && <Pinned view={view} phrases={phrases} next={next} />}
    </>
  );
}

/** The sentence in two lines while the reader is further down. */
function Pinned({ view, phrases, next }: { view: View; phrases: Phrase[]; next(): void }) {
  const { message } = useDesk();
  return (
    <div class="pinned">
      {message !== "" && (
        <p class="told" aria-hidden="true">
          {message}
        </p>
      )}
      <p aria-hidden="true">
        {phrases.map((phrase, i) => (
          <PhraseOf key={i} phrase={phrase} bare />
        ))}
      </p>
      <Undo view={view} />
      <NextButton view={view} next={next} />
    </div>
  );
}

function points(n: number): string {
  return n === 0 ? "no open point" : n === 1 ? "1 open point" : `${n} open points`;
}

function NextButton({ view, next }: { view: View; next(): void }) {
  return (
    <button class="next" disabled={view.next === null} onClick={next} title={view.next?.open.text}>
      Next open point <kbd>n</kbd>
    </button>
  );
}

function Undo({ view }: { view: View }) {
  const desk = useDesk();
  return (
    <span class="undo">
      <button disabled={view.undo === ""} title={view.undo === "" ? "nothing to undo" : view.undo} onClick={() => void desk.change({ kind: "undo" })}>
        Undo
      </button>{" "}
      <button disabled={view.redo === ""} title={view.redo === "" ? "nothing to redo" : view.redo} onClick={() => void desk.change({ kind: "redo" })}>
        Redo
      </button>
    </span>
  );
}

function StatusLine({ view, next }: { view: View; next(): void }) {
  return (
    <div class="status">
      <span>
        {view.status}, <b data-count={view.open_count}>{points(view.open_count)}</b>
      </span>
      <NextButton view={view} next={next} />
      <Undo view={view} />
      <span class="policy">Network blocked by this page’s policy</span>
      <span class="working" aria-hidden="true">
        at work
      </span>
    </div>
  );
}

/** The sentence for a screen reader, once it has stopped changing. */
export function Spoken({ text }: { text: string }) {
  const [settled, settle] = useState("");
  useEffect(() => {
    const timer = setTimeout(() => settle(text), 900);
    return () => clearTimeout(timer);
  }, [text]);
  return (
    <div class="spoken" aria-live="polite" role="status">
      {settled}
    </div>
  );
}
