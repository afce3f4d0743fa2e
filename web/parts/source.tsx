// A source line says one source of uncertainty as a sentence; beside it stand
// twelve curves that such an error could have made of the data, which show what
// its pattern means.

import type { SlipCard, SourceCard, View } from "../engine/types";
import { useAside } from "./aside";
import { Chip } from "./chip";
import { useDesk } from "./context";
import { entriesOf, list } from "./desk";
import { Ghost } from "./ghost";
import { placeOf } from "./jump";
import { Removal } from "./removal";
import { Words } from "./words";

export function SourceLines({ view, of }: { view: View; of: string[] }) {
  const desk = useDesk();
  const lines = list(view.sources).filter((source) => of.includes(source.of));
  const data = dataOf(view);
  const downward = entriesOf(view).some((entry) => entry.target.field === "downward" && entry.value === "yes");
  const id = view.reveal.id;
  return (
    <div class="sources">
      {lines.map((source, i) => (
        <SourceLine key={i} source={source} data={data} downward={downward} />
      ))}
      <p class="add">
        Add a source of{" "}
        {of.map((one, i) => (
          <span key={one}>
            {i > 0 && " or "}
            <button
              data-place={placeOf({ kind: "source", id, field: one })}
              onClick={() => void desk.change({ kind: "add source", target: { kind: "source", id, field: "" }, value: one })}
            >
              {adding[one]}
            </button>
          </span>
        ))}
        .
      </p>
    </div>
  );
}

const adding: Record<string, string> = { data: "the data’s uncertainty", input: "the inputs’ uncertainty", numerical: "the numerical uncertainty" };

/** The reference table of the question, for the curves beside a source. */
function dataOf(view: View): SlipCard | undefined {
  const value = (slip: SlipCard, field: string) => list(slip.entries).find((entry) => entry.target.field === field)?.value;
  return list(view.slips).find(
    (slip) => value(slip, "role") === "reference" && `${value(slip, "case")}|${value(slip, "quantity")}` === view.reveal.id && value(slip, "x.column") !== "",
  );
}

function SourceLine({ source, data, downward }: { source: SourceCard; data: SlipCard | undefined; downward: boolean }) {
  const entries = list(source.entries);
  const { hidden, more } = useAside(entries, entries[0]?.value || source.text);
  return (
    <div class="source">
      {entries.length === 0 ? (
        <p>
          <Words text={source.text} />
        </p>
      ) : (
        <p>
          {entries.map(
            (entry, i) =>
              !hidden(entry) && (
                <span key={entry.target.field}>
                  {source.leads?.[i]}
                  <Chip entry={entry} bare />
                </span>
              ),
          )}
          . {more} <Removal what="this source" request={{ kind: "remove source", target: source.target }} />
        </p>
      )}
      {data !== undefined && source.of === "data" && <Ghost data={list(data.sketch.own)} zero={data.sketch.zero} pattern={source.pattern} downward={downward} />}
      {source.share !== "" && (
        <p class="share">
          <Words text={source.share} />
        </p>
      )}
    </div>
  );
}
