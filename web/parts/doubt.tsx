// A doubt stands in the margin of its course and leads to the place that
// answers it; one that asks a person something takes the answer there.

import { useState } from "preact/hooks";

import type { Open } from "../engine/types";
import { useDesk } from "./context";
import { jump, placeOf } from "./jump";
import { Words } from "./words";

export function DoubtOf({ doubt }: { doubt: Open }) {
  const desk = useDesk();
  if (doubt.target.kind === "answer") {
    return <Question doubt={doubt} />;
  }
  return (
    <button class="doubt" onClick={() => jump(desk, doubt.target, doubt.course)}>
      <Words text={doubt.text} />
    </button>
  );
}

function Question({ doubt }: { doubt: Open }) {
  const desk = useDesk();
  const [asking, setAsking] = useState(false);
  return (
    <div class="doubt">
      <Words text={doubt.text} />{" "}
      {asking ? (
        <form
          class="removal"
          onSubmit={(event) => {
            event.preventDefault();
            const value = String(new FormData(event.currentTarget).get("answer"));
            setAsking(false);
            void desk.change({ kind: "answer", target: doubt.target, value });
          }}
        >
          <input name="answer" type="text" size={20} required aria-label="Answer" autocomplete="off" ref={(field) => field?.focus()} />{" "}
          <button type="submit">record</button>{" "}
          <button type="button" onClick={() => setAsking(false)}>
            not now
          </button>
        </form>
      ) : (
        <button class="quiet-way" data-place={placeOf(doubt.target)} onClick={() => setAsking(true)}>
          answer
        </button>
      )}
    </div>
  );
}
