import { hasInductance, type LoopCorners } from '../law/loopCorners.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { LawKind, Specification } from '../spec/Specification.ts';
import type { ComparedLaw } from './compareLaws.ts';
import { henries } from './verdictWords.ts';

/** What the figures of a comparison do not say by themselves. */
export function comparisonNotes(
  specification: Specification,
  region: OperatingRegion,
  corners: LoopCorners,
  compared: readonly ComparedLaw[],
): readonly string[] {
  return [
    exactRamp,
    ...notBuiltYet(compared),
    ...unknownInductance(specification, corners),
    ...inductanceOfRipple(specification, corners),
    ...nominalUnit(specification, corners),
    ...missingLaws(region, compared),
    ...beyondTheMaximumDuty(region, compared),
    ...halfBridge(specification),
  ];
}

/** What `design` adds to these figures. */
const exactRamp =
  "The ramp is taken as exact, each gain as the least: a built circuit adds its own parts' spread, so that design gives a larger gain and a larger greatest x.";

function notBuiltYet(compared: readonly ComparedLaw[]): string[] {
  return compared.some(({ law }) => law.kind === 'vout' || law.kind === 'constant-q')
    ? ['design builds the laws fixed and vin; vout and constant-q are compared, and not built yet.']
    : [];
}

function unknownInductance({ controller }: Specification, corners: LoopCorners): string[] {
  if (hasInductance(corners)) return [];
  const notes = [
    'Without an inductance the gains and damping indices hold for any, as ratios: the slope itself in V/s, capacitor values, limits in amperes, the line response and the border to discontinuous conduction cannot be given.',
  ];
  if ((controller?.internalRamp_V_per_s?.high ?? 0) > 0)
    notes.push(
      "The controller's internal ramp is not counted: how much it adds depends on the inductance, which is not given.",
    );
  return notes;
}

function inductanceOfRipple({ inductance }: Specification, corners: LoopCorners): string[] {
  if (inductance?.kind !== 'ripple' || !hasInductance(corners)) return [];
  return [
    `The inductance follows the ripple at each input, output and frequency, as who uses the converter would choose it; gains refer to the least over the region, ${henries(corners.referenceInductance_H)}.`,
  ];
}

/** Limits and line response have no tolerance of their own. */
function nominalUnit({ inductance, controller }: Specification, corners: LoopCorners): string[] {
  if (!hasInductance(corners)) return [];
  const notes: string[] = [];
  if (controller?.senseLimit_V == null)
    notes.push("The controller's senseLimit is not given: peak and output limit cannot be given.");
  if (inductance?.kind === 'value' && inductance.value_H.from.nominal < inductance.value_H.to.nominal)
    notes.push(
      `Limits, line response and the border to discontinuous conduction are those of the least inductance, ${henries(corners.referenceInductance_H)}.`,
    );
  return notes;
}

const names: readonly LawKind[] = ['fixed', 'vin', 'vout', 'constant-q'];

/** A law is left out where it has nothing to give at a point that needs a ramp. */
function missingLaws({ outputVoltage_V }: OperatingRegion, compared: readonly ComparedLaw[]): string[] {
  return names
    .filter((name) => compared.every(({ law }) => law.kind !== name))
    .map(
      (name) =>
        `${name} is left out: it has no ramp to give where the output is at zero or below${outputVoltage_V === null ? ', which every duty from nothing allows' : ''}, and a ramp is needed there.`,
    );
}

const converterNames: Readonly<Record<string, string>> = { sepic: 'SEPIC', cuk: 'Ćuk converter' };

/**
 * x = D′(1 + k) for a slope in proportion to Vin wherever m1·L is Vin: no gain holds it up as D goes to 1.
 */
function beyondTheMaximumDuty({ stage, duty }: OperatingRegion, compared: readonly ComparedLaw[]): string[] {
  const vin = compared.find(({ law }) => law.kind === 'vin');
  if (vin === undefined || vin.required.gain === 0 || stage.kind === 'buck' || stage.kind === 'forward')
    return [];
  return [
    `On a ${converterNames[stage.kind] ?? stage.kind} the vin law gives x = D′(1 + k), which falls to nothing with D′: it is stable up to the greatest duty of this region, ${(100 * duty.high).toFixed(0)} %, and no gain makes it stable at every duty.`,
  ];
}

function halfBridge({ converter, stage }: Specification): string[] {
  if (converter !== 'forward' || stage !== 'half-bridge') return [];
  return [
    'A half-bridge under peak current control drives the midpoint of its capacitors out of balance: it needs a balancing winding or another control.',
  ];
}
