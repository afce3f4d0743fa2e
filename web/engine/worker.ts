// The program of the worker. It is bundled by itself and travels in the page as
// text, since a page opened from a file has no second file to start it from.

import { startCore, type Handle } from "./core";
import { buffers, type FromWorker, type ToWorker } from "./exchange";

interface WorkerScope {
  onmessage: ((event: MessageEvent<ToWorker>) => void) | null;
  postMessage(message: FromWorker, transfer?: Transferable[]): void;
}

/** Reads a file at once; it exists in workers only, and the page's types lack it. */
declare class FileReaderSync {
  readAsArrayBuffer(file: Blob): ArrayBuffer;
}

const scope = globalThis as unknown as WorkerScope & { weirmarkProgress(done: number, total: number): void };
scope.weirmarkProgress = (done, total) => scope.postMessage({ is: "progress", done, total });
let handle: Handle | undefined;

function ended(cause: unknown): void {
  scope.postMessage({ is: "ended", detail: cause instanceof Error ? cause.message : String(cause) });
}

scope.onmessage = ({ data }) => {
  if ("module" in data) {
    startCore(data.module).then((started) => {
      handle = started;
      scope.postMessage({ is: "started" });
    }, ended);
    return;
  }
  try {
    if (handle === undefined) {
      throw new Error("a request came before the core had started");
    }
    const attached = data.attached.map((one) => (one instanceof Blob ? new Uint8Array(new FileReaderSync().readAsArrayBuffer(one)) : one));
    const { reply, files } = handle(data.request, attached);
    scope.postMessage({ is: "reply", number: data.number, reply, files }, buffers([reply, ...files]));
  } catch (cause) {
    ended(cause);
  }
};

scope.postMessage({ is: "alive" });
