// Where the page finds the core and the worker's program: in text blocks of the
// page itself, or for the core, where the page is served in parts, at an address
// that its block names.

import { Decompress } from "fzstd";

function block(id: string): HTMLElement {
  const element = document.getElementById(id);
  if (element === null) {
    throw new Error(`the page has no block "${id}"`);
  }
  return element;
}

/** The program of the worker. */
export function workerSource(): string {
  return block("worker").textContent ?? "";
}

/** The core, compiled. */
export async function compiledCore(): Promise<WebAssembly.Module> {
  const element = block("core");
  const address = element.dataset["address"];
  if (address === undefined) {
    const packed = fromBase64(element.textContent ?? "");
    // The text has been decoded and is only a weight from here on.
    element.textContent = "";
    return WebAssembly.compileStreaming(new Response(unpacked(packed), { headers: { "Content-Type": "application/wasm" } }));
  }
  const response = await fetch(address);
  if (!response.ok) {
    throw new Error(`the core could not be had: ${response.status} ${response.statusText}`);
  }
  return response.headers.get("Content-Type") === "application/wasm" ? WebAssembly.compileStreaming(response) : WebAssembly.compile(await response.arrayBuffer());
}

/** How much is unpacked at a time, in packed bytes: the page is drawn, and the browser compiles, in between. */
const portion = 1 << 17;

/** The core in portions, unpacked from zstd. */
function unpacked(packed: Uint8Array<ArrayBuffer>): ReadableStream<Uint8Array<ArrayBuffer>> {
  let at = 0;
  let unpack: Decompress;
  return new ReadableStream({
    start(controller) {
      unpack = new Decompress((chunk, last) => {
        if (chunk.length > 0) {
          controller.enqueue(chunk as Uint8Array<ArrayBuffer>);
        }
        if (last === true) {
          controller.close();
        }
      });
    },
    async pull() {
      await new Promise((resolve) => setTimeout(resolve));
      const from = at;
      at = Math.min(at + portion, packed.length);
      unpack.push(packed.subarray(from, at), at === packed.length);
    },
  });
}

type Decoder = { fromBase64?: (text: string) => Uint8Array<ArrayBuffer> };

/** Decodes base64 without line breaks; text must have its padding. */
export function fromBase64(text: string, decoder: Decoder = Uint8Array as Decoder): Uint8Array<ArrayBuffer> {
  return decoder.fromBase64 === undefined ? fromBase64ByTable(text) : decoder.fromBase64(text);
}

const alphabet = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";

function fromBase64ByTable(text: string): Uint8Array<ArrayBuffer> {
  const value = new Uint8Array(128);
  for (let i = 0; i < alphabet.length; i++) {
    value[alphabet.charCodeAt(i)] = i;
  }
  const padding = text.endsWith("==") ? 2 : text.endsWith("=") ? 1 : 0;
  const bytes = new Uint8Array((text.length / 4) * 3 - padding);
  for (let from = 0, to = 0; from < text.length; from += 4) {
    // The mark of padding has the value 0, and a byte beyond the end is not kept.
    const group =
      (value[text.charCodeAt(from)]! << 18) |
      (value[text.charCodeAt(from + 1)]! << 12) |
      (value[text.charCodeAt(from + 2)]! << 6) |
      value[text.charCodeAt(from + 3)]!;
    bytes[to++] = group >> 16;
    bytes[to++] = group >> 8;
    bytes[to++] = group;
  }
  return bytes;
}
