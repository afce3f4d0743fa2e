// A stack has a segment for each course, the first lowest. Fill and form tell
// the states apart, no colour does.

import type { State } from "../engine/types";

const height = 6;
const step = 7.5;

export function Stack({ courses, width }: { courses: State[]; width: number }) {
  return (
    <svg class="stack" width={width} height={courses.length * step} aria-hidden="true">
      {courses.map((state, i) => (
        <rect key={i} class={state} x="0.5" y={(courses.length - 1 - i) * step + 0.75} width={width - 1} height={height - 0.5} />
      ))}
    </svg>
  );
}
