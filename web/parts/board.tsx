// The tally board: what is missing, at a glance. Rows are questions, columns
// models; a blank low in a stack is the next job.

import { useRef } from "preact/hooks";

import type { View } from "../engine/types";
import { list } from "./desk";
import { Stack } from "./stack";

/** A name may be broken after its joints. */
function breakable(name: string): string {
  return name.replace(/[_.-](?=.)/g, "$&\u200b");
}

export function TallyBoard({ view, select }: { view: View; select(cell: string): void }) {
  const grid = useRef<HTMLTableElement>(null);
  const models = list(view.board.models);
  const rows = list(view.board.rows);

  const focus = (row: number, column: number) => {
    grid.current?.querySelector<HTMLElement>(`[data-at="${row},${column}"]`)?.focus();
  };
  const move = (event: KeyboardEvent, row: number, column: number) => {
    const steps: Record<string, [number, number]> = { ArrowUp: [-1, 0], ArrowDown: [1, 0], ArrowLeft: [0, -1], ArrowRight: [0, 1] };
    const by = steps[event.key];
    if (by === undefined) {
      return;
    }
    event.preventDefault();
    event.stopPropagation();
    for (let r = row + by[0], c = column + by[1]; r >= 0 && r < rows.length && c >= 0 && c < models.length; r += by[0], c += by[1]) {
      if (list(rows[r]!.cells)[c] !== null) {
        focus(r, c);
        return;
      }
    }
  };

  return (
    <section class="board" aria-labelledby="board-name">
      <h2 id="board-name">Tally board</h2>
      {rows.length === 0 ? (
        <p class="quiet">Nothing is on the board yet.</p>
      ) : (
        <table role="grid" aria-labelledby="board-name" ref={grid}>
          <thead>
            <tr>
              <td />
              {models.map((model) => (
                <th key={model} scope="col" title={model}>
                  <span class="model">{model === "" ? "–" : breakable(model)}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row, r) => {
              const first = r === 0 || rows[r - 1]!.case !== row.case;
              return (
                <tr key={row.case + "|" + row.quantity}>
                  <th scope="row" class={first ? "first" : undefined}>
                    {first && <span class="case">{row.case}</span>}
                    <span class="quantity">{row.quantity}</span>
                    {row.stations !== "" && <span class="stations">{row.stations}</span>}
                  </th>
                  {list(row.cells).map((cell, c) =>
                    cell === null ? (
                      <td key={c} role="gridcell" aria-label={`${row.case} ${row.quantity}: no model ${models[c]}`} />
                    ) : (
                      <td key={c} role="gridcell" aria-selected={cell.id === view.selected}>
                        <button
                          class="cell"
                          data-at={`${r},${c}`}
                          data-cell={cell.id}
                          tabIndex={cell.id === view.selected ? 0 : -1}
                          aria-label={cell.spoken}
                          onClick={() => select(cell.id)}
                          onKeyDown={(event) => move(event, r, c)}
                        >
                          <b class="letter" aria-hidden="true">
                            {cell.letter}
                          </b>
                          <Stack courses={cell.courses} width={models.length > 2 ? 20 : 30} />
                        </button>
                      </td>
                    ),
                  )}
                </tr>
              );
            })}
          </tbody>
        </table>
      )}
      <p class="quiet">{view.board.summary}</p>
      {rows.length > 0 && (
        <p class="quiet legend">
          From below: settled, fine enough, same thing, agreement, what can be said. Filled: settled; outlined: with doubts; faint: nothing given; crossed:
          blocked. <b>S</b> shown, <b>N</b> not met, <b>?</b> not resolved.
        </p>
      )}
    </section>
  );
}
