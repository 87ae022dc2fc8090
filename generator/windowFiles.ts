import { jsonDocument } from './emit/text/jsonDocument.ts';
import { windowCsv } from './emit/windowCsv.ts';
import { windowDocument } from './emit/windowDocument.ts';
import type { Window } from './loop/Window.ts';

/** What `window` adds to a set of files. */
export function windowFiles(window: Window): ReadonlyMap<string, string> {
  const document = windowDocument(window);
  return new Map([
    ['window.csv', windowCsv(document)],
    ['window.json', jsonDocument(document)],
  ]);
}
