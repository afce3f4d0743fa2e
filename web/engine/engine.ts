// The engine is the page's one way to the core: numbered requests, one at work
// and the others waiting in order; cancel; and a new start with the last study
// where the core has ended.

import type { Attached } from "./exchange";
import { openHost, type Host } from "./host";
import { compiledCore, workerSource } from "./source";
import type * as message from "./types";

/** A request without the fields that the engine fills in. */
export type Request = Omit<message.Request, "protocol" | "number">;

/** Version of the shape of requests; core/message holds the same number. */
const protocol = 1;

export type State =
  /** The core is being started. */
  | "starting"
  /** Nothing is asked. */
  | "ready"
  /** A request is at work. */
  | "busy"
  /** The core had to be started anew; the message says why. Starting follows. */
  | "restarted"
  /** The core cannot be started; the message says what to do. */
  | "stopped";

export interface Change {
  state: State;
  /** A sentence for the reader, or empty. */
  message: string;
}

export interface Reply<R extends object = message.Reply> {
  reply: R;
  files: Uint8Array<ArrayBuffer>[];
}

/** A request was given up, by cancel or since the core has ended. */
export class Interrupted extends Error {
  constructor(
    message: string,
    /** What the core said last, for a report to its makers; empty after cancel. */
    readonly detail = "",
  ) {
    super(message);
  }
}

export interface Options {
  /** The request that opens a remembered study in a new core. */
  reopen(study: Uint8Array<ArrayBuffer>): { request: Request; files: Uint8Array<ArrayBuffer>[] };
}

interface Waiting {
  number: number;
  request: Request;
  files: Attached[];
  resolve(reply: Reply<never>): void;
  reject(cause: Error): void;
}

export class Engine {
  #options: Options;
  #listeners = new Set<(change: Change) => void>();
  #change: Change = { state: "starting", message: "" };
  #module: Promise<WebAssembly.Module> | undefined;
  #host: Host | undefined;
  #study: Uint8Array<ArrayBuffer> | undefined;
  #last = 0;
  #queue: Waiting[] = [];
  #atWork: Waiting | undefined;
  // The request that opens the remembered study; it is the engine's own and is not given up.
  #opening: Waiting | undefined;
  // Each start of the core has its own number: what an earlier one still says is not heard.
  #start = 0;

  constructor(options: Options) {
    this.#options = options;
    void this.#open();
  }

  /** Hears how many bytes of a large file are read of all. */
  progress: (done: number, total: number) => void = () => {};

  /** What the engine does now. */
  get change(): Change {
    return this.#change;
  }

  /** The bytes given to remember last. */
  get study(): Uint8Array<ArrayBuffer> | undefined {
    return this.#study;
  }

