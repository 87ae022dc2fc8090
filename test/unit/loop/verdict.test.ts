import { describe, expect, it } from 'vitest';
import { comparisonOf, exactBuck } from '../../support/comparison.ts';
import type { Keys } from '../../support/request.ts';

async function verdictOf(keys: Keys) {
  const whole: Record<string, Keys[string]> = { ...exactBuck, ...keys };
  if ('inductance.value' in keys) delete whole.inductance;
  const { verdict, notes } = await comparisonOf(whole);
  return { ...verdict, first: verdict.reasons[0]!, all: verdict.reasons.join('\n'), notes: notes.join('\n') };
}

describe('the verdict on a buck', () => {
  it('of one known output says first that a fixed ramp does as well, with its figures', async () => {
    const { preferred, first } = await verdictOf({ input: '6 V to 36 V', output: '5 V' });
    expect(preferred).toBe('fixed');
    expect(first).toMatch(/^A fixed ramp does as well for damping/);
    expect(first).toContain('x between 0.8183 and 0.9697, cycle ratio -0.222 to -0.031');
    expect(first).toMatch(/buys nothing for damping here\.$/);
  });

  it('of 12 V from 8 V to 18 V at every duty prefers a fixed ramp too', async () => {
    const keys = { input: '8 V to 18 V', output: '12 V', maximumDuty: '100 %' };
    const { preferred, all } = await verdictOf(keys);
    expect(preferred).toBe('fixed');
    expect(all).toContain('0.8789');
    expect(all).toContain('vin takes x up to 1.152 at 18 V in, 12 V out');
  });

  it('whose output is set up towards the input prefers an adaptive law, with the figures of both', async () => {
    const keys = { input: '6 V to 36 V', output: '0.8 V to 30 V', maximumDuty: '85 %' };
    const { preferred, first, all } = await verdictOf(keys);
    expect(preferred).toBe('vout');
    expect(first).toMatch(/^An adaptive ramp is worth it: vout keeps x between 0\.8183 and 0\.9952/);
    expect(first).toContain('x = 4.798 at 6 V in, 0.8 V out (cycle ratio up to 0.792, 20 cycles to settle)');
    expect(all).toContain('Where only the input can be sensed, vin is far better than a fixed ramp');
    expect(all).toContain('vin takes x up to 1.646');
    expect(all).toContain('For a converter whose output is set anywhere from 0.8 V to 30 V');
  });

  it('from an input that hardly moves says that following it buys nothing', async () => {
    const { preferred, all } = await verdictOf({ input: '12 V ± 5 %' });
    expect(preferred).toBe('vout');
    expect(all).toContain('Following the input alone buys nothing here');
  });

  it('whose fixed ramp stays below the ceiling, but far from deadbeat, says that it will do', async () => {
    const { preferred, first } = await verdictOf({ input: '8 V to 60 V', output: '1.8 V to 5 V' });
    expect(preferred).toBe('fixed');
    expect(first).toMatch(/^A fixed ramp will do: .* below the ceiling of 1\.500 everywhere/);
  });

  it('whose fixed ramp is a hair above the ceiling does not call that bad', async () => {
    const keys = {
      input: '8 V to 60 V',
      output: '1.2 V to 5 V',
      minimumOnTime: '120 ns',
      frequency: '1 MHz',
    };
    const { first } = await verdictOf({ ...keys, inductance: '2.2 uH ± 20 %' });
    expect(first).toMatch(/^A fixed ramp just misses the ceiling of 1\.500: it reaches x = 1\.515/);
  });

  it('that needs no ramp says so, and prefers none', async () => {
    const { preferred, first } = await verdictOf({ input: '24 V to 36 V', output: '3.3 V' });
    expect(preferred).toBeNull();
    expect(first).toMatch(/^No ramp needs to be added/);
  });
});

