// The entry of the page.

import { render } from "preact";

import "../style/page.css";
import { Desk } from "./desk";
import { listen } from "./intake";
import { listenToKeys } from "./keys";
import { Page } from "./page";

const root = document.getElementById("page")!;
const show = () => render(<Page desk={desk} />, root);
const desk: Desk = new Desk(() => show());

show();
listen(desk);
listenToKeys(desk);
addEventListener("beforeunload", (event) => {
  if (desk.unsaved) {
    event.preventDefault();
  }
});
void desk.demo().then(() => performance.mark("ready"));
