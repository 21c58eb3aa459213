'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { usePlanEditing } from './plan-editing';

/** Moves or takes away a row of a list; nothing where a plan is only read. */
export function RowButtons({ path, place, name }: { readonly path: string; readonly place: number; readonly name: string }) {
  const t = useMessages('plans');
  const { readOnly, rows, move, remove } = usePlanEditing();
  if (readOnly) return null;
  return (
    <div className="flex items-center">
      <Button kind="bare" disabled={place === 0} aria-label={t('up', { name })} onClick={() => move(path, place, -1)}>
        ↑
      </Button>
      <Button
        kind="bare"
        disabled={place === rows(path).length - 1}
        aria-label={t('down', { name })}
        onClick={() => move(path, place, 1)}
      >
        ↓
      </Button>
      <Button kind="bare" aria-label={t('remove', { name })} onClick={() => remove(path, place)}>
        {t('removeShort')}
      </Button>
    </div>
  );
}

/** Adds a row to a list; nothing where a plan is only read. */
export function AddRow({ path, row, label }: { readonly path: string; readonly row: unknown; readonly label: string }) {
  const { readOnly, add } = usePlanEditing();
  return readOnly ? null : <Button onClick={() => add(path, row)}>{label}</Button>;
}
