// A slip says in words what was read of one table and how it is used. Every
// guess is accepted on its own chip; tables of the same shape can take over an
// answer that was given on one of them, or its whole reading once nothing of it
// is open. The odd one of a group says how it differs.

import { useState } from "preact/hooks";

import type { Entry, SlipCard } from "../engine/types";
import { useAside } from "./aside";
import { Chip } from "./chip";
import { useDesk } from "./context";
import { list } from "./desk";
import { unfold } from "./jump";
import { Removal } from "./removal";
import { SketchOf } from "./sketch";
import { Words } from "./words";

/** An answer that other slips of the same shape wait for: the entry as it was, and what it is now. */
interface Offer {
  entry: Entry;
  value: string;
}

function waiting(slip: SlipCard, all: SlipCard[], offer: Offer): Entry[] {
  return all
    .filter((other) => other.id !== slip.id && other.group !== "" && other.group === slip.group && other.odd === "")
    .flatMap((other) => list(other.entries).filter((entry) => entry.target.field === offer.entry.target.field && entry.open))
    .filter((entry) => ["", offer.value, offer.entry.value].includes(entry.value));
}

/** Above this number, slips of which nothing is open are folded. */
const many = 8;

/** A slip, or one line of it where there are many and nothing of it is open. */
export function SlipOf({ slip, all }: { slip: SlipCard; all: SlipCard[] }) {
  const desk = useDesk();
  if (all.length <= many || slip.open > 0 || desk.layout.slips.includes(slip.id)) {
    return <Unfolded slip={slip} all={all} />;
  }
  const values = list(slip.entries).map((entry) => list(entry.options).find((option) => option.value === entry.value)?.label ?? entry.value);
  return (
    <article class="slip" id={"slip-" + slip.id} aria-label={slip.name}>
      <h3>
        <button aria-expanded="false" onClick={() => unfold(desk, slip.id)}>
          {slip.name}
        </button>
      </h3>
      <p class="quiet">{values.slice(0, 4).filter(Boolean).join(", ")}</p>
    </article>
  );
}

function Unfolded({ slip, all }: { slip: SlipCard; all: SlipCard[] }) {
  const desk = useDesk();
  const [offer, setOffer] = useState<Offer | undefined>(undefined);
  const others = offer === undefined ? [] : waiting(slip, all, offer);
  const entries = list(slip.entries);
  const { hidden, more } = useAside(entries, slip.name);
  const like = slip.open > 0 || slip.odd !== "" || slip.group === "" ? 0 : all.filter((other) => other.id !== slip.id && other.group === slip.group && other.odd === "" && other.open > 0).length;

  const after = (entry: Entry, value: string) => {
    unfold(desk, slip.id);
    setOffer({ entry, value });
    // On to the next chip of this slip that needs a person, else of the tray.
    requestAnimationFrame(() => {
      const own = document.querySelector<HTMLElement>(`#slip-${slip.id} [data-open]`);
      (own ?? document.querySelector<HTMLElement>(".tray [data-open]") ?? document.getElementById("tray-name"))?.focus();
    });
  };
  const share = async () => {
    for (const entry of others) {
      await desk.change(entry.value === offer!.value ? { kind: "accept", target: entry.target } : { kind: "set", target: entry.target, value: offer!.value });
    }
    setOffer((now) => (now === offer ? undefined : now)); // another may have come meanwhile
  };
  return (
    <article class="slip" id={"slip-" + slip.id} aria-label={slip.name}>
      <SketchOf sketch={slip.sketch} name={slip.name} />
      <h3>{slip.name}</h3>
      <p>
        <Words text={slip.read} />{" "}
        {entries.filter((entry) => !hidden(entry)).map((entry, i) => (
          <span key={entry.target.field}>
            {i === 0 ? "It " : ", "}
            <Chip entry={entry} after={after} />
          </span>
        ))}
        .{" "}
        {more}
      </p>
      {others.length > 0 && offer !== undefined && (
        <p class="offer">
          <button onClick={() => void share()}>
            Say the same of {others.length === 1 ? "1 more table" : `${others.length} more tables`} of this shape: {offer.entry.label} {offer.value}
          </button>
        </p>
      )}
      {like > 0 && (
        <p class="offer">
          <button onClick={() => void desk.change({ kind: "accept like", target: { kind: "slip", id: slip.id, field: "" } })}>
            {like === 1 ? "Read the one like table the same way" : `Read the ${like} like tables the same way`}
          </button>
        </p>
      )}
      {slip.odd !== "" && (
        <p class="notice">
          <Words text={slip.odd} />
        </p>
      )}
      {list(slip.notices).map((text, i) => (
        <p key={i} class="notice">
          <Words text={text} />
        </p>
      ))}
      <p class="ways">
        <button onClick={() => void desk.change({ kind: "double", target: { kind: "slip", id: slip.id, field: "" } })}>use it once more</button>{" "}
        <Removal what={slip.name} request={{ kind: "remove file", target: { kind: "file", id: slip.file, field: "" } }} />
      </p>
    </article>
  );
}
