import type { Criteria, IndicationClass, IndicationRule, IndicationRuleSet } from '../evaluate/types';
import { compare, decimalText, type Rational } from '../quantity/decimal';
import type { Nanometres } from './exact-length';
import { wouldMerge, type Group } from './groups';
import { holds, nanometresOf, type Member } from './members';
import { separation } from './separation';

/** What one rule says of one zone and method: whether it is broken, by whom, and the measured value in the rule's unit. */
export interface Outcome {
  readonly broken: boolean;
  readonly ids: readonly string[];
  readonly measured: string | null;
  /** How bad, for taking the worst of several methods. */
  readonly rank: number;
}

/** What a rule is asked about: the judged groups that touch the zone, and which of their members do. */
export interface ZoneView {
  readonly criteria: Criteria;
  readonly set: IndicationRuleSet;
  readonly zone: string;
  readonly groups: readonly Group[];
  /** Relevant members of the zone whatever their size, for rules that speak of types. */
  readonly seen: readonly Member[];
}

export type TotalRule = Extract<IndicationRule, { readonly kind: 'max-total-length' | 'max-total-area' }>;

type Rule<K extends IndicationRule['kind']> = Extract<IndicationRule, { readonly kind: K }>;

const exact = (value: number): Rational => ({ n: BigInt(value), d: 1n });

/** Nanometres as a decimal of the drawing's unit, at most six places. */
export function lengthText(value: Nanometres, unit: Criteria['lengthUnit']): string {
  return decimalText({ n: BigInt(value), d: unit === 'in' ? 25_400_000n : 1_000_000n }, 6);
}

function sorted(ids: Iterable<string>): string[] {
  return [...new Set(ids)].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
}

function inZone(view: ZoneView, group: Group): Member[] {
  return group.members.filter(({ zones }) => zones.includes(view.zone));
}

interface Filter {
  readonly class?: IndicationClass | null | undefined;
  readonly types?: readonly string[] | null | undefined;
}

/** Members a rule's filter selects, each with its group. */
export function selected(view: ZoneView, filter: Filter): { member: Member; group: Group }[] {
  return view.groups
    .filter((group) => group.judged && (!filter.class || group.classes.has(filter.class)))
    .flatMap((group) => inZone(view, group).map((member) => ({ member, group })))
    .filter(({ member }) => !filter.types || holds(filter.types, member.indication.type));
}

export function notAllowed(view: ZoneView, rule: Rule<'not-allowed'>): Outcome {
  const { types } = rule;
  const byType = types ? view.seen.filter(({ indication }) => holds(types, indication.type)) : [];
  const classes = rule.classes ?? [];
  const byClass = view.groups.filter((group) => group.judged && classes.some((one) => group.classes.has(one)));
  const ids = sorted([...byType.map(({ id }) => id), ...byClass.flatMap((group) => inZone(view, group).map(({ id }) => id))]);
  const found = sorted([
    ...byType.map(({ indication }) => indication.type),
    ...byClass.flatMap((group) => classes.filter((one) => group.classes.has(one))),
  ]);
  return { broken: ids.length > 0, ids, measured: found.length > 0 ? found.join(', ') : null, rank: ids.length };
}

export function maxSize(view: ZoneView, rule: Rule<'max-size'>): Outcome {
  const limit = nanometresOf(rule.limit, view.criteria.lengthUnit);
  const asked = new Set(selected(view, rule).map(({ group }) => group));
  const over = [...asked].filter(({ length }) => compare(exact(length), limit) > 0);
  const largest = Math.max(-1, ...[...asked].map(({ length }) => length));
  return {
    broken: over.length > 0,
    ids: sorted(over.flatMap((group) => inZone(view, group).map(({ id }) => id))),
    measured: largest < 0 ? null : lengthText(largest, view.criteria.lengthUnit),
    rank: largest,
  };
}

export function sizeBands(view: ZoneView, rule: Rule<'size-bands'>): Outcome {
  const asked = selected(view, rule);
  const edges = rule.bands.map(({ to }) => nanometresOf(to, view.criteria.lengthUnit));
  const bandOf = (length: Nanometres) => {
    const at = edges.findIndex((edge) => compare(exact(length), edge) <= 0);
    return at < 0 ? edges.length : at;
  };
  const placed = asked.map((one) => ({ ...one, band: bandOf(one.group.length) }));
  const above = placed.filter(({ band }) => band === edges.length);
  const ids = new Set(above.map(({ member }) => member.id));
  let first: number | null = null;
  rule.bands.forEach(({ count }, at) => {
    if (count === null) return;
    const counted = placed.filter(({ band }) => (rule.counting === 'each-band' ? band === at : band >= at));
    if (counted.length <= count) return;
    first ??= counted.length;
    for (const { member } of counted) ids.add(member.id);
  });
  const measured = above.length > 0 ? above.length : (first ?? 0);
  return { broken: ids.size > 0, ids: sorted(ids), measured: String(measured), rank: measured };
}

export function maxCount(view: ZoneView, rule: Rule<'max-count'>): Outcome {
  const asked = selected(view, rule);
  const broken = asked.length > rule.limit;
  return {
    broken,
    ids: broken ? sorted(asked.map(({ member }) => member.id)) : [],
    measured: String(asked.length),
    rank: asked.length,
  };
}

export function minSeparation(view: ZoneView, rule: Rule<'min-separation'>): Outcome {
  const limit = nanometresOf(rule.limit, view.criteria.lengthUnit);
  const asked = selected(view, rule).map(({ member }) => member);
  const near = new Set<string>();
  let least: number | null = null;
  asked.forEach((one, at) => {
    for (const other of asked.slice(at + 1)) {
      if (!one.outline || !other.outline || one.indication.view !== other.indication.view) continue;
      const between = separation(one.outline, other.outline);
      if (wouldMerge(view.criteria, view.set, one, other, between)) continue;
      least = least === null ? between : Math.min(least, between);
      if (compare(exact(between), limit) >= 0) continue;
      near.add(one.id);
      near.add(other.id);
    }
  });
  return {
    broken: near.size > 0,
    ids: sorted(near),
    measured: least === null ? null : lengthText(least, view.criteria.lengthUnit),
    rank: least === null ? -Infinity : -least,
  };
}

/** Sum of members' own lengths or areas in the zone. */
export function maxTotal(view: ZoneView, rule: TotalRule): Outcome {
  const asked = selected(view, rule);
  const inches = view.criteria.lengthUnit === 'in';
  const byArea = rule.kind === 'max-total-area';
  const sum = asked.reduce((total, { member }) => total + BigInt((byArea ? member.area : member.length) ?? 0), 0n);
  // Areas are whole µm²: 1 mm² = 10⁶ µm², 1 in² = 645.16 mm².
  const unit = byArea ? (inches ? 645_160_000n : 1_000_000n) : inches ? 25_400_000n : 1_000_000n;
  const limit = byArea
    ? { n: nanometresOf(rule.limit, 'mm').n * (inches ? 64_516n : 100n), d: nanometresOf(rule.limit, 'mm').d * 100n }
    : nanometresOf(rule.limit, view.criteria.lengthUnit);
  const broken = compare({ n: sum, d: 1n }, limit) > 0;
  return {
    broken,
    ids: broken ? sorted(asked.map(({ member }) => member.id)) : [],
    measured: decimalText({ n: sum, d: unit }, 6),
    rank: Number(sum),
  };
}
