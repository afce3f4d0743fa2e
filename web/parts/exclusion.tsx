// A station is taken out with a reason only; it stays in the tables and can be
// taken back.

import type { View } from "../engine/types";
import { useDesk } from "./context";
import { list } from "./desk";

const reasons = ["instrument fault noted in the log of the test", "outside the region compared", "repeat reading", "blocked or leaking tap"];

interface Shown {
  view: View;
  /** The line of the reference file. */
  line: string;
  asking: boolean;
  ask(asking: boolean): void;
}

export function Exclusion({ view, line, asking, ask }: Shown) {
  const desk = useDesk();
  if (!asking) {
    return (
      <p class="ways">
        <button onClick={() => ask(true)}>exclude this station</button>
      </p>
    );
  }
  return (
    <form
      class="removal"
      onSubmit={(event) => {
        event.preventDefault();
        const why = String(new FormData(event.currentTarget).get("why"));
        ask(false);
        void desk.change({ kind: "exclude", target: { ...view.reveal, field: line }, why });
      }}
    >
      <label>
        Why is the station at line {line} excluded? <input name="why" type="text" list="reasons" size={36} required autocomplete="off" ref={(field) => field?.focus()} />
      </label>
      <datalist id="reasons">
        {reasons.map((reason) => (
          <option key={reason} value={reason} />
        ))}
      </datalist>{" "}
      <button type="submit">exclude it</button>{" "}
      <button type="button" onClick={() => ask(false)}>
        keep it
      </button>
    </form>
  );
}

export function ExclusionsOf({ view }: { view: View }) {
  const desk = useDesk();
  const excluded = list(view.excluded);
  if (excluded.length === 0) {
    return null;
  }
  return (
    <ul class="exclusions">
      {excluded.map(({ target, text }) => (
        <li key={target.field}>
          Excluded: {text}.{" "}
          <button class="quiet-way" onClick={() => void desk.change({ kind: "include", target })}>
            include it again
          </button>
        </li>
      ))}
    </ul>
  );
}
