import type { AuthorisationRow, VisionRow } from '@/db/repositories/act-conditions';
import { monthsBefore } from './plant-day';

// Near vision within 12 months as release gate 3 demands; colour perception within 5 years as EN 4179 and NAS 410 ask (from memory).
const nearVisionMonths = 12;
const colourMonths = 60;
const levelsThatCount: readonly string[] = ['2', '3'];

export interface PersonQuestion {
  readonly accountId: string;
  readonly name: string;
  readonly method: string;
  readonly technique: string | null;
  /** Instant of the act, and the same as a day of the plant. */
  readonly at: string;
  readonly day: string;
}

export interface PersonStanding {
  readonly authorisation: AuthorisationRow | null;
  readonly nearVision: VisionRow | null;
  readonly colourPerception: VisionRow | null;
  /** Empty when the person's work counts. */
  readonly reasons: readonly string[];
}

function newest(tests: readonly VisionRow[], question: PersonQuestion, test: VisionRow['test']): VisionRow | null {
  return tests.find((row) => row.accountId === question.accountId && row.test === test && row.testedOn <= question.day) ?? null;
}

function visionReason(row: VisionRow | null, name: string, words: string, months: number, day: string): string[] {
  if (!row) return [`${name} has no ${words} test on record`];
  if (row.result === 'fail') return [`${name} did not pass the ${words} test of ${row.testedOn}`];
  return row.testedOn < monthsBefore(day, months)
    ? [`${name}'s ${words} test of ${row.testedOn} is older than ${String(months)} months`]
    : [];
}

/** Did a person's authorisation and eyesight count for a method and technique at the time of an act? Every reason at once. */
export function personStanding(
  question: PersonQuestion,
  authorisations: readonly AuthorisationRow[],
  tests: readonly VisionRow[],
): PersonStanding {
  const { name, day, at, technique, method } = question;
  const own = authorisations.filter(
    (row) => row.accountId === question.accountId && (row.technique === null || row.technique === technique),
  );
  const standing = own.filter(
    (row) => row.validFrom <= day && row.validTo >= day && (row.withdrawnAt === null || row.withdrawnAt > at),
  );
  const authorisation = standing.find(({ level }) => levelsThatCount.includes(level)) ?? null;
  const nearVision = newest(tests, question, 'near-vision');
  const colourPerception = newest(tests, question, 'colour-perception');
  const work = technique === null ? method : `${method}, ${technique}`;
  const reasons = [
    ...(authorisation ? [] : [authorisationReason(name, work, day, own, standing)]),
    ...visionReason(nearVision, name, 'near vision', nearVisionMonths, day),
    ...visionReason(colourPerception, name, 'colour perception', colourMonths, day),
  ];
  return { authorisation, nearVision, colourPerception, reasons };
}

function authorisationReason(
  name: string,
  work: string,
  day: string,
  own: readonly AuthorisationRow[],
  standing: readonly AuthorisationRow[],
): string {
  const lower = standing[0];
  if (lower) return `${name} is level ${lower.level} in ${work}; level 2 or 3 is needed`;
  const other = own[0];
  if (!other) return `${name} is not authorised for ${work}`;
  if (other.withdrawnAt !== null) return `${name}'s authorisation for ${work} was withdrawn`;
  return other.validFrom > day
    ? `${name}'s authorisation for ${work} begins on ${other.validFrom}`
    : `${name}'s authorisation for ${work} ended on ${other.validTo}`;
}
