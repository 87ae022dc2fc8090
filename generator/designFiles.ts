import type { SizedDesign } from './circuit/SizedDesign.ts';
import { billOfMaterialsCsv } from './emit/billOfMaterials.ts';
import { deckSet } from './emit/deckSet.ts';
import type { Result } from './emit/resultSchema.ts';
import { jsonDocument } from './emit/text/jsonDocument.ts';
import { reportPage } from './report/reportPage.ts';
import type { Waveforms } from './spice/Deck.ts';

/**
 * Every file of a design's set but the manifest, which the writer adds.
 * @param waveforms of the simulation, by deck; null where none was run
 */
export async function designFiles(
  sized: SizedDesign,
  result: Result,
  waveforms: ReadonlyMap<string, Waveforms> | null,
): Promise<ReadonlyMap<string, string>> {
  const decks = deckSet(sized);
  return new Map([
    ['ramp.cir', decks.ramp],
    ['ramp-test.cir', decks.rampTest.text],
    ...[...decks.converters].map(([name, { text }]): [string, string] => [name, text]),
    ['bom.csv', billOfMaterialsCsv(result.parts)],
    ['report.html', await reportPage({ design: sized, result, waveforms })],
    ['result.json', jsonDocument(result)],
  ]);
}
