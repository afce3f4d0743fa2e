// What passes between the page and its worker. Bytes are transferred, not copied;
// a large file goes as itself, and whoever runs the core reads it.

/** Bytes, or a file that holds them. */
export type Attached = Uint8Array<ArrayBuffer> | Blob;

/** To the worker: first the module, then one request after another. */
export type ToWorker =
  | { module: WebAssembly.Module }
  | { number: number; request: Uint8Array<ArrayBuffer>; attached: Attached[] };

/** From the worker: that it lives, that the core has started, a reply, or the end. */
export type FromWorker =
  | { is: "alive" }
  | { is: "started" }
  | { is: "reply"; number: number; reply: Uint8Array<ArrayBuffer>; files: Uint8Array<ArrayBuffer>[] }
  | { is: "progress"; done: number; total: number }
  | { is: "ended"; detail: string };

/** The buffers of what holds bytes, each once, as a transfer list demands. */
export function buffers(attached: Attached[]): ArrayBuffer[] {
  return [...new Set(attached.flatMap((one) => (one instanceof Blob ? [] : [one.buffer])))];
}
