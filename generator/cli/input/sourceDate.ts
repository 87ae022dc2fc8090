import { usageProblem } from '../commandLine/usageProblem.ts';
import { exitCodes } from '../exitCodes.ts';
import { ending, going, type Step } from '../Step.ts';

/** Last second of the year 9999: later years do not fit the date's four digits. */
const last_s = 253_402_300_799;

/** SOURCE_DATE_EPOCH, seconds since 1970 in UTC, as a calendar date; empty where it is not set. */
export function sourceDate(seconds: string | undefined): Step<string> {
  if (seconds === undefined || seconds === '') return going('');
  if (/^\d{1,12}$/.test(seconds) && Number(seconds) <= last_s) {
    return going(new Date(Number(seconds) * 1000).toISOString().slice(0, 10));
  }
  return ending(
    exitCodes.refused,
    usageProblem('SOURCE_DATE_EPOCH', {
      code: 'source-date',
      expected: 'seconds since 1970, such as 1767225600',
      received: seconds,
      fix: 'unset the variable, or give the date in the specification',
    }),
  );
}
