// A figure as the core describes it, drawn at the width there is, with its
// caption and its table. Its picture is our own renderer's text, whose words
// come escaped; it is the only markup that is put on the page as such.

import { useLayoutEffect, useRef, useState } from "preact/hooks";

import { draw, type Option } from "../figures/main";
import type { Figure } from "../engine/types";
import { useDesk } from "./context";
import { list } from "./desk";
import { copyPicture, copyTable, saveAs, toPicture } from "./outlet";
import { Table } from "./table";
import { Words } from "./words";

/** Below this the labels of a figure would meet; on a narrow page it is moved under the finger instead. */
const least = 600;
const most = 920;

interface Grid {
  left: string;
  right: string;
}

/** The option for another width: what hangs at the right edge moves with it. */
function fitted(figure: Figure, width: number): Option {
  const option = figure.option as Option & { grid: Grid[] };
  const grid = option.grid.map((one) => (Number(one.left) > figure.width / 2 ? { ...one, left: String(Number(one.left) + width - figure.width) } : one));
  return { ...option, grid };
}

/** The figure as an SVG document. */
export function drawn(figure: Figure, width: number, prefix: string): string {
  return draw(fitted(figure, width), width, figure.height, prefix);
}

/** Where a station lies in the picture, from left, as a part of its width. */
function across(figure: Figure, width: number, x: number): number | undefined {
  const option = figure.option as Option & { grid: Grid[]; xAxis: { min?: number; max?: number }[] };
  const { min, max } = option.xAxis[0] ?? {};
  const grid = option.grid[0];
  if (min === undefined || max === undefined || grid === undefined || !(x >= min && x <= max)) {
    return undefined;
  }
  const left = Number(grid.left);
  return (left + ((x - min) / (max - min)) * (width - left - Number(grid.right))) / width;
}

interface Shown {
  figure: Figure;
  /** The station that the cursor is at. */
  at?: number | undefined;
  onKeyDown?: ((event: KeyboardEvent) => void) | undefined;
}

/** A second picture of a course is folded away, and drawn when it is opened. */
export function FoldedFigure(shown: Shown) {
  const [open, setOpen] = useState(false);
  return (
    <details class="folded" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>
        <Words text={shown.figure.title} />
      </summary>
      {open && <FigureOf {...shown} />}
    </details>
  );
}

export function FigureOf({ figure, at, onKeyDown }: Shown) {
  const desk = useDesk();
  const tables = desk.layout.tables;
  const holder = useRef<HTMLDivElement>(null);
  const picture = useRef<HTMLDivElement>(null);
  const last = useRef("");
  const [width, setWidth] = useState(0);
  const [own, setOwn] = useState(false);
  const table = tables !== own;

  useLayoutEffect(() => {
    const measure = () => {
      const there = Math.floor(holder.current!.clientWidth);
      setWidth(Math.min(most, Math.max(least, there)));
    };
    measure();
    const watch = new ResizeObserver(measure);
    watch.observe(holder.current!);
    return () => watch.disconnect();
  }, []);

  const key = JSON.stringify(figure.option) + width;
  useLayoutEffect(() => {
    if (width === 0 || table) {
      last.current = "";
      return;
    }
    if (last.current === key) {
      return;
    }
    const drawNow = () => {
      last.current = key;
      picture.current!.innerHTML = drawn(figure, width, "page-" + figure.id);
    };
    if (last.current === "") {
      drawNow();
      return;
    }
    // A picture that is there already is redrawn once the words are on screen.
    let timer: ReturnType<typeof setTimeout> | undefined;
    const frame = requestAnimationFrame(() => (timer = setTimeout(drawNow)));
    return () => {
      cancelAnimationFrame(frame);
      clearTimeout(timer);
    };
  }, [key, table]);

  const place = at === undefined || width === 0 ? undefined : across(figure, width, at);
  return (
    <figure class="figure" ref={holder} data-figure={figure.id}>
      {table ? (
        <Table title={figure.title} head={list(figure.table.head)} rows={list(figure.table.rows).map(list)} />
      ) : (
        <div
          class={"picture" + (onKeyDown === undefined ? "" : " stepped")}
          tabIndex={0}
          role="group"
          aria-label={onKeyDown === undefined ? figure.title : "Stations; the arrow keys go from one to the next"}
          onKeyDown={onKeyDown}
        >
          <div class="canvas">
            <div ref={picture} role="img" aria-label={figure.alt} />
            {place !== undefined && <span class="cursor" style={{ left: `${place * 100}%` }} />}
          </div>
        </div>
      )}
      <figcaption>
        <p>
          <Words text={figure.caption} />
        </p>
        <p class="ways">
          <button aria-pressed={table} onClick={() => setOwn(!own)}>
            {table ? "picture" : "table"}
          </button>{" "}
          <button onClick={() => saveAs(figure.id + ".svg", "image/svg+xml", drawn(figure, figure.width, figure.id))}>save SVG</button>{" "}
          <button
            onClick={() =>
              void toPicture(drawn(figure, figure.width, figure.id), figure.width, figure.height).then((png) => saveAs(figure.id + ".png", "image/png", png))
            }
          >
            save PNG
          </button>{" "}
          <button onClick={() => void copyPicture(desk, drawn(figure, figure.width, figure.id), figure.width, figure.height)}>copy picture</button>{" "}
          <button onClick={() => void copyTable(desk, list(figure.table.head), list(figure.table.rows).map(list))}>copy table</button>
        </p>
      </figcaption>
    </figure>
  );
}
