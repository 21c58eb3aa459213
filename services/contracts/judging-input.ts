import type { InspectionContent } from './inspection-content';
import type { PlanContent, PlanRequirement } from './plan-content';

/** Uncertainty of one measurement process: technique x characteristic x kind of gauge. */
export interface ProcessUncertainty {
  readonly characteristic: string;
  readonly gaugeKind: string;
  readonly expanded: string;
  readonly k: string;
  readonly unit: string;
}

export interface JudgingSource {
  readonly plan: Pick<PlanContent, 'criteria'>;
  readonly requirement: PlanRequirement;
  readonly content: InspectionContent;
  readonly uncertainties: readonly ProcessUncertainty[];
  /** Kinds of the equipment named in the acts; empty while none is named. */
  readonly gaugeKinds: readonly string[];
}

/** The engine's input, and for each list where its rows stand in the draft (for naming faults by field). */
export interface JudgingInput {
  readonly criteria: Record<string, unknown>;
  readonly observations: {
    readonly methods: string[];
    readonly readings: Record<string, unknown>[];
    readonly attributes: Record<string, unknown>[];
    readonly process: Record<string, unknown>[];
    readonly indications: Record<string, unknown>[];
  };
  readonly places: Readonly<Record<JudgedList, readonly number[]>>;
}

export type JudgedList = 'readings' | 'attributes' | 'process' | 'indications';

type Row = Record<string, unknown>;

function rowsOf(criteria: Row, list: string): Row[] {
  const rows = criteria[list];
  return Array.isArray(rows) ? rows.filter((row): row is Row => typeof row === 'object' && row !== null) : [];
}

/** The part of a plan's criteria that one requirement asks: its numbers and rule sets, and the zones they and its views need. */
export function criteriaOfRequirement(criteria: Row, requirement: PlanRequirement): Row {
  const characteristics = rowsOf(criteria, 'characteristics').filter((row) =>
    requirement.characteristics.includes(String(row.number)),
  );
  const attributes = rowsOf(criteria, 'attributes').filter((row) => requirement.attributes.includes(String(row.number)));
  const process = rowsOf(criteria, 'process').filter((row) => requirement.process.includes(String(row.number)));
  const indicationRules = rowsOf(criteria, 'indicationRules').filter((row) =>
    requirement.indicationRules.includes(String(row.id)),
  );
  const ruled = new Set(indicationRules.flatMap((row) => (Array.isArray(row.zones) ? row.zones.map(String) : [])));
  const zones =
    indicationRules.length === 0
      ? []
      : rowsOf(criteria, 'zones').filter((row) => ruled.has(String(row.id)) || requirement.views.includes(String(row.view)));
  return {
    ...(indicationRules.length > 0 && criteria.lengthUnit !== undefined ? { lengthUnit: criteria.lengthUnit } : {}),
    ...(indicationRules.length > 0 && criteria.linear !== undefined ? { linear: criteria.linear } : {}),
    characteristics,
    attributes,
    process,
    zones,
    indicationRules,
  };
}

/**
 * The uncertainty that counts for a characteristic: of the kinds of gauge named, or of every kind while none is named;
 * of several the largest (the cautious one). Undefined when none is on record.
 */
export function uncertaintyFor(
  characteristic: string,
  source: Pick<JudgingSource, 'uncertainties' | 'gaugeKinds'>,
): ProcessUncertainty | undefined {
  const known = source.uncertainties.filter((one) => one.characteristic === characteristic);
  const named = source.gaugeKinds.length === 0 ? known : known.filter((one) => source.gaugeKinds.includes(one.gaugeKind));
  return named.reduce<ProcessUncertainty | undefined>(
    (worst, one) => (worst === undefined || Number(one.expanded) > Number(worst.expanded) ? one : worst),
    undefined,
  );
}

/** Kinds of the equipment that measured: they decide which uncertainty counts. */
export function gaugeKindsOf(
  content: InspectionContent,
  equipment: readonly { readonly id: string; readonly kind: string }[],
): string[] {
  const measuring = new Set(content.acts.filter(({ kind }) => kind === 'measured').flatMap((act) => act.equipment));
  return [...new Set(equipment.filter(({ id }) => measuring.has(id)).map(({ kind }) => kind))];
}

/** The method counts as carried out when the person says the part was examined, or anything was marked. */
function methodsCarriedOut(requirement: PlanRequirement, content: InspectionContent): string[] {
  return content.examined || content.indications.length > 0 ? [requirement.method] : [];
}

function isBlank(text: string): boolean {
  return text.trim() === '';
}

/**
 * What the engine is asked about a draft. Pure: the server's record and the bench's live verdict come from this one
 * mapping. A field left blank is not given; everything else goes to the engine as typed.
 */
export function judgingInput(source: JudgingSource): JudgingInput {
  const { content, requirement } = source;
  const places: Record<JudgedList, number[]> = { readings: [], attributes: [], process: [], indications: [] };
  const readings = content.readings.flatMap((reading, place): Row[] => {
    if (isBlank(reading.value)) return [];
    places.readings.push(place);
    const uncertainty = uncertaintyFor(reading.characteristic, source);
    return [
      {
        characteristic: reading.characteristic,
        value: reading.value,
        unit: reading.unit,
        ...(uncertainty ? { uncertainty: { expanded: uncertainty.expanded, k: uncertainty.k, unit: uncertainty.unit } } : {}),
        ...(reading.void ? { void: { reason: reading.void.reason } } : {}),
      },
    ];
  });
  const attributes = content.attributes.map((attribute, place): Row => {
    places.attributes.push(place);
    return { number: attribute.number, result: attribute.result, ...(attribute.reason ? { reason: attribute.reason } : {}) };
  });
  const process = content.process.flatMap((value, place): Row[] => {
    if (isBlank(value.value)) return [];
    places.process.push(place);
    return [{ number: value.number, value: value.value, unit: value.unit }];
  });
  const indications = content.indications.map((indication, place): Row => {
    places.indications.push(place);
    return {
      id: indication.id,
      method: requirement.method,
      type: indication.type,
      view: indication.view,
      shape: indication.shape ?? null,
      ...(indication.severity === undefined || indication.severity === null ? {} : { severity: indication.severity }),
      ...(indication.relevant === undefined || indication.relevant === null ? {} : { relevant: indication.relevant }),
    };
  });
  return {
    criteria: criteriaOfRequirement(source.plan.criteria, requirement),
    observations: { methods: methodsCarriedOut(requirement, content), readings, attributes, process, indications },
    places,
  };
}
