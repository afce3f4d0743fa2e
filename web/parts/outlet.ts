// What leaves the page: files to save, and what is put on the clipboard.

import type { Desk } from "./desk";

/** Saves a file by the browser's own way. */
export function saveAs(name: string, type: string, content: string | Blob | Uint8Array<ArrayBuffer>): void {
  const url = URL.createObjectURL(content instanceof Blob ? content : new Blob([content], { type }));
  const link = document.createElement("a");
  link.href = url;
  link.download = name;
  link.click();
  // The browser takes the content later; it is given back once that is done.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}

/** An SVG document as PNG, at twice its size. */
export async function toPicture(svg: string, width: number, height: number): Promise<Blob> {
  const url = URL.createObjectURL(new Blob([svg], { type: "image/svg+xml" }));
  try {
    const image = new Image(width * 2, height * 2);
    image.src = url;
    await image.decode();
    const canvas = document.createElement("canvas");
    canvas.width = width * 2;
    canvas.height = height * 2;
    canvas.getContext("2d")!.drawImage(image, 0, 0, canvas.width, canvas.height);
    return await new Promise((resolve, reject) =>
      canvas.toBlob((blob) => (blob === null ? reject(new Error("the picture could not be made")) : resolve(blob)), "image/png"),
    );
  } finally {
    URL.revokeObjectURL(url);
  }
}

/** Puts a picture on the clipboard, or shows its text to be copied by hand. */
export async function copyPicture(desk: Desk, svg: string, width: number, height: number): Promise<void> {
  try {
    // The picture is handed over as a promise, since some browsers want the call at once.
    await navigator.clipboard.write([new ClipboardItem({ "image/png": toPicture(svg, width, height) })]);
    desk.tell("The picture is on the clipboard.");
  } catch {
    desk.byHand = svg;
    desk.lay({ sheet: "copy" });
  }
}

/** Puts a table on the clipboard, or shows it to be copied by hand. */
export async function copyTable(desk: Desk, head: string[], rows: string[][]): Promise<void> {
  const text = [head, ...rows].map((row) => row.map((cell) => cell.replace(/[\t\r\n]+/g, " ")).join("\t")).join("\n") + "\n";
  try {
    await navigator.clipboard.writeText(text);
    desk.tell("The table is on the clipboard.");
  } catch {
    desk.byHand = text;
    desk.lay({ sheet: "copy" });
  }
}
