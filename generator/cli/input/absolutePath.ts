/** A user's path from where the command was started. */
export function absolutePath(path: string, cwd: string): string {
  const isAbsolute = path.startsWith('/') || path.startsWith('\\') || /^[A-Za-z]:/.test(path);
  return isAbsolute ? path : `${cwd}/${path}`;
}