  /** Calls the listener at once and after each change, until the returned function is called. */
  watch(listener: (change: Change) => void): () => void {
    this.#listeners.add(listener);
    listener(this.#change);
    return () => this.#listeners.delete(listener);
  }

  /**
   * Asks the core. Bytes are given away: they move to the worker.
   * Rejects with Interrupted where no reply will come.
   */
  ask<R extends object = message.Reply>(request: Request, files: Attached[] = []): Promise<Reply<R>> {
    if (this.#change.state === "stopped") {
      return Promise.reject(new Interrupted(this.#change.message));
    }
    return new Promise((resolve, reject) => {
      this.#queue.push({ number: ++this.#last, request, files, resolve, reject });
      this.#next();
    });
  }

  /** Keeps the study that a new core opens first; the bytes are kept as they are and must not be changed. */
  remember(study: Uint8Array<ArrayBuffer>): void {
    this.#study = study;
  }

  /**
   * Gives up what is asked. A worker at work is ended and a new one started with
   * the last study; in the page's own thread only what still waits can be given up.
   */
  cancel(): void {
    const given = this.#queue.splice(0);
    if (this.#atWork !== undefined && this.#atWork !== this.#opening && this.#host?.stop() === true) {
      given.unshift(this.#atWork);
      this.#restart("Cancelled; the engine was started again.");
    }
    for (const waiting of given) {
      waiting.reject(new Interrupted("Cancelled."));
    }
  }

  /** Starts the core, opens the remembered study in it and goes on with what waits. */
  async #open(): Promise<void> {
    const start = ++this.#start;
    this.#tell("starting");
    try {
      this.#module ??= compiledCore();
      const module = await this.#module;
      if (start !== this.#start) {
        return;
      }
      const host = await openHost(module, workerSource(), {
        reply: (number, reply, files) => start === this.#start && this.#reply(number, reply, files),
        progress: (done, total) => start === this.#start && this.progress(done, total),
        ended: (detail) => start === this.#start && this.#ended(detail),
      });
      if (start !== this.#start) {
        host.stop();
        return;
      }
      this.#host = host;
    } catch (cause) {
      if (start === this.#start) {
        this.#stopped(`The engine could not be started (${String(cause)}). Please reload the page.`);
      }
      return;
    }
    this.#opening = this.#study && this.#reopening(this.#study);
    if (this.#opening !== undefined) {
      this.#queue.unshift(this.#opening);
    }
    this.#next();
  }

  /** The request that opens the remembered study, ahead of all that wait. */
  #reopening(study: Uint8Array<ArrayBuffer>): Waiting {
    const { request, files } = this.#options.reopen(new Uint8Array(study));
    const stop = () =>
      this.#stopped("The engine stopped again while opening the last study. Please save the study and reload the page.");
    return { number: ++this.#last, request, files, resolve: () => {}, reject: stop };
  }

  /** Sends the next request, where the core is free. */
  #next(): void {
    if (this.#host === undefined || this.#atWork !== undefined) {
      return;
    }
    const waiting = this.#queue.shift();
    if (waiting === undefined) {
      this.#tell("ready");
      return;
    }
    this.#atWork = waiting;
    this.#tell("busy");
    const { number, request, files } = waiting;
    const text = JSON.stringify({ protocol, number, ...request });
    this.#host.send(number, new TextEncoder().encode(text), files);
  }

  #reply(number: number, reply: Uint8Array<ArrayBuffer>, files: Uint8Array<ArrayBuffer>[]): void {
    const waiting = this.#atWork;
    if (waiting?.number !== number) {
      this.#ended(`a reply to ${number} came while ${waiting?.number} was at work`);
      return;
    }
    this.#atWork = undefined;
    try {
      waiting.resolve({ reply: JSON.parse(new TextDecoder().decode(reply)) as never, files });
    } catch (cause) {
      waiting.reject(new Interrupted("The engine gave a reply that cannot be read.", String(cause)));
    }
    this.#next();
  }

  /** The core has ended by itself: what it was at is lost, the others wait on. */
  #ended(detail: string): void {
    const message =
      this.#study === undefined
        ? "The engine stopped at the last step and was started again."
        : "The engine stopped at the last step and was started again with the study as it was before.";
    const lost = this.#atWork;
    this.#host?.stop();
    lost?.reject(new Interrupted(message, detail));
    if (lost === undefined || lost !== this.#opening) {
      this.#restart(message);
    }
  }

  #restart(message: string): void {
    this.#host = undefined;
    this.#atWork = undefined;
    this.#tell("restarted", message);
    void this.#open();
  }

  #stopped(message: string): void {
    this.#host = undefined;
    this.#atWork = undefined;
    this.#tell("stopped", message);
    for (const waiting of this.#queue.splice(0)) {
      waiting.reject(new Interrupted(message));
    }
  }

  #tell(state: State, message = ""): void {
    if (state === this.#change.state && message === this.#change.message) {
      return;
    }
    this.#change = { state, message };
    for (const listener of this.#listeners) {
      listener(this.#change);
    }
  }
}
