/**
 * One spelling for what people type in several: no-break and thin spaces, the micro signs U+00B5 and U+03BC, the
 * ohm signs U+2126 and U+03A9, the minus U+2212, and the tolerance signs `+/-` and `+-`.
 */
export function normaliseText(text: string): string {
  return text
    .replace(/[\s\u2000-\u200a\u202f\u205f\u3000]+/g, ' ')
    .replace(/[\u00b5\u03bc]/g, 'u')
    .replace(/[\u2126\u03a9]/g, 'Ohm')
    .replace(/\u2212/g, '-')
    .replace(/\+ ?\/ ?-|\+-/g, '±')
    .trim();
}
