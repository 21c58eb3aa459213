import type { IndicationRule } from '../../evaluate/types';
import { areaText, lengthText, limitText } from '../rounding';
import type { LengthUnit } from '../rounding';
import type { Scene } from '../scene';
import type { Part } from './part';
import { judgeAlignment, judgeCountInWindow, judgeMinSeparation, judgeTotalInWindow } from './places';
import { judgeMaxCount, judgeMaxSeverity, judgeMaxSize, judgeNotAllowed, judgeSizeBands, judgeTotal } from './sizes-and-counts';

/** Judges one rule in one zone by one method. */
export function judgeRule(rule: IndicationRule, scene: Scene): Part {
  switch (rule.kind) {
    case 'not-allowed':
      return judgeNotAllowed(rule, scene);
    case 'max-size':
      return judgeMaxSize(rule, scene);
    case 'size-bands':
      return judgeSizeBands(rule, scene);
    case 'max-count':
      return judgeMaxCount(rule, scene);
    case 'max-count-in-window':
      return judgeCountInWindow(rule, scene);
    case 'min-separation':
      return judgeMinSeparation(rule, scene);
    case 'max-total-length':
    case 'max-total-area':
      return rule.window ? judgeTotalInWindow(rule, rule.window, scene) : judgeTotal(rule, scene);
    case 'alignment':
      return judgeAlignment(rule, scene);
    case 'max-severity':
      return judgeMaxSeverity(rule, scene);
  }
}

function bandRank(part: Part): number {
  return part.band ?? Infinity;
}

/** Of several methods' findings the worst to show: for bands the first broken one, for separations the least, else the largest. */
function worstMeasured(kind: IndicationRule['kind'], parts: readonly Part[]): Part | undefined {
  return [...parts]
    .filter((part) => part.measured !== null)
    .sort((a, b) => {
      const larger = (b.measured ?? 0) - (a.measured ?? 0);
      if (kind === 'min-separation') return -larger;
      if (kind === 'size-bands' && bandRank(a) !== bandRank(b)) return bandRank(a) - bandRank(b);
      return larger;
    })[0];
}

function measuredText(rule: IndicationRule, value: number, unit: LengthUnit): string {
  switch (rule.kind) {
    case 'max-size':
    case 'min-separation':
    case 'max-total-length':
      return lengthText(value, unit);
    case 'max-total-area':
      return areaText(value, unit);
    default:
      return String(value);
  }
}

function limitOf(rule: IndicationRule, band: number | null): string | null {
  switch (rule.kind) {
    case 'not-allowed':
      return null;
    case 'size-bands': {
      if (band === null) return null;
      const count = band < 0 ? 0 : rule.bands[band]?.count;
      return count === undefined || count === null ? null : String(count);
    }
    case 'alignment':
      return String(rule.count);
    case 'max-size':
    case 'min-separation':
    case 'max-total-length':
    case 'max-total-area':
      return limitText(rule.limit);
    default:
      return String(rule.limit);
  }
}

/** What a row shows as measured and as limit, over the methods it was taken for. */
export function shownOf(
  rule: IndicationRule,
  parts: readonly Part[],
  unit: LengthUnit,
): { measured: string | null; limit: string | null; band: number | null } {
  const waits = parts.some((part) => part.waits);
  if (rule.kind === 'not-allowed') {
    const words = [...new Set(parts.flatMap((part) => part.words))].sort();
    return { measured: waits || words.length === 0 ? null : words.join(', '), limit: null, band: null };
  }
  const worst = worstMeasured(rule.kind, parts);
  const bands = parts.flatMap((part) => (part.band === null ? [] : [part.band]));
  const band = bands.length > 0 ? Math.min(...bands) : null;
  const measured =
    waits || worst?.measured === undefined || worst.measured === null ? null : measuredText(rule, worst.measured, unit);
  return { measured, limit: limitOf(rule, band), band };
}
