// The core as a program of this thread: it is started from a compiled module
// and then answers through one function. The worker uses this file, and so does
// the page where a browser refuses workers.

export interface Answer {
  reply: Uint8Array<ArrayBuffer>;
  files: Uint8Array<ArrayBuffer>[];
}

export type Handle = (request: Uint8Array, attached: Uint8Array[]) => Answer;

/** The program has ended by a panic or a lack of memory; only a new one helps. */
export class CoreEnded extends Error {}

interface Program {
  importObject: WebAssembly.Imports;
  exit: (status: number) => void;
  run(instance: WebAssembly.Instance): Promise<void>;
}

interface Scope {
  Go: new () => Program;
  fs: { writeSync(descriptor: number, bytes: Uint8Array): number };
  weirmarkHandle?: (request: Uint8Array, attached: Uint8Array[]) => Answer | undefined;
}

/** Starts the core and returns its one function. */
export async function startCore(module: WebAssembly.Module): Promise<Handle> {
  await import("go:wasm_exec");
  const scope = globalThis as unknown as Scope;

  // What the program prints is the text of a panic: it goes into the error that
  // the caller gets, not to a console that nobody reads.
  let said = "";
  const decoder = new TextDecoder();
  scope.fs.writeSync = (_descriptor, bytes) => {
    said += decoder.decode(bytes);
    return bytes.length;
  };

  const program = new scope.Go();
  program.exit = () => {};
  Reflect.deleteProperty(scope, "weirmarkHandle");
  const instance = await WebAssembly.instantiate(module, program.importObject);
  const failed = (cause: unknown) => new CoreEnded(said.trim() || String(cause));

  // The program runs until it has registered its function, all in this call.
  let broken: unknown;
  program.run(instance).catch((cause: unknown) => (broken = cause));
  const registered = scope.weirmarkHandle;
  if (registered === undefined) {
    await Promise.resolve();
    throw failed(broken ?? "the core did not start");
  }

  return (request, attached) => {
    let answer: Answer | undefined;
    try {
      answer = registered(request, attached);
    } catch (cause) {
      throw failed(cause);
    }
    if (answer === undefined) {
      throw failed("the core ended without a reply");
    }
    return answer;
  };
}
