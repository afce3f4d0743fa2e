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
  common: boolean;
  /** Negative values are drawn upward, as in the figures of the quantity. */
  downward: boolean;
}

export function Ghost({ data, common, downward }: Shown) {
  const points = data
    .filter((row): row is [number, number] => row[0] !== null && row[1] !== null)
    .map(([x, y]): [number, number] => [x, downward ? 1 - y : y])
    .sort((a, b) => a[0] - b[0]);
  if (points.length < 3) {
    return null;
  }
  const draw = normal();
  const curves = Array.from({ length: 12 }, () => {
    const all = size * draw();
    return points.map(([x, y]): [number, number] => [x, y + (common ? all : size * draw())]);
  });
  const said = common ? "moved as a whole" : "moved point by point";
  return (
    <svg class="ghost" width={width} height={height} role="img" aria-label={`12 curves that such an error could have made of the data: ${said}`}>
      {curves.map((curve, i) => (
        <path key={i} class="one" d={path(curve)} />
      ))}
      <path class="data" d={path(points)} />
    </svg>
  );
}
