import type { Problem } from '../../base/Problem.ts';
import { jsonDocument } from '../../emit/text/jsonDocument.ts';

/** Problems for programs. */
export function problemsDocument(problems: readonly Problem[]): string {
  return jsonDocument({
    schema: 'counterslope/problems/1',
    problems: problems.map(({ code, severity, key, place, expected, received, fix }) => ({
      code,
      severity,
      // What has no place has at least a name.
      path: place?.path ?? key,
      line: place?.line ?? null,
      column: place?.column ?? null,
      expected,
      received,
      fix,
    })),
  });
}
