'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { Progress } from '@/components/ui/progress';
import type { Upload, Uploads } from './use-uploads';

function UploadRow({ upload, uploads }: { upload: Upload; uploads: Uploads }) {
  const t = useMessages('evidence');
  const { key, file, state, percent, problem } = upload;
  const { name } = file;
  if (state === 'sending') {
    return (
      <li className="flex items-center gap-3">
        <div className="min-w-0 flex-1">
          <Progress
            label={t('sending', { name })}
            done={percent}
            words={percent >= 100 ? t('checking') : t('percent', { percent })}
          />
        </div>
        <Button aria-label={t('cancelOf', { name })} onClick={() => uploads.cancel(key)}>
          {t('cancel')}
        </Button>
      </li>
    );
  }
  const actions = (
    <>
      <Button aria-label={t('againOf', { name })} onClick={() => uploads.again(key)}>
        {t('again')}
      </Button>
      <Button kind="bare" aria-label={t('dropOf', { name })} onClick={() => uploads.drop(key)}>
        {t('drop')}
      </Button>
    </>
  );
  return (
    <li className="flex flex-col gap-1">
      <span className="flex flex-wrap items-center gap-2">
        <strong className="min-w-0 flex-1 truncate">
          {state === 'stopped' ? t('stopped', { name }) : t('refused', { name })}
        </strong>
        {actions}
      </span>
      {problem ? <ProblemNotice problem={problem} /> : null}
    </li>
  );
}

/** What is on its way, what was stopped and what was refused with its reason. */
export function UploadList({ uploads }: { uploads: Uploads }) {
  const t = useMessages('evidence');
  if (uploads.list.length === 0) return null;
  return (
    <ul aria-label={t('onTheWay')} className="flex max-h-52 flex-col gap-2 overflow-y-auto border border-line bg-raised p-2">
      {uploads.list.map((upload) => (
        <UploadRow key={upload.key} upload={upload} uploads={uploads} />
      ))}
    </ul>
  );
}
