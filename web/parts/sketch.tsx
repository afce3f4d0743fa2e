// A small picture of a table's columns beside the other tables of its question:
// a swapped column is seen in a second.

import type { Sketch } from "../engine/types";
import { list } from "./desk";

const width = 132;
const height = 74;

type Points = (number | null)[][];

function place([x, y]: (number | null)[]): [number, number] {
  return [4 + (x ?? 0) * (width - 8), height - 4 - (y ?? 0) * (height - 8)];
}

function line(points: Points): string {
  return points.map((point, i) => (i === 0 ? "M" : "L") + place(point).map((v) => v.toFixed(1)).join(" ")).join("");
}

export function SketchOf({ sketch, name }: { sketch: Sketch; name: string }) {
  const own = list(sketch.own);
  if (own.length === 0) {
    return null;
  }
  return (
    <svg class="sketch" width={width} height={height} role="img" aria-label={`Sketch of ${name} beside the other tables of its question`}>
      {list(sketch.others).map((points, i) => (
        <path key={i} class="other" d={line(list(points))} />
      ))}
      {own.length > 40 ? (
        <path class="own" d={line(own)} />
      ) : (
        own.map((point, i) => {
          const [x, y] = place(point);
          return <circle key={i} class="own" cx={x} cy={y} r="1.8" />;
        })
      )}
    </svg>
  );
}
