// A table of texts; columns that hold numbers stand to the right.

import { useDesk } from "./context";
import { copyTable } from "./outlet";
import { Words } from "./words";

interface Shown {
  title: string;
  head: string[];
  rows: string[][];
  /** The row that the cursor is at. */
  at?: number | undefined;
  choose?: ((row: number) => void) | undefined;
}

const number = /^[±+−-]?[\d.,\s]+(e[+−-]?\d+)?( ?%)?$|^–?$/;

export function Table({ title, head, rows, at, choose }: Shown) {
  const numeric = head.map((_, column) => rows.every((row) => number.test(row[column] ?? "")));
  return (
    <div class="table" tabIndex={0} role="region" aria-label={title}>
      <table>
        <caption>
          <Words text={title} />
        </caption>
        <thead>
          <tr>
            {head.map((name, column) => (
              <th key={column} scope="col" class={numeric[column] ? "number" : undefined}>
                <Words text={name} />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, i) => (
            <tr key={i} class={i === at ? "at" : undefined} onClick={choose && (() => choose(i))}>
              {row.map((text, column) => (
                <td key={column} class={numeric[column] ? "number" : undefined}>
                  <Words text={text} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** A table that is folded away until it is asked for. */
export function FoldedTable(shown: Shown) {
  const desk = useDesk();
  return (
    <details class="folded-table" open={desk.layout.tables}>
      <summary>
        <Words text={shown.title} />
      </summary>
      <Table {...shown} />
      <p class="ways">
        <button onClick={() => void copyTable(desk, shown.head, shown.rows)}>copy table</button>
      </p>
    </details>
  );
}
