// The veil covers a comparison until a requirement is recorded or a person asks
// to see it; the log keeps the order.

import type { View } from "../engine/types";
import { useDesk } from "./context";
import type { Desk } from "./desk";
import { Hatch } from "./hatch";

/** Locks all stations and shows the comparison, no requirement set. */
export const liftVeil = (desk: Desk, view: View) => desk.change({ kind: "reveal", target: view.reveal, value: "locked" });

export function Veil({ view }: { view: View }) {
  const desk = useDesk();
  return (
    <div class="veil">
      <Hatch className="sheet" />
      <p>
        Record the requirement first, so that no one can say it was fitted to the result; or{" "}
        <button onClick={() => void liftVeil(desk, view)}>use all stations, requirement not set</button> (key v), which locks the
        stations and shows the comparison; or{" "}
        <button onClick={() => void desk.change({ kind: "reveal", target: view.reveal })}>show the comparison now</button>, and the log will say so.
      </p>
    </div>
  );
}
