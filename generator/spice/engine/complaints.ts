/**
 * Lines on an engine's standard error that change nothing in the result: notes, progress, and the steps by
 * which an operating point is found. Everything else counts, since engines go on after lines such as
 * "not a valid resistor instance line, ignored!" or "resistance to low, set to 1 mOhm" and then deliver a
 * faultless run of another circuit.
 */
const HARMLESS: readonly RegExp[] = [
  /^Note:/,
  /^\s*Reference value/,
  /^Using (SPARSE|KLU)/,
  /^Warning: can't find the initialization file spinit/,
  /^Warning: \S+: no DC value, transient time 0 value used/,
  /^(Trying gmin|Supplies reduced)[^W]*(Note:.*)?$/,
  /^Warning: .*(gmin|source) stepping failed$/,
  /gmin increment$/,
];

/** The complaints among the lines of an engine's standard error, blank ones and harmless ones left out. */
export function complaintsIn(standardError: string): string[] {
  return standardError
    .split(/\r?\n|\r/)
    .map((line) => line.trimEnd())
    .filter((line) => line !== '' && !HARMLESS.some((pattern) => pattern.test(line)));
}
