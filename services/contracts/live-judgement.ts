import type { EvaluationAnswer } from './evaluate';
import { judgingInput, type JudgedList, type JudgingInput, type JudgingSource } from './judging-input';

export interface EntryFault {
  /** `readings.3.value`: list and place in the draft. */
  readonly path: string;
  readonly message: string;
}

/** The live verdict of a draft: what can be judged is judged, what cannot is named by field. */
export interface Judgement {
  /** Null only when the criteria themselves cannot be judged. */
  readonly evaluation: EvaluationAnswer | null;
  readonly faults: readonly EntryFault[];
}

/** The engine as a function of its body: an answer, or faults with paths from the body's root. */
export type AskEngine = (body: {
  readonly criteria: unknown;
  readonly observations: unknown;
}) => { readonly evaluation: EvaluationAnswer } | { readonly faults: readonly EntryFault[] };

const lists: readonly JudgedList[] = ['readings', 'attributes', 'process', 'indications'];

interface Located {
  readonly list: JudgedList;
  readonly row: number;
  readonly rest: string;
}

function locate(path: string): Located | undefined {
  const [root, list, row, ...rest] = path.split('.');
  const named = lists.find((one) => one === list);
  if (root !== 'observations' || named === undefined || row === undefined || !/^[0-9]+$/.test(row)) return undefined;
  return { list: named, row: Number(row), rest: rest.join('.') };
}

function without(input: JudgingInput, faults: readonly Located[]): JudgingInput {
  const kept = (list: JudgedList) =>
    input.places[list].map((_, row) => row).filter((row) => !faults.some((fault) => fault.list === list && fault.row === row));
  const rows = {
    readings: kept('readings'),
    attributes: kept('attributes'),
    process: kept('process'),
    indications: kept('indications'),
  };
  const pick = <T>(values: readonly T[], list: JudgedList): T[] => rows[list].flatMap((row) => values.slice(row, row + 1));
  const { observations, places } = input;
  return {
    criteria: input.criteria,
    observations: {
      methods: observations.methods,
      readings: pick(observations.readings, 'readings'),
      attributes: pick(observations.attributes, 'attributes'),
      process: pick(observations.process, 'process'),
      indications: pick(observations.indications, 'indications'),
    },
    places: {
      readings: pick(places.readings, 'readings'),
      attributes: pick(places.attributes, 'attributes'),
      process: pick(places.process, 'process'),
      indications: pick(places.indications, 'indications'),
    },
  };
}

// The engine reports every fault in one pass; a second pass can only find what the removed rows hid.
const mostPasses = 4;

/**
 * Judges a draft as it stands. A row the engine cannot take (`1,2,3`, `NaN`, a wrong unit) is reported by its field and
 * left out, so that everything else still has its verdict and the row's number counts as missing.
 */
export function judgeDraft(source: JudgingSource, askEngine: AskEngine): Judgement {
  return judgeInput(judgingInput(source), askEngine);
}

export function judgeInput(asked: JudgingInput, askEngine: AskEngine): Judgement {
  let input = asked;
  const reported: EntryFault[] = [];
  for (let pass = 0; pass < mostPasses; pass += 1) {
    const answer = askEngine({ criteria: input.criteria, observations: input.observations });
    if ('evaluation' in answer) return { evaluation: answer.evaluation, faults: reported };
    const located: Located[] = [];
    for (const { path, message } of answer.faults) {
      const fault = locate(path);
      if (fault) located.push(fault);
      const place = fault ? input.places[fault.list][fault.row] : undefined;
      reported.push({
        path: fault && place !== undefined ? [fault.list, String(place), fault.rest].filter(Boolean).join('.') : path,
        message,
      });
    }
    if (located.length === 0) return { evaluation: null, faults: reported };
    input = without(input, located);
  }
  return { evaluation: null, faults: reported };
}
