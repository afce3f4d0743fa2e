// A course of evidence: a question, its answer, a picture, a few numbers and
// what stands behind them; in the margin its doubts. Doubts fall downward: the
// left edge is hatched where the course, or one below it, is in doubt.

import { useState } from "preact/hooks";

import type { Course, View } from "../engine/types";
import { Folded } from "./aside";
import { DoubtOf } from "./doubt";
import { Exclusion, ExclusionsOf } from "./exclusion";
import { useDesk } from "./context";
import { inCell, list } from "./desk";
import { FigureOf, FoldedFigure } from "./figure";
import { Hatch } from "./hatch";
import { openCourse } from "./jump";
import { Lists } from "./lists";
import { SourceLines } from "./source";
import { FoldedTable } from "./table";
import { Veil } from "./veil";
import { Words } from "./words";

export function Courses({ view }: { view: View }) {
  const courses = list(view.courses);
  const first = courses.findIndex((course) => course.state !== "settled");
  return (
    <>
      {courses.map((course, i) => (
        <CourseOf key={i} view={view} course={course} place={i} doubtful={first >= 0 && i >= first} />
      ))}
    </>
  );
}

interface Shown {
  view: View;
  course: Course;
  place: number;
  doubtful: boolean;
}

function CourseOf({ view, course, place, doubtful }: Shown) {
  const desk = useDesk();
  const open = desk.layout.open[place]!;
  const doubts = list(course.doubts);
  const veiled = view.veiled && place >= 3;
  const id = `course-${place + 1}`;
  const toggle = () => (open ? desk.lay({ open: desk.layout.open.map((one, i) => one && i !== place) }) : openCourse(desk, place));
  return (
    <section class={"course" + (open ? "" : " folded")} aria-labelledby={id} data-state={course.state}>
      <div class="edge">{doubtful && <Hatch className="doubt-stroke" />}</div>
      <div class="body">
        <h2>
          <button id={id} aria-expanded={open} onClick={toggle}>
            {course.question}
          </button>
        </h2>
        <p class="answer">
          <Words text={course.answer} />
        </p>
        {open && !veiled && <Evidence view={view} course={course} place={place} />}
        {open && veiled && place === 3 && <Veil view={view} />}
        {open && <Lists view={view} place={place} />}
      </div>
      <div class="margin">
        {!open && doubts.length > 0 ? (
          <p class="doubt">{doubts.length === 1 ? "1 doubt" : `${doubts.length} doubts`}</p>
        ) : (
          <Folded most={4} what="doubts">
            {doubts.map((doubt, i) => (
              <DoubtOf key={doubt.target.field + i} doubt={doubt} />
            ))}
          </Folded>
        )}
        {open && (
          <Folded most={2} what="notes">
            {list(course.notes).map((note, i) => (
              <p key={i} class="note">
                <Words text={note} />
              </p>
            ))}
          </Folded>
        )}
      </div>
    </section>
  );
}

/** Pictures, numbers and tables of a course. */
function Evidence({ view, course, place }: { view: View; course: Course; place: number }) {
  const desk = useDesk();
  const tables = list(course.tables);
  const stations = place === 3 && tables[0] !== undefined && list(tables[0].rows).length > 1 ? tables[0] : undefined;
  const rows = list(stations?.rows).map(list);
  const [at, setAt] = useState<number | undefined>(undefined);
  const [excluding, setExcluding] = useState(false);
  const row = at === undefined ? undefined : rows[Math.min(at, rows.length - 1)];

  const step = (event: KeyboardEvent) => {
    if (event.key === "x" && row !== undefined) {
      event.preventDefault();
      setExcluding(true);
      return;
    }
    if (event.key === "w" && at !== undefined && desk.layout.letters) {
      event.preventDefault();
      void desk.walk(inCell(view, `stations.${Math.min(at, rows.length - 1)}.e`));
      return;
    }
    const by = event.key === "ArrowRight" ? 1 : event.key === "ArrowLeft" ? -1 : 0;
    if (by !== 0) {
      event.preventDefault();
      event.stopPropagation();
      const next = at === undefined ? (by > 0 ? 0 : rows.length - 1) : at + by * (event.shiftKey ? 5 : 1);
      setAt(Math.min(rows.length - 1, Math.max(0, next)));
    }
  };
  const keys = stations === undefined ? undefined : step;
  const [first, ...further] = list(course.figures);
  const x = row === undefined ? undefined : Number(row[0]!.replace("−", "-"));
  return (
    <>
      {first !== undefined && <FigureOf key={first.figure.id} figure={first.figure} at={x} onKeyDown={keys} />}
      {stations !== undefined && (
        <p class="ledger" role="status">
          {row === undefined
            ? "Put the focus on the picture: the arrow keys go from station to station, x excludes one, w walks back from it."
            : list(stations.head).map((name, i) => (
                <span key={i}>
                  <Words text={name} /> <b>{row[i]}</b>
                </span>
              ))}
        </p>
      )}
      {stations !== undefined && row !== undefined && (
        <Exclusion view={view} line={row[list(stations.head).indexOf("line")]!} asking={excluding} ask={setExcluding} />
      )}
      {place === 3 && <ExclusionsOf view={view} />}
      {list(course.numbers).length > 0 && (
        <dl class="numbers">
          {list(course.numbers)
            .slice(0, 3)
            .map(({ value, name }) => (
              <div key={name}>
                <dt>
                  <Words text={name} />
                </dt>
                <dd>{value}</dd>
              </div>
            ))}
        </dl>
      )}
      {further.map(({ figure }) => (
        <FoldedFigure key={figure.id} figure={figure} at={x} onKeyDown={keys} />
      ))}
      {tables.map((table, i) => (
        <FoldedTable
          key={table.title + i}
          title={table.title}
          head={list(table.head)}
          rows={list(table.rows).map(list)}
          at={table === stations ? at : undefined}
          choose={table === stations ? setAt : undefined}
        />
      ))}
      {place === 1 && <SourceLines view={view} of={["numerical"]} />}
      {place === 2 && <SourceLines view={view} of={["data", "input"]} />}
    </>
  );
}
