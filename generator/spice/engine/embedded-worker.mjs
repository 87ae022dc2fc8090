/**
 * The thread in which the embedded engine lives; speaks the messages of workerMessages.ts.
 *
 * Plain JavaScript on purpose: a worker needs a file that Node runs as it is, from the sources under test
 * and from `dist`, into which the build copies it unchanged.
 *
 * @import { RunRequest, WorkerMessage } from './workerMessages.ts'
 */
import { parentPort } from 'node:worker_threads';

const WASM_IN_URL = 'data:application/wasm;base64,';
/** An empty raw file: what the engine's own reader is given in place of the real one. */
const EMPTY_RAW = new TextEncoder().encode(
  'Title: -\nPlotname: -\nFlags: real\nNo. Variables: 0\nNo. Points: 0\nVariables:\nBinary:\n',
);
/** After these lines the engine's promise never settles. */
const LAST_WORDS = /fatal error in ngspice|^Aborted\(/;
/** A run that complains at every time step must not flood its owner. */
const LINES_PER_RUN = 200;

/** @param {WorkerMessage} message @param {ArrayBuffer[]} [transfer] */
const post = (message, transfer = []) => parentPort?.postMessage(message, transfer);

/**
 * The engine carries its 6 MB of WebAssembly as a base64 URL, which `URL` and `fetch` take 0.6 s to digest
 * and `Buffer` 2 ms. Only that one URL is short-cut; were it spelt otherwise, all would work, slower.
 */
function loadWasmQuickly() {
  const { URL: slowUrl, fetch: slowFetch } = globalThis;
  const slowInstantiate = WebAssembly.instantiateStreaming;
  globalThis.URL = new Proxy(slowUrl, {
    construct: (target, [text, ...base]) =>
      typeof text === 'string' && text.startsWith(WASM_IN_URL)
        ? { protocol: 'data:', href: text, toString: () => text }
        : new target(text, ...base),
  });
  globalThis.fetch = async (resource, options) => {
    const text = typeof resource === 'string' ? resource : (resource?.href ?? '');
    return text.startsWith(WASM_IN_URL)
      ? Buffer.from(text.slice(WASM_IN_URL.length), 'base64')
      : slowFetch(resource, options);
  };
  WebAssembly.instantiateStreaming = async (source, imports) => {
    const loaded = await source;
    return Buffer.isBuffer(loaded)
      ? instantiateWithCheapClock(loaded, imports)
      : slowInstantiate(loaded, imports);
  };
}

/**
 * The engine asks for the time several times per iteration, and each question costs a system call and three
 * conversions: a third of a run. It only prints what it learns, so a clock that moves now and then will do.
 *
 * @param {Buffer} bytes @param {WebAssembly.Imports} imports
 */
async function instantiateWithCheapClock(bytes, imports) {
  let words = new BigInt64Array();
  let time_ns = 0n;
  let calls = 0;
  let memory = null;
  const clock_time_get = (_clock, _precision, address) => {
    // A memory that has grown leaves its old views empty.
    if (words.length === 0) words = new BigInt64Array(memory.buffer);
    if (calls % 4096 === 0) time_ns = process.hrtime.bigint();
    calls += 1;
    words[address >> 3] = time_ns;
    return 0;
  };
  const made = await WebAssembly.instantiate(bytes, {
    ...imports,
    wasi_snapshot_preview1: { ...imports.wasi_snapshot_preview1, clock_time_get },
  });
  memory = made.instance.exports.memory;
  return made;
}

/**
 * The engine writes 2 MB of model cards into its file system at every start, character by character;
 * encoded beforehand they are copied in one go.
 */
function encodeTextQuickly(files) {
  const writeFile = files.writeFile;
  const encoder = new TextEncoder();
  files.writeFile = (path, data, options) =>
    writeFile(path, typeof data === 'string' ? encoder.encode(data) : data, options);
}

/** Calls `use` with the engine's file system the moment there is one, before the engine writes to it. */
function onceThereAreFiles(simulation, use) {
  let made = null;
  Object.defineProperty(simulation, 'spiceModule', {
    get: () => made,
    set: (module) => {
      made = module;
      use(module.FS);
    },
  });
}

/** Starts the engine and returns a function that runs one request after the other. */
async function start() {
  loadWasmQuickly();
  const { Simulation } = await import('eecircuit-engine');
  const simulation = new Simulation();
  let lines = 0;
  // The engine reports each line of its standard error here at once, also in runs that never end.
  console.error = (text) => {
    lines += 1;
    if (lines <= LINES_PER_RUN) post({ kind: 'line', text: String(text) });
    if (LAST_WORDS.test(String(text))) post({ kind: 'gone', ...said() });
  };
  const said = () => ({ standardError: simulation.getError().join('\n'), log: simulation.getInfo() });
  let files = null;
  let raw = null;
  onceThereAreFiles(simulation, (found) => {
    files = found;
    encodeTextQuickly(files);
    const readFile = files.readFile;
    // The engine ends every run, failed ones too, by reading `out.raw`; without the file its promise never
    // settles, and with it every number is parsed twice into boxed lists. So the bytes are taken here.
    files.readFile = (path, ...options) => {
      if (path !== 'out.raw') return readFile(path, ...options);
      raw = files.analyzePath(path).exists ? readFile(path) : null;
      return EMPTY_RAW;
    };
  });
  await simulation.start();

  let leftovers = [];
  /** @param {RunRequest} request */
  const run = async ({ text, includes }) => {
    // A stale raw file would pass for the result of a deck that failed; a stale include for one of its own.
    for (const name of [...leftovers, 'out.raw']) if (files.analyzePath(name).exists) files.unlink(name);
    leftovers = Object.keys(includes);
    for (const name of leftovers) files.writeFile(name, includes[name]);
    lines = 0;
    simulation.setNetList(text);
    await simulation.runSim();
    post({ kind: 'finished', raw, ...said() }, raw === null ? [] : [raw.buffer]);
  };
  post({ kind: 'ready', banner: simulation.getInitInfo() });
  return run;
}

try {
  const run = await start();
  parentPort?.on('message', run);
} catch (error) {
  post({ kind: 'unavailable', reason: error instanceof Error ? error.message : String(error) });
}
