import type { CommandFileSystem, Input } from '../Surroundings.ts';

/** More than any reader here accepts; what comes after is not even looked at, be the source endless. */
export const mostBytes = 2 * 1024 * 1024;

/** A file's first bytes, up to the bound. */
export async function readFileBytes(path: string, fs: CommandFileSystem): Promise<Uint8Array> {
  const file = await fs.open(path, 'r');
  try {
    const buffer = new Uint8Array(mostBytes);
    let filled = 0;
    while (filled < mostBytes) {
      const { bytesRead } = await file.read(buffer, filled, mostBytes - filled, null);
      if (bytesRead === 0) break;
      filled += bytesRead;
    }
    return buffer.subarray(0, filled);
  } finally {
    await file.close();
  }
}

/** A stream's first bytes, up to the bound. */
export async function readStreamBytes(stream: Input): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let filled = 0;
  for await (const chunk of stream) {
    const bytes = typeof chunk === 'string' ? new TextEncoder().encode(chunk) : chunk;
    chunks.push(bytes);
    filled += bytes.length;
    if (filled >= mostBytes) break;
  }
  return joined(chunks, filled);
}

function joined(chunks: readonly Uint8Array[], length: number): Uint8Array {
  const whole = new Uint8Array(length);
  let at = 0;
  for (const chunk of chunks) {
    whole.set(chunk, at);
    at += chunk.length;
  }
  return whole;
}
