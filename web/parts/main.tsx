// The entry of the page.

import { render } from "preact";
import { Engine } from "../engine/engine";

const engine = new Engine({ reopen: (study) => ({ request: { kind: "open", names: ["study"] }, files: [study] }) });
const root = document.getElementById("page")!;

function Text({ text }: { text: string }) {
  return <p>{text}</p>;
}

engine.ask({ kind: "about" }).then(
  ({ reply }) => {
    render(<Text text={JSON.stringify(reply.about)} />, root);
    performance.mark("ready");
    document.documentElement.dataset["state"] = "ready";
  },
  (cause: Error) => {
    render(<Text text={cause.message} />, root);
    document.documentElement.dataset["state"] = "stopped";
  },
);
