import type { Result } from '../emit/resultSchema.ts';
import { jsonDocument } from '../emit/text/jsonDocument.ts';
import { toolVersion } from './toolVersion.ts';

export interface ReproductionView {
  readonly computedBy: string;
  readonly digest: string;
  readonly commands: readonly { readonly line: string; readonly does: string }[];
}

/** How to come to the same files again; the digest is that of the specification as result.json has it. */
export async function reproduction({ specification, simulation }: Result): Promise<ReproductionView> {
  const engine = simulation === null ? 'none' : simulation.engine;
  return {
    computedBy: `counterslope ${toolVersion}`,
    digest: await sha256Hex(jsonDocument(specification)),
    commands: [
      {
        line: `counterslope design SPEC --engine ${engine} --out DIR`,
        does: 'designs again, from the specification',
      },
      {
        line: 'counterslope simulate .',
        does: "runs this folder's decks again and compares with result.json",
      },
      {
        line: `node -p "JSON.stringify(require('./result.json').specification, null, 2)" | sha256sum`,
        does: 'gives the digest of the specification',
      },
    ],
  };
}

async function sha256Hex(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
