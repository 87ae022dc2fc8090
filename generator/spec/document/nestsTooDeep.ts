/** No title holds as many open brackets, and the parser takes seconds over more. */
const mostOpen = 1000;

/**
 * Whether brackets, or list marks in one line, nest beyond any use. Only a guard of the parser's time and stack: it
 * knows nothing of quotes.
 */
export function nestsTooDeep(text: string): boolean {
  let open = 0;
  let marks = 0;
  for (let index = 0; index < text.length; index++) {
    const character = text[index];
    if (character === '[' || character === '{') open += 1;
    else if (character === ']' || character === '}') open = Math.max(0, open - 1);
    else if (character === '\n') marks = 0;
    else if ((character === '-' || character === '?' || character === ':') && text[index + 1] === ' ')
      marks += 1;
    if (open > mostOpen || marks > mostOpen) return true;
  }
  return false;
}
