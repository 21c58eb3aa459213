import { isDecimalText, rationalOf } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { convertValue, unitOf } from '../quantity/units';
import type { DerivedFault, DerivedFaultCode } from './derived';
import type { Bound, DerivedQuantity, Given, InputForm } from './derived-quantity';

/** An input as entered or stored: a decimal, a list of decimals, a count, a choice or a mark, with its unit where it has one. */
export interface EnteredInput {
  readonly name: string;
  readonly value: string | readonly string[];
  readonly unit?: string | undefined;
}

/** A refusal and where it lies: dotted from the entry's root, positions from 0. */
export type PlacedFault = DerivedFault & { readonly path: string };

const COUNT = /^[0-9]{1,6}$/;

type ReadValue = Rational | readonly Rational[] | number | string;
type Read = { readonly ok: true; readonly value: ReadValue } | { readonly ok: false; readonly faults: readonly PlacedFault[] };

function bad(path: string, code: DerivedFaultCode, parameters: DerivedFault['parameters'] = {}): Read {
  return { ok: false, faults: [{ path, code, parameters }] };
}

function boundFault(value: Rational, bound: Bound): DerivedFaultCode | null {
  if (bound === 'above-zero' && value.n <= 0n) return 'not-above-zero';
  return bound === 'not-below-zero' && value.n < 0n ? 'below-zero' : null;
}

function readDecimals(
  form: InputForm & { readonly unit: string; readonly bound: Bound },
  input: EnteredInput,
  path: string,
): Read {
  const [from, to] = [unitOf(input.unit ?? ''), unitOf(form.unit)];
  if (!to) throw new Error(`${form.unit} is not a unit of the list`);
  if (!from || from.quantity !== to.quantity)
    return bad(`${path}.unit`, 'unit-of-other-quantity', { input: form.name, quantity: to.quantity });
  const texts = typeof input.value === 'string' ? [input.value] : input.value;
  const faults: PlacedFault[] = [];
  const values = texts.map((text, at): Rational => {
    const where = form.kind === 'values' ? `${path}.value.${String(at)}` : `${path}.value`;
    if (!isDecimalText(text)) {
      faults.push({ path: where, code: 'not-a-decimal', parameters: { input: form.name } });
      return { n: 0n, d: 1n };
    }
    const value = convertValue(rationalOf(text), from, to);
    const fault = boundFault(value, form.bound);
    if (fault) faults.push({ path: where, code: fault, parameters: { input: form.name, value: text } });
    return value;
  });
  if (faults.length > 0) return { ok: false, faults };
  const [first] = values;
  if (form.kind === 'values') return { ok: true, value: values };
  return first === undefined ? bad(`${path}.value`, 'not-a-decimal', { input: form.name }) : { ok: true, value: first };
}

/** One input against its form. */
export function readInput(form: InputForm, input: EnteredInput, path: string): Read {
  const { name } = form;
  const isList = typeof input.value !== 'string';
  if (isList !== (form.kind === 'values'))
    return bad(`${path}.value`, isList ? 'one-value-wanted' : 'list-wanted', { input: name });
  if (form.kind === 'value') return readDecimals(form, input, path);
  if (form.kind === 'values') {
    if (input.value.length < form.fewest) return bad(`${path}.value`, 'too-few-values', { input: name, needed: form.fewest });
    if (input.value.length > form.most) return bad(`${path}.value`, 'too-many-values', { input: name, most: form.most });
    return readDecimals(form, input, path);
  }
  const text = String(input.value).trim();
  if (input.unit !== undefined) return bad(`${path}.unit`, 'unit-not-wanted', { input: name });
  if (form.kind === 'count')
    return COUNT.test(text) ? { ok: true, value: Number(text) } : bad(`${path}.value`, 'not-a-count', { input: name });
  if (form.kind === 'choice' && !form.options.includes(text))
    return bad(`${path}.value`, 'not-a-choice', { input: name, choices: form.options.join(', ') });
  return text === '' || text.length > 60 ? bad(`${path}.value`, 'mark-missing', { input: name }) : { ok: true, value: text };
}

/** What stands for an input that was left out, or null where it must be entered. */
export function otherwiseOf(form: InputForm): EnteredInput | null {
  if (form.kind !== 'value' && form.kind !== 'count') return null;
  if (form.otherwise === undefined) return null;
  return { name: form.name, value: form.otherwise, ...(form.kind === 'value' ? { unit: form.unit } : {}) };
}

function givenOf(read: ReadonlyMap<string, ReadValue>): Given {
  const found = (name: string): ReadValue => {
    const value = read.get(name);
    if (value === undefined) throw new Error(`${name} is not an input of this quantity`);
    return value;
  };
  return {
    value: (name) => found(name) as Rational,
    values: (name) => found(name) as readonly Rational[],
    count: (name) => found(name) as number,
    text: (name) => found(name) as string,
  };
}

/** All inputs of a quantity against their forms: every fault in one pass, or what the computation takes. */
export function readInputs(
  quantity: DerivedQuantity,
  inputs: readonly EnteredInput[],
): { readonly ok: true; readonly given: Given } | { readonly ok: false; readonly faults: readonly PlacedFault[] } {
  const faults: PlacedFault[] = [];
  const read = new Map<string, ReadValue>();
  inputs.forEach((input, place) => {
    const path = `inputs.${String(place)}`;
    const form = quantity.inputs.find(({ name }) => name === input.name);
    if (!form)
      faults.push({ path: `${path}.name`, code: 'input-unknown', parameters: { input: input.name, quantity: quantity.name } });
    else if (inputs.findIndex(({ name }) => name === input.name) < place)
      faults.push({ path: `${path}.name`, code: 'input-twice', parameters: { input: input.name } });
    else {
      const answer = readInput(form, input, path);
      if (answer.ok) read.set(form.name, answer.value);
      else faults.push(...answer.faults);
    }
  });
  for (const form of quantity.inputs) {
    if (inputs.some(({ name }) => name === form.name)) continue;
    const otherwise = otherwiseOf(form);
    const answer = otherwise && readInput(form, otherwise, 'inputs');
    if (answer?.ok) read.set(form.name, answer.value);
    else faults.push({ path: 'inputs', code: 'input-missing', parameters: { input: form.name } });
  }
  return faults.length > 0 ? { ok: false, faults } : { ok: true, given: givenOf(read) };
}
