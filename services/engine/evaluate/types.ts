import type { Sentence } from '../sentences/sentence';

/** A decimal as entered: `-?[0-9]{1,16}(\.[0-9]{1,16})?`. */
export type DecimalText = string;
type Maybe<T> = T | null | undefined;

export type Verdict = 'accept' | 'reject' | 'indeterminate' | 'not-evaluable';
export type JudgedVerdict = 'accept' | 'reject' | 'indeterminate';
export type IndicationClass = 'linear' | 'rounded';

export type Decision =
  | { readonly rule: 'simple'; readonly capability?: Maybe<DecimalText> }
  | { readonly rule: 'guarded'; readonly form: 'binary' | 'non-binary'; readonly g?: Maybe<DecimalText> }
  | { readonly rule: 'risk'; readonly r: DecimalText };

export interface Characteristic {
  readonly number: string;
  readonly title?: Maybe<string>;
  readonly unit: string;
  readonly nominal?: Maybe<DecimalText>;
  readonly lower?: Maybe<DecimalText>;
  readonly upper?: Maybe<DecimalText>;
  readonly rounding?: Maybe<'absolute' | 'rounded'>;
  /** In the characteristic's unit; a difference. */
  readonly uncertaintyMax?: Maybe<DecimalText>;
  readonly decision: Decision;
}

export interface AttributeCriterion {
  readonly number: string;
  readonly title?: Maybe<string>;
}

export interface ProcessWindow {
  readonly number: string;
  readonly title?: Maybe<string>;
  readonly unit: string;
  readonly lower?: Maybe<DecimalText>;
  readonly upper?: Maybe<DecimalText>;
}

/** Whole micrometres on the named view, y upwards. */
export type PointUm = readonly [number, number];

export interface Zone {
  readonly id: string;
  readonly view: string;
  readonly polygon: readonly PointUm[];
}

export type Merge = { readonly within: DecimalText } | { readonly factor: DecimalText; readonly of: 'larger' | 'smaller' };

export interface RuleWindow {
  readonly shape: 'circle' | 'square';
  readonly size: DecimalText;
}

export interface SizeBand {
  readonly to: DecimalText;
  readonly count: number | null;
}

interface RuleFilter {
  readonly class?: Maybe<IndicationClass>;
  readonly types?: Maybe<readonly string[]>;
}

export type IndicationRule =
  | {
      readonly kind: 'not-allowed';
      readonly types?: Maybe<readonly string[]>;
      readonly classes?: Maybe<readonly IndicationClass[]>;
    }
  | (RuleFilter & { readonly kind: 'max-size'; readonly limit: DecimalText })
  | (RuleFilter & {
      readonly kind: 'size-bands';
      readonly counting: 'each-band' | 'this-band-and-above';
      readonly bands: readonly SizeBand[];
    })
  | (RuleFilter & { readonly kind: 'max-count'; readonly limit: number })
  | (RuleFilter & { readonly kind: 'max-count-in-window'; readonly window: RuleWindow; readonly limit: number })
  | (RuleFilter & { readonly kind: 'min-separation'; readonly limit: DecimalText })
  | (RuleFilter & {
      readonly kind: 'max-total-length' | 'max-total-area';
      readonly limit: DecimalText;
      readonly window?: Maybe<RuleWindow>;
    })
  | (RuleFilter & {
      readonly kind: 'alignment';
      readonly count: number;
      readonly stripWidth: DecimalText;
      readonly gap: DecimalText;
    })
  | (RuleFilter & {
      readonly kind: 'max-severity';
      readonly category: string;
      readonly reference?: Maybe<string>;
      readonly medium?: Maybe<string>;
      readonly plate?: Maybe<string>;
      readonly limit: number;
      readonly requiredFor?: Maybe<readonly string[]>;
    });

export interface IndicationRuleSet {
  readonly id: string;
  readonly clause?: Maybe<string>;
  readonly zones: readonly string[];
  readonly methods: readonly string[];
  readonly types: readonly string[];
  readonly cracksAllowed?: Maybe<string>;
  readonly recordable?: Maybe<DecimalText>;
  readonly merge?: Maybe<Merge>;
  readonly rules?: Maybe<readonly IndicationRule[]>;
}

export interface Criteria {
  readonly lengthUnit?: Maybe<'mm' | 'in'>;
  readonly linear?: Maybe<{ readonly ratio: DecimalText; readonly at: 'above' | 'at-or-above' }>;
  readonly characteristics?: Maybe<readonly Characteristic[]>;
  readonly attributes?: Maybe<readonly AttributeCriterion[]>;
  readonly process?: Maybe<readonly ProcessWindow[]>;
  readonly zones?: Maybe<readonly Zone[]>;
  readonly indicationRules?: Maybe<readonly IndicationRuleSet[]>;
}

