// What is removed is recorded with a reason, where one is given.

import { useState } from "preact/hooks";

import { useDesk } from "./context";
import type { Asked } from "./desk";

export function Removal({ what, request }: { what: string; request: Asked }) {
  const desk = useDesk();
  const [asking, setAsking] = useState(false);
  if (!asking) {
    return (
      <button class="quiet-way" onClick={() => setAsking(true)}>
        remove<span class="spoken"> {what}</span>
      </button>
    );
  }
  return (
    <form
      class="removal"
      onSubmit={(event) => {
        event.preventDefault();
        const why = new FormData(event.currentTarget).get("why");
        setAsking(false);
        void desk.change({ ...request, why: String(why) });
      }}
    >
      <label>
        Why? <input name="why" type="text" size={24} autocomplete="off" ref={(field) => field?.focus()} />
      </label>{" "}
      <button type="submit">remove {what}</button>{" "}
      <button type="button" onClick={() => setAsking(false)}>
        keep
      </button>
    </form>
  );
}
