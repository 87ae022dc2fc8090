import { describe, expect, it } from 'vitest';
import { GNUCAP, isInstalled, isRequired, NGSPICE } from '../../../spice/support/require.ts';

describe('a tool of the machine', () => {
  it('is required where COUNTERSLOPE_REQUIRE names it', () => {
    expect(isRequired(NGSPICE, 'ngspice,gnucap')).toBe(true);
    expect(isRequired(GNUCAP, 'ngspice, gnucap')).toBe(true);
    expect(isRequired(GNUCAP, 'ngspice')).toBe(false);
    expect(isRequired(NGSPICE, '')).toBe(false);
  });

  it('is not there under a name that no program has', () => {
    expect(isInstalled({ name: 'no-such-tool' as 'ngspice', install: '' })).toBe(false);
  });
});
