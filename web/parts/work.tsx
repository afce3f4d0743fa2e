// What can be done with the page as a whole, in sentences: there is no toolbar.

import { useRef } from "preact/hooks";

import { useDesk } from "./context";
import { mayLeave, take } from "./intake";
import { printMemo, saveMemo, saveStations, saveStudy } from "./memo";

/** How files come in. */
export function Intake() {
  const desk = useDesk();
  const files = useRef<HTMLInputElement>(null);
  const folder = useRef<HTMLInputElement>(null);
  const chosen = (input: HTMLInputElement) => {
    const all = Array.from(input.files ?? []);
    input.value = "";
    void take(desk, all);
  };
  return (
    <p class="intake">
      Drop simulated and measured tables anywhere, paste them, or choose <button onClick={() => files.current!.click()}>files</button> or{" "}
      <button onClick={() => folder.current!.click()}>a folder</button>, or <button onClick={() => desk.lay({ sheet: "typing" })}>type a table</button>.
      <input ref={files} id="files" type="file" multiple hidden onChange={(event) => chosen(event.currentTarget)} />
      <input
        ref={(element) => {
          folder.current = element;
          element?.setAttribute("webkitdirectory", "");
        }}
        id="folder"
        type="file"
        hidden
        onChange={(event) => chosen(event.currentTarget)}
      />
    </p>
  );
}

/** What is done with a study. */
export function Work() {
  const desk = useDesk();
  const document = useRef<HTMLInputElement>(null);
  const { mono, theme, letters } = desk.layout;
  return (
    <section class="work" aria-label="The study and the page">
      <p>
        <button onClick={() => void saveMemo(desk)}>Save the memo</button>, <button onClick={() => void printMemo(desk)}>print it</button>, or save{" "}
        <button onClick={() => void saveStations(desk)}>the stations</button> as a table.
      </p>
      <p>
        <button onClick={() => void saveStudy(desk)}>Save the study</button>
        {desk.unsaved ? " (it has changes)" : ""}, <button onClick={() => document.current!.click()}>open one</button>, begin{" "}
        <button onClick={() => mayLeave(desk) && void desk.blank()}>a new one</button>, or see <button onClick={() => mayLeave(desk) && void desk.demo()}>the demo</button>: one case, its whole campaign{" "}
        <button onClick={() => mayLeave(desk) && void desk.demo("received")}>as received</button> or{" "}
        <button onClick={() => mayLeave(desk) && void desk.demo("worked")}>worked through</button>.
        <input
          ref={document}
          id="study"
          type="file"
          accept=".json,application/json"
          hidden
          onChange={(event) => {
            const file = event.currentTarget.files?.[0];
            event.currentTarget.value = "";
            if (file !== undefined && mayLeave(desk)) {
              void file.arrayBuffer().then((bytes) => desk.open(file.name, new Uint8Array(bytes)));
            }
          }}
        />
      </p>
      <p>
        <button onClick={() => desk.lay({ sheet: "find" })}>Find</button> a number or a file, see the <button onClick={() => desk.lay({ sheet: "keys" })}>keys</button> or{" "}
        <button onClick={() => desk.lay({ sheet: "help" })}>how it computes</button>.
      </p>
      <p>
        The page is{" "}
        {(["auto", "light", "dark"] as const).map((one) => (
          <button key={one} aria-pressed={theme === one} onClick={() => void desk.show({ theme: one })}>
            {one === "auto" ? "as the system" : one}
          </button>
        ))}
        <button aria-pressed={mono} onClick={() => void desk.show({ mono: !mono })}>
          monochrome
        </button>
        ; letter keys are{" "}
        <button aria-pressed={letters} onClick={() => desk.lay({ letters: !letters })}>
          {letters ? "on" : "off"}
        </button>
      </p>
    </section>
  );
}
