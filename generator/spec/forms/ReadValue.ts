import type { Quantity, Span } from '../../base/Quantity.ts';
import type { ReadSpan } from '../values/readSpan.ts';

/** A key's value once read. */
export type ReadValue =
  | { readonly kind: 'spans'; readonly spans: readonly ReadSpan[] }
  | { readonly kind: 'number'; readonly number: number }
  | { readonly kind: 'word'; readonly word: string }
  | { readonly kind: 'truth'; readonly truth: boolean };

/** Values by path, each asked for as what the table says it is. */
export class ReadValues {
  readonly #values: ReadonlyMap<string, ReadValue>;

  constructor(values: ReadonlyMap<string, ReadValue>) {
    this.#values = values;
  }

  spans(path: string): readonly Span[] | null {
    return this.#of(path, 'spans')?.spans.map(({ span }) => span) ?? null;
  }

  span(path: string): Span | null {
    return this.spans(path)?.[0] ?? null;
  }

  quantity(path: string): Quantity | null {
    return this.span(path)?.from ?? null;
  }

  number(path: string): number | null {
    return this.#of(path, 'number')?.number ?? null;
  }

  word(path: string): string | null {
    return this.#of(path, 'word')?.word ?? null;
  }

  truth(path: string): boolean | null {
    return this.#of(path, 'truth')?.truth ?? null;
  }

  #of<K extends ReadValue['kind']>(path: string, kind: K): Extract<ReadValue, { kind: K }> | null {
    const value = this.#values.get(path);
    if (value === undefined) return null;
    if (value.kind !== kind) throw new TypeError(`${path} is read as ${value.kind}, not ${kind}`);
    return value as Extract<ReadValue, { kind: K }>;
  }
}
