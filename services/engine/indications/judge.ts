import type {
  Criteria,
  EvaluationContext,
  IndicationJudgement,
  IndicationRow,
  IndicationRule,
  IndicationRuleSet,
  Observations,
  RuleRow,
  Verdict,
} from '../evaluate/types';
import { sentence } from '../sentences/sentence';
import { groupsOf, type Group } from './groups';
import { holds, isCovered, membersOf, type Member } from './members';
import {
  lengthText,
  maxCount,
  maxSize,
  maxTotal,
  minSeparation,
  notAllowed,
  sizeBands,
  type Outcome,
  type ZoneView,
} from './rule-outcome';
import { maxSeverity } from './severity';

interface Judged extends Outcome {
  readonly verdict: Verdict;
  /** Indications the row waits for. */
  readonly waits: readonly string[];
}

const crackRule: IndicationRule = { kind: 'not-allowed', types: ['crack'] };
const nothing: Outcome = { broken: false, ids: [], measured: null, rank: 0 };

function outcomeOf(view: ZoneView, rule: IndicationRule): Outcome & { readonly waits?: readonly string[] } {
  switch (rule.kind) {
    case 'not-allowed':
      return notAllowed(view, rule);
    case 'max-size':
      return maxSize(view, rule);
    case 'size-bands':
      return sizeBands(view, rule);
    case 'max-count':
      return maxCount(view, rule);
    case 'min-separation':
      return minSeparation(view, rule);
    case 'max-total-length':
    case 'max-total-area':
      return maxTotal(view, rule);
    case 'max-severity':
      return maxSeverity(view, rule);
    default:
      // Unbuilt kinds are refused as faults before anything is judged.
      throw new Error(`${rule.kind} is not judged`);
  }
}

function needsPlace(rule: IndicationRule): boolean {
  return rule.kind === 'min-separation' || rule.kind === 'alignment' || 'window' in rule;
}

/** Indications of the zone whose missing place or scale could change this row (rule I2). */
function waitsFor(view: ZoneView, rule: IndicationRule, unscaled: readonly Member[]): string[] {
  const byType = rule.kind === 'not-allowed' && rule.types;
  const waiting = unscaled.filter(({ indication }) => !byType || holds(rule.types ?? [], indication.type));
  const present = view.groups
    .filter(({ judged }) => judged)
    .flatMap(({ members }) => members)
    .filter(({ zones }) => zones.includes(view.zone));
  const placeless = present.filter(
    ({ indication: { shape } }) => shape?.kind === 'entered' && shape.apart !== true && present.length > 1,
  );
  const whole = view.set.merge && rule.kind !== 'max-count' && !byType;
  if (needsPlace(rule) || whole) waiting.push(...placeless);
  if (byType) return [];
  return waiting.map(({ id }) => id);
}

function judgeView(view: ZoneView, rule: IndicationRule, unscaled: readonly Member[]): Judged {
  const outcome = outcomeOf(view, rule);
  const waits = [...waitsFor(view, rule, unscaled), ...(outcome.waits ?? [])];
  if (outcome.broken) return { ...outcome, verdict: 'reject', waits: [] };
  if (waits.length > 0) return { ...nothing, verdict: 'not-evaluable', waits };
  return { ...outcome, verdict: 'accept', waits };
}

function worse(one: Judged, other: Judged): Judged {
  const order: readonly Verdict[] = ['accept', 'not-evaluable', 'reject'];
  const difference = order.indexOf(one.verdict) - order.indexOf(other.verdict);
  if (difference !== 0) return difference > 0 ? one : other;
  return other.rank > one.rank ? other : one;
}

function limitOf(rule: IndicationRule): string | null {
  if ('limit' in rule) return String(rule.limit);
  if (rule.kind === 'alignment') return String(rule.count);
  return null;
}

function sentenceOf(index: number, rule: IndicationRule, zone: string, judged: Judged | null) {
  const parameters = {
    zone,
    kind: rule.kind,
    measured: judged?.measured ?? '',
    limit: limitOf(rule) ?? '',
    indications: (judged?.waits.length ? judged.waits : (judged?.ids ?? [])).join(', '),
  };
  if (!judged) return sentence('rule-not-carried-out', parameters);
  if (judged.verdict === 'not-evaluable') return sentence('rule-waits', parameters);
  if (index === -1) return sentence(judged.verdict === 'reject' ? 'crack-rejected' : 'no-crack', parameters);
  const base = judged.verdict === 'reject' ? 'rule-broken' : 'rule-met';
  return sentence(judged.measured !== null && limitOf(rule) !== null ? `${base}-measured` : base, parameters);
}

