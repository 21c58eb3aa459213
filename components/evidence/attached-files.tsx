'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Glyph } from '@/components/ui/glyph';
import type { InspectionAnswer } from '@/services/contracts/inspections';

export type AttachedFile = InspectionAnswer['evidence'][number];

/** A picture the viewer can show; anything else is opened beside. */
export function isPicture(file: AttachedFile): boolean {
  return (
    file.width !== null && file.height !== null && (file.hasPixels || file.hasPreview || file.mediaType.startsWith('image/'))
  );
}

export interface AttachedFilesProps {
  readonly files: readonly AttachedFile[];
  readonly shownId: string | null;
  readonly readOnly: boolean;
  readonly onShow: (id: string) => void;
  readonly onDetach: (file: AttachedFile) => void;
}

/** What is attached: pictures are shown on the left of the bench, other files opened beside it. */
export function AttachedFiles({ files, shownId, readOnly, onShow, onDetach }: AttachedFilesProps) {
  const t = useMessages('evidence');
  if (files.length === 0) return null;
  return (
    <ul aria-label={t('attached')} className="flex flex-wrap gap-2">
      {files.map((file) => (
        <li key={file.id} className="flex items-center">
          {isPicture(file) ? (
            <Button aria-pressed={file.id === shownId} className="max-w-60" onClick={() => onShow(file.id)}>
              <span className="truncate">{t('show', { name: file.name })}</span>
            </Button>
          ) : (
            <a
              href={`/api/evidence/${file.id}`}
              target="_blank"
              rel="noreferrer"
              className="control flex max-w-60 items-center px-2 text-accent underline underline-offset-4"
            >
              <span className="truncate">{t('open', { name: file.name })}</span>
            </a>
          )}
          {readOnly ? null : (
            <Button
              kind="bare"
              aria-label={t('detachOf', { name: file.name })}
              title={t('detach')}
              className="w-12 px-0"
              onClick={() => onDetach(file)}
            >
              <Glyph name="away" />
            </Button>
          )}
        </li>
      ))}
    </ul>
  );
}