export interface Uncertainty {
  readonly expanded: DecimalText;
  readonly k: DecimalText;
  readonly unit?: Maybe<string>;
}

export interface Reading {
  readonly characteristic: string;
  readonly value: DecimalText;
  readonly unit: string;
  readonly uncertainty?: Maybe<Uncertainty>;
  readonly void?: Maybe<{ readonly reason: string }>;
}

export interface AttributeResult {
  readonly number: string;
  readonly result: 'conforming' | 'nonconforming' | 'not-inspected';
  readonly reason?: Maybe<string>;
}

export interface ProcessValue {
  readonly number: string;
  readonly value: DecimalText;
  readonly unit: string;
}

export type Shape =
  | { readonly kind: 'circle'; readonly center: PointUm; readonly diameter: number }
  | {
      readonly kind: 'ellipse';
      readonly center: PointUm;
      readonly axes: readonly [number, number];
      readonly angle?: Maybe<number>;
    }
  | { readonly kind: 'polyline'; readonly points: readonly PointUm[]; readonly width: number }
  | { readonly kind: 'polygon'; readonly points: readonly PointUm[] }
  | {
      readonly kind: 'entered';
      readonly length: number;
      readonly width: number;
      readonly zone: string;
      readonly basis: string;
      readonly apart?: Maybe<boolean>;
    };

export interface Severity {
  readonly category: string;
  readonly level: number;
  readonly reference?: Maybe<string>;
  readonly medium?: Maybe<string>;
  readonly plate?: Maybe<string>;
}

export interface Indication {
  readonly id: string;
  readonly method: string;
  readonly type: string;
  readonly view: string;
  /** Null in words: a mark without a scale. */
  readonly shape: Shape | null;
  readonly severity?: Maybe<Severity>;
  readonly relevant?: Maybe<{ readonly is: boolean; readonly reason?: Maybe<string> }>;
}

export interface Observations {
  readonly methods?: Maybe<readonly string[]>;
  readonly readings?: Maybe<readonly Reading[]>;
  readonly attributes?: Maybe<readonly AttributeResult[]>;
  readonly process?: Maybe<readonly ProcessValue[]>;
  readonly indications?: Maybe<readonly Indication[]>;
}

export interface Missing {
  readonly kind: 'reading' | 'attribute' | 'process' | 'method';
  readonly number: string;
}

export interface ReadingRow {
  readonly characteristic: string;
  readonly verdict: Verdict;
  readonly inside: boolean;
  readonly lower: DecimalText | null;
  readonly upper: DecimalText | null;
  readonly acceptLower: DecimalText | null;
  readonly acceptUpper: DecimalText | null;
  readonly conformanceProbability: number | null;
  readonly sentence: Sentence;
}

export interface AttributeRow {
  readonly number: string;
  readonly result: AttributeResult['result'];
  readonly verdict: Verdict;
  readonly sentence: Sentence;
}

export interface ProcessRow {
  readonly number: string;
  readonly verdict: 'accept' | 'reject';
  readonly sentence: Sentence;
}

export interface IndicationRow {
  readonly id: string;
  readonly length: DecimalText | null;
  readonly width: DecimalText | null;
  readonly class: IndicationClass | null;
  readonly zones: readonly string[];
  readonly group: string | null;
  readonly judged: boolean;
}

export interface RuleRow {
  readonly rule: string;
  readonly index: number;
  readonly kind: IndicationRule['kind'];
  readonly zone: string;
  readonly clause: string | null;
  readonly verdict: Verdict;
  readonly indications: readonly string[];
  readonly measured: string | null;
  readonly limit: string | null;
  readonly sentence: Sentence;
}

/** What the judging of readings tells the judging of indications. */
export interface EvaluationContext {
  readonly processOutside: boolean;
}

export interface IndicationJudgement {
  readonly indications: readonly IndicationRow[];
  readonly rules: readonly RuleRow[];
  readonly unjudged: readonly string[];
}

export interface Evaluation {
  readonly engine: string;
  readonly criteriaDigest: string;
  readonly inputDigest: string;
  readonly verdict: Verdict;
  readonly verdictSoFar: JudgedVerdict | null;
  readonly complete: boolean;
  readonly missing: readonly Missing[];
  readonly readings: readonly ReadingRow[];
  readonly attributes: readonly AttributeRow[];
  readonly process: readonly ProcessRow[];
  readonly indications: readonly IndicationRow[];
  readonly rules: readonly RuleRow[];
  readonly unjudged: readonly string[];
}