interface Sorted {
  readonly method: string;
  readonly view: string;
  readonly groups: readonly Group[];
}

/** One rule set with everything sorted by method and view. */
class SetInWork {
  readonly sorted: readonly Sorted[];
  readonly covered: readonly Member[];

  constructor(
    readonly criteria: Criteria,
    readonly set: IndicationRuleSet,
    members: readonly Member[],
    views: ReadonlyMap<string, string>,
  ) {
    this.covered = members.filter((member) => member.relevant && isCovered(member, set, views));
    const scaled = this.covered.filter(({ length }) => length !== null);
    const keys = new Map<string, Member[]>();
    for (const member of scaled) {
      const key = JSON.stringify([member.indication.method, member.indication.view]);
      keys.set(key, [...(keys.get(key) ?? []), member]);
    }
    this.sorted = [...keys].map(([key, list]) => {
      const [method = '', view = ''] = JSON.parse(key) as string[];
      return { method, view, groups: groupsOf(criteria, set, list) };
    });
  }

  rows(methods: readonly string[], views: ReadonlyMap<string, string>): RuleRow[] {
    const { set } = this;
    const rules: (readonly [number, IndicationRule])[] = (set.rules ?? []).map((rule, index) => [index, rule] as const);
    const crack = holds(set.types, 'crack') && !set.cracksAllowed ? [[-1, crackRule] as const] : [];
    return [...crack, ...rules].flatMap(([index, rule]) =>
      set.zones.map((zone) => this.row(index, rule, zone, methods, views.get(zone) ?? '')),
    );
  }

  private row(index: number, rule: IndicationRule, zone: string, methods: readonly string[], zoneView: string): RuleRow {
    const { set } = this;
    const asked = methods.filter((method) => holds(set.methods, method));
    const judged = asked
      .map((method) => this.judge(rule, zone, method, zoneView))
      .reduce<Judged | null>((worst, one) => (worst ? worse(worst, one) : one), null);
    return {
      rule: set.id,
      index,
      kind: rule.kind,
      zone,
      clause: set.clause ?? null,
      verdict: judged?.verdict ?? 'not-evaluable',
      indications: judged?.ids ?? [],
      measured: judged?.measured ?? null,
      limit: limitOf(rule),
      sentence: sentenceOf(index, rule, zone, judged),
    };
  }

  private judge(rule: IndicationRule, zone: string, method: string, zoneView: string): Judged {
    const groups = this.sorted
      .filter((one) => one.method === method)
      .flatMap((one) => one.groups)
      .filter((group) => group.members.some(({ zones }) => zones.includes(zone)));
    const unscaled = this.covered.filter(
      ({ length, indication }) => length === null && indication.method === method && indication.view === zoneView,
    );
    const seen = [
      ...this.covered.filter(({ indication, zones }) => indication.method === method && zones.includes(zone)),
      ...unscaled,
    ];
    return judgeView({ criteria: this.criteria, set: this.set, zone, groups, seen }, rule, unscaled);
  }
}

/** Judges indications by every rule set; rows by rule set, rule and zone in criteria order, pass or fail. */
export function judgeIndications(
  criteria: Criteria,
  observations: Observations,
  _context: EvaluationContext,
): IndicationJudgement {
  const members = membersOf(criteria, observations);
  const views = new Map((criteria.zones ?? []).map(({ id, view }) => [id, view]));
  const sets = (criteria.indicationRules ?? []).map((set) => new SetInWork(criteria, set, members, views));
  const methods = [...(observations.methods ?? [])];
  const groups = sets.map(({ sorted }) => sorted.flatMap((one) => one.groups));
  const rowOf = (member: Member): IndicationRow => {
    const merged = groups.flat().find((group) => group.members.length > 1 && group.members.includes(member));
    return {
      id: member.id,
      length: member.length === null ? null : lengthText(member.length, 'mm'),
      width: member.width === null ? null : lengthText(member.width, 'mm'),
      class: member.class,
      zones: member.zones,
      group: merged?.members[0]?.id ?? null,
      judged: groups.flat().some((group) => group.judged && group.members.includes(member)),
    };
  };
  return {
    indications: members.map(rowOf),
    rules: sets.flatMap((one) => one.rows(methods, views)),
    unjudged: members
      .filter((member) => member.relevant && !sets.some(({ covered }) => covered.includes(member)))
      .map(({ id }) => id),
  };
}
