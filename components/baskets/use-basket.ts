'use client';

import { useCallback, useState } from 'react';
import { playTone, type Tone } from '@/components/scanner/tones';
import { useAnswer } from '@/components/theme/use-answer';
import type { BasketAnswer, BasketPart } from '@/services/contracts/baskets';
import { basketSentence } from '@/services/contracts/signing-sentence';
import type { ScanEnd } from './scan-sender';
import { useScanQueue, type ScanQueue } from './use-scan-queue';

/** What the last scan came to: its tone, the name of its word, the serial or code, and a sentence where there is more to say. */
export interface LastScan {
  readonly tone: Tone;
  readonly word: string;
  readonly scan: string;
  readonly detail: string | null;
}

export interface BasketDesk {
  readonly answer: BasketAnswer | undefined;
  readonly problem: ReturnType<typeof useAnswer<BasketAnswer>>['problem'];
  readonly renew: (answer?: BasketAnswer) => Promise<unknown>;
  readonly queue: ScanQueue;
  readonly last: LastScan | null;
  readonly broke: () => void;
}

// Marks made at the bench, and what another tab scanned, are seen within this time.
const lookAgainMs = 10_000;

/** The basket as the server will answer it next: the sentence names the count that is now scanned. */
function withPart(answer: BasketAnswer, part: BasketPart, counts: BasketAnswer['counts']): BasketAnswer {
  const others = answer.parts.filter(({ inspection }) => inspection !== part.inspection);
  const { evaluator, number, partNumber, requirement } = answer;
  const { operation, title } = requirement;
  const sentence = basketSentence({ name: evaluator.name, basket: number, partNumber, operation, title, count: counts.scanned });
  return { ...answer, counts, sentence, parts: [...others, part] };
}

/** A refused scan of another part number has the rough tone, one that names nothing the low one. */
function outcomeOf(end: ScanEnd): LastScan {
  if (end.kind === 'answer') {
    const added = end.answer.outcome === 'added';
    return { tone: added ? 'added' : 'again', word: added ? 'added' : 'again', scan: end.answer.part.serial, detail: null };
  }
  const { why, scan, problem } = end;
  return { tone: why === 'unknown' ? 'unknown' : 'wrong', word: why, scan, detail: problem.detail ?? problem.title };
}

/** One basket as this person works on it: what is in it, the queue of its scans, and what the last one came to. */
export function useBasket(id: string, personId: string): BasketDesk {
  const { answer, problem, renew } = useAnswer<BasketAnswer>(`/api/baskets/${id}`, lookAgainMs);
  const [last, setLast] = useState<LastScan | null>(null);
  const onEnd = useCallback(
    (end: ScanEnd) => {
      const outcome = outcomeOf(end);
      setLast(outcome);
      playTone(outcome.tone);
      if (end.kind === 'answer' && answer) void renew(withPart(answer, end.answer.part, end.answer.counts));
    },
    [answer, renew],
  );
  const queue = useScanQueue(personId, id, onEnd);
  const broke = useCallback(() => {
    setLast({ tone: 'unknown', word: 'broken', scan: '', detail: null });
    playTone('unknown');
  }, []);
  return { answer, problem, renew, queue, last, broke };
}
