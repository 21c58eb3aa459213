'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { Dialog } from '@/components/ui/dialog';
import { When } from '@/components/ui/when';
import { draftDifferences, type Difference } from './draft-differences';
import type { Draft } from './use-draft';

/** Two versions of one draft side by side. Nothing is saved until the person has chosen; closing it decides nothing. */
export function TwoVersions({ draft, open, onClose }: { draft: Draft; open: boolean; onClose: () => void }) {
  const t = useMessages('inspections');
  const { theirs } = draft;
  if (!theirs) return null;
  const nameOf = ({ list, name }: Difference) => {
    if (list === 'readings') return t('reading', { number: name });
    if (list === 'attributes') return t('lacks.attribute', { name });
    if (list === 'process') return t('lacks.process', { name });
    if (list === 'indications') return t('indication', { id: name });
    if (list === 'acts') return t(`act.${name as 'measured'}`);
    return list === 'examined' ? t('lacks.examined', { name: '' }) : t('notes');
  };
  const actions = (
    <>
      <Button size="capture" onClick={draft.takeTheirs}>
        {t('takeTheirs')}
      </Button>
      <Button size="capture" kind="primary" onClick={draft.keepMine}>
        {t('keepMine')}
      </Button>
    </>
  );
  return (
    <Dialog open={open} onClose={onClose} title={t('conflict')} width="wide" actions={actions}>
      <p className="mb-3">
        {t('conflictText', { name: theirs.changed.name })} <When at={theirs.changed.at} to="second" />
      </p>
      <div className="max-h-96 overflow-y-auto">
        <DataTable
          caption={t('conflict')}
          rows={draftDifferences(draft.content, theirs.content)}
          rowKey={(row) => `${row.list} ${row.name}`}
          columns={[
            { key: 'name', title: t('entry'), names: true, cell: nameOf },
            { key: 'mine', title: t('mine'), cell: (row) => <span className="font-mono">{row.mine ?? '–'}</span> },
            { key: 'theirs', title: t('theirs'), cell: (row) => <span className="font-mono">{row.theirs ?? '–'}</span> },
          ]}
        />
      </div>
    </Dialog>
  );
}
