import type { CustomSeriesOption } from 'echarts/charts';

type Render = NonNullable<CustomSeriesOption['renderItem']>;
type Point = [number, number];

// Marks is what the core says of a custom series besides its data: rows of
// three columns, null where a value is missing.
export interface Marks {
  data: (number | null)[][];
  thick?: number; // of the lines, px
  cap?: number; // half length of the strokes at the ends, px
  hatch?: [number, number, number]; // of an area: direction right and down, distance of the lines in px
  itemStyle?: { color?: string; opacity?: number };
}

function path(lines: Point[][], marks: Marks): ReturnType<Render> {
  const d = lines.map((line) => 'M' + line.map(([x, y]) => `${round(x)} ${round(y)}`).join('L')).join('');
  return {
    type: 'path',
    shape: { pathData: d },
    style: { fill: 'none', stroke: marks.itemStyle?.color, lineWidth: marks.thick ?? 1 },
  } as ReturnType<Render>;
}

function round(v: number): number {
  return Math.round(v * 100) / 100;
}

function complete(row: (number | null)[]): row is number[] {
  return row.every((v) => v !== null);
}

// errorBar draws rows of x, low end, high end as upright bars with end strokes.
function errorBar(marks: Marks): Render {
  return (params, api) => {
    const row = marks.data[params.dataIndex];
    if (!complete(row)) return null;
    const [x, low] = api.coord([row[0], row[1]]);
    const high = api.coord([row[0], row[2]])[1];
    const cap = marks.cap ?? 0;
    const lines: Point[][] = [[[x, low], [x, high]]];
    for (const y of cap > 0 ? [low, high] : []) lines.push([[x - cap, y], [x + cap, y]]);
    return path(lines, marks);
  };
}

// intervalBar draws rows of y, low end, high end as lying bars with end strokes.
function intervalBar(marks: Marks): Render {
  return (params, api) => {
    const row = marks.data[params.dataIndex];
    if (!complete(row)) return null;
    const [low, y] = api.coord([row[1], row[0]]);
    const high = api.coord([row[2], row[0]])[0];
    const cap = marks.cap ?? 0;
    const lines: Point[][] = [[[low, y], [high, y]]];
    for (const x of cap > 0 ? [low, high] : []) lines.push([[x, y - cap], [x, y + cap]]);
    return path(lines, marks);
  };
}

// band fills the area between rows of x, low edge, high edge, and hatches it
// where it is asked to. A row with a missing value ends an area; the next one
// begins another.
function band(marks: Marks): Render {
  return (params, api) => {
    if (params.dataIndexInside !== 0) return null;
    const children = stretches(marks.data).flatMap((rows) => {
      const points = [
        ...rows.map((row) => api.coord([row[0], row[2]])),
        ...[...rows].reverse().map((row) => api.coord([row[0], row[1]])),
      ] as Point[];
      const style = { fill: marks.itemStyle?.color, opacity: marks.itemStyle?.opacity ?? 1 };
      const area = { type: 'polygon', shape: { points }, style };
      return marks.hatch ? [area, path(hatching(points, marks.hatch), marks)] : [area];
    });
    return { type: 'group', children } as ReturnType<Render>;
  };
}

// hatching returns parallel lines within a polygon. They lie on one raster for
// the whole figure, so that areas side by side join without a seam.
function hatching(points: Point[], [right, down, distance]: [number, number, number]): Point[][] {
  const length = Math.sqrt(right * right + down * down);
  const [ux, uy] = [right / length, down / length];
  const along = points.map(([x, y]) => x * ux + y * uy);
  const across = points.map(([x, y]) => y * ux - x * uy);
  const lines: Point[][] = [];
  for (let m = Math.ceil(Math.min(...across) / distance); m * distance <= Math.max(...across); m++) {
    const at = m * distance;
    const cuts: number[] = [];
    across.forEach((from, i) => {
      const next = (i + 1) % across.length;
      const [a, b] = [from - at, across[next] - at];
      if (a < 0 !== b < 0) cuts.push(along[i] + ((along[next] - along[i]) * a) / (a - b));
    });
    cuts.sort((a, b) => a - b);
    for (let i = 0; i + 1 < cuts.length; i += 2) {
      lines.push([cuts[i], cuts[i + 1]].map((t): Point => [t * ux - at * uy, t * uy + at * ux]));
    }
  }
  return lines;
}

// stretches returns the runs of complete rows.
function stretches(data: (number | null)[][]): number[][][] {
  const runs: number[][][] = [];
  let run: number[][] = [];
  for (const row of data) {
    if (complete(row)) {
      if (run.length === 0) runs.push(run);
      run.push(row);
    } else {
      run = [];
    }
  }
  return runs;
}

// marks are the draw functions that an option may name.
export const marks: Record<string, (series: Marks) => Render> = { errorBar, intervalBar, band };

// decimals prints axis numbers: "decimals:2:-3" is v / 10^-3 with two decimals.
function decimals(digits: number, exponent: number): (v: number) => string {
  return (v) => {
    const text = (exponent < 0 ? v * 10 ** -exponent : v / 10 ** exponent).toFixed(digits);
    return Number(text) === 0 ? '0' : text.replace('-', '−');
  };
}

// printer returns the print function that an axis names, or undefined.
export function printer(name: string): ((v: number) => string) | undefined {
  const parts = /^decimals:(\d+):(-?\d+)$/.exec(name);
  return parts ? decimals(Number(parts[1]), Number(parts[2])) : undefined;
}
