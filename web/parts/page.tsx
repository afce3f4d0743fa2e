// The page: the sentence on top, the board beside the courses, the tray and
// the record below.

import { useEffect } from "preact/hooks";

import { TallyBoard } from "./board";
import { Claim, Spoken } from "./claim";
import { DeskContext } from "./context";
import { Courses } from "./course";
import { list, type Desk } from "./desk";
import { HatchPattern } from "./hatch";
import { goNext } from "./keys";
import { Record } from "./record";
import { Sheets } from "./sheet";
import { Tray } from "./tray";
import { Intake, Work } from "./work";

/** The mark: water over a weir, and the level that the engineer reads. */
function Mark() {
  return (
    <p class="mark">
      <svg width="24" height="22" viewBox="0 0 24 22" aria-hidden="true">
        <path d="M2 17H10L12 6L14 17H22" fill="none" stroke="currentColor" stroke-width="1.6" />
        <path d="M2 11.5H8M16 14H22" stroke="currentColor" stroke-width="1.6" stroke-dasharray="2 2" />
      </svg>
      Weirmark
    </p>
  );
}

export function Page({ desk }: { desk: Desk }) {
  const { view, layout } = desk;
  const root = document.documentElement;
  useEffect(() => {
    root.dataset["theme"] = layout.mono ? "light" : layout.theme;
    root.toggleAttribute("data-mono", layout.mono);
  }, [layout.theme, layout.mono]);

  if (view === undefined) {
    return (
      <div class="starting">
        <Mark />
        <p role="status">{desk.message === "" ? "The engine is starting." : desk.message}</p>
      </div>
    );
  }
  const next = () => void goNext(desk);
  const empty = list(view.courses).length === 0;
  return (
    <DeskContext.Provider value={desk}>
      <HatchPattern />
      <header>
        <div class="masthead">
          <Mark />
          <Intake />
        </div>
        <Claim view={view} next={next} />
        <div class="messages" role="alert">
          {[...(desk.message === "" ? [] : [desk.message]), ...list(view.notices)].map((text, i) => (
            <p key={i} class="message">
              {text}
            </p>
          ))}
        </div>
        {desk.slow && (
          <p class="message" role="status">
            The engine is still at work{desk.progress === undefined ? "" : `: ${Math.round(desk.progress.done / 1e6)} of ${Math.round(desk.progress.total / 1e6)} MB are read`}. <button onClick={() => desk.stop()}>Stop it</button> and go on with the study as it was before.
          </p>
        )}
        <Spoken text={view.spoken} />
      </header>
      <div class={"bench" + (layout.board ? " drawn" : "")}>
        <div class="side">
          <button class="drawer" aria-expanded={layout.board} onClick={() => desk.lay({ board: !layout.board })}>
            {layout.board ? "Put the tally board away" : "Tally board and the study"}
          </button>
          <div class="drawer-inside">
            <TallyBoard view={view} select={(cell) => void desk.ask({ kind: "select", cell })} />
            <Work />
          </div>
        </div>
        <main class="courses">
          {view.title !== "" && (
            <p class="title">
              {view.title}
              {view.purpose !== "" && <span class="quiet">. {view.purpose}</span>}
            </p>
          )}
          {!empty && <Courses view={view} />}
        </main>
      </div>
      <Tray view={view} />
      <Record view={view} />
      <Sheets view={view} />
    </DeskContext.Provider>
  );
}
