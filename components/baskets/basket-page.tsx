'use client';

import Link from 'next/link';
import { useState } from 'react';
import { useScans } from '@/components/scanner/page-scanner';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageTitle } from '@/components/ui/page-title';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { BasketAnswer, BasketPart } from '@/services/contracts/baskets';
import { PartsList } from './parts-list';
import { ReasonDialog } from './reason-dialog';
import { Counts, LastScanBlock, TypedSerial, Waiting } from './scan-panel';
import { SetUpPanel } from './set-up-panel';
import { SignBasketDialog } from './sign-basket-dialog';
import { SplitDialog } from './split-dialog';
import { useBasket, type BasketDesk } from './use-basket';

interface Person {
  readonly id: string;
  readonly name: string;
}

function Head({ basket }: { basket: BasketAnswer }) {
  const t = useMessages('baskets');
  const { requirement, line, run } = basket;
  return (
    <header className="flex flex-wrap items-baseline gap-x-5 gap-y-0.5 border-b border-line-strong bg-raised px-3 py-1.5">
      <PageTitle title={`${basket.number} ${basket.partNumber}`} />
      <h1 className="text-xl font-bold">
        <span className="font-mono">{basket.number}</span>{' '}
        <span className="font-normal">
          <span className="font-mono">{basket.partNumber}</span> {basket.title}
        </span>
      </h1>
      <p className="text-lg font-semibold">
        {requirement.operation} {requirement.title}
      </p>
      <p className="text-ink-soft">
        {[
          requirement.technique === null ? t('noTechnique') : t('technique', { number: requirement.technique }),
          line ?? t('noLine'),
          basket.evaluator.name,
        ].join(' · ')}
      </p>
      {run ? (
        <Link href={`/runs/${run.id}`} className="text-accent underline underline-offset-4">
          {t('byRun', { number: run.number })}
        </Link>
      ) : null}
      {basket.splitFrom ? (
        <Link href={`/baskets/${basket.splitFrom.id}`} className="text-accent underline underline-offset-4">
          {t('splitFrom', { number: basket.splitFrom.number })}
        </Link>
      ) : null}
      {basket.splitInto.map((next) => (
        <Link key={next.id} href={`/baskets/${next.id}`} className="text-accent underline underline-offset-4">
          {t('splitInto', { number: next.number, name: next.evaluator })}
        </Link>
      ))}
    </header>
  );
}

const leaves = ({ number, verdict }: BasketPart) => number !== null && verdict !== null && verdict !== 'accept';

/** How it ended; the tags of what leaves it. */
function Ended({ basket }: { basket: BasketAnswer }) {
  const t = useMessages('baskets');
  const { signed } = basket;
  return signed ? (
    <Notice kind="done" title={t('signedTitle', { count: signed.count })}>
      <p>
        {t('signedBy', { name: signed.by })} <When at={signed.at} />
      </p>
      <p className="text-ink-soft">{signed.sentence}</p>
    </Notice>
  ) : (
    <StateWord state={basket.state} word={t(`states.${basket.state}`)} glyph="cross" tone="soft" />
  );
}

/** Always at the foot: what the basket holds in words, and what can be done with it. */
function Foot({
  basket,
  me,
  desk,
  own,
  mayInspect,
}: {
  basket: BasketAnswer;
  me: Person;
  desk: BasketDesk;
  own: boolean;
  mayInspect: boolean;
}) {
  const t = useMessages('baskets');
  const [givingUp, setGivingUp] = useState(false);
  const inside = basket.parts.filter(({ mark }) => mark === 'clean' || mark === 'marked');
  const marked = inside.filter(({ mark }) => mark === 'marked').length;
  const rejected = basket.parts.filter(({ verdict }) => verdict === 'reject').length;
  const open = basket.state === 'open';
  return (
    <footer className="flex flex-wrap items-center gap-3 border-t border-line-strong bg-raised px-3 py-1.5">
      <p role="status" className="min-w-0 flex-1 text-lg font-semibold">
        {open ? `${t('summary', { clean: inside.length - marked, marked })} · ` : null}
        <span className={rejected > 0 ? 'text-reject' : ''}>{t('rejected', { count: rejected })}</span>
      </p>
      {basket.parts.some(leaves) ? (
        <LinkButton size="capture" href={`/baskets/${basket.id}/tags`}>
          {t('tags')}
        </LinkButton>
      ) : null}
      {open && own ? (
        <Button size="capture" onClick={() => setGivingUp(true)}>
          {t('giveUp')}
        </Button>
      ) : null}
      {open && mayInspect ? <SplitDialog basket={basket} me={me.id} onSplit={() => void desk.renew()} /> : null}
      {open && own ? (
        <SignBasketDialog basket={basket} waiting={desk.queue.waiting.length} onSigned={() => desk.renew()} />
      ) : null}
      <ReasonDialog
        open={givingUp}
        title={t('giveUpTitle')}
        text={t('giveUpText')}
        does={t('giveUpNow')}
        url={`/api/baskets/${basket.id}/closing`}
        onDone={(answer) => {
          setGivingUp(false);
          void desk.renew(answer);
        }}
        onClose={() => setGivingUp(false)}
      />
    </footer>
  );
}

function Basket({ basket, me, desk, mayInspect }: { basket: BasketAnswer; me: Person; desk: BasketDesk; mayInspect: boolean }) {
  const t = useMessages('baskets');
  const own = mayInspect && basket.evaluator.id === me.id;
  const writable = own && basket.state === 'open';
  const change = (answer: BasketAnswer) => void desk.renew(answer);
  return (
    <div data-density="capture" className="flex h-[calc(100dvh-5rem)] min-h-0 flex-col">
      <Head basket={basket} />
      <div className="grid min-h-0 flex-1 gap-3 py-2 md:grid-cols-[minmax(20rem,2fr)_minmax(0,3fr)] md:grid-rows-1">
        <div className="flex min-h-0 flex-col gap-2 overflow-y-auto">
          {basket.state === 'open' ? null : <Ended basket={basket} />}
          {writable ? (
            <>
              <div role="status" aria-live="assertive">
                <LastScanBlock last={desk.last} />
              </div>
              <Waiting queue={desk.queue} />
            </>
          ) : null}
          <Counts counts={basket.counts} />
          {writable ? <TypedSerial onAdd={desk.queue.add} /> : null}
          {basket.state === 'open' && !own ? (
            <Notice kind="unsure" title={t('notYours', { name: basket.evaluator.name })} />
          ) : null}
          <SetUpPanel basket={basket} writable={writable} onChange={change} />
        </div>
        <div className="flex min-h-0 min-w-0 flex-col">
          <PartsList basket={basket} writable={writable} onChange={change} />
        </div>
      </div>
      <Foot basket={basket} me={me} desk={desk} own={own} mayInspect={mayInspect} />
    </div>
  );
}

/** The basket: each part is scanned as it is inspected; one signature for all. Scans go here while the page is open. */
export function BasketPage({ id, me, mayInspect }: { id: string; me: Person; mayInspect: boolean }) {
  const desk = useBasket(id, me.id);
  const { answer, problem, queue } = desk;
  const takes = mayInspect && answer?.state === 'open' && answer.evaluator.id === me.id;
  useScans({
    onScan: (text) => {
      if (takes) queue.add(text);
    },
    onBroken: desk.broke,
  });
  // A lost network must not take the basket away: what was read stays.
  if (!answer) return problem ? <ProblemNotice problem={problem} /> : <Skeleton lines={10} />;
  return <Basket basket={answer} me={me} desk={desk} mayInspect={mayInspect} />;
}
