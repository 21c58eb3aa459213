import type {
  Criteria,
  EvaluationContext,
  IndicationJudgement,
  IndicationRow,
  Observations,
  RuleRow,
  Verdict,
  Zone,
} from '../evaluate/types';
import { sentence } from '../sentences/sentence';
import type { Sentence } from '../sentences/sentence';
import type { Mark } from './mark';
import { lengthText } from './rounding';
import { judgeRule, shownOf } from './rules/judge-rule';
import { covers } from './scene';
import { surveyOf } from './survey';
import type { PlacedRule, Survey, SurveyedSet } from './survey';

const WORST_FIRST: readonly Verdict[] = ['reject', 'not-evaluable', 'indeterminate'];

function sentenceOf(row: Omit<RuleRow, 'sentence'>, placedRule: PlacedRule, unit: string, band: number | null): Sentence {
  const { rule } = placedRule;
  const indications = row.indications.join(', ');
  const parameters = { zone: row.zone, measured: row.measured, limit: row.limit, unit, indications };
  if (row.verdict === 'not-evaluable') return sentence('indication-rule-waits', parameters);
  const outcome = row.verdict === 'reject' ? 'broken' : 'kept';
  if (placedRule.index < 0) return sentence(`indication-crack-${outcome}`, parameters);
  if (row.verdict === 'reject' && row.measured === null) return sentence('indication-rule-broken-already', parameters);
  if (rule.kind === 'size-bands' && outcome === 'broken') {
    const edge = rule.bands[band !== null && band >= 0 ? band : rule.bands.length - 1]?.to ?? null;
    const code = band !== null && band >= 0 ? `indication-size-bands-${rule.counting}` : 'indication-size-bands-above';
    return sentence(code, { ...parameters, edge });
  }
  if (rule.kind === 'max-count-in-window' || (rule.kind.startsWith('max-total') && 'window' in rule && rule.window)) {
    const { shape, size } = (rule as { readonly window: { readonly shape: string; readonly size: string } }).window;
    return sentence(`indication-${rule.kind}-${shape}-${outcome}`, { ...parameters, size });
  }
  return sentence(`indication-${rule.kind}-${outcome}`, parameters);
}

function rowOf(surveyed: SurveyedSet, placedRule: PlacedRule, zone: Zone, survey: Survey, voided: boolean): RuleRow {
  const { set, methods } = surveyed;
  const parts = surveyed.scenesOf(zone).map((scene) => judgeRule(placedRule.rule, scene));
  const worst = WORST_FIRST.find((verdict) => parts.some((part) => part.verdict === verdict)) ?? 'accept';
  const shown = shownOf(placedRule.rule, parts, survey.unit);
  const carriedOut = methods.length > 0;
  const verdict = voided || !carriedOut ? 'not-evaluable' : worst;
  const breaking = verdict === 'reject' ? parts.flatMap((part) => part.breaking) : [];
  const row = {
    rule: set.id,
    index: placedRule.index,
    kind: placedRule.rule.kind,
    zone: zone.id,
    clause: set.clause ?? null,
    verdict,
    indications: [...new Set(breaking)].sort(),
    measured: carriedOut ? shown.measured : null,
    limit: shown.limit,
  } as const;
  if (voided) return { ...row, sentence: sentence('indication-rule-void', { zone: zone.id }) };
  if (!carriedOut) return { ...row, sentence: sentence('indication-rule-without-method', { methods: set.methods.join(', ') }) };
  return { ...row, sentence: sentenceOf(row, placedRule, survey.unit, shown.band) };
}

function listed(mark: Mark, judgedMarks: ReadonlySet<Mark>, groupOf: ReadonlyMap<Mark, string>): IndicationRow {
  const { sizes } = mark;
  return {
    id: mark.indication.id,
    length: sizes ? lengthText(sizes.lengthNm, 'mm') : null,
    width: sizes ? lengthText(sizes.widthNm, 'mm') : null,
    class: mark.class,
    zones: mark.zones,
    group: groupOf.get(mark) ?? null,
    judged: judgedMarks.has(mark),
  };
}

/**
 * Judges the indications of a body that has passed its form and meaning checks: each one as measured (by id), every rule row in
 * criteria order, and the ids of relevant indications that no rule set covers. Source: the drawing's notes as rule sets; clauses
 * I1 to I11 of the acceptance text.
 */
export function judgeIndications(
  criteria: Criteria,
  observations: Observations,
  context: EvaluationContext,
): IndicationJudgement {
  const survey = surveyOf(criteria, observations);
  const judgedMarks = new Set<Mark>();
  const groupOf = new Map<Mark, string>();
  const rules: RuleRow[] = [];
  for (const surveyed of survey.sets) {
    for (const group of surveyed.groups) {
      const first = group.members[0]?.indication.id;
      for (const member of group.members) {
        if (group.judged) judgedMarks.add(member);
        if (group.members.length > 1 && first !== undefined && !groupOf.has(member)) groupOf.set(member, first);
      }
    }
    for (const placedRule of surveyed.rules) {
      for (const zone of surveyed.zones) rules.push(rowOf(surveyed, placedRule, zone, survey, context.processOutside));
    }
  }
  const unjudged = survey.marks.filter(
    (mark) => mark.relevant && !survey.sets.some(({ set, zones }) => covers(set, mark, zones)),
  );
  return {
    indications: survey.marks.map((mark) => listed(mark, judgedMarks, groupOf)),
    rules,
    unjudged: unjudged.map((mark) => mark.indication.id),
  };
}
