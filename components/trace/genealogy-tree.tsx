'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import type { Trace } from '@/services/contracts/trace';

type TracedLot = Trace['genealogy'][number];

/** Each lot once, under the first that came from it, nearest the part first. */
function childrenOf(lots: readonly TracedLot[]): Map<string, TracedLot[]> {
  const placed = new Set<string>(lots.slice(0, 1).map(({ id }) => id));
  const tree = new Map<string, TracedLot[]>();
  for (const lot of lots) {
    const under = lots.filter(({ id }) => lot.parents.includes(id) && !placed.has(id));
    under.forEach(({ id }) => placed.add(id));
    tree.set(lot.id, under);
  }
  return tree;
}

function Node({ lot, tree }: { lot: TracedLot; tree: Map<string, TracedLot[]> }) {
  const t = useMessages('lots');
  const above = tree.get(lot.id) ?? [];
  return (
    <li>
      <p className="flex flex-wrap items-baseline gap-x-2 py-1">
        {t(`kinds.${lot.kind}`)}
        <Link href={`/lots/${lot.id}`} className="font-mono text-accent underline underline-offset-4">
          {lot.number}
        </Link>
        <span className="text-sm text-ink-soft">
          {Object.entries(lot.attributes)
            .map(([name, value]) => `${name} ${value}`)
            .join(', ')}
        </span>
      </p>
      {above.length > 0 ? (
        <ul className="ml-2 border-l border-line-strong pl-4">
          {above.map((one) => (
            <Node key={one.id} lot={one} tree={tree} />
          ))}
        </ul>
      ) : null}
    </li>
  );
}

/** From the cluster back to heat, shell, core and wax. */
export function GenealogyTree({ lots }: { lots: readonly TracedLot[] }) {
  const t = useMessages('trace');
  const tree = childrenOf(lots);
  const [cluster] = lots;
  if (!cluster) return <p>{t('nothing')}</p>;
  return (
    <ul>
      <Node lot={cluster} tree={tree} />
    </ul>
  );
}
