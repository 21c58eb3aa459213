import type { EvaluationAnswer } from './evaluate';

const outcome: Readonly<Record<EvaluationAnswer['verdict'], string>> = {
  accept: 'it conforms to what this operation asks',
  reject: 'it does not conform to what this operation asks',
  indeterminate: 'the measurement cannot decide whether it conforms',
  'not-evaluable': 'this inspection is void, because a process value was outside its window',
};

export interface SignedSubject {
  readonly name: string;
  readonly serial: string;
  readonly partNumber: string;
  readonly revision: string;
  readonly planIssue: number;
  readonly operation: string;
  readonly title: string;
  readonly verdict: EvaluationAnswer['verdict'];
}

/** The sentence a person signs for an inspection: shown on the bench beforehand, stored as shown. */
export function inspectionSentence(subject: SignedSubject): string {
  const { name, serial, partNumber, revision, planIssue, operation, title, verdict } = subject;
  return `I, ${name}, inspected serial ${serial} of ${partNumber} revision ${revision} in operation ${operation}, ${title}, by plan issue ${String(planIssue)}, and found: ${outcome[verdict]}.`.slice(
    0,
    600,
  );
}

export interface SignedBasket {
  readonly name: string;
  readonly basket: string;
  readonly partNumber: string;
  readonly operation: string;
  readonly title: string;
  readonly count: number;
}

/** The sentence one signature signs for a basket: shown beforehand above the list of serials and what each was found to be. */
export function basketSentence({ name, basket, partNumber, operation, title, count }: SignedBasket): string {
  return `I, ${name}, individually inspected each of the ${String(count)} listed parts of ${partNumber} in basket ${basket} in operation ${operation}, ${title}, and found each as recorded.`.slice(
    0,
    400,
  );
}

/** What the record of one inspection of a basket says: the sentence signed, and what it said of this serial. */
export function basketPartSentence(sentence: string, subject: SignedSubject): string {
  const { serial, revision, planIssue, verdict } = subject;
  return `${sentence} Serial ${serial}, revision ${revision}, by plan issue ${String(planIssue)}: ${outcome[verdict]}.`.slice(
    0,
    600,
  );
}
