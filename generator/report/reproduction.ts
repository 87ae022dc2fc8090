import type { SizedDesign } from '../circuit/SizedDesign.ts';
import type { Result } from '../emit/resultSchema.ts';
import { jsonDocument } from '../emit/text/jsonDocument.ts';
import { specificationText } from './specificationText.ts';
import { toolVersion } from './toolVersion.ts';

export interface ReproductionView {
  readonly computedBy: string;
  readonly digest: string;
  /** What was given, as a file that comes to the same specification. */
  readonly specification: string;
  readonly commands: readonly { readonly line: string; readonly does: string }[];
}

/** How to come to the same files again; the digest is that of the specification as result.json has it. */
export async function reproduction({ request }: SizedDesign, result: Result): Promise<ReproductionView> {
  const { specification, simulation } = result;
  const engine = simulation === null ? 'none' : simulation.engine;
  return {
    computedBy: `counterslope ${toolVersion}`,
    digest: await sha256Hex(jsonDocument(specification)),
    specification: specificationText(request),
    commands: [
      {
        line: `counterslope design spec.json --engine ${engine} --out ramp`,
        does: 'designs the same again, spec.json holding the lines above',
      },
      {
        line: 'counterslope simulate .',
        does: 'in the folder of this page: runs its decks again and compares with result.json',
      },
      {
        line: `node -p "JSON.stringify(require('./result.json').specification, null, 2)" | sha256sum`,
        does: 'gives the digest in the title block',
      },
    ],
  };
}

export async function sha256Hex(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
