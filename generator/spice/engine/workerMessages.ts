/** Owner → embedded engine's thread: run one deck. */
export interface RunRequest {
  readonly text: string;
  /** Files the deck includes by bare name, name → text. */
  readonly includes: Readonly<Record<string, string>>;
}

/** Embedded engine's thread → owner. */
export type WorkerMessage =
  /** The engine stands ready for its first deck; `banner` names its version. */
  | { readonly kind: 'ready'; readonly banner: string }
  /** The engine could not be loaded at all. */
  | { readonly kind: 'unavailable'; readonly reason: string }
  /** A line on the engine's standard error, sent while the run goes on: all there is of a run that never ends. */
  | { readonly kind: 'line'; readonly text: string }
  /** The engine gave up its whole program; nothing will follow. */
  | { readonly kind: 'gone'; readonly standardError: string; readonly log: string }
  /** The run is over; `raw` is its raw file, null where it wrote none. */
  | {
      readonly kind: 'finished';
      readonly raw: Uint8Array | null;
      readonly standardError: string;
      readonly log: string;
    };
