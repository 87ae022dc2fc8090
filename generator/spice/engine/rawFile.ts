/** The contents of a SPICE raw file with real numbers. */
export interface RawFile {
  readonly title: string;
  /** As the engine writes them, lower case: `time`, `v(out)`, `i(l1)`. */
  readonly names: readonly string[];
  /** One column for each name, equally long. */
  readonly columns: readonly Float64Array[];
}

const HEADER_LIMIT_BYTES = 1_000_000;

/**
 * Reads a raw file, binary (little-endian doubles, as both engines write it) or ascii.
 *
 * @returns null where the bytes are no whole raw file of real numbers: cut short, empty, complex
 */
export function readRawFile(bytes: Uint8Array): RawFile | null {
  const head = new TextDecoder('latin1').decode(bytes.subarray(0, HEADER_LIMIT_BYTES));
  const marker = /^(Binary|Values):[ \t]*\r?\n/m.exec(head);
  if (marker === null) return null;
  const header = head.slice(0, marker.index);
  const variableCount = countIn(header, 'No. Variables');
  const pointCount = countIn(header, 'No. Points');
  const names = variableNames(header);
  if (!/^Flags:.*\breal\b/m.test(header) || names.length !== variableCount || variableCount === 0)
    return null;

  const bodyStart = marker.index + marker[0].length;
  const columns = names.map(() => new Float64Array(pointCount));
  const filled =
    marker[1] === 'Binary'
      ? fillFromBinary(columns, bytes.subarray(bodyStart), pointCount)
      : fillFromText(columns, new TextDecoder('latin1').decode(bytes.subarray(bodyStart)), pointCount);
  return filled ? { title: /^Title:[ \t]*(.*?)\s*$/m.exec(header)?.[1] ?? '', names, columns } : null;
}

function countIn(header: string, field: string): number {
  const line = header.split('\n').find((text) => text.startsWith(`${field}:`));
  const count = Number(line?.slice(field.length + 1));
  return Number.isSafeInteger(count) && count >= 0 ? count : 0;
}

function variableNames(header: string): string[] {
  const lines = header.split('\n');
  const rows = lines.slice(lines.findIndex((line) => line.startsWith('Variables:')) + 1);
  return rows.flatMap((row) => /^\s+\d+\s+(\S+)/.exec(row)?.[1]?.toLowerCase() ?? []);
}

function fillFromBinary(columns: readonly Float64Array[], body: Uint8Array, pointCount: number): boolean {
  if (body.byteLength < 8 * columns.length * pointCount) return false;
  const view = new DataView(body.buffer, body.byteOffset, body.byteLength);
  columns.forEach((column, variable) => {
    const stride = 8 * columns.length;
    for (let point = 0, at = 8 * variable; point < pointCount; point++, at += stride) {
      column[point] = view.getFloat64(at, true);
    }
  });
  return true;
}

/** Each point is its number, then one value for each variable, all separated by white space. */
function fillFromText(columns: readonly Float64Array[], body: string, pointCount: number): boolean {
  const words = body.split(/\s+/).filter((word) => word !== '');
  const perPoint = columns.length + 1;
  if (words.length < perPoint * pointCount) return false;
  columns.forEach((column, variable) => {
    for (let point = 0; point < pointCount; point++) {
      column[point] = Number(words[point * perPoint + variable + 1]);
    }
  });
  return true;
}
