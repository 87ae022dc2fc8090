import type { Manners } from '../commandLine/readCommandLine.ts';
import type { Output } from '../Surroundings.ts';

/** Words in colour, or as they are. */
export interface Paint {
  bad(text: string): string;
  caution(text: string): string;
  faint(text: string): string;
  strong(text: string): string;
}

const asItIs = (text: string) => text;
const inStyle = (code: number) => (text: string) => `\u001b[${code}m${text}\u001b[0m`;

export const plainPaint: Paint = { bad: asItIs, caution: asItIs, faint: asItIs, strong: asItIs };

const colourPaint: Paint = {
  bad: inStyle(31),
  caution: inStyle(33),
  faint: inStyle(2),
  strong: inStyle(1),
};

/** A flag beats the environment, NO_COLOR beats FORCE_COLOR, and without either only a terminal gets colour. */
export function paintFor(
  output: Output,
  color: Manners['color'],
  env: Readonly<Record<string, string | undefined>>,
): Paint {
  if (color !== 'auto') return color === 'always' ? colourPaint : plainPaint;
  if (env.NO_COLOR) return plainPaint;
  if (env.FORCE_COLOR) return env.FORCE_COLOR === '0' ? plainPaint : colourPaint;
  return output.isTTY === true && env.TERM !== 'dumb' ? colourPaint : plainPaint;
}
