import type { IndicationRule } from '../../evaluate/types';
import { areaLimit, lengthLimit } from '../rounding';
import type { Scene } from '../scene';
import { ofTypes, partOf, selectable, selected, total } from './part';
import type { Part } from './part';

type Rule<Kind extends IndicationRule['kind']> = Extract<IndicationRule, { readonly kind: Kind }>;

/** By types any relevant indication whatever its size; by classes any judged group. */
export function judgeNotAllowed(rule: Rule<'not-allowed'>, scene: Scene): Part {
  const { types, classes } = rule;
  const byType = types ? scene.members.filter((member) => ofTypes(types, member)) : [];
  const byClass = (classes ?? []).map((wanted) => ({
    wanted,
    members: scene.members.filter((member) => member.judged && member.group?.classes.has(wanted)),
  }));
  const words = new Set(byType.map((member) => member.mark.indication.type));
  for (const { wanted, members } of byClass) if (members.length > 0) words.add(wanted);
  const breaking = new Set([...byType, ...byClass.flatMap(({ members }) => members)]);
  return partOf({
    breaking: [...breaking],
    measured: null,
    words: [...words],
    waits: byClass.length > 0 && (scene.scaleless || scene.growing),
    open: byClass.some(({ wanted }) => scene.members.some((member) => member.maybeJudged && member.couldBe(wanted))),
  });
}

/** Looks at groups with a selected member in the zone; names their members in the zone. */
export function judgeMaxSize(rule: Rule<'max-size'>, scene: Scene): Part {
  const limit = lengthLimit(rule.limit, scene.unit);
  const groups = new Set(selected(rule, scene).map((member) => member.group));
  let largest: number | null = null;
  for (const group of groups) if (group) largest = Math.max(largest ?? 0, group.lengthNm);
  return partOf({
    breaking: scene.members.filter((member) => member.group && groups.has(member.group) && member.group.lengthNm > limit.floor),
    measured: largest,
    waits: scene.scaleless || scene.growing,
    open: selectable(rule, scene).some((member) => member.upperNm > limit.floor),
  });
}

/** Members by the size of their group: above the last edge, or too many in a band (or in it and above). */
export function judgeSizeBands(rule: Rule<'size-bands'>, scene: Scene): Part {
  const edges = rule.bands.map((band) => lengthLimit(band.to, scene.unit).floor);
  const last = edges[edges.length - 1] ?? -1;
  const cumulative = rule.counting === 'this-band-and-above';
  const startOf = (band: number) => (band === 0 ? -1 : (edges[band - 1] ?? -1));
  const holds = (band: number, low: number, high: number) => high > startOf(band) && (cumulative || low <= (edges[band] ?? -1));
  const sure = selected(rule, scene).filter((member) => cumulative || !member.unplaced || !scene.growing);
  const above = selected(rule, scene).filter((member) => (member.group?.lengthNm ?? 0) > last);
  const could = selectable(rule, scene);
  const breaking = new Set(above);
  let first: { band: number; count: number } | null = above.length > 0 ? { band: -1, count: above.length } : null;
  let open = could.some((member) => member.upperNm > last);
  rule.bands.forEach(({ count }, band) => {
    if (count === null) return;
    const inBand = sure.filter(({ group }) => group && holds(band, group.lengthNm, group.lengthNm));
    if (inBand.length > count) {
      first ??= { band, count: inBand.length };
      for (const member of inBand) breaking.add(member);
    }
    if (could.filter((member) => holds(band, member.group?.lengthNm ?? 0, member.upperNm)).length > count) open = true;
  });
  return partOf({
    breaking: [...breaking],
    measured: first?.count ?? 0,
    band: first?.band ?? null,
    waits: scene.scaleless || scene.growing,
    open,
  });
}

/** More members than the limit; a member without a place still counts. */
export function judgeMaxCount(rule: Rule<'max-count'>, scene: Scene): Part {
  const members = selected(rule, scene);
  const breaks = members.length > rule.limit;
  return partOf({
    breaking: breaks ? members : [],
    measured: members.length,
    waits: scene.scaleless,
    open: selectable(rule, scene).length > rule.limit,
  });
}

/** The sum of members' own lengths or areas in the whole zone. */
export function judgeTotal(rule: Rule<'max-total-length' | 'max-total-area'>, scene: Scene): Part {
  const [of, limit] =
    rule.kind === 'max-total-length'
      ? (['lengthNm', lengthLimit(rule.limit, scene.unit)] as const)
      : (['areaUm2', areaLimit(rule.limit, scene.unit)] as const);
  const members = selected(rule, scene);
  const sum = total(members, of);
  return partOf({
    breaking: sum > limit.floor ? members : [],
    measured: sum,
    waits: scene.scaleless || scene.growing,
    open: total(selectable(rule, scene), of) > limit.floor,
  });
}

/** A judged indication of the category above the limit; what is not comparable, or missing where required, waits. */
export function judgeMaxSeverity(rule: Rule<'max-severity'>, scene: Scene): Part {
  const stated = (['reference', 'medium', 'plate'] as const).filter((key) => rule[key] !== undefined && rule[key] !== null);
  const levels = selectable(rule, scene).map((member) => {
    const { severity, type } = member.mark.indication;
    const sure = member.judged && (!rule.class || member.group?.classes.has(rule.class) === true);
    if (severity?.category !== rule.category) {
      const required = rule.requiredFor?.some((name) => name === '*' || name === type) === true;
      return { member, sure, level: null, unknown: required };
    }
    const comparable = stated.every((key) => severity[key] === rule[key]);
    return { member, sure, level: comparable ? severity.level : null, unknown: !comparable };
  });
  const over = levels.filter(({ level }) => level !== null && level > rule.limit);
  const known = levels.flatMap(({ sure, level }) => (sure && level !== null ? [level] : []));
  return partOf({
    breaking: over.filter(({ sure }) => sure).map(({ member }) => member),
    measured: known.length > 0 ? Math.max(...known) : null,
    waits: scene.scaleless || scene.growing || levels.some(({ sure, unknown }) => sure && unknown),
    open: over.length > 0 || levels.some(({ unknown }) => unknown),
  });
}
