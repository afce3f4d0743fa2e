// Twelve curves that an error of one pattern could have made of the data. The
// size of the error is drawn alike for all sources: the picture is about the
// pattern.

const width = 200;
const height = 72;
const size = 0.06;

/** Draws from the normal distribution; the same each time. */
function normal(): () => number {
  let state = 7;
  const uniform = () => {
    state = (state * 16807) % 2147483647;
    return state / 2147483647;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

function path(points: [number, number][]): string {
  return "M" + points.map(([x, y]) => `${(4 + x * (width - 8)).toFixed(1)} ${(12 + (1 - y) * (height - 24)).toFixed(1)}`).join("L");
}

interface Shown {
  /** Points of the data, scaled to 0 to 1. */
  data: (number | null)[][];
  /** Where a value of zero lies, which a common scale turns about. */
  zero: number | null;
  pattern: string;
  /** Negative values are drawn upward, as in the figures of the quantity. */
  downward: boolean;
}

type Draw = () => number;

/** The errors of one curve at its points, of deviation 1. */
const errors: Record<string, (points: [number, number][], draw: Draw, zero: number) => number[]> = {
  common: (points, draw) => {
    const all = draw();
    return points.map(() => all);
  },
  scale: (points, draw, zero) => {
    const all = draw();
    const largest = Math.max(...points.map(([, y]) => Math.abs(y - zero)), 1e-9);
    return points.map(([, y]) => (all * (y - zero)) / largest);
  },
  // Thirds of the data stand for the groups, whose column the page does not read.
  group: (points, draw) => {
    const each = [draw(), draw(), draw()];
    return points.map((_, i) => each[Math.floor((3 * i) / points.length)] ?? 0);
  },
  // A fifth of the width stands for the length.
  length: (points, draw) => {
    let state = draw();
    let before = points[0]?.[0] ?? 0;
    return points.map(([x]) => {
      const keep = Math.exp(-(x - before) / 0.2);
      before = x;
      state = keep * state + Math.sqrt(1 - keep * keep) * draw();
      return state;
    });
  },
};

const moved: Record<string, string> = {
  common: "moved as a whole",
  scale: "stretched about zero",
  group: "moved in groups",
  length: "moved smoothly over a length",
};

export function Ghost({ data, zero, pattern, downward }: Shown) {
  const points = data
    .filter((row): row is [number, number] => row[0] !== null && row[1] !== null)
    .map(([x, y]): [number, number] => [x, downward ? 1 - y : y])
    .sort((a, b) => a[0] - b[0]);
  if (points.length < 3) {
    return null;
  }
  const draw = normal();
  const of = errors[pattern] ?? ((all: [number, number][]) => all.map(() => draw()));
  const level = zero === null ? 0 : downward ? 1 - zero : zero;
  const curves = Array.from({ length: 12 }, () => {
    const error = of(points, draw, level);
    return points.map(([x, y], i): [number, number] => [x, y + size * (error[i] ?? 0)]);
  });
  const said = moved[pattern] ?? "moved point by point";
  return (
    <svg class="ghost" width={width} height={height} role="img" aria-label={`12 curves that such an error could have made of the data: ${said}`}>
      {curves.map((curve, i) => (
        <path key={i} class="one" d={path(curve)} />
      ))}
      <path class="data" d={path(points)} />
    </svg>
  );
}
