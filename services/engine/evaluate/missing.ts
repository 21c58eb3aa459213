import type { Criteria, Missing, Observations } from './types';

/** What the criteria ask for and the observations do not give, in criteria order. */
export function missingOf(criteria: Criteria, observations: Observations): Missing[] {
  const read = new Set((observations.readings ?? []).filter((reading) => !reading.void).map((reading) => reading.characteristic));
  const inspected = new Set(
    (observations.attributes ?? []).filter((one) => one.result !== 'not-inspected').map((one) => one.number),
  );
  const given = new Set((observations.process ?? []).map((value) => value.number));
  const carriedOut = new Set(observations.methods ?? []);
  const named = new Set((criteria.indicationRules ?? []).flatMap((set) => set.methods).filter((method) => method !== '*'));
  const without = (kind: Missing['kind'], numbers: readonly string[], there: ReadonlySet<string>): Missing[] =>
    numbers.filter((number) => !there.has(number)).map((number) => ({ kind, number }));
  const numbersOf = (list: readonly { readonly number: string }[] | null | undefined) => (list ?? []).map((one) => one.number);
  return [
    ...without('reading', numbersOf(criteria.characteristics), read),
    ...without('attribute', numbersOf(criteria.attributes), inspected),
    ...without('process', numbersOf(criteria.process), given),
    ...without('method', [...named], carriedOut),
  ];
}
