// What passes between the page and its worker. Bytes are transferred, not copied.

/** To the worker: first the module, then one request after another. */
export type ToWorker =
  | { module: WebAssembly.Module }
  | { number: number; request: Uint8Array<ArrayBuffer>; attached: Uint8Array<ArrayBuffer>[] };

/** From the worker: that it lives, that the core has started, a reply, or the end. */
export type FromWorker =
  | { is: "alive" }
  | { is: "started" }
  | { is: "reply"; number: number; reply: Uint8Array<ArrayBuffer>; files: Uint8Array<ArrayBuffer>[] }
  | { is: "ended"; detail: string };

/** The buffers of some arrays, each once, as a transfer list demands. */
export function buffers(arrays: Uint8Array<ArrayBuffer>[]): ArrayBuffer[] {
  return [...new Set(arrays.map((array) => array.buffer))];
}
