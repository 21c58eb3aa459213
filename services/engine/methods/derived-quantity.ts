import type { Rational } from '../quantity/decimal';
import type { Derived } from './derived';

export type Bound = 'above-zero' | 'not-below-zero' | 'any';

/** One input of a derived quantity: what may be entered for it, and the unit that its formula counts in. */
export type InputForm =
  | { readonly kind: 'value'; readonly name: string; readonly unit: string; readonly bound: Bound; readonly otherwise?: string }
  | {
      readonly kind: 'values';
      readonly name: string;
      readonly unit: string;
      readonly bound: Bound;
      readonly fewest: number;
      readonly most: number;
    }
  | { readonly kind: 'count'; readonly name: string; readonly otherwise?: string }
  | { readonly kind: 'choice'; readonly name: string; readonly options: readonly string[] }
  /** A mark that the computation itself reads, such as an indicator's. */
  | { readonly kind: 'mark'; readonly name: string };

/** Inputs that passed their form: exact, in the formula's units. Asking for a name that is not an input throws. */
export interface Given {
  readonly value: (name: string) => Rational;
  readonly values: (name: string) => readonly Rational[];
  readonly count: (name: string) => number;
  readonly text: (name: string) => string;
}

/** Something worth showing on the way to the result, or beside it. */
export interface ComputedStep {
  readonly name: string;
  readonly value: Rational | number;
  readonly unit: string;
}

export interface Computed {
  readonly value: Rational | number;
  readonly steps?: readonly ComputedStep[];
}

/** A derived quantity that a plan can name. */
export interface DerivedQuantity {
  readonly name: string;
  readonly method: string;
  readonly inputs: readonly InputForm[];
  readonly unit: string;
  /** Decimals to which the result is rounded, half to even, before it is judged. */
  readonly places: number;
  /** Standard or derivation that the result can be checked against. */
  readonly source: string;
  readonly compute: (given: Given) => Derived<Computed>;
}

export function positive(name: string, unit: string): InputForm {
  return { kind: 'value', name, unit, bound: 'above-zero' };
}

export function signed(name: string, unit: string, otherwise?: string): InputForm {
  return { kind: 'value', name, unit, bound: 'any', ...(otherwise === undefined ? {} : { otherwise }) };
}

/** A list of values; `most` keeps the exact arithmetic of the longest one well under a second. */
export function list(name: string, unit: string, bound: Bound = 'any', fewest = 1, most = 1000): InputForm {
  return { kind: 'values', name, unit, bound, fewest, most };
}

/** The answer of a pure function as a computed result, with steps made from it. */
export function resultOf<Value>(answer: Derived<Value>, computed: (value: Value) => Computed): Derived<Computed> {
  return answer.ok ? { ok: true, value: computed(answer.value) } : answer;
}

/** A single number as a computed result without steps. */
export function single(answer: Derived<Rational> | Derived<number>): Derived<Computed> {
  return answer.ok ? { ok: true, value: { value: answer.value } } : answer;
}
