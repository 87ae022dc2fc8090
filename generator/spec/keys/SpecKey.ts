import type { ValueForm } from '../values/ValueForm.ts';

/** What may stand behind a key. */
export type KeyForm =
  | ValueKeyForm
  /** The gain of a law: a bare number, for the fixed law also a voltage. */
  | { readonly kind: 'gain' }
  | { readonly kind: 'choice'; readonly choices: readonly string[] }
  | { readonly kind: 'yes-no' }
  | { readonly kind: 'text' }
  | { readonly kind: 'date' };

export interface ValueKeyForm extends ValueForm {
  readonly kind: 'value';
  /** Several values may be given, as a list. */
  readonly list?: boolean;
  /** The ends of a range are limits in themselves: no tolerance is missed there. */
  readonly limits?: boolean;
}

/** What is taken where a key is left out; `text` is read as if the user had written it, null is not known. */
export interface Assumed {
  readonly text: string | null;
  readonly reason: string;
}

/** What an assumption may depend on. */
export interface GivenKeys {
  readonly converter: string;
  readonly stage: string;
  /** Whether the key, or any key of the group, is given. */
  readonly has: (path: string) => boolean;
}

/** A row of the one table from which parser, suggestions, schema, starter spec and flags all follow. */
export interface SpecKey {
  /** Dotted: `ramp.series.resistor`. */
  readonly path: string;
  readonly form: KeyForm;
  /** One sentence for schema, starter spec and help. */
  readonly doc: string;
  /** As a user would write it; part of the starter spec. */
  readonly example: string;
  readonly required?: boolean;
  /** `--vin` */
  readonly flag?: string;
  /** Null from the function: nothing is assumed in that case. */
  readonly assumed?: Assumed | ((given: GivenKeys) => Assumed | null);
  /** Keys of a file that this one, given as a flag, puts out of force. */
  readonly replaces?: readonly string[];
  /** Converters to which the key means something; left out: all. */
  readonly converters?: readonly string[];
  /** What to add to the remedy of a fault with that code. */
  readonly remedies?: Readonly<Record<string, string>>;
  /** Whether the starter spec shows the key ready to use, or commented out (the default). */
  readonly starter?: boolean;
}
