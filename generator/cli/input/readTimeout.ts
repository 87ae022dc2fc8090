import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import { usageProblem } from '../commandLine/usageProblem.ts';
import { exitCodes } from '../exitCodes.ts';
import { ending, going, type Step } from '../Step.ts';

const usual_s = 120;
/** A day: beyond it the number is a slip, and timers of Node overflow not far above. */
const most_s = 86_400;

/** `--timeout 30`, also `30 s`. */
export function readTimeout(invocation: Invocation): Step<number> {
  const text = givenValue(invocation, 'timeout');
  if (text === null) return going(usual_s);
  const digits = /^\s*(\d+(?:\.\d+)?|\.\d+)\s*s?\s*$/.exec(text)?.[1];
  const seconds = Number(digits);
  if (digits !== undefined && seconds > 0 && seconds <= most_s) return going(seconds);
  return ending(
    exitCodes.refused,
    usageProblem('--timeout', {
      code: 'timeout-form',
      expected: `seconds above 0, up to ${most_s}`,
      received: text === '' ? 'an empty value' : text,
      fix: `write --timeout ${usual_s}`,
    }),
  );
}
