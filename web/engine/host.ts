// Where the core runs: in a worker, or in the page's own thread where the
// browser refuses a worker. Both take one request at a time.

import { startCore } from "./core";
import { buffers, type Attached, type FromWorker, type ToWorker } from "./exchange";

export interface Host {
  /** Hands over one request; its bytes may be gone afterwards. */
  send(number: number, request: Uint8Array<ArrayBuffer>, attached: Attached[]): void;
  /** Stops the core wherever it is and gives its memory back, or says that it cannot. */
  stop(): boolean;
}

export interface Listener {
  reply(number: number, reply: Uint8Array<ArrayBuffer>, files: Uint8Array<ArrayBuffer>[]): void;
  /** So many bytes of a file are read of all. */
  progress(done: number, total: number): void;
  /** The core has ended by itself; the host is of no more use. */
  ended(detail: string): void;
}

/** The browser started no worker; the page's thread has to do. */
class NoWorker extends Error {}

/** How long a worker may take to say that it lives before the page does without. */
const patience = 5000;

/** Starts the core in a worker, or here where there is none to be had. */
export async function openHost(module: WebAssembly.Module, source: string, listener: Listener): Promise<Host> {
  try {
    return await inWorker(module, source, listener);
  } catch (cause) {
    if (!(cause instanceof NoWorker)) {
      throw cause;
    }
    return inPage(module, listener);
  }
}

function startWorker(source: string): Worker {
  const url = URL.createObjectURL(new Blob([source], { type: "text/javascript" }));
  try {
    return new Worker(url);
  } catch (cause) {
    URL.revokeObjectURL(url);
    throw new NoWorker(String(cause));
  }
}

function inWorker(module: WebAssembly.Module, source: string, listener: Listener): Promise<Host> {
  const worker = startWorker(source);
  const post = (message: ToWorker, transfer: Transferable[]) => worker.postMessage(message, transfer);
  const host: Host = {
    send(number, request, attached) {
      post({ number, request, attached }, buffers([request, ...attached]));
    },
    stop() {
      worker.onmessage = worker.onerror = null;
      worker.terminate();
      return true;
    },
  };
  return new Promise((resolve, reject) => {
    let started = false;
    const refuse = (cause: Error) => {
      clearTimeout(timer);
      host.stop();
      reject(cause);
    };
    const timer = setTimeout(() => refuse(new NoWorker("the worker gave no sign of life")), patience);
    let alive = false;

    worker.onerror = (event) => {
      event.preventDefault();
      const detail = event.message || "the worker failed";
      if (started) {
        listener.ended(detail);
      } else {
        refuse(alive ? new Error(detail) : new NoWorker(detail));
      }
    };
    worker.onmessage = ({ data }: MessageEvent<FromWorker>) => {
      switch (data.is) {
        case "alive":
          alive = true;
          clearTimeout(timer);
          try {
            post({ module }, []);
          } catch (cause) {
            refuse(new NoWorker(String(cause)));
          }
          return;
        case "started":
          started = true;
          resolve(host);
          return;
        case "reply":
          listener.reply(data.number, data.reply, data.files);
          return;
        case "progress":
          listener.progress(data.done, data.total);
          return;
        case "ended":
          if (started) {
            listener.ended(data.detail);
          } else {
            refuse(new Error(data.detail));
          }
      }
    };
  });
}

async function inPage(module: WebAssembly.Module, listener: Listener): Promise<Host> {
  const handle = await startCore(module);
  return {
    send(number, request, attached) {
      // Later, so that the page can show that it is at work.
      setTimeout(async () => {
        try {
          const bytes = await Promise.all(attached.map(async (one) => (one instanceof Blob ? new Uint8Array(await one.arrayBuffer()) : one)));
          const { reply, files } = handle(request, bytes);
          listener.reply(number, reply, files);
        } catch (cause) {
          listener.ended(cause instanceof Error ? cause.message : String(cause));
        }
      });
    },
    stop: () => false,
  };
}
