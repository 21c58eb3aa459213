'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import type { EvidenceRole } from '@/services/contracts/evidence';
import { FileButton } from './file-button';

const roles = ['radiograph', 'photograph', 'reading-file', 'document'] as const satisfies readonly EvidenceRole[];

export interface AttachFieldProps {
  /** What this operation asks for first. */
  readonly usualRole: EvidenceRole;
  readonly views: readonly { readonly name: string; readonly title: string }[];
  readonly view: string;
  readonly onView: (view: string) => void;
  readonly onFiles: (files: readonly File[], role: EvidenceRole) => void;
}

/** Chooses files, several at once, with what they are and which view they show; they can be dropped on it too. */
export function AttachField({ usualRole, views, view, onView, onFiles }: AttachFieldProps) {
  const t = useMessages('evidence');
  const [role, setRole] = useState<EvidenceRole>(usualRole);
  return (
    <div
      className="flex flex-wrap items-center gap-2"
      onDragOver={(event) => event.preventDefault()}
      onDrop={(event) => {
        event.preventDefault();
        onFiles([...event.dataTransfer.files], role);
      }}
    >
      <FileButton id="attach" label={t('attach')} multiple onFiles={(files) => onFiles(files, role)} />
      <label className="flex items-center gap-2">
        <span className="sr-only">{t('role')}</span>
        <select className="field w-auto" value={role} onChange={(event) => setRole(event.target.value as EvidenceRole)}>
          {roles.map((one) => (
            <option key={one} value={one}>
              {t(`roles.${one}`)}
            </option>
          ))}
        </select>
      </label>
      {views.length > 1 ? (
        <label className="flex items-center gap-2">
          <span className="sr-only">{t('view')}</span>
          <select className="field w-auto" value={view} onChange={(event) => onView(event.target.value)}>
            {views.map(({ name, title }) => (
              <option key={name} value={name}>
                {title}
              </option>
            ))}
          </select>
        </label>
      ) : null}
    </div>
  );
}
