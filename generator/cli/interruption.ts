/** The work's result, or `interrupted` as soon as the signal comes; the work itself is left to end or not. */
export async function unlessInterrupted<T>(
  work: Promise<T>,
  signal: AbortSignal | undefined,
): Promise<T | 'interrupted'> {
  if (signal === undefined) return work;
  if (signal.aborted) return 'interrupted';
  let onAbort = () => {};
  const aborted = new Promise<'interrupted'>((resolve) => {
    onAbort = () => resolve('interrupted');
    signal.addEventListener('abort', onAbort, { once: true });
  });
  try {
    return await Promise.race([work, aborted]);
  } finally {
    signal.removeEventListener('abort', onAbort);
  }
}
