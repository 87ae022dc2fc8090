/** What the process tells its caller. */
export const exitCodes = {
  good: 0,
  /** No circuit for a sound specification, or a rule or the simulation says no. */
  no: 1,
  /** Bad input or usage; nothing written. */
  refused: 2,
  /** Disk, engine, or a fault of the program itself. */
  machine: 3,
  SIGINT: 130,
  SIGTERM: 143,
} as const;

export type ExitCode = (typeof exitCodes)[keyof typeof exitCodes];

export function exitCodeOf(signal: AbortSignal | undefined): ExitCode {
  return signal?.reason === 'SIGTERM' ? exitCodes.SIGTERM : exitCodes.SIGINT;
}
