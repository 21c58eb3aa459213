import type { IndicationClass, IndicationRule, Verdict } from '../../evaluate/types';
import type { Member, Scene } from '../scene';

/** What one rule finds in one zone by one method. */
export interface Part {
  readonly verdict: Verdict;
  /** Ids of what breaks the rule. */
  readonly breaking: readonly string[];
  /** In the rule's own whole unit (nm, µm², a count, a level); null: nothing to measure. */
  readonly measured: number | null;
  /** Types or classes found, for `not-allowed`. */
  readonly words: readonly string[];
  /** The first broken band; −1 above the last edge; null when none is. */
  readonly band: number | null;
  /** Something it asks of is not known: nothing measured is shown. */
  readonly waits: boolean;
}

interface Finding {
  readonly breaking: readonly Member[];
  readonly measured: number | null;
  readonly waits: boolean;
  /** What is not known could break it. */
  readonly open: boolean;
  readonly words?: readonly string[];
  readonly band?: number | null;
}

/** A row is `reject` when what can be judged breaks it, `not-evaluable` only when what cannot be judged could. */
export function partOf(
  { breaking, measured, waits, open, words = [], band = null }: Finding,
  broken = breaking.length > 0,
): Part {
  return {
    verdict: broken ? 'reject' : waits && open ? 'not-evaluable' : 'accept',
    breaking: breaking.map((member) => member.mark.indication.id),
    measured: waits ? null : measured,
    words: waits ? [] : words,
    band,
    waits,
  };
}

type Filtered = IndicationRule & { readonly class?: IndicationClass | null; readonly types?: readonly string[] | null };

export function ofTypes(types: readonly string[] | null | undefined, member: Member): boolean {
  return !types || types.includes('*') || types.includes(member.mark.indication.type);
}

/** Judged members that a rule's filters select as things stand. */
export function selected(rule: Filtered, scene: Scene): readonly Member[] {
  return scene.members.filter(
    (member) => member.judged && ofTypes(rule.types, member) && (!rule.class || member.group?.classes.has(rule.class) === true),
  );
}

/** Every member that a rule's filters could come to select. */
export function selectable(rule: Filtered, scene: Scene): readonly Member[] {
  return scene.members.filter(
    (member) => member.maybeJudged && ofTypes(rule.types, member) && (!rule.class || member.couldBe(rule.class)),
  );
}

/** Members of which the place is not known. */
export function floating(members: readonly Member[]): readonly Member[] {
  return members.filter((member) => member.unplaced || member.group === null);
}

/** Members with a place, and those known to lie apart or alone, in that order. */
export function placed(members: readonly Member[]): { drawn: readonly Member[]; alone: readonly Member[] } {
  return {
    drawn: members.filter((member) => member.mark.drawn),
    alone: members.filter((member) => !member.mark.drawn && member.group !== null),
  };
}

/** Whether a rule that needs places waits: for the set's merging, a mark without a scale, or two of its own not both placed. */
export function waitsForPlace(scene: Scene, could: readonly Member[]): boolean {
  if (scene.scaleless || scene.growing) return true;
  return could.length > 1 && could.some((member) => member.unplaced);
}

export function total(members: readonly Member[], of: 'lengthNm' | 'areaUm2'): number {
  return members.reduce((sum, member) => sum + (member.mark.sizes ? member.mark.sizes[of] : Infinity), 0);
}
