import type { IndicationRule } from '../evaluate/types';
import { holds, type Member } from './members';
import { selected, type Outcome, type ZoneView } from './rule-outcome';

type Rule = Extract<IndicationRule, { readonly kind: 'max-severity' }>;

function matches(rule: Rule, { indication: { severity } }: Member): boolean {
  if (!severity) return false;
  const same = (asked: string | null | undefined, said: string | null | undefined) =>
    asked === null || asked === undefined || asked === said;
  return same(rule.reference, severity.reference) && same(rule.medium, severity.medium) && same(rule.plate, severity.plate);
}

/** Severity levels of a category against the limit; `waits` names the indications whose level cannot be judged. */
export function maxSeverity(view: ZoneView, rule: Rule): Outcome & { readonly waits: readonly string[] } {
  const asked = selected(view, rule).map(({ member }) => member);
  const ofCategory = asked.filter(({ indication }) => indication.severity?.category === rule.category);
  const matching = ofCategory.filter((member) => matches(rule, member));
  const lacking = asked.filter(
    ({ indication }) => holds(rule.requiredFor ?? [], indication.type) && indication.severity?.category !== rule.category,
  );
  const over = matching.filter(({ indication }) => (indication.severity?.level ?? 0) > rule.limit);
  const highest = Math.max(-1, ...matching.map(({ indication }) => indication.severity?.level ?? 0));
  return {
    broken: over.length > 0,
    ids: over.map(({ id }) => id).sort(),
    measured: highest < 0 ? null : String(highest),
    rank: highest,
    waits: [...lacking, ...ofCategory.filter((member) => !matching.includes(member))].map(({ id }) => id).sort(),
  };
}