describe('the verdict on what spreads', () => {
  it('says of a wide span of inductance that every law over-compensates, by how much, and what helps', async () => {
    const { first, all } = await verdictOf({
      input: '6 V to 36 V',
      output: '5 V',
      inductance: '2.2 uH to 47 uH',
    });
    // x = D′ + λ(x_goal − D′) at 6 V to 5 V, λ = 47/2.2.
    const worst = 1 / 6 + (47 / 2.2) * (0.5 + 1 / Math.PI - 1 / 6);
    expect(first).toContain(`x reaches ${worst.toPrecision(4)} at 6 V in, 5 V out`);
    expect(first).toMatch(/^Every law over-compensates/);
    expect(first).toContain('9.4 times the ceiling of 1.500');
    expect(all).toContain('The spread of inductance and sense gain is the cause');
    expect(all).toContain('a ramp set for the inductor at hand, by one resistor');
    expect(all).toContain('so that 5 settings would cover it');
  });

  it('gives the ratio of inductances that the ceiling allows exactly', async () => {
    const { all } = await verdictOf({ input: '6 V', output: '5 V', inductance: '10 uH to 100 uH' });
    // One point: D′ + r(goal − D′) = 1.5.
    const ratio = (1.5 - 1 / 6) / (0.5 + 1 / Math.PI - 1 / 6);
    expect(all).toContain(`the largest inductance may be ${ratio.toPrecision(3)} times the least`);
    const allowed = await verdictOf({ input: '6 V', output: '5 V', inductance: `10 uH to ${10 * ratio} uH` });
    expect(allowed.first).not.toMatch(/^Every law/);
  });

  it('advises no resistor per inductor where saturation or tolerance of one part is the cause', async () => {
    const { all } = await verdictOf({
      input: '6 V to 36 V',
      output: '5 V',
      'inductance.value': '10 uH ± 20 %',
      'inductance.atPeakLimit': '4 uH',
    });
    expect(all).toContain('one that saturates less');
    expect(all).not.toContain('by one resistor');
  });

  it("blames the controller's own ramp where it alone is too much", async () => {
    const { preferred, first, all } = await verdictOf({
      input: '6 V to 36 V',
      output: '5 V',
      'controller.internalRamp': '60 mV/us',
    });
    expect(preferred).toBeNull();
    // x = 1/6 + L·Se/(Ri·U) at 6 V, the worst: L·Se/Ri = 10 µH × 60 mV/µs ÷ 50 mΩ = 12 V.
    expect(first).toContain(`${(1 / 6 + 12 / 6).toPrecision(4)}, the ceiling being 1.500`);
    expect(first).toContain("the controller's own ramp, is too much");
    expect(all).toContain('No added ramp can take that back');
  });

  it('blames a goal above the ceiling on itself', async () => {
    const { all } = await verdictOf({ input: '6 V to 36 V', output: '5 V', 'goal.dampingIndex': 1.6 });
    expect(all).toContain('The goal of 1.600 is itself not below the ceiling');
  });
});

describe('the verdict on a boost', () => {
  it('never calls the vin law stable at every duty', async () => {
    const { notes, all } = await verdictOf({ converter: 'boost', input: '6 V to 12 V', output: '24 V' });
    expect(notes).toContain('x = D′(1 + k)');
    expect(notes).toContain('no gain makes it stable at every duty');
    expect(all).not.toMatch(/every duty/);
  });

  it('of one output that nearly equals the input needs the law that senses both', async () => {
    const { preferred } = await verdictOf({
      converter: 'boost',
      input: '5 V to 23 V',
      output: '24 V',
      inductance: '22 uH ± 20 %',
    });
    expect(preferred).toBe('constant-q');
  });
});

describe('limits and line response in the verdict', () => {
  const known = { input: '6 V to 36 V', output: '5 V', 'controller.senseLimit': '250 mV' };

  it('are told whichever law they favour', async () => {
    const { all } = await verdictOf({ ...known, 'controller.limitSeesRamp': 'yes' });
    expect(all).toMatch(/^Peak limit over the region: .*vin 4\.35 A throughout.*; steadiest with vin\.$/m);
    expect(all).toMatch(/^Line response .*least with fixed\. A fixed ramp of half the down slope/m);
  });

  it('are the same with every law where the limit does not see the ramp', async () => {
    const { all } = await verdictOf({ ...known, 'controller.limitSeesRamp': 'no' });
    expect(all).toMatch(/^Peak limit over the region: 5\.00 A throughout, the same with every law\.$/m);
  });

  it('warn where ramp and ripple take all of the limit', async () => {
    const { all } = await verdictOf({
      input: '6 V to 36 V',
      output: '0.8 V to 30 V',
      maximumDuty: '85 %',
      'controller.senseLimit': '200 mV',
      'controller.limitSeesRamp': 'yes',
    });
    expect(all).toContain('the limit leaves no load current at all under');
  });
});
