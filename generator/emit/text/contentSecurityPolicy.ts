/** The exact text between the tags of each inline script and style of a page. */
export interface InlineCode {
  readonly scripts: readonly string[];
  readonly styles: readonly string[];
}

/**
 * Content of the policy's meta element: our own inline code by its hash, images as data, nothing else.
 *
 * Blocks every element, handler and `style` attribute that slipped in through someone's words.
 * Put the element before the first script or style; it does not reach back.
 * @throws RangeError when code holds its own closing tag or a carriage return, which a browser
 *   would read differently from what was hashed
 */
export async function contentSecurityPolicy({ scripts, styles }: InlineCode): Promise<string> {
  return [
    "default-src 'none'",
    'img-src data:',
    `script-src ${await sources(scripts, 'script')}`,
    `style-src ${await sources(styles, 'style')}`,
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
}

async function sources(codes: readonly string[], element: string): Promise<string> {
  const closing = new RegExp(`</${element}|\r`, 'i');
  if (codes.some((code) => closing.test(code))) {
    throw new RangeError(`inline ${element} holds its closing tag or a carriage return`);
  }
  const hashes = await Promise.all(codes.map(sha256Base64));
  return hashes.length === 0 ? "'none'" : hashes.map((hash) => `'sha256-${hash}'`).join(' ');
}

/** Web Crypto, for browsers and Node alike have it as a global. */
async function sha256Base64(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return btoa(String.fromCharCode(...new Uint8Array(digest)));
}
